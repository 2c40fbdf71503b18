import { and, asc, desc, eq, getTableColumns, gt, or, sql, type SQL } from "drizzle-orm";
import { alias } from "drizzle-orm/pg-core";
import type { Scope } from "@/lib/auth/guard";
import { user } from "../schema/auth";
import { advice, solverCase } from "../schema/cases";
import { run, runRevision, type runSources } from "../schema/runs";
import type { TeamDatabase } from "../scope";

type StoredRun = typeof run.$inferSelect;
export type RunSource = (typeof runSources)[number];
/** The columns a run report fills. */
export type RunValues = Pick<
  StoredRun,
  | "strategy" | "strategyName" | "outcome" | "reason" | "iterations" | "setupSeconds" | "solveSeconds" | "peakMemoryGiB" | "cores"
  | "trueRelativeResidual" | "monitoredRelativeResidual" | "monitoredNorm" | "parameters" | "followedAdvice" | "note" | "measuredAt"
>;

export type NewRun = RunValues & { caseId: string; adviceId: string | null; source: RunSource };

/** Stores runs in one statement, at most a few thousand at once; ids come in the order of `rows`. */
export async function insertRuns(db: TeamDatabase, scope: Scope, rows: readonly NewRun[]): Promise<string[]> {
  const ids = rows.map(() => crypto.randomUUID());
  const values = rows.map((row, index) => ({ ...row, id: ids[index], teamId: scope.teamId, authorId: scope.userId }));
  if (values.length > 0) await db.insert(run).values(values);
  return ids;
}

/** Advice before a run recorded now: the latest of the case. */
export async function latestAdviceOf(db: TeamDatabase, scope: Scope, caseId: string) {
  const rows = await db
    .select({ id: advice.id, sequence: advice.sequence, firstStrategy: advice.firstStrategy, content: advice.content })
    .from(advice)
    .where(and(eq(advice.teamId, scope.teamId), eq(advice.caseId, caseId)))
    .orderBy(desc(advice.sequence))
    .limit(1);
  return rows[0] ?? null;
}

/** The same without its contents, which are long: all that a run needs to know of it. */
export async function latestAdviceIdOf(db: TeamDatabase, scope: Scope, caseId: string): Promise<string | null> {
  const rows = await db
    .select({ id: advice.id })
    .from(advice)
    .where(and(eq(advice.teamId, scope.teamId), eq(advice.caseId, caseId)))
    .orderBy(desc(advice.sequence))
    .limit(1);
  return rows[0]?.id ?? null;
}

const author = alias(user, "author");
const withdrawer = alias(user, "withdrawer");

function selectRuns(db: TeamDatabase, where: SQL | undefined) {
  const { teamId: _team, ...columns } = getTableColumns(run);
  return db
    .select({
      ...columns,
      authorName: author.name,
      withdrawerName: withdrawer.name,
      caseNumber: solverCase.number,
      answers: solverCase.answers,
      /** The estimate of the run's strategy in the advice before it. */
      estimate: sql<unknown>`(select entry -> 'estimate' from ${advice} a, jsonb_array_elements(a.content -> 'ranking') entry where a.id = ${run.adviceId} and a.team_id = ${run.teamId} and entry ->> 'strategy' = ${run.strategy} limit 1)`,
      measuredKey: sql<string>`to_char(${run.measuredAt} at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.US"Z"')`,
    })
    .from(run)
    .innerJoin(solverCase, and(eq(solverCase.id, run.caseId), eq(solverCase.teamId, run.teamId)))
    .leftJoin(author, eq(author.id, run.authorId))
    .leftJoin(withdrawer, eq(withdrawer.id, run.withdrawnBy))
    .where(where);
}
export type RunRow = Awaited<ReturnType<typeof selectRuns>>[number];

/** Runs of a case, withdrawn ones among them, by time of measuring; equal times by id. */
export async function listRuns(db: TeamDatabase, scope: Scope, params: { caseId: string; after: { measuredKey: string; id: string } | null; limit: number }): Promise<RunRow[]> {
  const { after } = params;
  const measured = after === null ? sql`` : sql`${after.measuredKey}::timestamptz`;
  const beyond = after === null ? undefined : or(sql`${run.measuredAt} > ${measured}`, and(sql`${run.measuredAt} = ${measured}`, gt(run.id, after.id)));
  return selectRuns(db, and(eq(run.teamId, scope.teamId), eq(run.caseId, params.caseId), beyond))
    .orderBy(asc(run.measuredAt), asc(run.id))
    .limit(params.limit);
}

export async function findRun(db: TeamDatabase, scope: Scope, id: string): Promise<RunRow | null> {
  const rows = await selectRuns(db, and(eq(run.teamId, scope.teamId), eq(run.id, id)));
  return rows[0] ?? null;
}

/** Holds the run until the transaction ends; false when there is none. */
export async function lockRun(db: TeamDatabase, scope: Scope, id: string): Promise<boolean> {
  const rows = await db.select({ id: run.id }).from(run).where(and(eq(run.teamId, scope.teamId), eq(run.id, id))).for("update");
  return rows.length === 1;
}

/** Overwrites a run's values and counts the revision up; its former values go to run_revision in the same transaction. */
export async function updateRun(db: TeamDatabase, scope: Scope, params: { id: string; revision: number; values: RunValues }): Promise<void> {
  await db
    .update(run)
    .set({ ...params.values, revision: params.revision })
    .where(and(eq(run.teamId, scope.teamId), eq(run.id, params.id)));
}

export async function insertRevision(db: TeamDatabase, scope: Scope, params: { runId: string; revision: number; before: Record<string, unknown>; explanation: string }): Promise<void> {
  await db.insert(runRevision).values({ ...params, teamId: scope.teamId, changedBy: scope.userId });
}

export async function markWithdrawn(db: TeamDatabase, scope: Scope, params: { id: string; reason: string }): Promise<void> {
  await db
    .update(run)
    .set({ withdrawnAt: sql`now()`, withdrawnBy: scope.userId, withdrawnReason: params.reason })
    .where(and(eq(run.teamId, scope.teamId), eq(run.id, params.id)));
}

/** What a run said before each correction, the oldest first. */
export async function listRevisions(db: TeamDatabase, scope: Scope, runId: string) {
  return db
    .select({
      revision: runRevision.revision,
      before: runRevision.before,
      changedBy: runRevision.changedBy,
      changerName: user.name,
      changedAt: runRevision.changedAt,
      explanation: runRevision.explanation,
    })
    .from(runRevision)
    .leftJoin(user, eq(user.id, runRevision.changedBy))
    .where(and(eq(runRevision.teamId, scope.teamId), eq(runRevision.runId, runId)))
    .orderBy(asc(runRevision.revision));
}
export type RevisionRow = Awaited<ReturnType<typeof listRevisions>>[number];
