import { closeSync, existsSync, fsyncSync, openSync, readdirSync, realpathSync, rmSync, statSync, writeSync } from "node:fs";
import { join } from "node:path";
import { makeFolder, readJsonObject, requireFreeSpace, writeFileDurably } from "./files.mjs";
import { PlainError } from "./plain-error.mjs";

const format = 1;
const leastFreeBytes = 96 * 2 ** 20;

/**
 * Where everything lies in a data folder.
 * @param {string} root
 */
export function dataPaths(root) {
  return {
    root,
    marker: join(root, "saddlemark.json"),
    secrets: join(root, "secrets.json"),
    cluster: join(root, "cluster.json"),
    run: join(root, "run.json"),
    lock: join(root, "start.lock"),
    logs: join(root, "logs"),
    outbox: join(root, "outbox"),
    demoAccounts: join(root, "demo-accounts.json"),
    postgres: join(root, "postgres"),
  };
}

/** @typedef {ReturnType<typeof dataPaths>} DataPaths */

/**
 * Makes or recognises a data folder and proves that it can be written; refuses one that is not ours.
 * @param {string} folder
 * @returns {DataPaths} with the real path as root
 */
export function prepareDataFolder(folder) {
  checkDataFolder(folder);
  // Only root lets others through (not see): the database runs under another account then.
  const mode = process.getuid?.() === 0 ? 0o711 : 0o700;
  makeFolder(folder, mode);
  const paths = dataPaths(realpathSync(folder));
  if (!existsSync(paths.marker)) writeMarker(paths, {});
  probeWriting(paths);
  requireFreeSpace(paths.root, leastFreeBytes);
  for (const inner of [paths.logs, paths.outbox]) makeFolder(inner, 0o700);
  return paths;
}

/**
 * Refuses a folder that Saddlemark did not make; changes nothing.
 * @param {string} folder
 */
export function checkDataFolder(folder) {
  if (!existsSync(folder)) return;
  if (!statSync(folder).isDirectory()) throw new PlainError(`${folder} is not a folder; choose one with --data.`);
  const paths = dataPaths(folder);
  const marker = readJsonObject(paths.marker);
  if (marker === null) {
    if (existsSync(join(folder, "PG_VERSION"))) {
      throw new PlainError(`${folder} is a PostgreSQL cluster that Saddlemark did not make; choose another folder with --data.`);
    }
    // A start that was killed while it wrote the marker leaves this one file.
    if (readdirSync(folder).every((name) => name === "saddlemark.json.new")) return;
    throw new PlainError(`${folder} is not empty and Saddlemark did not make it; choose another folder with --data.`);
  }
  if (typeof marker.format !== "number" || marker.format > format) {
    throw new PlainError(`${folder} was made by a newer Saddlemark; start that version on it or choose another folder with --data.`);
  }
}

/**
 * What the folder was first used for, or null before its first complete start.
 * @param {DataPaths} paths
 * @returns {"demonstration" | "real" | null}
 */
export function readPurpose(paths) {
  const purpose = readJsonObject(paths.marker)?.purpose;
  return purpose === "demonstration" || purpose === "real" ? purpose : null;
}

/**
 * @param {DataPaths} paths
 * @param {"demonstration" | "real"} purpose
 */
export function recordPurpose(paths, purpose) {
  if (readPurpose(paths) === null) writeMarker(paths, { purpose });
}

/**
 * @param {DataPaths} paths
 * @param {{ purpose?: string }} content
 */
function writeMarker(paths, content) {
  writeFileDurably(paths.marker, `${JSON.stringify({ madeBy: "saddlemark", format, ...content }, null, 2)}\n`);
}

/** @param {DataPaths} paths */
function probeWriting(paths) {
  const path = join(paths.root, ".probe");
  const file = openSync(path, "w", 0o600);
  try {
    writeSync(file, Buffer.alloc(2 ** 16, 1));
    fsyncSync(file);
  } finally {
    closeSync(file);
    rmSync(path, { force: true });
  }
}
