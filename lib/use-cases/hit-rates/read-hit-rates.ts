import { findRules, liveEditionNumber } from "@/db/queries/editions";
import { listHitRateRecords } from "@/db/queries/hit-rates";
import { withTeam } from "@/db/scope";
import type { HitRatesResponse } from "@/lib/api/contract/record";
import { defineUseCase } from "@/lib/auth/guard";
import { hitRateDefinitions } from "@/lib/hit-rates/definitions";
import { hitRateFilterSchema } from "@/lib/hit-rates/filter";
import { hitRates } from "@/lib/hit-rates/hit-rates";

/** Hit rates of the team with their definitions; rules carry the titles of the live edition. */
export const readHitRates = defineUseCase({
  permission: "hit-rates:read",
  input: hitRateFilterSchema,
  run: ({ scope }, filter): Promise<HitRatesResponse> =>
    withTeam(scope, async (db) => {
      const records = await listHitRateRecords(db, scope);
      const live = await liveEditionNumber(db, scope);
      const rules = live === null ? null : await findRules(db, scope, live);
      const ruleTitles = new Map((rules ?? []).map(({ id, title }) => [id, title]));
      return { ...hitRates(records, { filter, ruleTitles }), definitions: hitRateDefinitions };
    }),
});
