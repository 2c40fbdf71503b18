"use client";

import type { ReactNode } from "react";
import { strategyColours } from "@/components/charts/strategy-identity";
import { StrategyLabel } from "@/components/charts/strategy-label";
import { Badge } from "@/components/ui/badge";
import { Button } from "@/components/ui/button";
import type { RunView } from "@/lib/api/contract/runs";
import { formatDate } from "@/lib/shared/format-date";
import { formatSeconds } from "@/lib/shared/format";
import type { Outcome } from "@/lib/runs/run";
import { RunComparisonTable } from "./run-comparison-table";

type RunListProps = {
  runs: readonly RunView[];
  /** Absent for who may only read. */
  onCorrect: ((run: RunView) => void) | null;
  onWithdraw: ((run: RunView) => void) | null;
  onHistory: (run: RunView) => void;
  /** The run just recorded, opened. */
  open: string | null;
  /** Stands under the comparison, such as a diagnosis. */
  below?: (run: RunView) => ReactNode;
};

export const outcomeLooks: Record<Outcome, { word: string; tone: "forest" | "warn" | "bad" }> = {
  converged: { word: "converged", tone: "forest" },
  stalled: { word: "stalled", tone: "warn" },
  diverged: { word: "diverged", tone: "bad" },
  "out-of-memory": { word: "out of memory", tone: "bad" },
  "over-time": { word: "over time", tone: "warn" },
  broken: { word: "broken", tone: "bad" },
};

/** The case's runs as they were measured, each unfolding to predicted against measured. */
export function RunList({ runs, onCorrect, onWithdraw, onHistory, open, below }: RunListProps) {
  return (
    <ul className="grid">
      {runs.map((run) => (
        <li key={run.id} className="border-b border-hairline" data-run={run.id}>
          <details open={run.id === open} className="group">
            <summary className="grid min-h-11 grid-cols-[minmax(0,1fr)_auto] items-center gap-x-4 gap-y-1 py-2 text-sm hover:bg-wash sm:grid-cols-[minmax(0,15rem)_8rem_7rem_minmax(0,1fr)_auto]">
              <StrategyLabel strategy={run.strategy} otherName={run.strategyName} className={run.withdrawn ? "line-through" : ""} />
              <span>
                <Badge tone={run.withdrawn ? "faint" : outcomeLooks[run.outcome].tone}>{run.withdrawn ? "withdrawn" : outcomeLooks[run.outcome].word}</Badge>
              </span>
              <span className="figures text-right font-semibold max-sm:text-left">{formatSeconds(run.comparison.totalSeconds)}</span>
              <span className="truncate text-faint max-sm:col-span-2">
                {formatDate(run.measuredAt)}
                {run.author?.name ? `, ${run.author.name}` : ""}
                {run.revision > 1 ? ", corrected" : ""}
              </span>
              <span aria-hidden className="hidden text-faint sm:inline">
                <span className="group-open:hidden">show</span>
                <span className="hidden group-open:inline">hide</span>
              </span>
            </summary>
            <div className="grid gap-4 pt-2 pb-5 sm:pl-6">
              {run.withdrawn && <p className="text-sm text-faint">Withdrawn on {formatDate(run.withdrawn.at)}{run.withdrawn.reason === "" ? "" : `: ${run.withdrawn.reason}`}. It no longer counts.</p>}
              {run.reason !== null && <p className="text-sm">{run.reason}</p>}
              <RunComparisonTable comparison={run.comparison} colour={strategyColours[run.strategy]} />
              {run.note !== "" && <p className="text-sm whitespace-pre-line">{run.note}</p>}
              {below?.(run)}
              <div className="flex flex-wrap gap-2" data-screen-only>
                {onCorrect !== null && !run.withdrawn && <Button size="small" onClick={() => onCorrect(run)}>Correct</Button>}
                {onWithdraw !== null && !run.withdrawn && <Button size="small" variant="quiet" onClick={() => onWithdraw(run)}>Withdraw</Button>}
                {run.revision > 1 && <Button size="small" variant="quiet" onClick={() => onHistory(run)}>Former values</Button>}
              </div>
            </div>
          </details>
        </li>
      ))}
    </ul>
  );
}
