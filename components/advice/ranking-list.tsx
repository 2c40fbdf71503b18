"use client";

import { Accordion as AccordionPrimitive } from "radix-ui";
import { ChevronDown } from "lucide-react";
import type { ReactNode } from "react";
import { makeLogScale, type LogScale } from "@/components/charts/log-scale";
import { RatioTrack, TrackAxis } from "@/components/charts/ratio-track";
import { strategyColours } from "@/components/charts/strategy-identity";
import { StrategyLabel } from "@/components/charts/strategy-label";
import { Quantity, QuantityRange } from "@/components/ui/quantity";
import type { RankingEntry } from "@/lib/advice/advice";
import { formatRatio } from "@/lib/shared/format";
import { MemoryNeed } from "./memory-need";

type RankingListProps = {
  entries: readonly RankingEntry[];
  memoryAvailableGiB: number;
  /** Measured total time over the first's predicted score, by strategy, drawn on the same axis. */
  measured: Readonly<Record<string, number>>;
  detail: (entry: RankingEntry) => ReactNode;
};

const columns = "lg:grid-cols-[1.5rem_minmax(10rem,13rem)_minmax(13rem,1fr)_3.5rem_7.5rem_4.5rem_1rem]";

/** The ranked strategies as bars with their 80 % ranges on one log axis of relative time; each unfolds. */
export function RankingList({ entries, memoryAvailableGiB, measured, detail }: RankingListProps) {
  const scale = makeLogScale([1, ...entries.flatMap((entry) => (entry.relativeRange ? [entry.relativeRange.low, entry.relativeRange.high] : [])), ...Object.values(measured)]);
  return (
    <div className="grid gap-1">
      <div aria-hidden className={`hidden items-end gap-x-3 border-b border-contour pb-1 text-xs text-faint lg:grid ${columns}`}>
        <span />
        <span>Strategy</span>
        <TrackAxis scale={scale} format={tickText} />
        <span className="text-right">Time</span>
        <span className="text-right">Memory</span>
        <span className="text-right">Iterations</span>
        <span />
      </div>
      <AccordionPrimitive.Root type="multiple" className="grid" defaultValue={entries[0] ? [entries[0].strategy] : []}>
        {entries.map((entry) => (
          <AccordionPrimitive.Item key={entry.strategy} value={entry.strategy} className="border-b border-hairline" data-strategy={entry.strategy}>
            <AccordionPrimitive.Header asChild>
              <h3 className="font-sans text-base font-normal">
                <AccordionPrimitive.Trigger className={`group grid w-full grid-cols-[1.5rem_minmax(0,1fr)_auto_1rem] items-center gap-x-3 gap-y-1 py-2.5 text-left text-sm hover:bg-wash ${columns}`}>
                  <Row entry={entry} scale={scale} memoryAvailableGiB={memoryAvailableGiB} measured={measured[entry.strategy] ?? null} />
                </AccordionPrimitive.Trigger>
              </h3>
            </AccordionPrimitive.Header>
            <AccordionPrimitive.Content className="pt-2 pb-6 lg:pl-10">{detail(entry)}</AccordionPrimitive.Content>
          </AccordionPrimitive.Item>
        ))}
      </AccordionPrimitive.Root>
    </div>
  );
}

type RowProps = { entry: RankingEntry; scale: LogScale; memoryAvailableGiB: number; measured: number | null };

function Row({ entry, scale, memoryAvailableGiB, measured }: RowProps) {
  const { estimate } = entry;
  return (
    <>
      <span className="figures text-right text-faint">{entry.rank}</span>
      <StrategyLabel strategy={entry.strategy} className={entry.rank === 1 ? "font-semibold" : ""} />
      <span className="order-last col-span-4 lg:order-none lg:col-span-1">
        <Track entry={entry} scale={scale} measured={measured} />
      </span>
      <span className={`figures text-right ${entry.rank === 1 ? "font-semibold text-peg" : ""}`}>
        <span className="sr-only">relative time </span>
        {formatRatio(entry.relativeTime)}
      </span>
      <span className="order-last col-span-4 flex justify-between gap-3 text-xs text-faint lg:order-none lg:col-span-1 lg:block lg:text-right lg:text-sm lg:text-ink">
        <MemoryNeed memory={estimate.memoryGiB} availableGiB={memoryAvailableGiB} />
        <span className="lg:hidden">
          <Iterations entry={entry} />
        </span>
      </span>
      <span className="hidden text-right lg:block">
        <Iterations entry={entry} />
      </span>
      <ChevronDown aria-hidden className="size-4 text-faint transition-transform group-data-[state=open]:rotate-180 print:hidden" />
    </>
  );
}

function Iterations({ entry }: { entry: RankingEntry }) {
  const { iterations } = entry.estimate;
  if (iterations.high <= 1) return <span title="A factorisation does not iterate">none</span>;
  return (
    <>
      <Quantity value={Math.round(iterations.median)} unit="count" />
      <span className="lg:hidden"> iterations</span>
      <span className="hidden text-xs text-faint lg:block">
        <QuantityRange low={Math.round(iterations.low)} high={Math.round(iterations.high)} unit="count" />
      </span>
    </>
  );
}

function Track({ entry, scale, measured }: { entry: RankingEntry; scale: LogScale; measured: number | null }) {
  const range = entry.relativeRange;
  if (range === null || entry.relativeTime === null) return null;
  const words = `${formatRatio(range.low)} to ${formatRatio(range.high)} of the first${measured === null ? "" : `, measured ${formatRatio(measured)}`}`;
  return <RatioTrack scale={scale} low={range.low} median={entry.relativeTime} high={range.high} measured={measured} colour={strategyColours[entry.strategy]} mark={entry.strategy} words={words} reference={1} />;
}

/** 1x, 20x: an axis needs no decimals that are zero. */
function tickText(value: number): string {
  return formatRatio(value).replace(".0x", "x");
}
