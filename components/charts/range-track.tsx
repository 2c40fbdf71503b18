import { cn } from "@/components/ui/cn";
import { formatQuantity, formatRange, type QuantityUnit } from "@/lib/shared/format";
import type { LogScale } from "./log-scale";
import { strategyColours, type StrategyMarkId } from "./strategy-identity";
import { StrategyMark } from "./strategy-mark";

export type RangeValues = { low: number; median: number; high: number };

type RangeTrackProps = {
  scale: LogScale;
  unit: QuantityUnit;
  /** Names the row, for screen readers. */
  label: string;
  mark: StrategyMarkId;
  range: RangeValues | null;
  measured: readonly number[];
  muted: boolean;
  reference: number | null;
};

/** One row's range on the shared axis: the 80 % range as a bar, the median as the strategy's mark, measured values as pegs. */
export function RangeTrack({ scale, unit, label, mark, range, measured, muted, reference }: RangeTrackProps) {
  const words = range === null ? `${label}: no estimate` : `${label}: ${formatQuantity(range.median, unit)}, ${formatRange(range.low, range.high, unit)}`;
  const pegs = measured.length === 0 ? "" : `; measured ${measured.map((value) => formatQuantity(value, unit)).join(", ")}`;
  return (
    <span role="img" aria-label={words + pegs} className="relative block h-6" style={{ color: strategyColours[mark] }}>
      {scale.ticks.filter((tick) => tick.step === 1).map((tick) => (
        <span key={tick.value} className="absolute inset-y-0 w-px bg-hairline" style={{ left: `${scale.position(tick.value)}%` }} />
      ))}
      {reference !== null && <span className="absolute inset-y-0 border-l border-dashed border-bad" style={{ left: `${scale.position(reference)}%` }} />}
      {range !== null && (
        <>
          <span
            className={cn("absolute top-2 h-2 min-w-1 rounded-full", muted ? "border border-dashed border-current" : "bg-current opacity-40")}
            style={{ left: `${scale.position(range.low)}%`, width: `${scale.position(range.high) - scale.position(range.low)}%` }}
          />
          <span className="absolute top-1/2 grid -translate-x-1/2 -translate-y-1/2" style={{ left: `${scale.position(range.median)}%` }}>
            <StrategyMark id={mark} hollow={muted} />
          </span>
        </>
      )}
      {measured.map((value, index) => (
        <span key={index} className="absolute -top-0.5 size-0 -translate-x-1/2 border-x-[5px] border-t-8 border-x-transparent border-t-peg" style={{ left: `${scale.position(value)}%` }} />
      ))}
    </span>
  );
}
