/**
 * What the two login roles may do with each table; everything not named is refused.
 * Append-only tables (advice, edition, audit, run_revision) have no update or delete, and a run is withdrawn, not deleted.
 */
export const grants = {
  saddlemark_app: {
    user: ["select"],
    organization: ["select"],
    member: ["select"],
    invitation: ["select"],
    team_counter: ["select", "insert", "update"],
    machine: ["select", "insert", "update", "delete"],
    solver_case: ["select", "insert", "update", "delete"],
    advice: ["select", "insert"],
    run: ["select", "insert", "update"],
    run_revision: ["select", "insert"],
    idempotency_key: ["select", "insert", "update", "delete"],
    edition: ["select", "insert"],
    audit: ["select", "insert"],
    draft: ["select", "insert", "update"],
    replay: ["select", "insert", "update"],
    proposal_search: ["select", "insert", "update"],
    run_log: ["select", "insert", "update"],
    log_mapping: ["select", "insert", "update", "delete"],
    webhook: ["select", "insert", "update", "delete"],
    webhook_delivery: ["select", "insert", "update"],
  },
  saddlemark_auth: {
    user: ["select", "insert", "update", "delete"],
    organization: ["select", "insert", "update", "delete"],
    member: ["select", "insert", "update", "delete"],
    invitation: ["select", "insert", "update", "delete"],
    session: ["select", "insert", "update", "delete"],
    account: ["select", "insert", "update", "delete"],
    verification: ["select", "insert", "update", "delete"],
    apikey: ["select", "insert", "update", "delete"],
    throttle: ["select", "insert", "update", "delete"],
    audit: ["insert"],
  },
} as const satisfies Record<string, Record<string, readonly Privilege[]>>;

type Privilege = "select" | "insert" | "update" | "delete";
export type LoginRole = keyof typeof grants;
export const loginRoles = ["saddlemark_app", "saddlemark_auth"] as const satisfies readonly LoginRole[];

/** Statements that put the privileges of the present database to exactly the table above. */
export function grantStatements(database: string): string[] {
  return [
    `revoke create on schema public from public`,
    `revoke create, temporary on database ${quote(database)} from public`,
    ...loginRoles.flatMap((role) => [
      `revoke all on all tables in schema public from ${role}`,
      `grant connect on database ${quote(database)} to ${role}`,
      `grant usage on schema public to ${role}`,
      ...Object.entries(grants[role]).map(([table, privileges]) => `grant ${privileges.join(", ")} on ${quote(table)} to ${role}`),
    ]),
  ];
}

/**
 * The queue's tables: the application may add a job and learn its id, no more, because jobs carry letters with reset links.
 * The worker fetches and finishes jobs as better-auth's role.
 */
export function queueGrantStatements(schema: string): string[] {
  return [
    `revoke all on all tables in schema ${schema} from saddlemark_app, saddlemark_auth`,
    `grant usage on schema ${schema} to saddlemark_app, saddlemark_auth`,
    `grant insert, select (id) on ${schema}.job to saddlemark_app`,
    `grant select on ${schema}.queue to saddlemark_app`,
    `grant select, insert, update, delete on all tables in schema ${schema} to saddlemark_auth`,
    `revoke execute on all functions in schema ${schema} from public`,
  ];
}

function quote(name: string): string {
  return `"${name.replaceAll('"', '""')}"`;
}
