import { strategyIds, type StrategyId } from "@/lib/shared/strategy-ids";
import type { Rule } from "@/rules/rule-schema";
import { trueTruth } from "@/rules/truth";
import { places, type PreparedReplay } from "./prepare-replay";

/** What a rule does to who comes first, by place in `strategyIds`. */
export type RuleForce = { factors: readonly { place: number; factor: number }[]; excluded: readonly number[] };

/** First choice of a case that no strategy may compete in. */
export const noChoice = -1;

/**
 * First choices of the rows from `from` to before `to`, written into `firsts` as places. `truths[r][row]` is the truth of the rule with
 * `forces[r]`; only what is surely true acts. Equal to the ranking of lib/advice, product by product: score = median total time x (rules'
 * factors x evidence x priority), ties to the strategy listed first.
 */
export function chooseFirsts(
  prepared: PreparedReplay,
  forces: readonly RuleForce[],
  truths: readonly Uint8Array[],
  firsts: Int8Array,
  [from, to]: readonly [number, number] = [0, prepared.cases.length],
): void {
  const products = new Float64Array(places);
  const excluded = new Uint8Array(places);
  for (let row = from; row < to; row += 1) {
    products.fill(1);
    excluded.fill(0);
    for (let index = 0; index < forces.length; index += 1) {
      const force = forces[index];
      if (force === undefined || truths[index]?.[row] !== trueTruth) continue;
      for (const { place, factor } of force.factors) products[place] = (products[place] ?? 1) * factor;
      for (const place of force.excluded) excluded[place] = 1;
    }
    firsts[row] = firstOfRow(prepared, row, products, excluded);
  }
}

function firstOfRow({ table }: PreparedReplay, row: number, products: Float64Array, excluded: Uint8Array): number {
  const leanestGiB = table.memoryFirst[row] === 1 ? leanestOf(table, row, excluded) : 0;
  let first = noChoice;
  let least = Infinity;
  for (let place = 0; place < places; place += 1) {
    const at = row * places + place;
    if (table.mayCompete[at] !== 1 || excluded[place] === 1) continue;
    const priority = leanestGiB > 0 ? Math.sqrt(Math.max(1, (table.memoryGiB[at] ?? 0) / leanestGiB)) : (table.priorityFactor[at] ?? 1);
    const score = (table.totalSeconds[at] ?? 0) * ((products[place] ?? 1) * (table.evidenceFactor[at] ?? 1) * priority);
    if (first === noChoice || score < least) {
      first = place;
      least = score;
    }
  }
  return first;
}

function leanestOf(table: PreparedReplay["table"], row: number, excluded: Uint8Array): number {
  let leanest = Infinity;
  for (let place = 0; place < places; place += 1) {
    const at = row * places + place;
    if (table.mayCompete[at] === 1 && excluded[place] !== 1) leanest = Math.min(leanest, table.memoryGiB[at] ?? 0);
  }
  return leanest;
}

/** Factors multiply, above 1 slower. */
export function forceOf({ then }: Pick<Rule, "then">): RuleForce {
  return {
    factors: then.flatMap((effect) => {
      if (effect.kind === "favour") return [{ place: placeOf(effect.strategy), factor: 1 / effect.factor }];
      return effect.kind === "disfavour" ? [{ place: placeOf(effect.strategy), factor: effect.factor }] : [];
    }),
    excluded: then.flatMap((effect) => (effect.kind === "exclude" ? [placeOf(effect.strategy)] : [])),
  };
}

export function placeOf(strategy: StrategyId): number {
  return strategyIds.indexOf(strategy);
}

/** Null for no choice. */
export function strategyAt(place: number | undefined): StrategyId | null {
  return place === undefined ? null : (strategyIds[place] ?? null);
}
