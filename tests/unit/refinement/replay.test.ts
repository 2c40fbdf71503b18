import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { noEvidence } from "@/lib/advice/evidence";
import { computeAdvice } from "@/lib/advice/pipeline";
import type { QuestionnaireInput } from "@/lib/questionnaire/questionnaire-schema";
import { priorities } from "@/lib/questionnaire/answer-sets";
import { strategyAt } from "@/lib/refinement/first-choices";
import { prepareReplay } from "@/lib/refinement/prepare-replay";
import { compareReplays, replayInSteps, replayRuleSet } from "@/lib/refinement/replay";
import { replayCaseFromModel, replayCaseOf } from "@/lib/refinement/replay-case";
import { replayResultSchema } from "@/lib/refinement/replay-result";
import { strategyIds, type StrategyId } from "@/lib/shared/strategy-ids";
import type { Effect, RuleSet } from "@/rules/rule-schema";
import { firstEdition } from "@/rules/sets/first-edition";
import { answersWith } from "../../support/advice-fixtures";
import { ruleOf } from "../../support/arbitrary-rules";
import { syntheticCase, type SyntheticCase } from "../../support/replay-fixtures";

const everything: QuestionnaireInput["available"] = ["parallel-direct", "amg", "block-splitting", "augmented-assembly", "unassembled-subdomains", "hybridised-assembly", "mesh-hierarchy"];
const always = { fact: "degree", operator: "greaterThanInclusive", value: 1 } as const;
const avoidDirect: Effect = { kind: "disfavour", strategy: "direct-ldlt", factor: 3 };

const synthetic = (number: number, measured: SyntheticCase["measured"], degree = 2) =>
  syntheticCase({ number, facts: { degree }, predicted: { "direct-ldlt": 10, bddc: 20 }, measured });

const arbitraryEffect: fc.Arbitrary<Effect> = fc.oneof(
  fc.record({ kind: fc.constantFrom("favour" as const, "disfavour" as const), strategy: fc.constantFrom(...strategyIds), factor: fc.constantFrom(1, 1.2, 2, 5, 30) }),
  fc.record({ kind: fc.constant("exclude" as const), strategy: fc.constantFrom(...strategyIds), reason: fc.constant("A test.") }),
);
const arbitraryRules: fc.Arbitrary<RuleSet> = fc
  .array(fc.tuple(fc.array(arbitraryEffect, { minLength: 1, maxLength: 3 }), fc.integer({ min: 1, max: 3 }), fc.boolean()), { maxLength: 6 })
  .map((rules) => rules.map(([then, degree, enabled], index) => ruleOf(`rule-${index}`, { fact: "degree", operator: "greaterThanInclusive", value: degree }, then, enabled)));

describe("a replay's first choice", () => {
  it("is the first of the advice under the same rules, for every priority and random rules", async () => {
    const evidence = { model: noEvidence(), asOf: "2026-12-01T00:00:00.000Z", runs: 0, recordedCases: [] };
    await fc.assert(
      fc.asyncProperty(arbitraryRules, fc.constantFrom(...priorities), fc.integer({ min: 1, max: 3 }), fc.integer({ min: 4, max: 8 }), async (rules, priority, degree, magnitude) => {
        const answers = answersWith({ priority, degree, size: { by: "unknowns", value: 10 ** magnitude }, available: everything });
        for (const ruleSet of [rules, [...firstEdition, ...rules]]) {
          const advice = await computeAdvice({ answers, ruleSet, editionNumber: 1, evidence });
          const first = advice.ranking.find(({ status }) => status === "ranked")?.strategy ?? null;
          const { record } = synthetic(1, {});
          for (const item of [replayCaseOf(record, answers, advice), replayCaseFromModel(record, answers)]) {
            expect(strategyAt(replayRuleSet(prepareReplay([item]), ruleSet).firsts[0])).toBe(first);
          }
        }
      }),
      { numRuns: 60, seed: 20261201 },
    );
  });

  it("takes a rule whose fact is absent as not acting", () => {
    const item = syntheticCase({ number: 1, facts: {}, predicted: { "direct-ldlt": 10, bddc: 20 }, measured: {} });
    const { firsts } = replayRuleSet(prepareReplay([item]), [ruleOf("a", always, [avoidDirect]), ruleOf("b", { not: always }, [avoidDirect])]);
    expect(strategyAt(firsts[0])).toBe("direct-ldlt");
  });
});

