import { describe, expect, it } from "vitest";
import { exactBinomialHalf } from "@/lib/numerics/statistics/exact-binomial";
import { mcnemarTest } from "@/lib/numerics/statistics/mcnemar";

describe("mcnemarTest", () => {
  it("gives the chi-square of the approval ratings table", () => {
    // Agresti, Categorical Data Analysis: 86 and 150 discordant, (150 - 86)^2 / 236 = 17.36. The exact two-sided binomial p = 3.716e-5 follows from the counts (computed apart from this code).
    const result = mcnemarTest(86, 150);
    expect(result.chiSquare).toBeCloseTo(17.36, 2);
    expect(result.pValue).toBeCloseTo(3.716e-5, 8);
  });

  it("says nothing without discordant pairs", () => {
    expect(mcnemarTest(0, 0)).toEqual({ onlyFirst: 0, onlySecond: 0, pValue: 1, chiSquare: null });
  });
});

describe("exactBinomialHalf", () => {
  // By hand: 2 (C(n,0) + ... + C(n,k)) / 2^n.
  it.each([
    [0, 5, 2 / 32],
    [1, 5, 14 / 64],
    [2, 8, 112 / 1024],
    [3, 3, 1],
    [0, 1, 1],
  ])("of %i against %i is counted out", (first, second, expected) => {
    expect(exactBinomialHalf(first, second)).toBeCloseTo(expected, 12);
    expect(exactBinomialHalf(second, first)).toBeCloseTo(expected, 12);
  });

  it("refuses counts that are not whole", () => {
    expect(() => exactBinomialHalf(1.5, 2)).toThrow(RangeError);
    expect(() => exactBinomialHalf(-1, 2)).toThrow(RangeError);
  });
});
