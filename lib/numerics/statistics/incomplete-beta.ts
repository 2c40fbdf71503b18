import { logGamma } from "./log-gamma";

const maxSteps = 1000;
const tiny = 1e-300;

/**
 * Regularised incomplete beta function I_x(a, b), a > 0, b > 0, 0 <= x <= 1; absolute error about 1e-13.
 * Continued fraction of DLMF 8.17.22, evaluated by Lentz's method, on the side of the mean where it converges quickly.
 * Throws RangeError on arguments outside the domain.
 */
export function regularizedIncompleteBeta(x: number, a: number, b: number): number {
  if (!(a > 0 && b > 0 && x >= 0 && x <= 1)) throw new RangeError("The incomplete beta function needs a, b > 0 and 0 <= x <= 1.");
  if (x === 0 || x === 1) return x;
  const front = Math.exp(logGamma(a + b) - logGamma(a) - logGamma(b) + a * Math.log(x) + b * Math.log1p(-x));
  if (x < (a + 1) / (a + b + 2)) return (front * continuedFraction(x, a, b)) / a;
  return 1 - (front * continuedFraction(1 - x, b, a)) / b;
}

function continuedFraction(x: number, a: number, b: number): number {
  let c = 1;
  let d = 1 / guarded(1 - ((a + b) * x) / (a + 1));
  let value = d;
  for (let m = 1; m <= maxSteps; m++) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
    d = 1 / guarded(1 + even * d);
    c = guarded(1 + even / c);
    value *= d * c;
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    d = 1 / guarded(1 + odd * d);
    c = guarded(1 + odd / c);
    const change = d * c;
    value *= change;
    if (Math.abs(change - 1) < 1e-15) return value;
  }
  return value;
}

function guarded(value: number): number {
  return Math.abs(value) < tiny ? tiny : value;
}
