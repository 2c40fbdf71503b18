import { z } from "zod";
import { recordAudit } from "@/db/queries/record-audit";
import { cancelReplaysOf, insertReplay } from "@/db/queries/replays";
import { withTeam } from "@/db/scope";
import type { ReplayView } from "@/lib/api/contract/refinement";
import { defineUseCase } from "@/lib/auth/guard";
import { enqueue } from "@/lib/jobs/queue";
import { readLive } from "@/lib/use-cases/rulebook/draft-view";
import { lockDraft } from "@/lib/use-cases/rulebook/lock-draft";
import { refuseErrors } from "@/lib/use-cases/rulebook/submit-draft";
import { readReplay } from "./work-views";

/** Queues a replay of a draft; one under way for it is cancelled, for it would tell of older rules. */
export const startReplay = defineUseCase({
  permission: "rulebook:edit",
  input: z.strictObject({ id: z.uuid() }),
  run: ({ scope }, { id: draftId }): Promise<ReplayView> =>
    withTeam(scope, async (db) => {
      const { title, version, rules } = await lockDraft(db, scope, { id: draftId, statuses: ["open", "submitted"], version: null });
      refuseErrors(rules);
      const live = await readLive(db, scope);
      await cancelReplaysOf(db, scope, draftId);
      const id = await insertReplay(db, scope, { draftId, draftVersion: version, editionNumber: live.number });
      await enqueue(db, "run-replay", { teamId: scope.teamId, replayId: id });
      await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "replay.started", subjectKind: "draft", subjectId: draftId, detail: { title, version, replay: id } });
      return readReplay(db, scope, { draftId, id });
    }),
});
