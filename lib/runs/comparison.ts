import { z } from "zod";
import type { Estimate } from "@/lib/estimates/estimate";
import { rangeSchema, type Range } from "@/lib/shared/range";
import { residualStatuses, residualTexts, type ResidualStatus } from "./residual-status";
import type { Outcome } from "./run";

export { residualStatuses, residualTexts, type ResidualStatus } from "./residual-status";

/** A run's true relative residual may be this many times the tolerance asked for and still count as converged. */
export const residualAllowance = 10;

/** Allows for rounding in a product such as 10 x 1e-6, which lies just below 1e-5. */
export const roundingSlack = 1 + 1e-12;

/** What was measured; times are wall seconds of one set-up and one solve, memory is summed over the processes. */
export type MeasuredRun = {
  outcome: Outcome;
  iterations: number | null;
  setupSeconds: number | null;
  solveSeconds: number | null;
  peakMemoryGiB: number | null;
  cores: number;
  trueRelativeResidual: number | null;
};

/** What a case asks of a run. `memoryGiB` is that of all nodes together. */
export type CaseLimits = {
  tolerance: number;
  repeatedSolves: number;
  timeLimitSeconds: number | null;
  memoryGiB: number;
  cores: number;
};

export const comparedQuantities = ["iterations", "memoryGiB", "setupSeconds", "solveSeconds", "totalSeconds"] as const;
export type ComparedQuantity = (typeof comparedQuantities)[number];

export const quantityComparisonSchema = z.object({
  quantity: z.enum(comparedQuantities),
  predicted: rangeSchema.nullable(),
  measured: z.number().nullable(),
  /** measured / predicted median; null where the two can't be compared. */
  ratio: z.number().nullable(),
  /** Whether the measured value lies in the predicted 80 % range; null where the two can't be compared. */
  inside: z.boolean().nullable(),
});
export type QuantityComparison = z.infer<typeof quantityComparisonSchema>;

export const runComparisonSchema = z.object({
  /** Converged, and within the limits of memory and time. */
  worked: z.boolean(),
  converged: z.boolean(),
  residual: z.enum(residualStatuses),
  withinTimeLimit: z.boolean().nullable(),
  withinMemory: z.boolean().nullable(),
  totalSeconds: z.number().nullable(),
  quantities: z.array(quantityComparisonSchema),
  notes: z.array(z.string()),
});
export type RunComparison = z.infer<typeof runComparisonSchema>;

/** Measured against predicted. `estimate` is the one of the run's strategy in the advice before it, null where there is none. */
export function compareRun(run: MeasuredRun, limits: CaseLimits, estimate: Estimate | null): RunComparison {
  const quantities = comparedQuantities.map((quantity) => compareQuantity(quantity, run, limits, estimate));
  return {
    worked: runWorked(run, limits),
    converged: isConverged(run, limits.tolerance),
    residual: residualStatus(run, limits.tolerance),
    withinTimeLimit: withinTimeLimit(run, limits),
    withinMemory: withinMemory(run, limits),
    totalSeconds: totalSeconds(run, limits.repeatedSolves),
    quantities,
    notes: comparisonNotes(run, limits, estimate),
  };
}

/**
 * Converged means in the true relative residual: at most `residualAllowance` times the tolerance. A run that reports convergence
 * without a true residual counts, and is marked "not-verified".
 */
export function isConverged(run: Pick<MeasuredRun, "outcome" | "trueRelativeResidual">, tolerance: number): boolean {
  const status = residualStatus(run, tolerance);
  return status === "verified" || status === "not-verified";
}

export function residualStatus(run: Pick<MeasuredRun, "outcome" | "trueRelativeResidual">, tolerance: number): ResidualStatus {
  if (run.outcome !== "converged") return "not-reached";
  if (run.trueRelativeResidual === null) return "not-verified";
  return run.trueRelativeResidual <= residualAllowance * tolerance * roundingSlack ? "verified" : "own-test-only";
}

/** set-up + repeatedSolves x solve; null unless both times were recorded. */
export function totalSeconds(run: Pick<MeasuredRun, "setupSeconds" | "solveSeconds">, repeatedSolves: number): number | null {
  if (run.setupSeconds === null || run.solveSeconds === null) return null;
  return run.setupSeconds + repeatedSolves * run.solveSeconds;
}

/** Converged within the limits; a limit that can't be checked, because nothing was recorded, is taken as kept. */
export function runWorked(run: MeasuredRun, limits: CaseLimits): boolean {
  return isConverged(run, limits.tolerance) && withinTimeLimit(run, limits) !== false && withinMemory(run, limits) !== false;
}

function withinTimeLimit(run: MeasuredRun, limits: CaseLimits): boolean | null {
  const total = totalSeconds(run, limits.repeatedSolves);
  return limits.timeLimitSeconds === null || total === null ? null : total <= limits.timeLimitSeconds * roundingSlack;
}

function withinMemory(run: MeasuredRun, limits: CaseLimits): boolean | null {
  return run.peakMemoryGiB === null ? null : run.peakMemoryGiB <= limits.memoryGiB;
}

/** What a run of each outcome can be held against: an estimate speaks of a solve that ends well. */
const comparableBy: Record<Outcome, readonly ComparedQuantity[]> = {
  converged: comparedQuantities,
  stalled: ["memoryGiB", "setupSeconds"],
  diverged: ["memoryGiB", "setupSeconds"],
  "over-time": ["memoryGiB", "setupSeconds"],
  "out-of-memory": [],
  broken: [],
};

function compareQuantity(quantity: ComparedQuantity, run: MeasuredRun, limits: CaseLimits, estimate: Estimate | null): QuantityComparison {
  const measured = measuredValue(quantity, run, limits);
  const predicted = estimate === null ? null : estimate[quantity];
  const comparable = comparableBy[run.outcome].includes(quantity) && (quantity === "iterations" || run.cores === limits.cores);
  if (!comparable || measured === null || predicted === null) return { quantity, predicted, measured, ratio: null, inside: null };
  return {
    quantity,
    predicted,
    measured,
    ratio: predicted.median > 0 ? measured / predicted.median : null,
    inside: isInside(measured, predicted),
  };
}

function isInside(measured: number, predicted: Range): boolean {
  return predicted.low <= measured && measured <= predicted.high;
}

function measuredValue(quantity: ComparedQuantity, run: MeasuredRun, limits: CaseLimits): number | null {
  const values: Record<ComparedQuantity, number | null> = {
    iterations: run.iterations,
    memoryGiB: run.peakMemoryGiB,
    setupSeconds: run.setupSeconds,
    solveSeconds: run.solveSeconds,
    totalSeconds: totalSeconds(run, limits.repeatedSolves),
  };
  return values[quantity];
}

function comparisonNotes(run: MeasuredRun, limits: CaseLimits, estimate: Estimate | null): string[] {
  const notes: string[] = [];
  if (estimate === null) notes.push("No estimate to compare with: the strategy is not among those advised on, or no advice was given before the run.");
  if (run.cores !== limits.cores) {
    notes.push(`Run on ${run.cores} cores, advised for ${limits.cores}: times and memory are not compared, and the run does not enter the hit rates.`);
  }
  const status = residualStatus(run, limits.tolerance);
  if (status === "not-verified" || status === "own-test-only") notes.push(residualTexts[status]);
  if (withinTimeLimit(run, limits) === false) notes.push("Took longer than the time limit.");
  if (withinMemory(run, limits) === false) notes.push("Used more memory than the case has.");
  return notes;
}
