"use client";

import { CartesianGrid, Line, LineChart, ReferenceLine, ResponsiveContainer, Tooltip, XAxis, YAxis } from "recharts";
import { formatNumber, formatPowerOfTen } from "@/lib/shared/format";
import type { ResidualPoint } from "./residual-history";

/** The drawing inside ResidualHistory, by itself so that its library loads only when it is shown. */
export function ResidualLines({ history, tolerance }: { history: readonly ResidualPoint[]; tolerance?: number }) {
  const decades = decadesOf(history, tolerance);
  const data = history.map((point) => ({ iteration: point.iteration, monitored: positive(point.monitored), true: positive(point.true) }));
  return (
    <ResponsiveContainer width="100%" height="100%" initialDimension={{ width: 480, height: 256 }}>
      <LineChart data={data} margin={{ top: 8, right: 14, bottom: 4, left: 8 }} accessibilityLayer={false}>
        <CartesianGrid stroke="var(--hairline)" />
        <XAxis dataKey="iteration" type="number" domain={["dataMin", "dataMax"]} tick={tickStyle} stroke="var(--contour)" allowDecimals={false} />
        <YAxis type="number" scale="log" domain={[decades.at(0) ?? 1e-10, decades.at(-1) ?? 1]} ticks={decades} interval={0} allowDataOverflow tickFormatter={formatPowerOfTen} tick={tickStyle} stroke="var(--contour)" width={64} />
        <Tooltip formatter={(value) => formatNumber(typeof value === "number" ? value : null)} labelFormatter={(label) => `Iteration ${String(label)}`} contentStyle={tooltipStyle} isAnimationActive={false} />
        {tolerance !== undefined && <ReferenceLine y={tolerance} stroke="var(--bad)" strokeDasharray="5 3" />}
        <Line name="monitored" dataKey="monitored" stroke="var(--water)" strokeWidth={2} dot={false} isAnimationActive={false} />
        <Line name="true" dataKey="true" stroke="var(--forest)" strokeWidth={2} strokeDasharray="6 3" dot={<SquareDot />} connectNulls isAnimationActive={false} />
      </LineChart>
    </ResponsiveContainer>
  );
}

const tickStyle = { fill: "var(--faint)", fontSize: 12 };
const tooltipStyle = { background: "var(--sheet)", border: "1px solid var(--contour)", borderRadius: 2, color: "var(--ink)", fontSize: 14 };

function SquareDot({ cx, cy }: { cx?: number; cy?: number }) {
  return cx === undefined || cy === undefined ? null : <rect x={cx - 3} y={cy - 3} width="6" height="6" fill="var(--forest)" />;
}

function positive(value: number | null): number | null {
  return value !== null && value > 0 && Number.isFinite(value) ? value : null;
}

/** Whole decades around all values; at most about six of them get a label. */
function decadesOf(history: readonly ResidualPoint[], tolerance: number | undefined): number[] {
  const values = [...history.flatMap((point) => [point.monitored, point.true ?? point.monitored]), tolerance ?? 1].filter((value) => value > 0 && Number.isFinite(value));
  const low = Math.floor(Math.log10(Math.min(...values)));
  const high = Math.max(Math.ceil(Math.log10(Math.max(...values))), low + 1);
  const every = Math.max(1, Math.ceil((high - low) / 6));
  const count = Math.ceil((high - low) / every);
  return Array.from({ length: count + 1 }, (_, index) => Number(`1e${high - (count - index) * every}`));
}
