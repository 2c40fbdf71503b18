import type { Answers } from "@/lib/questionnaire/answers";
import type { Sizes } from "@/lib/sizes/sizes";
import type { CostKit, CostStep, IterationCount, ResidualLag, SpectralInterval } from "@/lib/strategies/cost";
import type { ModelConstants } from "./constants";
import type { Variant } from "./variant";
import { conjugateGradientSteps, minresBound, saddleIntervals } from "./saddle-bounds";

type Case = { answers: Answers; sizes: Sizes; constants: ModelConstants; interval: () => SpectralInterval; variant: Variant };

/** Counts at 1e-8 scale to other tolerances as ln(2 / tolerance): convergence is linear. */
const referenceTolerance = 1e-8;

export function iterationCounts({ answers, sizes, constants, interval, variant }: Case): CostKit["iterations"] {
  const divisions = Math.cbrt(sizes.cells);
  const { degree, hardware } = answers;
  const contrast = answers.contrast.ratio;
  const subdomainRatio = Math.max(1, Math.cbrt(sizes.cells / hardware.cores)) * degree;
  return {
    blockDiagonal: (schur, tolerance) => {
      const { low, high } = interval();
      const steps = conjugateGradientSteps(high / low, tolerance);
      const bound = minresBound(saddleIntervals(low, high), tolerance);
      const penalty = schur === "exact" ? 1 : multigridPenalty(variant, sizes, contrast, constants);
      const expected = Math.min(bound, constants.minresPerCg * steps) * penalty * krylovFactor(variant, constants);
      const proven = schur === "exact" && interval().computed;
      return { expected, bound: proven ? bound : null, why: blockDiagonalSteps(interval(), tolerance, bound, expected) };
    },
    blockFactorised: (tolerance) => {
      const { low, high } = interval();
      const triangular = variant.blocks === "triangular" ? constants.triangularPerFull : 1;
      const expected = constants.fgmresPerCg * conjugateGradientSteps(high / low, tolerance) * triangular;
      return plain(expected, "Expected FGMRES iterations", "c m_CG(d2 / d1), true residual", "c fitted to reference runs; the preconditioned spectrum lies in [min(1, d1), max(1, d2)] and {1}", [
        { name: "d2 / d1", value: high / low, unit: "" },
        { name: "tolerance", value: tolerance, unit: "" },
      ]);
    },
    regularised: (tolerance) => {
      const growth = constants.regularisedCount * divisions ** constants.regularisedGrowth * degree ** constants.regularisedDegree;
      const parallel = 1 + constants.regularisedPerDoubling * Math.log2(hardware.cores);
      const expected = growth * contrast ** constants.regularisedContrast * parallel * toleranceShare(tolerance);
      return plain(expected, "Expected iterations at the best gamma", "c h^-g k^d contrast^e, h relative to the domain", "Fitted to the gamma sweeps of the reference runs", [
        { name: "1/h", value: divisions, unit: "" },
        { name: "degree", value: degree, unit: "" },
        { name: "contrast", value: contrast, unit: "" },
      ]);
    },
    hybridised: (tolerance) => {
      const aggregated = variant.multigrid === "aggregation" ? constants.aggregationPenalty * contrast ** constants.aggregationContrast : 1;
      const expected = constants.hybridisedCount * (1 + constants.hybridisedDegree * (degree - 1)) * aggregated * toleranceShare(tolerance);
      return plain(expected, "Expected CG iterations", "c (1 + d (k - 1))", "Level in h and contrast in the reference runs at lowest order; growth with the degree is practice", [{ name: "degree", value: degree, unit: "" }]);
    },
    auxiliarySpace: (tolerance) => {
      const base = constants.auxiliaryCount + constants.auxiliaryGrowth * Math.log(Math.max(1, divisions / 7.3));
      const open = answers.boundary === "pressure-somewhere" ? 0.5 : 1;
      const expected = base * open * (1 + 0.5 * (degree - 1)) * toleranceShare(tolerance);
      return plain(expected, "Expected MINRES iterations", "(a + b ln(1/h)), half with a pressure boundary", "Fitted to reference runs at lowest order", [{ name: "1/h", value: divisions, unit: "" }]);
    },
    bddc: (tolerance) => {
      const condition = constants.bddcConstant * (1 + Math.log(subdomainRatio * degree)) ** 2;
      return conditioned(condition, tolerance, "C (1 + ln(H k^2 / h))^2", "Mandel, Dohrmann & Tezaur, Appl. Numer. Math. 54, 2005; C is practice");
    },
    schwarz: (tolerance) => {
      const { low, high } = interval();
      const local = constants.schwarzConstant * contrast ** 0.15 * degree;
      const expected = constants.minresPerCg * conjugateGradientSteps((high / low) * Math.sqrt(local), tolerance);
      return plain(expected, "Expected MINRES iterations", "c m_CG(sqrt(C contrast^0.15 k) d2/d1)", "Theory of two-level Schwarz methods, constants are practice", [
        { name: "d2 / d1", value: high / low, unit: "" },
        { name: "contrast", value: contrast, unit: "" },
      ]);
    },
    pMultigrid: (tolerance) => {
      const expected = constants.pMultigridCount * (1 + 0.1 * (degree - 1)) * contrast ** 0.05 * toleranceShare(tolerance);
      return plain(expected, "Expected FGMRES iterations", "c (1 + 0.1 (k - 1)) contrast^0.05", "Practice, no source", [{ name: "degree", value: degree, unit: "" }]);
    },
  };
}

