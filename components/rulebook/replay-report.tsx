"use client";

import Link from "next/link";
import { useState, type ReactNode } from "react";
import { StrategyLabel } from "@/components/charts/strategy-label";
import { RateText } from "@/components/hit-rates/rate-text";
import { Badge } from "@/components/ui/badge";
import { Button } from "@/components/ui/button";
import { SegmentedControl } from "@/components/ui/segmented-control";
import { Table, TableBody, TableCaption, TableCell, TableHead, TableHeader, TableRow } from "@/components/ui/table";
import type { ChangedCase, ReplayResult } from "@/lib/refinement/replay-result";
import { formatNumber, formatPercent, formatRatio } from "@/lib/shared/format";

type ReplayReportProps = { result: ReplayResult; editionNumber: number; titleOf: (ruleId: string) => string };

/** What a replay found: rates before and after on the same cases, what chance says, and each case whose first choice changes. */
export function ReplayReport({ result, editionNumber, titleOf }: ReplayReportProps) {
  const { changed, judged } = result;
  return (
    <div className="grid gap-8">
      <section className="grid gap-3">
        <h2 className="text-lg font-semibold">On the same cases</h2>
        <RatesTable result={result} editionNumber={editionNumber} />
        <p className="max-w-measure text-sm text-faint">
          {result.cases} cases replayed. The live edition&apos;s first choice was run on {judged.before} of them, the draft&apos;s on {judged.after}, both on {judged.both}; only these {judged.both} can be compared. Advice already given is not touched.
        </p>
      </section>
      <section className="grid gap-2">
        <h2 className="text-lg font-semibold">Is it more than chance?</h2>
        <dl className="grid max-w-measure gap-2 text-sm">
          <Meaning term="Worked">{result.tests.worked.text}</Meaning>
          <Meaning term="Best">{result.tests.best.text}</Meaning>
        </dl>
        <p className="text-xs text-faint">Exact McNemar test on the cases where only one of the two came out right: p = {formatNumber(result.tests.worked.pValue, 2)} for worked, {formatNumber(result.tests.best.pValue, 2)} for best.</p>
      </section>
      <section className="grid gap-3">
        <h2 className="text-lg font-semibold">Cases whose first choice changes</h2>
        <p className="text-sm">
          {changed.cases === 0 ? "None: the draft would have advised the same on every recorded case." : `${changed.cases} in all: ${changed.helped} helped, ${changed.hurt} hurt, ${changed.unknown} unknown because the runs can't tell.`}
        </p>
        {changed.cases > 0 && <ChangedCases changes={result.changes} titleOf={titleOf} />}
      </section>
    </div>
  );
}

function Meaning({ term, children }: { term: string; children: ReactNode }) {
  return (
    <div>
      <dt className="font-semibold">{term}</dt>
      <dd>{children}</dd>
    </div>
  );
}

function RatesTable({ result: { before, after }, editionNumber }: Pick<ReplayReportProps, "result" | "editionNumber">) {
  const gap = (value: number | null) => (value === null ? "undefined" : formatPercent(value));
  const rows: { name: string; before: ReactNode; after: ReactNode }[] = [
    { name: "Worked", before: <RateText rate={before.worked} />, after: <RateText rate={after.worked} /> },
    { name: "Best", before: <RateText rate={before.best} />, after: <RateText rate={after.best} /> },
    { name: "Regret", before: formatRatio(before.regret.value, 3), after: formatRatio(after.regret.value, 3) },
    { name: "Gap closed", before: gap(before.gapClosed.value), after: gap(after.gapClosed.value) },
  ];
  return (
    <Table label="Rates before and after">
      <TableHeader>
        <TableRow>
          <TableHead>Figure</TableHead>
          <TableHead numeric>Edition {editionNumber}</TableHead>
          <TableHead numeric>This draft</TableHead>
        </TableRow>
      </TableHeader>
      <TableBody>
        {rows.map((row) => (
          <TableRow key={row.name}>
            <TableHead scope="row">{row.name}</TableHead>
            <TableCell numeric>{row.before}</TableCell>
            <TableCell numeric>{row.after}</TableCell>
          </TableRow>
        ))}
      </TableBody>
      <TableCaption>Worked over the cases where both first choices were run; the others over those where both were contested.</TableCaption>
    </Table>
  );
}

const tones: Record<ChangedCase["verdict"], "forest" | "bad" | "faint"> = { helped: "forest", hurt: "bad", unknown: "faint" };
const filters = ["all", "helped", "hurt", "unknown"] as const;
type Filter = (typeof filters)[number];
const pageSize = 50;

function ChangedCases({ changes, titleOf }: { changes: readonly ChangedCase[]; titleOf: (ruleId: string) => string }) {
  const [filter, setFilter] = useState<Filter>("all");
  const [count, setCount] = useState(pageSize);
  const kept = changes.filter(({ verdict }) => filter === "all" || verdict === filter);
  return (
    <div className="grid gap-3">
      <SegmentedControl legend="Show" legendHidden options={filters.map((value) => ({ value, label: value }))} value={filter} onValueChange={setFilter} />
      <Table label="Changed cases">
        <TableHeader>
          <TableRow>
            <TableHead>Case</TableHead>
            <TableHead>First now</TableHead>
            <TableHead>First under the draft</TableHead>
            <TableHead>Verdict</TableHead>
            <TableHead>Rule that did it</TableHead>
          </TableRow>
        </TableHeader>
        <TableBody>
          {kept.slice(0, count).map((change) => (
            <TableRow key={change.caseId}>
              <TableCell><Link href={`/cases/${change.number}`} className="prose-link">{change.number}</Link></TableCell>
              <TableCell>{change.before === null ? "nobody" : <StrategyLabel strategy={change.before} />}</TableCell>
              <TableCell>{change.after === null ? "nobody" : <StrategyLabel strategy={change.after} />}</TableCell>
              <TableCell><Badge tone={tones[change.verdict]}>{change.verdict}</Badge> <span className="text-faint">{change.text}</span></TableCell>
              <TableCell>{change.rules.length === 0 ? "–" : change.rules.map(titleOf).join("; ")}</TableCell>
            </TableRow>
          ))}
        </TableBody>
      </Table>
      {kept.length > count && <div><Button size="small" onClick={() => setCount(count + pageSize)}>Show {Math.min(pageSize, kept.length - count)} more of {kept.length}</Button></div>}
    </div>
  );
}
