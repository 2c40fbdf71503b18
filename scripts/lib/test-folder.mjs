import { existsSync, mkdtempSync, readdirSync, realpathSync, rmSync, chmodSync } from "node:fs";
import { tmpdir } from "node:os";
import { dirname, join } from "node:path";
import { readClusterRecord } from "./cluster-folder.mjs";
import { endLeftovers } from "./cluster-server.mjs";
import { dataPaths } from "./data-folder.mjs";
import { readJsonObject } from "./files.mjs";
import { takeLock } from "./lock.mjs";
import { endOrphans } from "./run-file.mjs";
import { readSecrets } from "./secrets.mjs";

const prefix = "saddlemark-test-";

/**
 * A throw-away folder for one test run; those of earlier runs that were killed are cleared away with their servers.
 * @returns {Promise<{ folder: string, discard: () => Promise<void> }>}
 */
export async function makeTestFolder() {
  const home = realpathSync(tmpdir());
  for (const name of readdirSync(home)) {
    if (!name.startsWith(prefix)) continue;
    const folder = join(home, name);
    const release = await takeLock(join(folder, "lock")).catch(() => null);
    if (release === null) continue;
    await clearAway(folder);
    release();
  }
  const folder = mkdtempSync(join(home, prefix));
  chmodSync(folder, 0o711); // the database's account passes through
  const release = await takeLock(join(folder, "lock"));
  return {
    folder,
    discard: async () => {
      await clearAway(folder);
      release?.();
    },
  };
}

/** @param {string} folder */
async function clearAway(folder) {
  for (const name of readdirSync(folder)) await clearDataFolder(dataPaths(join(folder, name)));
  rmSync(folder, { recursive: true, force: true });
}

/** @param {import("./data-folder.mjs").DataPaths} paths */
async function clearDataFolder(paths) {
  if (!existsSync(paths.marker)) return;
  if (readJsonObject(paths.secrets) !== null) await endOrphans(readSecrets(paths.secrets).runToken);
  const record = readClusterRecord(paths);
  if (record === null) return;
  await endLeftovers(record.folder);
  // Under /var/lib, where the data folder was out of the account's reach.
  if (record.folder !== paths.postgres) rmSync(dirname(record.folder), { recursive: true, force: true });
}
