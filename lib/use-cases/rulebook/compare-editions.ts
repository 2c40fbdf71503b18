import { z } from "zod";
import { findRules } from "@/db/queries/editions";
import { withTeam } from "@/db/scope";
import { defineUseCase } from "@/lib/auth/guard";
import type { RuleDifference } from "@/lib/refinement/diff-rule-sets";
import { AppError } from "@/lib/shared/app-error";
import { differencesInWords } from "./differences";

type Changes = { number: number; before: number | null; differences: RuleDifference[] };

/** What an edition changed in the one that was live before it; for the first, nothing to compare with. */
export const compareEditions = defineUseCase({
  permission: "rulebook:read",
  input: z.strictObject({ number: z.int().min(1).max(2 ** 31 - 1) }),
  run: ({ scope }, { number }): Promise<Changes> =>
    withTeam(scope, async (db) => {
      const rules = await findRules(db, scope, number);
      if (rules === null) throw new AppError("not-found", "This team has no such edition.");
      const former = number === 1 ? null : await findRules(db, scope, number - 1);
      return { number, before: former === null ? null : number - 1, differences: former === null ? [] : differencesInWords(former, rules) };
    }),
});
