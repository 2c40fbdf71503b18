import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { adviceSchema, type Advice, type RankingEntry } from "@/lib/advice/advice";
import { noEvidence } from "@/lib/advice/evidence";
import { computeAdvice } from "@/lib/advice/pipeline";
import { estimateAll } from "@/lib/estimates/estimate-all";
import type { Answers } from "@/lib/questionnaire/answers";
import type { Range } from "@/lib/shared/range";
import { strategyIds } from "@/lib/shared/strategy-ids";
import { computeSizes } from "@/lib/sizes/compute-sizes";
import { firstEdition } from "@/rules/sets/first-edition";
import { arbitraryAnswers } from "../../support/arbitrary-cases";

const evidence = { model: noEvidence(), asOf: "2026-12-01T00:00:00.000Z", runs: 0, recordedCases: [] };
const advise = (answers: Answers) => computeAdvice({ answers, ruleSet: firstEdition, editionNumber: 1, evidence });

function numbersOf(value: unknown): number[] {
  if (typeof value === "number") return [value];
  return typeof value === "object" && value !== null ? Object.values(value).flatMap(numbersOf) : [];
}

function rangesOf({ ranking }: Advice): Range[] {
  return ranking.flatMap(({ estimate }) => [estimate.iterations, estimate.memoryGiB, estimate.setupSeconds, estimate.solveSeconds, estimate.totalSeconds]);
}

/** Ranked with a relative time from 1 up inside its range, or below the line with a reason. */
function isWhole({ status, reason, relativeTime, relativeRange }: RankingEntry): boolean {
  if (status !== "ranked") return reason !== null && reason !== "" && relativeTime === null && relativeRange === null;
  if (reason !== null || relativeTime === null || relativeRange === null) return false;
  return relativeTime >= 1 && relativeRange.low <= relativeTime && relativeTime <= relativeRange.high;
}

describe("advice for any valid questionnaire", () => {
  it("ranks every strategy once, with finite numbers and ordered ranges, and is the same twice, byte for byte", async () => {
    await fc.assert(
      fc.asyncProperty(arbitraryAnswers, async (answers) => {
        const advice = await advise(answers);
        expect(advice.ranking.map(({ strategy }) => strategy).sort()).toEqual([...strategyIds].sort());
        expect(advice.ranking.map(({ rank }) => rank)).toEqual(strategyIds.map((_, index) => index + 1));
        expect(numbersOf(advice).every(Number.isFinite)).toBe(true);
        expect(rangesOf(advice).filter(({ low, median, high }) => !(0 <= low && low <= median && median <= high))).toEqual([]);
        expect(advice.ranking.filter((entry) => !isWhole(entry))).toEqual([]);
        const ranked = advice.ranking.filter(({ status }) => status === "ranked").length;
        expect(advice.ranking.slice(0, ranked).every(({ status }) => status === "ranked")).toBe(true);
        expect(adviceSchema.safeParse(advice).success).toBe(true);
        expect(JSON.stringify(await advise(structuredClone(answers)))).toBe(JSON.stringify(advice));
      }),
      { seed: 20_266, numRuns: 2000 },
    );
  }, 180_000);

  it("never predicts less memory for a factorisation of more unknowns", () => {
    fc.assert(
      fc.property(arbitraryAnswers, fc.double({ min: 1, max: 30, noNaN: true }), (answers, growth) => {
        fc.pre(answers.size !== undefined);
        const grown = grow(answers, growth);
        const [small, large] = [answers, grown].map((each) => ({ sizes: computeSizes(each), estimates: estimateAll(each, computeSizes(each)) }));
        fc.pre(small !== undefined && large !== undefined && large.sizes.unknowns >= small.sizes.unknowns);
        for (const strategy of ["direct-ldlt", "direct-blr"] as const) {
          expect(large?.estimates[strategy].memoryGiB.median).toBeGreaterThanOrEqual((small?.estimates[strategy].memoryGiB.median ?? 0) * (1 - 1e-12));
        }
      }),
      { seed: 20_267, numRuns: 1000 },
    );
  });

  it("never predicts more iterations for a looser tolerance", () => {
    fc.assert(
      fc.property(arbitraryAnswers, fc.double({ min: 1, max: 1e10, noNaN: true }), (answers, looser) => {
        const sizes = computeSizes(answers);
        const tight = estimateAll(answers, sizes);
        const loose = estimateAll({ ...answers, tolerance: Math.min(1e-2, answers.tolerance * looser) }, sizes);
        for (const strategy of strategyIds) {
          expect(loose[strategy].iterations.median, strategy).toBeLessThanOrEqual(tight[strategy].iterations.median);
          expect(loose[strategy].iterations.high, strategy).toBeLessThanOrEqual(tight[strategy].iterations.high);
        }
      }),
      { seed: 20_268, numRuns: 1000 },
    );
  });
});

function grow(answers: Answers, growth: number): Answers {
  if (answers.size === undefined) return answers;
  const { by, value } = answers.size;
  return { ...answers, size: { by, value: by === "spacing" ? value / Math.cbrt(growth) : value * growth } };
}
