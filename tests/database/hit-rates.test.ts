import { randomUUID } from "node:crypto";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { operations } from "@/lib/api/contract";
import type { CaseStatus } from "@/lib/api/contract/cases";
import type { DrillDown } from "@/lib/hit-rates/filter";
import { meshFamilies } from "@/lib/questionnaire/answer-sets";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import { outcomes, type Outcome } from "@/lib/runs/run";
import { seededRandom } from "@/lib/shared/random";
import { createdCase, recordedRun, startApiWorld, type ApiWorld } from "../support/api";

/*
 * The reference below is written from the product's definitions of a hit alone, in the plainest way, with loops over plain rows: it
 * shares no code with the query or the rates it is held against.
 */

type PlainRun = {
  id: string; strategy: string; name: string | null; outcome: Outcome; adviceSequence: number; cores: number; setup: number | null; solve: number | null;
  memory: number | null; residual: number | null; measuredAt: string; recordedAt: string; withdrawn: boolean;
};
type PlainCase = {
  id: string; number: number; degree: number; family: string; cores: number; tolerance: number; repeats: number; limit: number | null; memory: number;
  advice: { id: string; sequence: number; edition: number; first: string | null; rules: string[] }[]; runs: PlainRun[];
};

const strategies = ["direct-ldlt", "schur-diag-direct", "schur-diag-amg", "bddc"] as const;
let world: ApiWorld;
let cases: PlainCase[];

beforeAll(async () => {
  world = await startApiWorld();
  cases = randomCases(160, 20261207);
  await store(cases);
});
afterAll(() => world.close());

function randomCases(count: number, seed: number): PlainCase[] {
  const random = seededRandom(seed);
  const pick = <T,>(values: readonly [T, ...T[]] | readonly T[]): T | undefined => values[Math.floor(random() * values.length)];
  const maybe = (share: number, value: number) => (random() < share ? value : null);
  return Array.from({ length: count }, (_, index) => {
    const advice = Array.from({ length: 1 + Math.floor(random() * 3) }, (_unused, step) => ({
      id: randomUUID(), sequence: step + 1, edition: 1 + Math.floor(random() * 3), first: random() < 0.95 ? (pick(strategies) ?? null) : null,
      rules: ["rule-a", "rule-b", "rule-c"].filter(() => random() < 0.4),
    }));
    const cores = random() < 0.5 ? 16 : 32;
    const runs = Array.from({ length: Math.floor(random() * 9) }, () => {
      const strategy = random() < 0.1 ? "other" : (pick(strategies) ?? "bddc");
      return {
        id: randomUUID(), strategy, name: strategy === "other" ? (pick(["alpha", "beta"]) ?? null) : null,
        outcome: random() < 0.7 ? ("converged" as const) : (pick(outcomes) ?? "broken"), adviceSequence: 1 + Math.floor(random() * advice.length),
        cores: random() < 0.85 ? cores : 64, setup: maybe(0.9, 10 ** (2 * random() - 1)), solve: maybe(0.9, 10 ** (2 * random() - 1)), memory: maybe(0.7, 200 * random()),
        residual: maybe(0.7, 10 ** (-9 + 5 * random())),
        // Few distinct instants, so that ties happen.
        measuredAt: `2026-0${1 + Math.floor(random() * 4)}-0${1 + Math.floor(random() * 3)}T00:00:00.000Z`,
        recordedAt: `2026-06-01T00:00:0${Math.floor(random() * 3)}.000Z`, withdrawn: random() < 0.15,
      };
    });
    return {
      id: randomUUID(), number: index + 1, degree: 1 + Math.floor(random() * 3), family: pick(meshFamilies) ?? "cubes", cores, tolerance: 1e-6,
      repeats: random() < 0.8 ? 1 : 20, limit: random() < 0.5 ? 60 : null, memory: 128, advice, runs,
    };
  });
}

