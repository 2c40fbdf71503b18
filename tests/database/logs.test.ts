import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { gzipSync } from "node:zlib";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { operations } from "@/lib/api/contract";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import { createdCase, startApiWorld, type ApiWorld, type CallOptions } from "../support/api";
import { genuineLogs } from "../unit/logs/genuine-logs";

let world: ApiWorld;
let path: string;

const read = operations.readLog.response.schema;
const runDetail = operations.getRun.response.schema;
const plain = { "content-type": "text/plain" };
const logFile = (name: string) => readFileSync(fileURLToPath(new URL(`../reference/logs/${name}`, import.meta.url)));
const minres = "s2_minres_tet8-RT1_cb1e4_np1.log";

beforeAll(async () => {
  world = await startApiWorld();
  const made = await world.expect(201, createdCase, "POST", "/api/v1/cases", { body: { questionnaire: defaultQuestionnaire } });
  path = `/api/v1/cases/${made.id}/logs`;
});
afterAll(() => world.close());

const send = (rawBody: NonNullable<CallOptions["rawBody"]>, query = "", headers: Record<string, string> = {}) => world.call("POST", `${path}${query}`, { rawBody, headers: { ...plain, ...headers } });

async function count(table: string): Promise<number> {
  const { rows } = await world.owner.query<{ n: number }>(`select count(*)::int as n from ${table}`);
  return rows[0]?.n ?? -1;
}

async function runOf(runId: string | null) {
  return world.expect(200, runDetail, "GET", `/api/v1/runs/${runId ?? "none"}`);
}

describe("a genuine log", () => {
  // Figures of the same configurations in the reference runs, kept there by the libraries' interfaces (see tests/unit/logs/genuine-logs).
  const named = genuineLogs.filter(({ parsed }) => parsed.strategy != null && parsed.outcome != null);
  it.each(named.map((log) => [log.file, log] as const))("%s is recorded with the figures of the run that wrote it", async (file, log) => {
    const answer = await send(logFile(file));
    expect(answer.status).toBe(201);
    const { parsed, runId } = read.parse(answer.json());
    expect(parsed).toMatchObject(log.parsed);
    const run = await runOf(runId);
    const { strategy, outcome, setupSeconds, solveSeconds, peakMemoryGiB } = parsed;
    expect(run).toMatchObject({ strategy, outcome, setupSeconds, solveSeconds, peakMemoryGiB, source: "log", hasLog: true });
    if (log.record.iterations !== undefined) expect(run.iterations).toBe(log.record.iterations);
    if (log.record.trueResidual !== undefined) expect(run.trueRelativeResidual).toBeCloseTo(log.record.trueResidual, Math.ceil(-Math.log10(log.record.trueResidual)) + 3);
    if (log.record.ranks !== undefined) expect(run.cores).toBe(log.record.ranks);
  });

  it("is kept with its residual history, and found under the run", async () => {
    const { runId } = read.parse((await send(logFile(minres), "?fileName=night.log")).json());
    const kept = await world.expect(200, operations.getRunLog.response.schema, "GET", `/api/v1/runs/${runId ?? ""}/log`);
    expect(kept.fileName).toBe("night.log");
    expect(kept.bytes).toBe(logFile(minres).length);
    // 39 iterations: 40 residuals with the first.
    expect(kept.parsed.residualHistory).toHaveLength(40);
    expect(kept.parsed.residualHistory.at(-1)).toMatchObject({ iteration: 39, monitored: 5.610617497435e-8, true: 2.065158434572e-8 });
  });

  it("is read the same when it comes gzipped, with or without saying so", async () => {
    const plainly = read.parse((await send(logFile(minres), "?record=false")).json());
    const announced = await send(gzipSync(logFile(minres)), "?record=false", { "content-encoding": "gzip" });
    const unsaid = await send(gzipSync(logFile(minres)), "?record=false", { "content-type": "application/octet-stream" });
    expect(read.parse(announced.json())).toEqual(plainly);
    expect(read.parse(unsaid.json())).toEqual(plainly);
  });

  it("of a failed run is recorded as one, with the finding that explains it", async () => {
    const answer = read.parse((await send(logFile("s1_direct_failed_workspace_tet8-RT1_cb1e4_np1.log"))).json());
    expect(answer.findings.map(({ id }) => id)).toContain("workspace-too-small");
    const run = await runOf(answer.runId);
    expect(run).toMatchObject({ outcome: "broken", solveSeconds: null, trueRelativeResidual: null });
    expect(run.findings.map(({ id }) => id)).toContain("workspace-too-small");
  });
});

