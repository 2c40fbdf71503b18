import { spawn, type ChildProcess } from "node:child_process";
import { chmodSync, existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { createServer, type Server } from "node:net";
import { afterAll, afterEach, beforeAll, expect, test } from "vitest";
import { readClusterRecord, writeClusterRecord } from "@/scripts/lib/cluster-folder.mjs";
import { endLeftovers } from "@/scripts/lib/cluster-server.mjs";
import { prepareDataFolder } from "@/scripts/lib/data-folder.mjs";
import { startDatabase } from "@/scripts/lib/database.mjs";
import { databaseAccount } from "@/scripts/lib/postgres-binaries.mjs";
import { findInCluster, isAlive, signalQuietly, waitUntilGone } from "@/scripts/lib/processes.mjs";
import { ensureSecrets } from "@/scripts/lib/secrets.mjs";
import { withClient } from "@/scripts/lib/sql.mjs";
import { createSupervisor } from "@/scripts/lib/supervisor.mjs";

let home = "";
let supervisor = createSupervisor(() => undefined);
const others: (ChildProcess | Server)[] = [];

beforeAll(async () => {
  home = mkdtempSync(join(tmpdir(), "saddlemark-recovery-"));
  chmodSync(home, 0o711); // the database's account passes through
  const ownerUrl = await start();
  await withClient(ownerUrl, (client) => client.query("create table kept (number integer primary key)"));
  await supervisor.stopAll();
});

afterEach(async () => {
  await supervisor.stopAll();
  for (const other of others.splice(0)) {
    if ("kill" in other) other.kill("SIGKILL");
    else other.close();
  }
});

afterAll(async () => {
  await endLeftovers(clusterFolder());
  rmSync(home, { recursive: true, force: true });
});

const dataFolder = () => prepareDataFolder(join(home, "data"));

/** A start by a program of its own, whose earlier self may have been killed. */
async function start(): Promise<string> {
  supervisor = createSupervisor(() => undefined);
  const paths = dataFolder();
  const { ownerUrl } = await startDatabase({ paths, secrets: ensureSecrets(paths), startService: supervisor.start, say: () => undefined });
  return ownerUrl;
}

function clusterFolder(): string {
  const record = readClusterRecord(dataFolder());
  if (record === null) throw new Error("The cluster was not made.");
  return record.folder;
}

const postmaster = () => Number.parseInt(readFileSync(join(clusterFolder(), "postmaster.pid"), "utf8"), 10);

async function commit(ownerUrl: string, number: number): Promise<void> {
  await withClient(ownerUrl, (client) => client.query("insert into kept values ($1)", [number]));
}

async function kept(ownerUrl: string): Promise<number[]> {
  const { rows } = await withClient(ownerUrl, (client) => client.query("select number from kept order by number"));
  return rows.map((row) => row.number);
}

async function forget(ownerUrl: string): Promise<void> {
  await withClient(ownerUrl, (client) => client.query("truncate kept"));
}

test("committed rows survive a kill -9 of the database server", async () => {
  const before = await start();
  await commit(before, 1);
  const server = postmaster();
  process.kill(server, "SIGKILL");
  expect(await waitUntilGone([server], 5_000)).toBe(true);
  const after = await start();
  expect(await kept(after)).toEqual([1]);
  await forget(after);
});

test("committed rows survive a kill -9 of every process of the database at once", async () => {
  await commit(await start(), 2);
  const processes = findInCluster(clusterFolder());
  expect(processes.length).toBeGreaterThan(3);
  for (const pid of processes) signalQuietly(pid, "SIGKILL");
  expect(await waitUntilGone(processes, 5_000)).toBe(true);
  const after = await start();
  expect(await kept(after)).toEqual([2]);
  await forget(after);
});

test("a server that outlived its killed start is ended in order and replaced", async () => {
  const before = await start();
  await commit(before, 3);
  const server = postmaster();
  // What a killed start leaves: the server runs, and nobody of this start knows it.
  const after = await start();
  expect(isAlive(server)).toBe(false);
  expect(postmaster()).not.toBe(server);
  expect(await kept(after)).toEqual([3]);
  await forget(after);
});

test("a stale postmaster.pid that names somebody else's process of the same account neither stops the start nor costs that process its life", async () => {
  const account = databaseAccount();
  const bystander = spawn("sleep", ["600"], { ...account, cwd: "/", stdio: "ignore" });
  others.push(bystander);
  const server = await start().then(postmaster);
  process.kill(server, "SIGKILL");
  await waitUntilGone(findInCluster(clusterFolder()), 10_000);
  const file = join(clusterFolder(), "postmaster.pid");
  const lines = readFileSync(file, "utf8").split("\n");
  writeFileSync(file, [String(bystander.pid), ...lines.slice(1)].join("\n"));
  await expect(start()).resolves.toMatch(/^postgres:/);
  expect(isAlive(bystander.pid ?? 0)).toBe(true);
});

test("a remembered port that somebody took meanwhile is exchanged for a free one", async () => {
  const record = readClusterRecord(dataFolder());
  if (record === null) throw new Error("The cluster was not made.");
  const other = createServer();
  await new Promise<void>((settle) => other.listen(record.port, "127.0.0.1", settle));
  others.push(other);
  const url = new URL(await start());
  expect(Number(url.port)).not.toBe(record.port);
  expect(readClusterRecord(dataFolder())?.port).toBe(Number(url.port));
});

test("the server listens on 127.0.0.1 alone, wants a password, and does not run as root", async () => {
  const url = new URL(await start());
  const settings = await withClient(url.href, (client) =>
    client.query("select name, setting from pg_settings where name in ('listen_addresses', 'unix_socket_directories', 'password_encryption', 'TimeZone') order by name collate \"C\""),
  );
  expect(settings.rows.map((row) => `${row.name}=${row.setting}`)).toEqual([
    "TimeZone=UTC",
    "listen_addresses=127.0.0.1",
    "password_encryption=scram-sha-256",
    "unix_socket_directories=",
  ]);
  url.password = "wrong";
  await expect(withClient(url.href, (client) => client.query("select 1"))).rejects.toThrow("password authentication failed");
  expect(readFileSync(`/proc/${postmaster()}/status`, "utf8")).not.toMatch(/^Uid:\t0\t/m);
});

test("a cluster of another major version is refused and left as it was", async () => {
  const file = join(clusterFolder(), "PG_VERSION");
  const version = readFileSync(file, "utf8");
  writeFileSync(file, "99\n");
  await expect(start()).rejects.toThrow("The database was made by PostgreSQL 99");
  expect(existsSync(join(clusterFolder(), "postmaster.pid"))).toBe(false);
  writeFileSync(file, version);
  await expect(start()).resolves.toMatch(/^postgres:/);
});

test("a half-made cluster of a killed first start is thrown away and made anew", async () => {
  const paths = prepareDataFolder(join(home, "half"));
  const secrets = ensureSecrets(paths);
  writeClusterRecord(paths, { folder: paths.postgres, port: readClusterRecord(dataFolder())?.port ?? 0, made: false });
  const half = `${paths.postgres}.new`;
  const interrupted = createSupervisor(() => undefined);
  try {
    writeFileSync(half, "half");
    const { ownerUrl } = await startDatabase({ paths, secrets, startService: interrupted.start, say: () => undefined });
    expect(ownerUrl).toMatch(/^postgres:/);
    expect(existsSync(half)).toBe(false);
  } finally {
    await interrupted.stopAll();
  }
});
