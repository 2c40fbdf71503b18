import { spawn, spawnSync } from "node:child_process";
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { createServer, type IncomingMessage, type Server } from "node:http";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { afterAll, beforeAll, expect, it } from "vitest";
import { operations } from "@/lib/api/contract";
import { packFolder } from "@/lib/bench-pack/bench-pack";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import type { StrategyId } from "@/lib/shared/strategy-ids";
import { makeBenchPack } from "@/lib/use-cases/bench-packs/make-bench-pack";
import { createKey } from "@/lib/use-cases/team/create-key";
import { actorOfAccount } from "../support/accounts";
import { createdCase, startApiWorld, type ApiWorld } from "../support/api";
import { petscEnvironment, singleProcess } from "../support/petsc/run-petsc";

// The user's program is a real PETSc program (tests/reference/bench-pack/program.py) on measured systems with a flux boundary, described in
// tests/reference/options/README.md: lowest-order Raviart-Thomas on 384 tetrahedra, uniform; the same order on 512 cubes, contrast 1e4.
const program = fileURLToPath(new URL("../reference/bench-pack/program.py", import.meta.url));
const uniform = { system: "tet4-RT1-un1-flux", answers: { discretisation: "rt", meshFamily: "tetrahedra", size: { by: "cells", value: 384 }, contrast: { ratio: 1, pattern: "constant" } } } as const;
const contrasted = { system: "hex8-NCF1-cb1e4-flux", answers: { discretisation: "rt-hex", meshFamily: "cubes", size: { by: "cells", value: 512 }, contrast: { ratio: 1e4, pattern: "blocks" } } } as const;

let world: ApiWorld;
let server: Server | undefined;
let address: string;
let key: string;
const place = mkdtempSync(join(tmpdir(), "saddlemark-bench-"));

beforeAll(async () => {
  world = await startApiWorld();
  key = (await createKey(await actorOfAccount("owner@example.org"), { name: "bench", scope: "write" })).key;
  const listening = createServer((request, response) => {
    void answer(request).then(({ status, text }) => response.writeHead(status, { "content-type": "application/json" }).end(text));
  });
  await new Promise<void>((resolve) => listening.listen(0, "127.0.0.1", resolve));
  const bound = listening.address();
  server = listening;
  address = `http://127.0.0.1:${typeof bound === "object" && bound !== null ? bound.port : 0}`;
});
afterAll(async () => {
  server?.close();
  rmSync(place, { recursive: true, force: true });
  await world.close();
});

/** Hands a request over the network to the API's own route handlers. */
async function answer(request: IncomingMessage) {
  const chunks: Buffer[] = [];
  for await (const chunk of request) chunks.push(Buffer.from(chunk));
  const passed = ["authorization", "content-type", "content-encoding", "idempotency-key"];
  const headers = Object.fromEntries(passed.flatMap((name) => (typeof request.headers[name] === "string" ? [[name, request.headers[name]]] : [])));
  return world.call(request.method ?? "GET", request.url ?? "/", { as: "nobody", rawBody: Buffer.concat(chunks), headers });
}

/** The pack of a new case's first three strategies on so many cores, unpacked by the system's tar. */
async function unpackedPack(answers: typeof uniform.answers | typeof contrasted.answers, cores: number): Promise<{ caseId: string; candidates: StrategyId[]; folder: string }> {
  const questionnaire = {
    ...defaultQuestionnaire,
    ...answers,
    degree: 1,
    boundary: "flux-everywhere",
    tolerance: 1e-6,
    hardware: { cores, nodes: 1, memoryPerNodeGiB: 8, timeLimitSeconds: null },
    available: ["parallel-direct", "amg", "block-splitting"],
  };
  const made = await world.expect(201, createdCase, "POST", "/api/v1/cases", { body: { questionnaire } });
  const candidates = made.advice.ranking.filter(({ status }) => status === "ranked").slice(0, 3).map(({ strategy }) => strategy);
  expect(candidates).toHaveLength(3);
  const { bytes, filename } = await makeBenchPack(await actorOfAccount("owner@example.org"), { caseRef: made.id, strategies: candidates });
  writeFileSync(join(place, filename), bytes);
  expect(spawnSync("tar", ["xzf", filename], { cwd: place }).status).toBe(0);
  return { caseId: made.id, candidates, folder: join(place, packFolder({ caseNumber: made.number })) };
}

