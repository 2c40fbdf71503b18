import { sql } from "drizzle-orm";
import { authDatabase } from "@/db/client";
import { jobSchemaName, type JobName } from "./definitions";

/** Long work that begins anew when its worker was cut off; doing it twice at once does no harm. */
const restartable: readonly JobName[] = ["run-replay", "search-proposals"];

/**
 * Gives back to the queue what a killed worker had taken, at once instead of when its time runs out. Called as a worker starts. Where a second
 * worker is busy with such a job, it is done twice, and the first result is kept.
 */
export async function requeueInterrupted(): Promise<void> {
  const table = sql.raw(`${jobSchemaName}.job`);
  await authDatabase().execute(sql`update ${table} set state = 'retry', start_after = now() where state = 'active' and name = any(${sql.param([...restartable])}::text[])`);
}
