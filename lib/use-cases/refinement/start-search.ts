import { z } from "zod";
import { lockCounter } from "@/db/queries/editions";
import { recordAudit } from "@/db/queries/record-audit";
import { findActiveSearch, insertSearch } from "@/db/queries/replays";
import { withTeam } from "@/db/scope";
import type { SearchView } from "@/lib/api/contract/refinement";
import { defineUseCase } from "@/lib/auth/guard";
import { enqueue } from "@/lib/jobs/queue";
import { readLive } from "@/lib/use-cases/rulebook/draft-view";
import { readSearch } from "./work-views";

/** Queues a search of the record for refinements of the live edition; one under way is answered instead of a second. */
export const startSearch = defineUseCase({
  permission: "rulebook:edit",
  input: z.strictObject({}),
  run: ({ scope }): Promise<SearchView> =>
    withTeam(scope, async (db) => {
      await lockCounter(db, scope);
      const active = await findActiveSearch(db, scope);
      if (active !== null) return readSearch(db, scope, active);
      const { number } = await readLive(db, scope);
      const id = await insertSearch(db, scope, { editionNumber: number });
      await enqueue(db, "search-proposals", { teamId: scope.teamId, searchId: id });
      await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "proposals.searched", subjectKind: "edition", subjectId: String(number), detail: { search: id } });
      return readSearch(db, scope, id);
    }),
});
