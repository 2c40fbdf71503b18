import { z } from "zod";
import { teamNameField } from "@/lib/auth/account-schemas";
import { definePersonUseCase } from "@/lib/auth/guard";
import { makeTeam } from "./make-team";

export const createTeamSchema = z.strictObject({ teamName: teamNameField });

/** A signed-in person makes another team and owns it. */
export const createTeam = definePersonUseCase({
  permission: "signed-in",
  input: createTeamSchema,
  run: (person, { teamName }) => makeTeam({ ownerId: person.userId, name: teamName }),
});
