import { describe, expect, it } from "vitest";
import { hitRateDefinitions, hitRateTerms } from "@/lib/hit-rates/definitions";
import { judgeAll, selectRecords } from "@/lib/hit-rates/filter";
import { hitRates } from "@/lib/hit-rates/hit-rates";
import { judge, type ComparedRun, type HitRateRecord } from "@/lib/hit-rates/record";
import { meshFamilies } from "@/lib/questionnaire/answer-sets";
import { seededRandom } from "@/lib/shared/random";
import { strategyIds } from "@/lib/shared/strategy-ids";

let serial = 0;

function run(strategy: string, solveSeconds: number | null, change: Partial<ComparedRun> = {}): ComparedRun {
  serial += 1;
  return {
    runId: `run-${serial}`, strategy, outcome: "converged", iterations: 20, setupSeconds: solveSeconds === null ? null : 0, solveSeconds, peakMemoryGiB: 4,
    cores: 32, trueRelativeResidual: 1e-7, measuredAt: "2026-11-05T10:00:00.000Z", ...change,
  };
}

const failed = (strategy: string) => run(strategy, null, { outcome: "stalled" });

function record(advisedRun: ComparedRun | null, otherRuns: ComparedRun[], change: Partial<HitRateRecord> = {}): HitRateRecord {
  serial += 1;
  return {
    caseId: `case-${serial}`, caseNumber: serial, discretisation: "vem-mixed", degree: 1, meshFamily: "cubes",
    limits: { tolerance: 1e-6, repeatedSolves: 1, timeLimitSeconds: null, memoryGiB: 128, cores: 32 },
    advice: { id: `advice-${serial}`, editionNumber: 1, firstStrategy: advisedRun?.strategy ?? "direct-ldlt", firedRules: ["rule-a"], givenAt: "2026-11-01T00:00:00.000Z" },
    advisedRun, otherRuns, ...change,
  };
}

// Expected values are worked out by hand from the product's definitions.
describe("judge", () => {
  it("says nothing while the advice's first strategy has no run", () => {
    expect(judge(record(null, [run("bddc", 3)]))).toBeNull();
  });

  it.each([
    [10, 10, true],
    [12.5, 10, true],
    [12.6, 10, false],
    [5, 10, true],
  ])("advised %d s against %d s is best: %s", (advised, other, best) => {
    expect(judge(record(run("direct-ldlt", advised), [run("bddc", other)]))?.contest?.best).toBe(best);
  });

  it("counts repeated solves in the total time", () => {
    const limits = { ...record(null, []).limits, repeatedSolves: 100 };
    const direct = run("direct-ldlt", 0.1, { setupSeconds: 50 });
    const judgement = judge(record(direct, [run("schur-diag-amg", 1)], { limits }));
    expect(judgement?.contest).toMatchObject({ best: true, regret: 1 });
  });

  it("is not contested without another measured strategy, or when the other has no times", () => {
    expect(judge(record(run("direct-ldlt", 5), []))?.contest).toBeNull();
    expect(judge(record(run("direct-ldlt", 5), [run("bddc", null)]))?.contest).toBeNull();
    expect(judge(record(run("direct-ldlt", null), [run("bddc", 4)]))).toMatchObject({ worked: true, contest: null, leftOut: false });
  });

  it("charges a failed run 10 times the time limit", () => {
    const limits = { ...record(null, []).limits, timeLimitSeconds: 60 };
    expect(judge(record(failed("bddc"), [run("direct-ldlt", 6)], { limits }))).toMatchObject({ worked: false, contest: { best: false, regret: 100 } });
  });

  it("charges a failed run 10 times the slowest converged run where no limit is given", () => {
    const judgement = judge(record(failed("bddc"), [run("direct-ldlt", 6), run("hybridized-amg", 3)]));
    expect(judgement?.contest?.regret).toBeCloseTo(20, 12);
  });

  it("makes a failed alternative a contest that the advice wins", () => {
    expect(judge(record(run("direct-ldlt", 6), [failed("bddc")]))?.contest).toMatchObject({ best: true, regret: 1 });
  });

  it("leaves out a contested case in which nothing converged", () => {
    expect(judge(record(failed("bddc"), [failed("direct-ldlt")]))).toMatchObject({ worked: false, contest: null, leftOut: true });
  });

  it("treats a run that met only its own test as failed", () => {
    const wrong = run("direct-ldlt", 1, { trueRelativeResidual: 1e-3 });
    expect(judge(record(run("bddc", 9), [wrong]))?.contest).toMatchObject({ best: true, regret: 1 });
  });

  it("stays finite with times of zero", () => {
    expect(judge(record(run("bddc", 0), [run("direct-ldlt", 0)]))?.contest).toMatchObject({ best: true, regret: 1 });
  });
});

