import { z } from "zod";
import { listHitRateRecords } from "@/db/queries/hit-rates";
import { withTeam } from "@/db/scope";
import type { RuleRecordsView } from "@/lib/api/contract/refinement";
import { defineUseCase } from "@/lib/auth/guard";
import { ruleRecords } from "@/lib/refinement/rule-record";
import { systemClock } from "@/lib/shared/clock";
import { readLive } from "@/lib/use-cases/rulebook/draft-view";

/** What came of each rule of the live edition on the team's record, up to now. */
export const listRuleRecords = defineUseCase({
  permission: "rulebook:read",
  input: z.strictObject({}),
  run: ({ scope }): Promise<RuleRecordsView> =>
    withTeam(scope, async (db) => {
      const { number, rules } = await readLive(db, scope);
      const asOf = systemClock().toISOString();
      return { edition: number, asOf, items: ruleRecords(await listHitRateRecords(db, scope), rules, asOf) };
    }),
});
