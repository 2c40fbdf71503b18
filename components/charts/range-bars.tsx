import type { ReactNode } from "react";
import { cn } from "@/components/ui/cn";
import { Quantity, QuantityRange } from "@/components/ui/quantity";
import { formatQuantity, type QuantityUnit } from "@/lib/shared/format";
import { LogAxis } from "./log-axis";
import { makeLogScale, type LogScale } from "./log-scale";
import { RangeTrack, type RangeValues } from "./range-track";
import type { StrategyMarkId } from "./strategy-identity";
import { StrategyMark } from "./strategy-mark";

export type RangeBarsRow = {
  id: string;
  label: string;
  mark: StrategyMarkId;
  low: number | null;
  median: number | null;
  high: number | null;
  measured?: readonly number[];
  /** For rows below the line: dashed and hollow. */
  muted?: boolean;
  /** A short word under the label, such as the reason a row is muted. */
  note?: ReactNode;
  /** Stands before the label, such as the rank. */
  lead?: ReactNode;
  /** Set apart as the first choice by the peg colour and a rule. */
  first?: boolean;
  /** Unfolds under the row. */
  details?: ReactNode;
};

type RangeBarsProps = {
  title: string;
  /** Names the axis: what is measured, in which unit. */
  axisLabel: string;
  unit: QuantityUnit;
  rows: readonly RangeBarsRow[];
  reference?: { value: number; label: string };
  /** Hides the title where a heading above already says it. */
  titleHidden?: boolean;
  /** A scale shared with another drawing; by default it holds all rows. */
  scale?: LogScale;
  className?: string;
};

/** Ranges of several strategies on one log axis, so that the eye compares them at once. Plain markup: prints, and needs no script. */
export function RangeBars({ title, axisLabel, unit, rows, reference, titleHidden = false, scale: given, className }: RangeBarsProps) {
  const scale = given ?? makeLogScale(rows.flatMap(rowValues).concat(reference === undefined ? [] : [reference.value]), unit);
  return (
    <figure className={cn("@container min-w-0", className)}>
      <figcaption className="mb-2 flex flex-wrap items-baseline justify-between gap-x-4">
        <span className={cn("font-semibold", titleHidden && "sr-only")}>{title}</span>
        <span className="text-sm text-faint">{axisLabel}, log scale; bar: 80 % range</span>
      </figcaption>
      <AxisRow scale={scale} unit={unit} edge="top" />
      <ol>
        {rows.map((row) => (
          <li key={row.id} data-keep-together className={cn("border-b border-hairline last:border-b-0", row.first === true && "bg-wash shadow-[inset_3px_0_0_0_var(--peg)]")}>
            <Row row={row} scale={scale} unit={unit} reference={reference?.value ?? null} />
            {row.details}
          </li>
        ))}
      </ol>
      <AxisRow scale={scale} unit={unit} edge="bottom" />
      {reference !== undefined && (
        <p className="mt-1 text-sm text-bad">
          Dashed line: {reference.label}, {formatQuantity(reference.value, unit)}
        </p>
      )}
    </figure>
  );
}

const rowGrid = "grid grid-cols-[minmax(0,1fr)_auto] items-center gap-x-3 pr-2.5 @2xl:grid-cols-[15rem_minmax(0,1fr)_7.5rem]";

function Row({ row, scale, unit, reference }: { row: RangeBarsRow; scale: LogScale; unit: QuantityUnit; reference: number | null }) {
  const range = rangeOf(row);
  return (
    <div className={cn(rowGrid, "pl-2.5")}>
      <div className="flex min-w-0 items-start gap-2 pt-1.5 text-sm @2xl:py-2">
        {row.lead !== undefined && <span className="shrink-0">{row.lead}</span>}
        <StrategyMark id={row.mark} hollow={row.muted === true} className="mt-0.5" />
        <span className="min-w-0">
          <span className={cn("block leading-snug", row.first === true && "font-semibold", row.muted === true && "text-faint")}>{row.label}</span>
          {row.note !== undefined && <span className="block text-xs text-faint">{row.note}</span>}
        </span>
      </div>
      <div className="figures pt-1.5 text-right text-sm @2xl:col-start-3 @2xl:py-1.5">
        <Quantity value={range?.median} unit={unit} className={cn("font-semibold", row.muted === true && "font-normal text-faint")} />
        {range !== null && <QuantityRange low={range.low} high={range.high} unit={unit} className="block text-xs text-faint" />}
      </div>
      <div className="col-span-2 self-stretch px-4 @2xl:col-span-1 @2xl:col-start-2 @2xl:row-start-1">
        <RangeTrack scale={scale} unit={unit} label={row.label} mark={row.mark} range={range} measured={row.measured ?? []} muted={row.muted === true} reference={reference} />
      </div>
    </div>
  );
}

function AxisRow({ scale, unit, edge }: { scale: LogScale; unit: QuantityUnit; edge: "top" | "bottom" }) {
  return (
    <div className={cn(rowGrid, "pl-2.5")}>
      <div className="col-span-2 px-4 @2xl:col-span-1 @2xl:col-start-2">
        <LogAxis scale={scale} unit={unit} edge={edge} />
      </div>
    </div>
  );
}

function rangeOf(row: RangeBarsRow): RangeValues | null {
  if (row.low === null || row.median === null || row.high === null) return null;
  return { low: row.low, median: row.median, high: row.high };
}

function rowValues(row: RangeBarsRow): number[] {
  return [row.low, row.median, row.high, ...(row.measured ?? [])].filter((value) => value !== null);
}
