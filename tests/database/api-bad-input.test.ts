import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { operations } from "@/lib/api/contract";
import { importLimitBytes, jsonLimitBytes } from "@/lib/api/read-body";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import { allOperations, createdCase, fillPath, recordedRun, startApiWorld, type ApiWorld } from "../support/api";

let world: ApiWorld;
let caseId: string;
let runId: string;
let machineId: string;
let before: string;

const run = { strategy: "schur-diag-direct", outcome: "converged" };
const sheet = { name: "Sheet", coresPerNode: 8, nodes: 2, memoryPerNodeGiB: 64, bandwidthPerNodeGBps: 100, gflopsPerCore: 10, networkLatencyMicroseconds: 2, networkBandwidthGBps: 10 };

beforeAll(async () => {
  world = await startApiWorld();
  caseId = (await world.expect(201, createdCase, "POST", "/api/v1/cases", { body: { questionnaire: defaultQuestionnaire } })).id;
  runId = (await world.expect(201, recordedRun, "POST", `/api/v1/cases/${caseId}/runs`, { body: run })).id;
  machineId = (await world.expect(201, operations.createMachine.response.schema, "POST", "/api/v1/machines", { body: sheet })).id;
  before = await countAll();
});
afterAll(() => world.close());

async function countAll(): Promise<string> {
  const tables = ["solver_case", "advice", "run", "run_revision", "machine", "audit", "idempotency_key", "edition", "team_counter"];
  const { rows } = await world.owner.query(tables.map((table) => `select '${table}' as name, count(*)::int as n, md5(string_agg(t::text, '' order by t::text)) as content from ${table} t`).join(" union all "));
  return JSON.stringify(rows);
}

function pathOf(operation: (typeof allOperations)[number]): string {
  const ids: Record<string, string> = { "/runs/{id}": runId, "/machines/{id}": machineId };
  const id = Object.entries(ids).find(([part]) => operation.path.includes(part))?.[1] ?? caseId;
  return fillPath(operation, { id, strategy: "bddc", number: "1" });
}

const withBody = allOperations.filter((operation) => operation.body?.kind === "json").map((operation) => [operation.id, operation] as const);
const json = { "content-type": "application/json" };

/** More than the limit in pieces, with no length announced. */
function endless(bytes: number): ReadableStream<Uint8Array> {
  const piece = new Uint8Array(64 * 1024).fill(0x20);
  let sent = 0;
  return new ReadableStream({
    pull(controller) {
      if (sent > bytes) controller.close();
      else controller.enqueue(piece);
      sent += piece.length;
    },
  });
}

// Statuses as the contract states them: 400 malformed, 413, 415, 422 invalid (RFC 9110), bodies as RFC 9457.
describe.each(withBody)("%s", (_id, operation) => {
  it.each([
    ["nothing", "", 400],
    ["half an object", '{"a":', 400],
    ["bytes that are not UTF-8", new Uint8Array([0x7b, 0x22, 0xff, 0xfe, 0x22, 0x7d]), 400],
    ["a number", "7", 422],
    ["a list", "[]", 422],
    ["null", "null", 422],
    ["a text", '"text"', 422],
    ["a NUL in a text", '{"note":"a\\u0000b"}', 422],
    ["half a surrogate pair", '{"note":"\\ud800"}', 422],
    ["a field that is not known", '{"surprise":1}', 422],
    ["the name __proto__", '{"__proto__":{"a":1}}', 422],
    ["lists in lists, 100 000 deep", "[".repeat(100_000) + "]".repeat(100_000), 422],
  ])("answers %s with %#", async (_name, rawBody, status) => {
    const answer = await world.call(operation.method, pathOf(operation), { rawBody, headers: json });
    expect(answer.status, answer.text).toBe(status);
    expect(answer.problem()).toMatchObject({ status });
    if (status === 422) expect(answer.problem().errors.length).toBeGreaterThan(0);
    expect(await countAll()).toBe(before);
  });

  it("names the unknown field by its path", async () => {
    const many = operation.id === "recordRuns";
    const answer = await world.call(operation.method, pathOf(operation), { body: many ? [{ surprise: 1 }] : { surprise: 1 } });
    expect(answer.problem().errors).toContainEqual({ path: many ? "0.surprise" : "surprise", message: "This field is not known." });
  });

  it("cuts off a body over 1 MiB, whether its length was announced or not", async () => {
    const announced = await world.call(operation.method, pathOf(operation), { rawBody: `"${"x".repeat(jsonLimitBytes)}"`, headers: json });
    const streamed = await world.call(operation.method, pathOf(operation), { rawBody: endless(jsonLimitBytes), headers: json });
    const lying = await world.call(operation.method, pathOf(operation), { rawBody: endless(jsonLimitBytes), headers: { ...json, "content-length": "10" } });
    expect([announced.status, streamed.status, lying.status]).toEqual([413, 413, 413]);
    expect(await countAll()).toBe(before);
  });

  it("takes JSON only", async () => {
    for (const type of ["text/plain", "application/x-www-form-urlencoded", "multipart/form-data"]) {
      expect((await world.call(operation.method, pathOf(operation), { rawBody: "{}", headers: { "content-type": type } })).status).toBe(415);
    }
  });
});

