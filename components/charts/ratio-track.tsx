import { cn } from "@/components/ui/cn";
import { LogGrid, percent } from "./log-axis";
import { labelledTicks, type LogScale } from "./log-scale";
import { MeasuredPeg, RangeBar } from "./range-track";
import type { StrategyMarkId } from "./strategy-identity";
import { StrategyShape } from "./strategy-mark";

type RatioTrackProps = {
  scale: LogScale;
  low: number;
  median: number;
  high: number;
  /** A measured value on the same axis, drawn as a peg. */
  measured?: number | null;
  /** CSS colour of the bar. */
  colour: string;
  /** The strategy whose sign stands at the median; without it a stroke does. */
  mark?: StrategyMarkId;
  /** The whole in words, for screen readers and on hover. */
  words: string;
  /** A value to mark with a stronger line, such as 1 on an axis of ratios. */
  reference?: number;
};

/** One range on a shared log axis whose words the caller writes: the 80 % range as a bar, its median as a sign, a measured value as a peg. */
export function RatioTrack({ scale, low, median, high, measured = null, colour, mark, words, reference }: RatioTrackProps) {
  return (
    <span className="block" role="img" aria-label={words} title={words}>
      <svg aria-hidden className="block h-8 w-full overflow-visible">
        <LogGrid scale={scale} />
        {reference !== undefined && <line x1={percent(scale.position(reference))} x2={percent(scale.position(reference))} y1="0%" y2="100%" className="stroke-contour" strokeWidth="1.5" />}
        <RangeBar scale={scale} range={{ low, median, high }} colour={colour}>
          {mark === undefined ? <rect x="-2" y="-8" width="4" height="16" fill="currentColor" className="stroke-sheet" /> : <StrategyShape id={mark} rim />}
        </RangeBar>
        {measured !== null && <MeasuredPeg scale={scale} value={measured} />}
      </svg>
    </span>
  );
}

/** The ticks above a column of tracks. */
export function TrackAxis({ scale, format }: { scale: LogScale; format: (value: number) => string }) {
  return (
    <span aria-hidden className="relative block h-5 text-xs text-faint">
      {labelledTicks(scale).map(({ tick, narrow }) => (
        <span key={tick.value} className={cn("figures absolute bottom-0 -translate-x-1/2 whitespace-nowrap", !narrow && "max-sm:hidden")} style={{ left: percent(scale.position(tick.value)) }}>
          {format(tick.value)}
        </span>
      ))}
    </span>
  );
}