describe("without recording", () => {
  it("record=false reads and changes nothing", async () => {
    const before = [await count("run"), await count("run_log"), await count("audit")];
    const answer = await send(logFile(minres), "?record=false");
    expect(answer.status).toBe(200);
    expect(read.parse(answer.json())).toMatchObject({ runId: null, parsed: { strategy: "schur-diag-direct", iterations: 39 } });
    expect([await count("run"), await count("run_log"), await count("audit")]).toEqual(before);
  });

  it("text that no solver wrote gives null everywhere and no run", async () => {
    const answer = await send("The quick brown fox\nhas no residual of 1e-7\n");
    expect(answer.status).toBe(200);
    const { parsed, findings, runId } = read.parse(answer.json());
    expect({ runId, findings }).toEqual({ runId: null, findings: [] });
    const { strategy, outcome, iterations, processes, setupSeconds, solveSeconds, peakMemoryGiB, trueRelativeResidual } = parsed;
    expect([strategy, outcome, iterations, processes, setupSeconds, solveSeconds, peakMemoryGiB, trueRelativeResidual]).toEqual(Array(8).fill(null));
  });

  it("record=true names what the log does not say", async () => {
    const answer = await send("nothing a solver prints\n", "?record=true");
    expect(answer.status).toBe(422);
    expect(answer.problem().errors.map(({ path: at }) => at)).toEqual(["strategy", "outcome"]);
  });
});

describe("what the address says", () => {
  const bare = "  0 KSP Residual norm 1.000000000000e+00\n  1 KSP Residual norm 1.000000000000e-09\nLinear solve converged due to CONVERGED_RTOL iterations 1\n";

  it("names the strategy that a log without a solver view does not show", async () => {
    expect((await send(bare)).status).toBe(200);
    const answer = read.parse((await send(bare, "?strategy=regularized-amg")).json());
    expect(answer.parsed.strategy).toBeNull();
    expect(await runOf(answer.runId)).toMatchObject({ strategy: "regularized-amg", outcome: "converged", iterations: 1, setupSeconds: null, peakMemoryGiB: null });
  });

  it("stands over the log, and takes a value back when it is empty", async () => {
    const answer = read.parse((await send(logFile(minres), "?setupSeconds=0.5&solveSeconds=&note=by%20hand")).json());
    expect(await runOf(answer.runId)).toMatchObject({ setupSeconds: 0.5, solveSeconds: null, note: "by hand", iterations: 39 });
  });

  it("is marked where it contradicts the log", async () => {
    const answer = read.parse((await send(logFile(minres), "?strategy=direct-ldlt")).json());
    expect((await runOf(answer.runId)).strategy).toBe("direct-ldlt");
    expect(answer.parsed.problems.some(({ text }) => text.includes("schur-diag-direct"))).toBe(true);
  });

  it("gives an outcome and cores only where the log is silent", async () => {
    const silent = read.parse((await send("started\n", "?strategy=bddc&outcomeIfSilent=over-time&coresIfSilent=7")).json());
    expect(await runOf(silent.runId)).toMatchObject({ outcome: "over-time", cores: 7 });
    const speaking = read.parse((await send(logFile(minres), "?outcomeIfSilent=over-time&coresIfSilent=7")).json());
    expect(await runOf(speaking.runId)).toMatchObject({ outcome: "converged", cores: 1 });
  });

  it.each([
    ["?iterations=many", "iterations"],
    ["?setupSeconds=-1", "setupSeconds"],
    ["?strategy=magic", "strategy"],
    ["?record=perhaps", "record"],
    ["?colour=red", "colour"],
  ])("%s is refused, and nothing recorded", async (query, at) => {
    const runs = await count("run");
    const answer = await send(logFile(minres), query);
    expect(answer.status).toBe(422);
    expect(answer.problem().errors[0]?.path).toBe(at);
    expect(await count("run")).toBe(runs);
  });
});

describe("a body that is no log", () => {
  const oversized = () => {
    const block = new Uint8Array(2 ** 20).fill(120);
    let sent = 0;
    return new ReadableStream<Uint8Array>({ pull: (controller) => (sent++ > 256 ? controller.close() : controller.enqueue(block)) });
  };

  it.each([
    ["empty", () => "", {}, 422, "empty"],
    ["binary", () => Buffer.from([1, 2, 0, 4]), {}, 422, "NUL"],
    ["text in UTF-16", () => Buffer.from("KSP Residual", "utf16le"), {}, 422, "NUL"],
    ["cut gzip data", () => gzipSync(logFile(minres)).subarray(0, 900), { "content-encoding": "gzip" }, 400, "cut"],
    ["announced as gzip and is not", () => "plain text\n", { "content-encoding": "gzip" }, 400, "gzip"],
    ["in an unknown encoding", () => "text\n", { "content-encoding": "br" }, 415, "gzip"],
    ["of a media type of its own", () => "{}", { "content-type": "application/json" }, 415, "text/plain"],
    ["larger than 256 MiB", oversized, {}, 413, "256"],
    ["larger than 256 MiB unpacked", () => gzipSync(Buffer.alloc(257 * 2 ** 20, "x\n"), { level: 1 }), { "content-encoding": "gzip" }, 413, "unpacked"],
  ])("%s is refused with what to do", async (_name, body, headers, status, word) => {
    const runs = await count("run");
    const answer = await send(body(), "?strategy=bddc&outcome=converged", headers);
    expect(answer.status).toBe(status);
    expect(answer.problem().detail).toContain(word);
    expect(await count("run")).toBe(runs);
  });
});

