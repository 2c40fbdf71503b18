import type { Advice } from "@/lib/advice/advice";
import { withTeam } from "@/db/scope";
import { defineUseCase } from "@/lib/auth/guard";
import { questionnaireSchema } from "@/lib/questionnaire/questionnaire-schema";
import { adviseOn, resolveAnswers } from "./case-advice";

/** Sizes and ranked strategies for a questionnaire; saves nothing. */
export const advise = defineUseCase({
  permission: "cases:read",
  input: questionnaireSchema,
  run: ({ scope }, questionnaire): Promise<Advice> =>
    withTeam(scope, async (db) => adviseOn(db, scope, await resolveAnswers(db, scope, questionnaire, ""))),
});
