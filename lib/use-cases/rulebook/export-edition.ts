import { z } from "zod";
import { findEdition, liveEditionNumber } from "@/db/queries/editions";
import { withTeam } from "@/db/scope";
import { defineUseCase } from "@/lib/auth/guard";
import { AppError } from "@/lib/shared/app-error";
import { editionFile } from "@/rules/edition-json-schema";

/** One edition as a JSON file that can be imported as a draft, here or elsewhere. */
export const exportEdition = defineUseCase({
  permission: "rulebook:read",
  input: z.strictObject({ number: z.union([z.int().min(1).max(2 ** 31 - 1), z.literal("live")]) }),
  run: ({ scope }, { number }): Promise<{ text: string; filename: string }> =>
    withTeam(scope, async (db) => {
      const wanted = number === "live" ? await liveEditionNumber(db, scope) : number;
      const row = wanted === null ? null : await findEdition(db, scope, wanted);
      if (row === null) throw new AppError("not-found", "This team has no such edition.");
      return { text: `${JSON.stringify(editionFile(row.rules, row.note), null, 2)}\n`, filename: `edition-${row.number}.json` };
    }),
});
