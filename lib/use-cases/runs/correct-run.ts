import { z } from "zod";
import { recordAudit } from "@/db/queries/record-audit";
import { findRun, insertRevision, lockRun, updateRun, type RunRow } from "@/db/queries/runs";
import { withTeam } from "@/db/scope";
import { runCorrectionSchema, type RunCorrection } from "@/lib/api/contract/runs";
import { defineUseCase } from "@/lib/auth/guard";
import { runReportSchema, type RunReport } from "@/lib/runs/run";
import { AppError } from "@/lib/shared/app-error";
import { fieldErrorsOf } from "@/lib/shared/field-errors";
import { readRunDetail, runNotFound, type RunDetail } from "./get-run";
import { reportOf, runValues } from "./run-values";

/** Corrects a run in place; what it said before is kept as a revision with the explanation. */
export const correctRun = defineUseCase({
  permission: "runs:write",
  input: z.strictObject({ id: z.uuid(), correction: runCorrectionSchema }),
  run: ({ scope }, { id, correction }): Promise<RunDetail> =>
    withTeam(scope, async (db) => {
      if (!(await lockRun(db, scope, id))) throw runNotFound();
      const row = await findRun(db, scope, id);
      if (row === null) throw runNotFound();
      refuseStale(row, correction);
      const report = corrected(row, correction);
      const changed = changedFields(reportOf(row), report);
      if (changed.length > 0) {
        await insertRevision(db, scope, { runId: id, revision: row.revision, before: reportOf(row), explanation: correction.explanation });
        await updateRun(db, scope, { id, revision: row.revision + 1, values: runValues(report, row.cores, row.measuredAt) });
        const detail = { case: row.caseNumber, changed, explanation: correction.explanation };
        await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "run.corrected", subjectKind: "run", subjectId: id, detail });
      }
      return readRunDetail(db, scope, id);
    }),
});

function refuseStale(row: RunRow, { revision }: RunCorrection): void {
  if (row.withdrawnAt !== null) throw new AppError("conflict", "This run was withdrawn; record a new one instead.");
  if (revision !== undefined && revision !== row.revision) {
    throw new AppError("conflict", `This run was corrected in the meantime (revision ${row.revision}); look at it again.`);
  }
}

/** The run as it will read; null clears a field. Throws AppError "invalid" when the whole no longer makes a run. */
function corrected(row: RunRow, { revision: _revision, explanation: _explanation, ...changes }: RunCorrection): RunReport {
  // A name belongs to strategy "other" alone: leaving that strategy drops it.
  const dropsName = changes.strategy !== undefined && changes.strategy !== "other" && changes.strategyName === undefined;
  const merged = { ...reportOf(row), ...changes, ...(dropsName ? { strategyName: undefined } : {}) };
  const given = Object.entries(merged).filter(([name, value]) => value !== undefined && !(value === null && optionalNames.has(name)));
  const parsed = runReportSchema.safeParse(Object.fromEntries(given));
  if (!parsed.success) throw new AppError("invalid", "The corrected run does not hold together.", { fields: fieldErrorsOf(parsed.error) });
  return parsed.data;
}

/** Fields a report leaves out rather than setting to null. */
const optionalNames: ReadonlySet<string> = new Set(["strategyName", "reason"]);

function changedFields(before: Record<string, unknown>, after: RunReport): string[] {
  const now: Record<string, unknown> = { ...after };
  if (typeof now.measuredAt === "string") now.measuredAt = new Date(now.measuredAt).toISOString();
  const names = new Set([...Object.keys(before), ...Object.keys(now)]);
  return [...names].filter((name) => JSON.stringify(before[name] ?? null) !== JSON.stringify(now[name] ?? null)).sort();
}
