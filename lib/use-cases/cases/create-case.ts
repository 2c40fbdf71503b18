import { z } from "zod";
import { insertAdvice, insertCase, takeCaseNumber } from "@/db/queries/cases";
import { recordAudit } from "@/db/queries/record-audit";
import { withTeam, type TeamDatabase } from "@/db/scope";
import { operations } from "@/lib/api/contract";
import { defineUseCase, type Scope } from "@/lib/auth/guard";
import { discretisationLabels, meshFamilyLabels } from "@/lib/questionnaire/answer-labels";
import type { Answers } from "@/lib/questionnaire/answers";
import { questionnaireSchema, type Questionnaire } from "@/lib/questionnaire/questionnaire-schema";
import { formatSi } from "@/lib/shared/format";
import { adviseOn, resolveAnswers } from "@/lib/use-cases/advice/case-advice";
import { withIdempotency, type Repeatable } from "@/lib/use-cases/shared/with-idempotency";

const response = operations.createCase.response.schema;
export type CreatedCase = z.output<typeof response>;

/** Saves a case with its number, its answers and its first advice, frozen as given. */
export const createCase = defineUseCase({
  permission: "cases:write",
  input: z.strictObject({ questionnaire: questionnaireSchema, idempotencyKey: z.string().nullable().default(null) }),
  run: ({ scope }, { questionnaire, idempotencyKey }): Promise<Repeatable<CreatedCase>> =>
    withTeam(scope, (db) =>
      withIdempotency(db, scope, { key: idempotencyKey, operation: "createCase", body: questionnaire, response }, () =>
        saveCase(db, scope, questionnaire, "questionnaire"),
      ),
    ),
});

/** The same inside a transaction of the caller's. Throws AppError "invalid" with paths that begin with `place`. */
export async function saveCase(db: TeamDatabase, scope: Scope, questionnaire: Questionnaire, place: string): Promise<CreatedCase> {
  const answers = await resolveAnswers(db, scope, questionnaire, place);
  const advice = await adviseOn(db, scope, answers);
  const number = await takeCaseNumber(db, scope);
  const { unknowns } = advice.sizes;
  const title = questionnaire.title === "" ? defaultTitle(answers, unknowns) : questionnaire.title;
  const { id } = await insertCase(db, scope, { number, title, questionnaire, answers, unknowns });
  await insertAdvice(db, scope, { caseId: id, sequence: 1, content: advice });
  const first = advice.ranking.find(({ status }) => status === "ranked")?.strategy ?? null;
  await recordAudit(db, { teamId: scope.teamId, actorId: scope.userId, action: "case.created", subjectKind: "case", subjectId: id, detail: { number, title, first } });
  return { id, number, advice };
}

/** For a case without a title: what it is, such as "Cubes, degree 1, 396 k unknowns". */
function defaultTitle({ discretisation, meshFamily, degree }: Answers, unknowns: number): string {
  const element = discretisation === "vem-mixed" ? meshFamilyLabels[meshFamily] : discretisationLabels[discretisation];
  return `${element}, degree ${degree}, ${formatSi(unknowns)} unknowns`;
}
