import { spawn } from "node:child_process";
import { existsSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { runApplication } from "./application.mjs";
import { prepareDataFolder } from "./data-folder.mjs";
import { startDatabase } from "./database.mjs";
import { installDebianPackages } from "./debian-packages.mjs";
import { signalGroup } from "./processes.mjs";
import { projectRoot } from "./root.mjs";
import { ensureSecrets } from "./secrets.mjs";
import { createSupervisor } from "./supervisor.mjs";
import { countCheck, countPlaywright, countVitest, readReport, sumCounts } from "./test-report.mjs";

const chromium = "/usr/bin/chromium";

/**
 * @typedef {object} TestRun
 * @property {string} folder the run's throw-away folder
 * @property {AbortSignal} signal
 * @property {(reason: Error) => void} abort
 * @property {(line: string) => void} say
 */

/**
 * Type check, lint and unit tests.
 * @param {TestRun} run
 */
export async function runUnitPart(run) {
  await ensureSolverPackages(run);
  const typesOk =
    (await runTool(run, ["node_modules/next/dist/bin/next", "typegen"])) &&
    (await runTool(run, ["node_modules/typescript/bin/tsc", "--noEmit"]));
  const lintOk = await runTool(run, ["node_modules/eslint/bin/eslint.js", ".", "--max-warnings", "0"]);
  return sumCounts([countCheck(typesOk, "The type check"), countCheck(lintOk, "The lint"), await runVitest(run, "unit", {})]);
}

/**
 * Database tests, on a cluster made for them.
 * @param {TestRun} run
 */
export async function runDatabasePart(run) {
  await ensureSolverPackages(run);
  const paths = prepareDataFolder(join(run.folder, "database"));
  const supervisor = createSupervisor(run.abort);
  try {
    const { ownerUrl } = await startDatabase({
      paths,
      secrets: ensureSecrets(paths),
      startService: supervisor.start,
      durable: false,
      signal: run.signal,
      say: run.say,
    });
    return await runVitest(run, "database", { TEST_DATABASE_ADMIN_URL: ownerUrl });
  } finally {
    await supervisor.stopAll();
  }
}

/**
 * Browser tests, against the built application as people start it.
 * @param {TestRun} run
 */
export async function runBrowserPart(run) {
  const { folder, signal, say } = run;
  if (!existsSync(chromium)) {
    await installDebianPackages({ names: ["chromium"], purpose: "Chromium", logFile: join(folder, "apt.log"), signal, say });
  }
  const dataFolder = join(folder, "application");
  const application = await runApplication({ dataFolder, logFile: join(folder, "start.log"), signal }).catch((error) => {
    showLogs(join(dataFolder, "logs"), say);
    throw error;
  });
  try {
    const report = join(folder, "playwright.json");
    const env = {
      PLAYWRIGHT_JSON_OUTPUT_FILE: report,
      SADDLEMARK_BASE_URL: application.baseUrl,
      SADDLEMARK_DATA_DIR: application.paths.root,
      DEMO_ACCOUNTS_FILE: application.paths.demoAccounts,
      OUTBOX_DIR: application.paths.outbox,
    };
    const exitedWell = await runTool(run, ["node_modules/@playwright/test/cli.js", "test", "--reporter=line,json"], env);
    const count = countPlaywright(readReport(report), { name: "The browser tests", exitedWell });
    if (count.failed > 0) showLogs(application.paths.logs, say);
    return count;
  } finally {
    await application.stop();
  }
}

/**
 * The ends of the application's logs, which go with the throw-away folder.
 * @param {string} folder
 * @param {(line: string) => void} say
 */
function showLogs(folder, say) {
  for (const name of ["migrate.log", "seed.log", "build.log", "worker.log", "web.log"]) {
    const path = join(folder, name);
    if (!existsSync(path)) continue;
    say(`\n--- end of ${name}`);
    say(readFileSync(path, "utf8").trimEnd().split("\n").slice(-30).join("\n"));
  }
}

/**
 * @param {TestRun} run
 * @param {"unit" | "database"} project
 * @param {NodeJS.ProcessEnv} env
 */
async function runVitest(run, project, env) {
  const report = join(run.folder, `${project}.json`);
  const args = ["node_modules/vitest/vitest.mjs", "run", "--project", project, "--reporter=default", "--reporter=json", `--outputFile.json=${report}`];
  const exitedWell = await runTool(run, args, env);
  return countVitest(readReport(report), { name: `The ${project} tests`, exitedWell });
}

/**
 * Runs one of node_modules' programs with its output on the terminal.
 * @param {TestRun} run
 * @param {string[]} args
 * @param {NodeJS.ProcessEnv} [env]
 * @returns {Promise<boolean>} whether it ended well
 */
async function runTool({ signal, say }, args, env = {}) {
  signal.throwIfAborted();
  say(`\n> ${args.join(" ").replace(/node_modules\/\S*\/(\S+)/, "$1")}`);
  const child = spawn(process.execPath, args, {
    cwd: projectRoot,
    env: { ...environmentForTools(), ...env },
    detached: true,
    stdio: ["ignore", "inherit", "inherit"],
  });
  const end = () => signalGroup(child.pid, "SIGKILL");
  signal.addEventListener("abort", end);
  try {
    const code = await new Promise((settle) => {
      child.once("error", () => settle(1));
      child.once("exit", settle);
    });
    signal.throwIfAborted();
    return code === 0;
  } finally {
    signal.removeEventListener("abort", end);
  }
}

/** Without the outer servers: tests run on their own. */
function environmentForTools() {
  const outer = Object.entries(process.env).filter(([name]) => !/^(DATABASE_URL.*|TEST_DATABASE_.*|SMTP_URL|NODE_ENV|npm_.*|NODE_OPTIONS)$/.test(name));
  return { ...Object.fromEntries(outer), NEXT_TELEMETRY_DISABLED: "1" };
}

/** Debian's packages that reference tests run against: PETSc with its Python interface, MPI, and the shell checker. */
const solverPackages = [
  { name: "python3-petsc4py", file: "/usr/share/doc/python3-petsc4py" },
  { name: "openmpi-bin", file: "/usr/bin/mpiexec" },
  { name: "shellcheck", file: "/usr/bin/shellcheck" },
];

/** @param {TestRun} run */
async function ensureSolverPackages({ folder, signal, say }) {
  const names = solverPackages.filter(({ file }) => !existsSync(file)).map(({ name }) => name);
  if (names.length === 0) return;
  await installDebianPackages({ names, purpose: "The solver libraries of the reference tests", logFile: join(folder, "apt-solvers.log"), signal, say });
}
