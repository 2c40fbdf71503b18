import { z } from "zod";
import { saveDraft as saveDraftRow } from "@/db/queries/drafts";
import { recordAudit } from "@/db/queries/record-audit";
import { withTeam } from "@/db/scope";
import { draftSaveSchema, type DraftView } from "@/lib/api/contract/drafts";
import { defineUseCase } from "@/lib/auth/guard";
import { changedRules } from "./differences";
import { readDraft } from "./draft-view";
import { lockDraft } from "./lock-draft";
import { readRules } from "./read-rules";

/** Saves a draft as its next version. Throws AppError "conflict" when somebody saved it since the version that the changes began from. */
export const saveDraft = defineUseCase({
  permission: "rulebook:edit",
  input: z.strictObject({ id: z.uuid(), changes: draftSaveSchema }),
  run: async ({ scope }, { id, changes: { version, title, rules: given } }): Promise<DraftView> => {
    const rules = given === undefined ? undefined : readRules(given, "rules");
    return withTeam(scope, async (db) => {
      const before = await lockDraft(db, scope, { id, statuses: ["open"], version });
      await saveDraftRow(db, scope, { id, changes: { ...(title === undefined ? {} : { title }), ...(rules === undefined ? {} : { rules }) } });
      const detail = { title: title ?? before.title, version: version + 1, rules: rules === undefined ? [] : changedRules(before.rules, rules) };
      await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "draft.saved", subjectKind: "draft", subjectId: id, detail });
      return readDraft(db, scope, id);
    });
  },
});
