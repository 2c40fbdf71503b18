import type { z } from "zod";
import { insertDraft, type NewDraft } from "@/db/queries/drafts";
import { findRules } from "@/db/queries/editions";
import { recordAudit } from "@/db/queries/record-audit";
import { withTeam, type TeamDatabase } from "@/db/scope";
import { newDraftSchema, type DraftView } from "@/lib/api/contract/drafts";
import { defineUseCase, type Scope } from "@/lib/auth/guard";
import { AppError } from "@/lib/shared/app-error";
import { proposedRules } from "@/lib/use-cases/refinement/proposed-rules";
import { readDraft, readLive } from "./draft-view";
import { readEditionFile } from "./read-rules";

type Begun = Omit<NewDraft, "basedOn">;

/** Starts a draft from the live edition, an old one (to roll back), an exported file or a proposal. */
export const createDraft = defineUseCase({
  permission: "rulebook:edit",
  input: newDraftSchema,
  run: ({ scope }, input): Promise<DraftView> =>
    withTeam(scope, async (db) => {
      const live = await readLive(db, scope);
      const begun = await begin(db, scope, input, live);
      const title = input.title ?? begun.title;
      const id = await insertDraft(db, scope, { ...begun, title, basedOn: live.number });
      const detail = { title, origin: begun.origin, basedOn: live.number };
      await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "draft.created", subjectKind: "draft", subjectId: id, detail });
      return readDraft(db, scope, id);
    }),
});

async function begin(db: TeamDatabase, scope: Scope, input: z.output<typeof newDraftSchema>, live: Awaited<ReturnType<typeof readLive>>): Promise<Begun> {
  switch (input.from) {
    case "live":
      return { title: `From edition ${live.number}`, rules: live.rules, origin: "live" };
    case "edition":
      return beginRollback(db, scope, input.number ?? 0);
    case "import":
      return { title: "Imported rules", rules: readEditionFile(input.edition, "edition").rules, origin: "import" };
    case "proposal": {
      const { proposal, rules } = await proposedRules(db, scope, { search: input.search ?? "", key: input.key ?? "", live: live.rules });
      return { title: `Proposal: ${proposal.words}`.slice(0, 160), rules, origin: `proposal:${proposal.key}` };
    }
  }
}

async function beginRollback(db: TeamDatabase, scope: Scope, number: number): Promise<Begun> {
  const rules = await findRules(db, scope, number);
  if (rules === null) throw new AppError("invalid", "This team has no such edition.", { fields: [{ path: "number", message: `There is no edition ${number}.` }] });
  return { title: `Roll back to edition ${number}`, rules, origin: `rollback:${number}` };
}
