import type { Answers } from "@/lib/questionnaire/answers";
import { scaleRange, spreadRange, type Range } from "@/lib/shared/range";
import type { StrategyId } from "@/lib/shared/strategy-ids";
import type { Sizes } from "@/lib/sizes/sizes";
import type { StrategyCost } from "@/lib/strategies/cost";
import { strategyCosts } from "@/lib/strategies/costs";
import { constants } from "./constants";
import type { Estimate } from "./estimate";
import { makeKit } from "./make-kit";
import { spreadsFor } from "./ranges";

const bytesPerGiB = 2 ** 30;
/** Beyond these nothing is meaningful; estimates stay finite for any valid questionnaire. */
const longestSeconds = 1e18;
const mostIterations = 1e9;

/** Estimates of all eleven strategies for one case. Pure and synchronous; the same answers always give the same numbers. */
export function estimateAll(answers: Answers, sizes: Sizes): Record<StrategyId, Estimate> {
  const kit = makeKit(answers, sizes, constants);
  const estimate = (id: StrategyId) => toEstimate(strategyCosts[id](kit, { answers, sizes }), answers, sizes);
  return {
    "direct-ldlt": estimate("direct-ldlt"),
    "direct-blr": estimate("direct-blr"),
    "schur-diag-direct": estimate("schur-diag-direct"),
    "schur-diag-amg": estimate("schur-diag-amg"),
    "schur-triangular": estimate("schur-triangular"),
    "regularized-amg": estimate("regularized-amg"),
    "hdiv-auxiliary": estimate("hdiv-auxiliary"),
    "hybridized-amg": estimate("hybridized-amg"),
    bddc: estimate("bddc"),
    "schwarz-two-level": estimate("schwarz-two-level"),
    "p-multigrid": estimate("p-multigrid"),
  };
}

/** The estimate of one strategy. */
export function estimateOne(id: StrategyId, answers: Answers, sizes: Sizes): Estimate {
  return toEstimate(strategyCosts[id](makeKit(answers, sizes, constants), { answers, sizes }), answers, sizes);
}

function toEstimate(cost: StrategyCost, answers: Answers, sizes: Sizes): Estimate {
  const spreads = spreadsFor(cost.accuracy, answers, sizes);
  const setupSeconds = spreadRange(bounded(cost.setupSeconds, longestSeconds), spreads.setup);
  const solveSeconds = spreadRange(bounded(cost.solveSeconds, longestSeconds), spreads.solve);
  return {
    iterations: iterationRange(bounded(cost.iterations, mostIterations), spreads.iterations, cost.iterationBound),
    iterationBound: cost.iterationBound,
    memoryGiB: spreadRange(cost.memoryBytes / bytesPerGiB, spreads.memory),
    setupSeconds,
    solveSeconds,
    totalSeconds: sumOfRanges(setupSeconds, scaleRange(solveSeconds, answers.repeatedSolves)),
    factorEntries: cost.factor?.entries ?? null,
    factorFlops: cost.factor?.flops ?? null,
    spectralInterval: cost.interval === null ? null : [cost.interval.low, cost.interval.high],
    basis: cost.accuracy === "theory" ? "theory-only" : "reference-runs",
    parameters: cost.parameters,
    notes: cost.notes,
    why: cost.why,
  };
}

/** Whole iterations, none above a proven bound. */
function iterationRange(expected: number, spread: number, bound: number | null): Range {
  const most = bound ?? mostIterations;
  const median = Math.min(most, Math.max(1, Math.round(expected)));
  const low = Math.max(1, Math.min(median, Math.floor(expected / spread)));
  return { low, median, high: Math.min(most, Math.max(median, Math.ceil(expected * spread))) };
}

/**
 * 80 % range of a sum. Errors of set-up and solve are independent factors, so logarithmic half-widths add in squares, weighted by the shares.
 */
function sumOfRanges(a: Range, b: Range): Range {
  const median = a.median + b.median;
  if (median === 0) return { low: 0, median, high: 0 };
  const above = Math.hypot(a.high - a.median, b.high - b.median);
  const below = Math.hypot(a.median - a.low, b.median - b.low);
  return { low: Math.max(a.low + b.low, median - below), median, high: median + above };
}

function bounded(value: number, most: number): number {
  return Number.isFinite(value) ? Math.min(value, most) : most;
}
