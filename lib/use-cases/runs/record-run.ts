import { z } from "zod";
import { lockCase } from "@/db/queries/cases";
import { recordAudit } from "@/db/queries/record-audit";
import { findRun, insertRuns, latestAdviceOf, type RunSource } from "@/db/queries/runs";
import { withTeam, type TeamDatabase } from "@/db/scope";
import { caseRefSchema } from "@/lib/api/contract/common";
import { runRecordedSchema, type RunRecorded } from "@/lib/api/contract/runs";
import { defineUseCase, type Actor, type Scope } from "@/lib/auth/guard";
import { runReportSchema, type RunReport } from "@/lib/runs/run";
import { systemClock } from "@/lib/shared/clock";
import { caseNotFound, caseRefOf } from "@/lib/use-cases/shared/case-ref";
import { withIdempotency, type Repeatable } from "@/lib/use-cases/shared/with-idempotency";
import { runValues } from "./run-values";
import { runView } from "./run-view";

/** Records a measured run of a case after the latest advice on it, and compares it with what was predicted. */
export const recordRun = defineUseCase({
  permission: "runs:write",
  input: z.strictObject({ caseRef: caseRefSchema, report: runReportSchema, idempotencyKey: z.string().nullable().default(null) }),
  run: ({ scope, actor }, { caseRef, report, idempotencyKey }): Promise<Repeatable<RunRecorded>> =>
    withTeam(scope, (db) =>
      withIdempotency(db, scope, { key: idempotencyKey, operation: `recordRun ${caseRef}`, body: report, response: runRecordedSchema }, () =>
        record(db, scope, caseRef, report, sourceOf(actor)),
      ),
    ),
});

function sourceOf(actor: Actor): RunSource {
  return actor.via.kind === "session" ? "form" : "api";
}

async function record(db: TeamDatabase, scope: Scope, caseRef: string, report: RunReport, source: RunSource): Promise<RunRecorded> {
  const found = await lockCase(db, scope, caseRefOf(caseRef));
  if (found === null) throw caseNotFound();
  const advice = await latestAdviceOf(db, scope, found.id);
  const values = runValues(report, found.answers.hardware.cores, systemClock());
  const [id] = await insertRuns(db, scope, [{ ...values, caseId: found.id, adviceId: advice?.id ?? null, source }]);
  const row = id === undefined ? null : await findRun(db, scope, id);
  if (row === null) throw new Error("The run was not stored.");
  const detail = { case: found.number, strategy: report.strategy, outcome: report.outcome };
  await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "run.recorded", subjectKind: "run", subjectId: row.id, detail });
  return { id: row.id, comparison: runView(row).comparison };
}