// Expected values are worked out by hand from the product's definitions.
describe("live against draft", () => {
  const draft = [ruleOf("avoid-direct", always, [avoidDirect])];

  it.each<[string, SyntheticCase["measured"], string, number | null]>([
    ["the new first choice was faster", { "direct-ldlt": 20, bddc: 10 }, "helped", 0.5],
    ["it was slower", { "direct-ldlt": 10, bddc: 20 }, "hurt", 2],
    ["it worked where the former did not", { "direct-ldlt": null, bddc: 10 }, "helped", 0.1],
    ["it failed where the former worked", { "direct-ldlt": 10, bddc: null }, "hurt", 10],
    ["it has no run", { "direct-ldlt": 10 }, "unknown", null],
    ["the former has no run", { bddc: 10 }, "unknown", null],
    ["neither worked", { "direct-ldlt": null, bddc: null }, "unknown", null],
  ])("calls a changed case by its runs when %s", (_name, measured, verdict, timeRatio) => {
    const { changes } = compareReplays(prepareReplay([synthetic(7, measured)]), [], draft);
    expect(changes).toMatchObject([{ caseId: "case-7", number: 7, before: "direct-ldlt", after: "bddc", verdict, rules: ["avoid-direct"] }]);
    if (timeRatio === null) expect(changes[0]?.timeRatio).toBeNull();
    else expect(changes[0]?.timeRatio).toBeCloseTo(timeRatio, 12);
  });

  it("gives rates on the same cases, with McNemar's exact test", () => {
    const cases = [...Array.from({ length: 8 }, (_, index) => synthetic(index + 1, { "direct-ldlt": 30, bddc: 10 })), synthetic(9, { "direct-ldlt": 10, bddc: 30 }), synthetic(10, { "direct-ldlt": 5 })];
    const result = compareReplays(prepareReplay(cases), [], draft);
    expect(result.judged).toEqual({ before: 10, after: 9, both: 9 });
    expect(result.contested).toBe(9);
    expect(result.before).toMatchObject({ worked: { x: 9, n: 9 }, best: { x: 1, n: 9 } });
    expect(result.after).toMatchObject({ worked: { x: 9, n: 9 }, best: { x: 8, n: 9 } });
    expect(result.before.regret.value).toBeCloseTo(3 ** (8 / 9), 12);
    expect(result.after.regret.value).toBeCloseTo(3 ** (1 / 9), 12);
    // Two-sided binomial with 8 of 9: 2 (1 + 9) / 2^9.
    expect(result.tests.best).toMatchObject({ n: 9, onlyBefore: 1, onlyAfter: 8 });
    expect(result.tests.best.pValue).toBeCloseTo(20 / 512, 12);
    expect(result.tests.best.text).toContain("the draft is better");
    expect(result.tests.worked.text).toContain("came out alike");
    expect(replayResultSchema.parse(JSON.parse(JSON.stringify(result)))).toEqual(result);
  });

  it("names only the rules that moved the choice, strongest first", () => {
    const favour = (strategy: StrategyId, factor: number): Effect => ({ kind: "favour", strategy, factor });
    const live = [ruleOf("same", always, [favour("bddc", 1.5)]), ruleOf("gone", always, [favour("direct-ldlt", 1.1)])];
    const next = [ruleOf("same", always, [favour("bddc", 1.5)]), ruleOf("against", always, [favour("direct-ldlt", 1.05)]), ruleOf("strong", always, [avoidDirect]), ruleOf("elsewhere", always, [favour("p-multigrid", 4)])];
    expect(compareReplays(prepareReplay([synthetic(1, {})]), live, next).changes[0]?.rules).toEqual(["strong", "gone"]);
    const excluding = [...live, ruleOf("out", always, [{ kind: "exclude", strategy: "direct-ldlt", reason: "A test." }])];
    expect(compareReplays(prepareReplay([synthetic(1, {})]), live, excluding).changes[0]?.rules).toEqual(["out"]);
  });

  it("says nothing of an empty record and changes nothing without a difference", () => {
    expect(compareReplays(prepareReplay([]), [], draft)).toMatchObject({ cases: 0, contested: 0, before: { regret: { value: null, n: 0 } }, changes: [] });
    expect(compareReplays(prepareReplay([synthetic(1, { bddc: 1 })]), draft, draft).changed.cases).toBe(0);
  });

  it("gives the same result in steps, with rising progress, and stops when told to", async () => {
    const prepared = prepareReplay(Array.from({ length: 1200 }, (_, index) => synthetic(index + 1, { "direct-ldlt": 20, bddc: 10 }, 1 + (index % 3))));
    const shares: number[] = [];
    expect(await replayInSteps(prepared, [], draft, { onProgress: (share) => shares.push(share) })).toEqual(compareReplays(prepared, [], draft));
    expect(shares).toEqual(shares.toSorted((a, b) => a - b));
    expect(shares.at(-1)).toBe(1);
    const controller = new AbortController();
    await expect(replayInSteps(prepared, [], draft, { signal: controller.signal, onProgress: () => controller.abort(new Error("stopped")) })).rejects.toThrow("stopped");
  });
});
