import { join } from "node:path";
import { checkCluster, ensureCluster } from "./cluster-folder.mjs";
import { describeServer, endLeftovers, logSize, ownerUrlOf, waitForServer } from "./cluster-server.mjs";
import { databaseAccount, ensurePostgresBinaries } from "./postgres-binaries.mjs";
import { ensureDatabase } from "./sql.mjs";

const databaseName = "saddlemark";

/**
 * Makes the data folder's cluster when needed, starts its server and makes sure that the database exists.
 * @param {{ paths: import("./data-folder.mjs").DataPaths, secrets: import("./secrets.mjs").Secrets,
 *   startService: (service: import("./supervisor.mjs").Service) => number | undefined, durable?: boolean,
 *   signal?: AbortSignal, say: (line: string) => void }} options
 * @returns {Promise<{ ownerUrl: string, pid: number | undefined }>}
 */
export async function startDatabase({ paths, secrets, startService, durable, signal, say }) {
  const major = checkCluster(paths);
  const binaries = await ensurePostgresBinaries({ major, logFile: join(paths.logs, "apt.log"), signal, say });
  const account = databaseAccount();
  if (major === null) say("Making the database");
  const record = await ensureCluster({
    paths,
    binaries,
    account,
    password: secrets.ownerPassword,
    logFile: join(paths.logs, "initdb.log"),
    signal,
  });
  await endLeftovers(record.folder);
  const { service, port, logFile } = await describeServer({ paths, binaries, account, durable });
  const logOffset = logSize(logFile);
  const pid = startService(service);
  const anyUrl = ownerUrlOf(port, secrets.ownerPassword, "postgres");
  await waitForServer({ url: anyUrl, pid, logFile, logOffset, signal });
  await ensureDatabase(anyUrl, databaseName);
  return { ownerUrl: ownerUrlOf(port, secrets.ownerPassword, databaseName), pid };
}
