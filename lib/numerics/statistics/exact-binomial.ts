import { logBinomial } from "./log-gamma";

/**
 * Two-sided p value of the exact binomial test of a fair coin: the probability, under 1/2, of a split at least as uneven as
 * `first` against `second` (whole, >= 0). No trials: 1. Sums the tail from the middle outwards; cost O(min(first, second)).
 * Throws RangeError on impossible counts.
 */
export function exactBinomialHalf(first: number, second: number): number {
  if (!Number.isInteger(first) || !Number.isInteger(second) || first < 0 || second < 0) throw new RangeError("Counts must be whole and not negative.");
  const trials = first + second;
  if (first === second) return 1;
  const fewer = Math.min(first, second);
  let tail = 0;
  for (let k = 0; k <= fewer; k++) tail += Math.exp(logBinomial(trials, k) - trials * Math.LN2);
  return Math.min(1, 2 * tail);
}
