import type { Answers } from "@/lib/questionnaire/answers";
import type { Sizes } from "@/lib/sizes/sizes";
import type { CostKit, CostStep, IterationCount, SpectralInterval } from "@/lib/strategies/cost";
import type { ModelConstants } from "./constants";
import { conjugateGradientSteps, minresBound, saddleIntervals } from "./saddle-bounds";
import type { Variant } from "./variant";

export type CountCase = { answers: Answers; sizes: Sizes; constants: ModelConstants; interval: () => SpectralInterval; variant: Variant };

/** Counts at 1e-8 scale to other tolerances as ln(2 / tolerance): convergence is linear. */
const referenceTolerance = 1e-8;

/** Iterations of each method at a tolerance of its monitored norm; none falls when the tolerance is tightened. */
export function iterationCounts(of: CountCase): CostKit["iterations"] {
  return {
    blockDiagonal: (schur, tolerance) => blockDiagonal(of, schur, tolerance),
    blockFactorised: (tolerance) => blockFactorised(of, tolerance),
    regularised: (tolerance) => regularised(of, tolerance),
    hybridised: (tolerance) => hybridised(of, tolerance),
    auxiliarySpace: (tolerance) => auxiliarySpace(of, tolerance),
    bddc: (tolerance) => bddc(of, tolerance),
    schwarz: (tolerance) => schwarz(of, tolerance),
    pMultigrid: (tolerance) => pMultigrid(of, tolerance),
  };
}

/**
 * MINRES on an indefinite spectrum takes about twice the steps that CG would take on [d1, d2]: the factor is fitted. Below the two-interval bound, which is
 * proven where the interval comes from local matrices and the Schur complement of diag(A) is inverted exactly.
 */
