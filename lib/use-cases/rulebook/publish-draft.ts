import { z } from "zod";
import { moveDraft, type DraftRow } from "@/db/queries/drafts";
import { findEdition, findRules, insertEdition, takeEditionNumber } from "@/db/queries/editions";
import { recordAudit } from "@/db/queries/record-audit";
import { listMembers } from "@/db/queries/team-members";
import { withTeam, type TeamDatabase } from "@/db/scope";
import { draftPublishSchema } from "@/lib/api/contract/drafts";
import type { EditionSummary } from "@/lib/api/contract/record";
import { defineUseCase, type Actor, type Scope } from "@/lib/auth/guard";
import { readAuthSettings } from "@/lib/auth/settings";
import { editionEmail } from "@/lib/email/edition-email";
import { enqueue } from "@/lib/jobs/queue";
import { sameContent } from "@/lib/refinement/same-content";
import { AppError } from "@/lib/shared/app-error";
import { queueEditionPublished } from "@/lib/use-cases/webhooks/queue-event";
import type { RuleSet } from "@/rules/rule-schema";
import { differencesInWords } from "./differences";
import { approvalOf, readLive } from "./draft-view";
import { editionSummary } from "./list-editions";
import { lockDraft } from "./lock-draft";
import { refuseErrors } from "./submit-draft";

/**
 * Approves a submitted draft: it becomes the next edition and the live one, and the team is told; all in one transaction. Throws AppError
 * "forbidden" for the submitter while somebody else may approve, "conflict" when another edition than the one read went live meanwhile.
 */
export const publishDraft = defineUseCase({
  permission: "rulebook:edit",
  input: z.strictObject({ id: z.uuid(), approval: draftPublishSchema }),
  run: ({ scope, actor }, { id, approval: { version, replacing } }): Promise<EditionSummary> =>
    withTeam(scope, async (db) => {
      const draft = await lockDraft(db, scope, { id, statuses: ["submitted"], version });
      const state = await approvalOf(db, scope, draft);
      if (state === "another") throw new AppError("forbidden", "You submitted this draft; another curator or an owner approves it.");
      // Taken first: it makes a second publication wait, which then sees the live edition of the first.
      const number = await takeEditionNumber(db, scope);
      const live = await readLive(db, scope);
      if (live.number !== replacing) {
        throw new AppError("conflict", `Edition ${live.number} went live meanwhile; read what this draft changes in it, then approve again.`);
      }
      refuseErrors(draft.rules);
      const alone = state === "alone";
      const origin = await originOf(db, scope, draft);
      await insertEdition(db, scope, { number, rules: draft.rules, note: draft.note, submittedBy: draft.submittedBy, alone, origin });
      await moveDraft(db, scope, { id, step: { status: "published", publishedAs: number } });
      const detail = { number, origin, draft: id, title: draft.title, replaced: live.number, alone };
      await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "edition.published", subjectKind: "edition", subjectId: String(number), detail });
      await tellTeam(db, scope, actor, { number, draft, live: live.rules, alone, origin });
      const row = await findEdition(db, scope, number);
      if (row === null) throw new Error("The edition just stored can't be read.");
      return editionSummary(row, number);
    }),
});

/** A roll back is one only while nothing was changed in the old edition. */
async function originOf(db: TeamDatabase, scope: Scope, { origin, rules }: DraftRow): Promise<string> {
  const number = /^rollback:(\d+)$/.exec(origin)?.[1];
  if (number === undefined) return "draft";
  const old = await findRules(db, scope, Number(number));
  return old !== null && sameContent(old, rules) ? origin : "draft";
}

type Published = { number: number; draft: DraftRow; live: RuleSet; alone: boolean; origin: string };

async function tellTeam(db: TeamDatabase, scope: Scope, actor: Actor, { number, draft, live, alone, origin }: Published): Promise<void> {
  await queueEditionPublished(db, { teamId: scope.teamId, number, origin, note: draft.note, rules: draft.rules.length });
  const changes = differencesInWords(live, draft.rules);
  const letter = {
    teamName: actor.teamName,
    number,
    note: draft.note,
    submitterName: draft.submitterName ?? "a former member",
    approverName: alone ? null : actor.userName,
    changes: changes.map(({ title, kind, changes: parts }) => `${title} (${kind}). ${parts.map(({ text }) => text).join(" ")}`),
    url: new URL(`/rulebook?edition=${number}`, readAuthSettings().baseUrl).href,
  };
  for (const { email } of await listMembers(db, scope)) await enqueue(db, "send-email", editionEmail({ to: email, ...letter }));
}
