import { recordAudit } from "@/db/queries/record-audit";
import { insertInvitation } from "@/db/queries/team-invitations";
import { findMemberByEmail } from "@/db/queries/team-members";
import { withTeamAccounts } from "@/db/scope";
import { defineUseCase } from "@/lib/auth/guard";
import { readAuthSettings } from "@/lib/auth/settings";
import { invitationEmail } from "@/lib/email/invitation-email";
import { enqueue } from "@/lib/jobs/queue";
import { AppError } from "@/lib/shared/app-error";
import { newId } from "./new-id";
import { inviteSchema } from "@/lib/auth/team-schemas";

const days = 7;

/** Invites an address into the team; the invitation, its audit row and its letter are one transaction. Throws AppError "invalid". */
export const inviteMember = defineUseCase({
  permission: "team:manage",
  input: inviteSchema,
  run: async ({ scope, actor }, { email, role }): Promise<{ invitationId: string }> => {
    const id = newId();
    const { teamId } = scope;
    const url = new URL(`/invitation/${id}`, readAuthSettings().baseUrl).href;
    await withTeamAccounts(teamId, async (db) => {
      if (await findMemberByEmail(db, { teamId, email })) {
        const message = `${email} is in the team already.`;
        throw new AppError("invalid", message, { fields: [{ path: "email", message }] });
      }
      const expiresAt = new Date(Date.now() + days * 86_400_000);
      await insertInvitation(db, { id, teamId, email, role, inviterId: actor.userId, expiresAt });
      await recordAudit(db, { teamId, actorId: actor.userId, action: "invitation.sent", subjectKind: "invitation", subjectId: email, detail: { role } });
      await enqueue(db, "send-email", invitationEmail({ to: email, inviterName: actor.userName, teamName: actor.teamName, role, url, days }));
    });
    return { invitationId: id };
  },
});
