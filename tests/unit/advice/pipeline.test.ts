import { describe, expect, it } from "vitest";
import { diffAdvice } from "@/lib/advice/diff";
import { explainEntry } from "@/lib/advice/explain";
import { deriveFacts } from "@/lib/advice/facts";
import { evidenceCounts, noEvidence } from "@/lib/advice/evidence";
import { observationsOf, readRecord, type Evidence, type RecordedRuns } from "@/lib/advice/observations";
import { parameterCatalogue } from "@/lib/advice/parameter-catalogue";
import { computeAdvice } from "@/lib/advice/pipeline";
import { estimateAll } from "@/lib/estimates/estimate-all";
import type { QuestionnaireInput } from "@/lib/questionnaire/questionnaire-schema";
import { strategyIds } from "@/lib/shared/strategy-ids";
import { computeSizes } from "@/lib/sizes/compute-sizes";
import { factDefinitions, parseFacts } from "@/rules/facts";
import type { RuleSet } from "@/rules/rule-schema";
import { firstEdition } from "@/rules/sets/first-edition";
import { validateRuleSet } from "@/rules/validate-rule-set";
import { answersWith } from "../../support/advice-fixtures";
import { ruleOf } from "../../support/arbitrary-rules";

const asOf = "2026-12-01T00:00:00.000Z";
const noRecord: Evidence = { model: noEvidence(), asOf, runs: 0, recordedCases: [] };
const everything: QuestionnaireInput["available"] = [
  "parallel-direct",
  "amg",
  "block-splitting",
  "augmented-assembly",
  "unassembled-subdomains",
  "hybridised-assembly",
  "discrete-gradient-curl",
  "mesh-hierarchy",
];

const advise = (changes: Partial<QuestionnaireInput> = {}, ruleSet: RuleSet = firstEdition, evidence = noRecord) =>
  computeAdvice({ answers: answersWith(changes), ruleSet, editionNumber: 1, evidence });

const entryOf = <T extends { strategy: string }>(ranking: readonly T[], strategy: string): T => {
  const entry = ranking.find((candidate) => candidate.strategy === strategy);
  if (!entry) throw new Error(`${strategy} is not in the ranking`);
  return entry;
};

