import { spawn } from "node:child_process";
import { closeSync } from "node:fs";
import { join } from "node:path";
import { parseClusterArguments } from "./lib/arguments.mjs";
import { readClusterRecord } from "./lib/cluster-folder.mjs";
import { endLeftovers } from "./lib/cluster-server.mjs";
import { checkDataFolder, dataPaths, prepareDataFolder } from "./lib/data-folder.mjs";
import { startDatabase } from "./lib/database.mjs";
import { openLog } from "./lib/files.mjs";
import { ensureNpmPackages } from "./lib/npm-packages.mjs";
import { PlainError, runMain } from "./lib/plain-error.mjs";
import { projectRoot } from "./lib/root.mjs";
import { takeDataFolder } from "./lib/run-file.mjs";
import { ensureSecrets } from "./lib/secrets.mjs";

await runMain(async () => {
  const { verb, dataFolder } = parseClusterArguments(process.argv.slice(2), process.cwd());
  await (verb === "up" ? up(dataFolder) : down(dataFolder));
});
process.exit();

/**
 * Starts the database of a data folder, prints its owner's URL and leaves it running.
 * @param {string} dataFolder
 */
async function up(dataFolder) {
  const paths = prepareDataFolder(dataFolder);
  await locked(paths, async () => {
    const say = (/** @type {string} */ line) => void process.stderr.write(`${line}\n`);
    await ensureNpmPackages({ root: projectRoot, logFile: join(paths.logs, "npm.log"), say });
    const { ownerUrl } = await startDatabase({ paths, secrets: ensureSecrets(paths), startService: startDetached, say });
    process.stdout.write(`${ownerUrl}\n`);
  });
}

/** @param {string} dataFolder */
async function down(dataFolder) {
  checkDataFolder(dataFolder);
  const paths = dataPaths(dataFolder);
  const record = readClusterRecord(paths);
  if (record === null) throw new PlainError(`${dataFolder} has no database.`);
  await locked(paths, async () => endLeftovers(record.folder));
}

/**
 * @param {import("./lib/data-folder.mjs").DataPaths} paths
 * @param {() => Promise<void>} work
 */
async function locked(paths, work) {
  const release = await takeDataFolder(paths);
  try {
    await work();
  } finally {
    release();
  }
}

/** @param {import("./lib/supervisor.mjs").Service} service */
function startDetached({ command, args, env, cwd, logFile, account }) {
  const output = openLog(logFile ?? "/dev/null");
  const child = spawn(command, args, { cwd, env, detached: true, stdio: ["ignore", output, output], ...account });
  child.on("error", () => undefined);
  child.unref();
  closeSync(output);
  return child.pid;
}
