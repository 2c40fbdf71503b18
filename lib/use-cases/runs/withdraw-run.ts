import { z } from "zod";
import { recordAudit } from "@/db/queries/record-audit";
import { findRun, lockRun, markWithdrawn } from "@/db/queries/runs";
import { withTeam } from "@/db/scope";
import { defineUseCase } from "@/lib/auth/guard";
import { readRunDetail, runNotFound, type RunDetail } from "./get-run";

/** Withdraws a run: it stays on record and no longer counts. A second time changes nothing. */
export const withdrawRun = defineUseCase({
  permission: "runs:write",
  input: z.strictObject({ id: z.uuid(), reason: z.string().trim().max(1000).default("") }),
  run: ({ scope }, { id, reason }): Promise<RunDetail> =>
    withTeam(scope, async (db) => {
      if (!(await lockRun(db, scope, id))) throw runNotFound();
      const row = await findRun(db, scope, id);
      if (row === null) throw runNotFound();
      if (row.withdrawnAt === null) {
        await markWithdrawn(db, scope, { id, reason });
        const detail = { case: row.caseNumber, reason };
        await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "run.withdrawn", subjectKind: "run", subjectId: id, detail });
      }
      return readRunDetail(db, scope, id);
    }),
});
