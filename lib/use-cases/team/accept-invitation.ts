import { z } from "zod";
import { authDatabase } from "@/db/client";
import { recordAudit } from "@/db/queries/record-audit";
import { findInvitation, markInvitationAccepted } from "@/db/queries/team-invitations";
import { addMember } from "@/db/queries/team-members";
import { withTeamAccounts } from "@/db/scope";
import { definePersonUseCase } from "@/lib/auth/guard";
import { AppError } from "@/lib/shared/app-error";
import { newId } from "./new-id";
import { openInvitation } from "./read-invitation";

/** A signed-in person joins the team that invited their address; once. Throws AppError "not-found", "forbidden" or "conflict". */
export const acceptInvitation = definePersonUseCase({
  permission: "signed-in",
  input: z.strictObject({ invitationId: z.string().min(1).max(100) }),
  run: async (person, { invitationId }): Promise<{ teamId: string }> => {
    const known = await findInvitation(authDatabase(), invitationId);
    const teamId = known?.teamId ?? "unknown";
    await withTeamAccounts(teamId, async (db) => {
      // Read again under a lock: two tabs must not both join.
      const invitation = await openInvitation(db, invitationId, true);
      if (invitation.email !== person.userEmail.toLowerCase()) {
        throw new AppError("forbidden", `The invitation is for ${invitation.email}. Sign in with that address.`);
      }
      const joined = await addMember(db, { id: newId(), teamId, userId: person.userId, role: invitation.role });
      if (!joined) throw new AppError("conflict", `You are in the team ${invitation.teamName} already.`);
      await markInvitationAccepted(db, invitationId);
      await recordAudit(db, { teamId, actorId: person.userId, action: "member.joined", subjectKind: "member", subjectId: person.userId, detail: { role: invitation.role } });
    });
    return { teamId };
  },
});
