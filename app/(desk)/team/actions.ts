"use server";

import { headers } from "next/headers";
import { revalidatePath } from "next/cache";
import { actorFromHeaders, personFromHeaders } from "@/lib/auth/actor";
import type { FormResult } from "@/lib/auth/form-answer";
import { fieldsOf, formResult } from "@/lib/auth/form-result";
import type { Actor } from "@/lib/auth/guard";
import { switchTeam } from "@/lib/use-cases/account/switch-team";
import { changeMemberRole } from "@/lib/use-cases/team/change-member-role";
import { createKey } from "@/lib/use-cases/team/create-key";
import { inviteMember } from "@/lib/use-cases/team/invite-member";
import { leaveTeam } from "@/lib/use-cases/team/leave-team";
import { removeMember } from "@/lib/use-cases/team/remove-member";
import { revokeInvitation } from "@/lib/use-cases/team/revoke-invitation";
import { revokeKey } from "@/lib/use-cases/team/revoke-key";

type Done = Promise<FormResult<undefined>>;

/** Runs one change of the team as the present actor and shows the page anew. */
async function change<Value>(work: (actor: Actor | null) => Promise<Value>): Promise<FormResult<Value>> {
  const result = await formResult(async () => work(await actorFromHeaders(await headers())));
  if (result.ok) revalidatePath("/team");
  return result;
}

export async function switchTeamAction(teamId: string): Done {
  return formResult(async () => switchTeam(await personFromHeaders(await headers()), { teamId }));
}

export async function inviteAction(data: FormData): Done {
  return change(async (actor) => {
    await inviteMember(actor, fieldsOf(data));
    return undefined;
  });
}

export async function revokeInvitationAction(invitationId: string): Promise<FormResult<void>> {
  return change((actor) => revokeInvitation(actor, { invitationId }));
}

export async function changeRoleAction(userId: string, role: string): Promise<FormResult<void>> {
  return change((actor) => changeMemberRole(actor, { userId, role }));
}

export async function removeMemberAction(userId: string): Promise<FormResult<void>> {
  return change((actor) => removeMember(actor, { userId }));
}

export async function leaveTeamAction(): Promise<FormResult<void>> {
  return change((actor) => leaveTeam(actor, {}));
}

export async function createKeyAction(data: FormData): Promise<FormResult<{ id: string; key: string }>> {
  return change((actor) => createKey(actor, fieldsOf(data)));
}

export async function revokeKeyAction(keyId: string): Promise<FormResult<void>> {
  return change((actor) => revokeKey(actor, { keyId }));
}
