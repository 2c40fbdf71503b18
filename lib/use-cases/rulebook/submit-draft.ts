import { z } from "zod";
import { moveDraft } from "@/db/queries/drafts";
import { recordAudit } from "@/db/queries/record-audit";
import { withTeam } from "@/db/scope";
import { parameterCatalogue } from "@/lib/advice/parameter-catalogue";
import { draftSubmitSchema, type DraftView } from "@/lib/api/contract/drafts";
import { defineUseCase } from "@/lib/auth/guard";
import { AppError } from "@/lib/shared/app-error";
import type { RuleSet } from "@/rules/rule-schema";
import { validateRuleSet } from "@/rules/validate-rule-set";
import { readDraft } from "./draft-view";
import { lockDraft } from "./lock-draft";

/** Asks for approval. Throws AppError "invalid" with the places of the errors while a rule has one. */
export const submitDraft = defineUseCase({
  permission: "rulebook:edit",
  input: z.strictObject({ id: z.uuid(), submission: draftSubmitSchema }),
  run: ({ scope }, { id, submission: { version, note } }): Promise<DraftView> =>
    withTeam(scope, async (db) => {
      const { title, rules } = await lockDraft(db, scope, { id, statuses: ["open"], version });
      refuseErrors(rules);
      await moveDraft(db, scope, { id, step: { status: "submitted", note } });
      await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "draft.submitted", subjectKind: "draft", subjectId: id, detail: { title, version, note } });
      return readDraft(db, scope, id);
    }),
});

/** An edition is free of errors; warnings and notes it may have. */
export function refuseErrors(rules: RuleSet): void {
  if (rules.length === 0) throw new AppError("invalid", "An edition has at least one rule.", { fields: [{ path: "rules", message: "There is no rule." }] });
  const errors = validateRuleSet(rules, parameterCatalogue).filter(({ severity }) => severity === "error");
  if (errors.length === 0) return;
  const fields = errors.map(({ path, message }) => ({ path: `rules.${path}`, message }));
  throw new AppError("invalid", `${errors.length === 1 ? "One place" : `${errors.length} places`} of the rules must be mended first.`, { fields });
}
