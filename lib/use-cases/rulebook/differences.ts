import { diffRuleSets, type RuleDifference } from "@/lib/refinement/diff-rule-sets";
import { strategyName } from "@/lib/strategies/strategy-names";
import type { RuleSet } from "@/rules/rule-schema";

/** What a second rule set changes in a first, rule by rule, with strategies by their trade names. */
export function differencesInWords(before: RuleSet, after: RuleSet): RuleDifference[] {
  return diffRuleSets(before, after, (strategy) => strategyName(strategy));
}

/** Ids of the rules that differ, for the audit list. */
export function changedRules(before: RuleSet, after: RuleSet): string[] {
  return diffRuleSets(before, after).map(({ ruleId }) => ruleId);
}
