import { normalQuantile } from "./normal";

export type Interval = { low: number; high: number };

/**
 * Wilson's score interval of a proportion, without continuity correction (Wilson, JASA 22, 1927; method 3 of Newcombe, Statist. Med. 17, 1998).
 * `successes` out of `trials`, both whole, 0 <= successes <= trials; confidence in (0, 1). Ends lie in [0, 1].
 * No trials: the whole of [0, 1]. Throws RangeError on impossible counts.
 */
export function wilsonInterval(successes: number, trials: number, confidence = 0.95): Interval {
  if (!Number.isInteger(successes) || !Number.isInteger(trials) || successes < 0 || trials < successes) {
    throw new RangeError("Counts must be whole, with 0 <= successes <= trials.");
  }
  if (trials === 0) return { low: 0, high: 1 };
  const z = normalQuantile(0.5 + confidence / 2);
  const share = successes / trials;
  const centre = 2 * trials * share + z * z;
  const half = z * Math.sqrt(z * z + 4 * trials * share * (1 - share));
  const scale = 2 * (trials + z * z);
  // At 0 and at `trials` the end is exact; subtraction would leave round-off.
  return { low: successes === 0 ? 0 : (centre - half) / scale, high: successes === trials ? 1 : (centre + half) / scale };
}
