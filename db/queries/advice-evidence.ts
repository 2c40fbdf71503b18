import { and, eq, sql } from "drizzle-orm";
import { z } from "zod";
import type { Scope } from "@/lib/auth/guard";
import type { Answers } from "@/lib/questionnaire/answers";
import { outcomes } from "@/lib/runs/run";
import { solverCase } from "../schema/cases";
import type { TeamDatabase } from "../scope";

/** Text that changes whenever a run of the team is recorded, corrected or withdrawn; cheap enough to ask for with every advice. */
export async function recordVersion(db: TeamDatabase, scope: Scope): Promise<string> {
  const { rows } = await db.execute(sql`
    select concat_ws('/', count(*), count(withdrawn_at), sum(revision), max(recorded_at), max(withdrawn_at)) as version from run where team_id = ${scope.teamId}`);
  return z.array(z.object({ version: z.string() })).parse(rows)[0]?.version ?? "";
}

const evidenceRunSchema = z.object({
  caseId: z.string(),
  strategy: z.string(),
  outcome: z.enum(outcomes),
  setupSeconds: z.number(),
  solveSeconds: z.number(),
  trueRelativeResidual: z.number().nullable(),
  recordedAt: z.date(),
});
export type EvidenceRun = z.infer<typeof evidenceRunSchema>;

/** Runs that can speak: not withdrawn, said to have converged, timed, on their case's cores. In a fixed order. */
export async function listEvidenceRuns(db: TeamDatabase, scope: Scope): Promise<EvidenceRun[]> {
  const { rows } = await db.execute(sql`
    select r.case_id as "caseId", r.strategy, r.outcome, r.setup_seconds as "setupSeconds", r.solve_seconds as "solveSeconds",
      r.true_relative_residual as "trueRelativeResidual", r.recorded_at as "recordedAt"
    from run r join solver_case c on c.id = r.case_id and c.team_id = r.team_id
    where r.team_id = ${scope.teamId} and r.withdrawn_at is null and r.outcome = 'converged' and r.cores = c.cores
      and r.setup_seconds is not null and r.solve_seconds is not null
    order by r.recorded_at, r.id`);
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