describe("a log format of the team", () => {
  const mapping = {
    name: "House solver",
    quantities: { iterations: { by: "pattern", pattern: "took (\\d+) steps" }, solveSeconds: { by: "column", delimiter: "whitespace", index: 3, contains: "solve time", scale: 0.001 } },
    outcome: { converged: "all good" },
  };

  it("reads what no known solver wrote, by its name", async () => {
    await world.expect(201, operations.createLogMapping.response.schema, "POST", "/api/v1/log-mappings", { body: mapping });
    const answer = await send("took 17 steps\nsolve time 2500 ms\nall good\n", "?mapping=House%20solver&strategy=schur-triangular");
    expect(answer.status).toBe(201);
    expect(await runOf(read.parse(answer.json()).runId)).toMatchObject({ iterations: 17, solveSeconds: 2.5, outcome: "converged" });
  });

  it("is refused under a name that is taken, and with a pattern that could run away", async () => {
    expect((await world.call("POST", "/api/v1/log-mappings", { body: mapping })).problem().errors[0]?.path).toBe("name");
    const runaway = { name: "Bad", quantities: { iterations: { by: "pattern", pattern: "(a+)+\\1" } } };
    expect((await world.call("POST", "/api/v1/log-mappings", { body: runaway })).status).toBe(422);
  });

  it("of another team or none is not found", async () => {
    expect((await send("x\n", "?mapping=Nobody%20has%20it")).status).toBe(404);
  });
});

describe("several runs at once", () => {
  const one = { strategy: "direct-ldlt", outcome: "converged", solveSeconds: 3 };
  const batch = () => path.replace("/logs", "/runs/batch");

  it("are recorded in the order given", async () => {
    const body = [1, 2, 4].map((cores) => ({ ...one, cores }));
    const { items } = await world.expect(201, operations.recordRuns.response.schema, "POST", batch(), { body });
    expect(await Promise.all(items.map(async ({ id }) => (await runOf(id)).cores))).toEqual([1, 2, 4]);
  });

  it("are recorded all or none, and at most 500", async () => {
    const runs = await count("run");
    const answer = await world.call("POST", batch(), { body: [one, { ...one, solveSeconds: -1 }] });
    expect(answer.problem().errors[0]?.path).toBe("1.solveSeconds");
    expect((await world.call("POST", batch(), { body: Array(501).fill(one) })).status).toBe(422);
    expect((await world.call("POST", batch(), { body: [] })).status).toBe(422);
    expect(await count("run")).toBe(runs);
  });
});

describe("a run as gzipped JSON", () => {
  const report = JSON.stringify({ strategy: "bddc", outcome: "converged", note: "packed" });
  const post = (packed: Buffer) => world.call("POST", path.replace("/logs", "/runs"), { rawBody: new Uint8Array(packed), headers: { "content-type": "application/json", "content-encoding": "gzip" } });

  it("is recorded like any other", async () => {
    const answer = await post(gzipSync(report));
    expect(answer.status).toBe(201);
    expect((await runOf(operations.recordRun.response.schema.parse(answer.json()).id)).note).toBe("packed");
  });

  it("is refused when it is cut, or larger than 1 MiB unpacked", async () => {
    expect((await post(gzipSync(report).subarray(0, 20))).status).toBe(400);
    expect((await post(gzipSync(" ".repeat(2 ** 20) + report))).status).toBe(413);
  });
});

describe("the diagnosis of a run reported by hand", () => {
  it("compares it with the case's other runs", async () => {
    const made = await world.expect(201, createdCase, "POST", "/api/v1/cases", { body: { questionnaire: defaultQuestionnaire } });
    const report = (cores: number, solveSeconds: number) => ({ strategy: "schur-diag-amg", outcome: "converged", setupSeconds: 1, solveSeconds, cores });
    const body = [report(1, 100), report(32, 90)];
    const { items } = await world.expect(201, operations.recordRuns.response.schema, "POST", `/api/v1/cases/${made.id}/runs/batch`, { body });
    const scaled = await runOf(items[1]?.id ?? null);
    // 101 s on one core, 91 s on 32: speed-up 1.11, efficiency 3 %.
    expect(scaled.findings.map(({ id }) => id)).toContain("poor-parallel-efficiency");
    expect(scaled.hasLog).toBe(false);
    expect((await world.call("GET", `/api/v1/runs/${items[1]?.id ?? ""}/log`)).status).toBe(404);
  });
});
