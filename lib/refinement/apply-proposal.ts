import type { RuleSet } from "@/rules/rule-schema";
import type { Proposal } from "./proposal-schema";
import { sameContent } from "./same-content";

/**
 * The rule set with a proposal carried out: the changed rule in its place, a new one at the end. Throws RangeError where the rule is gone
 * or no longer what the proposal was made for, or where a new rule's id is taken.
 */
export function applyProposal(ruleSet: RuleSet, { ruleId, formerRule, rule }: Pick<Proposal, "ruleId" | "formerRule" | "rule">): RuleSet {
  const at = ruleSet.findIndex(({ id }) => id === ruleId);
  if (formerRule === null) {
    if (at >= 0) throw new RangeError(`There is a rule ${ruleId} already.`);
    return [...ruleSet, rule];
  }
  const current = ruleSet[at];
  if (current === undefined) throw new RangeError(`The rule ${ruleId} is no longer there.`);
  if (!sameContent(current, formerRule)) throw new RangeError(`The rule ${ruleId} has changed since this was proposed.`);
  return ruleSet.with(at, rule);
}
