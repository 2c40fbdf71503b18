import type { Rule, RuleSet } from "@/rules/rule-schema";

/** A rule to begin with; its rationale is still to be written, and its problem list says so. */
export const blankRule: Rule = {
  id: "new-rule",
  title: "New rule",
  enabled: true,
  when: { fact: "degree", operator: "lessThanInclusive", value: 2 },
  then: [{ kind: "favour", strategy: "direct-ldlt", factor: 1 }],
  rationale: "",
  source: { kind: "common-practice" },
};

/** A rule with an id of its own after the one at `index`. */
export function insertRule(rules: RuleSet, index: number, rule: Rule): RuleSet {
  return rules.toSpliced(index + 1, 0, { ...rule, id: freeId(rules, rule.id) });
}

export function replaceRule(rules: RuleSet, index: number, rule: Rule): RuleSet {
  return rules.with(index, rule);
}

export function removeRule(rules: RuleSet, index: number): RuleSet {
  return rules.toSpliced(index, 1);
}

/** The rule at `from` read at place `to`; out of range, nothing changes. */
export function moveRule(rules: RuleSet, from: number, to: number): RuleSet {
  const rule = rules[from];
  if (rule === undefined || to < 0 || to >= rules.length) return rules;
  return rules.toSpliced(from, 1).toSpliced(to, 0, rule);
}

/** The id itself, or with the first number behind it that no rule has. */
export function freeId(rules: RuleSet, id: string): string {
  const taken = new Set(rules.map((rule) => rule.id));
  if (!taken.has(id)) return id;
  const stem = id.replace(/-\d+$/, "");
  for (let number = 2; ; number += 1) {
    const candidate = `${stem.slice(0, 70)}-${number}`;
    if (!taken.has(candidate)) return candidate;
  }
}
