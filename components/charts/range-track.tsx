import type { ReactNode } from "react";
import { formatQuantity, formatRange, type QuantityUnit } from "@/lib/shared/format";
import { LogGrid, percent } from "./log-axis";
import type { LogScale } from "./log-scale";
import { strategyColours, type StrategyMarkId } from "./strategy-identity";
import { StrategyShape } from "./strategy-mark";

export type RangeValues = { low: number; median: number; high: number };

type RangeTrackProps = {
  scale: LogScale;
  unit: QuantityUnit;
  /** Names the row, for screen readers. */
  label: string;
  mark: StrategyMarkId;
  /** Null where there is no estimate. */
  range: RangeValues | null;
  /** Measured values, drawn as pegs above the range. */
  measured?: readonly number[];
  muted?: boolean;
  /** A line across all rows, such as a limit. */
  reference?: number | null;
};

/** One row's range on the shared axis: the 80 % range as a bar, the median as the strategy's mark, measured values as pegs. */
export function RangeTrack({ scale, unit, label, mark, range, measured = [], muted = false, reference = null }: RangeTrackProps) {
  return (
    <div className="relative h-full min-h-8">
      <svg role="img" aria-label={rangeSentence(label, unit, range, measured)} className="absolute inset-0 size-full overflow-visible">
        <LogGrid scale={scale} />
        {reference !== null && <line x1={percent(scale.position(reference))} x2={percent(scale.position(reference))} y1="0%" y2="100%" className="stroke-bad" strokeWidth="1.5" strokeDasharray="5 3" />}
        {range !== null && (
          <RangeBar scale={scale} range={range} colour={muted ? "var(--faint)" : strategyColours[mark]} hollow={muted}>
            <StrategyShape id={mark} hollow={muted} rim />
          </RangeBar>
        )}
        {measured.map((value, index) => (
          <MeasuredPeg key={index} scale={scale} value={value} />
        ))}
      </svg>
    </div>
  );
}

type RangeBarProps = { scale: LogScale; range: RangeValues; colour: string; hollow?: boolean; /** The sign at the median, centred at its origin. */ children: ReactNode };

/** The bar itself, half-way up its drawing. */
export function RangeBar({ scale, range, colour, hollow = false, children }: RangeBarProps) {
  const [low, high] = [scale.position(range.low), scale.position(range.high)];
  return (
    <g style={{ color: colour }}>
      <rect
        x={percent(low)}
        width={percent(Math.max(high - low, 0.4))}
        y="50%"
        height="8"
        transform="translate(0 -4)"
        fill="currentColor"
        fillOpacity={hollow ? 0 : 0.22}
        stroke="currentColor"
        strokeDasharray={hollow ? "3 2" : undefined}
      />
      <svg x={percent(scale.position(range.median))} y="50%" className="overflow-visible">
        {children}
      </svg>
    </g>
  );
}

/** A measured value: a peg whose tip stands on the bar. */
export function MeasuredPeg({ scale, value }: { scale: LogScale; value: number }) {
  return (
    <svg x={percent(scale.position(value))} y="50%" className="overflow-visible">
      <path d="M0-2.5L-5-14H5Z" className="fill-ink stroke-sheet" strokeWidth="1.2" strokeLinejoin="round" />
    </svg>
  );
}

/** The row in words, for those who do not see it drawn. */
export function rangeSentence(label: string, unit: QuantityUnit, range: RangeValues | null, measured: readonly number[]): string {
  const predicted = range === null ? "no estimate" : `${formatQuantity(range.median, unit)}, 80 % range ${formatRange(range.low, range.high, unit)}`;
  const found = measured.length === 0 ? "" : `; measured ${measured.map((value) => formatQuantity(value, unit)).join(", ")}`;
  return `${label}: ${predicted}${found}`;
}
