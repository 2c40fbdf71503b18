import { rmSync } from "node:fs";
import { readJsonObject, writeFileDurably } from "./files.mjs";
import { PlainError } from "./plain-error.mjs";
import { findByEnvironment, signalQuietly, waitUntilGone } from "./processes.mjs";

/**
 * Records what runs on a data folder, for people and for the next start.
 * @param {string} path
 * @param {{ address: string, services: import("./supervisor.mjs").RunningService[] }} run
 */
export function writeRunFile(path, { address, services }) {
  writeFileDurably(path, `${JSON.stringify({ pid: process.pid, address, services }, null, 2)}\n`);
}

/** @param {string} path */
export function removeRunFile(path) {
  rmSync(path, { force: true });
}

/**
 * The line for a data folder that another start holds.
 * @param {string} path
 * @param {string} folder
 */
export function describeHolder(path, folder) {
  const run = readJsonObject(path);
  const where = typeof run?.address === "string" && typeof run.pid === "number" ? ` at ${run.address} (process ${run.pid})` : "";
  return new PlainError(`Saddlemark already runs on ${folder}${where}; stop it first or choose another folder with --data.`);
}

/**
 * Ends what a killed start left behind: the processes that carry this data folder's secret run token, and no other.
 * @param {string} runToken
 */
export async function endOrphans(runToken) {
  for (const [name, limitMilliseconds] of /** @type {const} */ ([["SIGTERM", 8_000], ["SIGKILL", 5_000]])) {
    const orphans = findByEnvironment("SADDLEMARK_RUN_TOKEN", runToken);
    for (const pid of orphans) signalQuietly(pid, name);
    if (await waitUntilGone(orphans, limitMilliseconds)) return;
  }
  throw new PlainError("Processes of an earlier start cannot be ended; restart the machine or end them by hand.");
}
