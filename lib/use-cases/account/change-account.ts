import { z } from "zod";
import { changeNameSchema, changePasswordSchema } from "@/lib/auth/account-schemas";
import { getAuth } from "@/lib/auth/auth";
import { appErrorOf } from "@/lib/auth/auth-errors";
import { definePublicUseCase } from "@/lib/auth/guard";
import { AppError } from "@/lib/shared/app-error";

// "public" because better-auth itself finds the person by the cookie in the headers, and refuses without one.

/** Gives the signed-in person another name. Throws AppError "unauthenticated" or "invalid". */
export const changeName = definePublicUseCase({
  permission: "public",
  input: changeNameSchema,
  run: ({ headers }, { name }) => asPerson(() => getAuth().api.updateUser({ body: { name }, headers })),
});

/** Sets another password and ends all other sessions. Throws AppError "invalid" when the present one is wrong, or "too-many-requests". */
export const changePassword = definePublicUseCase({
  permission: "public",
  input: changePasswordSchema,
  run: ({ headers }, input) => asPerson(() => getAuth().api.changePassword({ body: { ...input, revokeOtherSessions: true }, headers })),
});

/** Signs the person out everywhere but here. */
export const endOtherSessions = definePublicUseCase({
  permission: "public",
  input: z.strictObject({}),
  run: ({ headers }) => asPerson(() => getAuth().api.revokeOtherSessions({ headers })),
});

async function asPerson(work: () => Promise<unknown>): Promise<undefined> {
  try {
    await work();
  } catch (error) {
    const known = appErrorOf(error);
    throw known instanceof AppError ? known : error;
  }
  return undefined;
}
