import { regularizedIncompleteBeta } from "./incomplete-beta";

/** P(T <= t) of Student's distribution with `degreesOfFreedom` > 0 (need not be whole). */
export function studentTCdf(t: number, degreesOfFreedom: number): number {
  if (!(degreesOfFreedom > 0)) throw new RangeError("Degrees of freedom must be positive.");
  if (t === 0) return 0.5;
  const tail = 0.5 * regularizedIncompleteBeta(degreesOfFreedom / (degreesOfFreedom + t * t), degreesOfFreedom / 2, 0.5);
  return t > 0 ? 1 - tail : tail;
}

/**
 * Quantile t with P(T <= t) = probability, probability in (0, 1), by bisection on the distribution function; relative error about 1e-12.
 * Throws RangeError outside the domain.
 */
export function studentTQuantile(probability: number, degreesOfFreedom: number): number {
  if (!(probability > 0 && probability < 1)) throw new RangeError("The probability must lie strictly between 0 and 1.");
  if (!(degreesOfFreedom > 0)) throw new RangeError("Degrees of freedom must be positive.");
  if (probability === 0.5) return 0;
  if (probability < 0.5) return -studentTQuantile(1 - probability, degreesOfFreedom);
  let low = 0;
  let high = 1;
  while (studentTCdf(high, degreesOfFreedom) < probability && high < 1e300) high *= 2;
  for (let step = 0; step < 200 && high - low > 1e-13 * high; step++) {
    const middle = 0.5 * (low + high);
    if (studentTCdf(middle, degreesOfFreedom) < probability) low = middle;
    else high = middle;
  }
  return 0.5 * (low + high);
}
