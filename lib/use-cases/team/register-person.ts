import { authDatabase } from "@/db/client";
import { anyTeamExists } from "@/db/queries/team-members";
import { registerSchema } from "@/lib/auth/account-schemas";
import { getAuth } from "@/lib/auth/auth";
import { appErrorOf } from "@/lib/auth/auth-errors";
import { definePublicUseCase } from "@/lib/auth/guard";
import { AppError } from "@/lib/shared/app-error";
import { acceptInvitation } from "./accept-invitation";
import { makeTeam } from "./make-team";
import { openInvitation } from "./read-invitation";

/**
 * Makes an account, signs it in, and gives it a team: the one it is invited to, else a new one of its own; on an empty
 * installation that is the first team. Throws AppError "invalid" (with the field), "not-found" (invitation), "too-many-requests".
 * Should the team fail after the account was made, the person is asked for a team at the first page.
 */
export const registerPerson = definePublicUseCase({
  permission: "public",
  input: registerSchema,
  run: async (request, input) => {
    if (input.invitationId !== undefined) await refuseOtherAddress(input.invitationId, input.email);
    const body = { name: input.name, email: input.email, password: input.password };
    const { user, token } = await getAuth().api.signUpEmail({ body, headers: request.headers }).catch((error: unknown) => {
      throw appErrorOf(error);
    });
    if (input.invitationId !== undefined) {
      return acceptInvitation({ userId: user.id, userName: user.name, userEmail: user.email, sessionToken: token ?? "" }, { invitationId: input.invitationId });
    }
    return makeTeam({ ownerId: user.id, name: input.teamName ?? "" });
  },
});

/** True while nobody has a team yet: whoever registers then owns the first one. */
export async function isFirstRegistration(): Promise<boolean> {
  return !(await anyTeamExists(authDatabase()));
}

async function refuseOtherAddress(invitationId: string, email: string): Promise<void> {
  const invitation = await openInvitation(authDatabase(), invitationId);
  if (invitation.email === email) return;
  const message = `The invitation is for ${invitation.email}. Register with that address.`;
  throw new AppError("invalid", message, { fields: [{ path: "email", message }] });
}
