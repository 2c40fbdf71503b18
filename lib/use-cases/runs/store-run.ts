import { holdCase } from "@/db/queries/cases";
import { recordAudit } from "@/db/queries/record-audit";
import { findRun, insertRuns, latestAdviceIdOf, type RunRow, type RunSource } from "@/db/queries/runs";
import type { TeamDatabase } from "@/db/scope";
import type { Actor, Scope } from "@/lib/auth/guard";
import type { RunReport } from "@/lib/runs/run";
import { systemClock } from "@/lib/shared/clock";
import { caseNotFound, caseRefOf } from "@/lib/use-cases/shared/case-ref";
import { queueRunRecorded } from "@/lib/use-cases/webhooks/queue-event";
import { runValues } from "./run-values";

type NewReport = { caseRef: string; report: RunReport; source: RunSource };

/**
 * Stores one run after the latest advice on its case, with its audit row and the team's webhooks: the one way by which a run that comes by
 * itself enters the record, whether from the form, a call or a log. Throws AppError "not-found" for the case.
 */
export async function storeRun(db: TeamDatabase, scope: Scope, { caseRef, report, source }: NewReport): Promise<RunRow> {
  const found = await holdCase(db, scope, caseRefOf(caseRef));
  if (found === null) throw caseNotFound();
  const adviceId = await latestAdviceIdOf(db, scope, found.id);
  const values = runValues(report, found.answers.hardware.cores, systemClock());
  const [id] = await insertRuns(db, scope, [{ ...values, caseId: found.id, adviceId, source }]);
  const row = id === undefined ? null : await findRun(db, scope, id);
  if (row === null) throw new Error("The run was not stored.");
  const detail = { case: found.number, strategy: report.strategy, outcome: report.outcome };
  await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "run.recorded", subjectKind: "run", subjectId: row.id, detail });
  await queueRunRecorded(db, scope.teamId, row);
  return row;
}

export function sourceOf(actor: Actor): RunSource {
  return actor.via.kind === "session" ? "form" : "api";
}
