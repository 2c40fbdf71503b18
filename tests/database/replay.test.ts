import { spawn, type ChildProcess } from "node:child_process";
import { createRequire } from "node:module";
import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from "vitest";
import { operations } from "@/lib/api/contract";
import { runWorker } from "@/lib/jobs/run-worker";
import { runReplay } from "@/lib/use-cases/refinement/run-replay";
import { runSearch } from "@/lib/use-cases/refinement/run-search";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import type { Rule } from "@/rules/rule-schema";
import { plantedCases, plantedEdition, trueThreshold } from "../support/planted-record";
import { createdCase, recordedRun, startApiWorld, type ApiWorld, type CallOptions } from "../support/api";

let world: ApiWorld;
let draftId: string;
const base = "/api/v1/rulebook";
const replaySchema = operations.getReplay.response.schema;
const searchSchema = operations.getSearch.response.schema;
const processes: ChildProcess[] = [];

// Sizes of the cases, and total seconds of the first choice and of direct-ldlt on each: direct-ldlt wins on two, loses on one, was not run on one.
const recorded = [
  { value: 20_000, first: 10, direct: 4 },
  { value: 40_000, first: 10, direct: 5 },
  { value: 80_000, first: 10, direct: 30 },
  { value: 160_000, first: 10, direct: null },
];

beforeAll(async () => {
  world = await startApiWorld();
  const plain: Rule = { id: "block-first", title: "Block first", enabled: true, when: { fact: "degree", operator: "greaterThanInclusive", value: 1 }, then: [{ kind: "favour", strategy: "schur-diag-direct", factor: 100 }], rationale: "A test.", source: { kind: "common-practice" } };
  await publishRules([plain]);
  // All advice is given before the first run is reported, so that no run speaks in it.
  const cases: { id: string; first: number; direct: number | null }[] = [];
  for (const { value, first, direct } of recorded) {
    const made = await world.expect(201, createdCase, "POST", "/api/v1/cases", { body: { questionnaire: { ...defaultQuestionnaire, size: { by: "unknowns", value } } } });
    expect(made.advice.ranking[0]?.strategy).toBe("schur-diag-direct");
    cases.push({ id: made.id, first, direct });
  }
  for (const { id, first, direct } of cases) {
    await report(id, "schur-diag-direct", first);
    if (direct !== null) await report(id, "direct-ldlt", direct);
  }
  const turned: Rule = { ...plain, then: [{ kind: "favour", strategy: "direct-ldlt", factor: 100 }] };
  draftId = await draftWith([turned]);
});
afterEach(() => {
  for (const child of processes.splice(0)) child.kill("SIGKILL");
});
afterAll(() => world.close());

async function report(caseId: string, strategy: string, seconds: number): Promise<void> {
  const body = { strategy, outcome: "converged", setupSeconds: 1, solveSeconds: seconds - 1, trueRelativeResidual: 1e-7, measuredAt: "2027-01-01T00:00:00Z" };
  await world.expect(201, recordedRun, "POST", `/api/v1/cases/${caseId}/runs`, { body });
}

async function draftWith(rules: Rule[]): Promise<string> {
  const { id } = await world.expect(201, operations.getDraft.response.schema, "POST", `${base}/drafts`, { as: "curator", body: { from: "live" } });
  await world.expect(200, operations.getDraft.response.schema, "PATCH", `${base}/drafts/${id}`, { as: "curator", body: { version: 1, rules } });
  return id;
}

async function publishRules(rules: Rule[]): Promise<void> {
  const id = await draftWith(rules);
  await world.expect(200, operations.getDraft.response.schema, "POST", `${base}/drafts/${id}/submit`, { as: "curator", body: { version: 2, note: "Start." } });
  await world.expect(201, operations.publishDraft.response.schema, "POST", `${base}/drafts/${id}/publish`, { as: "owner", body: { version: 2, replacing: 1 } });
}

const start = (as: CallOptions["as"] = "curator") => world.expect(201, replaySchema, "POST", `${base}/drafts/${draftId}/replay`, { as });
const read = (id: string, as: CallOptions["as"] = "observer") => world.expect(200, replaySchema, "GET", `${base}/drafts/${draftId}/replays/${id}`, { as });
const cancel = (id: string) => world.expect(200, replaySchema, "POST", `${base}/drafts/${draftId}/replays/${id}/cancel`, { as: "owner" });
const work = (replayId: string) => runReplay({ teamId: world.teamId, replayId });

