import { and, asc, desc, eq, exists, ilike, isNull, not, or, sql, type SQL, type SQLWrapper } from "drizzle-orm";
import type { Scope } from "@/lib/auth/guard";
import { user } from "../schema/auth";
import { advice, solverCase } from "../schema/cases";
import { run } from "../schema/runs";
import type { TeamDatabase } from "../scope";

export const sortColumns = {
  number: solverCase.number,
  // Lower case, so that capital letters do not come first.
  title: sql<string>`lower(${solverCase.title})`,
  unknowns: solverCase.unknowns,
  degree: solverCase.degree,
} as const;
export type SortColumn = keyof typeof sortColumns;

export type CaseListParams = {
  search?: string;
  meshFamily?: string;
  degree?: number;
  discretisation?: string;
  /** First strategy of the latest advice. */
  strategy?: string;
  authorId?: string;
  /** Whether a run that is not withdrawn must or must not be there. */
  hasRun?: boolean;
  /** Only these cases, or all but these. */
  ids?: readonly string[];
  exceptIds?: readonly string[];
  sort: { column: SortColumn; descending: boolean };
  /** Last row of the page before: its sort value and number. */
  after: { value: string | number; number: number } | null;
  limit: number;
};

export type CaseListRow = Awaited<ReturnType<typeof listCases>>[number];

/** A page of cases. Equal sort values are ordered by number in the same direction; numbers are unique, so no row is shown twice or lost. */
export async function listCases(db: TeamDatabase, scope: Scope, params: CaseListParams) {
  const direction = params.sort.descending ? desc : asc;
  const column = sortColumns[params.sort.column];
  const latest = latestAdvice(db, scope);
  const activity = runActivity(db, scope);
  return db
    .select({
      id: solverCase.id,
      number: solverCase.number,
      title: solverCase.title,
      discretisation: solverCase.discretisation,
      degree: solverCase.degree,
      meshFamily: solverCase.meshFamily,
      contrastRatio: solverCase.contrastRatio,
      unknowns: solverCase.unknowns,
      cores: solverCase.cores,
      firstStrategy: latest.firstStrategy,
      editionNumber: latest.editionNumber,
      runs: activity.runs,
      lastRecordedAt: activity.lastRecordedAt,
      authorId: solverCase.authorId,
      authorName: user.name,
      demonstration: solverCase.demonstration,
      createdAt: solverCase.createdAt,
      sortValue: sql<string | number>`${column}`,
    })
    .from(solverCase)
    .innerJoinLateral(latest, sql`true`)
    .innerJoinLateral(activity, sql`true`)
    .leftJoin(user, eq(user.id, solverCase.authorId))
    .where(and(eq(solverCase.teamId, scope.teamId), ...filters(db, scope, params, latest.firstStrategy), afterRow(params)))
    .orderBy(direction(column), direction(solverCase.number))
    .limit(params.limit);
}

function latestAdvice(db: TeamDatabase, scope: Scope) {
  return db
    .select({ firstStrategy: advice.firstStrategy, editionNumber: advice.editionNumber })
    .from(advice)
    .where(and(eq(advice.teamId, scope.teamId), eq(advice.caseId, solverCase.id)))
    .orderBy(desc(advice.sequence))
    .limit(1)
    .as("latest_advice");
}

function runActivity(db: TeamDatabase, scope: Scope) {
  return db
    .select({ runs: sql<number>`count(*)::int`.as("runs"), lastRecordedAt: sql<Date | null>`max(${run.recordedAt})`.mapWith(run.recordedAt).as("last_recorded_at") })
    .from(run)
    .where(liveRunsOfCase(scope))
    .as("run_activity");
}

function liveRunsOfCase(scope: Scope): SQL | undefined {
  return and(eq(run.teamId, scope.teamId), eq(run.caseId, solverCase.id), isNull(run.withdrawnAt));
}

function filters(db: TeamDatabase, scope: Scope, params: CaseListParams, firstStrategy: SQLWrapper): (SQL | undefined)[] {
  const anyRun = exists(db.select({ one: sql`1` }).from(run).where(liveRunsOfCase(scope)));
  return [
    params.search === undefined ? undefined : matchesSearch(params.search),
    params.meshFamily === undefined ? undefined : eq(solverCase.meshFamily, params.meshFamily),
    params.degree === undefined ? undefined : eq(solverCase.degree, params.degree),
    params.discretisation === undefined ? undefined : eq(solverCase.discretisation, params.discretisation),
    params.strategy === undefined ? undefined : sql`${firstStrategy} = ${params.strategy}`,
    params.authorId === undefined ? undefined : eq(solverCase.authorId, params.authorId),
    params.hasRun === undefined ? undefined : params.hasRun ? anyRun : not(anyRun),
    params.ids === undefined ? undefined : sql`${solverCase.id} = any(${sql.param([...params.ids])}::uuid[])`,
    params.exceptIds === undefined ? undefined : sql`${solverCase.id} <> all(${sql.param([...params.exceptIds])}::uuid[])`,
  ];
}

/** Part of a title, or a number with or without "#". */
function matchesSearch(search: string): SQL | undefined {
  const pattern = `%${search.replace(/[\\%_]/g, "\\$&")}%`;
  const number = /^#?([1-9]\d{0,8})$/.exec(search)?.[1];
  return or(ilike(solverCase.title, pattern), number === undefined ? undefined : eq(solverCase.number, Number(number)));
}

function afterRow({ sort, after }: CaseListParams): SQL | undefined {
  if (after === null) return undefined;
  const column = sortColumns[sort.column];
  const kind = sort.column === "title" ? sql`text` : sort.column === "unknowns" ? sql`float8` : sql`int`;
  const there = sql`(${after.value}::${kind}, ${after.number}::int)`;
  return sort.descending ? sql`(${column}, ${solverCase.number}) < ${there}` : sql`(${column}, ${solverCase.number}) > ${there}`;
}
