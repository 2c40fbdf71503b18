import { spawn } from "node:child_process";
import { closeSync, readdirSync, readFileSync, readlinkSync, statSync } from "node:fs";
import { basename } from "node:path";
import { setTimeout as delay } from "node:timers/promises";
import { openLog, pickTellingLine } from "./files.mjs";
import { PlainError } from "./plain-error.mjs";

/** A step that ended with a failure; `output` is what it wrote. */
export class StepFailed extends PlainError {
  name = "StepFailed";
  /**
   * @param {string} message
   * @param {string} output
   */
  constructor(message, output) {
    super(message);
    this.output = output;
  }
}

/**
 * @typedef {{ uid: number, gid: number }} Account
 * @typedef {object} Step
 * @property {string} title for the failure's line: "The build"
 * @property {string} command
 * @property {string[]} args
 * @property {string} logFile
 * @property {string} [cwd]
 * @property {NodeJS.ProcessEnv} [env]
 * @property {Account | null} [account] the account to run as, when started by root
 * @property {AbortSignal} [signal]
 */

/**
 * Runs a program to its end with its output in a log file; throws StepFailed with the telling line.
 * It has a process group of its own, so that an abort ends its children too.
 * @param {Step} step
 */
export async function runStep({ title, command, args, logFile, cwd, env, account, signal }) {
  signal?.throwIfAborted();
  const log = openLog(logFile);
  const offset = statSync(logFile).size;
  const child = spawn(command, args, { cwd, env, detached: true, stdio: ["ignore", log, log], ...account });
  const end = () => signalGroup(child.pid, "SIGTERM");
  signal?.addEventListener("abort", end);
  try {
    const code = await new Promise((settle, fail) => {
      child.once("error", fail);
      child.once("exit", (status, signalName) => settle(status ?? signalName));
    });
    signal?.throwIfAborted();
    if (code === 0) return;
    const output = readFileSync(logFile).subarray(offset).toString("utf8");
    throw new StepFailed(`${title} failed: ${pickTellingLine(output)} (whole output: ${logFile})`, output);
  } finally {
    closeSync(log);
    signal?.removeEventListener("abort", end);
  }
}

/**
 * @param {number | undefined} pid leader of the group
 * @param {NodeJS.Signals} name
 */
export function signalGroup(pid, name) {
  if (pid !== undefined) signalQuietly(-pid, name);
}

/**
 * Signals a process that may have ended meanwhile.
 * @param {number} pid
 * @param {NodeJS.Signals} name
 */
export function signalQuietly(pid, name) {
  try {
    process.kill(pid, name);
  } catch (error) {
    if (!(error instanceof Error && "code" in error && error.code === "ESRCH")) throw error;
  }
}

/** @param {number} pid */
export function isAlive(pid) {
  // A zombie still has its folder in /proc but runs nothing.
  const status = readProcess(pid, "stat");
  return status !== "" && !/\) [ZX] /.test(status);
}

/**
 * Processes whose environment holds `name=value`; reads only what this account may see.
 * @param {string} name
 * @param {string} value a secret that nobody else can know makes the match proof of origin
 * @returns {number[]}
 */
export function findByEnvironment(name, value) {
  const wanted = `${name}=${value}`;
  return allProcesses().filter((pid) => pid !== process.pid && isAlive(pid) && readProcess(pid, "environ").split("\0").includes(wanted));
}

/**
 * The PostgreSQL processes that work in a cluster's folder: the server changes into it, and all its children stay there.
 * @param {string} folder real path
 * @returns {number[]}
 */
export function findInCluster(folder) {
  return allProcesses().filter(
    (pid) => readProcessLink(pid, "cwd") === folder && basename(readProcessLink(pid, "exe").replace(/ \(deleted\)$/, "")) === "postgres" && isAlive(pid),
  );
}

/**
 * Waits until none of the processes lives.
 * @param {number[]} pids
 * @param {number} limitMilliseconds
 * @returns {Promise<boolean>} whether all have ended
 */
export async function waitUntilGone(pids, limitMilliseconds) {
  const deadline = Date.now() + limitMilliseconds;
  while (pids.some(isAlive)) {
    if (Date.now() > deadline) return false;
    await delay(25);
  }
  return true;
}

function allProcesses() {
  return readdirSync("/proc").filter((name) => /^\d+$/.test(name)).map(Number);
}

/**
 * @param {number} pid
 * @param {string} file
 */
function readProcess(pid, file) {
  try {
    return readFileSync(`/proc/${pid}/${file}`, "utf8");
  } catch {
    return ""; // ended meanwhile, or another account's
  }
}

/**
 * @param {number} pid
 * @param {string} name
 */
function readProcessLink(pid, name) {
  try {
    return readlinkSync(`/proc/${pid}/${name}`);
  } catch {
    return "";
  }
}

