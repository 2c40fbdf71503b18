import { spawnSync } from "node:child_process";
import { existsSync, readdirSync } from "node:fs";
import { join } from "node:path";
import { installDebianPackages } from "./debian-packages.mjs";
import { PlainError } from "./plain-error.mjs";

const debianFolder = "/usr/lib/postgresql";

/** @typedef {{ folder: string, major: number }} Binaries */

/**
 * PostgreSQL's server programs: those of a given major version, or the newest.
 * @param {number | null} major
 * @returns {Binaries | null}
 */
export function findPostgresBinaries(major) {
  const folders = existsSync(debianFolder) ? readdirSync(debianFolder).map((name) => join(debianFolder, name, "bin")) : [];
  const named = spawnSync("pg_config", ["--bindir"], { encoding: "utf8" });
  if (named.status === 0) folders.push(named.stdout.trim());
  const found = folders.flatMap((folder) => {
    const version = serverMajor(folder);
    return version === null || (major !== null && version !== major) ? [] : [{ folder, major: version }];
  });
  return found.sort((one, other) => other.major - one.major)[0] ?? null;
}

/**
 * Finds PostgreSQL, or installs Debian's.
 * @param {{ major: number | null, logFile: string, signal?: AbortSignal, say: (line: string) => void }} options
 * @returns {Promise<Binaries>}
 */
export async function ensurePostgresBinaries({ major, logFile, signal, say }) {
  const present = findPostgresBinaries(major);
  if (present !== null) return present;
  const other = findPostgresBinaries(null);
  if (major !== null && other !== null) {
    throw new PlainError(
      `The database was made by PostgreSQL ${major}, this machine has ${other.major}; install PostgreSQL ${major} (apt-get install postgresql-${major}) or choose another folder with --data.`,
    );
  }
  await installDebianPackages({ names: ["postgresql"], purpose: "PostgreSQL", logFile, signal, say });
  const installed = findPostgresBinaries(major);
  if (installed === null) throw new PlainError(`PostgreSQL${major === null ? "" : ` ${major}`} was not found under ${debianFolder} after its installation.`);
  return installed;
}

/** @param {string} folder */
function serverMajor(folder) {
  if (!["initdb", "postgres"].every((name) => existsSync(join(folder, name)))) return null;
  const { status, stdout } = spawnSync(join(folder, "postgres"), ["--version"], { encoding: "utf8" });
  const major = status === 0 ? Number(/\(PostgreSQL\) (\d+)/.exec(stdout)?.[1]) : Number.NaN;
  return Number.isInteger(major) ? major : null;
}

/**
 * The account that the server runs as when root starts it (PostgreSQL refuses to run as root), or null for everybody else.
 * @returns {import("./processes.mjs").Account | null}
 */
export function databaseAccount() {
  if (process.getuid?.() !== 0) return null;
  const [uid, gid] = ["-u", "-g"].map((flag) => spawnSync("id", [flag, "postgres"], { encoding: "utf8" }).stdout.trim());
  if (!uid || !gid) throw new PlainError("PostgreSQL does not run as root and this machine has no account named postgres; run: adduser --system --group postgres");
  return { uid: Number(uid), gid: Number(gid) };
}
