import { z } from "zod";
import { listSearches as listSearchRows } from "@/db/queries/replays";
import { withTeam } from "@/db/scope";
import type { SearchSummary } from "@/lib/api/contract/refinement";
import { defineUseCase } from "@/lib/auth/guard";
import { searchSummary } from "./work-views";

const most = 20;

/** The team's latest searches for refinements. */
export const listSearches = defineUseCase({
  permission: "rulebook:read",
  input: z.strictObject({}),
  run: ({ scope }): Promise<{ items: SearchSummary[] }> =>
    withTeam(scope, async (db) => ({ items: (await listSearchRows(db, scope, { limit: most })).map(searchSummary) })),
});
