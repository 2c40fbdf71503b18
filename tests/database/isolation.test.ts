import pg from "pg";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { grants, loginRoles } from "@/db/grants";
import { createTestDatabase, type TestDatabase } from "../support/database";

// Refusals are PostgreSQL's own (manual, "Row Security Policies" and "Privileges"): 42501 is insufficient_privilege.
const refusedByPrivilege = "42501";

let database: TestDatabase;
let owner: pg.Client;
let app: pg.Client;
let auth: pg.Client;

/** Minimal rows of two teams, "ours" and "theirs", one in every team table. */
const rowsOf = (team: string, digit: string) => {
  const id = (kind: number) => `0000000${digit}-0000-4000-8000-00000000000${kind}`;
  return [
    `insert into "user" (id, name, email) values ('${team}-user', '${team}', '${team}@example.org')`,
    `insert into organization (id, name, slug) values ('${team}', '${team}', '${team}')`,
    `insert into member (id, organization_id, user_id, role) values ('${team}-member', '${team}', '${team}-user', 'owner')`,
    `insert into invitation (id, organization_id, email, role, expires_at, inviter_id) values ('${team}-invitation', '${team}', 'guest@example.org', 'analyst', '2030-01-01', '${team}-user')`,
    `insert into team_counter (team_id) values ('${team}')`,
    `insert into machine (id, team_id, name, cores_per_node, nodes, memory_per_node_gib, bandwidth_per_node_gbps, gflops_per_core, network_latency_microseconds, network_bandwidth_gbps)
       values ('${id(1)}', '${team}', 'm', 32, 1, 128, 160, 12, 2, 12)`,
    `insert into solver_case (id, team_id, number, title, questionnaire, answers, discretisation, degree, mesh_family, contrast_ratio, unknowns, cores)
       values ('${id(2)}', '${team}', 1, 't', '{}', '{}', 'rt', 1, 'tetrahedra', 1, 10, 1)`,
    `insert into advice (id, team_id, case_id, sequence, edition_number, model_version, fired_rules, content) values ('${id(3)}', '${team}', '${id(2)}', 1, 1, 'v', '{}', '{}')`,
    `insert into run (id, team_id, case_id, strategy, outcome, cores, source, measured_at) values ('${id(4)}', '${team}', '${id(2)}', 'bddc', 'converged', 1, 'form', '2026-12-01')`,
    `insert into run_revision (team_id, run_id, revision, before) values ('${team}', '${id(4)}', 1, '{}')`,
    `insert into idempotency_key (team_id, key, body_hash) values ('${team}', 'k', 'h')`,
    `insert into edition (id, team_id, number, rules, origin) values ('${id(5)}', '${team}', 1, '[]', 'first')`,
    `insert into draft (id, team_id, title, based_on, rules, origin) values ('${id(7)}', '${team}', 't', 1, '[]', 'live')`,
    `insert into replay (id, team_id, draft_id, draft_version, edition_number) values ('${id(8)}', '${team}', '${id(7)}', 1, 1)`,
    `insert into proposal_search (id, team_id, edition_number) values ('${id(9)}', '${team}', 1)`,
    `insert into run_log (id, team_id, case_id, bytes, sha256, parsed) values ('${id(1)}', '${team}', '${id(2)}', 1, 'h', '{}')`,
    `insert into log_mapping (id, team_id, name, mapping) values ('${id(1)}', '${team}', 'm', '{}')`,
    `insert into webhook (id, team_id, url, secret, events) values ('${id(1)}', '${team}', 'https://example.org', 's', '{}')`,
    `insert into webhook_delivery (id, team_id, webhook_id, event, payload) values ('${id(2)}', '${team}', '${id(1)}', 'e', '{}')`,
    `insert into audit (id, team_id, action, subject_kind, subject_id) values ('${id(6)}', '${team}', 'a', 'k', 's')`,
  ];
};

const teamTables = [
  "team_counter",
  "machine",
  "solver_case",
  "advice",
  "run",
  "run_revision",
  "idempotency_key",
  "edition",
  "audit",
  "draft",
  "replay",
  "proposal_search",
  "run_log",
  "log_mapping",
  "webhook",
  "webhook_delivery",
] as const;
const memberTables = ["user", "organization", "member", "invitation"] as const;
const secretTables = ["session", "account", "verification", "apikey", "throttle"] as const;

beforeAll(async () => {
  database = await createTestDatabase();
  [owner, app, auth] = await Promise.all([connect(database.ownerUrl), connect(database.appUrl), connect(database.authUrl)]);
  for (const statement of [...rowsOf("ours", "1"), ...rowsOf("theirs", "2")]) await owner.query(statement);
});

afterAll(async () => {
  await Promise.all([owner, app, auth].map((client) => client?.end()));
  await database?.drop();
});