function drive(folder: string, args: readonly string[], env: Record<string, string>): Promise<{ status: number | null; output: string }> {
  return new Promise((resolve) => {
    const child = spawn("sh", ["run.sh", ...args], { cwd: folder, env: { ...petscEnvironment(), SADDLEMARK_URL: address, ...env } });
    let output = "";
    child.stdout.on("data", (chunk: Buffer) => (output += chunk.toString()));
    child.stderr.on("data", (chunk: Buffer) => (output += chunk.toString()));
    child.on("close", (status) => resolve({ status, output }));
  });
}

const twoProcesses = { SADDLEMARK_LAUNCHER: "mpiexec -n 2 --oversubscribe" };

it.each([
  [1, uniform.system, uniform, { ...singleProcess, SADDLEMARK_LAUNCHER: "" }],
  [2, uniform.system, uniform, twoProcesses],
  [2, contrasted.system, contrasted, twoProcesses],
] as const)("a pack run on %i process(es) with %s brings every candidate's log back as a run, and the case into the hit rates", { timeout: 300_000 }, async (cores, _name, { system, answers }, env) => {
  const { caseId, candidates, folder } = await unpackedPack(answers, cores);
  const settings = { ...env, SADDLEMARK_PROGRAM: `/usr/bin/python3 '${program}' ${system}`, SADDLEMARK_KEY: key };
  const before = await world.expect(200, operations.hitRates.response.schema, "GET", "/api/v1/hit-rates");

  // The allocation ends after the first candidate; the second start goes on with the others.
  expect((await drive(folder, ["--only", candidates[0] ?? "none"], settings)).status).toBe(0);
  const rest = await drive(folder, [], settings);
  expect({ status: rest.status, logs: rest.status === 0 ? "" : logsIn(folder) }).toEqual({ status: 0, logs: "" });
  expect(rest.output).toContain(`${candidates[0]}: finished before`);

  const { runList } = await world.expect(200, operations.getCase.response.schema, "GET", `/api/v1/cases/${caseId}`);
  expect(runList.map(({ strategy, outcome, source, cores: on }) => ({ strategy, outcome, source, on }))).toEqual(
    candidates.map((strategy) => ({ strategy, outcome: "converged", source: "bench-pack", on: cores })),
  );
  for (const run of runList) {
    const { parsed } = await world.expect(200, operations.getRunLog.response.schema, "GET", `/api/v1/runs/${run.id}/log`);
    // What the log shows is what the pack asked for: its options reached the program. Inside guarding cycles it is not named.
    const guarded = parsed.preconditioner === "ksp";
    expect(parsed.strategy).toBe(guarded ? null : run.strategy);
    if (!guarded) expect(run.iterations).toBe(parsed.iterations);
    else expect(run.iterations).toBeNull();
    expect(parsed.unusedOptions).toEqual([]);
    expect(run.trueRelativeResidual).toBeLessThanOrEqual(1e-5);
    expect(run.solveSeconds).toBeGreaterThan(0);
  }

  // A third start has nothing left to do.
  await drive(folder, [], settings);
  const again = await world.expect(200, operations.getCase.response.schema, "GET", `/api/v1/cases/${caseId}`);
  expect(again.runList).toHaveLength(candidates.length);
  const after = await world.expect(200, operations.hitRates.response.schema, "GET", "/api/v1/hit-rates");
  expect(after.best.n).toBe(before.best.n + 1);
});

function logsIn(folder: string): string {
  const logs = readdirSync(join(folder, "logs")).filter((name) => name.endsWith(".log"));
  return logs.map((name) => `${name}\n${readFileSync(join(folder, "logs", name), "utf8").slice(-1500)}`).join("\n");
}
