import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import { operations, type OperationId } from "@/lib/api/contract";
import type { Operation } from "@/lib/api/operation";
import { problemMediaType } from "@/lib/api/problem";
import { mayRole, isReadPermission, roles } from "@/lib/auth/permissions";
import { firstEdition } from "@/rules/sets/first-edition";
import { allOperations, createdCase, fillPath, recordedRun, startApiWorld, type ApiWorld, type CallOptions, type Caller } from "../support/api";

let world: ApiWorld;
let caseId: string;
let caseNumber: string;
let runId: string;
let machineId: string;
let loggedRunId: string;
let mappingId: string;
let webhookId: string;
let replayId: string;
let searchId: string;
/** A draft for each role and call that moves one on. */
const movedDrafts: Record<string, string> = {};
let serial = 0;

const run = { strategy: "schur-diag-direct", outcome: "converged", setupSeconds: 1, solveSeconds: 2 };
const sheet = () => ({ name: `Sheet ${++serial}`, coresPerNode: 8, nodes: 2, memoryPerNodeGiB: 64, bandwidthPerNodeGBps: 100, gflopsPerCore: 10, networkLatencyMicroseconds: 2, networkBandwidthGBps: 10 });
const solverLog = "  0 KSP Residual norm 1.000000000000e+00\n  1 KSP Residual norm 1.000000000000e-09\nLinear solve converged due to CONVERGED_RTOL iterations 1\n";
const format = () => ({ name: `Format ${++serial}`, quantities: { iterations: { by: "pattern", pattern: "took (\\d+) steps" } } });
// An address of the public internet; nothing is sent, because no worker runs here.
const hook = () => ({ url: "https://9.9.9.9/hook", events: ["run.recorded"] });
const makers = {
  mapping: async () => (await world.expect(201, operations.createLogMapping.response.schema, "POST", "/api/v1/log-mappings", { body: format() })).id,
  webhook: async () => (await world.expect(201, operations.createWebhook.response.schema, "POST", "/api/v1/webhooks", { body: hook() })).id,
};

beforeAll(async () => {
  world = await startApiWorld();
  const made = await world.expect(201, createdCase, "POST", "/api/v1/cases", { body: { questionnaire: defaultQuestionnaire } });
  caseId = made.id;
  caseNumber = String(made.number);
  runId = (await world.expect(201, recordedRun, "POST", `/api/v1/cases/${caseId}/runs`, { body: run })).id;
  machineId = (await world.expect(201, operations.createMachine.response.schema, "POST", "/api/v1/machines", { body: sheet() })).id;
  const logged = await world.expect(201, operations.readLog.response.schema, "POST", `/api/v1/cases/${caseId}/logs?strategy=schur-diag-direct&outcome=converged`, {
    rawBody: solverLog,
    headers: { "content-type": "text/plain" },
  });
  loggedRunId = logged.runId ?? "none";
  mappingId = await makers.mapping();
  webhookId = await makers.webhook();
  await makeDrafts();
});
afterAll(() => world.close());

const moves = ["read", "save", "discard", "submit", "withdraw", "publish", "replay"] as const;
const draftOf = (as: Caller, move: (typeof moves)[number]) => movedDrafts[`${as === "curator" ? "curator" : "owner"}/${move}`] ?? "none";

/** Somebody else submits what a role shall publish. */
async function makeDrafts(): Promise<void> {
  const draft = operations.getDraft.response.schema;
  for (const role of ["owner", "curator"] as const) {
    const other = role === "owner" ? "curator" : "owner";
    for (const move of moves) {
      const { id } = await world.expect(201, draft, "POST", "/api/v1/rulebook/drafts", { body: { from: "live" } });
      movedDrafts[`${role}/${move}`] = id;
      if (move === "withdraw" || move === "publish") await world.expect(200, draft, "POST", `/api/v1/rulebook/drafts/${id}/submit`, { as: other, body: { version: 1, note: "As it is." } });
    }
  }
  replayId = (await world.expect(201, operations.startReplay.response.schema, "POST", `/api/v1/rulebook/drafts/${draftOf("owner", "read")}/replay`)).id;
  searchId = (await world.expect(200, operations.startSearch.response.schema, "POST", "/api/v1/rulebook/proposals")).id;
}

