import { cn } from "@/components/ui/cn";
import { formatQuantity, formatSi, type QuantityUnit } from "@/lib/shared/format";
import { labelledTicks, type LogScale } from "./log-scale";

/** The tick labels of a log axis, at its upper or lower edge. Decorative: every value is also told in words. */
export function LogAxis({ scale, unit, edge }: { scale: LogScale; unit: QuantityUnit; edge: "top" | "bottom" }) {
  const labelY = edge === "top" ? 12 : 18;
  return (
    <svg aria-hidden className="figures block h-6 w-full overflow-visible text-xs" preserveAspectRatio="none">
      <line x1="0%" x2="100%" y1={edge === "top" ? 23.5 : 0.5} y2={edge === "top" ? 23.5 : 0.5} className="stroke-contour" />
      {scale.ticks.map((tick) => (
        <line key={tick.value} x1={percent(scale.position(tick.value))} x2={percent(scale.position(tick.value))} y1={edge === "top" ? 24 : 0} y2={tickEnd(edge, tick.step)} className="stroke-contour" />
      ))}
      {labelledTicks(scale).map(({ tick, narrow }) => (
        <text key={tick.value} x={percent(scale.position(tick.value))} y={labelY} textAnchor="middle" className={cn("fill-faint", !narrow && "hidden @lg:inline")}>
          {tickText(tick.value, unit)}
        </text>
      ))}
    </svg>
  );
}

/** The grid that a log axis throws over a row or plot; powers of ten are heavier. */
export function LogGrid({ scale }: { scale: LogScale }) {
  return (
    <g>
      {scale.ticks.map((tick) => (
        <line
          key={tick.value}
          x1={percent(scale.position(tick.value))}
          x2={percent(scale.position(tick.value))}
          y1="0%"
          y2="100%"
          className="stroke-hairline"
          strokeWidth={tick.step === 1 ? 1 : 0.6}
          strokeDasharray={tick.step === 1 ? undefined : "1 3"}
        />
      ))}
    </g>
  );
}

export function percent(value: number): string {
  return `${Math.round(value * 100) / 100}%`;
}

export function tickText(value: number, unit: QuantityUnit): string {
  return unit === "count" ? formatSi(value) : formatQuantity(value, unit);
}

function tickEnd(edge: "top" | "bottom", step: 1 | 2 | 5): number {
  const length = step === 1 ? 6 : 3.5;
  return edge === "top" ? 24 - length : length;
}
