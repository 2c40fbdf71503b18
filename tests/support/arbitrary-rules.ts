import fc from "fast-check";
import type { FactDefinition, Facts, FactValue } from "@/rules/fact";
import { factDefinitions } from "@/rules/facts";
import { operatorsOf } from "@/rules/fit-comparison";
import type { Comparison, Condition, Effect, Rule } from "@/rules/rule-schema";

/** A few facts of every type, so that random conditions often meet on one fact. */
export const someFacts: readonly FactDefinition[] = factDefinitions.filter(({ name }) =>
  ["degree", "cores", "contrastRatio", "discretisation", "meshFamily", "timeLimitGiven", "available", "unknowns", "directLdltMemoryShare"].includes(name),
);

/** Numbers close together, so that equality and bounds are met often. */
const nearNumbers = fc.oneof(fc.integer({ min: 0, max: 6 }), fc.constantFrom(0.5, 1.5, 1e6, 1e12));

const wordsOf = ({ allowed }: FactDefinition) => fc.constantFrom(...(allowed ?? [""]));

export function arbitraryValue(fact: FactDefinition): fc.Arbitrary<FactValue> {
  switch (fact.type) {
    case "number":
      return nearNumbers;
    case "boolean":
      return fc.boolean();
    case "string":
      return wordsOf(fact);
    case "list":
      return fc.uniqueArray(wordsOf(fact), { maxLength: 4 });
  }
}

function arbitraryOperand(fact: FactDefinition, operator: Comparison["operator"]): fc.Arbitrary<Comparison["value"]> {
  const single = fact.type === "number" ? nearNumbers : fact.type === "boolean" ? fc.boolean() : wordsOf(fact);
  if (operator !== "in" && operator !== "notIn") return single;
  return fact.type === "number" ? fc.array(nearNumbers, { minLength: 1, maxLength: 3 }) : fc.array(wordsOf(fact), { minLength: 1, maxLength: 3 });
}

const arbitraryComparison: fc.Arbitrary<Comparison> = fc
  .constantFrom(...someFacts)
  .chain((fact) => fc.constantFrom(...operatorsOf[fact.type]).chain((operator) => arbitraryOperand(fact, operator).map((value) => ({ fact: fact.name, operator, value }))));

/** Conditions that fit their facts, nested up to four deep. */
export const arbitraryCondition: fc.Arbitrary<Condition> = fc.letrec<{ node: Condition }>((tie) => ({
  node: fc.oneof(
    { depthSize: "small", maxDepth: 4, withCrossShrink: true },
    arbitraryComparison,
    fc.array(tie("node"), { minLength: 1, maxLength: 3 }).map((all) => ({ all })),
    fc.array(tie("node"), { minLength: 1, maxLength: 3 }).map((any) => ({ any })),
    tie("node").map((not) => ({ not })),
  ),
})).node;

const harmless: Effect = { kind: "caution", strategy: null, text: "A caution." };

/** A rule around a condition, with an effect that changes nothing. */
export function ruleOf(id: string, when: Condition, then: Effect[] = [harmless], enabled = true): Rule {
  return { id, title: id, enabled, when, then, rationale: "A test.", source: { kind: "common-practice" } };
}

/** All of `someFacts` with a value each. */
export const arbitraryFacts: fc.Arbitrary<Facts> = fc.record(Object.fromEntries(someFacts.map((fact) => [fact.name, arbitraryValue(fact)])));

/** The same with some facts absent. */
export const arbitraryPartialFacts: fc.Arbitrary<Facts> = fc
  .tuple(arbitraryFacts, fc.subarray(someFacts.map(({ name }) => name)))
  .map(([facts, absent]) => Object.fromEntries(Object.entries(facts).filter(([name]) => !absent.includes(name))));