/** What a call must bring so that only its id is wrong; a body of `{}` will do for the others. */
const goodBodies: Record<string, unknown> = {
  correctRun: { note: "x" },
  recordRun: run,
  recordRuns: [run],
  updateLogMapping: { name: "Ours", quantities: { iterations: { by: "pattern", pattern: "took (\\d+) steps" } } },
  saveDraft: { version: 1, title: "Renamed" },
  submitDraft: { version: 1, note: "To be read." },
  publishDraft: { version: 1, replacing: 1 },
};
const goodQueries: Record<string, string> = { benchPack: "?strategies=direct-ldlt" };

function callOf(operation: (typeof allOperations)[number]) {
  if (operation.body === null) return {};
  return operation.body.kind === "stream" ? { rawBody: "text", headers: { "content-type": "text/plain" } } : { body: goodBodies[operation.id] ?? {} };
}

const withId = allOperations.filter((operation) => operation.params !== null).map((operation) => [operation.id, operation] as const);
const anyId = "0198c0de-0000-4000-8000-000000000000";

describe.each(withId)("%s", (_id, operation) => {
  it.each(["abc", "0", "-1", "1.5", "99999999999999999999", "%00", "' or 1=1 --", "../../etc", "ａ", anyId])("finds nothing under the id %s", async (id) => {
    const path = fillPath(operation, { id, number: id === anyId ? "999999999" : id, strategy: "bddc" }).replace("%2500", "%00");
    const answer = await world.call(operation.method, path + (goodQueries[operation.id] ?? ""), callOf(operation));
    expect(answer.status, answer.text).toBe(404);
    expect(answer.problem().status).toBe(404);
    expect(await countAll()).toBe(before);
  });
});

describe("query parameters", () => {
  it.each([
    ["/api/v1/cases?limit=0", "limit"],
    ["/api/v1/cases?limit=201", "limit"],
    ["/api/v1/cases?limit=1e2", "limit"],
    ["/api/v1/cases?limit=", "limit"],
    ["/api/v1/cases?limit=5&limit=6", "limit"],
    ["/api/v1/cases?surprise=1", "surprise"],
    ["/api/v1/cases?__proto__=1", "__proto__"],
    ["/api/v1/cases?sort=colour", "sort"],
    ["/api/v1/cases?degree=7", "degree"],
    ["/api/v1/cases?meshFamily=spheres", "meshFamily"],
    ["/api/v1/cases?month=2026-13", "month"],
    ["/api/v1/cases?q=%00", "q"],
    ["/api/v1/cases?cursor=nonsense", "cursor"],
    ["/api/v1/cases?cursor=WyItbnVtYmVyIiwxXQ", "cursor"],
    [`/api/v1/cases?cursor=${Buffer.from('["title","a",1]').toString("base64url")}`, "cursor"],
    ["/api/v1/machines?cursor=W10", "cursor"],
    ["/api/v1/audit?cursor=W10", "cursor"],
    ["/api/v1/rulebook/editions?cursor=W10", "cursor"],
    ["/api/v1/hit-rates?from=2026-02-30", "from"],
    ["/api/v1/hit-rates?result=worked", "result"],
    ["/api/v1/export?format=xml", "format"],
  ])("%s is refused at %s", async (path, field) => {
    const answer = await world.call("GET", path);
    expect(answer.status, answer.text).toBe(422);
    expect(answer.problem().errors.map((error) => error.path)).toContain(field);
  });
});

