/** Normal-inverse-gamma prior: coefficients independent, centred on zero, with precisions in units of 1/noise variance. */
export type RegressionPrior = {
  /** One per coefficient, >= 0; all 0 is the flat prior. */
  precision: readonly number[];
  /** Shape and scale of the noise variance's inverse gamma. -p/2 and 0 with a flat prior give the usual n - p degrees of freedom. */
  shape: number;
  scale: number;
};

/** Posterior in closed form. `upper` is the p x p factor R (by rows, R'R = X'X + precision), so that it can be kept as JSON. */
export type RegressionPosterior = {
  mean: number[];
  upper: number[][];
  /** Degrees of freedom of the posterior t distributions. */
  degreesOfFreedom: number;
  /** Posterior scale of the noise variance; the residual variance in the flat limit. */
  noiseVariance: number;
  count: number;
};

/**
 * Conjugate Bayesian linear regression y = X b + noise. `design` n rows of p numbers, `response` n numbers; neither is changed.
 * Householder QR of X stacked on the square roots of the prior's precisions, so that an ill-conditioned design loses cond(X) and not its
 * square. 2 (n + p) p^2 flops, (n + p) p numbers of storage.
 * Throws RangeError for rows of unequal length and for a design that leaves a coefficient undetermined under a flat prior.
 * Gelman et al., "Bayesian Data Analysis", 3rd ed., 2013, section 14.8; Golub & Van Loan, "Matrix Computations", 4th ed., section 5.3.
 */
export function fitBayesRegression(design: readonly (readonly number[])[], response: readonly number[], prior: RegressionPrior): RegressionPosterior {
  const p = prior.precision.length;
  if (design.length !== response.length || design.some((row) => row.length !== p)) {
    throw new RangeError("Design, response and prior don't fit each other.");
  }
  const columns = stackColumns(design, prior.precision);
  const rightHandSide = new Float64Array(design.length + p);
  rightHandSide.set(response);
  triangularise(columns, rightHandSide);
  const upper = Array.from({ length: p }, (_, i) => Array.from({ length: p }, (__, j) => (j < i ? 0 : at(columns, j, i))));
  const mean = solveUpper(upper, rightHandSide.subarray(0, p));
  const shape = prior.shape + design.length / 2;
  if (!(shape > 0)) throw new RangeError("Too few observations for this prior: no degrees of freedom are left.");
  const scale = prior.scale + 0.5 * penalisedSquares(design, response, prior.precision, mean);
  return { mean, upper, degreesOfFreedom: 2 * shape, noiseVariance: scale / shape, count: design.length };
}

/** Prediction of the mean response at `x`, and of one new observation: centre and t scales (standard deviations for many runs). */
export type RegressionPrediction = { mean: number; meanDeviation: number; observationDeviation: number };

/** Prediction at one point of p features. */
export function predictBayesRegression({ mean, upper, noiseVariance }: RegressionPosterior, x: readonly number[]): RegressionPrediction {
  const w = solveTransposed(upper, x);
  const leverage = w.reduce((sum, value) => sum + value * value, 0);
  return {
    mean: mean.reduce((sum, value, j) => sum + value * (x[j] ?? 0), 0),
    meanDeviation: Math.sqrt(noiseVariance * leverage),
    observationDeviation: Math.sqrt(noiseVariance * (1 + leverage)),
  };
}

/** Posterior scale of each coefficient; the standard errors in the flat limit. */
export function coefficientDeviations(posterior: RegressionPosterior): number[] {
  return posterior.mean.map((_, j) => predictBayesRegression(posterior, posterior.mean.map((__, i) => (i === j ? 1 : 0))).meanDeviation);
}

function at(columns: readonly Float64Array[], j: number, i: number): number {
  return columns[j]?.[i] ?? 0;
}

function stackColumns(design: readonly (readonly number[])[], precision: readonly number[]): Float64Array[] {
  return precision.map((weight, j) => {
    const column = new Float64Array(design.length + precision.length);
    design.forEach((row, i) => (column[i] = row[j] ?? 0));
    column[design.length + j] = Math.sqrt(weight);
    return column;
  });
}

/** Householder QR in place: R in the leading rows, Q' applied to `rightHandSide`. */
function triangularise(columns: readonly Float64Array[], rightHandSide: Float64Array): void {
  columns.forEach((column, k) => {
    const whole = norm2(column);
    const norm = norm2(column.subarray(k));
    if (!(norm > 1e-14 * whole)) throw new RangeError(`Coefficient ${k} is not determined by the observations; give it a prior.`);
    const diagonal = (column[k] ?? 0) > 0 ? -norm : norm;
    const reflector = column.slice(k);
    reflector[0] = (reflector[0] ?? 0) - diagonal;
    const half = reflector.reduce((sum, value) => sum + value * value, 0) / 2;
    for (const target of [...columns.slice(k + 1), rightHandSide]) reflect(target, k, reflector, half);
    column[k] = diagonal;
    column.fill(0, k + 1);
  });
}

function norm2(vector: Float64Array): number {
  return Math.sqrt(vector.reduce((sum, value) => sum + value * value, 0));
}

/** target := target - v (v't) / (v'v / 2) from entry k on. */
function reflect(target: Float64Array, k: number, reflector: Float64Array, half: number): void {
  let product = 0;
  for (let i = 0; i < reflector.length; i += 1) product += (reflector[i] ?? 0) * (target[k + i] ?? 0);
  const step = product / half;
  for (let i = 0; i < reflector.length; i += 1) target[k + i] = (target[k + i] ?? 0) - step * (reflector[i] ?? 0);
}

function solveUpper(upper: readonly (readonly number[])[], b: Float64Array): number[] {
  const x = Array.from(b);
  for (let i = x.length - 1; i >= 0; i -= 1) {
    const row = upper[i] ?? [];
    let sum = x[i] ?? 0;
    for (let j = i + 1; j < x.length; j += 1) sum -= (row[j] ?? 0) * (x[j] ?? 0);
    x[i] = sum / (row[i] ?? 1);
  }
  return x;
}

function solveTransposed(upper: readonly (readonly number[])[], b: readonly number[]): number[] {
  const x: number[] = [];
  for (let i = 0; i < upper.length; i += 1) {
    let sum = b[i] ?? 0;
    for (let j = 0; j < i; j += 1) sum -= (upper[j]?.[i] ?? 0) * (x[j] ?? 0);
    x.push(sum / (upper[i]?.[i] ?? 1));
  }
  return x;
}

/** |y - X b|^2 + b' precision b, which equals y'y - b'(X'X + precision) b without its cancellation. */
function penalisedSquares(design: readonly (readonly number[])[], response: readonly number[], precision: readonly number[], mean: readonly number[]): number {
  let squares = 0;
  design.forEach((row, i) => {
    const residual = (response[i] ?? 0) - row.reduce((sum, value, j) => sum + value * (mean[j] ?? 0), 0);
    squares += residual * residual;
  });
  return precision.reduce((sum, weight, j) => sum + weight * (mean[j] ?? 0) ** 2, squares);
}