describe("a replay", () => {
  it("tells on the same cases how the draft would have done, case by case and by which rule", async () => {
    const adviceBefore = (await world.owner.query("select md5(string_agg(a::text, '' order by id)) as content from advice a")).rows;
    const { id, status } = await start();
    expect(status).toBe("queued");
    await work(id);
    const { result, ...replay } = await read(id);
    expect(replay).toMatchObject({ status: "done", progress: 1, draftVersion: 2, editionNumber: 2, createdBy: { name: "The curator" } });
    expect(result?.cases).toBe(4);
    expect(result?.judged).toEqual({ before: 4, after: 3, both: 3 });
    expect(result?.changed).toEqual({ cases: 4, helped: 2, hurt: 1, unknown: 1 });
    expect(result?.changes.map(({ verdict }) => verdict)).toEqual(["helped", "helped", "hurt", "unknown"]);
    expect(result?.changes.every(({ before, after, rules }) => before === "schur-diag-direct" && after === "direct-ldlt" && rules[0] === "block-first")).toBe(true);
    // By hand: the block preconditioner is best on one of three (10 s against 30 s), the direct solver on two; regret is the geometric mean of 2.5, 2, 1 and of 1, 1, 3.
    expect(result?.before.best).toMatchObject({ x: 1, n: 3 });
    expect(result?.after.best).toMatchObject({ x: 2, n: 3 });
    expect(result?.before.regret.value).toBeCloseTo(5 ** (1 / 3), 10);
    expect(result?.after.regret.value).toBeCloseTo(3 ** (1 / 3), 10);
    // Exact McNemar with two against one: all eight outcomes of three fair coins are at least as uneven.
    expect(result?.tests.best).toMatchObject({ onlyBefore: 1, onlyAfter: 2 });
    expect(result?.tests.best.pValue).toBeCloseTo(1, 10);
    expect((await world.owner.query("select md5(string_agg(a::text, '' order by id)) as content from advice a")).rows).toEqual(adviceBefore);
  });

  it("is listed with its draft, and done work is not done again", async () => {
    const { id } = await start();
    await work(id);
    const { finishedAt } = await read(id);
    await work(id);
    expect((await read(id)).finishedAt).toBe(finishedAt);
    const { items } = await world.expect(200, operations.listReplays.response.schema, "GET", `${base}/drafts/${draftId}/replays`, { as: "observer" });
    expect(items[0]).toMatchObject({ id, status: "done" });
  });

  it("that is cancelled stays cancelled, whatever the worker has come to", async () => {
    const { id } = await start();
    expect(await cancel(id)).toMatchObject({ status: "cancelled", result: null });
    await work(id);
    expect(await read(id)).toMatchObject({ status: "cancelled", result: null });
    const audit = await world.expect(200, operations.listAudit.response.schema, "GET", "/api/v1/audit?limit=1");
    expect(audit.items[0]).toMatchObject({ action: "replay.cancelled", detail: { replay: id }, actor: { name: "Olive Owner" } });
    expect((await cancel(id)).status).toBe("cancelled");
  });

  it("that is started anew cancels the one before", async () => {
    const first = await start();
    const second = await start("owner");
    expect((await read(first.id)).status).toBe("cancelled");
    await cancel(second.id);
  });

  it("of a draft with an error is refused", async () => {
    const id = await draftWith([{ id: "never", title: "Never", enabled: true, when: { fact: "degree", operator: "lessThan", value: 1 }, then: [{ kind: "caution", strategy: null, text: "x" }], rationale: "A test.", source: { kind: "common-practice" } }]);
    expect((await world.call("POST", `${base}/drafts/${id}/replay`, { as: "curator" })).status).toBe(422);
  });

  it("whose worker is killed in the middle is done by the next one by itself", async () => {
    const { id } = await start();
    // The worker reads the runs, and can't while this lock is held: so it is in the middle when it is killed.
    await world.owner.query("begin");
    await world.owner.query("lock table run in access exclusive mode");
    const child = startWorkerProcess();
    await vi.waitFor(async () => expect((await read(id)).status).toBe("running"), { timeout: 50_000, interval: 200 });
    child.kill("SIGKILL");
    await new Promise((resolve) => child.once("exit", resolve));
    await world.owner.query("rollback");
    expect((await read(id)).status).toBe("running");
    const worker = await runWorker({ connectionString: process.env.DATABASE_URL_AUTH ?? "", log: () => undefined, signal: new AbortController().signal });
    try {
      await vi.waitFor(async () => expect((await read(id)).status).toBe("done"), { timeout: 30_000, interval: 200 });
      expect((await read(id)).result?.changed.cases).toBe(4);
    } finally {
      await worker.stop();
    }
  }, 120_000);
});

