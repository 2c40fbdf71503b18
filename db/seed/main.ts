import { chmodSync, renameSync, writeFileSync } from "node:fs";
import pg from "pg";
import { seedDemonstration } from "./seed-demonstration";

/** Seeds an empty database with the demonstration; on any other it does nothing. The accounts' file is written before the data is committed. */
async function main(): Promise<void> {
  const { DATABASE_URL: connectionString, DEMO_ACCOUNTS_FILE: accountsFile } = process.env;
  if (!connectionString || !accountsFile) throw new Error("DATABASE_URL and DEMO_ACCOUNTS_FILE must be set.");
  const client = new pg.Client({ connectionString, application_name: "saddlemark-seed" });
  await client.connect();
  try {
    const { rows } = await client.query('select 1 from "user" union all select 1 from organization limit 1');
    if (rows.length > 0) return;
    const accounts = await seedDemonstration(client, new Date());
    const temporary = `${accountsFile}.new`;
    writeFileSync(temporary, `${JSON.stringify(accounts, null, 2)}\n`, { mode: 0o600 });
    chmodSync(temporary, 0o600);
    renameSync(temporary, accountsFile);
    process.stdout.write(`Seeded ${accounts.length} demonstration accounts in two invented teams.\n`);
  } finally {
    await client.end();
  }
}

main().catch((error: unknown) => {
  process.stderr.write(`Seeding failed: ${error instanceof Error ? error.message : String(error)}\n`);
  process.exitCode = 1;
});
