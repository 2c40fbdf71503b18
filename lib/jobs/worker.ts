import { closeDatabases } from "@/db/client";
import { closeTransport } from "@/lib/email/transport";
import { runWorker } from "./run-worker";

const log = (line: string) => console.log(`${new Date().toISOString()} ${line}`);

async function main(): Promise<void> {
  const connectionString = process.env.DATABASE_URL_AUTH;
  if (!connectionString) throw new Error("DATABASE_URL_AUTH is not set.");
  const ending = new AbortController();
  const ended = new Promise<void>((resolve) => {
    const end = () => {
      ending.abort();
      resolve();
    };
    process.once("SIGTERM", end);
    process.once("SIGINT", end);
  });
  // pg-boss does not wait for its own notes about finished jobs: when the database goes away just then, that is no reason to end.
  process.on("unhandledRejection", (reason) => log(`queue: ${reason instanceof Error ? reason.message : "a note was lost"}`));
  const worker = await Promise.race([runWorker({ connectionString, log, signal: ending.signal }), ended]);
  log("worker: ready");
  await ended;
  if (worker) await worker.stop();
  closeTransport();
  await closeDatabases();
  log("worker: stopped");
  process.exit(0);
}

main().catch((error: unknown) => {
  console.error(error instanceof Error ? error.message : error);
  process.exit(1);
});
