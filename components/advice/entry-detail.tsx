"use client";

import type { ReactNode } from "react";
import { StrategyLabel } from "@/components/charts/strategy-label";
import { Badge } from "@/components/ui/badge";
import { Notice } from "@/components/ui/notice";
import { Quantity, QuantityRange } from "@/components/ui/quantity";
import { Tabs, TabsContent, TabsList, TabsTrigger } from "@/components/ui/tabs";
import type { RankingEntry } from "@/lib/advice/advice";
import type { QuantityUnit } from "@/lib/shared/format";
import type { Range } from "@/lib/shared/range";
import { FactorChain } from "./factor-chain";
import { ParameterTable } from "./parameter-table";
import { WhyList } from "./why-list";

type EntryDetailProps = { entry: RankingEntry; spacing: number; /** The options file and the recipe, loaded when shown. */ options: ReactNode };

/** All there is to know about one strategy of an advice. */
export function EntryDetail({ entry, spacing, options }: EntryDetailProps) {
  return (
    <div className="grid grid-cols-1 gap-4">
      <Figures entry={entry} />
      {entry.cautions.length > 0 && (
        <Notice tone="warn" title="Mind">
          <ul className="grid gap-1">
            {entry.cautions.map((caution, index) => (
              <li key={index}>{caution}</li>
            ))}
          </ul>
        </Notice>
      )}
      {entry.fallback !== null && (
        <p className="text-sm">
          <span className="font-semibold">If it fails: </span>
          <StrategyLabel strategy={entry.fallback.strategy} />. <span className="text-faint">Time to change: {entry.fallback.when}</span>
        </p>
      )}
      <Tabs defaultValue="factors">
        <TabsList>
          <TabsTrigger value="factors">Why this place</TabsTrigger>
          <TabsTrigger value="estimate">Why these numbers</TabsTrigger>
          <TabsTrigger value="parameters">Parameters</TabsTrigger>
          <TabsTrigger value="options">Options file</TabsTrigger>
        </TabsList>
        <TabsContent value="factors">
          <FactorChain entry={entry} />
        </TabsContent>
        <TabsContent value="estimate">
          <WhyList steps={entry.estimate.why} />
        </TabsContent>
        <TabsContent value="parameters">
          <ParameterTable parameters={entry.parameters} spacing={spacing} />
        </TabsContent>
        <TabsContent value="options">{options}</TabsContent>
      </Tabs>
    </div>
  );
}

function Figures({ entry }: { entry: RankingEntry }) {
  const { estimate } = entry;
  const rows: { name: string; range: Range; unit: QuantityUnit }[] = [
    { name: "Total time", range: estimate.totalSeconds, unit: "seconds" },
    { name: "Set-up", range: estimate.setupSeconds, unit: "seconds" },
    { name: "One solve", range: estimate.solveSeconds, unit: "seconds" },
    { name: "Memory", range: estimate.memoryGiB, unit: "gibibytes" },
  ];
  return (
    <div className="grid gap-2">
      <dl className="flex flex-wrap gap-x-8 gap-y-2">
        {rows.map((row) => (
          <Figure key={row.name} name={row.name} value={<Quantity value={row.range.median} unit={row.unit} />} below={<QuantityRange low={row.range.low} high={row.range.high} unit={row.unit} />} />
        ))}
        {estimate.iterations.high > 1 && (
          <Figure
            name="Iterations"
            value={<Quantity value={Math.round(estimate.iterations.median)} unit="count" />}
            below={estimate.iterationBound === null ? "no bound known" : <>proven at most <Quantity value={Math.ceil(estimate.iterationBound)} unit="count" /></>}
          />
        )}
        {estimate.factorEntries !== null && <Figure name="Factor entries" value={<Quantity value={estimate.factorEntries} unit="number" />} below={estimate.factorFlops === null ? "" : <Quantity value={estimate.factorFlops} unit="flops" />} />}
      </dl>
      <p className="flex flex-wrap items-center gap-2 text-sm text-faint">
        <Badge tone={estimate.basis === "reference-runs" ? "forest" : "faint"}>{estimate.basis === "reference-runs" ? "from reference runs" : "from theory only"}</Badge>
        Ranges hold the measured value about 80 % of the time.
      </p>
      {estimate.notes.length > 0 && (
        <ul className="grid gap-1 text-sm">
          {estimate.notes.map((note, index) => (
            <li key={index} className="border-l-2 border-hairline pl-3">
              {note}
            </li>
          ))}
        </ul>
      )}
    </div>
  );
}

function Figure({ name, value, below }: { name: string; value: ReactNode; below: ReactNode }) {
  return (
    <div className="grid">
      <dt className="text-xs text-faint">{name}</dt>
      <dd className="figures text-base font-semibold">{value}</dd>
      <dd className="figures text-xs text-faint">{below}</dd>
    </div>
  );
}
