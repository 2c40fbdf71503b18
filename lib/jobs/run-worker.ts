import { sql } from "drizzle-orm";
import PgBoss from "pg-boss";
import { authDatabase } from "@/db/client";
import { jobSchemaName } from "./definitions";
import { handleJob, jobNames } from "./handlers";
import { requeueInterrupted } from "./requeue-interrupted";

type Log = (line: string) => void;

/**
 * Works on the queue until stopped; waits for a database that is not up yet, and goes on after one that was restarted.
 * Stopping lets running jobs finish for ten seconds; what is cut off is tried again by the next worker.
 */
export async function runWorker(options: { connectionString: string; log: Log; signal: AbortSignal }): Promise<{ stop: () => Promise<void> }> {
  await waitForDatabase(options);
  const boss = new PgBoss({
    connectionString: options.connectionString,
    application_name: "saddlemark-worker",
    schema: jobSchemaName,
    max: 4,
    migrate: false,
    schedule: false,
    supervise: true,
    maintenanceIntervalSeconds: 60,
    deleteAfterDays: 7,
  });
  boss.on("error", (error) => options.log(`queue: ${error.message}`));
  await boss.start();
  await requeueInterrupted();
  for (const name of jobNames) {
    await boss.work(name, { batchSize: 1, pollingIntervalSeconds: 1 }, async (jobs) => {
      for (const job of jobs) await runJob(name, job, options.log);
    });
  }
  return { stop: () => boss.stop({ graceful: true, wait: true, timeout: 10_000 }) };
}

async function runJob(name: (typeof jobNames)[number], job: PgBoss.Job<unknown>, log: Log): Promise<void> {
  try {
    await handleJob(name, job.data);
    log(`${name} ${job.id}: done`);
  } catch (error) {
    // The payload stays out of the log: it may hold a reset link.
    log(`${name} ${job.id}: ${error instanceof Error ? error.message : "failed"}`);
    throw error;
  }
}

async function waitForDatabase({ log, signal }: { log: Log; signal: AbortSignal }): Promise<void> {
  for (let pauseMilliseconds = 250; !signal.aborted; pauseMilliseconds = Math.min(pauseMilliseconds * 2, 10_000)) {
    try {
      await authDatabase().execute(sql`select 1`);
      return;
    } catch (error) {
      log(`database: ${error instanceof Error ? error.message : "unreachable"}`);
      await new Promise((resolve) => setTimeout(resolve, pauseMilliseconds));
    }
  }
}
