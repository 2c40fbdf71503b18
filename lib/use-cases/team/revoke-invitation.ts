import { recordAudit } from "@/db/queries/record-audit";
import { cancelInvitation } from "@/db/queries/team-invitations";
import { withTeamAccounts } from "@/db/scope";
import { defineUseCase } from "@/lib/auth/guard";
import { AppError } from "@/lib/shared/app-error";
import { invitationIdSchema } from "@/lib/auth/team-schemas";

/** Makes a pending invitation's link useless. Throws AppError "not-found". */
export const revokeInvitation = defineUseCase({
  permission: "team:manage",
  input: invitationIdSchema,
  run: async ({ scope }, { invitationId }): Promise<void> => {
    const { teamId, userId } = scope;
    await withTeamAccounts(teamId, async (db) => {
      const email = await cancelInvitation(db, { teamId, id: invitationId });
      if (email === undefined) throw new AppError("not-found", "There is no such pending invitation.");
      await recordAudit(db, { teamId, actorId: userId, action: "invitation.revoked", subjectKind: "invitation", subjectId: email });
    });
  },
});