async function connect(url: string): Promise<pg.Client> {
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  return client;
}

/** Runs statements as the application for a team (or none), and takes everything back. */
async function asApp<T>(team: string | null, work: () => Promise<T>): Promise<T> {
  await app.query("begin");
  try {
    if (team !== null) await app.query("select set_config('app.team_id', $1, true)", [team]);
    return await work();
  } finally {
    await app.query("rollback");
  }
}

const codeOf = (work: Promise<unknown>) => work.then(() => "no error", (error: pg.DatabaseError) => error.code);
const teamColumn: Record<string, string> = { organization: "id", member: "organization_id", invitation: "organization_id", user: "name" };

describe("the tables", () => {
  it("are all named here, so that a new one is tested too", async () => {
    const { rows } = await owner.query<{ name: string }>("select tablename as name from pg_tables where schemaname = 'public' order by 1");
    expect(rows.map(({ name }) => name)).toEqual([...teamTables, ...memberTables, ...secretTables].sort());
  });

  it("all have row-level security", async () => {
    const { rows } = await owner.query("select relname from pg_class where relnamespace = 'public'::regnamespace and relkind in ('r', 'p') and not relrowsecurity");
    expect(rows).toEqual([]);
  });

  it("with a team column are all among the team tables", async () => {
    const { rows } = await owner.query<{ name: string }>("select table_name as name from information_schema.columns where table_schema = 'public' and column_name = 'team_id' order by 1");
    expect(rows.map(({ name }) => name)).toEqual([...teamTables].sort());
  });
});

describe.each([...teamTables, ...memberTables])("%s, as the application", (table) => {
  const column = teamColumn[table] ?? "team_id";

  it("shows the present team's rows and no others, even when asked for all", async () => {
    const teams = await asApp("ours", async () => (await app.query<{ team: string }>(`select ${column} as team from "${table}"`)).rows.map(({ team }) => team));
    expect(teams).toEqual(["ours"]);
  });

  it("shows nothing when the other team is named by hand", async () => {
    const { rowCount } = await asApp("ours", () => app.query(`select 1 from "${table}" where ${column} = 'theirs'`));
    expect(rowCount).toBe(0);
  });

  it.each([
    ["no team is set", null],
    ["the team is empty", ""],
    ["the team does not exist", "nobody"],
    ["the team is a piece of SQL", "ours' or 'a' = 'a"],
  ])("shows nothing when %s", async (_, team) => {
    const { rowCount } = await asApp(team, () => app.query(`select 1 from "${table}"`));
    expect(rowCount).toBe(0);
  });
});

describe.each(teamTables)("%s, written to as the application", (table) => {
  const privileges: readonly string[] = grants.saddlemark_app[table];

  it("refuses a row of another team", async () => {
    const statement = rowsOf("theirs", "2").find((row) => row.startsWith(`insert into ${table} `)) ?? "";
    expect(statement).not.toBe("");
    // With the key taken already a policy that let the row through would end in 23505 instead.
    expect(await asApp("ours", () => codeOf(app.query(statement)))).toBe(refusedByPrivilege);
  });

  it("does not change another team's rows", async () => {
    const update = () => app.query(`update "${table}" set team_id = team_id where team_id = 'theirs'`);
    if (!privileges.includes("update")) expect(await asApp("ours", () => codeOf(update()))).toBe(refusedByPrivilege);
    else expect((await asApp("ours", update)).rowCount).toBe(0);
  });

  it("does not give a row away to another team", async () => {
    expect(await asApp("ours", () => codeOf(app.query(`update "${table}" set team_id = 'theirs'`)))).toBe(refusedByPrivilege);
  });

  it("does not delete another team's rows", async () => {
    const remove = () => app.query(`delete from "${table}" where team_id = 'theirs'`);
    if (!privileges.includes("delete")) expect(await asApp("ours", () => codeOf(remove()))).toBe(refusedByPrivilege);
    else expect((await asApp("ours", remove)).rowCount).toBe(0);
  });

  it("can't be emptied", async () => {
    expect(await asApp("ours", () => codeOf(app.query(`truncate "${table}" cascade`)))).toBe(refusedByPrivilege);
  });
});

describe("append-only tables", () => {
  it.each([
    ["advice", "update"],
    ["advice", "delete"],
    ["edition", "update"],
    ["edition", "delete"],
    ["audit", "update"],
    ["audit", "delete"],
    ["run_revision", "update"],
    ["run_revision", "delete"],
    ["run", "delete"],
  ])("%s refuses %s, of one's own rows too", async (table, verb) => {
    const statement = verb === "update" ? `update "${table}" set team_id = 'ours'` : `delete from "${table}"`;
    expect(await asApp("ours", () => codeOf(app.query(statement)))).toBe(refusedByPrivilege);
  });

  it("go with their case when an owner deletes it", async () => {
    const left = await asApp("ours", async () => {
      await app.query("delete from solver_case");
      return (await app.query("select 1 from advice union all select 1 from run union all select 1 from run_revision union all select 1 from run_log")).rowCount;
    });
    expect(left).toBe(0);
  });
});

