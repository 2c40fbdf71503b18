import { sql, type SQL } from "drizzle-orm";
import { z } from "zod";
import type { Scope } from "@/lib/auth/guard";
import type { ComparedRun, HitRateRecord } from "@/lib/hit-rates/record";
import { discretisations, meshFamilies } from "@/lib/questionnaire/answer-sets";
import { outcomes } from "@/lib/runs/run";
import type { TeamDatabase } from "../scope";

const rowSchema = z.object({
  caseId: z.string(),
  caseNumber: z.int(),
  discretisation: z.enum(discretisations),
  degree: z.int(),
  meshFamily: z.enum(meshFamilies),
  cores: z.int(),
  tolerance: z.number(),
  repeatedSolves: z.number(),
  timeLimitSeconds: z.number().nullable(),
  memoryGiB: z.number(),
  adviceId: z.string(),
  editionNumber: z.int(),
  firstStrategy: z.string().nullable(),
  firedRules: z.array(z.string()),
  givenAt: z.string(),
  advised: z.boolean(),
  runId: z.string().nullable(),
  strategyKey: z.string().nullable(),
  outcome: z.enum(outcomes).nullable(),
  iterations: z.coerce.number().nullable(),
  setupSeconds: z.number().nullable(),
  solveSeconds: z.number().nullable(),
  peakMemoryGiB: z.number().nullable(),
  trueRelativeResidual: z.number().nullable(),
  measuredAt: z.string().nullable(),
});
type Row = z.infer<typeof rowSchema>;

/**
 * Every case of the team with the runs that are compared, by the definitions of lib/hit-rates: for each strategy (others by their name)
 * the first run, by time of measuring, not withdrawn, on the case's cores, after the latest advice before it. The advice judged is the
 * latest whose first strategy has such a run after it; while there is none, the latest of all, with nothing judged.
 * `caseIds` restricts to those cases. Ordered by case number.
 */
export async function listHitRateRecords(db: TeamDatabase, scope: Pick<Scope, "teamId">, params: { caseIds?: readonly string[] } = {}): Promise<HitRateRecord[]> {
  if (params.caseIds?.length === 0) return [];
  const { rows } = await db.execute(recordQuery(scope, params.caseIds));
  return gather(z.array(rowSchema).parse(rows));
}

