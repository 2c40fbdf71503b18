import { cn } from "@/components/ui/cn";
import { formatDate } from "@/lib/shared/format-date";
import { formatOf, formatPercent, formatRange } from "@/lib/shared/format";
import { ChartTable } from "./chart-table";
import { percent } from "./log-axis";

export type TimeSeriesPoint = { /** ISO date of the period's end. */ at: string; x: number; n: number; low: number; high: number };

type TimeSeriesProps = { title: string; points: readonly TimeSeriesPoint[]; /** Dated events drawn as upright lines, such as editions. */ events?: readonly { at: string; label: string }[]; className?: string };

/** A rate over time with its interval as a band. Periods without runs leave a gap in neither: they are simply not there. */
export function TimeSeries({ title, points, events = [], className }: TimeSeriesProps) {
  const shown = points.filter((point) => point.n > 0);
  if (shown.length === 0) return <p className={cn("text-sm text-faint", className)}>{title}: no comparable runs yet.</p>;
  const times = [...shown, ...events].map((entry) => Date.parse(entry.at));
  const [from, to] = [Math.min(...times), Math.max(...times)];
  const at = (date: string): number => (to === from ? 50 : ((Date.parse(date) - from) / (to - from)) * 100);
  const last = shown.at(-1);
  return (
    <figure className={cn("min-w-0", className)}>
      <figcaption className="mb-2 font-semibold">{title}</figcaption>
      <div className="grid grid-cols-[2.75rem_minmax(0,1fr)] pr-3">
        <RateAxis />
        <svg role="img" aria-label={seriesSentence(title, shown)} className="block h-52 w-full overflow-visible">
          <Plot points={shown} at={at} />
          {events.map((event) => (
            <g key={event.at + event.label}>
              <line x1={percent(at(event.at))} x2={percent(at(event.at))} y1="0%" y2="100%" className="stroke-contour" strokeDasharray="4 3" />
              <text x={percent(at(event.at))} y="-4" textAnchor={at(event.at) > 80 ? "end" : "start"} className="fill-faint text-xs">
                {event.label}
              </text>
            </g>
          ))}
        </svg>
        <span />
        <div className="figures flex justify-between pt-1 text-xs text-faint">
          <span>{formatDate(new Date(from))}</span>
          {to !== from && <span>{formatDate(new Date(to))}</span>}
        </div>
      </div>
      {last !== undefined && <p className="mt-1 text-sm text-faint">Line: rate; band: 95 % interval. Latest: {pointText(last)}.</p>}
      <ChartTable
        caption={title}
        columns={["Until", "Rate", "Counts", "95 % interval"]}
        rows={shown.map((point) => [formatDate(point.at), formatPercent(point.x / point.n), formatOf(point.x, point.n), formatRange(point.low, point.high, "fraction")])}
      />
    </figure>
  );
}

function RateAxis() {
  return (
    <svg aria-hidden className="figures block h-52 w-full overflow-visible text-xs">
      {[0, 0.25, 0.5, 0.75, 1].map((tick) => (
        <text key={tick} x="100%" dx="-8" y={percent(100 - tick * 100)} dy="4" textAnchor="end" className="fill-faint">
          {formatPercent(tick)}
        </text>
      ))}
    </svg>
  );
}

function Plot({ points, at }: { points: readonly TimeSeriesPoint[]; at: (date: string) => number }) {
  const path = (value: (point: TimeSeriesPoint) => number, order = points): string => order.map((point) => `${at(point.at).toFixed(2)} ${(100 - value(point) * 100).toFixed(2)}`).join("L");
  const rate = (point: TimeSeriesPoint): number => point.x / point.n;
  return (
    <>
      {[0, 25, 50, 75, 100].map((tick) => (
        <line key={tick} x1="0%" x2="100%" y1={`${tick}%`} y2={`${tick}%`} className={tick === 100 ? "stroke-contour" : "stroke-hairline"} />
      ))}
      <svg viewBox="0 0 100 100" preserveAspectRatio="none" width="100%" height="100%" className="overflow-visible text-water" fill="none">
        <path d={`M${path((point) => point.high)}L${path((point) => point.low, [...points].reverse())}Z`} fill="currentColor" fillOpacity="0.18" />
        <path d={`M${path(rate)}`} stroke="currentColor" strokeWidth="2" vectorEffect="non-scaling-stroke" />
      </svg>
      {points.map((point) => (
        <g key={point.at} className="text-water">
          <line x1={percent(at(point.at))} x2={percent(at(point.at))} y1={percent(100 - point.high * 100)} y2={percent(100 - point.low * 100)} stroke="currentColor" strokeOpacity="0.5" />
          <circle cx={percent(at(point.at))} cy={percent(100 - rate(point) * 100)} r="4" className="stroke-sheet" fill="currentColor">
            <title>{`${formatDate(point.at)}: ${pointText(point)}`}</title>
          </circle>
        </g>
      ))}
    </>
  );
}

function pointText(point: TimeSeriesPoint): string {
  return `${formatPercent(point.x / point.n)}, ${formatOf(point.x, point.n)} (${formatRange(point.low, point.high, "fraction")})`;
}

function seriesSentence(title: string, points: readonly TimeSeriesPoint[]): string {
  const [first, last] = [points.at(0), points.at(-1)];
  if (first === undefined || last === undefined) return title;
  return `${title}: ${formatDate(first.at)} ${pointText(first)}; ${formatDate(last.at)} ${pointText(last)}`;
}