async function store(all: readonly PlainCase[]): Promise<void> {
  const insert = (table: string, row: Record<string, unknown>) => {
    const names = Object.keys(row);
    return world.owner.query(`insert into ${table} (${names.join(", ")}) values (${names.map((_, index) => `$${index + 1}`).join(", ")})`, Object.values(row));
  };
  for (const one of all) {
    const hardware = { cores: one.cores, nodes: 1, memoryPerNodeGiB: one.memory, timeLimitSeconds: one.limit };
    await insert("solver_case", {
      id: one.id, team_id: world.teamId, number: one.number, title: `Case ${one.number}`, questionnaire: JSON.stringify(defaultQuestionnaire),
      answers: JSON.stringify({ ...defaultQuestionnaire, tolerance: one.tolerance, repeatedSolves: one.repeats, hardware }),
      discretisation: "vem-mixed", degree: one.degree, mesh_family: one.family, contrast_ratio: 1, unknowns: 1000 + one.number, cores: one.cores,
    });
    for (const given of one.advice) {
      await insert("advice", {
        id: given.id, team_id: world.teamId, case_id: one.id, sequence: given.sequence, edition_number: given.edition, model_version: "test",
        first_strategy: given.first, fired_rules: given.rules, content: "{}",
      });
    }
    for (const run of one.runs) {
      await insert("run", {
        id: run.id, team_id: world.teamId, case_id: one.id, advice_id: one.advice[run.adviceSequence - 1]?.id, strategy: run.strategy, strategy_name: run.name, outcome: run.outcome,
        cores: run.cores, setup_seconds: run.setup, solve_seconds: run.solve, peak_memory_gib: run.memory, true_relative_residual: run.residual, source: "api",
        measured_at: run.measuredAt, recorded_at: run.recordedAt, withdrawn_at: run.withdrawn ? "2026-07-01T00:00:00Z" : null,
      });
    }
  }
}

type Verdict = { case: PlainCase; advice: PlainCase["advice"][number]; month: string | null; day: string | null; status: CaseStatus; best: boolean | null; regret: number | null; leftOut: boolean; costs: Map<string, number>; fastest: number };

const keyOf = (run: PlainRun) => (run.strategy === "other" ? `other:${run.name}` : run.strategy);
const converged = (run: PlainRun, one: PlainCase) => run.outcome === "converged" && (run.residual === null || run.residual <= 10 * one.tolerance);
const total = (run: PlainRun, one: PlainCase) => (run.setup === null || run.solve === null ? null : run.setup + one.repeats * run.solve);

/** Compared runs of one strategy after one advice: the first not withdrawn on the case's cores. */
function firstAfter(one: PlainCase, sequence: number, key: string): PlainRun | undefined {
  const order = (run: PlainRun) => `${run.measuredAt} ${run.recordedAt} ${run.id}`;
  const found = one.runs.filter((run) => run.adviceSequence === sequence && keyOf(run) === key && !run.withdrawn && run.cores === one.cores);
  return found.sort((a, b) => (order(a) < order(b) ? -1 : 1))[0];
}

function judgePlainly(one: PlainCase): Verdict {
  const latestFirst = [...one.advice].reverse();
  const judged = latestFirst.find((given) => given.first !== null && firstAfter(one, given.sequence, given.first));
  const latest = latestFirst[0];
  if (latest === undefined) throw new Error("Every case has advice.");
  const none = { best: null, regret: null, leftOut: false, costs: new Map<string, number>(), fastest: 0 };
  const advised = judged?.first ? firstAfter(one, judged.sequence, judged.first) : undefined;
  if (judged === undefined || advised === undefined) {
    return { case: one, advice: latest, month: null, day: null, status: one.runs.some((run) => !run.withdrawn) ? "run" : "no-run", ...none };
  }
  const advisedTotal = total(advised, one);
  const worked =
    converged(advised, one) && (one.limit === null || advisedTotal === null || advisedTotal <= one.limit) && (advised.memory === null || advised.memory <= one.memory);
  const others: PlainRun[] = [];
  for (const key of new Set(one.runs.map(keyOf))) {
    if (key === keyOf(advised)) continue;
    for (const given of latestFirst) {
      const run = firstAfter(one, given.sequence, key);
      if (run) {
        others.push(run);
        break;
      }
    }
  }
  const verdict = { case: one, advice: judged, month: advised.measuredAt.slice(0, 7), day: advised.measuredAt.slice(0, 10), status: worked ? ("worked" as const) : ("missed" as const) };
  const timed = (run: PlainRun) => !converged(run, one) || total(run, one) !== null;
  const rivals = others.filter(timed);
  if (!timed(advised) || rivals.length === 0) return { ...verdict, ...none };
  const good = [advised, ...rivals].filter((run) => converged(run, one)).map((run) => total(run, one) ?? 0);
  if (good.length === 0) return { ...verdict, ...none, leftOut: true };
  const penalty = 10 * (one.limit ?? Math.max(...good));
  const costs = new Map([advised, ...rivals].map((run) => [keyOf(run), converged(run, one) ? (total(run, one) ?? 0) : penalty]));
  const cost = costs.get(keyOf(advised)) ?? Number.NaN;
  const rivalTimes = rivals.filter((run) => converged(run, one)).map((run) => total(run, one) ?? 0);
  const fastest = Math.min(...good);
  return { ...verdict, best: converged(advised, one) && rivalTimes.every((time) => cost <= 1.25 * time), regret: Math.max(1, cost / fastest), leftOut: false, costs, fastest };
}

