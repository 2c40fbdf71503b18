import { PlainError } from "./plain-error.mjs";
import { setTimeout as delay } from "node:timers/promises";
import { runStep, StepFailed } from "./processes.mjs";

const lockWaits = 5;

/**
 * Installs Debian packages as root; for anybody else names the command to run.
 * @param {{ names: string[], purpose: string, logFile: string, signal?: AbortSignal, say: (line: string) => void }} options
 */
export async function installDebianPackages({ names, purpose, logFile, signal, say }) {
  if (process.getuid?.() !== 0) {
    throw new PlainError(`${purpose} is missing; run: sudo apt-get install ${names.join(" ")}`);
  }
  say(`Installing Debian's ${names.join(", ")}`);
  const install = ["install", "--yes", "--no-install-recommends", ...names];
  try {
    await apt(install, logFile, signal);
  } catch (error) {
    if (!(error instanceof StepFailed)) throw error;
    // The package lists may be missing or old.
    try {
      await apt(["update"], logFile, signal);
      await apt(install, logFile, signal);
    } catch (second) {
      throw second instanceof StepFailed ? explainAptFailure(second, names, logFile) : second;
    }
  }
}

/**
 * @param {string[]} args
 * @param {string} logFile
 * @param {AbortSignal | undefined} signal
 */
async function apt(args, logFile, signal) {
  const env = { ...process.env, DEBIAN_FRONTEND: "noninteractive", LC_ALL: "C" };
  for (let attempt = 1; ; attempt += 1) {
    try {
      await runStep({ title: "apt-get", command: "apt-get", args: ["-o", "DPkg::Lock::Timeout=300", ...args], env, logFile, signal });
      return;
    } catch (error) {
      if (error instanceof Error && "code" in error && error.code === "ENOENT") {
        throw new PlainError(`This machine has no apt-get; install PostgreSQL by its own means and start again.`);
      }
      // The lock on the lists knows no timeout.
      const locked = error instanceof StepFailed && /could not get lock|unable to (acquire|lock)/i.test(error.output);
      if (!locked || attempt === lockWaits) throw error;
      await delay(5_000, undefined, { signal });
    }
  }
}

/**
 * @param {StepFailed} failure
 * @param {string[]} names
 * @param {string} logFile
 */
export function explainAptFailure(failure, names, logFile) {
  const { output } = failure;
  const what = `apt-get install ${names.join(" ")} failed`;
  if (/no space left|(n't have|not) enough free (disk )?space/i.test(output)) return new PlainError(`${what}: the system disk is full.`);
  if (/read-only file system/i.test(output)) return new PlainError(`${what}: the system disk is read-only.`);
  if (/could not get lock|unable to (acquire|lock)/i.test(output)) return new PlainError(`${what}: another package installation is running. Start again when it has ended.`);
  if (/(temporary failure|could not) resol|could not connect|network is unreachable|connection (failed|timed out|refused)|failed to fetch|unable to locate/i.test(output)) {
    return new PlainError(`${what}: Debian's package server cannot be reached. Connect this machine to the network and start again (whole output: ${logFile}).`);
  }
  return failure;
}
