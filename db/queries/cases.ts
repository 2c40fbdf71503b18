import { and, desc, eq, sql, type SQL } from "drizzle-orm";
import type { Advice } from "@/lib/advice/advice";
import type { Scope } from "@/lib/auth/guard";
import type { Answers } from "@/lib/questionnaire/answers";
import type { Questionnaire } from "@/lib/questionnaire/questionnaire-schema";
import { user } from "../schema/auth";
import { advice, solverCase, teamCounter } from "../schema/cases";
import type { TeamDatabase } from "../scope";

/** Takes the team's next case number; its counter stays locked until the transaction ends, so numbers have no holes but those of failures. */
export async function takeCaseNumber(db: TeamDatabase, scope: Scope): Promise<number> {
  const [row] = await db
    .insert(teamCounter)
    .values({ teamId: scope.teamId, nextCase: 2 })
    .onConflictDoUpdate({ target: teamCounter.teamId, set: { nextCase: sql`${teamCounter.nextCase} + 1` } })
    .returning({ nextCase: teamCounter.nextCase });
  if (!row) throw new Error("The team's counter gave no number.");
  return row.nextCase - 1;
}

export type NewCase = { number: number; title: string; questionnaire: Questionnaire; answers: Answers; unknowns: number };

export async function insertCase(db: TeamDatabase, scope: Scope, params: NewCase): Promise<{ id: string }> {
  const { questionnaire, answers } = params;
  const [row] = await db
    .insert(solverCase)
    .values({
      teamId: scope.teamId,
      number: params.number,
      title: params.title,
      questionnaire,
      answers,
      discretisation: answers.discretisation,
      degree: answers.degree,
      meshFamily: answers.meshFamily,
      contrastRatio: answers.contrast.ratio,
      unknowns: params.unknowns,
      cores: answers.hardware.cores,
      machineId: questionnaire.hardware.machineId ?? null,
      authorId: scope.userId,
    })
    .returning({ id: solverCase.id });
  if (!row) throw new Error("The case was not stored.");
  return row;
}

/** By UUID or by number in the team. */
export type CaseRef = { id: string } | { number: number };

const caseColumns = {
  id: solverCase.id,
  number: solverCase.number,
  title: solverCase.title,
  questionnaire: solverCase.questionnaire,
  answers: solverCase.answers,
  machineId: solverCase.machineId,
  demonstration: solverCase.demonstration,
  authorId: solverCase.authorId,
  createdAt: solverCase.createdAt,
};

export type CaseRow = NonNullable<Awaited<ReturnType<typeof findCase>>>;

export async function findCase(db: TeamDatabase, scope: Scope, ref: CaseRef) {
  const rows = await db
    .select({ ...caseColumns, authorName: user.name })
    .from(solverCase)
    .leftJoin(user, eq(user.id, solverCase.authorId))
    .where(whereCase(scope, ref));
  return rows[0] ?? null;
}

/** The same, and no advice or run is added to the case until the transaction ends. */
export async function lockCase(db: TeamDatabase, scope: Scope, ref: CaseRef) {
  const rows = await db.select(caseColumns).from(solverCase).where(whereCase(scope, ref)).for("update");
  return rows[0] ?? null;
}

/** The same for adding a run: no advice is added until the transaction ends, but other runs may be. */
export async function holdCase(db: TeamDatabase, scope: Scope, ref: CaseRef) {
  const rows = await db.select(caseColumns).from(solverCase).where(whereCase(scope, ref)).for("share");
  return rows[0] ?? null;
}

function whereCase(scope: Scope, ref: CaseRef): SQL | undefined {
  return and(eq(solverCase.teamId, scope.teamId), "id" in ref ? eq(solverCase.id, ref.id) : eq(solverCase.number, ref.number));
}

export type NewAdvice = { caseId: string; sequence: number; content: Advice };

export async function insertAdvice(db: TeamDatabase, scope: Scope, params: NewAdvice): Promise<{ id: string }> {
  const { content } = params;
  const first = content.ranking.find((entry) => entry.status === "ranked");
  const [row] = await db
    .insert(advice)
    .values({
      teamId: scope.teamId,
      caseId: params.caseId,
      sequence: params.sequence,
      editionNumber: content.edition.number,
      modelVersion: content.modelVersion,
      firstStrategy: first?.strategy ?? null,
      firedRules: content.firedRules,
      content,
      createdBy: scope.userId,
    })
    .returning({ id: advice.id });
  if (!row) throw new Error("The advice was not stored.");
  return row;
}

/** The advice given on a case with its contents, the latest first. */
export async function listCaseAdvice(db: TeamDatabase, scope: Scope, caseId: string, limit = 1000) {
  return db
    .select({
      id: advice.id,
      sequence: advice.sequence,
      editionNumber: advice.editionNumber,
      modelVersion: advice.modelVersion,
      firstStrategy: advice.firstStrategy,
      content: advice.content,
      createdBy: advice.createdBy,
      creatorName: user.name,
      createdAt: advice.createdAt,
    })
    .from(advice)
    .leftJoin(user, eq(user.id, advice.createdBy))
    .where(and(eq(advice.teamId, scope.teamId), eq(advice.caseId, caseId)))
    .orderBy(desc(advice.sequence))
    .limit(limit);
}
export type CaseAdviceRow = Awaited<ReturnType<typeof listCaseAdvice>>[number];

export type CaseForRuns = { id: string; number: number; cores: number; adviceId: string | null };

/** Cases by UUID or number, with the latest advice on each; those that are not there are missing from the answer. */
export async function findCasesForRuns(db: TeamDatabase, scope: Scope, refs: readonly string[]): Promise<CaseForRuns[]> {
  const ids = refs.filter((ref) => !/^\d+$/.test(ref));
  const numbers = refs.filter((ref) => /^\d+$/.test(ref)).map(Number);
  const latest = db
    .select({ id: advice.id })
    .from(advice)
    .where(and(eq(advice.teamId, scope.teamId), eq(advice.caseId, solverCase.id)))
    .orderBy(desc(advice.sequence))
    .limit(1)
    .as("latest_advice");
  return db
    .select({ id: solverCase.id, number: solverCase.number, cores: solverCase.cores, adviceId: latest.id })
    .from(solverCase)
    .leftJoinLateral(latest, sql`true`)
    .where(
      and(
        eq(solverCase.teamId, scope.teamId),
        sql`(${solverCase.id} = any(${sql.param(ids)}::uuid[]) or ${solverCase.number} = any(${sql.param(numbers)}::int[]))`,
      ),
    );
}
