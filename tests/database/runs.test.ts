import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { operations } from "@/lib/api/contract";
import { caseDetailSchema } from "@/lib/api/contract/cases";
import { auditEntrySchema } from "@/lib/api/contract/record";
import { runDetailSchema } from "@/lib/api/contract/runs";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import { createdCase, recordedRun, startApiWorld, type ApiWorld } from "../support/api";

let world: ApiWorld;
let caseId: string;
let caseNumber: number;

const run = {
  strategy: "schur-diag-direct", outcome: "converged", iterations: 31, setupSeconds: 1.4, solveSeconds: 9.8, peakMemoryGiB: 6.2, cores: 32,
  trueRelativeResidual: 4.1e-7, monitoredRelativeResidual: 8e-7, monitoredNorm: "preconditioned", parameters: { gamma: 0.4 }, followedAdvice: true,
  note: "a first run", measuredAt: "2026-12-01T08:00:00Z",
};

beforeAll(async () => {
  world = await startApiWorld();
  const made = await world.expect(201, createdCase, "POST", "/api/v1/cases", { body: { questionnaire: defaultQuestionnaire } });
  [caseId, caseNumber] = [made.id, made.number];
});
afterAll(() => world.close());

const record = (change: object = {}, reference: string | number = caseId) => world.expect(201, recordedRun, "POST", `/api/v1/cases/${reference}/runs`, { as: "analyst", body: { ...run, ...change } });
const read = (id: string) => world.expect(200, runDetailSchema, "GET", `/api/v1/runs/${id}`);
const audit = async () => (await world.expect(200, operations.listAudit.response.schema, "GET", "/api/v1/audit")).items;

describe("recording a run", () => {
  it("keeps every field as it was sent, its author and the advice before it", async () => {
    const { id } = await record();
    const stored = await read(id);
    expect(stored).toMatchObject({ ...run, measuredAt: "2026-12-01T08:00:00.000Z", caseNumber, revision: 1, withdrawn: null, source: "form", author: { name: "The analyst" } });
    const detail = await world.expect(200, caseDetailSchema, "GET", `/api/v1/cases/${caseNumber}`);
    expect(stored.adviceId).toBe(detail.adviceId);
    expect(auditEntrySchema.parse((await audit())[0])).toMatchObject({ action: "run.recorded", subjectId: id, actor: { name: "The analyst" } });
  });

  it("needs strategy and outcome only; cores are the case's", async () => {
    const { id } = await world.expect(201, recordedRun, "POST", `/api/v1/cases/${caseNumber}/runs`, { as: "write-key", body: { strategy: "bddc", outcome: "broken", reason: "did not start" } });
    expect(await read(id)).toMatchObject({ cores: 32, iterations: null, setupSeconds: null, parameters: {}, followedAdvice: null, source: "api", reason: "did not start" });
  });

  it("compares with the estimate in the advice before it", async () => {
    const { comparison } = await record();
    const detail = await world.expect(200, caseDetailSchema, "GET", `/api/v1/cases/${caseId}`);
    const predicted = detail.advice.ranking.find(({ strategy }) => strategy === run.strategy)?.estimate.setupSeconds;
    const setup = comparison.quantities.find(({ quantity }) => quantity === "setupSeconds");
    expect(setup?.predicted).toEqual(predicted);
    expect(setup?.ratio).toBeCloseTo(1.4 / (predicted?.median ?? Number.NaN), 12);
    expect(comparison).toMatchObject({ worked: true, residual: "verified" });
    expect(comparison.totalSeconds).toBeCloseTo(11.2, 12);
  });

  it("takes a strategy that is not ours by its name, without a prediction", async () => {
    const { id, comparison } = await record({ strategy: "other", strategyName: "in-house multigrid" });
    expect(comparison.quantities.every(({ predicted }) => predicted === null)).toBe(true);
    expect(await read(id)).toMatchObject({ strategy: "other", strategyName: "in-house multigrid" });
  });
});

describe("correcting a run", () => {
  it("keeps what it said before, who changed it and why", async () => {
    const { id } = await record();
    const corrected = await world.expect(200, runDetailSchema, "PATCH", `/api/v1/runs/${id}`, { as: "curator", body: { solveSeconds: 12, note: "", explanation: "read the wrong line" } });
    expect(corrected).toMatchObject({ solveSeconds: 12, note: "", setupSeconds: 1.4, revision: 2 });
    expect(corrected.revisions).toHaveLength(1);
    expect(corrected.revisions[0]).toMatchObject({ revision: 1, before: { solveSeconds: 9.8, note: "a first run" }, explanation: "read the wrong line", changedBy: { name: "The curator" } });
    expect((await audit())[0]).toMatchObject({ action: "run.corrected", detail: { changed: ["note", "solveSeconds"] } });
  });

  it("clears a field with null and renames an other strategy", async () => {
    const { id } = await record({ strategy: "other", strategyName: "one" });
    const path = `/api/v1/runs/${id}`;
    expect(await world.expect(200, runDetailSchema, "PATCH", path, { body: { peakMemoryGiB: null, strategyName: "two" } })).toMatchObject({ peakMemoryGiB: null, strategyName: "two" });
    expect(await world.expect(200, runDetailSchema, "PATCH", path, { body: { strategy: "bddc" } })).toMatchObject({ strategy: "bddc", strategyName: null, revision: 3 });
  });

  it("that changes nothing leaves no revision", async () => {
    const { id } = await record();
    expect(await world.expect(200, runDetailSchema, "PATCH", `/api/v1/runs/${id}`, { body: { iterations: 31 } })).toMatchObject({ revision: 1, revisions: [] });
  });

  it("refuses one that no longer makes a run, one that is out of date, and one that was withdrawn", async () => {
    const { id } = await record();
    const path = `/api/v1/runs/${id}`;
    const nameless = await world.call("PATCH", path, { body: { strategy: "other" } });
    expect([nameless.status, nameless.problem().errors[0]?.path]).toEqual([422, "strategyName"]);
    await world.expect(200, runDetailSchema, "PATCH", path, { body: { iterations: 32, revision: 1 } });
    expect((await world.call("PATCH", path, { body: { iterations: 33, revision: 1 } })).status).toBe(409);
    await world.expect(200, runDetailSchema, "POST", `${path}/withdraw`, { body: {} });
    expect((await world.call("PATCH", path, { body: { iterations: 34 } })).status).toBe(409);
    expect(await read(id)).toMatchObject({ iterations: 32, revision: 2 });
  });

  it("ten times at once counts ten revisions", async () => {
    const { id } = await record();
    const answers = await Promise.all(Array.from({ length: 10 }, (_, index) => world.call("PATCH", `/api/v1/runs/${id}`, { body: { iterations: 100 + index } })));
    expect(answers.map(({ status }) => status)).toEqual(Array.from({ length: 10 }, () => 200));
    expect((await read(id)).revisions.map(({ revision }) => revision)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10]);
  });
});

