import { z } from "zod";
import { findCase, listCaseAdvice } from "@/db/queries/cases";
import { withTeam } from "@/db/scope";
import { curveAxes, type ScalingCurves } from "@/lib/api/contract/cases";
import { caseRefSchema } from "@/lib/api/contract/common";
import { defineUseCase } from "@/lib/auth/guard";
import { crossingPoints, scalingCurves } from "@/lib/estimates/curves";
import { caseNotFound, caseRefOf } from "@/lib/use-cases/shared/case-ref";

/** How many of the ranked strategies are drawn: more lines than this can't be told apart. */
const leading = 5;

/** How the leading strategies of the latest advice scale by the model alone, with the points where they change places. */
export const readScalingCurves = defineUseCase({
  permission: "cases:read",
  input: z.strictObject({ caseRef: caseRefSchema, over: z.enum(curveAxes) }),
  run: ({ scope }, { caseRef, over }): Promise<ScalingCurves> =>
    withTeam(scope, async (db) => {
      const found = await findCase(db, scope, caseRefOf(caseRef));
      if (found === null) throw caseNotFound();
      const [latest] = await listCaseAdvice(db, scope, found.id, 1);
      const ranked = latest?.content.ranking.filter((entry) => entry.status === "ranked") ?? [];
      const curves = scalingCurves(found.answers, { over, strategies: ranked.slice(0, leading).map((entry) => entry.strategy) });
      return { over, curves, crossings: crossingPoints(curves) };
    }),
});
