/**
 * Bounds for Krylov methods on K with P = blockdiag(diag(A), B diag(A)^-1 Bᵀ).
 *
 * With [d1, d2] the spectral interval of diag(A)^-1 A and the Schur complement of diag(A) inverted exactly, P^-1 K has its eigenvalues in
 *   [-(sqrt(d1^2+4) - d1)/2, -(sqrt(d2^2+4) - d2)/2]  and  [d1, (d2 + sqrt(d2^2+4))/2]
 * (Rusten & Winther, SIAM J. Matrix Anal. Appl. 13(3), 1992; Silvester & Wathen, SIAM J. Numer. Anal. 31(5), 1994).
 */
export type SaddleIntervals = { negative: readonly [number, number]; positive: readonly [number, number] };

export function saddleIntervals(d1: number, d2: number): SaddleIntervals {
  const root1 = Math.sqrt(d1 * d1 + 4);
  const root2 = Math.sqrt(d2 * d2 + 4);
  return { negative: [-(root1 - d1) / 2, -(root2 - d2) / 2], positive: [d1, (d2 + root2) / 2] };
}

/**
 * Steps after which MINRES on two intervals has reduced the residual in the P^-1 norm by `tolerance`:
 * |r_2m| / |r_0| <= 2 ((sqrt(ad) - sqrt(bc)) / (sqrt(ad) + sqrt(bc)))^m on [-a, -b] and [c, d] of equal length (Greenbaum, "Iterative Methods for Solving
 * Linear Systems", SIAM 1997, ch. 3). The shorter interval is extended at its outer end.
 */
export function minresBound({ negative, positive }: SaddleIntervals, tolerance: number): number {
  const [, inner] = negative;
  const b = -inner;
  const [c] = positive;
  const length = Math.max(b === 0 ? 0 : -negative[0] - b, positive[1] - c);
  const outer = Math.sqrt((b + length) * (c + length));
  const central = Math.sqrt(b * c);
  if (outer === central) return 2;
  return 2 * Math.max(1, Math.ceil(Math.log(2 / tolerance) / Math.log((outer + central) / (outer - central))));
}

/** Steps of CG, |e_m| <= 2 ((sqrt k - 1)/(sqrt k + 1))^m |e_0| in the energy norm, as a real number at least 1. */
export function conjugateGradientSteps(conditionNumber: number, tolerance: number): number {
  const root = Math.sqrt(Math.max(1, conditionNumber));
  if (root - 1 < 1e-12) return 1;
  return Math.max(1, Math.log(2 / tolerance) / Math.log((root + 1) / (root - 1)));
}
