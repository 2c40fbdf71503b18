import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { z } from "zod";
import { adviceSchema } from "@/lib/advice/advice";
import { operations } from "@/lib/api/contract";
import { caseDetailSchema, type CaseSummary } from "@/lib/api/contract/cases";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import { questionnaireSchema } from "@/lib/questionnaire/questionnaire-schema";
import { strategyIds } from "@/lib/shared/strategy-ids";
import { createdCase, recordedRun, startApiWorld, type ApiWorld } from "../support/api";

let world: ApiWorld;

beforeAll(async () => {
  world = await startApiWorld();
});
afterAll(() => world.close());

const create = (change: object = {}, as: "analyst" | "foreigner" = "analyst") => world.expect(201, createdCase, "POST", "/api/v1/cases", { as, body: { questionnaire: { ...defaultQuestionnaire, ...change } } });
const read = (reference: string | number) => world.expect(200, caseDetailSchema, "GET", `/api/v1/cases/${reference}`);
const list = (query: string) => world.expect(200, operations.listCases.response.schema, "GET", `/api/v1/cases?${query}`);

async function listAll(query: string, limit: number): Promise<CaseSummary[]> {
  const all: CaseSummary[] = [];
  for (let cursor: string | null = ""; cursor !== null; ) {
    const page: { items: CaseSummary[]; nextCursor: string | null } = await list(`${query}&limit=${limit}${cursor === "" ? "" : `&cursor=${cursor}`}`);
    all.push(...page.items);
    cursor = page.nextCursor;
  }
  return all;
}

describe("advice that is only asked for", () => {
  it("names every strategy once and saves nothing", async () => {
    const advice = await world.expect(200, adviceSchema, "POST", "/api/v1/advice", { as: "observer", body: defaultQuestionnaire });
    expect(advice.ranking.map(({ strategy }) => strategy).sort()).toEqual([...strategyIds].sort());
    const { rows } = await world.owner.query("select count(*)::int as n from advice");
    expect(rows[0].n).toBe(0);
  });

  it("is the same text byte for byte for the same answers and record, and another once a run speaks", async () => {
    const ask = async () => (await world.call("POST", "/api/v1/advice", { body: defaultQuestionnaire })).text;
    const before = await ask();
    expect(await ask()).toBe(before);
    const made = await create();
    expect(await ask()).toBe(before);
    await world.expect(201, recordedRun, "POST", `/api/v1/cases/${made.id}/runs`, { body: { strategy: "direct-ldlt", outcome: "converged", setupSeconds: 1000, solveSeconds: 10 } });
    const after = await ask();
    expect(await ask()).toBe(after);
    const [was, is] = [before, after].map((text) => adviceSchema.parse(JSON.parse(text)));
    expect([was?.evidence, is?.evidence.runs]).toEqual([{ asOf: "", runs: 0 }, 1]);
    expect(is?.evidence.asOf).toMatch(/^\d{4}-\d\d-\d\dT/);
    expect(is?.ranking.find(({ strategy }) => strategy === "direct-ldlt")?.evidenceRuns).toBe(1);
  });

  it("does not hear runs of another team, withdrawn ones, or ones that did not meet the true residual", async () => {
    const heard = async () => (await world.expect(200, adviceSchema, "POST", "/api/v1/advice", { body: defaultQuestionnaire })).evidence.runs;
    const before = await heard();
    const body = { strategy: "bddc", outcome: "converged", setupSeconds: 1, solveSeconds: 1 };
    const theirs = await create({}, "foreigner");
    await world.expect(201, recordedRun, "POST", `/api/v1/cases/${theirs.id}/runs`, { as: "foreigner", body });
    const ours = await create();
    await world.expect(201, recordedRun, "POST", `/api/v1/cases/${ours.id}/runs`, { body: { ...body, trueRelativeResidual: 1e-2 } });
    expect(await heard()).toBe(before);
    const { id } = await world.expect(201, recordedRun, "POST", `/api/v1/cases/${ours.id}/runs`, { body });
    expect(await heard()).toBe(before + 1);
    await world.call("POST", `/api/v1/runs/${id}/withdraw`, { body: {} });
    expect(await heard()).toBe(before);
  });
});

