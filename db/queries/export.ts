import { sql, type SQL } from "drizzle-orm";
import { z } from "zod";
import type { Scope } from "@/lib/auth/guard";
import type { TeamDatabase } from "../scope";

/** What an export holds, parents before what refers to them. */
export const exportSections = ["members", "machines", "editions", "cases", "advice", "runs", "runRevisions", "audit"] as const;
export type ExportSection = (typeof exportSections)[number];

/** Each section as JSON objects with the key by which it is paged. Columns are named one by one; credentials and drafts of other teams are in none. */
const sections: Record<ExportSection, (team: string) => SQL> = {
  members: (team) => sql`select m.id as key, json_build_object('userId', u.id, 'name', u.name, 'email', u.email, 'role', m.role) as item
    from member m join "user" u on u.id = m.user_id where m.organization_id = ${team}`,
  machines: (team) => sql`select id::text as key, json_build_object('id', id, 'name', name, 'coresPerNode', cores_per_node, 'nodes', nodes, 'memoryPerNodeGiB', memory_per_node_gib,
      'bandwidthPerNodeGBps', bandwidth_per_node_gbps, 'gflopsPerCore', gflops_per_core, 'networkLatencyMicroseconds', network_latency_microseconds,
      'networkBandwidthGBps', network_bandwidth_gbps, 'demonstration', demonstration, 'createdBy', created_by, 'createdAt', created_at) as item
    from machine where team_id = ${team}`,
  editions: (team) => sql`select lpad(number::text, 10, '0') as key, json_build_object('number', number, 'rules', rules, 'note', note, 'origin', origin, 'submittedBy', submitted_by,
      'approvedBy', approved_by, 'publishedAt', published_at) as item
    from edition where team_id = ${team}`,
  cases: (team) => sql`select id::text as key, json_build_object('id', id, 'number', number, 'title', title, 'questionnaire', questionnaire, 'answers', answers, 'unknowns', unknowns,
      'demonstration', demonstration, 'authorId', author_id, 'createdAt', created_at) as item
    from solver_case where team_id = ${team}`,
  advice: (team) => sql`select id::text as key, json_build_object('id', id, 'caseId', case_id, 'sequence', sequence, 'advice', content, 'givenBy', created_by, 'givenAt', created_at) as item
    from advice where team_id = ${team}`,
  runs: (team) => sql`select id::text as key, json_build_object('id', id, 'caseId', case_id, 'adviceId', advice_id, 'strategy', strategy, 'strategyName', strategy_name, 'outcome', outcome,
      'reason', reason, 'iterations', iterations, 'setupSeconds', setup_seconds, 'solveSeconds', solve_seconds, 'peakMemoryGiB', peak_memory_gib, 'cores', cores,
      'trueRelativeResidual', true_relative_residual, 'monitoredRelativeResidual', monitored_relative_residual, 'monitoredNorm', monitored_norm, 'parameters', parameters,
      'followedAdvice', followed_advice, 'note', note, 'source', source, 'measuredAt', measured_at, 'recordedAt', recorded_at, 'authorId', author_id, 'revision', revision,
      'withdrawnAt', withdrawn_at, 'withdrawnBy', withdrawn_by, 'withdrawnReason', withdrawn_reason) as item
    from run where team_id = ${team}`,
  runRevisions: (team) => sql`select run_id::text || '/' || lpad(revision::text, 10, '0') as key, json_build_object('runId', run_id, 'revision', revision, 'before', before, 'changedBy', changed_by,
      'changedAt', changed_at, 'explanation', explanation) as item
    from run_revision where team_id = ${team}`,
  audit: (team) => sql`select id::text as key, json_build_object('id', id, 'at', at, 'actorId', actor_id, 'action', action, 'subjectKind', subject_kind, 'subjectId', subject_id, 'detail', detail) as item
    from audit where team_id = ${team}`,
};

const rowSchema = z.object({ key: z.string(), item: z.string() });
export type ExportRow = z.infer<typeof rowSchema>;

/** A page of one section: `item` is JSON text, ready to be written. Ordered by key; `after` is the last key of the page before. */
export async function listExportRows(db: TeamDatabase, scope: Scope, params: { section: ExportSection; after: string | null; limit: number }): Promise<ExportRow[]> {
  const beyond = params.after === null ? sql`` : sql`where key > ${params.after}`;
  const { rows } = await db.execute(sql`select key, item::text as item from (${sections[params.section](scope.teamId)}) listed ${beyond} order by key limit ${params.limit}`);
  return z.array(rowSchema).parse(rows);
}