const isJudged = (verdict: Verdict) => verdict.status === "worked" || verdict.status === "missed";

function plainRates(verdicts: readonly Verdict[]) {
  const judged = verdicts.filter(isJudged);
  const contested = judged.filter((verdict) => verdict.regret !== null);
  const regret = contested.length === 0 ? null : Math.exp(contested.reduce((sum, verdict) => sum + Math.log(verdict.regret ?? 1), 0) / contested.length);
  return {
    worked: { x: judged.filter((verdict) => verdict.status === "worked").length, n: judged.length },
    best: { x: contested.filter((verdict) => verdict.best).length, n: contested.length },
    regret,
    leftOut: judged.filter((verdict) => verdict.leftOut).length,
  };
}

const readRates = (query = "") => world.expect(200, operations.hitRates.response.schema, "GET", `/api/v1/hit-rates${query}`);

async function casesBehind(filter: DrillDown | Record<string, string | number>): Promise<number[]> {
  const parameters = new URLSearchParams(Object.entries(filter).map(([name, value]) => [name, String(value)]));
  const numbers: number[] = [];
  for (let cursor: string | null = ""; cursor !== null; ) {
    const page: { items: { number: number }[]; nextCursor: string | null } = await world.expect(200, operations.listCases.response.schema, "GET", `/api/v1/cases?limit=200&${parameters}${cursor === "" ? "" : `&cursor=${cursor}`}`);
    numbers.push(...page.items.map(({ number }) => number));
    cursor = page.nextCursor;
  }
  return numbers.sort((a, b) => a - b);
}

const numbersOf = (verdicts: readonly Verdict[]) => verdicts.map((verdict) => verdict.case.number).sort((a, b) => a - b);

