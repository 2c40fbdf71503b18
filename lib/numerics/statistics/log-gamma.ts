const halfLogTwoPi = 0.9189385332046727418;

/** Coefficients B_2j / (2j (2j - 1)) of Stirling's series. */
const stirling = [1 / 12, -1 / 360, 1 / 1260, -1 / 1680, 1 / 1188, -691 / 360360, 1 / 156];

/**
 * Natural logarithm of the gamma function for x > 0, relative error below 1e-13 away from its zeros at 1 and 2.
 * Recurrence up to x >= 10, then Stirling's series (Abramowitz & Stegun 6.1.40). Throws RangeError for x <= 0.
 */
export function logGamma(x: number): number {
  if (!(x > 0)) throw new RangeError("The logarithm of gamma is taken for positive arguments only.");
  let shifted = x;
  let product = 1;
  while (shifted < 10) {
    product *= shifted;
    shifted += 1;
  }
  const inverseSquare = 1 / (shifted * shifted);
  let power = 1 / shifted;
  let series = 0;
  for (const coefficient of stirling) {
    series += coefficient * power;
    power *= inverseSquare;
  }
  return (shifted - 0.5) * Math.log(shifted) - shifted + halfLogTwoPi + series - Math.log(product);
}

/** ln of the binomial coefficient "n over k", 0 <= k <= n. */
export function logBinomial(n: number, k: number): number {
  return logGamma(n + 1) - logGamma(k + 1) - logGamma(n - k + 1);
}
