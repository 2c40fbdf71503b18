/** Quantile of a sample by linear interpolation between order statistics (Hyndman & Fan's type 7). */
export function spreadQuantile(values: readonly number[], share: number): number {
  const sorted = [...values].sort((a, b) => a - b);
  const at = share * (sorted.length - 1);
  const below = sorted[Math.floor(at)] ?? NaN;
  const above = sorted[Math.ceil(at)] ?? NaN;
  return below + (at - Math.floor(at)) * (above - below);
}
