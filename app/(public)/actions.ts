"use server";

import { headers } from "next/headers";
import type { FormResult } from "@/lib/auth/form-answer";
import { fieldsOf, formResult } from "@/lib/auth/form-result";
import { personFromHeaders } from "@/lib/auth/actor";
import { askForReset, resetPassword } from "@/lib/use-cases/account/reset-password";
import { signIn } from "@/lib/use-cases/account/sign-in";
import { signOut } from "@/lib/use-cases/account/sign-out";
import { switchTeam } from "@/lib/use-cases/account/switch-team";
import { acceptInvitation } from "@/lib/use-cases/team/accept-invitation";
import { createTeam } from "@/lib/use-cases/team/create-team";
import { registerPerson } from "@/lib/use-cases/team/register-person";

type Done = Promise<FormResult<undefined>>;

export async function signInAction(data: FormData): Done {
  return formResult(async () => signIn({ headers: await headers() }, fieldsOf(data)));
}

export async function registerAction(data: FormData): Done {
  return formResult(async () => {
    await registerPerson({ headers: await headers() }, fieldsOf(data));
    return undefined;
  });
}

export async function askForResetAction(data: FormData): Done {
  return formResult(async () => askForReset({ headers: await headers() }, fieldsOf(data)));
}

export async function resetPasswordAction(data: FormData): Done {
  return formResult(async () => resetPassword({ headers: await headers() }, fieldsOf(data)));
}

/** The new team becomes the one the session acts for. */
export async function createTeamAction(data: FormData): Done {
  return formResult(async () => {
    const person = await personFromHeaders(await headers());
    const { teamId } = await createTeam(person, fieldsOf(data));
    return switchTeam(person, { teamId });
  });
}

export async function joinAction(data: FormData): Done {
  return formResult(async () => {
    const person = await personFromHeaders(await headers());
    const { teamId } = await acceptInvitation(person, fieldsOf(data));
    return switchTeam(person, { teamId });
  });
}

export async function signOutAction(): Promise<void> {
  await signOut({ headers: await headers() }, {});
}
