import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { curvePath, levelCurves } from "@/components/layout/level-curves";

describe("levelCurves", () => {
  it.each([-0.9, -0.28, -1e-6, 0, 1e-6, 0.28, 0.62, 0.99])("keeps every point on x² - y² = %d, by the formula itself", (level) => {
    for (const curve of levelCurves(level)) {
      for (const [x, y] of curve) expect(x * x - y * y).toBeCloseTo(level, 12);
    }
  });

  it.each([-0.9, -0.28, 0, 0.28, 0.99])("begins and ends both branches of level %d on the square's edge and never leaves it", (level) => {
    const curves = levelCurves(level);
    expect(curves).toHaveLength(2);
    for (const curve of curves) {
      for (const [x, y] of curve) expect(Math.max(Math.abs(x), Math.abs(y))).toBeLessThanOrEqual(1 + 1e-12);
      for (const end of [curve.at(0), curve.at(-1)]) expect(Math.max(...(end ?? [0, 0]).map(Math.abs))).toBeCloseTo(1, 12);
    }
  });

  it.each([1, -1, 2, Number.NaN])("refuses level %d, which the square does not hold", (level) => {
    expect(() => levelCurves(level)).toThrow(RangeError);
  });

  it("writes path data with y upwards", () => {
    expect(curvePath(levelCurves(0), 10, 16, 16)).toBe("M6 26L26 6M6 6L26 26");
  });
});

describe("the favicon", () => {
  it("draws curves from the same formula", () => {
    const icon = readFileSync("app/icon.svg", "utf8");
    for (const level of [-0.55, -0.2, 0.2, 0.55]) expect(icon).toContain(curvePath(levelCurves(level, 12), 13, 16, 16));
  });
});
