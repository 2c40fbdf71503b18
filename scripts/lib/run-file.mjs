import { rmSync } from "node:fs";
import { setTimeout as delay } from "node:timers/promises";
import { readJsonObject, writeFileDurably } from "./files.mjs";
import { takeLock } from "./lock.mjs";
import { PlainError } from "./plain-error.mjs";
import { findByEnvironment, signalQuietly, waitUntilGone } from "./processes.mjs";

/**
 * Records what runs on a data folder, for people and for the next start.
 * @param {string} path
 * @param {{ address: string, services: import("./supervisor.mjs").RunningService[], stopping?: boolean }} run
 */
export function writeRunFile(path, { address, services, stopping = false }) {
  writeFileDurably(path, `${JSON.stringify({ pid: process.pid, address, stopping, services }, null, 2)}\n`);
}

/** @param {string} path */
export function removeRunFile(path) {
  rmSync(path, { force: true });
}

/**
 * Takes a data folder for this start; an earlier one that is about to end is waited for.
 * @param {import("./data-folder.mjs").DataPaths} paths
 * @returns {Promise<() => void>} how to release it
 */
export async function takeDataFolder(paths) {
  const patience = { held: Date.now() + 1_500, stopping: Date.now() + 60_000 };
  for (;;) {
    const release = await takeLock(paths.lock);
    if (release !== null) return release;
    const stopping = readJsonObject(paths.run)?.stopping === true;
    if (Date.now() > (stopping ? patience.stopping : patience.held)) throw describeHolder(paths.run, paths.root);
    await delay(100);
  }
}

/**
 * The line for a data folder that another start holds.
 * @param {string} path
 * @param {string} folder
 */
function describeHolder(path, folder) {
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