describe("hitRates", () => {
  it("is all zeros with the whole interval on no records", () => {
    const rates = hitRates([]);
    expect(rates.worked).toEqual({ x: 0, n: 0, low: 0, high: 1 });
    expect(rates.regret).toEqual({ value: null, n: 0 });
    expect(rates.gapClosed.value).toBeNull();
    expect(rates.groups).toEqual([]);
  });

  it("gives regret as the geometric mean over contested cases", () => {
    const rates = hitRates([
      record(run("direct-ldlt", 4), [run("bddc", 1)]),
      record(run("direct-ldlt", 1), [run("bddc", 4)]),
      record(run("direct-ldlt", 16), [run("bddc", 1)]),
      record(run("direct-ldlt", 7), []),
    ]);
    expect(rates.regret.value).toBeCloseTo(4, 12);
    expect(rates.regret.n).toBe(3);
    expect(rates.worked).toMatchObject({ x: 4, n: 4 });
    expect(rates.best).toMatchObject({ x: 1, n: 3 });
  });

  it("gap closed is 1 - ln R_advice / ln R_single", () => {
    // Advice: regrets 1, 1, 2, so R = 2^(1/3). Always bddc: 4, 1, 1 -> 4^(1/3). Always direct: 1, 8, 2 -> 16^(1/3). Single best bddc: 1 - ln 2 / ln 4 = 1/2.
    const rates = hitRates([
      record(run("direct-ldlt", 1), [run("bddc", 4)]),
      record(run("bddc", 1), [run("direct-ldlt", 8)]),
      record(run("direct-ldlt", 2), [run("bddc", 1)]),
    ]);
    expect(rates.gapClosed.value).toBeCloseTo(0.5, 12);
    expect(rates.gapClosed).toMatchObject({ n: 3, singleStrategy: "bddc" });
    expect(rates.gapClosed.singleRegret).toBeCloseTo(4 ** (1 / 3), 12);
  });

  it("gap closed is undefined where one strategy is always as good as the best", () => {
    const rates = hitRates([record(run("direct-ldlt", 5), [run("bddc", 1)]), record(run("direct-ldlt", 5), [run("bddc", 1)])]);
    expect(rates.gapClosed).toMatchObject({ value: null, n: 2, singleStrategy: "bddc", singleRegret: 1 });
  });

  it("does not take a strategy measured once for the best single one", () => {
    const often = [1, 2, 3, 4].map(() => record(run("direct-ldlt", 3), [run("bddc", 2)]));
    const once = record(run("direct-ldlt", 1.5), [run("hybridized-amg", 1)]);
    expect(hitRates([...often, once]).gapClosed.singleStrategy).toBe("bddc");
  });

  it("never takes a strategy that is not advised on for the best single one", () => {
    const rates = hitRates([record(run("direct-ldlt", 3), [run("other:in-house", 1)])]);
    expect(rates.best).toMatchObject({ x: 0, n: 1 });
    expect(rates.gapClosed.singleStrategy).toBe("direct-ldlt");
  });

  it("counts what it leaves out", () => {
    expect(hitRates([record(failed("bddc"), [failed("direct-ldlt")])])).toMatchObject({ leftOut: 1, best: { n: 0 }, worked: { x: 0, n: 1 } });
  });

  it("counts for each rule where it fired, was followed and was right", () => {
    const rules = (...firedRules: string[]) => ({ advice: { ...record(null, []).advice, firstStrategy: "bddc", firedRules } });
    const rates = hitRates(
      [record(run("bddc", 1), [], rules("rule-a", "rule-b")), record(failed("bddc"), [], rules("rule-a")), record(null, [], rules("rule-a"))],
      { ruleTitles: new Map([["rule-a", "A title"]]) },
    );
    const groups = rates.groups.filter((group) => group.by === "rule");
    expect(groups.map((group) => [group.key, group.label, group.rule?.fired, group.rule?.followed, group.rule?.right.x])).toEqual([
      ["rule-a", "A title", 3, 2, 1],
      ["rule-b", "rule-b", 1, 1, 1],
    ]);
  });
});

