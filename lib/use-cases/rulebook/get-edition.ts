import { z } from "zod";
import { countFired, findEdition, liveEditionNumber } from "@/db/queries/editions";
import { withTeam } from "@/db/scope";
import type { EditionView } from "@/lib/api/contract/record";
import { defineUseCase } from "@/lib/auth/guard";
import { AppError } from "@/lib/shared/app-error";
import { editionSummary } from "./list-editions";

/** One edition with its rules and how often each fired; "live" for the present one. */
export const getEdition = defineUseCase({
  permission: "rulebook:read",
  input: z.strictObject({ number: z.union([z.int().min(1).max(2 ** 31 - 1), z.literal("live")]) }),
  run: ({ scope }, { number }): Promise<EditionView> =>
    withTeam(scope, async (db) => {
      const live = await liveEditionNumber(db, scope);
      const wanted = number === "live" ? live : number;
      const row = wanted === null ? null : await findEdition(db, scope, wanted);
      if (row === null) throw new AppError("not-found", "This team has no such edition.");
      const counts = new Map((await countFired(db, scope, row.number)).map(({ rule, count }) => [rule, count]));
      const fired = row.rules.map(({ id }) => ({ rule: id, count: counts.get(id) ?? 0 }));
      return { ...editionSummary(row, live), rules: row.rules, fired };
    }),
});
