import { and, desc, eq, inArray, sql, type SQL } from "drizzle-orm";
import { z } from "zod";
import type { Advice } from "@/lib/advice/advice";
import type { Scope } from "@/lib/auth/guard";
import type { Answers } from "@/lib/questionnaire/answers";
import type { RuleSet } from "@/rules/rule-schema";
import { user } from "../schema/auth";
import { advice, solverCase } from "../schema/cases";
import { draft, proposalSearch, replay } from "../schema/drafts";
import type { TeamDatabase } from "../scope";

const replayColumns = {
  id: replay.id,
  draftId: replay.draftId,
  draftVersion: replay.draftVersion,
  editionNumber: replay.editionNumber,
  status: replay.status,
  progress: replay.progress,
  failure: replay.failure,
  createdBy: replay.createdBy,
  creatorName: user.name,
  createdAt: replay.createdAt,
  finishedAt: replay.finishedAt,
};
export type ReplayRow = Awaited<ReturnType<typeof listReplays>>[number];

/** The newest first, without their results; equal times by id. */
export async function listReplays(db: TeamDatabase, scope: Scope, params: { draftId: string; limit: number }) {
  return db
    .select(replayColumns)
    .from(replay)
    .leftJoin(user, eq(user.id, replay.createdBy))
    .where(and(eq(replay.teamId, scope.teamId), eq(replay.draftId, params.draftId)))
    .orderBy(desc(replay.createdAt), desc(replay.id))
    .limit(params.limit);
}

export async function findReplay(db: TeamDatabase, scope: Scope, params: { draftId: string; id: string }) {
  const rows = await db
    .select({ ...replayColumns, result: replay.result })
    .from(replay)
    .leftJoin(user, eq(user.id, replay.createdBy))
    .where(and(eq(replay.teamId, scope.teamId), eq(replay.draftId, params.draftId), eq(replay.id, params.id)));
  return rows[0] ?? null;
}

export async function insertReplay(db: TeamDatabase, scope: Scope, params: { draftId: string; draftVersion: number; editionNumber: number }): Promise<string> {
  const [row] = await db
    .insert(replay)
    .values({ ...params, teamId: scope.teamId, createdBy: scope.userId })
    .returning({ id: replay.id });
  if (!row) throw new Error("The replay was not stored.");
  return row.id;
}

const searchColumns = {
  id: proposalSearch.id,
  editionNumber: proposalSearch.editionNumber,
  status: proposalSearch.status,
  progress: proposalSearch.progress,
  failure: proposalSearch.failure,
  createdBy: proposalSearch.createdBy,
  creatorName: user.name,
  createdAt: proposalSearch.createdAt,
  finishedAt: proposalSearch.finishedAt,
};
export type SearchRow = Awaited<ReturnType<typeof listSearches>>[number];

/** The newest first, without their results; equal times by id. */
export async function listSearches(db: TeamDatabase, scope: Scope, params: { limit: number }) {
  return db
    .select(searchColumns)
    .from(proposalSearch)
    .leftJoin(user, eq(user.id, proposalSearch.createdBy))
    .where(eq(proposalSearch.teamId, scope.teamId))
    .orderBy(desc(proposalSearch.createdAt), desc(proposalSearch.id))
    .limit(params.limit);
}

export async function findSearch(db: TeamDatabase, scope: Scope, id: string) {
  const rows = await db
    .select({ ...searchColumns, result: proposalSearch.result })
    .from(proposalSearch)
    .leftJoin(user, eq(user.id, proposalSearch.createdBy))
    .where(and(eq(proposalSearch.teamId, scope.teamId), eq(proposalSearch.id, id)));
  return rows[0] ?? null;
}

/** The team's search that is not done yet, if any. */
export async function findActiveSearch(db: TeamDatabase, scope: Scope): Promise<string | null> {
  const rows = await db
    .select({ id: proposalSearch.id })
    .from(proposalSearch)
    .where(and(eq(proposalSearch.teamId, scope.teamId), inArray(proposalSearch.status, ["queued", "running"])))
    .orderBy(desc(proposalSearch.createdAt))
    .limit(1);
  return rows[0]?.id ?? null;
}

export async function insertSearch(db: TeamDatabase, scope: Scope, params: { editionNumber: number }): Promise<string> {
  const [row] = await db
    .insert(proposalSearch)
    .values({ ...params, teamId: scope.teamId, createdBy: scope.userId })
    .returning({ id: proposalSearch.id });
  if (!row) throw new Error("The search was not stored.");
  return row.id;
}

/** Work that runs in the background and whose row says how far it is. */
export const workKinds = ["replay", "search"] as const;
export type WorkRef = { kind: (typeof workKinds)[number]; teamId: string; id: string };

const tables = { replay, search: proposalSearch } as const;

