import { strategyIds, type StrategyId } from "@/lib/shared/strategy-ids";
import type { FiredRule } from "@/rules/engine";
import type { Factor } from "./advice";
import { byStrategy } from "./evidence";

/** What the fired rules do to one strategy. */
export type StrategyEffects = {
  /** In the edition's order. */
  factors: Factor[];
  exclusions: string[];
  /** Later rules have the last word. */
  parameters: Record<string, number | string>;
  cautions: string[];
  fallback: { strategy: StrategyId; when: string } | null;
};

export type RuleEffects = { strategies: Readonly<Record<StrategyId, StrategyEffects>>; cautions: string[] };

/** Sort the effects of the fired rules by strategy. A rule fires once; where two set one parameter or fallback, the later one holds. */
export function collectEffects(fired: readonly FiredRule[]): RuleEffects {
  const effects: RuleEffects = {
    strategies: byStrategy(() => ({ factors: [], exclusions: [], parameters: {}, cautions: [], fallback: null })),
    cautions: [],
  };
  for (const { rule } of fired) for (const effect of rule.then) apply(effects, rule, effect);
  return effects;
}

/** Product of the rules' factors on a strategy, above 1 slower. */
export function ruleFactor(effects: RuleEffects, strategy: StrategyId): number {
  return effects.strategies[strategy].factors.reduce((product, { factor }) => product * factor, 1);
}

/** All strategies' factor products at once. */
export function ruleFactors(fired: readonly FiredRule[]): Readonly<Record<StrategyId, number>> {
  const effects = collectEffects(fired);
  return byStrategy((strategy) => ruleFactor(effects, strategy));
}

function apply(effects: RuleEffects, rule: FiredRule["rule"], effect: FiredRule["rule"]["then"][number]): void {
  switch (effect.kind) {
    case "favour":
      effects.strategies[effect.strategy].factors.push(factorOf(rule, 1 / effect.factor));
      return;
    case "disfavour":
      effects.strategies[effect.strategy].factors.push(factorOf(rule, effect.factor));
      return;
    case "exclude":
      effects.strategies[effect.strategy].exclusions.push(effect.reason);
      return;
    case "set":
      effects.strategies[effect.strategy].parameters[effect.parameter] = effect.value;
      return;
    case "caution":
      addOnce(effect.strategy === null ? effects.cautions : effects.strategies[effect.strategy].cautions, effect.text);
      return;
    case "fallback":
      effects.strategies[effect.strategy].fallback = { strategy: effect.to, when: sentence(effect.when) };
  }
}

function factorOf(rule: FiredRule["rule"], factor: number): Factor {
  return { kind: "rule", rule: rule.id, factor, text: `${rule.title}. ${rule.rationale}`, source: rule.source };
}

/** Rules say when as a clause, definitions as a sentence; advice shows sentences. */
function sentence(clause: string): string {
  const text = clause.charAt(0).toUpperCase() + clause.slice(1);
  return /[.?]$/.test(text) ? text : `${text}.`;
}

function addOnce(texts: string[], text: string): void {
  if (!texts.includes(text)) texts.push(text);
}

/** Rank of a strategy in the fixed order that breaks ties. */
export function listedPlace(strategy: StrategyId): number {
  return strategyIds.indexOf(strategy);
}