/** A good request of every operation; a new operation without one does not compile. */
const goodRequests: Record<OperationId, (as: Caller) => { params?: Record<string, string>; options?: CallOptions; query?: string }> = {
  advise: () => ({ options: { body: defaultQuestionnaire } }),
  createCase: () => ({ options: { body: { questionnaire: defaultQuestionnaire } } }),
  listCases: () => ({ query: "?sort=title&limit=5" }),
  getCase: () => ({ params: { id: caseId } }),
  copyCase: () => ({ params: { id: caseId } }),
  adviseAgain: () => ({ params: { id: caseId } }),
  optionsFile: () => ({ params: { id: caseId, strategy: "direct-ldlt" } }),
  batchScript: () => ({ params: { id: caseId, strategy: "direct-ldlt" } }),
  strategyFiles: () => ({ params: { id: caseId, strategy: "bddc" } }),
  scalingCurves: () => ({ params: { id: caseId }, query: "?over=unknowns" }),
  exportCases: () => ({}),
  recordRun: () => ({ params: { id: caseId }, options: { body: run } }),
  listRuns: () => ({ params: { id: caseId } }),
  getRun: () => ({ params: { id: runId } }),
  correctRun: () => ({ params: { id: runId }, options: { body: { note: "seen again", explanation: "checked" } } }),
  withdrawRun: () => ({ params: { id: runId }, options: { body: { reason: "wrong mesh" } } }),
  readLog: () => ({ params: { id: caseId }, options: { rawBody: solverLog, headers: { "content-type": "text/plain" } }, query: "?strategy=schur-diag-direct&outcome=converged" }),
  getRunLog: () => ({ params: { id: loggedRunId } }),
  recordRuns: () => ({ params: { id: caseId }, options: { body: [run, run] } }),
  listLogMappings: () => ({}),
  createLogMapping: () => ({ options: { body: format() } }),
  updateLogMapping: () => ({ params: { id: mappingId }, options: { body: format() } }),
  deleteLogMapping: () => ({ params: { id: mappingId } }),
  benchPack: () => ({ params: { id: caseId }, query: "?strategies=direct-ldlt,schur-diag-amg" }),
  listWebhooks: () => ({}),
  createWebhook: () => ({ options: { body: hook() } }),
  updateWebhook: () => ({ params: { id: webhookId }, options: { body: { enabled: true } } }),
  deleteWebhook: () => ({ params: { id: webhookId } }),
  listDeliveries: () => ({ params: { id: webhookId } }),
  importRuns: () => ({ options: { rawBody: `${JSON.stringify({ ...run, caseId })}\n`, headers: { "content-type": "application/x-ndjson" } } }),
  listMachines: () => ({}),
  createMachine: () => ({ options: { body: sheet() } }),
  updateMachine: () => ({ params: { id: machineId }, options: { body: { nodes: 3 } } }),
  deleteMachine: () => ({ params: { id: machineId } }),
  hitRates: () => ({ query: "?degree=1" }),
  listEditions: () => ({}),
  getEdition: () => ({ params: { number: "1" } }),
  listAudit: () => ({}),
  exportTeam: () => ({ query: "?format=ndjson" }),
  listDrafts: () => ({ query: "?status=open" }),
  createDraft: () => ({ options: { body: { from: "edition", number: 1 } } }),
  getDraft: () => ({ params: { id: draftOf("owner", "read") } }),
  saveDraft: (as) => ({ params: { id: draftOf(as, "save") }, options: { body: { version: 1, title: "Renamed" } } }),
  discardDraft: (as) => ({ params: { id: draftOf(as, "discard") } }),
  submitDraft: (as) => ({ params: { id: draftOf(as, "submit") }, options: { body: { version: 1, note: "To be read." } } }),
  withdrawDraft: (as) => ({ params: { id: draftOf(as, "withdraw") } }),
  // The owner publishes first.
  publishDraft: (as) => ({ params: { id: draftOf(as, "publish") }, options: { body: { version: 1, replacing: as === "curator" ? 2 : 1 } } }),
  tryRules: () => ({ options: { body: { case: caseId, rules: firstEdition } } }),
  compareEditions: () => ({ params: { number: "1" } }),
  exportEdition: () => ({ params: { number: "1" } }),
  startReplay: (as) => ({ params: { id: draftOf(as, "replay") } }),
  listReplays: () => ({ params: { id: draftOf("owner", "read") } }),
  getReplay: () => ({ params: { id: draftOf("owner", "read"), replayId } }),
  cancelReplay: () => ({ params: { id: draftOf("owner", "read"), replayId } }),
  listRuleRecords: () => ({}),
  startSearch: () => ({}),
  listSearches: () => ({}),
  getSearch: () => ({ params: { id: searchId } }),
  cancelSearch: () => ({ params: { id: searchId } }),
};

const ofOwnEdition: ReadonlySet<string> = new Set<OperationId>(["getEdition", "compareEditions", "exportEdition"]);

async function attempt(operation: Operation, as: Caller, change: CallOptions = {}) {
  const id = Object.keys(operations).find((name): name is OperationId => name === operation.id);
  if (id === undefined) throw new Error(`${operation.id} is not registered under its id.`);
  const { params = {}, options = {}, query = "" } = goodRequests[id](as);
  return world.call(operation.method, fillPath(operation, params) + query, { ...options, ...change, as });
}

