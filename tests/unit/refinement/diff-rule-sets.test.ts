import { describe, expect, it } from "vitest";
import { diffRuleSets, ruleDifferenceSchema } from "@/lib/refinement/diff-rule-sets";
import type { Effect, Rule, RuleSet } from "@/rules/rule-schema";
import { firstEdition } from "@/rules/sets/first-edition";
import { ruleOf } from "../../support/arbitrary-rules";

const many = { fact: "cores", operator: "greaterThan", value: 64 } as const;
const favour: Effect = { kind: "favour", strategy: "bddc", factor: 2 };
const base = ruleOf("a", many, [favour]);
const named = (...ids: string[]): RuleSet => ids.map((id) => ruleOf(id, many));

describe("the difference of two rule sets", () => {
  it("is empty for the same rules, whatever the order of their keys", () => {
    const reordered: RuleSet = firstEdition.map(({ source, then, when, ...rest }) => ({ source, when, then, ...rest }));
    expect(diffRuleSets(firstEdition, reordered)).toEqual([]);
  });

  it.each<[string, Partial<Rule>, string, string]>([
    ["title", { title: "Other" }, "title", "Title: Other, instead of: a."],
    ["switched off", { enabled: false }, "enabled", "Switched off."],
    ["condition", { when: { ...many, value: 128 } }, "condition", "When: cores are more than 128, instead of: cores are more than 64."],
    ["factor", { then: [{ ...favour, factor: 3 }] }, "effects", "Then favour bddc: expect it 3x faster than the model says, instead of: favour bddc: expect it 2x faster than the model says."],
    ["turned about", { then: [{ kind: "disfavour", strategy: "bddc", factor: 2 }] }, "effects", "Then disfavour bddc: expect 2x the time the model says, instead of: favour bddc: expect it 2x faster than the model says."],
    ["rationale", { rationale: "Because." }, "rationale", "Rationale: Because, instead of: A test."],
    ["source", { source: { kind: "team-evidence", numbers: "9 of 10" } }, "source", "Source: team evidence: 9 of 10, instead of: common practice, no source."],
  ])("tells a change in words: %s", (_name, change, aspect, text) => {
    const [difference, ...others] = diffRuleSets([base], [{ ...base, ...change }]);
    expect(others).toEqual([]);
    expect(difference).toMatchObject({ ruleId: "a", kind: "changed", changes: [{ aspect, text }] });
    expect(ruleDifferenceSchema.parse(difference)).toEqual(difference);
  });

  it("tells effects that are new, gone, or only in another order", () => {
    const caution: Effect = { kind: "caution", strategy: null, text: "Mind the gap." };
    const texts = (before: Effect[], after: Effect[]) => diffRuleSets([ruleOf("a", many, before)], [ruleOf("a", many, after)]).flatMap(({ changes }) => changes.map(({ text }) => text));
    expect(texts([favour], [favour, caution])).toEqual(["New effect: caution: Mind the gap."]);
    expect(texts([favour, caution], [favour])).toEqual(["No longer: caution: Mind the gap."]);
    expect(texts([favour, caution], [caution, favour])).toEqual(["The same effects in another order."]);
  });

  it("tells added and removed rules in full", () => {
    const [added, removed] = diffRuleSets(named("old"), [{ ...base, enabled: false }]);
    expect(added).toMatchObject({ kind: "added", ruleId: "a" });
    expect(added?.changes.map(({ aspect }) => aspect)).toEqual(["enabled", "condition", "effects", "rationale", "source"]);
    expect(removed).toMatchObject({ kind: "removed", ruleId: "old" });
    expect(removed?.changes.every(({ before, after }) => before !== null && after === null)).toBe(true);
  });

  it.each([
    [["a", "b", "c", "d"], ["b", "c", "d", "a"], ["a"]],
    [["a", "b", "c", "d"], ["a", "c", "b", "d"], ["b"]],
    [["a", "b", "c"], ["x", "a", "b", "c"], []],
    [["a", "b", "c"], ["a", "c"], []],
  ])("from %j to %j calls moved: %j", (before, after, moved) => {
    const differences = diffRuleSets(named(...before), named(...after));
    const ids = differences.filter(({ changes }) => changes.some(({ aspect }) => aspect === "order")).map(({ ruleId }) => ruleId);
    expect(ids).toEqual(moved);
  });
});
