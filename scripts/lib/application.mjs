import { spawn } from "node:child_process";
import { closeSync } from "node:fs";
import { join } from "node:path";
import { dataPaths } from "./data-folder.mjs";
import { openLog, tellingLine } from "./files.mjs";
import { PlainError } from "./plain-error.mjs";
import { findFreePort } from "./ports.mjs";
import { projectRoot } from "./root.mjs";
import { waitForHealth } from "./waiting.mjs";

/**
 * The whole application by the same program that people start, on a data folder of its own and a free port:
 * for browser tests and for measuring.
 * @param {{ dataFolder: string, logFile: string, signal: AbortSignal }} options
 * @returns {Promise<{ baseUrl: string, paths: import("./data-folder.mjs").DataPaths, stop: () => Promise<void> }>}
 */
export async function runApplication({ dataFolder, logFile, signal }) {
  const port = await findFreePort();
  const log = openLog(logFile);
  const child = spawn(process.execPath, [join(projectRoot, "scripts", "start.mjs"), "--port", String(port), "--data", dataFolder], {
    cwd: projectRoot,
    env: environmentWithoutServers(process.env),
    detached: true,
    stdio: ["ignore", log, log],
  });
  closeSync(log);
  const died = new AbortController();
  /** @type {Promise<void>} */
  const ended = new Promise((settle) => {
    child.once("error", () => settle());
    child.once("exit", () => settle());
  });
  void ended.then(() => died.abort(new PlainError(`The application did not start: ${tellingLine(logFile)} (log: ${logFile})`)));
  const stop = async () => {
    child.kill("SIGTERM");
    await ended;
  };
  const baseUrl = `http://127.0.0.1:${port}`;
  try {
    await waitForHealth({ url: `${baseUrl}/api/health`, signal: AbortSignal.any([signal, died.signal]), limitMilliseconds: 600_000 });
  } catch (error) {
    await stop();
    throw error;
  }
  return { baseUrl, paths: dataPaths(dataFolder), stop };
}

/**
 * A run of its own: neither the outer database nor the outer mail server, and not a child of npm's.
 * @param {NodeJS.ProcessEnv} outer
 */
function environmentWithoutServers(outer) {
  return Object.fromEntries(Object.entries(outer).filter(([name]) => !/^(DATABASE_URL|SMTP_URL|SADDLEMARK_BASE_URL|npm_lifecycle_.*)$/.test(name)));
}
