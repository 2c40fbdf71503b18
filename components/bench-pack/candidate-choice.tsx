"use client";

import { StrategyLabel } from "@/components/charts/strategy-label";
import { CheckboxLine } from "@/components/ui/checkbox";
import { FieldSet } from "@/components/ui/field";
import type { RankingEntry } from "@/lib/advice/advice";
import { formatRatio, formatSeconds } from "@/lib/shared/format";
import type { StrategyId } from "@/lib/shared/strategy-ids";

type CandidateChoiceProps = { entries: readonly RankingEntry[]; chosen: ReadonlySet<StrategyId>; onChange: (chosen: Set<StrategyId>) => void };

/** Which strategies a bench pack tries. */
export function CandidateChoice({ entries, chosen, onChange }: CandidateChoiceProps) {
  function toggle(strategy: StrategyId, wanted: boolean): void {
    const next = new Set(chosen);
    if (wanted) next.add(strategy);
    else next.delete(strategy);
    onChange(next);
  }
  return (
    <FieldSet legend="Candidates" help="They run in this order. Two are enough to make the case count for the hit rate best.">
      {entries.map((entry) => (
        <CheckboxLine
          key={entry.strategy}
          label={<StrategyLabel strategy={entry.strategy} />}
          help={`${entry.relativeTime === null ? "not ranked" : `${formatRatio(entry.relativeTime)} the time of the first`}, ${formatSeconds(entry.estimate.totalSeconds.median)} predicted`}
          checked={chosen.has(entry.strategy)}
          onCheckedChange={(checked) => toggle(entry.strategy, checked === true)}
        />
      ))}
    </FieldSet>
  );
}