describe("a case", () => {
  it("is read by its UUID and by its number, with its advice frozen as given", async () => {
    const made = await create({ title: "River bend" });
    const byId = await read(made.id);
    expect(await read(made.number)).toEqual(byId);
    expect(byId).toMatchObject({ title: "River bend", status: "no-run", runs: 0, author: { name: "The analyst" }, adviceChanges: [], runList: [] });
    expect(byId.advice).toEqual(made.advice);
    expect(byId.adviceGiven).toHaveLength(1);
    expect(byId.limits).toEqual({ tolerance: 1e-6, repeatedSolves: 1, timeLimitSeconds: null, memoryGiB: 128, cores: 32 });
  });

  it("without a title gets one that says what it is", async () => {
    expect((await read((await create({ degree: 2 })).id)).title).toMatch(/^Cubes, degree 2, \d/);
  });

  it("is copied as a questionnaire that makes the same case again", async () => {
    const made = await create({ title: "Twin", contrast: { ratio: 1000, pattern: "layers" } });
    const copy = await world.expect(200, questionnaireSchema, "GET", `/api/v1/cases/${made.number}/questionnaire`);
    const twin = await world.expect(201, createdCase, "POST", "/api/v1/cases", { body: { questionnaire: copy } });
    expect(twin.advice.sizes).toEqual(made.advice.sizes);
  });

  it("advised again keeps the former advice and says what changed", async () => {
    const made = await create({ degree: 3 });
    const first = made.advice.ranking[0]?.strategy ?? "";
    for (let repeat = 0; repeat < 4; repeat++) {
      await world.expect(201, recordedRun, "POST", `/api/v1/cases/${made.id}/runs`, { body: { strategy: first, outcome: "converged", setupSeconds: 5000, solveSeconds: 5000 } });
    }
    const again = await world.expect(201, operations.adviseAgain.response.schema, "POST", `/api/v1/cases/${made.id}/advice`);
    expect(again.sequence).toBe(2);
    expect(again.changes.join(" ")).toContain("recorded runs speak instead of");
    const detail = await read(made.id);
    expect(detail.advice).toEqual(again.advice);
    expect(detail.adviceChanges).toEqual(again.changes);
    expect(detail.adviceGiven.map(({ sequence }) => sequence)).toEqual([2, 1]);
    const kept = await world.owner.query("select content from advice where case_id = $1 and sequence = 1", [made.id]);
    expect(adviceSchema.parse(kept.rows[0].content)).toEqual(made.advice);
  });

  it("on a machine sheet keeps the hardware it was advised for when the sheet changes, and keeps the sheet from being deleted", async () => {
    const sheet = { name: "Two nodes", coresPerNode: 16, nodes: 2, memoryPerNodeGiB: 64, bandwidthPerNodeGBps: 100, gflopsPerCore: 10, networkLatencyMicroseconds: 2, networkBandwidthGBps: 10 };
    const machine = await world.expect(201, operations.createMachine.response.schema, "POST", "/api/v1/machines", { body: sheet });
    const made = await create({ hardware: { machineId: machine.id, cores: 32 } });
    await world.expect(200, operations.updateMachine.response.schema, "PATCH", `/api/v1/machines/${machine.id}`, { body: { memoryPerNodeGiB: 1 } });
    expect(await read(made.id)).toMatchObject({ limits: { memoryGiB: 128, cores: 32 }, machine: { id: machine.id, name: "Two nodes" } });
    expect((await world.call("DELETE", `/api/v1/machines/${machine.id}`)).status).toBe(409);
    const taken = await world.call("POST", "/api/v1/machines", { body: sheet });
    expect([taken.status, taken.problem().errors[0]?.path]).toEqual([422, "name"]);
  });

  it("gives an options file or a recipe, and a batch script, for every strategy", async () => {
    const made = await create();
    for (const strategy of strategyIds) {
      const options = await world.call("GET", `/api/v1/cases/${made.number}/options/${strategy}`);
      expect([options.status, options.headers.get("content-type")]).toEqual([200, "text/plain; charset=utf-8"]);
      expect(options.text.length).toBeGreaterThan(40);
      const script = await world.call("GET", `/api/v1/cases/${made.number}/batch-script/${strategy}`);
      expect(script.text).toMatch(/^#!\/bin\/bash\n#SBATCH --job-name=saddlemark-/);
      expect(script.text).toContain("#SBATCH --ntasks=32");
    }
    expect((await world.call("GET", `/api/v1/cases/${made.number}/options/magic`)).status).toBe(404);
  });
});

describe("the case list", () => {
  beforeAll(async () => {
    for (const [index, title] of ["alpha", "Beta", "beta", "ALPHA", "100% sure", "under_score"].entries()) {
      await create({ title: `Sorted ${title}`, degree: 1 + (index % 2), size: { by: "unknowns", value: 50_000 * (1 + (index % 3)) } });
    }
  });

  it.each(["number", "-number", "title", "-title", "unknowns", "-unknowns", "degree", "-degree"])("sorted by %s is the same whatever the page's length, none twice and none lost", async (sort) => {
    const whole = await listAll(`sort=${sort}`, 200);
    const paged = await listAll(`sort=${sort}`, 3);
    expect(paged.map(({ number }) => number)).toEqual(whole.map(({ number }) => number));
    expect(new Set(whole.map(({ number }) => number)).size).toBe(whole.length);
    const values = whole.map((item) => ({ number: item.number, title: item.title.toLowerCase(), unknowns: item.unknowns, degree: item.degree })).map((item) => Object.entries(item).find(([name]) => sort.endsWith(name))?.[1] ?? 0);
    const sorted = [...values].sort((a, b) => (a < b ? -1 : a > b ? 1 : 0));
    expect(values).toEqual(sort.startsWith("-") ? sorted.reverse() : sorted);
  });

  it("stays whole while cases are added between its pages", async () => {
    const first = await list("limit=2&sort=-number");
    await create();
    const second = await list(`limit=2&sort=-number&cursor=${first.nextCursor}`);
    const numbers = [...first.items, ...second.items].map(({ number }) => number);
    expect(numbers).toEqual([0, 1, 2, 3].map((step) => (numbers[0] ?? 0) - step));
  });

  it.each([
    ["q=100%25", ["Sorted 100% sure"]],
    ["q=under_", ["Sorted under_score"]],
    ["q=sorted+BETA", ["Sorted Beta", "Sorted beta"]],
    ["q=%23999999", []],
  ])("searched by %s finds what is meant", async (query, titles) => {
    expect((await list(`${query}&sort=number`)).items.map(({ title }) => title)).toEqual(titles);
  });

  it("is found by number, and filtered by degree, family, first strategy and author", async () => {
    const all = await listAll("sort=number", 200);
    const [some] = all;
    if (some === undefined) throw new Error("There are cases.");
    expect((await list(`q=%23${some.number}`)).items.map(({ number }) => number)).toContain(some.number);
    expect((await listAll("degree=2", 200)).map(({ number }) => number).sort()).toEqual(all.filter(({ degree }) => degree === 2).map(({ number }) => number).sort());
    expect(await listAll("meshFamily=voronoi", 200)).toEqual([]);
    expect((await listAll(`strategy=${some.firstStrategy}`, 200)).length).toBe(all.filter(({ firstStrategy }) => firstStrategy === some.firstStrategy).length);
    expect((await listAll(`author=${some.author?.id}`, 200)).every(({ author }) => author?.id === some.author?.id)).toBe(true);
  });

  it("leaves as CSV with the same filter, and no cell runs as a formula", async () => {
    await create({ title: "=1+1" });
    const answer = await world.call("GET", "/api/v1/cases/export.csv?sort=-number");
    const lines = answer.text.trimEnd().split("\r\n");
    expect(lines[0]).toContain("number,title,discretisation");
    expect(lines[1]).toContain(",'=1+1,");
    expect(lines.length - 1).toBe((await listAll("sort=number", 200)).length);
    expect((await world.call("GET", "/api/v1/cases/export.csv?q=100%25")).text.trimEnd().split("\r\n")).toHaveLength(2);
  });
});

describe("the export", () => {
  const exportSchema = z.looseObject({ format: z.string(), cases: z.array(z.looseObject({ title: z.string() })), runs: z.array(z.unknown()), advice: z.array(z.unknown()), audit: z.array(z.unknown()), editions: z.array(z.unknown()), members: z.array(z.looseObject({ email: z.string() })) });

  it("holds all of the team's rows and none of another's, as one object and line by line", async () => {
    const answer = await world.call("GET", "/api/v1/export");
    const whole = exportSchema.parse(answer.json());
    for (const [name, table] of Object.entries({ cases: "solver_case", runs: "run", advice: "advice", audit: "audit", editions: "edition" })) {
      const { rows } = await world.owner.query(`select count(*)::int as n from ${table} where team_id = $1`, [world.teamId]);
      expect(whole[name], name).toHaveLength(rows[0].n);
    }
    expect(whole.members.map(({ email }) => email).sort()).toEqual(["analyst@example.org", "curator@example.org", "observer@example.org", "owner@example.org"]);
    expect(answer.text).not.toContain("foreigner");
    const lines = (await world.call("GET", "/api/v1/export?format=ndjson")).text.trimEnd().split("\n").map((line) => z.object({ section: z.string(), item: z.unknown() }).parse(JSON.parse(line)));
    expect(lines.filter(({ section }) => section === "cases")).toHaveLength(whole.cases.length);
    expect(lines[0]).toMatchObject({ section: "export", item: { format: "saddlemark-export/1" } });
  });

  it("holds no password, key or session", async () => {
    const { text } = await world.call("GET", "/api/v1/export");
    const { rows } = await world.owner.query<{ secret: string }>(
      `select password as secret from account where password is not null union all select key from apikey union all select token from session`,
    );
    expect(rows.length).toBeGreaterThan(5);
    for (const { secret } of rows) expect(text.includes(secret)).toBe(false);
  });
});

describe("an edition", () => {
  it("counts for each rule the advice in which it fired", async () => {
    const edition = await world.expect(200, operations.getEdition.response.schema, "GET", "/api/v1/rulebook/editions/live");
    const { rows } = await world.owner.query<{ rule: string; n: number }>("select rule, count(*)::int as n from advice, unnest(fired_rules) rule where team_id = $1 group by rule", [world.teamId]);
    expect(edition).toMatchObject({ number: 1, live: true, origin: "first" });
    for (const { rule, count } of edition.fired) expect(count, rule).toBe(rows.find((row) => row.rule === rule)?.n ?? 0);
    expect(rows.length).toBeGreaterThan(3);
  });
});
