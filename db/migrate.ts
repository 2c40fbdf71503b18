import { basename, join } from "node:path";
import { drizzle } from "drizzle-orm/node-postgres";
import { migrate } from "drizzle-orm/node-postgres/migrator";
import pg from "pg";
import PgBoss from "pg-boss";
import { z } from "zod";
import { jobDefinitions, jobSchemaName, queueSettings } from "@/lib/jobs/definitions";
import { grantStatements, loginRoles, queueGrantStatements, type LoginRole } from "./grants";

export type MigrationOptions = {
  /** URL of the role that owns the database and may make roles. */
  ownerUrl: string;
  appPassword: string;
  authPassword: string;
  /** Folder of drizzle's journal; by default `drizzle` in the working directory. */
  migrationsFolder?: string;
};

// Any fixed number: it keeps two starts from migrating one database at the same time.
const migrationLock = 7_203_391;

/**
 * Brings a database to the present state: login roles with their passwords, tables and policies, privileges, job queue.
 * Safe to repeat and to run twice at once. Throws with one sentence when a login role could get around row-level security.
 */
export async function migrateDatabase(options: MigrationOptions): Promise<void> {
  const client = new pg.Client({ connectionString: options.ownerUrl, application_name: "saddlemark-migrate" });
  await client.connect();
  try {
    await client.query("select pg_advisory_lock($1)", [migrationLock]);
    await client.query("set client_min_messages = warning");
    await ensureLoginRole(client, "saddlemark_app", options.appPassword);
    await ensureLoginRole(client, "saddlemark_auth", options.authPassword);
    await migrate(drizzle(client), { migrationsFolder: options.migrationsFolder ?? join(process.cwd(), "drizzle") });
    await installQueue(client);
    await setPrivileges(client);
    await checkLoginRoles(client);
  } finally {
    await client.end();
  }
}

async function ensureLoginRole(client: pg.Client, role: LoginRole, password: string): Promise<void> {
  await client.query(`do $$ begin create role ${role} login; exception when duplicate_object or unique_violation then null; end $$`);
  await retryConflicts(() => client.query(`alter role ${role} login password ${client.escapeLiteral(password)}`));
}

/** Roles are shared by all databases of a server: two migrations of different databases may meet at one. */
async function retryConflicts(work: () => Promise<unknown>): Promise<void> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      await work();
      return;
    } catch (error) {
      const conflict = error instanceof Error && error.message === "tuple concurrently updated";
      if (!conflict || attempt === 20) throw error;
      await new Promise((resolve) => setTimeout(resolve, 25 * attempt));
    }
  }
}

async function installQueue(client: pg.Client): Promise<void> {
  const db = { executeSql: (text: string, values?: unknown[]) => client.query(text, values) };
  const boss = new PgBoss({ db, schema: jobSchemaName, migrate: true, supervise: false, schedule: false });
  await boss.start();
  for (const name of Object.keys(jobDefinitions)) {
    const settings = queueSettings(name);
    await boss.createQueue(settings.deadLetter, { name: settings.deadLetter, policy: "standard" });
    await boss.createQueue(name, settings);
    await boss.updateQueue(name, settings);
  }
  await boss.stop({ graceful: false });
}

async function setPrivileges(client: pg.Client): Promise<void> {
  const { rows } = await client.query<{ name: string }>("select current_database() as name");
  const statements = [...grantStatements(rows[0]?.name ?? ""), ...queueGrantStatements(jobSchemaName)];
  // In one transaction, so that a running application never meets a table without its privileges.
  await client.query(["begin", ...statements, "commit"].join(";\n"));
}

async function checkLoginRoles(client: pg.Client): Promise<void> {
  const { rows } = await client.query<{ name: string }>(
    "select rolname as name from pg_roles where rolname = any($1) and (rolsuper or rolbypassrls or rolcreaterole)",
    [loginRoles],
  );
  const first = rows[0];
  if (first) throw new Error(`The role ${first.name} may get around row-level security. Take superuser, bypassrls and createrole from it.`);
}

const environmentSchema = z.object({
  DATABASE_URL: z.string().min(1),
  APP_DATABASE_PASSWORD: z.string().min(1),
  AUTH_DATABASE_PASSWORD: z.string().min(1),
});

async function main(): Promise<void> {
  const environment = environmentSchema.parse(process.env);
  await migrateDatabase({
    ownerUrl: environment.DATABASE_URL,
    appPassword: environment.APP_DATABASE_PASSWORD,
    authPassword: environment.AUTH_DATABASE_PASSWORD,
  });
}

// By the file's name, because bundled into another program this module must only offer its function.
if (/^migrate\.(ts|mjs)$/.test(basename(process.argv[1] ?? ""))) {
  main().catch((error: unknown) => {
    console.error(error instanceof z.ZodError ? `Missing or unusable: ${error.issues.map(({ path }) => path.join(".")).join(", ")}` : error instanceof Error ? error.message : error);
    process.exitCode = 1;
  });
}
