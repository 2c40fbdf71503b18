import { describe, expect, it } from "vitest";
import { coefficientDeviations, fitBayesRegression, predictBayesRegression } from "@/lib/numerics/bayes-regression";

// Longley, J. Amer. Statist. Assoc. 62, 1967; as distributed by NIST in its Statistical Reference Datasets (Longley.dat):
// employment; deflator, gross national product, unemployed, armed forces, population, year. Entered from memory and proved by
// the certified values below, which no wrong entry would meet.
const longley = [
  [60323, 83.0, 234289, 2356, 1590, 107608, 1947],
  [61122, 88.5, 259426, 2325, 1456, 108632, 1948],
  [60171, 88.2, 258054, 3682, 1616, 109773, 1949],
  [61187, 89.5, 284599, 3351, 1650, 110929, 1950],
  [63221, 96.2, 328975, 2099, 3099, 112075, 1951],
  [63639, 98.1, 346999, 1932, 3594, 113270, 1952],
  [64989, 99.0, 365385, 1870, 3547, 115094, 1953],
  [63761, 100.0, 363112, 3578, 3350, 116219, 1954],
  [66019, 101.2, 397469, 2904, 3048, 117388, 1955],
  [67857, 104.6, 419180, 2822, 2857, 118734, 1956],
  [68169, 108.4, 442769, 2936, 2798, 120445, 1957],
  [66513, 110.8, 444546, 4681, 2637, 121950, 1958],
  [68655, 112.6, 482704, 3813, 2552, 123366, 1959],
  [69564, 114.2, 502601, 3931, 2514, 125368, 1960],
  [69331, 115.7, 518173, 4806, 2572, 127852, 1961],
  [70551, 116.9, 554894, 4007, 2827, 130081, 1962],
];
const response = longley.map(([employment]) => employment ?? 0);
const design = longley.map(([, ...predictors]) => [1, ...predictors]);

describe("Bayesian linear regression", () => {
  it("meets NIST's certified values for Longley's data in the flat-prior limit", () => {
    const fit = fitBayesRegression(design, response, { precision: [0, 0, 0, 0, 0, 0, 0], shape: -7 / 2, scale: 0 });
    // NIST StRD, Longley: parameter, standard deviation of the estimate; residual standard deviation. From memory.
    const certified = [
      [-3482258.63459582, 890420.383607373],
      [15.0618722713733, 84.9149257747669],
      [-0.035819179292591, 0.0334910077722432],
      [-2.02022980381683, 0.488399681651699],
      [-1.03322686717359, 0.214274163161675],
      [-0.0511041056535807, 0.22607320006937],
      [1829.15146461355, 455.478499142212],
    ];
    const deviations = coefficientDeviations(fit);
    // The design's condition number is 5e9, so that 1e-16 x 5e9 leaves six sure digits; eight are met.
    certified.forEach(([value = 0, deviation = 0], j) => {
      expect(Math.abs((fit.mean[j] ?? 0) / value - 1)).toBeLessThan(1e-7);
      expect(Math.abs((deviations[j] ?? 0) / deviation - 1)).toBeLessThan(1e-7);
    });
    expect(fit.degreesOfFreedom).toBe(9);
    expect(Math.abs(Math.sqrt(fit.noiseVariance) / 304.854073561965 - 1)).toBeLessThan(1e-9);
  });

  it("shrinks one mean as the textbook's normal model does", () => {
    // Prior of weight k0 at 0: posterior mean n ybar / (k0 + n) (Gelman et al. 2013, section 3.3).
    const fit = fitBayesRegression([[1], [1], [1]], [1, 2, 3], { precision: [2], shape: 3, scale: 1 });
    expect(fit.mean[0]).toBeCloseTo(6 / 5, 14);
    // scale_n = scale_0 + (sum (y - ybar)^2 + k0 n ybar^2 / (k0 + n)) / 2 = 1 + (2 + 2 * 3 * 4 / 5) / 2; shape_n = 4.5
    expect(fit.noiseVariance).toBeCloseTo((1 + (2 + 24 / 5) / 2) / 4.5, 14);
    expect(fit.degreesOfFreedom).toBe(9);
  });

  it("answers with the prior where there are no observations", () => {
    const fit = fitBayesRegression([], [], { precision: [4, 1], shape: 3, scale: 0.75 });
    expect(fit.mean.map(Math.abs)).toEqual([0, 0]);
    const { mean, meanDeviation, observationDeviation } = predictBayesRegression(fit, [1, 2]);
    expect(Math.abs(mean)).toBe(0);
    // noise variance 0.25; leverage 1/4 + 4/1
    expect(meanDeviation).toBeCloseTo(Math.sqrt(0.25 * 4.25), 14);
    expect(observationDeviation).toBeCloseTo(Math.sqrt(0.25 * 5.25), 14);
  });

  it("refuses a flat prior on a coefficient that the design leaves open", () => {
    expect(() => fitBayesRegression([[1, 2], [2, 4], [3, 6]], [1, 2, 3], { precision: [0, 0], shape: -1, scale: 0 })).toThrow(RangeError);
    expect(() => fitBayesRegression([[1]], [1], { precision: [0], shape: -0.5, scale: 0 })).toThrow(/degrees of freedom/);
    expect(() => fitBayesRegression([[1, 2]], [1], { precision: [1], shape: 1, scale: 1 })).toThrow(RangeError);
  });
});
