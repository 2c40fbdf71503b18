import { findRunLog, listRunsForDiagnosis } from "@/db/queries/logs";
import type { RunRow } from "@/db/queries/runs";
import type { TeamDatabase } from "@/db/scope";
import type { Scope } from "@/lib/auth/guard";
import { parsedLogSchema } from "@/lib/logs/parsed-log";
import { caseLimits } from "@/lib/runs/case-limits";
import { diagnoseRun, type Finding } from "@/lib/runs/diagnosis/diagnose-run";

/** The diagnosis of a recorded run as it stands now: with its log where there is one, against the case's other runs. */
export async function findDiagnosis(db: TeamDatabase, scope: Scope, row: RunRow): Promise<{ findings: Finding[]; hasLog: boolean }> {
  const log = await findRunLog(db, scope, row.id);
  // A log kept by an older reader may lack what the diagnosis looks at; the run's own values still count.
  const parsed = log === null ? null : (parsedLogSchema.safeParse(log.parsed).data ?? null);
  const otherRuns = await listRunsForDiagnosis(db, scope, { caseId: row.caseId, exceptRunId: row.id });
  return { findings: diagnoseRun({ run: row, parsed, limits: caseLimits(row.answers), otherRuns }), hasLog: log !== null };
}
