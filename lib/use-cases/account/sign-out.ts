import { z } from "zod";
import { getAuth } from "@/lib/auth/auth";
import { definePublicUseCase } from "@/lib/auth/guard";

/** Ends the session of the cookie; without one, nothing happens. */
export const signOut = definePublicUseCase({
  permission: "public",
  input: z.strictObject({}),
  run: async ({ headers }): Promise<void> => {
    await getAuth().api.signOut({ headers });
  },
});
