import { existsSync, renameSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { parseBackupArguments } from "./lib/arguments.mjs";
import { checkCluster, readClusterRecord } from "./lib/cluster-folder.mjs";
import { ownerUrlOf } from "./lib/cluster-server.mjs";
import { checkDataFolder, dataPaths } from "./lib/data-folder.mjs";
import { describeError, PlainError, runMain } from "./lib/plain-error.mjs";
import { findPostgresBinaries } from "./lib/postgres-binaries.mjs";
import { isPortFree } from "./lib/ports.mjs";
import { runStep } from "./lib/processes.mjs";
import { readSecrets } from "./lib/secrets.mjs";
import { checkDatabaseUrl } from "./lib/sql.mjs";

await runMain(async () => {
  const { file, dataFolder } = parseBackupArguments(process.argv.slice(2), process.cwd());
  if (existsSync(file)) throw new PlainError(`${file} exists already; name a file that does not.`);
  const { url, major } = await findDatabase(dataFolder);
  await dump(url, major, file);
  process.stdout.write(`Written: ${file} (restore it with pg_restore)\n`);
});
process.exit();

/**
 * @param {string} dataFolder
 * @returns {Promise<{ url: string, major: number | null }>}
 */
async function findDatabase(dataFolder) {
  const given = process.env.DATABASE_URL;
  if (given) {
    checkDatabaseUrl(given);
    return { url: given, major: null };
  }
  checkDataFolder(dataFolder);
  const paths = dataPaths(dataFolder);
  const record = readClusterRecord(paths);
  if (record === null) throw new PlainError(`${dataFolder} has no database; name its folder with --data.`);
  const major = checkCluster(paths);
  if (await isPortFree(record.port)) throw new PlainError(`The database of ${dataFolder} is not running; run npm start first.`);
  return { url: ownerUrlOf(record.port, readSecrets(paths.secrets).ownerPassword, "saddlemark"), major };
}

/**
 * Writes the dump beside its place first, so that a broken one never bears the name.
 * @param {string} url
 * @param {number | null} major
 * @param {string} file
 */
async function dump(url, major, file) {
  const binaries = findPostgresBinaries(major);
  if (binaries === null) throw new PlainError("PostgreSQL's pg_dump is missing; run: sudo apt-get install postgresql");
  const target = new URL(url);
  const password = decodeURIComponent(target.password);
  target.password = "";
  process.umask(0o077); // the dump holds password hashes
  const fresh = `${file}.new`;
  const logFile = join(tmpdir(), `saddlemark-backup-${process.pid}.log`);
  try {
    await runStep({
      title: "The backup",
      command: join(binaries.folder, "pg_dump"),
      // The password goes by the environment: arguments can be seen by everybody on the machine.
      args: ["--format=custom", "--no-password", `--file=${fresh}`, target.href],
      env: { ...process.env, PGPASSWORD: password },
      logFile,
    });
    renameSync(fresh, file);
  } catch (error) {
    throw new PlainError(describeError(error).replace(` (whole output: ${logFile})`, ""));
  } finally {
    rmSync(fresh, { force: true });
    rmSync(logFile, { force: true });
  }
}
