import { describe, expect, it } from "vitest";
import type { EvidenceFeatures } from "@/lib/advice/evidence-features";
import { caseDistance, nearestCases, type RecordedCase } from "@/lib/advice/nearest-cases";

const here: EvidenceFeatures = { unknowns: 1e6, degree: 2, contrastRatio: 1, cores: 32, meshFamily: "cubes", discretisation: "vem-mixed" };
const past = (number: number, features: Partial<EvidenceFeatures>): RecordedCase => ({
  id: `case-${number}`,
  number,
  title: `Case ${number}`,
  features: { ...here, ...features },
  runs: 2,
  best: { strategy: "schur-diag-amg", totalSeconds: 12 },
});

describe("nearest cases", () => {
  it.each<[string, Partial<EvidenceFeatures>]>([
    ["a decade of unknowns", { unknowns: 1e7 }],
    ["a degree", { degree: 3 }],
    ["three decades of contrast", { contrastRatio: 1000 }],
    ["a factor of eight in cores", { cores: 256 }],
    ["another mesh family", { meshFamily: "voronoi" }],
    ["another discretisation", { discretisation: "rt-hex" }],
  ])("count %s as 1", (_, other) => {
    expect(caseDistance(here, { ...here, ...other })).toBeCloseTo(1, 12);
  });

  it("are the three nearest, nearest first, ties by number, without the case itself", () => {
    const recorded = [past(5, { degree: 3 }), past(1, {}), past(4, { degree: 3 }), past(2, { unknowns: 2e6 }), past(3, { degree: 6 })];
    expect(nearestCases(here, recorded, "case-1").map(({ number }) => number)).toEqual([2, 4, 5]);
  });

  it("tell what the case was and what solved it best", () => {
    const [nearest] = nearestCases(here, [past(7, { contrastRatio: 1000 })]);
    expect(nearest?.text).toBe("1\u202fM unknowns, degree 2, cubes, contrast 1\u202f000, 32 cores: schur-diag-amg took 12\u202fs, the best of 2 runs.");
    expect(nearest?.bestStrategy).toBe("schur-diag-amg");
  });
});
