import { Engine, type TopLevelCondition } from "json-rules-engine";
import type { Facts } from "./fact";
import type { Condition, Rule, RuleSet } from "./rule-schema";

/** A rule whose condition held, with its place in the edition (0 first). */
export type FiredRule = { rule: Rule; index: number };

/**
 * Run json-rules-engine over the enabled rules; answers those that fired, in the edition's order. The engine is built once per
 * rule-set object and kept as long as that object lives, so rule sets must not be changed in place.
 * Rejects where the engine does: a fact that a rule names is absent (rule sets are validated and facts parsed before).
 */
export async function fireRules(ruleSet: RuleSet, facts: Facts): Promise<FiredRule[]> {
  const kept = keptEngine(ruleSet);
  const result = kept.tail.then(() => kept.engine.run(facts));
  kept.tail = result.then(noValue, noValue);
  const { results } = await result;
  const fired = new Set(results.map(({ name }) => name));
  return ruleSet.flatMap((rule, index) => (rule.enabled && fired.has(rule.id) ? [{ rule, index }] : []));
}

/** `tail` ends with the last run asked for: an engine keeps its running state in itself, so overlapping runs would skip rules. */
type KeptEngine = { engine: Engine; tail: Promise<void> };

const engines = new WeakMap<RuleSet, KeptEngine>();

const noValue = (): void => undefined;

function keptEngine(ruleSet: RuleSet): KeptEngine {
  const found = engines.get(ruleSet);
  if (found) return found;
  const made = { engine: buildEngine(ruleSet), tail: Promise.resolve() };
  engines.set(ruleSet, made);
  return made;
}

/** A fresh engine of the enabled rules, each event named after its rule; all of one priority, so that order changes nothing. */
export function buildEngine(ruleSet: RuleSet): Engine {
  const rules = ruleSet
    .filter(({ enabled }) => enabled)
    .map(({ id, when }) => ({ name: id, conditions: topLevel(when), event: { type: id } }));
  return new Engine(rules);
}

/** json-rules-engine wants all, any or not outermost; a bare comparison becomes an `all` of one. */
function topLevel(condition: Condition): TopLevelCondition {
  return "fact" in condition ? { all: [condition] } : condition;
}
