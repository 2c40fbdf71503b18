import { recordAudit } from "@/db/queries/record-audit";
import { deleteTeamKey } from "@/db/queries/team-keys";
import { withTeamAccounts } from "@/db/scope";
import { defineUseCase } from "@/lib/auth/guard";
import { AppError } from "@/lib/shared/app-error";
import { keyIdSchema } from "@/lib/auth/team-schemas";

/** Ends a key of the team at once. Throws AppError "not-found". */
export const revokeKey = defineUseCase({
  permission: "keys:manage",
  input: keyIdSchema,
  run: async ({ scope }, { keyId }): Promise<void> => {
    const { teamId, userId } = scope;
    await withTeamAccounts(teamId, async (db) => {
      const name = await deleteTeamKey(db, { teamId, id: keyId });
      if (name === undefined) throw new AppError("not-found", "There is no such key.");
      await recordAudit(db, { teamId, actorId: userId, action: "key.revoked", subjectKind: "key", subjectId: keyId, detail: { name } });
    });
  },
});