function recordQuery(scope: Pick<Scope, "teamId">, caseIds: readonly string[] | undefined): SQL {
  const chosen = caseIds === undefined ? sql`` : sql`and c.id = any(${sql.param([...caseIds])}::uuid[])`;
  return sql`
    with chosen as (
      select c.id, c.number, c.discretisation, c.degree, c.mesh_family, c.cores, c.answers from solver_case c where c.team_id = ${scope.teamId} ${chosen}
    ),
    -- The first run of a strategy after an advice; equal times go to the one recorded first, then by id.
    first_run as (
      select distinct on (r.case_id, r.advice_id, key.strategy) r.*, key.strategy as strategy_key
      from run r
      join chosen c on c.id = r.case_id
      cross join lateral (select case when r.strategy = 'other' then 'other:' || coalesce(r.strategy_name, '') else r.strategy end as strategy) key
      where r.team_id = ${scope.teamId} and r.withdrawn_at is null and r.advice_id is not null and r.cores = c.cores
      order by r.case_id, r.advice_id, key.strategy, r.measured_at, r.recorded_at, r.id
    ),
    judged as (
      select distinct on (a.case_id) a.id, a.case_id, f.id as run_id, f.strategy_key
      from advice a
      join first_run f on f.advice_id = a.id and f.strategy_key = a.first_strategy
      where a.team_id = ${scope.teamId}
      order by a.case_id, a.sequence desc
    ),
    latest as (
      select distinct on (a.case_id) a.id, a.case_id from advice a join chosen c on c.id = a.case_id where a.team_id = ${scope.teamId} order by a.case_id, a.sequence desc
    ),
    -- One run a strategy: the judged one, and of the other strategies that after the latest advice.
    compared as (
      select distinct on (f.case_id, f.strategy_key) f.*, coalesce(f.id = j.run_id, false) as advised
      from first_run f
      join advice a on a.id = f.advice_id and a.team_id = ${scope.teamId}
      left join judged j on j.case_id = f.case_id
      order by f.case_id, f.strategy_key, coalesce(f.id = j.run_id, false) desc, a.sequence desc
    )
    select c.id as "caseId", c.number as "caseNumber", c.discretisation, c.degree, c.mesh_family as "meshFamily", c.cores,
      (c.answers ->> 'tolerance')::float8 as tolerance, (c.answers ->> 'repeatedSolves')::float8 as "repeatedSolves",
      (c.answers #>> '{hardware,timeLimitSeconds}')::float8 as "timeLimitSeconds",
      (c.answers #>> '{hardware,nodes}')::float8 * (c.answers #>> '{hardware,memoryPerNodeGiB}')::float8 as "memoryGiB",
      a.id as "adviceId", a.edition_number as "editionNumber", a.first_strategy as "firstStrategy", a.fired_rules as "firedRules", ${isoInstant("a.created_at")} as "givenAt",
      coalesce(r.advised, false) as advised, r.id as "runId", r.strategy_key as "strategyKey", r.outcome, r.iterations, r.setup_seconds as "setupSeconds",
      r.solve_seconds as "solveSeconds", r.peak_memory_gib as "peakMemoryGiB", r.true_relative_residual as "trueRelativeResidual", ${isoInstant("r.measured_at")} as "measuredAt"
    from chosen c
    join latest l on l.case_id = c.id
    left join judged j on j.case_id = c.id
    join advice a on a.id = coalesce(j.id, l.id) and a.team_id = ${scope.teamId}
    left join compared r on r.case_id = c.id
    order by c.number, r.advised desc nulls last, r.strategy_key`;
}

/** ISO 8601 in UTC to the millisecond; `column` is one of ours. */
function isoInstant(column: string): SQL {
  return sql`to_char(${sql.raw(column)} at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"')`;
}

function gather(rows: readonly Row[]): HitRateRecord[] {
  const byCase = new Map<string, { row: Row; advisedRun: ComparedRun | null; otherRuns: ComparedRun[] }>();
  for (const row of rows) {
    const found = byCase.get(row.caseId) ?? { row, advisedRun: null, otherRuns: [] };
    byCase.set(row.caseId, found);
    const compared = comparedRunOf(row);
    if (compared === null) continue;
    if (row.advised) found.advisedRun = compared;
    else found.otherRuns.push(compared);
  }
  return [...byCase.values()].map(({ row, advisedRun, otherRuns }) => recordOf(row, advisedRun, otherRuns));
}

function recordOf(row: Row, advisedRun: ComparedRun | null, otherRuns: ComparedRun[]): HitRateRecord {
  const { tolerance, repeatedSolves, timeLimitSeconds, memoryGiB, cores } = row;
  return {
    caseId: row.caseId,
    caseNumber: row.caseNumber,
    discretisation: row.discretisation,
    degree: row.degree,
    meshFamily: row.meshFamily,
    limits: { tolerance, repeatedSolves, timeLimitSeconds, memoryGiB, cores },
    advice: {
      id: row.adviceId,
      editionNumber: row.editionNumber,
      firstStrategy: row.firstStrategy,
      firedRules: row.firedRules,
      givenAt: row.givenAt,
    },
    advisedRun,
    otherRuns,
  };
}

function comparedRunOf(row: Row): ComparedRun | null {
  if (row.runId === null || row.strategyKey === null || row.outcome === null || row.measuredAt === null) return null;
  return {
    runId: row.runId,
    strategy: row.strategyKey,
    outcome: row.outcome,
    iterations: row.iterations,
    setupSeconds: row.setupSeconds,
    solveSeconds: row.solveSeconds,
    peakMemoryGiB: row.peakMemoryGiB,
    cores: row.cores,
    trueRelativeResidual: row.trueRelativeResidual,
    measuredAt: row.measuredAt,
  };
}