describe("the pipeline", () => {
  // Common practice, no source: at low order the Schur complement of diag(A) is the first thing to try, block diagonal or triangular.
  it("advises the default case by the Schur complement of the diagonal, with the chain from model to place", async () => {
    const advice = await advise();
    expect(advice.ranking[0]?.strategy).toMatch(/^schur-(diag|triangular)/);
    expect(advice.edition).toEqual({ number: 1 });
    expect(advice.evidence).toEqual({ asOf, runs: 0 });
    expect(advice.sizes.unknowns).toBe(395_932);
    for (const { status, relativeTime, estimate, factors } of advice.ranking) {
      if (status !== "ranked" || relativeTime === null) continue;
      const first = advice.ranking[0];
      const score = (entry: { estimate: typeof estimate; factors: typeof factors } | undefined) =>
        (entry?.factors ?? []).reduce((all, { factor }) => all * factor, entry?.estimate.totalSeconds.median ?? 1);
      expect(relativeTime).toBeCloseTo(score({ estimate, factors }) / score(first), 10);
    }
  });

  it("derives every fact of the registry and no other", () => {
    const answers = answersWith();
    const sizes = computeSizes(answers);
    const facts = parseFacts(deriveFacts(answers, sizes, estimateAll(answers, sizes), evidenceCounts(noEvidence())));
    expect(Object.keys(facts).sort()).toEqual(factDefinitions.map(({ name }) => name).sort());
  });

  it("stands on a first edition without errors and warnings, whose parameters exist", () => {
    expect(validateRuleSet(firstEdition, parameterCatalogue).filter(({ severity }) => severity !== "note")).toEqual([]);
  });

  // The facts of the trade that the first edition must carry; common practice, no source.
  it.each<[string, Partial<QuestionnaireInput>, string]>([
    ["low order", { degree: 1 }, "diagonal-schur-first-at-low-order"],
    ["augmented assembly", { available: everything }, "gamma-follows-spacing-squared"],
    ["a small problem of high order", { degree: 4, size: { by: "unknowns", value: 100_000 } }, "small-high-order-goes-direct"],
    ["many solves", { repeatedSolves: 100 }, "factorisation-reused"],
    ["a large problem in 3D", { size: { by: "unknowns", value: 4_000_000 } }, "direct-dies-of-memory-first"],
    ["assembled matrices only", {}, "no-decomposition-without-subdomains"],
    ["flux everywhere", { boundary: "flux-everywhere" }, "pressure-null-space-told"],
    ["large jumps", { contrast: { ratio: 1e6, pattern: "blocks" } }, "jumps-speak-for-deluxe-bddc"],
    ["many cores", { hardware: { cores: 512, nodes: 16, memoryPerNodeGiB: 128, timeLimitSeconds: null } }, "many-cores-starve-factorised-schur"],
  ])("fires the trade's rule for %s", async (_, changes, rule) => {
    expect((await advise(changes)).firedRules).toContain(rule);
  });

  it("lets every rule of the first edition fire on some case", async () => {
    const cases: Partial<QuestionnaireInput>[] = [
      {},
      { available: everything, degree: 1, contrast: { ratio: 1e6, pattern: "random-field" }, boundary: "pressure-somewhere" },
      { available: everything, degree: 4, size: { by: "unknowns", value: 200_000 }, hardware: { cores: 8, nodes: 1, memoryPerNodeGiB: 8, timeLimitSeconds: 60 } },
      { meshFamily: "voronoi", degree: 3, size: { by: "unknowns", value: 5e7 }, hardware: { cores: 8192, nodes: 64, memoryPerNodeGiB: 256, timeLimitSeconds: null } },
      { repeatedSolves: 1000, tolerance: 1e-12, aspectRatio: 50, priority: "robustness", size: { by: "unknowns", value: 50_000 }, hardware: { cores: 64, nodes: 1, memoryPerNodeGiB: 512, timeLimitSeconds: null } },
      { degree: 6, meshFamily: "distorted", contrast: { ratio: 1e12, pattern: "blocks" }, anisotropy: 1e4, tolerance: 1e-14 },
      { size: { by: "unknowns", value: 2e7 }, available: everything, meshFamily: "tetrahedra", discretisation: "rt", hardware: { cores: 128, nodes: 4, memoryPerNodeGiB: 128, timeLimitSeconds: null } },
    ];
    const fired = new Set((await Promise.all(cases.map((changes) => advise(changes)))).flatMap(({ firedRules }) => firedRules));
    expect(firstEdition.map(({ id }) => id).filter((id) => !fired.has(id))).toEqual([]);
  });

  it("keeps domain decomposition below the line without unassembled matrices, and lets it compete with them", async () => {
    const without = await advise();
    expect(["excluded", "unavailable"]).toContain(entryOf(without.ranking, "bddc").status);
    expect(["excluded", "unavailable"]).toContain(entryOf(without.ranking, "schwarz-two-level").status);
    const withThem = await advise({ available: everything });
    expect(entryOf(withThem.ranking, "bddc").status).toBe("ranked");
    expect(entryOf(withThem.ranking, "schwarz-two-level").status).toBe("ranked");
  });

  it("says so when nobody may compete", async () => {
    const advice = await advise({ available: [] });
    expect(advice.ranking.every(({ status }) => status !== "ranked")).toBe(true);
    expect(advice.cautions[0]).toMatch(/^No strategy may compete/);
  });

  it("gives the same bytes for the same record", async () => {
    const record = [recorded(1, 2), recorded(2, 3)];
    const once = JSON.stringify(await advise({}, firstEdition, readRecord(record, firstEdition, asOf)));
    expect(JSON.stringify(await advise({}, firstEdition, readRecord(record, firstEdition, asOf)))).toBe(once);
  });

  it("refuses facts that the edition can't know", async () => {
    await expect(advise({}, [ruleOf("odd", { fact: "colour", operator: "equal", value: "red" })])).rejects.toThrow(/colour/);
  });
});

/** A past case like the default one, whose direct solve took `ratio` times what the model says. */
function recorded(number: number, ratio: number, cores = 32): RecordedRuns {
  const answers = answersWith();
  const { totalSeconds } = estimateAll(answers, computeSizes(answers))["direct-ldlt"];
  return {
    caseId: `case-${number}`,
    caseNumber: number,
    title: `Case ${number}`,
    answers,
    runs: [
      { strategy: "direct-ldlt", strategyName: "direct-ldlt", cores, totalSeconds: totalSeconds.median * ratio },
      { strategy: null, strategyName: "our own cycle", cores, totalSeconds: 0.001 },
    ],
  };
}