describe("the application's role", () => {
  it.each(secretTables)("can't read %s", async (table) => {
    expect(await asApp("ours", () => codeOf(app.query(`select 1 from "${table}"`)))).toBe(refusedByPrivilege);
  });

  it.each(memberTables)("can't change %s", async (table) => {
    const column = teamColumn[table] ?? "id";
    expect(await asApp("ours", () => codeOf(app.query(`update "${table}" set ${column} = ${column}`)))).toBe(refusedByPrivilege);
    expect(await asApp("ours", () => codeOf(app.query(`delete from "${table}"`)))).toBe(refusedByPrivilege);
  });

  it("can add a job but read none: jobs carry reset links", async () => {
    expect(await asApp("ours", () => codeOf(app.query("select data from jobs.job")))).toBe(refusedByPrivilege);
    expect(await asApp("ours", () => codeOf(app.query("delete from jobs.job")))).toBe(refusedByPrivilege);
    const id = await asApp("ours", async () => (await app.query("insert into jobs.job (name, data) values ('send-email', '{}') returning id")).rowCount);
    expect(id).toBe(1);
  });

  it("does not keep a team after its transaction", async () => {
    await asApp("ours", () => app.query("select 1"));
    const { rowCount } = await app.query("select 1 from solver_case");
    expect(rowCount).toBe(0);
  });
});

describe("better-auth's role", () => {
  it.each(teamTables.filter((table) => table !== "audit"))("has no access to %s", async (table) => {
    expect(await codeOf(auth.query(`select 1 from "${table}"`))).toBe(refusedByPrivilege);
    expect(await codeOf(auth.query(`delete from "${table}"`))).toBe(refusedByPrivilege);
  });

  it("adds audit rows of the team it names and reads none", async () => {
    const row = (team: string) => `insert into audit (team_id, action, subject_kind, subject_id) values ('${team}', 'a', 'k', 's')`;
    await auth.query("begin");
    await auth.query("select set_config('app.team_id', 'ours', true)");
    await auth.query(row("ours"));
    expect(await codeOf(auth.query(row("theirs")))).toBe(refusedByPrivilege);
    await auth.query("rollback");
    expect(await codeOf(auth.query("select 1 from audit"))).toBe(refusedByPrivilege);
  });
});

describe.each(loginRoles)("%s", (role) => {
  it("is no superuser, bypasses no policy and makes no roles, databases or replicas", async () => {
    const { rows } = await owner.query("select rolsuper, rolbypassrls, rolcreaterole, rolcreatedb, rolreplication from pg_roles where rolname = $1", [role]);
    expect(rows).toEqual([{ rolsuper: false, rolbypassrls: false, rolcreaterole: false, rolcreatedb: false, rolreplication: false }]);
  });

  it("owns nothing", async () => {
    const { rows } = await owner.query(
      `select 'relation' as kind, relname::text as name from pg_class where relowner = $1::regrole
       union all select 'schema', nspname::text from pg_namespace where nspowner = $1::regrole
       union all select 'function', proname::text from pg_proc where proowner = $1::regrole
       union all select 'database', datname::text from pg_database where datdba = $1::regrole`,
      [role],
    );
    expect(rows).toEqual([]);
  });

  it("is in no other role", async () => {
    const { rows } = await owner.query("select 1 from pg_auth_members where member = $1::regrole", [role]);
    expect(rows).toEqual([]);
  });

  it("may create nothing", async () => {
    const { rows } = await owner.query(
      `select nspname from pg_namespace where has_schema_privilege($1, oid, 'create')
       union all select 'database' where has_database_privilege($1, current_database(), 'create, temporary')`,
      [role],
    );
    expect(rows).toEqual([]);
  });

  it("has exactly the privileges of the table in db/grants", async () => {
    const { rows } = await owner.query<{ table: string; privileges: string[] }>(
      `select table_name as "table", array_agg(lower(privilege_type) order by privilege_type)::text[] as privileges
       from information_schema.role_table_grants where table_schema = 'public' and grantee = $1 group by 1`,
      [role],
    );
    const found = Object.fromEntries(rows.map(({ table, privileges }) => [table, privileges]));
    const wanted = Object.fromEntries(Object.entries(grants[role]).map(([table, privileges]) => [table, [...privileges].sort()]));
    expect(found).toEqual(wanted);
  });
});
