import { z } from "zod";
import { deleteMachine as deleteMachineRow, findMachine, lockMachine } from "@/db/queries/machines";
import { recordAudit } from "@/db/queries/record-audit";
import { withTeam } from "@/db/scope";
import { defineUseCase } from "@/lib/auth/guard";
import { AppError } from "@/lib/shared/app-error";
import { machineNotFound, machineSheet } from "./machine-view";

/** Deletes a machine sheet that no case names. */
export const deleteMachine = defineUseCase({
  permission: "machines:manage",
  input: z.strictObject({ id: z.uuid() }),
  run: ({ scope }, { id }): Promise<{ id: string }> =>
    withTeam(scope, async (db) => {
      if (!(await lockMachine(db, scope, id))) throw machineNotFound();
      const row = await findMachine(db, scope, id);
      if (row === null) throw machineNotFound();
      if (row.cases > 0) throw new AppError("conflict", `${row.cases} ${row.cases === 1 ? "case names" : "cases name"} this machine sheet; it can't be deleted.`);
      await deleteMachineRow(db, scope, id);
      await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "machine.deleted", subjectKind: "machine", subjectId: id, detail: machineSheet(row) });
      return { id };
    }),
});
