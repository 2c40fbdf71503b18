import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { evidenceCounts, evidenceFactor, evidenceLimit, fitEvidence, noEvidence, type Observation } from "@/lib/advice/evidence";
import { meshFamilies } from "@/lib/questionnaire/answer-sets";
import type { EvidenceFeatures } from "@/lib/advice/evidence-features";
import { normalFrom, seededRandom } from "@/lib/shared/random";

const here: EvidenceFeatures = { unknowns: 400_000, degree: 1, contrastRatio: 1, cores: 32, meshFamily: "cubes", discretisation: "vem-mixed" };
const observe = (ratio: number, features: Partial<EvidenceFeatures> = {}): Observation => ({
  caseId: "a",
  strategy: "direct-ldlt",
  features: { ...here, ...features },
  logResidual: Math.log(ratio),
});
const times = (count: number, ratio: number) => fitEvidence(Array.from({ length: count }, () => observe(ratio)));

describe("evidence", () => {
  it("says nothing without runs", () => {
    expect(evidenceFactor(noEvidence(), "bddc", here)).toEqual({ factor: 1, runs: 0, spread: 1 });
    expect(evidenceFactor(times(5, 2), "bddc", here)).toEqual({ factor: 1, runs: 0, spread: 1 });
  });

  it("shrinks towards the model with few runs and follows the record with many", () => {
    const factors = [1, 3, 10, 100].map((count) => evidenceFactor(times(count, 2), "direct-ldlt", here).factor);
    expect(factors).toEqual([...factors].sort((a, b) => a - b));
    expect(factors[0]).toBeLessThan(1.6);
    expect(factors[3]).toBeGreaterThan(1.95);
    expect(factors[3]).toBeLessThanOrEqual(2);
  });

  it("meets the closed form of one observation", () => {
    // Posterior mean at the observed point: y s / (1 + s), s = x' V x / noise^2, V the prior's variances: 0.5^2 for the constant, 0.25^2
    // for the family, 0.2^2, 0.15^2, 0.2^2, 0.2^2 times the squared scaled features.
    const logn = Math.log10(here.unknowns) - 5.5;
    const s = (0.25 + 0.0625 + 0.04 * logn ** 2 + 0.0225 * 1) / 0.16;
    expect(evidenceFactor(times(1, 2), "direct-ldlt", here).factor).toBeCloseTo(2 ** (s / (1 + s)), 12);
  });

  it("nears its limit, and never passes it, whatever the record says", () => {
    const up = evidenceFactor(times(50, 1000), "direct-ldlt", here).factor;
    const down = evidenceFactor(times(50, 1e-3), "direct-ldlt", here).factor;
    expect([up > 0.95 * evidenceLimit, up <= evidenceLimit, down < 1.05 / evidenceLimit, down >= 1 / evidenceLimit]).toEqual([true, true, true, true]);
  });

  it("is not overturned by one mistaken run among many good ones", () => {
    const record = [...Array.from({ length: 22 }, () => observe(1)), observe(376)];
    expect(evidenceFactor(fitEvidence(record), "direct-ldlt", here).factor).toBeLessThan(1.3);
  });

  it.each<[string, Partial<EvidenceFeatures>]>([
    ["unknowns", { unknowns: 4e9 }],
    ["degree", { degree: 6 }],
    ["contrast", { contrastRatio: 1e12 }],
    ["cores", { cores: 200_000 }],
  ])("fades away from the record in %s", (_, far) => {
    const model = times(30, 3);
    expect(evidenceFactor(model, "direct-ldlt", { ...here, ...far }).factor).toBeLessThan(1.1);
  });

  it("learns a slope in the unknowns from the record", () => {
    const random = seededRandom(11);
    const observations = Array.from({ length: 60 }, () => {
      const unknowns = 10 ** (4 + 3 * random());
      return observe(Math.exp(0.4 * (Math.log10(unknowns) - 5.5) + 0.1 * normalFrom(random)), { unknowns });
    });
    const model = fitEvidence(observations);
    const at = (unknowns: number) => Math.log(evidenceFactor(model, "direct-ldlt", { ...here, unknowns }).factor);
    expect(at(1e6) - at(1e5)).toBeCloseTo(0.4, 1);
  });

  it("covers about 80 % of new runs by its spread", () => {
    const random = seededRandom(12);
    const draw = () => observe(1.4 * Math.exp(0.3 * normalFrom(random)));
    const model = fitEvidence(Array.from({ length: 200 }, draw));
    const { factor, spread } = evidenceFactor(model, "direct-ldlt", here);
    const inside = Array.from({ length: 4000 }, draw).filter(({ logResidual }) => Math.abs(logResidual - Math.log(factor)) <= Math.log(spread));
    // Binomial sampling error of 4 000 draws is 0.6 %; the prior's noise of 0.4 against 0.3 here widens the spread a little.
    expect(inside.length / 4000).toBeGreaterThan(0.77);
    expect(inside.length / 4000).toBeLessThan(0.84);
  });

  it("is finite, bounded and counts its runs for any record", () => {
    const anyFeatures = fc.record({
      unknowns: fc.double({ min: 1, max: 1e12, noNaN: true }),
      degree: fc.integer({ min: 1, max: 6 }),
      contrastRatio: fc.double({ min: 1, max: 1e12, noNaN: true }),
      cores: fc.integer({ min: 1, max: 4_000_000 }),
      meshFamily: fc.constantFrom(...meshFamilies),
      discretisation: fc.constant("vem-mixed" as const),
    });
    const anyObservation = fc.record({ caseId: fc.constant("a"), strategy: fc.constant("bddc" as const), features: anyFeatures, logResidual: fc.double({ min: -20, max: 20, noNaN: true }) });
    fc.assert(
      fc.property(fc.array(anyObservation, { minLength: 1, maxLength: 30 }), anyFeatures, (observations, features) => {
        const model = fitEvidence(observations);
        const { factor, runs, spread } = evidenceFactor(model, "bddc", features);
        expect(factor).toBeGreaterThanOrEqual((1 - 1e-12) / evidenceLimit);
        expect(factor).toBeLessThanOrEqual(evidenceLimit * (1 + 1e-12));
        expect(spread).toBeGreaterThan(1);
        expect(Number.isFinite(spread)).toBe(true);
        expect(runs).toBe(observations.length);
        expect(evidenceCounts(model).bddc).toBe(observations.length);
      }),
      { seed: 20_265, numRuns: 300 },
    );
  });
});