async function countAll(): Promise<string> {
  const tables = ["solver_case", "advice", "run", "run_revision", "machine", "audit", "idempotency_key", "edition", "run_log", "log_mapping", "webhook", "webhook_delivery", "draft", "replay", "proposal_search"];
  const { rows } = await world.owner.query(tables.map((table) => `select '${table}' as name, count(*)::int as n from ${table}`).join(" union all "));
  return JSON.stringify(rows);
}

// RFC 9110: 401 for nobody, 403 for somebody who may not; RFC 9457 for the body.
describe.each(allOperations.map((operation) => [operation.id, operation] as const))("%s", (_id, operation) => {
  it("is refused to somebody who is not signed in, and changes nothing", async () => {
    const before = await countAll();
    const answer = await attempt(operation, "nobody");
    expect(answer.status).toBe(401);
    expect(answer.headers.get("content-type")).toBe(problemMediaType);
    expect(answer.problem().status).toBe(401);
    expect(await countAll()).toBe(before);
  });

  it.each(roles.filter((role) => !mayRole(role, operation.permission)))("is refused to a member with the role %s, and changes nothing", async (role) => {
    const before = await countAll();
    expect((await attempt(operation, role)).status).toBe(403);
    expect(await countAll()).toBe(before);
  });

  it("is refused to a key that may only read, unless it only reads", async () => {
    const status = (await attempt(operation, "read-key")).status;
    if (isReadPermission(operation.permission)) expect(status).toBe(operation.status);
    else expect(status).toBe(403);
  });

  it("does not find another team's things", async () => {
    const before = await countAll();
    const answer = await attempt(operation, "foreigner");
    if (operation.params === null) {
      expect(answer.text).not.toContain(caseId);
      expect(answer.text).not.toContain(runId);
      return;
    }
    // Everybody has an edition 1: their own.
    if (ofOwnEdition.has(operation.id)) return expect(answer.status).toBe(200);
    expect(answer.status).toBe(404);
    expect(answer.text).not.toContain("Olive");
    expect(await countAll()).toBe(before);
  });

  it("refuses a method it does not have with 405 and says which it has", async () => {
    const answer = await world.call("PUT", fillPath(operation, goodRequestParams(operation)), { body: {} });
    expect(answer.status).toBe(405);
    expect(answer.headers.get("allow")).toContain(operation.method);
    expect(answer.problem().status).toBe(405);
  });
});

function goodRequestParams(operation: Operation): Record<string, string> {
  return ofOwnEdition.has(operation.id) ? { number: "1" } : { id: caseId, strategy: "direct-ldlt", replayId };
}

describe("every role that may", () => {
  // Deleting and withdrawing last: they change what the others use.
  const ordered = [...allOperations].sort((a, b) => Number(/delete|withdraw/.test(a.id)) - Number(/delete|withdraw/.test(b.id)));
  it.each(ordered.map((operation) => [operation.id, operation] as const))("can %s", async (_id, operation) => {
    for (const role of roles.filter((one) => mayRole(one, operation.permission))) {
      const answer = await attempt(operation, role);
      expect(answer.status, `${role}: ${answer.text.slice(0, 300)}`).toBe(operation.status);
      expect(answer.headers.get("cache-control")).toBe("no-store");
      expect(answer.headers.get("x-content-type-options")).toBe("nosniff");
      if (operation.id === "deleteLogMapping") mappingId = await makers.mapping();
      if (operation.id === "deleteWebhook") webhookId = await makers.webhook();
      if (operation.id === "deleteMachine") machineId = (await world.expect(201, operations.createMachine.response.schema, "POST", "/api/v1/machines", { body: sheet() })).id;
    }
  });

  it("finds a case by its number as well", async () => {
    expect((await world.call("GET", `/api/v1/cases/${caseNumber}`)).status).toBe(200);
  });
});

describe("a request from another site", () => {
  it.each([
    ["a foreign Origin", { origin: "https://elsewhere.example" }, 403],
    ["the Origin null", { origin: "null" }, 403],
    ["a foreign site named by the browser", { "sec-fetch-site": "cross-site" }, 403],
    ["our own Origin", { origin: "http://127.0.0.1:3999" }, 201],
  ])("with a cookie and %s gets %s", async (_name, headers, status) => {
    const answer = await attempt(operations.recordRun, "analyst", { headers });
    expect(answer.status).toBe(status);
  });

  it("with a key is judged by the key alone", async () => {
    expect((await attempt(operations.recordRun, "write-key", { headers: { origin: "https://elsewhere.example" } })).status).toBe(201);
  });
});

describe("addresses that are none", () => {
  it.each(["/api/v1/nothing", "/api/v1", "/api/v1/cases/1/runs/2/3"])("%s answers 404 as problem details", async (path) => {
    for (const method of ["GET", "POST", "DELETE"]) {
      const answer = await world.call(method, path);
      expect(answer.status).toBe(404);
      expect(answer.problem().errors).toEqual([]);
    }
  });
});
