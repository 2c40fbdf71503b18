import { z } from "zod";
import { withTeam } from "@/db/scope";
import { caseRefSchema } from "@/lib/api/contract/common";
import { runRecordedSchema, type RunRecorded } from "@/lib/api/contract/runs";
import { defineUseCase } from "@/lib/auth/guard";
import { runReportSchema } from "@/lib/runs/run";
import { withIdempotency, type Repeatable } from "@/lib/use-cases/shared/with-idempotency";
import { runView } from "./run-view";
import { sourceOf, storeRun } from "./store-run";

/** Records a measured run of a case after the latest advice on it, and compares it with what was predicted. */
export const recordRun = defineUseCase({
  permission: "runs:write",
  input: z.strictObject({ caseRef: caseRefSchema, report: runReportSchema, idempotencyKey: z.string().nullable().default(null) }),
  run: ({ scope, actor }, { caseRef, report, idempotencyKey }): Promise<Repeatable<RunRecorded>> =>
    withTeam(scope, (db) =>
      withIdempotency(db, scope, { key: idempotencyKey, operation: `recordRun ${caseRef}`, body: report, response: runRecordedSchema }, async () => {
        const { id, comparison } = runView(await storeRun(db, scope, { caseRef, report, source: sourceOf(actor) }));
        return { id, comparison };
      }),
    ),
});
