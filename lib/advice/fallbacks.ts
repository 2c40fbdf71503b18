import { strategyIds, type StrategyId } from "@/lib/shared/strategy-ids";

type Fallback = { strategy: StrategyId; when: string };

/**
 * Where to go when a strategy fails: the one wanted, if it may compete; else along the definitions' own fallbacks to the first that may;
 * else the best ranked other one; null when nobody else may. `when` is kept, for it is about the strategy that fails. `ranked` best first.
 */
export function resolveFallback(
  strategy: StrategyId,
  wanted: Fallback,
  next: (strategy: StrategyId) => StrategyId,
  ranked: readonly StrategyId[],
): Fallback | null {
  let candidate = wanted.strategy;
  for (let step = 0; step < strategyIds.length; step += 1) {
    if (candidate !== strategy && ranked.includes(candidate)) return { strategy: candidate, when: wanted.when };
    candidate = next(candidate);
  }
  const other = ranked.find((id) => id !== strategy);
  return other === undefined ? null : { strategy: other, when: wanted.when };
}
