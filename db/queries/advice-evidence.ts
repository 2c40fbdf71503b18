import { and, eq, sql } from "drizzle-orm";
import { z } from "zod";
import type { Scope } from "@/lib/auth/guard";
import type { Answers } from "@/lib/questionnaire/answers";
import { outcomes } from "@/lib/runs/run";
import { solverCase } from "../schema/cases";
import type { TeamDatabase } from "../scope";

export type RecordState = { asOf: string; version: string };

/**
 * The state of the team's record of runs. `asOf`: when it last changed by recording, correcting or withdrawing, ISO 8601 to the microsecond, ""
 * for an empty record. `version` changes with every change, also of transactions that began earlier and ended later.
 */
export async function recordState(db: TeamDatabase, scope: Scope): Promise<RecordState> {
  const { rows } = await db.execute(sql`
    select
      coalesce(to_char(greatest(max(recorded_at), max(withdrawn_at), (select max(changed_at) from run_revision where team_id = ${scope.teamId})) at time zone 'UTC',
        'YYYY-MM-DD"T"HH24:MI:SS.US"Z"'), '') as "asOf",
      concat_ws('/', count(*), count(withdrawn_at), sum(revision), max(recorded_at)) as version
    from run where team_id = ${scope.teamId}`);
  return z.array(z.object({ asOf: z.string(), version: z.string() })).parse(rows)[0] ?? { asOf: "", version: "" };
}

const evidenceRunSchema = z.object({
  caseId: z.string(),
  strategy: z.string(),
  strategyName: z.string().nullable(),
  outcome: z.enum(outcomes),
  cores: z.int(),
  setupSeconds: z.number(),
  solveSeconds: z.number(),
  trueRelativeResidual: z.number().nullable(),
});
export type EvidenceRun = z.infer<typeof evidenceRunSchema>;

/** Runs that can speak: not withdrawn, said to have converged, timed. The `limit` recorded last, in a fixed order. */
export async function listEvidenceRuns(db: TeamDatabase, scope: Scope, limit: number): Promise<EvidenceRun[]> {
  const { rows } = await db.execute(sql`
    select case_id as "caseId", strategy, strategy_name as "strategyName", outcome, cores, setup_seconds as "setupSeconds", solve_seconds as "solveSeconds",
      true_relative_residual as "trueRelativeResidual"
    from run
    where team_id = ${scope.teamId} and withdrawn_at is null and outcome = 'converged' and setup_seconds is not null and solve_seconds is not null
    order by recorded_at desc, id limit ${limit}`);
  return z.array(evidenceRunSchema).parse(rows);
}

export type EvidenceCase = { id: string; number: number; title: string; answers: Answers };

export async function listEvidenceCases(db: TeamDatabase, scope: Scope, ids: readonly string[]): Promise<EvidenceCase[]> {
  if (ids.length === 0) return [];
  return db
    .select({ id: solverCase.id, number: solverCase.number, title: solverCase.title, answers: solverCase.answers })
    .from(solverCase)
    .where(and(eq(solverCase.teamId, scope.teamId), sql`${solverCase.id} = any(${sql.param([...ids])}::uuid[])`))
    .orderBy(solverCase.number);
}