/** A worker in a process of its own, as in an installation. */
function startWorkerProcess(): ChildProcess {
  const tsx = createRequire(import.meta.url).resolve("tsx");
  const child = spawn(process.execPath, ["--import", tsx, "lib/jobs/worker.ts"], { env: { ...process.env, SMTP_URL: "smtp://127.0.0.1:9" }, stdio: "ignore" });
  processes.push(child);
  return child;
}

describe("a search for refinements", () => {
  it("with too few runs says so and proposes nothing", async () => {
    const { id, status } = await world.expect(200, searchSchema, "POST", `${base}/proposals`, { as: "curator" });
    expect(status).toBe("queued");
    expect((await world.expect(200, searchSchema, "POST", `${base}/proposals`, { as: "owner" })).id).toBe(id);
    await runSearch({ teamId: world.teamId, searchId: id });
    const { result, ...search } = await world.expect(200, searchSchema, "GET", `${base}/proposals/${id}`, { as: "observer" });
    expect(search).toMatchObject({ status: "done", editionNumber: 2 });
    expect(result).toMatchObject({ enough: false, proposals: [], cases: 4, contestedCases: 3 });
    expect(result?.text).toMatch(/^Too few runs/);
  });

  it("that proposes nothing of a name makes no draft of it", async () => {
    const { items } = await world.expect(200, operations.listSearches.response.schema, "GET", `${base}/proposals`, { as: "observer" });
    const answer = await world.call("POST", `${base}/drafts`, { as: "curator", body: { from: "proposal", search: items[0]?.id, key: "nothing" } });
    expect(answer.status).toBe(422);
  });
});

describe("a search of a record with a threshold planted wrong", () => {
  it("finds it, and one call makes the proposal a draft that changes that rule alone", async () => {
    const as = "foreigner";
    const draftSchema = operations.getDraft.response.schema;
    const imported = await world.expect(201, draftSchema, "POST", `${base}/drafts`, { as, body: { from: "import", edition: plantedEdition } });
    await world.expect(200, draftSchema, "POST", `${base}/drafts/${imported.id}/submit`, { as, body: { version: 1, note: "Planted." } });
    await world.expect(201, operations.publishDraft.response.schema, "POST", `${base}/drafts/${imported.id}/publish`, { as, body: { version: 1, replacing: 1 } });
    const ids: string[] = [];
    for (const { questionnaire } of plantedCases) ids.push((await world.expect(201, createdCase, "POST", "/api/v1/cases", { as, body: { questionnaire } })).id);
    for (const [index, { runs }] of plantedCases.entries()) {
      for (const body of runs) await world.expect(201, recordedRun, "POST", `/api/v1/cases/${ids[index]}/runs`, { as, body });
    }
    const { id } = await world.expect(200, searchSchema, "POST", `${base}/proposals`, { as });
    const { rows } = await world.owner.query<{ team: string }>("select team_id as team from proposal_search where id = $1", [id]);
    await runSearch({ teamId: rows[0]?.team ?? "", searchId: id });
    const { result } = await world.expect(200, searchSchema, "GET", `${base}/proposals/${id}`, { as });
    const proposal = result?.proposals.find(({ ruleId, kind }) => ruleId === "blocks-when-large" && kind === "threshold");
    if (proposal?.change.kind !== "threshold") throw new Error(`Not found: ${result?.text}`);
    // To within one recorded case: the sizes stand 40^(1/47) = 1.08 apart.
    expect(proposal.change.to / trueThreshold).toBeGreaterThan(1 / 1.09);
    expect(proposal.change.to / trueThreshold).toBeLessThan(1.09);
    const draft = await world.expect(201, draftSchema, "POST", `${base}/drafts`, { as, body: { from: "proposal", search: id, key: proposal.key } });
    expect(draft.origin).toBe(`proposal:${proposal.key}`);
    expect(draft.differences.map(({ ruleId }) => ruleId)).toEqual(["blocks-when-large"]);
    expect(draft.problems.filter(({ severity }) => severity === "error")).toEqual([]);
  }, 180_000);
});

describe("the record of a rule", () => {
  it("counts where it fired, was followed, was right", async () => {
    const { items, edition } = await world.expect(200, operations.listRuleRecords.response.schema, "GET", `${base}/rule-records`, { as: "observer" });
    expect(edition).toBe(2);
    expect(items).toMatchObject([{ ruleId: "block-first", fired: 4, followed: 4, right: { x: 4, n: 4 }, wrong: 0, standing: "active" }]);
  });
});