describe("withdrawing a run", () => {
  it("keeps it on record with the reason, and a second time changes nothing", async () => {
    const { id } = await record();
    const withdrawn = await world.expect(200, runDetailSchema, "POST", `/api/v1/runs/${id}/withdraw`, { body: { reason: "wrong mesh" } });
    expect(withdrawn.withdrawn).toMatchObject({ reason: "wrong mesh", by: { name: "Olive Owner" } });
    const again = await world.expect(200, runDetailSchema, "POST", `/api/v1/runs/${id}/withdraw`, { body: { reason: "another" } });
    expect(again.withdrawn).toEqual(withdrawn.withdrawn);
    expect((await audit()).filter(({ action, subjectId }) => action === "run.withdrawn" && subjectId === id)).toHaveLength(1);
  });
});

describe("the runs of a case", () => {
  it("come in the order of measuring, page by page, none twice and none lost", async () => {
    const made = await world.expect(201, createdCase, "POST", "/api/v1/cases", { body: { questionnaire: defaultQuestionnaire } });
    const expected: string[] = [];
    // Two and two share an instant.
    for (const minute of [5, 3, 3, 9, 1, 1, 7]) await record({ measuredAt: `2026-11-01T08:0${minute}:00Z` }, made.id);
    const { rows } = await world.owner.query<{ id: string }>("select id from run where case_id = $1 order by measured_at, id", [made.id]);
    expected.push(...rows.map(({ id }) => id));
    const seen: string[] = [];
    for (let cursor = ""; ; ) {
      const page = await world.expect(200, operations.listRuns.response.schema, "GET", `/api/v1/cases/${made.id}/runs?limit=2${cursor}`);
      seen.push(...page.items.map(({ id }) => id));
      if (page.nextCursor === null) break;
      cursor = `&cursor=${page.nextCursor}`;
    }
    expect(seen).toEqual(expected);
  });
});

describe("importing runs", () => {
  it("reads CSV with quotes, JSON cells and either line end, and makes one case of equal questionnaires", async () => {
    const questionnaire = JSON.stringify({ ...defaultQuestionnaire, title: 'Lake, "upper"', degree: 2 }).replaceAll('"', '""');
    const csv = [
      "caseId,questionnaire,strategy,outcome,setupSeconds,solveSeconds,followedAdvice,note,parameters,measuredAt",
      `${caseNumber},,bddc,converged,1.5,2e1,true,"two lines\nand a ""quote""","{""gamma"":0.4}",2026-10-01T00:00:00Z`,
      `,"${questionnaire}",direct-ldlt,out-of-memory,,,,,,`,
      `,"${questionnaire}",schur-diag-amg,converged,1,2,false,,,`,
    ].join("\r\n");
    const result = await world.expect(201, operations.importRuns.response.schema, "POST", "/api/v1/runs/import", { as: "write-key", rawBody: csv, headers: { "content-type": "text/csv" } });
    expect(result).toMatchObject({ runs: 3, casesCreated: 1 });
    const [first = "", second = "", third = ""] = result.runIds;
    expect(await read(first)).toMatchObject({ caseId, strategy: "bddc", setupSeconds: 1.5, solveSeconds: 20, followedAdvice: true, note: 'two lines\nand a "quote"', parameters: { gamma: 0.4 }, source: "import" });
    expect((await read(second)).caseId).toBe((await read(third)).caseId);
    expect(await read(second)).toMatchObject({ outcome: "out-of-memory", setupSeconds: null });
    expect((await audit()).find(({ action }) => action === "runs.imported")?.detail).toEqual({ runs: 3, casesCreated: 1 });
  });

  it("takes 5 000 rows in one go", async () => {
    const line = JSON.stringify({ strategy: "bddc", outcome: "stalled", iterations: 10_000, caseId: caseNumber });
    const before = await world.owner.query("select count(*)::int as n from run");
    const result = await world.expect(201, operations.importRuns.response.schema, "POST", "/api/v1/runs/import", { rawBody: `${line}\n`.repeat(5_000), headers: { "content-type": "application/x-ndjson" } });
    expect(result.runs).toBe(5_000);
    const after = await world.owner.query("select count(*)::int as n from run");
    expect(after.rows[0].n - before.rows[0].n).toBe(5_000);
  });
});
