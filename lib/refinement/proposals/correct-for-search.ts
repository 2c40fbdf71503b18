import { seededRandom } from "@/lib/shared/random";
import type { Steps } from "../run-in-steps";
import type { Family } from "./family";
import { largestStatistic } from "./walk";

/** Sign flips drawn for the null distribution of the largest statistic. */
export const flips = 1999;

export type Tested = { statistic: number };

/**
 * Probability, for each statistic of `tested`, that the best of all candidates of `families` would reach it were every change as likely to
 * cost as to save: on each flip the gains of each case change sign together, and the largest statistic over every candidate counts. So the
 * search itself is in the probability (Westfall & Young, Resampling-Based Multiple Testing, 1993). Stops drawing once no one can reach
 * `level`; the probabilities given then are above it. Yields the share done.
 */
export function* correctForSearch(
  families: readonly Family[],
  tested: readonly Tested[],
  { cases, seed, level }: { cases: number; seed: number; level: number },
): Steps<number[]> {
  const exceeded = tested.map(() => 0);
  const random = seededRandom(seed);
  const signs = new Int8Array(cases);
  const hopeless = Math.ceil(level * (flips + 1));
  let drawn = 0;
  while (drawn < flips && exceeded.some((count) => count < hopeless)) {
    for (let index = 0; index < cases; index += 1) signs[index] = random() < 0.5 ? -1 : 1;
    const largest = families.reduce((most, { walks }) => walks.reduce((found, walk) => Math.max(found, largestStatistic(walk, signs)), most), 0);
    tested.forEach(({ statistic }, index) => {
      if (largest >= statistic - 1e-12) exceeded[index] = (exceeded[index] ?? 0) + 1;
    });
    drawn += 1;
    yield drawn / flips;
  }
  return exceeded.map((count) => (1 + count) / (drawn + 1));
}
