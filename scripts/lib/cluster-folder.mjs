import { spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { chownSync, existsSync, mkdirSync, readFileSync, realpathSync, renameSync, rmSync, writeFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { makeFolder, readJsonObject, requireFreeSpace, syncFolder, writeFileDurably } from "./files.mjs";
import { PlainError } from "./plain-error.mjs";
import { findFreePort } from "./ports.mjs";
import { runStep } from "./processes.mjs";

export const ownerRole = "saddlemark_owner";
const emptyClusterBytes = 256 * 2 ** 20;

/** @typedef {{ folder: string, port: number, made: boolean }} ClusterRecord */

/**
 * What the data folder remembers of its cluster; a relative folder moves with the data folder.
 * @param {import("./data-folder.mjs").DataPaths} paths
 * @returns {ClusterRecord | null}
 */
export function readClusterRecord(paths) {
  const found = readJsonObject(paths.cluster);
  if (found === null) return null;
  const { folder, port, made } = found;
  if (typeof folder !== "string" || typeof port !== "number" || typeof made !== "boolean") {
    throw new PlainError(`${paths.cluster} is damaged. Restore it from a backup.`);
  }
  return { folder: folder === "postgres" ? paths.postgres : folder, port, made };
}

/**
 * @param {import("./data-folder.mjs").DataPaths} paths
 * @param {ClusterRecord} record
 */
export function writeClusterRecord(paths, record) {
  const folder = record.folder === paths.postgres ? "postgres" : record.folder;
  writeFileDurably(paths.cluster, `${JSON.stringify({ ...record, folder }, null, 2)}\n`);
}

/**
 * The major version of an existing cluster of ours, or null when none has been made yet; refuses foreign and lost ones.
 * @param {import("./data-folder.mjs").DataPaths} paths
 * @returns {number | null}
 */
export function checkCluster(paths) {
  const record = readClusterRecord(paths);
  if (record === null) {
    if (existsSync(paths.postgres)) throw new PlainError(`${paths.postgres} was not made by Saddlemark; move it away or choose another folder with --data.`);
    return null;
  }
  if (!existsSync(record.folder)) {
    if (record.made) throw new PlainError(`The database folder ${record.folder} is gone; put it back, or choose another folder with --data.`);
    return null;
  }
  const file = join(record.folder, "PG_VERSION");
  const text = existsSync(file) ? readFileSync(file, "utf8").trim() : "";
  if (!/^\d+$/.test(text)) throw new PlainError(`${record.folder} is not a PostgreSQL cluster that Saddlemark can use (PG_VERSION is ${text === "" ? "missing" : `"${text}"`}).`);
  return Number(text);
}

/**
 * Makes the cluster unless it exists. It is made beside its place and renamed, so that a half-made one is never started.
 * @param {{ paths: import("./data-folder.mjs").DataPaths, binaries: import("./postgres-binaries.mjs").Binaries,
 *   account: import("./processes.mjs").Account | null, password: string, logFile: string, signal?: AbortSignal }} options
 * @returns {Promise<ClusterRecord>}
 */
export async function ensureCluster({ paths, binaries, account, password, logFile, signal }) {
  let record = readClusterRecord(paths);
  if (record === null) {
    record = { folder: chooseFolder(paths, account), port: await findFreePort(), made: false };
    writeClusterRecord(paths, record);
  }
  if (!existsSync(record.folder)) {
    await makeCluster({ folder: record.folder, binaries, account, password, logFile, signal });
  }
  if (!record.made) writeClusterRecord(paths, { ...record, made: true });
  return { ...record, folder: realpathSync(record.folder), made: true };
}

/**
 * @param {{ folder: string, binaries: import("./postgres-binaries.mjs").Binaries,
 *   account: import("./processes.mjs").Account | null, password: string, logFile: string, signal?: AbortSignal }} options
 */
async function makeCluster({ folder, binaries, account, password, logFile, signal }) {
  const fresh = `${folder}.new`;
  const passwordFile = `${folder}.password`;
  makeFolder(dirname(folder), 0o711);
  requireFreeSpace(dirname(folder), emptyClusterBytes);
  rmSync(fresh, { recursive: true, force: true });
  try {
    mkdirSync(fresh, { mode: 0o700 });
    rmSync(passwordFile, { force: true });
    writeFileSync(passwordFile, password, { mode: 0o600, flag: "wx" });
    if (account !== null) for (const path of [fresh, passwordFile]) chownSync(path, account.uid, account.gid);
    await runStep({
      title: "Making the database",
      command: join(binaries.folder, "initdb"),
      args: [
        ...["-D", fresh, "--username", ownerRole, `--pwfile=${passwordFile}`, "--auth=scram-sha-256", "--encoding=UTF8"],
        ...["--locale=C.UTF-8", "--data-checksums", "--no-instructions"],
      ],
      cwd: "/",
      env: { PATH: process.env.PATH, LC_ALL: "C.UTF-8", TZ: "UTC" },
      account,
      logFile,
      signal,
    });
    renameSync(fresh, folder);
    syncFolder(dirname(folder));
  } finally {
    rmSync(passwordFile, { force: true });
    rmSync(fresh, { recursive: true, force: true });
  }
}

/**
 * The folder for the cluster: in the data folder, or under /var/lib when the database's account cannot get there
 * (a checkout in root's home).
 * @param {import("./data-folder.mjs").DataPaths} paths
 * @param {import("./processes.mjs").Account | null} account
 */
function chooseFolder(paths, account) {
  if (account === null || canReach(paths.root, account)) return paths.postgres;
  const hash = createHash("sha256").update(paths.root).digest("hex").slice(0, 12);
  for (let number = 1; ; number += 1) {
    // An earlier data folder at the same path may have left its cluster; that one is not ours to touch.
    const folder = `/var/lib/saddlemark-${hash}${number === 1 ? "" : `-${number}`}`;
    if (!existsSync(folder)) return join(folder, "postgres");
  }
}

/**
 * @param {string} folder
 * @param {import("./processes.mjs").Account} account
 */
function canReach(folder, account) {
  return spawnSync("test", ["-x", folder], { ...account, cwd: "/" }).status === 0;
}
