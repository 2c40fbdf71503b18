import { sql } from "drizzle-orm";
import { appDatabase } from "../client";

/** Whether the database answers; rejects when it does not. */
export async function pingDatabase(): Promise<void> {
  await appDatabase().execute(sql`select 1`);
}
