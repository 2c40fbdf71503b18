import { labelledTicks, type LogScale } from "./log-scale";

type RatioTrackProps = {
  scale: LogScale;
  low: number;
  median: number;
  high: number;
  /** A measured value on the same axis, drawn as a peg. */
  measured?: number | null;
  /** CSS colour of the bar. */
  colour: string;
  /** The whole in words, for screen readers and on hover. */
  words: string;
  /** A value to mark with a stronger line, such as 1 on an axis of ratios. */
  reference?: number;
};

/** One range on a shared log axis: the 80 % range as a bar, its median as a stroke, a measured value as a peg. */
export function RatioTrack({ scale, low, median, high, measured = null, colour, words, reference }: RatioTrackProps) {
  const left = scale.position(low);
  return (
    <span className="relative block h-5" role="img" aria-label={words} title={words}>
      {scale.ticks.filter((tick) => tick.step === 1).map((tick) => (
        <span key={tick.value} className="absolute inset-y-0 w-px bg-hairline" style={{ left: `${scale.position(tick.value)}%` }} />
      ))}
      {reference !== undefined && <span className="absolute inset-y-0 w-px bg-contour" style={{ left: `${scale.position(reference)}%` }} />}
      <span className="absolute top-1.5 h-2 min-w-1 rounded-full opacity-45" style={{ left: `${left}%`, width: `${scale.position(high) - left}%`, background: colour }} />
      <span className="absolute top-0.5 h-4 w-1 -translate-x-1/2 rounded-full" style={{ left: `${scale.position(median)}%`, background: colour }} />
      {measured !== null && (
        <span className="absolute -top-1 size-0 -translate-x-1/2 border-x-[5px] border-t-8 border-x-transparent border-t-peg" style={{ left: `${scale.position(measured)}%` }} />
      )}
    </span>
  );
}

/** The ticks above a column of tracks. */
export function TrackAxis({ scale, format }: { scale: LogScale; format: (value: number) => string }) {
  return (
    <span aria-hidden className="relative block h-5 text-xs text-faint">
      {labelledTicks(scale).map(({ tick, narrow }) => (
        <span key={tick.value} className={`figures absolute bottom-0 -translate-x-1/2 whitespace-nowrap ${narrow ? "" : "max-sm:hidden"}`} style={{ left: `${scale.position(tick.value)}%` }}>
          {format(tick.value)}
        </span>
      ))}
    </span>
  );
}
