import type { RevisionRow, RunRow } from "@/db/queries/runs";
import { revisionSchema, runSchema, type RevisionView, type RunView } from "@/lib/api/contract/runs";
import { estimateSchema, type Estimate } from "@/lib/estimates/estimate";
import { caseLimits } from "@/lib/runs/case-limits";
import { compareRun } from "@/lib/runs/comparison";
import { personView } from "@/lib/use-cases/shared/views";

/** A stored run as the API shows it, with what was predicted for it. */
export function runView(row: RunRow): RunView {
  return runSchema.parse({
    ...row,
    measuredAt: row.measuredAt.toISOString(),
    recordedAt: row.recordedAt.toISOString(),
    author: personView(row.authorId, row.authorName),
    withdrawn:
      row.withdrawnAt === null
        ? null
        : { at: row.withdrawnAt.toISOString(), by: personView(row.withdrawnBy, row.withdrawerName), reason: row.withdrawnReason ?? "" },
    comparison: compareRun(row, caseLimits(row.answers), estimateOf(row)),
  });
}

/** Null for a strategy that is not advised on; an estimate of an older model that lacks a field is left out rather than guessed at. */
function estimateOf(row: RunRow): Estimate | null {
  const parsed = estimateSchema.safeParse(row.estimate);
  return parsed.success ? parsed.data : null;
}

export function revisionView(row: RevisionRow): RevisionView {
  const { changedBy, changerName, ...rest } = row;
  return revisionSchema.parse({ ...rest, changedBy: personView(changedBy, changerName), changedAt: row.changedAt.toISOString() });
}
