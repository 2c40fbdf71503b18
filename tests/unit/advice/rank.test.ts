import { describe, expect, it } from "vitest";
import { collectEffects } from "@/lib/advice/effects";
import { byStrategy, type EvidenceFactor } from "@/lib/advice/evidence";
import { rankStrategies, type RankInput } from "@/lib/advice/rank";
import { strategyIds, type StrategyId } from "@/lib/shared/strategy-ids";
import type { Effect } from "@/rules/rule-schema";
import { answersWith, estimateOf, estimatesWith, traitsWith } from "../../support/advice-fixtures";
import { ruleOf } from "../../support/arbitrary-rules";

const silent: EvidenceFactor = { factor: 1, runs: 0, spread: 1 };

const effectsOf = (...rules: Effect[][]) =>
  collectEffects(rules.map((then, index) => ({ rule: ruleOf(`rule-${index}`, { fact: "degree", operator: "equal", value: 1 }, then), index })));

function rank(changes: Partial<RankInput> = {}) {
  return rankStrategies({
    answers: answersWith(),
    traits: traitsWith(),
    estimates: estimatesWith(),
    effects: effectsOf(),
    evidence: byStrategy(() => silent),
    ...changes,
  });
}

const entryOf = (ranking: ReturnType<typeof rank>, strategy: StrategyId) => {
  const entry = ranking.find((candidate) => candidate.strategy === strategy);
  if (!entry) throw new Error(`${strategy} is not in the ranking`);
  return entry;
};

