import { describe, expect, it } from "vitest";
import { geometricMean } from "@/lib/numerics/statistics/geometric-mean";
import { regularizedIncompleteBeta } from "@/lib/numerics/statistics/incomplete-beta";
import { logBinomial, logGamma } from "@/lib/numerics/statistics/log-gamma";
import { studentTCdf, studentTQuantile } from "@/lib/numerics/statistics/student-t";

describe("studentTQuantile", () => {
  // Any printed table of Student's t, 97.5 % column.
  it.each([
    [1, 12.706],
    [5, 2.571],
    [10, 2.228],
    [30, 2.042],
  ])("at 0.975 with %i degrees of freedom is %d", (degrees, expected) => {
    expect(studentTQuantile(0.975, degrees)).toBeCloseTo(expected, 3);
    expect(studentTQuantile(0.025, degrees)).toBeCloseTo(-expected, 3);
  });

  it("is Cauchy's with one degree of freedom: tan(pi (p - 1/2))", () => {
    for (const p of [0.55, 0.75, 0.9, 0.999]) expect(studentTQuantile(p, 1)).toBeCloseTo(Math.tan(Math.PI * (p - 0.5)), 8);
  });

  it("inverts the distribution function", () => {
    for (const degrees of [0.7, 2, 7.5, 120]) {
      for (const p of [0.01, 0.3, 0.5, 0.8, 0.995]) expect(studentTCdf(studentTQuantile(p, degrees), degrees)).toBeCloseTo(p, 11);
    }
  });

  it("nears the normal quantile with many degrees of freedom", () => {
    expect(studentTQuantile(0.975, 1e6)).toBeCloseTo(1.959966, 5);
  });

  it("refuses probabilities of 0 and 1 and no degrees of freedom", () => {
    expect(() => studentTQuantile(0, 3)).toThrow(RangeError);
    expect(() => studentTQuantile(1, 3)).toThrow(RangeError);
    expect(() => studentTQuantile(0.5, 0)).toThrow(RangeError);
  });
});

describe("special functions", () => {
  it("gamma agrees with factorials and with gamma(1/2) = sqrt(pi)", () => {
    let factorial = 1;
    for (let n = 1; n <= 20; n++) {
      expect(logGamma(n)).toBeCloseTo(Math.log(factorial), 11);
      factorial *= n;
    }
    expect(logGamma(0.5)).toBeCloseTo(0.5 * Math.log(Math.PI), 12);
  });

  it("binomial coefficients agree with Pascal's triangle", () => {
    expect(Math.exp(logBinomial(10, 3))).toBeCloseTo(120, 9);
    expect(Math.exp(logBinomial(52, 5))).toBeCloseTo(2598960, 3);
  });

  it("the incomplete beta function keeps its identities", () => {
    // DLMF 8.17.4, and I_x(1, b) = 1 - (1 - x)^b, I_x(a, 1) = x^a.
    for (const x of [0.01, 0.2, 0.5, 0.77, 0.99]) {
      expect(regularizedIncompleteBeta(x, 3.2, 0.6) + regularizedIncompleteBeta(1 - x, 0.6, 3.2)).toBeCloseTo(1, 12);
      expect(regularizedIncompleteBeta(x, 1, 4)).toBeCloseTo(1 - (1 - x) ** 4, 12);
      expect(regularizedIncompleteBeta(x, 2.5, 1)).toBeCloseTo(x ** 2.5, 12);
    }
  });
});

describe("geometricMean", () => {
  it("of 1, 10 and 100 is 10", () => {
    expect(geometricMean([1, 10, 100])).toBeCloseTo(10, 12);
  });
  it("does not overflow where the product would", () => {
    expect(geometricMean([1e300, 1e300, 1e-300, 1e-300])).toBeCloseTo(1, 9);
  });
  it("of nothing is null, and zero is refused", () => {
    expect(geometricMean([])).toBeNull();
    expect(() => geometricMean([1, 0])).toThrow(RangeError);
  });
});
