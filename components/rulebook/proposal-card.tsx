"use client";

import { PenLine } from "lucide-react";
import Link from "next/link";
import { StrategyLabel } from "@/components/charts/strategy-label";
import { RateText } from "@/components/hit-rates/rate-text";
import { Badge } from "@/components/ui/badge";
import { Button } from "@/components/ui/button";
import { Table, TableBody, TableCell, TableHead, TableHeader, TableRow } from "@/components/ui/table";
import type { Proposal, ProposalKind, ThresholdInterval } from "@/lib/refinement/proposal-schema";
import { formatNumber, formatPercent, formatRatio } from "@/lib/shared/format";

const kinds: Record<ProposalKind, string> = { threshold: "move a threshold", factor: "change a factor", "switch-off": "switch a rule off", "new-rule": "new rule" };

type ProposalCardProps = { proposal: Proposal; /** Words of the stronger proposal that mends mostly the same cases. */ rival: string | null; busy: boolean; /** Null for those who may not edit. */ onDraft: (() => void) | null };

/** One refinement that the record can defend, with what speaks for and against it. */
export function ProposalCard({ proposal, rival, busy, onDraft }: ProposalCardProps) {
  const { evidence, words, ruleId, kind, change } = proposal;
  const interval = change.kind === "threshold" || change.kind === "new-rule" ? change.interval : null;
  return (
    <article className="grid gap-4 border-b border-hairline py-6" data-keep-together>
      <header className="flex flex-wrap items-start justify-between gap-3">
        <div className="grid min-w-0 gap-1">
          <h3 className="text-base font-semibold">{words}</h3>
          <p className="flex flex-wrap items-baseline gap-x-3 text-sm text-faint"><Badge>{kinds[kind]}</Badge> <span className="font-mono text-xs">{ruleId}</span></p>
        </div>
        {onDraft !== null && <Button variant="main" disabled={busy} onClick={onDraft}><PenLine aria-hidden /> Make it a draft</Button>}
      </header>
      {rival !== null && <p className="text-sm">It mends mostly the same cases as a stronger proposal: {rival} Take one of the two.</p>}
      {interval !== null && <p className="text-sm">{intervalText(interval)}</p>}
      <EffectTable proposal={proposal} />
      <p className="text-sm">
        Cases for it: <strong>{evidence.casesFor}</strong>, against: <strong>{evidence.casesAgainst}</strong>, unknown because not both first choices were run: <strong>{evidence.casesUnknown}</strong>. Corrected for all candidates searched, p = {formatNumber(evidence.pValue, 2)}.
      </p>
      <CaseTable cases={evidence.cases} />
    </article>
  );
}

function intervalText({ low, high, openLow, openHigh, confidence }: ThresholdInterval): string {
  const ends = [openLow ? `${formatNumber(low, 4)} or below` : formatNumber(low, 4), openHigh ? `${formatNumber(high, 4)} or above` : formatNumber(high, 4)];
  return `The record can't tell thresholds apart between ${ends[0]} and ${ends[1]} (${formatPercent(confidence)} interval).`;
}

function EffectTable({ proposal: { evidence: { heldOut } } }: { proposal: Proposal }) {
  return (
    <Table label="Effect on held-out cases">
      <TableHeader>
        <TableRow>
          <TableHead>On {heldOut.cases} cases, each judged by a candidate chosen without it</TableHead>
          <TableHead numeric>Live edition</TableHead>
          <TableHead numeric>With the change</TableHead>
        </TableRow>
      </TableHeader>
      <TableBody>
        <TableRow>
          <TableHead scope="row">Best</TableHead>
          <TableCell numeric><RateText rate={heldOut.before.best} /></TableCell>
          <TableCell numeric><RateText rate={heldOut.after.best} /></TableCell>
        </TableRow>
        <TableRow>
          <TableHead scope="row">Regret</TableHead>
          <TableCell numeric>{formatRatio(heldOut.before.regret, 3)}</TableCell>
          <TableCell numeric>{formatRatio(heldOut.after.regret, 3)}</TableCell>
        </TableRow>
      </TableBody>
    </Table>
  );
}

function CaseTable({ cases }: { cases: Proposal["evidence"]["cases"] }) {
  if (cases.length === 0) return null;
  return (
    <details>
      <summary className="text-sm text-water underline underline-offset-3">The {cases.length} cases with runs of both first choices</summary>
      <ul className="mt-2 grid max-h-72 gap-1 overflow-y-auto text-sm">
        {cases.map(({ caseId, number, before, after, saves }) => (
          <li key={caseId} className="flex flex-wrap items-baseline gap-x-2">
            <Link href={`/cases/${number}`} className="prose-link">Case {number}</Link>
            <StrategyLabel strategy={before} /> <span aria-hidden>→</span><span className="sr-only">becomes</span> <StrategyLabel strategy={after} />
            <span className="figures text-faint">{saves > 1 ? `costs ${formatRatio(saves)} less` : `costs ${formatRatio(1 / saves)} as much`}</span>
          </li>
        ))}
      </ul>
    </details>
  );
}
