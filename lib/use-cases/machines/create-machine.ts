import { findMachine, insertMachine } from "@/db/queries/machines";
import { recordAudit } from "@/db/queries/record-audit";
import { withTeam } from "@/db/scope";
import type { MachineView } from "@/lib/api/contract/machines";
import { defineUseCase } from "@/lib/auth/guard";
import { machineSchema } from "@/lib/questionnaire/machine";
import { machineNotFound, machineView, nameTaken } from "./machine-view";

/** Saves a machine sheet under a name of its own. */
export const createMachine = defineUseCase({
  permission: "machines:add",
  input: machineSchema,
  run: ({ scope }, sheet): Promise<MachineView> =>
    withTeam(scope, async (db) => {
      const id = await insertMachine(db, scope, sheet);
      if (id === null) throw nameTaken(sheet.name);
      await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "machine.added", subjectKind: "machine", subjectId: id, detail: { name: sheet.name } });
      const row = await findMachine(db, scope, id);
      if (row === null) throw machineNotFound();
      return machineView(row);
    }),
});
