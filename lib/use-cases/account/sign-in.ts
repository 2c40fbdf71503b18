import { signInSchema } from "@/lib/auth/account-schemas";
import { getAuth } from "@/lib/auth/auth";
import { appErrorOf } from "@/lib/auth/auth-errors";
import { definePublicUseCase } from "@/lib/auth/guard";

/** Opens a session. Throws AppError "invalid" for a wrong address or password, without saying which, or "too-many-requests". */
export const signIn = definePublicUseCase({
  permission: "public",
  input: signInSchema,
  run: async ({ headers }, body): Promise<undefined> => {
    await getAuth().api.signInEmail({ body, headers }).catch((error: unknown) => {
      throw appErrorOf(error);
    });
    return undefined;
  },
});