function randomRecords(count: number, seed: number): HitRateRecord[] {
  const random = seededRandom(seed);
  return Array.from({ length: count }, () => {
    const strategies = [...strategyIds].sort(() => random() - 0.5).slice(0, 1 + Math.floor(random() * 4));
    const runs = strategies.map((strategy) =>
      run(strategy, random() < 0.1 ? null : Math.exp(4 * random()), {
        outcome: random() < 0.2 ? "stalled" : "converged",
        trueRelativeResidual: random() < 0.3 ? null : 1e-8 * 10 ** (5 * random()),
        measuredAt: `2026-0${1 + Math.floor(random() * 9)}-11T08:00:00.000Z`,
      }),
    );
    const [first, ...others] = runs;
    const advised = random() < 0.8 ? (first ?? null) : null;
    const empty = record(advised, others);
    return {
      ...empty, degree: 1 + Math.floor(random() * 3), meshFamily: meshFamilies[Math.floor(random() * meshFamilies.length)] ?? "cubes",
      advice: { ...empty.advice, editionNumber: 1 + Math.floor(random() * 12), firedRules: ["rule-a", "rule-b", "rule-c"].filter(() => random() < 0.5) },
    };
  });
}

describe("groups", () => {
  const records = randomRecords(300, 20261201);

  it("carry the filter that finds exactly their cases again", () => {
    const filter = { from: "2026-02-01", discretisation: "vem-mixed" } as const;
    const rates = hitRates(records, { filter });
    expect(rates.groups.length).toBeGreaterThan(30);
    for (const group of rates.groups) {
      const again = selectRecords(judgeAll(records), group.filter);
      const judged = again.filter((item) => item.judgement !== null);
      expect(judged.length).toBe(group.worked.n);
      expect(judged.filter((item) => item.judgement?.worked).length).toBe(group.worked.x);
      expect(selectRecords(judgeAll(records), { ...group.filter, result: "contested" }).length).toBe(group.best.n);
      expect(selectRecords(judgeAll(records), { ...group.filter, result: "beaten" }).length).toBe(group.best.n - group.best.x);
      expect(selectRecords(judgeAll(records), { ...group.filter, result: "left-out" }).length).toBe(group.leftOut);
    }
  });

  it("of every kind but rules share the judged cases out without rest", () => {
    const rates = hitRates(records);
    for (const by of ["month", "mesh-degree", "strategy", "edition"] as const) {
      const sum = rates.groups.filter((group) => group.by === by).reduce((total, group) => total + group.worked.n, 0);
      expect(sum).toBe(rates.worked.n);
    }
  });

  it("list editions and months in their order", () => {
    const rates = hitRates(records);
    const editions = rates.groups.filter((group) => group.by === "edition").map((group) => Number(group.key));
    expect(editions).toEqual([...editions].sort((a, b) => a - b));
    const months = rates.groups.filter((group) => group.by === "month").map((group) => group.key);
    expect(months).toEqual([...months].sort());
  });
});

describe("definitions", () => {
  it("explain every term", () => {
    for (const term of hitRateTerms) expect(hitRateDefinitions[term].text.length).toBeGreaterThan(20);
  });
});
