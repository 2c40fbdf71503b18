import { z } from "zod";
import { withTeam } from "@/db/scope";
import type { SearchView } from "@/lib/api/contract/refinement";
import { defineUseCase } from "@/lib/auth/guard";
import { readSearch } from "./work-views";

/** How far a search is, and what it proposes. */
export const getSearch = defineUseCase({
  permission: "rulebook:read",
  input: z.strictObject({ id: z.uuid() }),
  run: ({ scope }, { id }): Promise<SearchView> => withTeam(scope, (db) => readSearch(db, scope, id)),
});
