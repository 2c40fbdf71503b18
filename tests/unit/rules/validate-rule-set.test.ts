import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { strategyIds } from "@/lib/shared/strategy-ids";
import { compileCondition } from "@/rules/compile";
import type { Comparison, Condition, Effect } from "@/rules/rule-schema";
import { canFail, canHold } from "@/rules/satisfiability";
import { trueTruth } from "@/rules/truth";
import { validateRuleSet, type ParameterCatalogue } from "@/rules/validate-rule-set";
import { arbitraryCondition, arbitraryFacts, ruleOf } from "../../support/arbitrary-rules";

const catalogue: ParameterCatalogue = {
  "direct-ldlt": {},
  "direct-blr": { compression: [1e-14, 1e-2] },
  "schur-diag-direct": { restart: [10, 500], ordering: ["nested-dissection", "minimum-degree"] },
  "schur-diag-amg": {},
  "schur-triangular": {},
  "regularized-amg": {},
  "hdiv-auxiliary": {},
  "hybridized-amg": {},
  bddc: {},
  "schwarz-two-level": {},
  "p-multigrid": {},
};

const when = (fact: string, operator: Comparison["operator"], value: Comparison["value"]): Comparison => ({ fact, operator, value });
const lowOrder = when("degree", "lessThanInclusive", 2);
const problems = (condition: Condition, ...then: Effect[]) => validateRuleSet([ruleOf("a", condition, then.length > 0 ? then : undefined)], catalogue);

