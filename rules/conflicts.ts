import type { StrategyId } from "@/lib/shared/strategy-ids";
import type { Effect, Rule, RuleSet } from "./rule-schema";
import { canHold, implies } from "./satisfiability";
import type { RuleProblem } from "./validate-rule-set";

/**
 * Effects that meet another rule's exclusion or contrary setting. `sound` are the rules whose conditions fit their facts; paths count
 * in `ruleSet`. Rules that are switched off take no part.
 */
export function conflictsOf(sound: RuleSet, ruleSet: RuleSet): RuleProblem[] {
  const active = sound.filter(({ enabled }) => enabled);
  return active.flatMap((rule) => {
    const path = String(ruleSet.indexOf(rule));
    return rule.then.flatMap((effect, index) => conflictsOfEffect(rule, effect, `${path}.then.${index}`, active));
  });
}

function conflictsOfEffect(rule: Rule, effect: Effect, path: string, active: RuleSet): RuleProblem[] {
  switch (effect.kind) {
    case "favour":
    case "disfavour":
      return exclusionConflicts(rule, effect.strategy, path, active, effect.kind === "favour");
    case "fallback":
      return [...exclusionConflicts(rule, effect.strategy, path, active, false), ...exclusionConflicts(rule, effect.to, path, active, false)];
    case "set":
      return [...exclusionConflicts(rule, effect.strategy, path, active, false), ...settingConflicts(rule, effect, path, active)];
    case "exclude":
    case "caution":
      return [];
  }
}

/** Overruled on every case (warning), or, for a favour, on some (note). */
function exclusionConflicts(rule: Rule, strategy: StrategyId, path: string, active: RuleSet, alsoPartly: boolean): RuleProblem[] {
  return active.filter((other) => excludes(other, strategy)).flatMap((other): RuleProblem[] => {
    const who = other.id === rule.id ? "the same rule" : `the rule ${other.id}`;
    if (implies(rule.when, other.when)) {
      return [{ path, message: `This never takes effect: ${who} excludes ${strategy} whenever this rule fires.`, severity: "warning" }];
    }
    if (alsoPartly && canHold({ all: [rule.when, other.when] }) !== false) {
      return [{ path, message: `Contradicts ${who}, which excludes ${strategy} on some of the same cases; the exclusion wins there.`, severity: "note" }];
    }
    return [];
  });
}

function excludes(rule: Rule, strategy: StrategyId): boolean {
  return rule.then.some((effect) => effect.kind === "exclude" && effect.strategy === strategy);
}

function settingConflicts(rule: Rule, effect: Extract<Effect, { kind: "set" }>, path: string, active: RuleSet): RuleProblem[] {
  const later = active.slice(active.indexOf(rule) + 1);
  return later.filter((other) => setsOtherwise(other, effect) && canHold({ all: [rule.when, other.when] }) !== false).map((other) => ({
    path,
    message: `The rule ${other.id}, read later, sets ${effect.parameter} of ${effect.strategy} to another value on some of the same cases and wins there.`,
    severity: "note" as const,
  }));
}

function setsOtherwise(rule: Rule, { strategy, parameter, value }: Extract<Effect, { kind: "set" }>): boolean {
  return rule.then.some(
    (effect) => effect.kind === "set" && effect.strategy === strategy && effect.parameter === parameter && effect.value !== value,
  );
}
