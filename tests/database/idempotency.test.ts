import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { operations } from "@/lib/api/contract";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import { createdCase, recordedRun, startApiWorld, type ApiWorld } from "../support/api";

let world: ApiWorld;
let runsPath: string;
let caseId: string;

const run = { strategy: "schur-diag-direct", outcome: "converged", setupSeconds: 1, solveSeconds: 2 };

beforeAll(async () => {
  world = await startApiWorld();
  caseId = (await world.expect(201, createdCase, "POST", "/api/v1/cases", { body: { questionnaire: defaultQuestionnaire } })).id;
  runsPath = `/api/v1/cases/${caseId}/runs`;
});
afterAll(() => world.close());

async function count(table: string): Promise<number> {
  const { rows } = await world.owner.query<{ n: number }>(`select count(*)::int as n from ${table}`);
  return rows[0]?.n ?? -1;
}

const keyed = (key: string) => ({ headers: { "idempotency-key": key } });

describe("the same Idempotency-Key", () => {
  it("with the same body records one run, and answers 200 with its id and comparison", async () => {
    const runs = await count("run");
    const first = await world.expect(201, recordedRun, "POST", runsPath, { body: run, ...keyed("one") });
    const again = await world.expect(200, recordedRun, "POST", runsPath, { body: run, ...keyed("one") });
    expect(again).toEqual(first);
    const reordered = await world.expect(200, recordedRun, "POST", runsPath, { body: { solveSeconds: 2, setupSeconds: 1, outcome: "converged", strategy: "schur-diag-direct" }, ...keyed("one") });
    expect(reordered.id).toBe(first.id);
    expect(await count("run")).toBe(runs + 1);
  });

  it("with another body, or for another call, answers 409 and records nothing", async () => {
    await world.expect(201, recordedRun, "POST", runsPath, { body: run, ...keyed("two") });
    const runs = await count("run");
    expect((await world.call("POST", runsPath, { body: { ...run, solveSeconds: 3 }, ...keyed("two") })).status).toBe(409);
    expect((await world.call("POST", "/api/v1/cases", { body: { questionnaire: defaultQuestionnaire }, ...keyed("two") })).status).toBe(409);
    expect(await count("run")).toBe(runs);
  });

  it("sent 200 times at once records one run", async () => {
    const runs = await count("run");
    const audits = await count("audit");
    const answers = await Promise.all(Array.from({ length: 200 }, () => world.call("POST", runsPath, { body: run, ...keyed("storm") })));
    expect(answers.filter(({ status }) => status === 201)).toHaveLength(1);
    expect(answers.filter(({ status }) => status === 200)).toHaveLength(199);
    expect(new Set(answers.map(({ json }) => recordedRun.parse(json()).id)).size).toBe(1);
    expect(await count("run")).toBe(runs + 1);
    expect(await count("audit")).toBe(audits + 1);
  });

  it("is forgotten with a call that failed, so that the mended call can use it", async () => {
    expect((await world.call("POST", "/api/v1/cases/999/runs", { body: run, ...keyed("three") })).status).toBe(404);
    await world.expect(201, recordedRun, "POST", runsPath, { body: run, ...keyed("three") });
  });

  it("belongs to one team", async () => {
    await world.expect(201, createdCase, "POST", "/api/v1/cases", { body: { questionnaire: defaultQuestionnaire }, ...keyed("shared") });
    const theirs = await world.expect(201, createdCase, "POST", "/api/v1/cases", { as: "foreigner", body: { questionnaire: defaultQuestionnaire }, ...keyed("shared") });
    expect(theirs.number).toBe(1);
  });

  it("makes a case, advice again and an import once too", async () => {
    const cases = await count("solver_case");
    const body = { questionnaire: { ...defaultQuestionnaire, degree: 2 } };
    const made = await world.expect(201, createdCase, "POST", "/api/v1/cases", { body, ...keyed("case") });
    expect(await world.expect(200, createdCase, "POST", "/api/v1/cases", { body, ...keyed("case") })).toEqual(made);
    expect(await count("solver_case")).toBe(cases + 1);

    const advised = operations.adviseAgain.response.schema;
    const first = await world.expect(201, advised, "POST", `/api/v1/cases/${made.id}/advice`, keyed("advice"));
    expect((await world.expect(200, advised, "POST", `/api/v1/cases/${made.id}/advice`, keyed("advice"))).adviceId).toBe(first.adviceId);

    const runs = await count("run");
    const options = { rawBody: `${JSON.stringify({ ...run, caseId: made.number })}\n`, headers: { "content-type": "application/x-ndjson", "idempotency-key": "import" } };
    const imported = await world.expect(201, operations.importRuns.response.schema, "POST", "/api/v1/runs/import", options);
    expect(await world.expect(200, operations.importRuns.response.schema, "POST", "/api/v1/runs/import", options)).toEqual(imported);
    expect(await count("run")).toBe(runs + 1);
  });
});

describe("without a key", () => {
  it("two equal reports are two runs", async () => {
    const one = await world.expect(201, recordedRun, "POST", runsPath, { body: run });
    const two = await world.expect(201, recordedRun, "POST", runsPath, { body: run });
    expect(one.id).not.toBe(two.id);
  });

  it("40 cases at once get 40 numbers without a hole", async () => {
    const answers = await Promise.all(
      Array.from({ length: 40 }, () => world.expect(201, createdCase, "POST", "/api/v1/cases", { as: "foreigner", body: { questionnaire: defaultQuestionnaire } })),
    );
    const numbers = answers.map(({ number }) => number).sort((a, b) => a - b);
    expect(numbers).toEqual(Array.from({ length: 40 }, (_, index) => index + 2));
  });
});
