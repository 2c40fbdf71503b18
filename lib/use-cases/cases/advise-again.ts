import { z } from "zod";
import { insertAdvice, lockCase } from "@/db/queries/cases";
import { recordAudit } from "@/db/queries/record-audit";
import { latestAdviceOf } from "@/db/queries/runs";
import { withTeam, type TeamDatabase } from "@/db/scope";
import { diffAdvice } from "@/lib/advice/diff";
import { operations } from "@/lib/api/contract";
import { caseRefSchema } from "@/lib/api/contract/common";
import { defineUseCase, type Scope } from "@/lib/auth/guard";
import { strategyName } from "@/lib/strategies/strategy-names";
import { adviseOn } from "@/lib/use-cases/advice/case-advice";
import { caseNotFound, caseRefOf } from "@/lib/use-cases/shared/case-ref";
import { withIdempotency, type Repeatable } from "@/lib/use-cases/shared/with-idempotency";

const response = operations.adviseAgain.response.schema;
export type AdviceAgain = z.output<typeof response>;

/** New advice on a case's own answers under the live edition and the present record; the former advice stays as given. */
export const adviseAgain = defineUseCase({
  permission: "cases:write",
  input: z.strictObject({ caseRef: caseRefSchema, idempotencyKey: z.string().nullable().default(null) }),
  run: ({ scope }, { caseRef, idempotencyKey }): Promise<Repeatable<AdviceAgain>> =>
    withTeam(scope, (db) =>
      withIdempotency(db, scope, { key: idempotencyKey, operation: `adviseAgain ${caseRef}`, body: null, response }, () => giveAdvice(db, scope, caseRef)),
    ),
});

async function giveAdvice(db: TeamDatabase, scope: Scope, caseRef: string): Promise<AdviceAgain> {
  const found = await lockCase(db, scope, caseRefOf(caseRef));
  if (found === null) throw caseNotFound();
  const before = await latestAdviceOf(db, scope, found.id);
  const advice = await adviseOn(db, scope, found.answers, found.id);
  const sequence = (before?.sequence ?? 0) + 1;
  const { id } = await insertAdvice(db, scope, { caseId: found.id, sequence, content: advice });
  const detail = { case: found.number, sequence, edition: advice.edition.number };
  await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "advice.given", subjectKind: "case", subjectId: found.id, detail });
  const changes = before === null ? [] : diffAdvice(before.content, advice, strategyName);
  return { adviceId: id, sequence, advice, changes: changes.map(({ text }) => text) };
}
