import { randomBytes } from "node:crypto";
import pg from "pg";

export type TestDatabase = {
  /** The owner: makes and drops, is not bound by row-level security. */
  ownerUrl: string;
  /** The application's role, bound by row-level security. */
  appUrl: string;
  /** The role of sign-in and of the worker's queue. */
  authUrl: string;
  drop: () => Promise<void>;
};

/** A database of its own for a test file: a clone of the migrated template, dropped with `drop()` in afterAll. */
export async function createTestDatabase(): Promise<TestDatabase> {
  const adminUrl = required("TEST_DATABASE_ADMIN_URL");
  const prefix = required("TEST_DATABASE_PREFIX");
  const name = `${prefix}_${randomBytes(6).toString("hex")}`;
  // Privileges on the database itself are not part of a template.
  await run(adminUrl, [`create database ${name} template ${prefix}_template`, `revoke create, temporary on database ${name} from public`]);
  const ownerUrl = databaseUrl(adminUrl, name);
  return {
    ownerUrl,
    appUrl: roleUrl(ownerUrl, "saddlemark_app", required("TEST_DATABASE_APP_PASSWORD")),
    authUrl: roleUrl(ownerUrl, "saddlemark_auth", required("TEST_DATABASE_AUTH_PASSWORD")),
    drop: () => run(adminUrl, [`drop database if exists ${name} with (force)`]),
  };
}

function required(variable: string): string {
  const value = process.env[variable];
  if (!value) throw new Error(`${variable} is not set: database tests belong to vitest's project "database".`);
  return value;
}

function databaseUrl(url: string, name: string): string {
  const changed = new URL(url);
  changed.pathname = `/${name}`;
  return changed.href;
}

function roleUrl(url: string, role: string, password: string): string {
  const changed = new URL(url);
  changed.username = role;
  changed.password = password;
  return changed.href;
}

async function run(url: string, statements: readonly string[]): Promise<void> {
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  try {
    for (const statement of statements) await client.query(statement);
  } finally {
    await client.end();
  }
}
