import { spawn } from "node:child_process";
import { closeSync } from "node:fs";
import { openLog } from "./files.mjs";
import { PlainError } from "./plain-error.mjs";
import { signalGroup, signalQuietly } from "./processes.mjs";

/**
 * @typedef {object} Service
 * @property {string} name as a sentence names it: "web server"
 * @property {string} command
 * @property {string[]} args
 * @property {NodeJS.ProcessEnv} env
 * @property {string} cwd
 * @property {string | null} logFile null: straight to the terminal
 * @property {import("./processes.mjs").Account | null} [account]
 * @property {NodeJS.Signals} [stopSignal] default SIGTERM, to the whole group; another signal goes to the process alone
 * @property {NodeJS.Signals} [hurrySignal] default SIGKILL
 * @property {number} [graceMilliseconds] default 10 s
 *
 * @typedef {{ name: string, pid: number, command: string }} RunningService
 */

/**
 * Starts services, tells when one ends by itself, and stops them in the reverse order of their start.
 * @param {(error: PlainError) => void} onUnexpectedEnd
 */
export function createSupervisor(onUnexpectedEnd) {
  /** @type {{ service: Service, child: import("node:child_process").ChildProcess, ended: Promise<void> }[]} */
  const started = [];
  let stopping = false;
  let hurried = false;

  /** @param {Service} service */
  function start(service) {
    const output = service.logFile === null ? "inherit" : openLog(service.logFile);
    // A group of its own keeps Ctrl-C from reaching the service before its turn.
    const child = spawn(service.command, service.args, {
      cwd: service.cwd,
      env: service.env,
      detached: true,
      stdio: ["ignore", output, output],
      ...service.account,
    });
    if (typeof output === "number") closeSync(output);
    /** @type {Promise<void>} */
    const ended = new Promise((settle) => {
      child.once("error", (error) => settle(report(service, error.message)));
      child.once("exit", (code, signal) => settle(report(service, signal === null ? `code ${code}` : `signal ${signal}`)));
    });
    started.push({ service, child, ended });
    return child.pid;
  }

  /**
   * @param {Service} service
   * @param {string} how
   */
  function report(service, how) {
    if (stopping) return;
    const hint = service.logFile === null ? "" : `; see ${service.logFile}`;
    onUnexpectedEnd(new PlainError(`The ${service.name} ended unexpectedly (${how})${hint}.`));
  }

  async function stopAll() {
    stopping = true;
    for (const { service, child, ended } of [...started].reverse()) {
      const alive = () => child.exitCode === null && child.signalCode === null && child.pid !== undefined;
      if (alive()) send(service, child.pid, hurried ? (service.hurrySignal ?? "SIGKILL") : (service.stopSignal ?? "SIGTERM"));
      const timer = setTimeout(() => send(service, child.pid, service.hurrySignal ?? "SIGKILL"), service.graceMilliseconds ?? 10_000);
      if (alive()) await ended;
      clearTimeout(timer);
      // What a dead leader left of its group.
      if (service.stopSignal === undefined) signalGroup(child.pid, "SIGKILL");
    }
    started.length = 0;
  }

  /** Somebody lost patience: no grace for what still runs. */
  function hurry() {
    hurried = true;
    for (const { service, child } of started) {
      if (child.exitCode === null && child.signalCode === null) send(service, child.pid, service.hurrySignal ?? "SIGKILL");
    }
  }

  /** @returns {RunningService[]} */
  function list() {
    return started.flatMap(({ service, child }) =>
      child.pid === undefined ? [] : [{ name: service.name, pid: child.pid, command: [service.command, ...service.args].join(" ") }],
    );
  }

  return { start, stopAll, hurry, list };
}

/**
 * @param {Service} service
 * @param {number | undefined} pid
 * @param {NodeJS.Signals} name
 */
function send(service, pid, name) {
  if (pid === undefined) return;
  if (service.stopSignal === undefined) signalGroup(pid, name);
  else signalQuietly(pid, name);
}