describe("hit rates of random records", () => {
  it("agree with the plain reading of the definitions, overall", async () => {
    const rates = await readRates();
    const plain = plainRates(cases.map(judgePlainly));
    expect(rates.worked).toMatchObject(plain.worked);
    expect(rates.best).toMatchObject(plain.best);
    expect(rates.regret.value).toBeCloseTo(plain.regret ?? Number.NaN, 9);
    expect(rates.leftOut).toBe(plain.leftOut);
    expect(rates.cases).toBe(cases.length);
    // The record is worth testing on: all kinds of outcome occur.
    expect(plain.worked.x).toBeGreaterThan(20);
    expect(plain.worked.n - plain.worked.x).toBeGreaterThan(20);
    expect(plain.best.x).toBeGreaterThan(10);
    expect(plain.leftOut).toBeGreaterThan(0);
  });

  it("gap closed agrees with the plain reading", async () => {
    const contested = cases.map(judgePlainly).filter((verdict) => verdict.regret !== null);
    const candidates = strategies.map((strategy) => {
      const both = contested.filter((verdict) => verdict.costs.has(strategy));
      const mean = (of: (verdict: Verdict) => number) => both.reduce((sum, verdict) => sum + Math.log(of(verdict)), 0) / both.length;
      return { strategy, n: both.length, single: mean((verdict) => Math.max(1, (verdict.costs.get(strategy) ?? 0) / verdict.fastest)), advice: mean((verdict) => verdict.regret ?? 1) };
    });
    const most = Math.max(...candidates.map(({ n }) => n));
    const [best] = candidates.filter(({ n }) => n >= Math.min(most, contested.length / 2)).sort((a, b) => a.single - b.single);
    const rates = await readRates();
    expect(rates.gapClosed).toMatchObject({ singleStrategy: best?.strategy, n: best?.n });
    expect(rates.gapClosed.value).toBeCloseTo(1 - (best?.advice ?? 0) / (best?.single ?? 1), 9);
  });

  it("agree in every group, and /cases shows exactly the cases behind each", async () => {
    const verdicts = cases.map(judgePlainly);
    const rates = await readRates();
    const membersOf: Record<string, (key: string) => Verdict[]> = {
      month: (key) => verdicts.filter((verdict) => verdict.month === key),
      "mesh-degree": (key) => verdicts.filter((verdict) => `${verdict.case.family}/${verdict.case.degree}` === key),
      strategy: (key) => verdicts.filter((verdict) => verdict.advice.first === key),
      edition: (key) => verdicts.filter((verdict) => String(verdict.advice.edition) === key),
      rule: (key) => verdicts.filter((verdict) => verdict.advice.rules.includes(key)),
    };
    for (const group of rates.groups) {
      const members = membersOf[group.by]?.(group.key) ?? [];
      const plain = plainRates(members);
      expect(group.worked, group.key).toMatchObject(plain.worked);
      expect(group.best, group.key).toMatchObject(plain.best);
      expect(group.leftOut, group.key).toBe(plain.leftOut);
      if (group.rule) expect(group.rule).toMatchObject({ fired: members.length, followed: plain.worked.n });
    }
    expect(rates.groups.length).toBeGreaterThan(25);
    for (const group of rates.groups.filter((_, index) => index % 4 === 0)) {
      expect(await casesBehind(group.filter), `${group.by} ${group.key}`).toEqual(numbersOf(membersOf[group.by]?.(group.key) ?? []));
    }
  });

  it.each([
    ["worked", (verdict: Verdict) => verdict.status === "worked"],
    ["missed", (verdict: Verdict) => verdict.status === "missed"],
    ["contested", (verdict: Verdict) => verdict.regret !== null],
    ["best", (verdict: Verdict) => verdict.best === true],
    ["beaten", (verdict: Verdict) => verdict.best === false],
    ["left-out", (verdict: Verdict) => verdict.leftOut],
    ["not-judged", (verdict: Verdict) => !isJudged(verdict)],
  ] as const)("lead to exactly the cases that %s counts", async (result, matches) => {
    expect(await casesBehind({ result })).toEqual(numbersOf(cases.map(judgePlainly).filter(matches)));
  });

  it.each(["no-run", "run", "worked", "missed"] as const)("share their verdict with the status %s of the case list", async (status) => {
    const expected = numbersOf(cases.map(judgePlainly).filter((verdict) => verdict.status === status));
    expect(await casesBehind({ status })).toEqual(expected);
    const page = await world.expect(200, operations.listCases.response.schema, "GET", `/api/v1/cases?limit=200&status=${status}`);
    expect(new Set(page.items.map((item) => item.status))).toEqual(new Set(expected.length > 0 ? [status] : []));
  });

  it("keep to their filter", async () => {
    const rates = await readRates("?degree=2&from=2026-02-01&to=2026-03-02");
    const plain = plainRates(cases.map(judgePlainly).filter((verdict) => verdict.case.degree === 2 && verdict.day !== null && verdict.day >= "2026-02-01" && verdict.day <= "2026-03-02"));
    expect(rates.worked).toMatchObject(plain.worked);
    expect(plain.worked.n).toBeGreaterThan(3);
  });
});

describe("hit rates over the API", () => {
  it("move when a run is recorded, corrected and withdrawn", async () => {
    const read = async () => (await world.expect(200, operations.hitRates.response.schema, "GET", "/api/v1/hit-rates", { as: "foreigner" })).worked;
    const made = await world.expect(201, createdCase, "POST", "/api/v1/cases", { as: "foreigner", body: { questionnaire: defaultQuestionnaire } });
    expect(await read()).toMatchObject({ x: 0, n: 0 });
    const first = made.advice.ranking[0]?.strategy;
    const body = { strategy: first, outcome: "converged", setupSeconds: 1, solveSeconds: 1, trueRelativeResidual: 1e-7 };
    const { id } = await world.expect(201, recordedRun, "POST", `/api/v1/cases/${made.id}/runs`, { as: "foreigner", body });
    expect(await read()).toMatchObject({ x: 1, n: 1 });
    await world.call("PATCH", `/api/v1/runs/${id}`, { as: "foreigner", body: { trueRelativeResidual: 1e-3 } });
    expect(await read()).toMatchObject({ x: 0, n: 1 });
    await world.call("POST", `/api/v1/runs/${id}/withdraw`, { as: "foreigner", body: {} });
    expect(await read()).toMatchObject({ x: 0, n: 0 });
  });

  it("carry their definitions", async () => {
    const { definitions } = await readRates();
    expect(definitions.worked?.text).toContain("first strategy converged");
  });
});
