import { spawn, type ChildProcess } from "node:child_process";
import { once } from "node:events";
import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { createServer } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { takeLock } from "@/scripts/lib/lock.mjs";
import { findFreePort, isPortFree, requireFreePort } from "@/scripts/lib/ports.mjs";
import { isAlive, runStep, StepFailed, waitUntilGone } from "@/scripts/lib/processes.mjs";
import { endOrphans } from "@/scripts/lib/run-file.mjs";
import { createSupervisor } from "@/scripts/lib/supervisor.mjs";

let home = "";
beforeAll(() => {
  home = mkdtempSync(join(tmpdir(), "saddlemark-unit-"));
});
afterAll(() => {
  rmSync(home, { recursive: true, force: true });
});

function pidOf(child: ChildProcess): number {
  if (child.pid === undefined) throw new Error("The child did not start.");
  return child.pid;
}

test("a taken port is named with the way out, a free one passes", async () => {
  const server = createServer().listen(0, "127.0.0.1");
  await once(server, "listening");
  const address = server.address();
  const port = typeof address === "object" && address !== null ? address.port : 0;
  expect(await isPortFree(port)).toBe(false);
  await expect(requireFreePort(port)).rejects.toThrow(`Port ${port} on 127.0.0.1 is taken; stop what listens there or choose another with --port.`);
  server.close();
  await once(server, "close");
  await expect(requireFreePort(await findFreePort())).resolves.toBeUndefined();
});

describe("a lock", () => {
  test("is held by one at a time and free again after its release", async () => {
    const file = join(home, "lock");
    const release = await takeLock(file);
    expect(release).not.toBe(null);
    expect(await takeLock(file)).toBe(null);
    const waiting = takeLock(file, { wait: true });
    release?.();
    (await waiting)?.();
  });

  test("does not outlive a holder that was killed", async () => {
    const file = join(home, "killed");
    const program = `import { takeLock } from "./scripts/lib/lock.mjs"; await takeLock(${JSON.stringify(file)}); console.log("held"); setInterval(() => {}, 1000);`;
    const holder = spawn(process.execPath, ["--input-type=module", "-e", program], { stdio: ["ignore", "pipe", "inherit"] });
    await once(holder.stdout, "data");
    expect(await takeLock(file)).toBe(null);
    holder.kill("SIGKILL");
    const release = await takeLock(file, { wait: true });
    expect(release).not.toBe(null);
    release?.();
  });
});

describe("orphans of a killed start", () => {
  test("are ended by their run token, and nobody else is", async () => {
    const idle = ["-e", "process.on('SIGTERM', () => process.exit()); console.log('up'); setInterval(() => {}, 1000)"];
    const start = (token: string) => spawn(process.execPath, idle, { env: { ...process.env, SADDLEMARK_RUN_TOKEN: token }, stdio: ["ignore", "pipe", "ignore"] });
    const ours = start("token-of-this-folder");
    const others = start("token-of-another-folder");
    await Promise.all([once(ours.stdout, "data"), once(others.stdout, "data")]);
    await endOrphans("token-of-this-folder");
    expect(isAlive(pidOf(ours))).toBe(false);
    expect(isAlive(pidOf(others))).toBe(true);
    others.kill("SIGKILL");
    expect(await waitUntilGone([pidOf(others)], 5_000)).toBe(true);
  });
});

describe("the supervisor", () => {
  const service = (name: string, program: string) => ({
    name,
    command: process.execPath,
    args: ["-e", program],
    env: process.env,
    cwd: home,
    logFile: join(home, "order.log"),
  });
  const orderly = (name: string) => `process.on("SIGTERM", () => { console.log("end of ${name}"); process.exit(); }); console.log("${name}"); setInterval(() => {}, 1000)`;
  const logged = async (text: string) => {
    while (!readFileSync(join(home, "order.log"), "utf8").includes(text)) await new Promise((resolve) => setImmediate(resolve));
  };

  test("stops services in the reverse order of their start", async () => {
    const supervisor = createSupervisor((error) => {
      throw error;
    });
    for (const name of ["first", "second", "third"]) {
      supervisor.start(service(name, orderly(name)));
      await logged(name);
    }
    await supervisor.stopAll();
    const lines = readFileSync(join(home, "order.log"), "utf8").trim().split("\n");
    expect(lines.slice(3)).toEqual(["end of third", "end of second", "end of first"]);
  });

  test("tells in one line which service ended by itself", async () => {
    const line = await new Promise<string>((settle) => {
      createSupervisor((error) => settle(error.message)).start(service("worker", "process.exit(3)"));
    });
    expect(line).toBe(`The worker ended unexpectedly (code 3); see ${join(home, "order.log")}.`);
  });

  test("ends a service that does not listen", async () => {
    const supervisor = createSupervisor(() => undefined);
    const pid = supervisor.start({ ...service("deaf", `process.on("SIGTERM", () => {}); console.log("deaf"); setInterval(() => {}, 1000)`), graceMilliseconds: 200 });
    await logged("deaf");
    await supervisor.stopAll();
    expect(isAlive(pid ?? 0)).toBe(false);
  });
});

test("a failed step tells the line that explains it and keeps the whole output", async () => {
  const logFile = join(home, "step.log");
  const program = "console.log('begin'); console.error('FATAL: could not write: No space left on device'); console.log('cleaning up'); process.exit(2)";
  const failure = runStep({ title: "Making the database", command: process.execPath, args: ["-e", program], logFile });
  await expect(failure).rejects.toThrow(StepFailed);
  await expect(failure).rejects.toThrow(`Making the database failed: FATAL: could not write: No space left on device (whole output: ${logFile})`);
});
