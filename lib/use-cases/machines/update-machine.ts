import { z } from "zod";
import { findMachine, isNameTaken, lockMachine, updateMachine as updateMachineRow } from "@/db/queries/machines";
import { recordAudit } from "@/db/queries/record-audit";
import { withTeam } from "@/db/scope";
import type { MachineView } from "@/lib/api/contract/machines";
import { defineUseCase } from "@/lib/auth/guard";
import { machineSchema } from "@/lib/questionnaire/machine";
import { machineNotFound, machineSheet, machineView, nameTaken } from "./machine-view";

/** Changes a machine sheet. Cases keep the hardware they were advised for. */
export const updateMachine = defineUseCase({
  permission: "machines:manage",
  input: z.strictObject({ id: z.uuid(), changes: machineSchema.partial() }),
  run: ({ scope }, { id, changes }): Promise<MachineView> =>
    withTeam(scope, async (db) => {
      if (!(await lockMachine(db, scope, id))) throw machineNotFound();
      const before = await findMachine(db, scope, id);
      if (before === null) throw machineNotFound();
      if (changes.name !== undefined && (await isNameTaken(db, scope, { name: changes.name, exceptId: id }))) throw nameTaken(changes.name);
      if (Object.keys(changes).length > 0) {
        await updateMachineRow(db, scope, { id, changes });
        const detail = { before: machineSheet(before), changes };
        await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "machine.changed", subjectKind: "machine", subjectId: id, detail });
      }
      const after = await findMachine(db, scope, id);
      if (after === null) throw machineNotFound();
      return machineView(after);
    }),
});
