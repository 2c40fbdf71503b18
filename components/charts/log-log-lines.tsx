import { cn } from "@/components/ui/cn";
import { formatQuantity, formatRange, formatSi, type QuantityUnit } from "@/lib/shared/format";
import { ChartTable } from "./chart-table";
import { findCrossings, type Crossing, type SeriesPoint } from "./crossings";
import { LogAxis, LogGrid, percent, tickText } from "./log-axis";
import { labelledTicks, makeLogScale, type LogScale } from "./log-scale";
import { strategyColours, type StrategyMarkId } from "./strategy-identity";
import { StrategyMark, StrategyShape } from "./strategy-mark";

export type LogLogSeries = { id: StrategyMarkId; label: string; points: readonly SeriesPoint[] };

type LogLogLinesProps = { title: string; xLabel: string; yLabel: string; xUnit: QuantityUnit; yUnit: QuantityUnit; series: readonly LogLogSeries[]; className?: string };

/** Several strategies against size on log-log axes: lines of medians, bands of ranges, marks at the points, rings where lines cross. */
export function LogLogLines({ title, xLabel, yLabel, xUnit, yUnit, series, className }: LogLogLinesProps) {
  const points = series.flatMap((one) => one.points);
  if (points.length === 0) return <p className={cn("text-sm text-faint", className)}>{title}: nothing to draw yet.</p>;
  const x = makeLogScale(points.map((point) => point.x), xUnit);
  const y = makeLogScale(points.flatMap((point) => [point.low, point.median, point.high]), yUnit);
  const crossings = findCrossings(series);
  const names = new Map<string, string>(series.map((one) => [one.id, one.label]));
  const sentences = crossings.map((crossing) => `${names.get(crossing.first) ?? ""} and ${names.get(crossing.second) ?? ""} cross at ${formatSi(crossing.x)} (${formatQuantity(crossing.y, yUnit)})`);
  return (
    <figure className={cn("@container min-w-0", className)}>
      <figcaption className="mb-1 font-semibold">{title}</figcaption>
      <p className="mb-2 text-sm text-faint">
        {yLabel}, against {xLabel}; both log scales; band: 80 % range
      </p>
      <div className="grid grid-cols-[4rem_minmax(0,1fr)] pr-4">
        <UprightAxis scale={y} unit={yUnit} />
        <svg role="img" aria-label={`${title}. ${series.map((one) => one.label).join(", ")}. ${sentences.join("; ")}`} className="block h-72 w-full overflow-visible">
          <LogGrid scale={x} />
          <UprightGrid scale={y} />
          {series.map((one) => (
            <SeriesLine key={one.id} series={one} x={x} y={y} yUnit={yUnit} />
          ))}
          {crossings.map((crossing) => (
            <CrossingRing key={`${crossing.first}-${crossing.second}-${crossing.x}`} crossing={crossing} x={x} y={y} />
          ))}
        </svg>
        <span />
        <LogAxis scale={x} unit={xUnit} edge="bottom" />
      </div>
      <ul className="mt-2 flex flex-wrap gap-x-5 gap-y-1 text-sm">
        {series.map((one) => (
          <li key={one.id} className="flex items-center gap-2">
            <StrategyMark id={one.id} /> {one.label}
          </li>
        ))}
      </ul>
      {sentences.length > 0 && (
        <ul className="mt-2 list-none text-sm text-faint">
          {sentences.map((sentence) => (
            <li key={sentence}>{sentence}.</li>
          ))}
        </ul>
      )}
      <ChartTable
        caption={title}
        columns={["Strategy", xLabel, yLabel, "80 % range"]}
        rows={series.flatMap((one) => one.points.map((point) => [one.label, formatQuantity(point.x, xUnit), formatQuantity(point.median, yUnit), formatRange(point.low, point.high, yUnit)]))}
      />
    </figure>
  );
}

function SeriesLine({ series, x, y, yUnit }: { series: LogLogSeries; x: LogScale; y: LogScale; yUnit: QuantityUnit }) {
  const points = [...series.points].sort((left, right) => left.x - right.x);
  const path = (value: (point: SeriesPoint) => number, order = points): string => order.map((point) => `${x.position(point.x).toFixed(2)} ${(100 - y.position(value(point))).toFixed(2)}`).join("L");
  return (
    <g style={{ color: strategyColours[series.id] }}>
      <svg viewBox="0 0 100 100" preserveAspectRatio="none" width="100%" height="100%" className="overflow-visible" fill="none">
        <path d={`M${path((point) => point.high)}L${path((point) => point.low, [...points].reverse())}Z`} fill="currentColor" fillOpacity="0.12" />
        <path d={`M${path((point) => point.median)}`} stroke="currentColor" strokeWidth="1.75" vectorEffect="non-scaling-stroke" />
      </svg>
      {points.map((point) => (
        <svg key={point.x} x={percent(x.position(point.x))} y={percent(100 - y.position(point.median))} className="overflow-visible">
          <title>{`${series.label}, ${formatSi(point.x)}: ${formatQuantity(point.median, yUnit)} (${formatRange(point.low, point.high, yUnit)})`}</title>
          <StrategyShape id={series.id} rim />
        </svg>
      ))}
    </g>
  );
}

function CrossingRing({ crossing, x, y }: { crossing: Crossing; x: LogScale; y: LogScale }) {
  const left = x.position(crossing.x);
  return (
    <svg x={percent(left)} y={percent(100 - y.position(crossing.y))} className="overflow-visible">
      <circle r="8" fill="none" className="stroke-ink" strokeWidth="1.25" />
      <text x={left > 80 ? -11 : 11} y="18" textAnchor={left > 80 ? "end" : "start"} className="figures fill-ink stroke-sheet text-xs font-semibold" strokeWidth="4" paintOrder="stroke">
        {formatSi(crossing.x, "", 2)}
      </text>
    </svg>
  );
}

function UprightAxis({ scale, unit }: { scale: LogScale; unit: QuantityUnit }) {
  return (
    <svg aria-hidden className="figures block h-72 w-full overflow-visible text-xs">
      <line x1="100%" x2="100%" y1="0%" y2="100%" className="stroke-contour" />
      {labelledTicks(scale).map(({ tick }) => (
        <text key={tick.value} x="100%" dx="-7" y={percent(100 - scale.position(tick.value))} dy="4" textAnchor="end" className="fill-faint">
          {tickText(tick.value, unit)}
        </text>
      ))}
    </svg>
  );
}

function UprightGrid({ scale }: { scale: LogScale }) {
  return (
    <g>
      {scale.ticks.map((tick) => (
        <line
          key={tick.value}
          x1="0%"
          x2="100%"
          y1={percent(100 - scale.position(tick.value))}
          y2={percent(100 - scale.position(tick.value))}
          className="stroke-hairline"
          strokeWidth={tick.step === 1 ? 1 : 0.6}
          strokeDasharray={tick.step === 1 ? undefined : "1 3"}
        />
      ))}
    </g>
  );
}
