import { meshFamilies, type MeshFamily } from "@/lib/questionnaire/answer-sets";
import { fitBayesRegression, predictBayesRegression, type RegressionPosterior, type RegressionPrior } from "@/lib/numerics/bayes-regression";
import { studentTQuantile } from "@/lib/numerics/statistics/student-t";
import type { StrategyId } from "@/lib/shared/strategy-ids";
import { designRow, scaledFeatures, type EvidenceFeatures } from "./evidence-features";
import type { EvidenceCounts } from "./facts";

/** One recorded run against what model and rules said of it. */
export type Observation = {
  caseId: string;
  strategy: StrategyId;
  features: EvidenceFeatures;
  /** ln(measured total / (model's median total x rules' factors)) */
  logResidual: number;
};

/** What the record says about one strategy. */
export type StrategyEvidence = {
  runs: number;
  posterior: RegressionPosterior;
  /** Recorded range of each scaled feature, and the mesh families that were run. */
  reach: { low: number[]; high: number[]; meshFamilies: MeshFamily[] };
  /** 90 % quantile of the posterior's t distribution. */
  quantile: number;
};

/** Fitted evidence of a team; plain data. Strategies without runs are null. */
export type EvidenceModel = Readonly<Record<StrategyId, StrategyEvidence | null>>;

/** Correction for one strategy on one case: measured over predicted time. `spread` >= 1 is the factor of an 80 % range about it. */
export type EvidenceFactor = { factor: number; runs: number; spread: number };

/** The correction never goes beyond this factor either way: past it, the model is wrong about the case and not the case about the model. */
export const evidenceLimit = 4;

/**
 * Prior of the log residual. Noise 0.4 (model errors from case to case; repeats alone differ by 1.1 to 1.5x), worth six observations.
 * Standard deviations of the coefficients: constant 0.5; per unit of a scaled feature 0.2, of the degree 0.15; mesh family 0.25. Centred
 * on zero: the model is right until runs say otherwise. Common practice, no source.
 */
const noise = 0.4;
const coefficientDeviations = [0.5, 0.2, 0.15, 0.2, 0.2, ...meshFamilies.map(() => 0.25)];
const prior: RegressionPrior = {
  precision: coefficientDeviations.map((deviation) => (noise / deviation) ** 2),
  shape: 3,
  scale: 3 * noise * noise,
};

/** Fit one Bayesian log-linear residual model per strategy, in closed form. The order of observations changes rounding only. */
export function fitEvidence(observations: readonly Observation[]): EvidenceModel {
  return byStrategy((strategy) => fitStrategy(observations.filter((observation) => observation.strategy === strategy)));
}

/** A team without runs. */
export function noEvidence(): EvidenceModel {
  return byStrategy(() => null);
}

/** Runs that speak for each strategy. */
export function evidenceCounts(model: EvidenceModel): EvidenceCounts {
  return byStrategy((strategy) => model[strategy]?.runs ?? 0);
}

/**
 * exp(posterior mean of the log residual), faded towards 1 outside the recorded range of features by exp(-d^2 / 2) with d the distance
 * to that range in scaled units (a mesh family never run counts as 1), and kept within `evidenceLimit`. Without runs: 1.
 */
export function evidenceFactor(model: EvidenceModel, strategy: StrategyId, features: EvidenceFeatures): EvidenceFactor {
  const evidence = model[strategy];
  if (evidence === null) return { factor: 1, runs: 0, spread: 1 };
  const { mean, observationDeviation } = predictBayesRegression(evidence.posterior, clampedRow(evidence, features));
  const limit = Math.log(evidenceLimit);
  const corrected = Math.min(limit, Math.max(-limit, mean * fading(evidence, features)));
  return { factor: Math.exp(corrected), runs: evidence.runs, spread: Math.exp(evidence.quantile * observationDeviation) };
}

export function byStrategy<T>(make: (strategy: StrategyId) => T): Record<StrategyId, T> {
  return {
    "direct-ldlt": make("direct-ldlt"),
    "direct-blr": make("direct-blr"),
    "schur-diag-direct": make("schur-diag-direct"),
    "schur-diag-amg": make("schur-diag-amg"),
    "schur-triangular": make("schur-triangular"),
    "regularized-amg": make("regularized-amg"),
    "hdiv-auxiliary": make("hdiv-auxiliary"),
    "hybridized-amg": make("hybridized-amg"),
    bddc: make("bddc"),
    "schwarz-two-level": make("schwarz-two-level"),
    "p-multigrid": make("p-multigrid"),
  };
}

/** One mistaken or outlying run must not overturn the record: a residual speaks no louder than the correction may go. */
function clampResidual(logResidual: number): number {
  const limit = Math.log(evidenceLimit);
  return Math.min(limit, Math.max(-limit, logResidual));
}

function fitStrategy(observations: readonly Observation[]): StrategyEvidence | null {
  if (observations.length === 0) return null;
  const posterior = fitBayesRegression(
    observations.map(({ features }) => designRow(features)),
    observations.map(({ logResidual }) => clampResidual(logResidual)),
    prior,
  );
  const scaled = observations.map(({ features }) => scaledFeatures(features));
  const ends = (pick: (a: number, b: number) => number) => scaled.reduce((found, row) => found.map((value, j) => pick(value, row[j] ?? value)));
  const families = new Set(observations.map(({ features }) => features.meshFamily));
  return {
    runs: observations.length,
    posterior,
    reach: { low: ends(Math.min), high: ends(Math.max), meshFamilies: meshFamilies.filter((family) => families.has(family)) },
    quantile: studentTQuantile(0.9, posterior.degreesOfFreedom),
  };
}

/** Slopes are not followed beyond the record: features outside it are taken at its edge. */
function clampedRow({ reach }: StrategyEvidence, features: EvidenceFeatures): number[] {
  const clamped = scaledFeatures(features).map((value, j) => Math.min(reach.high[j] ?? value, Math.max(reach.low[j] ?? value, value)));
  return designRow(features).map((value, j) => (j === 0 ? value : (clamped[j - 1] ?? value)));
}

function fading({ reach }: StrategyEvidence, features: EvidenceFeatures): number {
  const strange = reach.meshFamilies.includes(features.meshFamily) ? 0 : 1;
  const squares = scaledFeatures(features).reduce((sum, value, j) => {
    const outside = Math.max(0, (reach.low[j] ?? value) - value, value - (reach.high[j] ?? value));
    return sum + outside * outside;
  }, strange);
  return Math.exp(-squares / 2);
}
