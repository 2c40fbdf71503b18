import { z } from "zod";
import { withTeam } from "@/db/scope";
import type { ReplayView } from "@/lib/api/contract/refinement";
import { defineUseCase } from "@/lib/auth/guard";
import { readReplay } from "./work-views";

/** How far a replay is, and its result. */
export const getReplay = defineUseCase({
  permission: "rulebook:read",
  input: z.strictObject({ id: z.uuid(), replayId: z.uuid() }),
  run: ({ scope }, { id: draftId, replayId: id }): Promise<ReplayView> => withTeam(scope, (db) => readReplay(db, scope, { draftId, id })),
});
