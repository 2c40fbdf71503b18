import { z } from "zod";
import { recordAudit } from "@/db/queries/record-audit";
import { cancelWork } from "@/db/queries/replays";
import { withTeam } from "@/db/scope";
import type { ReplayView } from "@/lib/api/contract/refinement";
import { defineUseCase } from "@/lib/auth/guard";
import { readReplay } from "./work-views";

/** Stops a replay; the worker lets go of it at its next step. */
export const cancelReplay = defineUseCase({
  permission: "rulebook:edit",
  input: z.strictObject({ id: z.uuid(), replayId: z.uuid() }),
  run: ({ scope }, { id: draftId, replayId: id }): Promise<ReplayView> =>
    withTeam(scope, async (db) => {
      await readReplay(db, scope, { draftId, id });
      if (await cancelWork(db, { kind: "replay", teamId: scope.teamId, id })) {
        await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "replay.cancelled", subjectKind: "draft", subjectId: draftId, detail: { replay: id } });
      }
      return readReplay(db, scope, { draftId, id });
    }),
});