/**
 * How far the true relative residual lags behind the one that MINRES monitors, |r| in the P^-1 norm: a factor that grows as h^-2 with h relative to the
 * domain (the two blocks of P scale apart as the mesh is refined), fitted at uniform coefficients. Contrast can make it far worse: see the notes.
 */
export function residualLag(kind: Parameters<CostKit["residualLag"]>[0], { answers, sizes, constants }: Omit<Case, "interval" | "variant">): ResidualLag {
  const refinement = sizes.cells ** (2 / 3);
  const factors = {
    "block-diagonal": answers.degree === 1 ? constants.lagLow : constants.lagHigh,
    regularised: constants.lagRegularised,
    auxiliary: answers.boundary === "pressure-somewhere" ? constants.lagRegularised : constants.lagAuxiliary,
    condensed: constants.lagCondensed,
  };
  const lag = Math.max(1, Math.min(1e6, factors[kind] * refinement));
  const monitoredTolerance = Math.max(1e-15, answers.tolerance / lag);
  return {
    lag,
    monitoredTolerance,
    why: {
      quantity: "Tolerance of the monitored norm",
      formula: "tolerance / (c h^-2), h relative to the domain",
      inputs: [
        { name: "tolerance of the true residual", value: answers.tolerance, unit: "" },
        { name: "lag of the true residual", value: lag, unit: "" },
      ],
      value: monitoredTolerance,
      unit: "",
      source: "Fitted to true and monitored residuals of the reference runs",
    },
  };
}

/** More iterations than with the exact Schur complement. Aggregation degrades with the contrast, classical coarsening follows it. */
function multigridPenalty({ multigrid }: Variant, { perCellPressure }: Sizes, contrast: number, constants: ModelConstants): number {
  const classical = perCellPressure === 1 ? constants.multigridPenaltyLow : constants.multigridPenaltyHigh;
  const factors = {
    classical: 1,
    sparse: constants.sparseCoarseningPenalty,
    aggregation: constants.aggregationPenalty * contrast ** constants.aggregationContrast,
  };
  return classical * factors[multigrid];
}

function krylovFactor({ krylov }: Variant, constants: ModelConstants): number {
  const factors = { minres: 1, gmres: constants.gmresPerMinres, fgmres: constants.trueNormPerMinres };
  return factors[krylov];
}

function toleranceShare(tolerance: number): number {
  return Math.log(2 / tolerance) / Math.log(2 / referenceTolerance);
}

function conditioned(condition: number, tolerance: number, formula: string, source: string): IterationCount {
  const expected = conjugateGradientSteps(condition, tolerance);
  return plain(expected, "Expected iterations", `m_CG(kappa), kappa = ${formula}`, source, [{ name: "condition number", value: condition, unit: "" }]);
}

function plain(expected: number, quantity: string, formula: string, source: string, inputs: CostStep["inputs"]): IterationCount {
  return { expected, bound: null, why: [{ quantity, formula, inputs, value: expected, unit: "iterations", source }] };
}

function blockDiagonalSteps(interval: SpectralInterval, tolerance: number, bound: number, expected: number): CostStep[] {
  const inputs = [
    { name: "d1", value: interval.low, unit: "" },
    { name: "d2", value: interval.high, unit: "" },
    { name: "tolerance in the monitored norm", value: tolerance, unit: "" },
  ];
  return [
    { quantity: "Interval of diag(A)^-1 A", formula: "[min, max] over cells", inputs: inputs.slice(0, 2), value: interval.high / interval.low, unit: "ratio d2 / d1", source: interval.source },
    {
      quantity: "MINRES bound",
      formula: "2 ((sqrt(ad) - sqrt(bc)) / (sqrt(ad) + sqrt(bc)))^m <= tolerance, 2 m steps",
      inputs,
      value: bound,
      unit: "iterations",
      source: "Greenbaum, SIAM 1997, ch. 3, on the intervals of Rusten & Winther 1992",
    },
    {
      quantity: "Expected MINRES iterations",
      formula: "c m_CG(d2 / d1)",
      inputs,
      value: expected,
      unit: "iterations",
      source: "c fitted to the reference runs, below the bound",
    },
  ];
}
