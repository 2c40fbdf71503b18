import { describe, expect, it } from "vitest";
import type { Estimate } from "@/lib/estimates/estimate";
import { compareRun, isConverged, residualStatus, runWorked, totalSeconds, type CaseLimits, type MeasuredRun } from "@/lib/runs/comparison";
import { outcomes } from "@/lib/runs/run";

const limits: CaseLimits = { tolerance: 1e-6, repeatedSolves: 1, timeLimitSeconds: 100, memoryGiB: 64, cores: 32 };
const run: MeasuredRun = {
  outcome: "converged", iterations: 31, setupSeconds: 1.4, solveSeconds: 9.8, peakMemoryGiB: 6.2, cores: 32, trueRelativeResidual: 4.1e-7,
};
const estimate: Estimate = {
  iterations: { low: 20, median: 30, high: 45 }, iterationBound: 60, memoryGiB: { low: 3, median: 5, high: 8 },
  setupSeconds: { low: 2, median: 4, high: 8 }, solveSeconds: { low: 4, median: 7, high: 12 }, totalSeconds: { low: 7, median: 11, high: 18 },
  factorEntries: null, factorFlops: null, spectralInterval: [0.5, 1.5], basis: "theory-only", parameters: {}, notes: [], why: [],
};

// The expected values follow from the definition: at most 10x the tolerance in the true relative residual.
describe("isConverged", () => {
  it.each([
    ["the true residual below the tolerance", 1e-7, true, "verified"],
    ["the true residual at exactly ten times the tolerance", 1e-5, true, "verified"],
    ["the true residual just above ten times the tolerance", 1.0001e-5, false, "own-test-only"],
    ["no true residual", null, true, "not-verified"],
  ] as const)("with %s", (_name, trueRelativeResidual, converged, status) => {
    expect(isConverged({ outcome: "converged", trueRelativeResidual }, 1e-6)).toBe(converged);
    expect(residualStatus({ outcome: "converged", trueRelativeResidual }, 1e-6)).toBe(status);
  });

  it.each(outcomes.filter((outcome) => outcome !== "converged"))("is never true of a run that ended as %s", (outcome) => {
    expect(isConverged({ outcome, trueRelativeResidual: 1e-12 }, 1e-6)).toBe(false);
    expect(isConverged({ outcome, trueRelativeResidual: null }, 1e-6)).toBe(false);
  });
});

describe("totalSeconds", () => {
  it("adds the set-up once and the solve as often as it is repeated", () => {
    expect(totalSeconds({ setupSeconds: 3, solveSeconds: 2 }, 10)).toBe(23);
  });
  it.each([
    [null, 2],
    [3, null],
    [null, null],
  ])("is not known with set-up %s and solve %s", (setupSeconds, solveSeconds) => {
    expect(totalSeconds({ setupSeconds, solveSeconds }, 1)).toBeNull();
  });
});

describe("runWorked", () => {
  it.each([
    ["within both limits", {}, {}, true],
    ["over the time limit, counting repeated solves", {}, { repeatedSolves: 11 }, false],
    ["at exactly the memory limit", { peakMemoryGiB: 64 }, {}, true],
    ["over the memory limit", { peakMemoryGiB: 64.1 }, {}, false],
    ["without times under a time limit", { setupSeconds: null, solveSeconds: null }, {}, true],
    ["slow without a time limit", { solveSeconds: 1e6 }, { timeLimitSeconds: null }, true],
    ["with a true residual that misses", { trueRelativeResidual: 1e-3 }, {}, false],
    ["out of memory", { outcome: "out-of-memory" }, {}, false],
  ] as const)("%s", (_name, runChange, limitChange, worked) => {
    expect(runWorked({ ...run, ...runChange }, { ...limits, ...limitChange })).toBe(worked);
  });
});

describe("compareRun", () => {
  it("gives the ratio to the median and whether the range holds the measured value", () => {
    const byName = new Map(compareRun(run, limits, estimate).quantities.map((q) => [q.quantity, q]));
    expect(byName.get("iterations")).toMatchObject({ measured: 31, ratio: 31 / 30, inside: true });
    expect(byName.get("setupSeconds")).toMatchObject({ measured: 1.4, ratio: 0.35, inside: false });
    expect(byName.get("totalSeconds")?.measured).toBeCloseTo(11.2, 12);
    expect(byName.get("memoryGiB")).toMatchObject({ measured: 6.2, inside: true });
  });

  it("does not hold a stalled run's iterations and times against an estimate of a solve that ends well", () => {
    const comparison = compareRun({ ...run, outcome: "stalled", iterations: 10_000 }, limits, estimate);
    expect(comparison.quantities.filter((q) => q.ratio !== null).map((q) => q.quantity)).toEqual(["memoryGiB", "setupSeconds"]);
    expect(comparison.residual).toBe("not-reached");
  });

  it("compares iterations only when the run used other cores than advised for", () => {
    const comparison = compareRun({ ...run, cores: 16 }, limits, estimate);
    expect(comparison.quantities.filter((q) => q.ratio !== null).map((q) => q.quantity)).toEqual(["iterations"]);
    expect(comparison.notes.join(" ")).toContain("16 cores");
  });

  it("stays finite where the prediction is zero", () => {
    const direct = { ...estimate, iterations: { low: 0, median: 0, high: 0 } };
    expect(compareRun({ ...run, iterations: 1 }, limits, direct).quantities[0]).toMatchObject({ ratio: null, inside: false });
  });

  it("has no predictions for a strategy without an estimate", () => {
    const comparison = compareRun(run, limits, null);
    expect(comparison.quantities.every((q) => q.predicted === null && q.ratio === null)).toBe(true);
    expect(comparison.worked).toBe(true);
  });
});