describe("answers of the questionnaire", () => {
  // The fields and limits are those of the questionnaire's own page.
  it.each([
    [{ degree: 0 }, "degree"],
    [{ degree: "1" }, "degree"],
    [{ contrast: { ratio: 0.5, pattern: "blocks" } }, "contrast.ratio"],
    [{ size: { by: "unknowns", value: 3 } }, "size.value"],
    [{ size: { by: "unknowns", value: Number.MAX_VALUE } }, "size.value"],
    [{ hardware: { cores: 32, memoryPerNodeGiB: 0 } }, "hardware.memoryPerNodeGiB"],
    [{ hardware: { cores: 32 } }, "hardware.memoryPerNodeGiB"],
    [{ hardware: { cores: 4_000_000, memoryPerNodeGiB: 64 } }, "hardware.cores"],
    [{ hardware: { cores: 4, machineId: anyId } }, "hardware.machineId"],
    [{ meshFamily: "imported", size: undefined }, "imported"],
    [{ discretisation: "rt" }, "meshFamily"],
    [{ size: { by: "unknowns", value: 400_000, extra: 1 } }, "size.extra"],
  ])("%j are refused at %s, by both calls that take them", async (change, path) => {
    const questionnaire = { ...defaultQuestionnaire, ...change };
    const advised = await world.call("POST", "/api/v1/advice", { body: questionnaire });
    expect(advised.status).toBe(422);
    expect(advised.problem().errors.map((error) => error.path)).toContain(path);
    const created = await world.call("POST", "/api/v1/cases", { body: { questionnaire } });
    expect(created.status).toBe(422);
    expect(created.problem().errors.map((error) => error.path)).toContain(`questionnaire.${path}`);
    expect(await countAll()).toBe(before);
  });

  it("refuse a machine sheet of another team as if it were not there, and more cores than a sheet has", async () => {
    const foreign = await world.expect(201, operations.createMachine.response.schema, "POST", "/api/v1/machines", { as: "foreigner", body: sheet });
    const theirs = await world.call("POST", "/api/v1/advice", { body: { ...defaultQuestionnaire, hardware: { cores: 4, machineId: foreign.id } } });
    expect(theirs.problem().errors).toEqual([{ path: "hardware.machineId", message: "This team has no such machine sheet." }]);
    const many = await world.call("POST", "/api/v1/advice", { body: { ...defaultQuestionnaire, hardware: { cores: 17, machineId } } });
    expect(many.problem().errors.map((error) => error.path)).toEqual(["hardware.cores"]);
    before = await countAll();
  });
});

describe("run reports", () => {
  it.each([
    [{ strategy: "magic" }, "strategy"],
    [{ outcome: "fine" }, "outcome"],
    [{ iterations: -1 }, "iterations"],
    [{ iterations: 1.5 }, "iterations"],
    [{ setupSeconds: "1" }, "setupSeconds"],
    [{ cores: 0 }, "cores"],
    [{ strategy: "other" }, "strategyName"],
    [{ strategyName: "x" }, "strategyName"],
    [{ measuredAt: "yesterday" }, "measuredAt"],
    [{ trueRelativeResidual: -1e-9 }, "trueRelativeResidual"],
    [{ parameters: { gamma: null } }, "parameters.gamma"],
    [{ parameters: { gamma: "\u0000" } }, "parameters.gamma"],
  ])("with %j are refused at %s", async (change, path) => {
    const answer = await world.call("POST", `/api/v1/cases/${caseId}/runs`, { body: { ...run, ...change } });
    expect(answer.status).toBe(422);
    expect(answer.problem().errors.map((error) => error.path)).toContain(path);
    expect(await countAll()).toBe(before);
  });

  it("refuse an Idempotency-Key with spaces", async () => {
    const answer = await world.call("POST", `/api/v1/cases/${caseId}/runs`, { body: run, headers: { "idempotency-key": "a b" } });
    expect(answer.problem().errors[0]?.path).toBe("Idempotency-Key");
    expect(await countAll()).toBe(before);
  });
});

