import { forgotPasswordSchema, resetPasswordSchema } from "@/lib/auth/account-schemas";
import { getAuth } from "@/lib/auth/auth";
import { appErrorOf } from "@/lib/auth/auth-errors";
import { definePublicUseCase } from "@/lib/auth/guard";

/** Sends a reset link if the address has an account; the answer does not tell. Throws AppError "too-many-requests". */
export const askForReset = definePublicUseCase({
  permission: "public",
  input: forgotPasswordSchema,
  run: async ({ headers }, { email }): Promise<undefined> => {
    await getAuth().api.requestPasswordReset({ body: { email }, headers }).catch((error: unknown) => {
      throw appErrorOf(error);
    });
    return undefined;
  },
});

/** Sets a new password by the token of a reset link, once, and ends every session. Throws AppError "invalid" for a spent token. */
export const resetPassword = definePublicUseCase({
  permission: "public",
  input: resetPasswordSchema,
  run: async ({ headers }, { token, password }): Promise<undefined> => {
    await getAuth().api.resetPassword({ body: { token, newPassword: password }, headers }).catch((error: unknown) => {
      throw appErrorOf(error);
    });
    return undefined;
  },
});