function workRow({ kind, teamId, id }: WorkRef): { table: SQL; where: SQL } {
  return { table: sql`${tables[kind]}`, where: sql`team_id = ${teamId} and id = ${id}` };
}

const idRows = z.array(z.object({ id: z.string() }));

async function changed(db: TeamDatabase, statement: SQL): Promise<boolean> {
  const { rows } = await db.execute(statement);
  return idRows.parse(rows).length > 0;
}

/** Takes work up, anew where a worker was cut off. False when it is done, cancelled or gone. */
export async function claimWork(db: TeamDatabase, ref: WorkRef): Promise<boolean> {
  const { table, where } = workRow(ref);
  return changed(db, sql`update ${table} set status = 'running', progress = 0 where ${where} and status in ('queued', 'running') returning id`);
}

/** Notes the share done, 0 to 1. False when the work is no longer wanted. */
export async function noteProgress(db: TeamDatabase, ref: WorkRef, share: number): Promise<boolean> {
  const { table, where } = workRow(ref);
  return changed(db, sql`update ${table} set progress = greatest(progress, ${share}) where ${where} and status = 'running' returning id`);
}

/** Keeps the result, unless the work was cancelled meanwhile. */
export async function finishWork(db: TeamDatabase, ref: WorkRef, result: unknown): Promise<boolean> {
  const { table, where } = workRow(ref);
  return changed(
    db,
    sql`update ${table} set status = 'done', progress = 1, result = ${JSON.stringify(result)}::jsonb, failure = null, finished_at = now() where ${where} and status = 'running' returning id`,
  );
}

/** `failure` is a sentence for the person. */
export async function failWork(db: TeamDatabase, ref: WorkRef, failure: string): Promise<boolean> {
  const { table, where } = workRow(ref);
  return changed(db, sql`update ${table} set status = 'failed', failure = ${failure}, finished_at = now() where ${where} and status in ('queued', 'running') returning id`);
}

/** False when it had ended before. */
export async function cancelWork(db: TeamDatabase, ref: WorkRef): Promise<boolean> {
  const { table, where } = workRow(ref);
  return changed(db, sql`update ${table} set status = 'cancelled', finished_at = now() where ${where} and status in ('queued', 'running') returning id`);
}

/** Cancels what is still under way for a draft; returns the ids. */
export async function cancelReplaysOf(db: TeamDatabase, scope: Scope, draftId: string): Promise<string[]> {
  const rows = await db
    .update(replay)
    .set({ status: "cancelled", finishedAt: sql`now()` })
    .where(and(eq(replay.teamId, scope.teamId), eq(replay.draftId, draftId), inArray(replay.status, ["queued", "running"])))
    .returning({ id: replay.id });
  return rows.map(({ id }) => id);
}

/** The draft of a replay as it is now; its version and the edition compared with are noted in the replay. Null when it is gone. */
export async function startReplayOf(db: TeamDatabase, ref: WorkRef, liveEdition: number): Promise<RuleSet | null> {
  const rows = await db
    .select({ rules: draft.rules, version: draft.version })
    .from(replay)
    .innerJoin(draft, and(eq(draft.id, replay.draftId), eq(draft.teamId, replay.teamId)))
    .where(and(eq(replay.teamId, ref.teamId), eq(replay.id, ref.id)));
  const [row] = rows;
  if (row === undefined) return null;
  await db
    .update(replay)
    .set({ draftVersion: row.version, editionNumber: liveEdition })
    .where(and(eq(replay.teamId, ref.teamId), eq(replay.id, ref.id)));
  return row.rules;
}

/** The same for a search: notes the edition that is searched. */
export async function startSearchOf(db: TeamDatabase, ref: WorkRef, liveEdition: number): Promise<void> {
  await db
    .update(proposalSearch)
    .set({ editionNumber: liveEdition })
    .where(and(eq(proposalSearch.teamId, ref.teamId), eq(proposalSearch.id, ref.id)));
}

export type AdvisedCase = { adviceId: string; answers: Answers; sizes: Advice["sizes"]; ranking: Advice["ranking"] };

/** What stored pieces of advice saw, by their ids; in no order. */
export async function listAdvisedCases(db: TeamDatabase, params: { teamId: string; adviceIds: readonly string[] }): Promise<AdvisedCase[]> {
  return db
    .select({
      adviceId: advice.id,
      answers: solverCase.answers,
      sizes: sql<Advice["sizes"]>`${advice.content} -> 'sizes'`,
      ranking: sql<Advice["ranking"]>`${advice.content} -> 'ranking'`,
    })
    .from(advice)
    .innerJoin(solverCase, and(eq(solverCase.id, advice.caseId), eq(solverCase.teamId, advice.teamId)))
    .where(and(eq(advice.teamId, params.teamId), sql`${advice.id} = any(${sql.param([...params.adviceIds])}::uuid[])`));
}