function blockDiagonal({ sizes, answers, constants, interval, variant }: CountCase, schur: "exact" | "multigrid", tolerance: number): IterationCount {
  const { low, high, computed, source } = interval();
  const bound = minresBound(saddleIntervals(low, high), tolerance);
  const penalty = schur === "exact" ? 1 : multigridPenalty(variant, sizes, answers.contrast.ratio, constants);
  const krylov = { minres: 1, gmres: constants.gmresPerMinres, fgmres: constants.trueNormPerMinres }[variant.krylov];
  const steps = conjugateGradientSteps(high / low, tolerance);
  const expected = Math.min(bound, constants.minresPerCg * steps) * penalty * krylov;
  const ends = [named("d1", low), named("d2", high)];
  const inputs = [...ends, named("tolerance in the monitored norm", tolerance)];
  return {
    expected,
    bound: schur === "exact" && computed ? bound : null,
    why: [
      { quantity: "Interval of diag(A)^-1 A", formula: "[min, max] of diag(A_K)^-1 A_K over cells K", inputs: ends, value: high / low, unit: "ratio d2 / d1", source },
      {
        quantity: computed ? "MINRES bound" : "MINRES bound if the interval holds",
        formula: "2 ((sqrt(ad) - sqrt(bc)) / (sqrt(ad) + sqrt(bc)))^m <= tolerance, 2 m steps",
        inputs,
        value: bound,
        unit: "iterations",
        source: "Greenbaum, SIAM 1997, ch. 3, on the intervals of Rusten & Winther 1992",
      },
      {
        quantity: "Expected iterations",
        formula: "c x m_CG(d2 / d1) x multigrid penalty",
        inputs: [...inputs, named("c", constants.minresPerCg), named("m_CG", steps), named("multigrid penalty", penalty)],
        value: expected,
        unit: "iterations",
        source: "c and penalty fitted to the reference runs, below the bound",
      },
    ],
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

/** With a full block factorisation the preconditioned spectrum lies in [min(1, d1), max(1, d2)] and {1}: as CG on it, times a fitted factor. */
function blockFactorised({ constants, interval, variant }: CountCase, tolerance: number): IterationCount {
  const { low, high } = interval();
  const triangular = variant.blocks === "triangular" ? constants.triangularPerFull : 1;
  const steps = conjugateGradientSteps(high / low, tolerance);
  const source = "c fitted to reference runs; spectrum in [min(1, d1), max(1, d2)] and {1}";
  return count(constants.fgmresPerCg * steps * triangular, "Expected FGMRES iterations", "c x m_CG(d2 / d1), true residual", source, [
    named("d2 / d1", high / low),
    named("m_CG", steps),
    named("c", constants.fgmresPerCg),
  ]);
}

/** Plain multigrid does not see the divergence's kernel: the best count still grows nearly as 1/h. */
function regularised({ answers, sizes, constants }: CountCase, tolerance: number): IterationCount {
  const divisions = Math.cbrt(sizes.cells);
  const growth = constants.regularisedCount * divisions ** constants.regularisedGrowth * answers.degree ** constants.regularisedDegree;
  const parallel = 1 + constants.regularisedPerDoubling * Math.log2(answers.hardware.cores);
  const expected = growth * answers.contrast.ratio ** constants.regularisedContrast * parallel * toleranceShare(tolerance);
  return count(expected, "Expected iterations at the best gamma", "c (1/h)^g k^d contrast^e, h relative to the domain", "Fitted to the gamma sweeps of the reference runs", [
    named("1/h", divisions),
    named("degree", answers.degree),
    named("contrast", answers.contrast.ratio),
    named("g", constants.regularisedGrowth),
  ]);
}

function hybridised({ answers, constants, variant }: CountCase, tolerance: number): IterationCount {
  const { degree, contrast } = answers;
  const aggregated = variant.multigrid === "aggregation" ? constants.aggregationPenalty * contrast.ratio ** constants.aggregationContrast : 1;
  const expected = constants.hybridisedCount * (1 + constants.hybridisedDegree * (degree - 1)) * aggregated * toleranceShare(tolerance);
  return count(expected, "Expected CG iterations", "c (1 + d (k - 1))", "Level in h and contrast in the reference runs at lowest order; growth with the degree is practice", [
    named("degree", degree),
    named("c", constants.hybridisedCount),
    named("d", constants.hybridisedDegree),
  ]);
}

function auxiliarySpace({ answers, sizes, constants }: CountCase, tolerance: number): IterationCount {
  const divisions = Math.cbrt(sizes.cells);
  const base = constants.auxiliaryCount + constants.auxiliaryGrowth * Math.log(Math.max(1, divisions / 7.3));
  const open = answers.boundary === "pressure-somewhere" ? constants.auxiliaryPressure : 1;
  const expected = base * open * (1 + constants.auxiliaryDegree * (answers.degree - 1)) * toleranceShare(tolerance);
  return count(expected, "Expected MINRES iterations", "a + b ln(1/h), half of it with a pressure boundary", "Fitted to reference runs at lowest order", [
    named("1/h", divisions),
    named("a", constants.auxiliaryCount),
    named("b", constants.auxiliaryGrowth),
  ]);
}

/** H/h in degrees of freedom: cells along a subdomain's side times the degree, squared once more for the polynomial part. */
function bddc({ answers, sizes, constants }: CountCase, tolerance: number): IterationCount {
  const ratio = Math.max(1, Math.cbrt(sizes.cells / answers.hardware.cores)) * answers.degree ** 2;
  const condition = constants.bddcConstant * (1 + Math.log(ratio)) ** 2;
  const source = "Mandel, Dohrmann & Tezaur, Appl. Numer. Math. 54, 2005; C is practice";
  return count(conjugateGradientSteps(condition, tolerance), "Expected CG iterations", "m_CG(kappa), kappa = C (1 + ln(H k^2 / h))^2", source, [
    named("condition number", condition),
    named("H k^2 / h", ratio),
  ]);
}

function schwarz({ answers, constants, interval }: CountCase, tolerance: number): IterationCount {
  const { low, high } = interval();
  const schur = constants.schwarzConstant * answers.contrast.ratio ** constants.schwarzContrast * answers.degree;
  const expected = constants.minresPerCg * conjugateGradientSteps((high / low) * Math.sqrt(schur), tolerance);
  return count(expected, "Expected MINRES iterations", "c m_CG(sqrt(C contrast^e k) d2 / d1)", "Form of two-level Schwarz theory, constants are practice", [
    named("d2 / d1", high / low),
    named("contrast", answers.contrast.ratio),
    named("C", constants.schwarzConstant),
  ]);
}

function pMultigrid({ answers, constants }: CountCase, tolerance: number): IterationCount {
  const growth = (1 + constants.pMultigridDegree * (answers.degree - 1)) * answers.contrast.ratio ** constants.pMultigridContrast;
  const expected = constants.pMultigridCount * growth * toleranceShare(tolerance);
  return count(expected, "Expected FGMRES iterations", "c (1 + d (k - 1)) contrast^e", "Practice, no source", [
    named("degree", answers.degree),
    named("contrast", answers.contrast.ratio),
    named("c", constants.pMultigridCount),
  ]);
}

function toleranceShare(tolerance: number): number {
  return Math.log(2 / tolerance) / Math.log(2 / referenceTolerance);
}

function count(expected: number, quantity: string, formula: string, source: string, inputs: CostStep["inputs"]): IterationCount {
  return { expected, bound: null, why: [{ quantity, formula, inputs, value: expected, unit: "iterations", source }] };
}

function named(name: string, value: number): CostStep["inputs"][number] {
  return { name, value, unit: "" };
}
