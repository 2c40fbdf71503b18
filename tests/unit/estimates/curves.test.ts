import { describe, expect, it } from "vitest";
import { crossingPoints, scalingCurves } from "@/lib/estimates/curves";
import { estimateAll } from "@/lib/estimates/estimate-all";
import { computeSizes } from "@/lib/sizes/compute-sizes";
import { caseAnswers } from "@/tests/support/case-answers";

describe("Scaling curves", () => {
  it("the curve against cores passes through the case's own estimate", () => {
    const answers = caseAnswers();
    const [curve] = scalingCurves(answers, { over: "cores", strategies: ["direct-ldlt"] });
    const own = curve?.points.find(({ x }) => x === answers.hardware.cores);
    expect(own?.median).toBe(estimateAll(answers, computeSizes(answers))["direct-ldlt"].totalSeconds.median);
  });

  it("more cores stop helping: the last doubling gains less than the first", () => {
    const [curve] = scalingCurves(caseAnswers(), { over: "cores", strategies: ["schur-diag-direct"] });
    const points = curve?.points ?? [];
    const gain = (index: number) => (points[index]?.median ?? NaN) / (points[index + 1]?.median ?? NaN);
    expect(gain(0)).toBeGreaterThan(1.2);
    expect(gain(points.length - 2)).toBeLessThan(gain(0));
  });

  it("time never falls when unknowns are added, for structured and imported meshes", () => {
    const imported = caseAnswers({ meshFamily: "imported", imported: { cells: 10_000, faces: 71_000, boundaryFaces: 3000 } });
    for (const answers of [caseAnswers(), imported]) {
      for (const { points } of scalingCurves(answers, { over: "unknowns", strategies: ["direct-ldlt", "schur-diag-amg"] })) {
        expect(points.length).toBeGreaterThan(5);
        points.forEach(({ median }, index) => expect(median).toBeGreaterThanOrEqual(points[index - 1]?.median ?? 0));
      }
    }
  });

  // By hand: x^1 and 100 x^-1 meet at x = 10, y = 10; straight lines in logarithms are met exactly.
  it("crossing points are interpolated in the logarithms", () => {
    const curve = (median: (x: number) => number) => [1, 4, 16].map((x) => ({ x, low: median(x), median: median(x), high: median(x) }));
    const [crossing, ...others] = crossingPoints([
      { strategy: "direct-ldlt", points: curve((x) => x) },
      { strategy: "bddc", points: curve((x) => 100 / x) },
    ]);
    expect(others).toEqual([]);
    expect(crossing).toMatchObject({ faster: "bddc", slower: "direct-ldlt" });
    expect(crossing?.x).toBeCloseTo(10, 10);
    expect(crossing?.seconds).toBeCloseTo(10, 10);
  });
});
