import { z } from "zod";
import { recordAudit } from "@/db/queries/record-audit";
import { cancelWork } from "@/db/queries/replays";
import { withTeam } from "@/db/scope";
import type { SearchView } from "@/lib/api/contract/refinement";
import { defineUseCase } from "@/lib/auth/guard";
import { readSearch } from "./work-views";

/** Stops a search; the worker lets go of it at its next step. */
export const cancelSearch = defineUseCase({
  permission: "rulebook:edit",
  input: z.strictObject({ id: z.uuid() }),
  run: ({ scope }, { id }): Promise<SearchView> =>
    withTeam(scope, async (db) => {
      const { editionNumber } = await readSearch(db, scope, id);
      if (await cancelWork(db, { kind: "search", teamId: scope.teamId, id })) {
        await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "proposals.cancelled", subjectKind: "edition", subjectId: String(editionNumber), detail: { search: id } });
      }
      return readSearch(db, scope, id);
    }),
});
