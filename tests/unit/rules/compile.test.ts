import fc from "fast-check";
import { Engine } from "json-rules-engine";
import { describe, expect, it } from "vitest";
import { columnsOf, compileCondition, compileRuleSet, factNamesOf } from "@/rules/compile";
import { fireRules } from "@/rules/engine";
import type { Facts } from "@/rules/fact";
import type { Condition } from "@/rules/rule-schema";
import { truthWords, unknownTruth } from "@/rules/truth";
import { arbitraryCondition, arbitraryFacts, arbitraryPartialFacts, ruleOf } from "../../support/arbitrary-rules";

const word = (condition: Condition, facts: Facts) => truthWords[compileCondition(condition)(facts)];

const holds: Condition = { fact: "degree", operator: "equal", value: 1 };
const fails: Condition = { fact: "degree", operator: "equal", value: 2 };
const unsure: Condition = { fact: "cores", operator: "greaterThan", value: 4 };
const operand: Record<string, Condition> = { T: holds, F: fails, U: unsure };
const letters: Record<string, string> = { true: "T", false: "F", unknown: "U" };

describe("compiled conditions", () => {
  // Kleene, "Introduction to Metamathematics", 1952, section 64: the strong three-valued tables.
  it.each([
    ["T", "T", "T", "T"],
    ["T", "F", "F", "T"],
    ["T", "U", "U", "T"],
    ["F", "T", "F", "T"],
    ["F", "F", "F", "F"],
    ["F", "U", "F", "U"],
    ["U", "T", "U", "T"],
    ["U", "F", "F", "U"],
    ["U", "U", "U", "U"],
  ])("join %s and %s as Kleene does: all %s, any %s", (left, right, all, any) => {
    const pair = [operand[left] ?? holds, operand[right] ?? holds];
    const facts = { degree: 1 };
    expect(letters[word({ all: pair }, facts)]).toBe(all);
    expect(letters[word({ any: pair }, facts)]).toBe(any);
  });

  it.each([
    ["T", "F"],
    ["F", "T"],
    ["U", "U"],
  ])("negate %s to %s as Kleene does", (inner, outer) => {
    expect(letters[word({ not: operand[inner] ?? holds }, { degree: 1 })]).toBe(outer);
  });

  it("take a name of Object's own methods for an absent fact", () => {
    expect(word({ fact: "toString", operator: "notEqual", value: 1 }, {})).toBe("unknown");
  });

  it("refuse in without a list", () => {
    expect(() => compileCondition({ fact: "degree", operator: "in", value: 3 })).toThrow(RangeError);
  });

  it("fire exactly what json-rules-engine fires on 5 000 random rules and complete facts", async () => {
    await fc.assert(
      fc.asyncProperty(fc.array(arbitraryCondition, { minLength: 5, maxLength: 5 }), arbitraryFacts, async (conditions, facts) => {
        const ruleSet = conditions.map((when, index) => ruleOf(`rule-${index}`, when));
        const engine = new Engine(ruleSet.map(({ id, when }) => ({ name: id, conditions: "fact" in when ? { all: [when] } : when, event: { type: id } })));
        const { results } = await engine.run(facts);
        const expected = new Set(results.map(({ name }) => name));
        const compiled = compileRuleSet(ruleSet);
        expect(new Set(compiled.fired(facts).map(({ rule }) => rule.id))).toEqual(expected);
        expect(compiled.evaluate(facts)).not.toContain(unknownTruth);
      }),
      { seed: 20_261, numRuns: 1000 },
    );
  });

  it("never turn a known answer around when more facts become known", () => {
    fc.assert(
      fc.property(arbitraryCondition, arbitraryFacts, arbitraryPartialFacts, (condition, facts, partial) => {
        const known = Object.fromEntries(Object.entries(facts).filter(([name]) => name in partial));
        const before = compileCondition(condition)(known);
        if (before !== unknownTruth) expect(compileCondition(condition)(facts)).toBe(before);
      }),
      { seed: 20_262, numRuns: 2000 },
    );
  });

  it("give by columns what they give case by case, absent facts included", () => {
    fc.assert(
      fc.property(fc.array(arbitraryCondition, { minLength: 1, maxLength: 6 }), fc.array(arbitraryPartialFacts, { maxLength: 8 }), (conditions, cases) => {
        const ruleSet = conditions.map((when, index) => ruleOf(`rule-${index}`, when, undefined, index !== 1));
        const compiled = compileRuleSet(ruleSet);
        const names = new Set(conditions.flatMap((condition) => [...factNamesOf(condition)]));
        const columns = compiled.evaluateColumns(columnsOf(cases, names));
        cases.forEach((facts, row) => expect(columns.map((column) => column[row])).toEqual(compiled.evaluate(facts)));
      }),
      { seed: 20_263, numRuns: 500 },
    );
  });

  it("judge 10 000 cases by 40 rules in under 3 s", () => {
    const ruleSet = fc.sample(arbitraryCondition, { seed: 7, numRuns: 40 }).map((when, index) => ruleOf(`rule-${index}`, when));
    const some = fc.sample(arbitraryFacts, { seed: 8, numRuns: 200 });
    const cases = Array.from({ length: 10_000 }, (_, row) => some[row % some.length] ?? {});
    const started = performance.now();
    const names = new Set(ruleSet.flatMap(({ when }) => [...factNamesOf(when)]));
    const columns = compileRuleSet(ruleSet).evaluateColumns(columnsOf(cases, names));
    expect(performance.now() - started).toBeLessThan(3000);
    expect(columns).toHaveLength(40);
  });
});

describe("json-rules-engine behind fireRules", () => {
  const ruleSet = [
    ruleOf("third", { fact: "degree", operator: "greaterThan", value: 1 }),
    ruleOf("off", { fact: "degree", operator: "greaterThan", value: 0 }, undefined, false),
    ruleOf("first", { all: [{ fact: "degree", operator: "greaterThan", value: 0 }] }),
  ];

  it("answers in the edition's order and leaves out rules that are switched off", async () => {
    const fired = await fireRules(ruleSet, { degree: 3 });
    expect(fired.map(({ rule, index }) => [rule.id, index])).toEqual([
      ["third", 0],
      ["first", 2],
    ]);
  });

  it("gives every one of many overlapping runs its own full answer, however they interleave", async () => {
    // Left to itself, an engine that one run has just finished skips all rules of a run begun a few microtasks before.
    const begun = async (microtasks: number) => {
      for (let step = 0; step < microtasks; step += 1) await Promise.resolve();
      return fireRules(ruleSet, { degree: 1 + (microtasks % 2) });
    };
    const fired = await Promise.all(Array.from({ length: 200 }, (_, index) => begun(index)));
    expect(fired.map(({ length }) => length)).toEqual(Array.from({ length: 200 }, (_, index) => 1 + (index % 2)));
  });

  it("rejects an absent fact and answers again afterwards", async () => {
    await expect(fireRules(ruleSet, {})).rejects.toThrow(/degree/);
    await expect(fireRules(ruleSet, { degree: 1 })).resolves.toHaveLength(1);
  });
});
