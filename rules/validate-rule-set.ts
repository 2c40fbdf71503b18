import type { StrategyId } from "@/lib/shared/strategy-ids";
import { conflictsOf } from "./conflicts";
import { findFact } from "./facts";
import { misfitOf } from "./fit-comparison";
import type { Comparison, Condition, Effect, Rule, RuleSet } from "./rule-schema";
import { canFail, canHold } from "./satisfiability";

export const severities = ["error", "warning", "note"] as const;
export type Severity = (typeof severities)[number];

/** A located problem: `path` such as "3.when.all.0.value" counts rules from 0. Errors forbid publication; warnings and notes don't. */
export type RuleProblem = { path: string; message: string; severity: Severity };

/** Parameters that `set` may name, by strategy, each with its numeric bounds or its words. */
export type ParameterCatalogue = Record<StrategyId, Readonly<Record<string, readonly [number, number] | readonly string[]>>>;

/**
 * Problems of a rule set beyond its schema: unknown facts, operators and values that don't fit the fact, conditions that can never be
 * true or always are, unknown parameters, effects that another rule's exclusion overrules. In the order of the rules.
 */
export function validateRuleSet(ruleSet: RuleSet, parameters: ParameterCatalogue): RuleProblem[] {
  const own = ruleSet.map((rule, index) => problemsOfRule(rule, String(index), parameters));
  const conflicts = conflictsOf(ruleSet.filter((_, index) => !own[index]?.some(({ severity }) => severity === "error")), ruleSet);
  return ruleSet.flatMap((_, index) => [...(own[index] ?? []), ...conflicts.filter(({ path }) => path.startsWith(`${index}.`))]);
}

function problemsOfRule(rule: Rule, path: string, parameters: ParameterCatalogue): RuleProblem[] {
  const misfits = problemsOfCondition(rule.when, `${path}.when`);
  const effects = rule.then.flatMap((effect, index) => problemsOfEffect(effect, `${path}.then.${index}`, parameters));
  if (misfits.length > 0) return [...misfits, ...effects];
  return [...problemsOfReach(rule.when, `${path}.when`), ...effects];
}

function problemsOfCondition(condition: Condition, path: string): RuleProblem[] {
  if ("fact" in condition) return problemsOfComparison(condition, path);
  if ("not" in condition) return problemsOfCondition(condition.not, `${path}.not`);
  const key = "all" in condition ? "all" : "any";
  const members = "all" in condition ? condition.all : condition.any;
  return members.flatMap((member, index) => problemsOfCondition(member, `${path}.${key}.${index}`));
}

function problemsOfComparison(comparison: Comparison, path: string): RuleProblem[] {
  const definition = findFact(comparison.fact);
  if (!definition) return [{ path: `${path}.fact`, message: `There is no fact named ${comparison.fact}.`, severity: "error" }];
  const misfit = misfitOf(definition, comparison);
  return misfit ? [{ path: `${path}.${misfit.key}`, message: misfit.message, severity: "error" }] : [];
}

function problemsOfReach(condition: Condition, path: string): RuleProblem[] {
  if (canHold(condition) === false) return [{ path, message: "This condition can never be true.", severity: "error" }];
  if (canFail(condition) === false) return [{ path, message: "This condition is always true.", severity: "warning" }];
  return [];
}

function problemsOfEffect(effect: Effect, path: string, parameters: ParameterCatalogue): RuleProblem[] {
  if (effect.kind === "fallback" && effect.to === effect.strategy) {
    return [{ path: `${path}.to`, message: "A strategy can't be its own fallback.", severity: "error" }];
  }
  if (effect.kind !== "set") return [];
  const known = parameters[effect.strategy];
  const range = Object.hasOwn(known, effect.parameter) ? known[effect.parameter] : undefined;
  if (!range) {
    const names = Object.keys(known);
    const choice = names.length > 0 ? ` It has ${names.join(", ")}.` : " It has none.";
    return [{ path: `${path}.parameter`, message: `${effect.strategy} has no parameter ${effect.parameter}.${choice}`, severity: "error" }];
  }
  const message = problemOfValue(range, effect.value);
  return message ? [{ path: `${path}.value`, message, severity: "error" }] : [];
}

function problemOfValue(range: readonly [number, number] | readonly string[], value: number | string): string | null {
  const [low, high] = range;
  if (typeof low === "number" && typeof high === "number") {
    if (typeof value !== "number") return "This parameter is a number.";
    return value < low || value > high ? `This parameter lies between ${low} and ${high}.` : null;
  }
  return range.some((word) => word === value) ? null : `This parameter is one of ${range.join(", ")}.`;
}
