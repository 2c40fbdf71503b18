import { randomBytes } from "node:crypto";
import pg from "pg";
import { z } from "zod";

export type TestDatabase = { ownerUrl: string; appUrl: string; authUrl: string; drop: () => Promise<void> };

const environmentSchema = z.object({
  TEST_DATABASE_ADMIN_URL: z.string().min(1),
  TEST_DATABASE_TEMPLATE: z.string().min(1),
  TEST_DATABASE_APP_PASSWORD: z.string().min(1),
  TEST_DATABASE_AUTH_PASSWORD: z.string().min(1),
});

/** A database of its own for one test file, cloned from the migrated template. */
export async function createTestDatabase(): Promise<TestDatabase> {
  const environment = environmentSchema.parse(process.env);
  const adminUrl = environment.TEST_DATABASE_ADMIN_URL;
  const name = `saddlemark_test_${randomBytes(6).toString("hex")}`;
  await run(adminUrl, `create database ${name} template ${environment.TEST_DATABASE_TEMPLATE}`);
  // Privileges on the database itself are not cloned.
  await run(adminUrl, `revoke create, temporary on database ${name} from public`);
  const urlOf = (user?: string, password?: string) => {
    const url = new URL(adminUrl);
    url.pathname = `/${name}`;
    if (user !== undefined && password !== undefined) Object.assign(url, { username: user, password });
    return url.href;
  };
  return {
    ownerUrl: urlOf(),
    appUrl: urlOf("saddlemark_app", environment.TEST_DATABASE_APP_PASSWORD),
    authUrl: urlOf("saddlemark_auth", environment.TEST_DATABASE_AUTH_PASSWORD),
    drop: () => run(adminUrl, `drop database if exists ${name} with (force)`),
  };
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
