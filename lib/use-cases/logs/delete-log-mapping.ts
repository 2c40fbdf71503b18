import { z } from "zod";
import { deleteLogMapping as deleteRow, findLogMapping } from "@/db/queries/logs";
import { recordAudit } from "@/db/queries/record-audit";
import { withTeam } from "@/db/scope";
import { defineUseCase } from "@/lib/auth/guard";
import { mappingNotFound } from "./find-mapping";

/** Deletes a log format. Throws AppError "not-found". */
export const deleteLogMapping = defineUseCase({
  permission: "runs:write",
  input: z.strictObject({ id: z.uuid() }),
  run: ({ scope }, { id }): Promise<{ id: string }> =>
    withTeam(scope, async (db) => {
      const row = await findLogMapping(db, scope, id);
      if (row === null || !(await deleteRow(db, scope, id))) throw mappingNotFound();
      await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "log-mapping.deleted", subjectKind: "log-mapping", subjectId: id, detail: { name: row.name } });
      return { id };
    }),
});
