import { randomBytes } from "node:crypto";
import pg from "pg";
import { migrateDatabase } from "@/db/migrate";

/**
 * Makes a migrated template database once per run on the server of TEST_DATABASE_ADMIN_URL; the test files clone it.
 * Returns the teardown, which drops the template and every clone a killed test left behind.
 */
export default async function setUp(): Promise<() => Promise<void>> {
  const adminUrl = process.env.TEST_DATABASE_ADMIN_URL;
  if (!adminUrl) {
    throw new Error(
      "TEST_DATABASE_ADMIN_URL is not set. Run npm test -- --only database, or start a server with node scripts/cluster.mjs up --data DIR and set the variable to the URL it prints.",
    );
  }
  const prefix = `test_${randomBytes(6).toString("hex")}`;
  const template = `${prefix}_template`;
  const passwords = { app: randomBytes(18).toString("base64url"), auth: randomBytes(18).toString("base64url") };
  await withAdmin(adminUrl, (client) => client.query(`create database ${template}`));
  const ownerUrl = new URL(adminUrl);
  ownerUrl.pathname = `/${template}`;
  await migrateDatabase({ ownerUrl: ownerUrl.href, appPassword: passwords.app, authPassword: passwords.auth });
  // The workers inherit these.
  process.env.TEST_DATABASE_PREFIX = prefix;
  process.env.TEST_DATABASE_APP_PASSWORD = passwords.app;
  process.env.TEST_DATABASE_AUTH_PASSWORD = passwords.auth;
  return () => withAdmin(adminUrl, (client) => dropAll(client, prefix));
}

async function dropAll(client: pg.Client, prefix: string): Promise<void> {
  const { rows } = await client.query<{ name: string }>("select datname as name from pg_database where starts_with(datname, $1)", [prefix]);
  for (const { name } of rows) await client.query(`drop database if exists ${client.escapeIdentifier(name)} with (force)`);
}

async function withAdmin(url: string, work: (client: pg.Client) => Promise<unknown>): Promise<void> {
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  try {
    await work(client);
  } finally {
    await client.end();
  }
}
