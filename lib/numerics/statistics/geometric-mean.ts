/** Geometric mean of positive numbers, through the mean of their logarithms; null for none. Throws RangeError on a number that is not positive and finite. */
export function geometricMean(values: readonly number[]): number | null {
  if (values.length === 0) return null;
  let sum = 0;
  for (const value of values) {
    if (!(value > 0 && Number.isFinite(value))) throw new RangeError("A geometric mean needs positive finite numbers.");
    sum += Math.log(value);
  }
  return Math.exp(sum / values.length);
}
