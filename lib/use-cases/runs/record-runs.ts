import { z } from "zod";
import { withTeam } from "@/db/scope";
import { caseRefSchema } from "@/lib/api/contract/common";
import { mostRunsAtOnce, logOperations } from "@/lib/api/contract/logs";
import type { RunRecorded } from "@/lib/api/contract/runs";
import { defineUseCase } from "@/lib/auth/guard";
import { runReportSchema } from "@/lib/runs/run";
import { withIdempotency, type Repeatable } from "@/lib/use-cases/shared/with-idempotency";
import { runView } from "./run-view";
import { sourceOf, storeRun } from "./store-run";

/** Records several runs of one case in the order given, all or none. */
export const recordRuns = defineUseCase({
  permission: "runs:write",
  input: z.strictObject({ caseRef: caseRefSchema, reports: z.array(runReportSchema).min(1).max(mostRunsAtOnce), idempotencyKey: z.string().nullable().default(null) }),
  run: ({ scope, actor }, { caseRef, reports, idempotencyKey }): Promise<Repeatable<{ items: RunRecorded[] }>> =>
    withTeam(scope, (db) =>
      withIdempotency(db, scope, { key: idempotencyKey, operation: `recordRuns ${caseRef}`, body: reports, response: logOperations.recordRuns.response.schema }, async () => {
        const items: RunRecorded[] = [];
        for (const report of reports) {
          const { id, comparison } = runView(await storeRun(db, scope, { caseRef, report, source: sourceOf(actor) }));
          items.push({ id, comparison });
        }
        return { items };
      }),
    ),
});
