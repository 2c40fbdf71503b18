import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { afterAll, beforeAll, expect, it } from "vitest";
import { operations } from "@/lib/api/contract";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import { createdCase, recordedRun, startApiWorld, type ApiWorld } from "../support/api";

let world: ApiWorld;
let casePath: string;

const read = operations.readLog.response.schema;
const log = readFileSync(fileURLToPath(new URL("../reference/logs/s2_minres_tet8-RT1_cb1e4_np1.log", import.meta.url)));

beforeAll(async () => {
  world = await startApiWorld();
  const made = await world.expect(201, createdCase, "POST", "/api/v1/cases", { body: { questionnaire: defaultQuestionnaire } });
  casePath = `/api/v1/cases/${made.id}`;
});
afterAll(() => world.close());

async function count(table: string): Promise<number> {
  const { rows } = await world.owner.query<{ n: number }>(`select count(*)::int as n from ${table}`);
  return rows[0]?.n ?? -1;
}

const sendLog = (key: string, rawBody: BodyInit, query = "") =>
  world.call("POST", `${casePath}/logs${query}`, { as: "write-key", rawBody, headers: { "content-type": "text/plain", "idempotency-key": key } });

it("a log sent again under its key is answered with the first run, 200", async () => {
  const first = await sendLog("job-1", log);
  const again = await sendLog("job-1", log);
  expect([first.status, again.status]).toEqual([201, 200]);
  expect(read.parse(again.json())).toEqual(read.parse(first.json()));
});

it("another log, or other corrections, under the same key answer 409 and record nothing", async () => {
  await sendLog("job-2", log);
  const runs = await count("run");
  expect((await sendLog("job-2", Buffer.concat([log, Buffer.from("more\n")]))).status).toBe(409);
  expect((await sendLog("job-2", log, "?setupSeconds=3")).status).toBe(409);
  expect(await count("run")).toBe(runs);
});

it("a series of runs sent again under its key is recorded once", async () => {
  const body = [1, 2].map((cores) => ({ strategy: "bddc", outcome: "converged", cores }));
  const headers = { "idempotency-key": "series" };
  const first = await world.expect(201, operations.recordRuns.response.schema, "POST", `${casePath}/runs/batch`, { body, headers });
  expect(await world.expect(200, operations.recordRuns.response.schema, "POST", `${casePath}/runs/batch`, { body, headers })).toEqual(first);
});

it("200 identical logs at once under one key record one run", async () => {
  const [runs, logs, audits] = [await count("run"), await count("run_log"), await count("audit")];
  const answers = await Promise.all(Array.from({ length: 200 }, () => sendLog("storm", log)));
  expect(answers.filter(({ status }) => status === 201)).toHaveLength(1);
  expect(answers.filter(({ status }) => status === 200)).toHaveLength(199);
  expect(new Set(answers.map(({ json }) => read.parse(json()).runId)).size).toBe(1);
  expect([await count("run"), await count("run_log"), await count("audit")]).toEqual([runs + 1, logs + 1, audits + 1]);
});

it("2 000 different runs at once all arrive", { timeout: 300_000 }, async () => {
  const runs = await count("run");
  const answers = await Promise.all(
    Array.from({ length: 2000 }, (_, index) =>
      world.call("POST", `${casePath}/runs`, {
        as: "write-key",
        body: { strategy: "schur-diag-direct", outcome: "converged", iterations: index },
        headers: { "idempotency-key": `one-${index}` },
      }),
    ),
  );
  const refused = answers.filter(({ status }) => status !== 201).map(({ status, text }) => `${status} ${text}`);
  expect(refused.slice(0, 3)).toEqual([]);
  expect(new Set(answers.map(({ json }) => recordedRun.parse(json()).id)).size).toBe(2000);
  expect(await count("run")).toBe(runs + 2000);
});
