import { and, asc, desc, eq, gt, ne, sql } from "drizzle-orm";
import type { Scope } from "@/lib/auth/guard";
import type { LogMapping } from "@/lib/logs/mapping";
import type { ParsedLog } from "@/lib/logs/parsed-log";
import { user } from "../schema/auth";
import { logMapping, runLog } from "../schema/intake";
import { run } from "../schema/runs";
import type { TeamDatabase } from "../scope";

export type NewRunLog = { caseId: string; runId: string; fileName: string; bytes: number; sha256: string; parsed: ParsedLog; findings: readonly unknown[] };

export async function insertRunLog(db: TeamDatabase, scope: Scope, row: NewRunLog): Promise<string> {
  const [stored] = await db
    .insert(runLog)
    .values({ ...row, teamId: scope.teamId, createdBy: scope.userId })
    .returning({ id: runLog.id });
  if (!stored) throw new Error("The log was not stored.");
  return stored.id;
}

const runLogColumns = {
  id: runLog.id,
  runId: runLog.runId,
  fileName: runLog.fileName,
  bytes: runLog.bytes,
  sha256: runLog.sha256,
  parsed: runLog.parsed,
  findings: runLog.findings,
  createdAt: runLog.createdAt,
};
export type RunLogRow = NonNullable<Awaited<ReturnType<typeof findRunLog>>>;

/** The log a run was recorded from; null for a run without one. */
export async function findRunLog(db: TeamDatabase, scope: Scope, runId: string) {
  const rows = await db
    .select(runLogColumns)
    .from(runLog)
    .where(and(eq(runLog.teamId, scope.teamId), eq(runLog.runId, runId)))
    .orderBy(desc(runLog.createdAt))
    .limit(1);
  return rows[0] ?? null;
}

/** What a diagnosis compares a run with: the case's other runs that were not withdrawn, the oldest first, at most 500. */
export async function listRunsForDiagnosis(db: TeamDatabase, scope: Scope, params: { caseId: string; exceptRunId: string | null }) {
  const other = params.exceptRunId === null ? undefined : ne(run.id, params.exceptRunId);
  return db
    .select({
      strategy: run.strategy,
      outcome: run.outcome,
      iterations: run.iterations,
      setupSeconds: run.setupSeconds,
      solveSeconds: run.solveSeconds,
      peakMemoryGiB: run.peakMemoryGiB,
      cores: run.cores,
      trueRelativeResidual: run.trueRelativeResidual,
    })
    .from(run)
    .where(and(eq(run.teamId, scope.teamId), eq(run.caseId, params.caseId), sql`${run.withdrawnAt} is null`, other))
    .orderBy(asc(run.measuredAt), asc(run.id))
    .limit(500);
}

function selectMappings(db: TeamDatabase) {
  return db
    .select({ id: logMapping.id, name: logMapping.name, mapping: logMapping.mapping, createdBy: logMapping.createdBy, creatorName: user.name, createdAt: logMapping.createdAt })
    .from(logMapping)
    .leftJoin(user, eq(user.id, logMapping.createdBy));
}
export type LogMappingRow = Awaited<ReturnType<typeof listLogMappings>>[number];

/** By name; names are unique in a team. */
export async function listLogMappings(db: TeamDatabase, scope: Scope, params: { after: string | null; limit: number }) {
  const beyond = params.after === null ? undefined : gt(logMapping.name, params.after);
  return selectMappings(db).where(and(eq(logMapping.teamId, scope.teamId), beyond)).orderBy(asc(logMapping.name)).limit(params.limit);
}

export async function findLogMapping(db: TeamDatabase, scope: Scope, id: string): Promise<LogMappingRow | null> {
  const rows = await selectMappings(db).where(and(eq(logMapping.teamId, scope.teamId), eq(logMapping.id, id)));
  return rows[0] ?? null;
}

export async function findLogMappingByName(db: TeamDatabase, scope: Scope, name: string): Promise<LogMappingRow | null> {
  const rows = await selectMappings(db).where(and(eq(logMapping.teamId, scope.teamId), eq(logMapping.name, name)));
  return rows[0] ?? null;
}

/** Null when the team has a format of this name. */
export async function insertLogMapping(db: TeamDatabase, scope: Scope, mapping: LogMapping): Promise<string | null> {
  const rows = await db
    .insert(logMapping)
    .values({ teamId: scope.teamId, name: mapping.name, mapping, createdBy: scope.userId })
    .onConflictDoNothing({ target: [logMapping.teamId, logMapping.name] })
    .returning({ id: logMapping.id });
  return rows[0]?.id ?? null;
}

export async function updateLogMapping(db: TeamDatabase, scope: Scope, params: { id: string; mapping: LogMapping }): Promise<void> {
  await db
    .update(logMapping)
    .set({ name: params.mapping.name, mapping: params.mapping })
    .where(and(eq(logMapping.teamId, scope.teamId), eq(logMapping.id, params.id)));
}

/** False when the team has no such format. */
export async function deleteLogMapping(db: TeamDatabase, scope: Scope, id: string): Promise<boolean> {
  const rows = await db
    .delete(logMapping)
    .where(and(eq(logMapping.teamId, scope.teamId), eq(logMapping.id, id)))
    .returning({ id: logMapping.id });
  return rows.length === 1;
}