describe("the record", () => {
  it("leaves to evidence only what model and rules have not said", () => {
    const twice: RuleSet = [ruleOf("slow", { fact: "degree", operator: "equal", value: 1 }, [{ kind: "disfavour", strategy: "direct-ldlt", factor: 2 }])];
    const residual = (ruleSet: RuleSet) => observationsOf([recorded(1, 2)], ruleSet)[0]?.logResidual;
    expect(residual([])).toBeCloseTo(Math.log(2), 12);
    expect(residual(twice)).toBeCloseTo(0, 12);
  });

  it("predicts a run on the cores it had", () => {
    const [observation] = observationsOf([recorded(1, 1, 4)], []);
    expect(observation?.features.cores).toBe(4);
    expect(observation?.logResidual).toBeLessThan(-0.5);
  });

  it("moves the advice: a strategy that keeps taking three times as long is told so", async () => {
    const record = readRecord(Array.from({ length: 20 }, (_, index) => recorded(index + 1, 3)), firstEdition, asOf);
    expect(record.runs).toBe(20);
    const advice = await advise({}, firstEdition, record);
    const direct = entryOf(advice.ranking, "direct-ldlt");
    expect(direct.evidenceRuns).toBe(20);
    expect(direct.factors.at(-1)?.kind).toBe("evidence");
    expect(direct.factors.at(-1)?.factor).toBeGreaterThan(2.5);
    expect(advice.nearestCases).toHaveLength(3);
    expect(advice.nearestCases[0]).toMatchObject({ number: 1, distance: 0, bestStrategy: "our own cycle" });
  });

  it("leaves out runs without a positive time", () => {
    const past = recorded(1, 1);
    const record = readRecord([{ ...past, runs: past.runs.map((run) => ({ ...run, totalSeconds: 0 })) }], firstEdition, asOf);
    expect([record.runs, record.recordedCases.length]).toEqual([0, 0]);
  });
});

describe("the difference of two advices", () => {
  it("is empty between an advice and itself", async () => {
    expect(diffAdvice(await advise(), await advise())).toEqual([]);
  });

  it("names edition, evidence, first choice, places, statuses and factors", async () => {
    const before = await advise();
    const first = before.ranking[0]?.strategy ?? "bddc";
    const stricter: RuleSet = [...firstEdition, ruleOf("out", { fact: "degree", operator: "equal", value: 1 }, [{ kind: "exclude", strategy: first, reason: "Not this year." }])];
    const record = readRecord([recorded(1, 3), recorded(2, 3)], stricter, asOf);
    const after = await computeAdvice({ answers: answersWith(), ruleSet: stricter, editionNumber: 2, evidence: record });
    const changes = diffAdvice(before, after);
    expect(changes.slice(0, 3).map(({ text }) => text)).toEqual([
      "Edition 2 instead of 1.",
      "2 recorded runs speak instead of 0.",
      `First choice: ${before.ranking[1]?.strategy} instead of ${first}.`,
    ]);
    expect(changes).toContainEqual({ kind: "status", strategy: first, text: `${first}: excluded instead of ranked. Not this year.` });
    expect(changes.some(({ kind, strategy }) => kind === "factor" && strategy === "direct-ldlt")).toBe(true);
    expect(changes.some(({ kind }) => kind === "place")).toBe(true);
  });

  it("names a model that predicts otherwise", async () => {
    const before = await advise();
    const after = await advise({ repeatedSolves: 10 });
    expect(diffAdvice(before, { ...after, modelVersion: "next" }).map(({ kind }) => kind)).toEqual(expect.arrayContaining(["model", "time"]));
  });
});

describe("the reason for a place", () => {
  it("is one sentence for each strategy", async () => {
    const { ranking } = await advise({ repeatedSolves: 3 });
    expect(ranking).toHaveLength(strategyIds.length);
    for (const entry of ranking) {
      const text = explainEntry(entry, 3);
      if (entry.status === "ranked") expect(text).toMatch(/^Most of its time is .+\.$/);
      else expect(text).toBe(entry.reason);
    }
  });
});
