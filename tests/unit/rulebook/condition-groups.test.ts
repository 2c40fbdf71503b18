import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { conditionOf, groupKinds, groupOf, memberPath, withFact, withOperator, type GroupKind } from "@/components/rulebook/editor/condition-groups";
import { factDefinitions } from "@/rules/facts";
import { misfitOf, operatorsOf } from "@/rules/fit-comparison";
import type { Comparison, Condition } from "@/rules/rule-schema";

const member: Comparison = { fact: "degree", operator: "equal", value: 2 };
const other: Comparison = { fact: "cores", operator: "greaterThan", value: 64 };

describe("a group of conditions", () => {
  it.each<[GroupKind, Condition[], Condition]>([
    ["all", [member, other], { all: [member, other] }],
    ["any", [member], { any: [member] }],
    ["none", [member, other], { not: { any: [member, other] } }],
    ["not-all", [member, other], { not: { all: [member, other] } }],
    ["not", [member], { not: member }],
  ])("%s is written in the engine's own form and read back", (kind, members, condition) => {
    expect(conditionOf({ kind, members })).toEqual(condition);
    if ("fact" in condition) throw new Error("A group is no comparison.");
    expect(groupOf(condition)).toEqual({ kind, members });
  });

  it("keeps its meaning when a second condition joins a negated one: neither may hold", () => {
    expect(conditionOf({ kind: "not", members: [member, other] })).toEqual({ not: { any: [member, other] } });
  });

  it("names its members as problems do", () => {
    expect(groupKinds.map((kind) => memberPath(kind, 1))).toEqual(["all.1", "any.1", "not.any.1", "not.all.1", "not"]);
  });
});

describe("a comparison whose fact or operator is changed", () => {
  const facts = fc.constantFrom(...factDefinitions);

  it("fits the new fact, whatever it was before", () => {
    fc.assert(
      fc.property(facts, facts, (from, to) => {
        const before = withFact({ fact: "degree", operator: "equal", value: 1 }, from.name);
        const after = withFact(before, to.name);
        expect(after.fact).toBe(to.name);
        expect(misfitOf(to, after)).toBeNull();
      }),
      { seed: 7, numRuns: 2000 },
    );
  });

  it("fits with every operator of its fact, one after the other", () => {
    fc.assert(
      fc.property(facts, fc.array(fc.nat(20), { maxLength: 5 }), (fact, choices) => {
        const operators = operatorsOf[fact.type];
        let comparison = withFact({ fact: "degree", operator: "equal", value: 1 }, fact.name);
        for (const choice of choices) {
          const operator = operators[choice % operators.length];
          if (operator !== undefined) comparison = withOperator(comparison, operator);
          expect(misfitOf(fact, comparison)).toBeNull();
        }
      }),
      { seed: 7, numRuns: 2000 },
    );
  });

  it("keeps a threshold when another number takes its place", () => {
    expect(withFact({ fact: "cores", operator: "greaterThan", value: 64 }, "unknowns")).toEqual({ fact: "unknowns", operator: "greaterThan", value: 64 });
  });
});