describe("validation of a rule set", () => {
  it.each<[string, Condition, string, RegExp]>([
    ["an unknown fact", when("colour", "equal", "red"), "0.when.fact", /no fact named colour/],
    ["an unknown fact deep inside", { all: [lowOrder, { not: { any: [when("kores", "equal", 3)] } }] }, "0.when.all.1.not.any.0.fact", /kores/],
    ["a word for a number", when("degree", "equal", "two"), "0.when.value", /degree is compared with a number, not with "two"/],
    ["a number with the unit of the fact in the message", when("memoryTotalGiB", "lessThan", "64"), "0.when.value", /a number in GiB/],
    ["a word outside the closed set", when("meshFamily", "equal", "squares"), "0.when.value", /it is one of cubes/],
    ["an ordering of words", when("meshFamily", "lessThan", 3), "0.when.operator", /lessThan does not go with mesh family/],
    ["contains on a number", when("degree", "contains", 3), "0.when.operator", /contains/],
    ["in without a list", when("degree", "in", 3), "0.when.value", /list of values/],
    ["an empty list", when("degree", "in", []), "0.when.value", /empty/],
    ["equality with a list", when("degree", "equal", [1, 2]), "0.when.value", /one value/],
    ["a truth value for a word", when("priority", "equal", true), "0.when.value", /compared with a word/],
    ["an unknown capability", when("available", "contains", "gpu"), "0.when.value", /parallel-direct/],
    ["crossed bounds", { all: [when("degree", "greaterThan", 3), when("degree", "lessThan", 3)] }, "0.when", /never be true/],
    ["whole numbers with nothing between", { all: [when("degree", "greaterThan", 2), when("degree", "lessThan", 3)] }, "0.when", /never be true/],
    ["a degree beyond the questionnaire's", when("degree", "greaterThan", 6), "0.when", /never be true/],
    ["two families at once", { all: [when("meshFamily", "equal", "cubes"), when("meshFamily", "equal", "voronoi")] }, "0.when", /never be true/],
    ["a capability present and absent", { all: [when("available", "contains", "amg"), when("available", "doesNotContain", "amg")] }, "0.when", /never be true/],
    ["every word excluded", when("priority", "notIn", ["time", "memory", "robustness"]), "0.when", /never be true/],
    ["a condition of no effect", when("degree", "greaterThanInclusive", 1), "0.when", /always true/],
    ["two halves of everything", { any: [when("cores", "lessThan", 64), when("cores", "greaterThanInclusive", 64)] }, "0.when", /always true/],
  ])("finds %s", (_, condition, path, message) => {
    const found = problems(condition);
    expect(found).toHaveLength(1);
    expect(found[0]?.path).toBe(path);
    expect(found[0]?.message).toMatch(message);
  });

  it.each<[string, Effect, string, RegExp]>([
    ["a parameter of nobody", { kind: "set", strategy: "direct-ldlt", parameter: "gamma", value: 1 }, "0.then.0.parameter", /It has none/],
    ["another strategy's parameter", { kind: "set", strategy: "direct-blr", parameter: "restart", value: 30 }, "0.then.0.parameter", /It has compression/],
    ["a parameter named like Object's methods", { kind: "set", strategy: "bddc", parameter: "constructor", value: 1 }, "0.then.0.parameter", /no parameter/],
    ["a value out of bounds", { kind: "set", strategy: "direct-blr", parameter: "compression", value: 1 }, "0.then.0.value", /between 1e-14 and 0.01/],
    ["a word for a number", { kind: "set", strategy: "direct-blr", parameter: "compression", value: "fine" }, "0.then.0.value", /is a number/],
    ["an unknown word", { kind: "set", strategy: "schur-diag-direct", parameter: "ordering", value: "random" }, "0.then.0.value", /one of nested-dissection/],
    ["a strategy that falls back on itself", { kind: "fallback", strategy: "bddc", to: "bddc", when: "it stalls" }, "0.then.0.to", /own fallback/],
  ])("finds %s in an effect", (_, effect, path, message) => {
    const found = problems(lowOrder, effect);
    expect(found.map((problem) => problem.path)).toEqual([path]);
    expect(found[0]?.message).toMatch(message);
    expect(found[0]?.severity).toBe("error");
  });

  it("tells a favour that another rule's exclusion always overrules from one that it meets on some cases", () => {
    const exclusion = ruleOf("out", when("degree", "greaterThan", 2), [{ kind: "exclude", strategy: "bddc", reason: "Not here." }]);
    const favour: Effect = { kind: "favour", strategy: "bddc", factor: 2 };
    const within = ruleOf("within", when("degree", "greaterThan", 4), [favour]);
    const overlapping = ruleOf("overlapping", when("cores", "greaterThan", 64), [favour]);
    const apart = ruleOf("apart", lowOrder, [favour]);
    expect(validateRuleSet([exclusion, within, overlapping, apart], catalogue).map(({ path, severity }) => [path, severity])).toEqual([
      ["1.then.0", "warning"],
      ["2.then.0", "note"],
    ]);
  });

  it("lets a rule that is switched off contradict nobody", () => {
    const exclusion = ruleOf("out", lowOrder, [{ kind: "exclude", strategy: "bddc", reason: "Not here." }], false);
    expect(validateRuleSet([exclusion, ruleOf("in", lowOrder, [{ kind: "favour", strategy: "bddc", factor: 2 }])], catalogue)).toEqual([]);
  });

  it("notes two rules that set one parameter differently on the same cases", () => {
    const set = (value: number): Effect => ({ kind: "set", strategy: "schur-diag-direct", parameter: "restart", value });
    const found = validateRuleSet([ruleOf("a", lowOrder, [set(30)]), ruleOf("b", when("cores", "greaterThan", 8), [set(60)])], catalogue);
    expect(found.map(({ path, severity }) => [path, severity])).toEqual([["0.then.0", "note"]]);
  });

  it("never calls a condition impossible or constant that random facts show otherwise", () => {
    fc.assert(
      fc.property(arbitraryCondition, arbitraryFacts, (condition, facts) => {
        // Facts outside the questionnaire's bounds (degree 0 or 1e6) are no witnesses.
        fc.pre(Number.isInteger(facts.degree) && Number(facts.degree) >= 1 && Number(facts.degree) <= 6);
        fc.pre(Number.isInteger(facts.cores) && Number(facts.cores) >= 1 && Number(facts.cores) <= 4e6 && Number(facts.contrastRatio) >= 1);
        const holds = compileCondition(condition)(facts) === trueTruth;
        expect((holds ? canHold : canFail)(condition)).not.toBe(false);
      }),
      { seed: 20_264, numRuns: 3000 },
    );
  });

  it("makes no claim where the branches are too many to follow", () => {
    const either = (value: number): Condition => ({ any: [when("degree", "equal", value), when("cores", "equal", value), when("nodes", "equal", value)] });
    expect(canHold({ all: Array.from({ length: 12 }, (_, index) => either(index + 1)) })).toBeNull();
  });

  it("knows every strategy in its catalogue", () => {
    expect(Object.keys(catalogue)).toEqual([...strategyIds]);
  });
});
