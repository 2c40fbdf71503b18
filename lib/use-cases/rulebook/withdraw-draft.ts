import { z } from "zod";
import { moveDraft } from "@/db/queries/drafts";
import { recordAudit } from "@/db/queries/record-audit";
import { withTeam } from "@/db/scope";
import type { DraftView } from "@/lib/api/contract/drafts";
import { defineUseCase } from "@/lib/auth/guard";
import { readDraft } from "./draft-view";
import { lockDraft } from "./lock-draft";

/** Takes a submission back: by its submitter, or by another curator who wants changes first. */
export const withdrawDraft = defineUseCase({
  permission: "rulebook:edit",
  input: z.strictObject({ id: z.uuid() }),
  run: ({ scope }, { id }): Promise<DraftView> =>
    withTeam(scope, async (db) => {
      const { title, version } = await lockDraft(db, scope, { id, statuses: ["submitted"], version: null });
      await moveDraft(db, scope, { id, step: { status: "open" } });
      await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "draft.withdrawn", subjectKind: "draft", subjectId: id, detail: { title, version } });
      return readDraft(db, scope, id);
    }),
});
