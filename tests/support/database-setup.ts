import { randomBytes } from "node:crypto";
import pg from "pg";
import { migrateDatabase } from "@/db/migrate";

/** Makes a migrated template once for all database tests, and drops it at the end. A missing server fails; it never skips. */
export default async function setUpDatabases(): Promise<() => Promise<void>> {
  const adminUrl = process.env.TEST_DATABASE_ADMIN_URL;
  if (!adminUrl) throw new Error("TEST_DATABASE_ADMIN_URL is not set: start the tests with npm test.");
  const template = `saddlemark_template_${randomBytes(4).toString("hex")}`;
  const appPassword = randomBytes(16).toString("hex");
  const authPassword = randomBytes(16).toString("hex");
  await run(adminUrl, `create database ${template}`);
  const ownerUrl = new URL(adminUrl);
  ownerUrl.pathname = `/${template}`;
  await migrateDatabase({ ownerUrl: ownerUrl.href, appPassword, authPassword });
  Object.assign(process.env, { TEST_DATABASE_TEMPLATE: template, TEST_DATABASE_APP_PASSWORD: appPassword, TEST_DATABASE_AUTH_PASSWORD: authPassword });
  return () => run(adminUrl, `drop database if exists ${template} with (force)`);
}

async function run(url: string, statement: string): Promise<void> {
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  try {
    await client.query(statement);
  } finally {
    await client.end();
  }
}