describe("the ranking", () => {
  it("puts every strategy once, ranks 1 to 11, by predicted time where nothing else speaks", () => {
    const ranking = rank();
    expect(ranking.map(({ strategy }) => strategy)).toEqual(strategyIds);
    expect(ranking.map((entry) => entry.rank)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11]);
    expect(ranking.map(({ relativeTime }) => relativeTime)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11]);
    expect(ranking[1]?.relativeRange).toEqual({ low: 20 / 1.5 / 10, high: 3 });
  });

  it("multiplies model, rules and evidence, and lists the factors in that order", () => {
    const effects = effectsOf([{ kind: "disfavour", strategy: "direct-ldlt", factor: 4 }], [{ kind: "favour", strategy: "direct-ldlt", factor: 2 }]);
    const evidence = byStrategy((id) => (id === "direct-ldlt" ? { factor: 1.5, runs: 7, spread: 1.3 } : silent));
    const entry = entryOf(rank({ effects, evidence }), "direct-ldlt");
    // 10 s x 4 / 2 x 1.5 = 30 s against 20 s of the next.
    expect(entry.rank).toBe(2);
    expect(entry.relativeTime).toBeCloseTo(1.5, 12);
    expect(entry.factors.map(({ kind, rule, factor }) => [kind, rule, factor])).toEqual([
      ["rule", "rule-0", 4],
      ["rule", "rule-1", 0.5],
      ["evidence", null, 1.5],
    ]);
    expect(entry.evidenceRuns).toBe(7);
    expect(entry.factors[2]?.text).toMatch(/^7 recorded runs speak: here expect 1.5x .* within a factor of 1.3\.$/);
  });

  it("breaks ties in the listed order", () => {
    const estimates = byStrategy(() => estimateOf(5));
    expect(rank({ estimates }).map(({ strategy }) => strategy)).toEqual(strategyIds);
  });

  it("puts what can't compete below the line with its reason, what is curable first", () => {
    const ranking = rank({
      answers: answersWith({ hardware: { cores: 32, nodes: 2, memoryPerNodeGiB: 64, timeLimitSeconds: null } }),
      traits: traitsWith({ bddc: { needs: ["unassembled-subdomains"] }, "hdiv-auxiliary": { discretisations: ["rt"], notForReason: "It has no curl." } }),
      estimates: estimatesWith({ "direct-ldlt": estimateOf(1, 150, 1.5), "direct-blr": estimateOf(1, 150, 1.1) }),
      effects: effectsOf([{ kind: "exclude", strategy: "p-multigrid", reason: "No hierarchy." }]),
    });
    expect(ranking.slice(-5).map(({ strategy, status }) => [strategy, status])).toEqual([
      ["direct-ldlt", "infeasible"],
      ["direct-blr", "infeasible"],
      ["p-multigrid", "excluded"],
      ["hdiv-auxiliary", "unavailable"],
      ["bddc", "unavailable"],
    ]);
    expect(entryOf(ranking, "direct-ldlt").reason).toMatch(/the median of the prediction, 150\u202fGiB, exceeds the machine's 128\u202fGiB by 22\u202fGiB/);
    expect(entryOf(ranking, "direct-blr").reason).toMatch(/even the low end of the prediction, 136/);
    expect(entryOf(ranking, "hdiv-auxiliary").reason).toBe("Not for mixed virtual elements. It has no curl.");
    expect(entryOf(ranking, "bddc").reason).toBe("The program does not supply what it needs: unassembled subdomain matrices.");
    expect(entryOf(ranking, "p-multigrid").reason).toBe("No hierarchy.");
    for (const { relativeTime, relativeRange } of ranking.slice(-5)) expect([relativeTime, relativeRange]).toEqual([null, null]);
  });

  it("counts the feasible only as the leanest candidate when memory comes first", () => {
    const ranking = rank({
      answers: answersWith({ priority: "memory" }),
      traits: traitsWith({ bddc: { needs: ["unassembled-subdomains"] } }),
      estimates: estimatesWith({ "direct-ldlt": estimateOf(10, 16), "direct-blr": estimateOf(16, 4), bddc: estimateOf(1, 0.01) }),
    });
    // sqrt(16 / 1) x 10 s = 40 s, sqrt(4 / 1) x 16 s = 32 s; schur-diag-direct takes 30 s in 1 GiB.
    expect(ranking.slice(0, 3).map(({ strategy }) => strategy)).toEqual(["schur-diag-direct", "direct-blr", "direct-ldlt"]);
    expect(entryOf(ranking, "direct-ldlt").factors).toEqual([expect.objectContaining({ kind: "priority", factor: 4 })]);
  });

  it("compares bad days when robustness comes first", () => {
    const estimates = estimatesWith({ "direct-ldlt": estimateOf(10, 1, 4), "direct-blr": estimateOf(12, 1, 1.1) });
    expect(rank({ answers: answersWith({ priority: "robustness" }), estimates })[0]?.strategy).toBe("direct-blr");
    expect(rank({ estimates })[0]?.strategy).toBe("direct-ldlt");
  });

  it("warns of memory near the limit, by how much, and of the time limit", () => {
    const answers = answersWith({ hardware: { cores: 32, nodes: 1, memoryPerNodeGiB: 100, timeLimitSeconds: 60 } });
    const estimates = estimatesWith({
      "direct-ldlt": estimateOf(50, 90, 1.5),
      "direct-blr": estimateOf(70, 60, 1.5),
      "schur-diag-direct": estimateOf(10, 50, 1.5),
    });
    const ranking = rank({ answers, estimates });
    expect(entryOf(ranking, "direct-ldlt").cautions).toEqual([
      "Memory is near the limit: the prediction reaches 135\u202fGiB, 35\u202fGiB more than the machine's 100\u202fGiB. Running out can take a shared node down.",
      "May exceed the time limit of 1\u202fmin: the prediction reaches 1.3\u202fmin.",
    ]);
    expect(entryOf(ranking, "direct-blr").cautions).toEqual([
      "Memory is near the limit: the prediction reaches 90\u202fGiB, 90\u202f% of the machine's 100\u202fGiB; 10\u202fGiB are left. Running out can take a shared node down.",
      "Predicted time 1.2\u202fmin exceeds the time limit of 1\u202fmin.",
    ]);
    expect(entryOf(ranking, "schur-diag-direct").cautions).toEqual([]);
  });

  it("lets later rules have the last word on parameters and fallbacks", () => {
    const set = (value: number): Effect => ({ kind: "set", strategy: "bddc", parameter: "levels", value });
    const fall = (to: StrategyId): Effect => ({ kind: "fallback", strategy: "bddc", to, when: "it fails" });
    const estimates = estimatesWith({ bddc: { ...estimateOf(1), parameters: { levels: 1, scaling: "deluxe" } } });
    const entry = entryOf(rank({ estimates, effects: effectsOf([set(2), fall("direct-blr")], [set(3), fall("direct-ldlt")]) }), "bddc");
    expect(entry.parameters).toEqual({ levels: 3, scaling: "deluxe" });
    expect(entry.fallback).toEqual({ strategy: "direct-ldlt", when: "It fails." });
  });

  it("falls back only on what may compete: along the definitions, else on the best other", () => {
    const traits = traitsWith({ "direct-blr": { needs: ["mesh-hierarchy"] } });
    expect(entryOf(rank({ traits }), "direct-ldlt").fallback).toEqual({ strategy: "schur-diag-direct", when: "it stalls" });
    const onlyTwo = byStrategy((id): Partial<{ needs: ["mesh-hierarchy"] }> => (id === "bddc" || id === "direct-ldlt" ? {} : { needs: ["mesh-hierarchy"] }));
    expect(entryOf(rank({ traits: traitsWith(onlyTwo) }), "bddc").fallback?.strategy).toBe("direct-ldlt");
  });

  it("is a valid ranking when nobody may compete", () => {
    const ranking = rank({ traits: traitsWith(byStrategy(() => ({ needs: ["mesh-hierarchy"] as const }))) });
    expect(ranking.map(({ status }) => status)).toEqual(strategyIds.map(() => "unavailable"));
    expect(ranking.map(({ fallback }) => fallback)).toEqual(strategyIds.map(() => null));
  });
});
