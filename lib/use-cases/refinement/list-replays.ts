import { z } from "zod";
import { findDraft } from "@/db/queries/drafts";
import { listReplays as listReplayRows } from "@/db/queries/replays";
import { withTeam } from "@/db/scope";
import type { ReplaySummary } from "@/lib/api/contract/refinement";
import { defineUseCase } from "@/lib/auth/guard";
import { draftNotFound } from "@/lib/use-cases/rulebook/draft-view";
import { replaySummary } from "./work-views";

const most = 20;

/** The latest replays of a draft. */
export const listReplays = defineUseCase({
  permission: "rulebook:read",
  input: z.strictObject({ id: z.uuid() }),
  run: ({ scope }, { id: draftId }): Promise<{ items: ReplaySummary[] }> =>
    withTeam(scope, async (db) => {
      if ((await findDraft(db, scope, draftId)) === null) throw draftNotFound();
      return { items: (await listReplayRows(db, scope, { draftId, limit: most })).map(replaySummary) };
    }),
});