describe("imports", () => {
  const csv = { "content-type": "text/csv" };
  const lines = { "content-type": "application/x-ndjson; charset=utf-8" };
  const good = () => JSON.stringify({ ...run, caseId });

  it.each([
    ["no rows", csv, "strategy,outcome,caseId\n", 422],
    ["nothing", csv, "", 422],
    ["an unknown column", csv, "strategy,outcome,caseId,colour\nbddc,converged,1,red\n", 422],
    ["a column twice", csv, "strategy,strategy,outcome,caseId\nbddc,bddc,converged,1\n", 422],
    ["a quote that never closes", csv, 'strategy,outcome,caseId,note\nbddc,converged,1,"oh\n', 400],
    ["a line that is not JSON", lines, "{\n", 422],
    ["a body that is not UTF-8", lines, new Uint8Array([0xff, 0x0a]), 400],
    ["another type", { "content-type": "application/json" }, "[]", 415],
  ])("with %s answer %#", async (_name, headers, rawBody, status) => {
    const answer = await world.call("POST", "/api/v1/runs/import", { headers, rawBody });
    expect(answer.status, answer.text).toBe(status);
    expect(await countAll()).toBe(before);
  });

  it("name every faulty row and keep none of the others", async () => {
    const rows = [good(), "[]", JSON.stringify({ ...run, outcome: "fine", caseId }), JSON.stringify(run), JSON.stringify({ ...run, caseId: 1, questionnaire: {} }), good()];
    const answer = await world.call("POST", "/api/v1/runs/import", { headers: lines, rawBody: rows.join("\n") });
    expect(answer.status).toBe(422);
    expect(answer.problem().detail).toBe("4 rows can't be imported; nothing was.");
    expect(answer.problem().errors.map((error) => error.path)).toEqual(["rows.2", "rows.3.outcome", "rows.4.caseId", "rows.5.caseId"]);
    expect(await countAll()).toBe(before);
  });

  it("keep no new case when a later row's case is not there or its answers can't be used", async () => {
    const fresh = JSON.stringify({ ...run, questionnaire: { ...defaultQuestionnaire, degree: 2 } });
    const lost = await world.call("POST", "/api/v1/runs/import", { headers: lines, rawBody: `${fresh}\n${JSON.stringify({ ...run, caseId: 999 })}` });
    expect(lost.problem().errors.map((error) => error.path)).toEqual(["rows.2.caseId"]);
    const tiny = JSON.stringify({ ...run, questionnaire: { ...defaultQuestionnaire, size: { by: "unknowns", value: 2 } } });
    const refused = await world.call("POST", "/api/v1/runs/import", { headers: lines, rawBody: `${fresh}\n${tiny}` });
    expect(refused.problem().errors.map((error) => error.path)).toEqual(["rows.2.questionnaire.size.value", "rows.2.questionnaire.hardware.cores"]);
    expect(await countAll()).toBe(before);
  });

  it("are cut off at 32 MiB", async () => {
    const answer = await world.call("POST", "/api/v1/runs/import", { headers: csv, rawBody: endlessLines(importLimitBytes) });
    expect(answer.status).toBe(413);
    expect(await countAll()).toBe(before);
  });
});

/** Blank lines, which an import skips, without end. */
function endlessLines(bytes: number): ReadableStream<Uint8Array> {
  const piece = new Uint8Array(1024 * 1024).fill(0x0a);
  let sent = 0;
  return new ReadableStream({
    pull(controller) {
      if (sent > bytes) controller.close();
      else controller.enqueue(piece);
      sent += piece.length;
    },
  });
}
