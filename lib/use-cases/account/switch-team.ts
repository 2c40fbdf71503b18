import { z } from "zod";
import { authDatabase } from "@/db/client";
import { setActiveTeam } from "@/db/queries/team-sessions";
import { definePersonUseCase } from "@/lib/auth/guard";
import { AppError } from "@/lib/shared/app-error";

/** Lets the session act for another of the person's teams. Throws AppError "not-found" for a team they are not in. */
export const switchTeam = definePersonUseCase({
  permission: "signed-in",
  input: z.strictObject({ teamId: z.string().min(1).max(100) }),
  run: async (person, { teamId }): Promise<undefined> => {
    const done = await setActiveTeam(authDatabase(), { sessionToken: person.sessionToken, userId: person.userId, teamId });
    if (!done) throw new AppError("not-found", "There is no such team among yours.");
    return undefined;
  },
});
