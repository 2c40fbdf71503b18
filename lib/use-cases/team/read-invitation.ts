import { z } from "zod";
import { authDatabase } from "@/db/client";
import { accountExists, findInvitation, type InvitationDetail } from "@/db/queries/team-invitations";
import type { AccountDatabase } from "@/db/scope";
import { definePublicUseCase } from "@/lib/auth/guard";
import { AppError } from "@/lib/shared/app-error";

export type OpenInvitation = Pick<InvitationDetail, "id" | "teamName" | "email" | "role" | "inviterName" | "expiresAt"> & { accountExists: boolean };

/** What an invitation's link shows to whoever holds it. Throws AppError "not-found" when it is unknown, used, revoked or too old. */
export const readInvitation = definePublicUseCase({
  permission: "public",
  input: z.strictObject({ invitationId: z.string().min(1).max(100) }),
  run: async (_request, { invitationId }): Promise<OpenInvitation> => {
    const db = authDatabase();
    const { id, teamName, email, role, inviterName, expiresAt } = await openInvitation(db, invitationId);
    return { id, teamName, email, role, inviterName, expiresAt, accountExists: await accountExists(db, email) };
  },
});

/** The invitation if it can be accepted now. All other states get one answer, so that links can't be probed. */
export async function openInvitation(db: Pick<AccountDatabase, "select">, id: string, lock = false): Promise<InvitationDetail> {
  const found = await findInvitation(db, id, lock);
  if (!found || found.status !== "pending" || found.expiresAt <= new Date()) {
    throw new AppError("not-found", "This invitation is used, revoked or too old. Ask the team's owner for a new one.");
  }
  return found;
}
