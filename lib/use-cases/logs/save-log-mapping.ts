import { z } from "zod";
import { findLogMapping, findLogMappingByName, insertLogMapping, updateLogMapping as updateRow } from "@/db/queries/logs";
import { recordAudit } from "@/db/queries/record-audit";
import { withTeam, type TeamDatabase } from "@/db/scope";
import type { LogMappingView } from "@/lib/api/contract/logs";
import { defineUseCase, type Scope } from "@/lib/auth/guard";
import { logMappingSchema } from "@/lib/logs/mapping";
import { mappingNameTaken, mappingNotFound, mappingView } from "./find-mapping";

/** Saves a log format under a name of its own; its patterns were checked when they were parsed. */
export const createLogMapping = defineUseCase({
  permission: "runs:write",
  input: logMappingSchema,
  run: ({ scope }, mapping): Promise<LogMappingView> =>
    withTeam(scope, async (db) => {
      const id = await insertLogMapping(db, scope, mapping);
      if (id === null) throw mappingNameTaken(mapping.name);
      return audited(db, scope, id, "log-mapping.added");
    }),
});

/** Replaces a log format; runs already read keep what was read. */
export const updateLogMapping = defineUseCase({
  permission: "runs:write",
  input: z.strictObject({ id: z.uuid(), mapping: logMappingSchema }),
  run: ({ scope }, { id, mapping }): Promise<LogMappingView> =>
    withTeam(scope, async (db) => {
      if ((await findLogMapping(db, scope, id)) === null) throw mappingNotFound();
      const namesake = await findLogMappingByName(db, scope, mapping.name);
      if (namesake !== null && namesake.id !== id) throw mappingNameTaken(mapping.name);
      await updateRow(db, scope, { id, mapping });
      return audited(db, scope, id, "log-mapping.changed");
    }),
});

async function audited(db: TeamDatabase, scope: Scope, id: string, action: string): Promise<LogMappingView> {
  const row = await findLogMapping(db, scope, id);
  if (row === null) throw mappingNotFound();
  await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action, subjectKind: "log-mapping", subjectId: id, detail: { name: row.name } });
  return mappingView(row);
}
