import { createHash } from "node:crypto";
import { existsSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { readJsonObject } from "./files.mjs";
import { PlainError } from "./plain-error.mjs";
import { runStep, StepFailed } from "./processes.mjs";

/**
 * Installs exactly what package-lock.json names, unless that is what node_modules holds already.
 * @param {{ root: string, logFile: string, env?: NodeJS.ProcessEnv, signal?: AbortSignal, say: (line: string) => void }} options
 */
export async function ensureNpmPackages({ root, logFile, env = process.env, signal, say }) {
  const stamp = join(root, "node_modules", ".saddlemark-lock");
  const lock = createHash("sha256").update(readFileSync(join(root, "package-lock.json"))).digest("hex");
  if (existsSync(stamp) && readFileSync(stamp, "utf8") === lock) return;
  if (!holdsLockedPackages(root)) {
    say("Installing the npm packages (a minute or two)");
    await install({ root, logFile, env, signal });
  }
  writeFileSync(stamp, lock);
}

/**
 * Whether npm's own record of node_modules names the versions of package-lock.json.
 * @param {string} root
 */
export function holdsLockedPackages(root) {
  const wanted = packagesOf(join(root, "package-lock.json"));
  const found = packagesOf(join(root, "node_modules", ".package-lock.json"));
  return Object.entries(wanted).every(([path, entry]) => {
    if (path === "") return true;
    // npm leaves out optional packages for other machines.
    if (found[path] === undefined) return entry.optional === true || entry.devOptional === true || entry.peer === true;
    return found[path].version === entry.version;
  }) && Object.keys(found).length > 0;
}

/**
 * @param {string} path
 * @returns {Record<string, { version?: string, optional?: boolean, devOptional?: boolean, peer?: boolean }>}
 */
function packagesOf(path) {
  const packages = readJsonObject(path)?.packages;
  return typeof packages === "object" && packages !== null ? { ...packages } : {};
}

/** @param {{ root: string, logFile: string, env: NodeJS.ProcessEnv, signal?: AbortSignal }} options */
async function install({ root, logFile, env, signal }) {
  // Development packages too, whatever NODE_ENV says: the build needs them.
  const args = ["ci", "--include=dev", "--no-fund", "--no-audit", "--fetch-retry-mintimeout=2000", "--fetch-retry-maxtimeout=10000"];
  try {
    await runStep({ title: "npm ci", command: "npm", args, cwd: root, env: environmentForNpm(env), logFile, signal });
  } catch (error) {
    if (!(error instanceof StepFailed)) throw error;
    throw explainNpmFailure(error, logFile);
  }
}

/**
 * Without what would leave out the packages that the build needs.
 * @param {NodeJS.ProcessEnv} outer
 */
function environmentForNpm(outer) {
  return Object.fromEntries(Object.entries(outer).filter(([name]) => name !== "NODE_ENV" && name !== "npm_config_omit"));
}

/**
 * @param {StepFailed} failure
 * @param {string} logFile
 */
export function explainNpmFailure(failure, logFile) {
  const { output } = failure;
  if (/\b(ENOSPC|EDQUOT)\b/.test(output)) return new PlainError("npm ci failed: the disk of the project is full. Free about 1 GB and start again.");
  if (/\bEROFS\b/.test(output)) return new PlainError("npm ci failed: the project lies on a read-only disk.");
  if (/\b(ENOTFOUND|EAI_AGAIN|ECONNREFUSED|ECONNRESET|ETIMEDOUT|ENETUNREACH|EHOSTUNREACH|ERR_SOCKET_TIMEOUT)\b/.test(output)) {
    return new PlainError(`npm ci failed: the npm registry cannot be reached. Connect this machine to the network and start again (whole output: ${logFile}).`);
  }
  return failure;
}
