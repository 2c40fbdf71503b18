import { z } from "zod";
import { moveDraft } from "@/db/queries/drafts";
import { recordAudit } from "@/db/queries/record-audit";
import { withTeam } from "@/db/scope";
import type { DraftView } from "@/lib/api/contract/drafts";
import { defineUseCase } from "@/lib/auth/guard";
import { readDraft } from "./draft-view";
import { lockDraft } from "./lock-draft";

/** Puts a draft away for good; it stays readable. */
export const discardDraft = defineUseCase({
  permission: "rulebook:edit",
  input: z.strictObject({ id: z.uuid() }),
  run: ({ scope }, { id }): Promise<DraftView> =>
    withTeam(scope, async (db) => {
      const { title, version } = await lockDraft(db, scope, { id, statuses: ["open", "submitted"], version: null });
      await moveDraft(db, scope, { id, step: { status: "discarded" } });
      await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "draft.discarded", subjectKind: "draft", subjectId: id, detail: { title, version } });
      return readDraft(db, scope, id);
    }),
});
