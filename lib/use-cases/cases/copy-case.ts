import { z } from "zod";
import { findCase } from "@/db/queries/cases";
import { withTeam } from "@/db/scope";
import { caseRefSchema } from "@/lib/api/contract/common";
import { defineUseCase } from "@/lib/auth/guard";
import type { Questionnaire } from "@/lib/questionnaire/questionnaire-schema";
import { caseNotFound, caseRefOf } from "@/lib/use-cases/shared/case-ref";

/** The answers of a case, to start another from. */
export const copyCase = defineUseCase({
  permission: "cases:read",
  input: z.strictObject({ caseRef: caseRefSchema }),
  run: ({ scope }, { caseRef }): Promise<Questionnaire> =>
    withTeam(scope, async (db) => {
      const found = await findCase(db, scope, caseRefOf(caseRef));
      if (found === null) throw caseNotFound();
      return found.questionnaire;
    }),
});
