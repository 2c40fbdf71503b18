import { describe, expect, it } from "vitest";
import { conjugateGradientSteps, minresBound, saddleIntervals } from "@/lib/estimates/saddle-bounds";
import { spectralInterval } from "@/lib/estimates/spectral-interval";
import { elementInterval } from "@/lib/estimates/spectral-table";
import { denseMatrix } from "@/lib/numerics/dense";
import { diagonallyScaledInterval, symmetricEigenvalues } from "@/lib/numerics/eigen";
import { kuhnTetrahedron, truncatedOctahedron, unitCube } from "@/lib/numerics/elements/polyhedron";
import { kuhnCorners, simplexMassMatrix } from "@/lib/numerics/elements/simplex-face-elements";
import { tensorFaceMassMatrix } from "@/lib/numerics/elements/tensor-face-element";
import { vemMixedMassMatrix } from "@/lib/numerics/elements/vem-mixed";
import { caseAnswers } from "@/tests/support/case-answers";

describe("Eigenvalues of consistent mass matrices scaled by their diagonal, element by element", () => {
  // Wathen, IMA J. Numer. Anal. 7(4), 1987.
  const oneDimension = [[2, 1], [1, 2]];
  const simplex = (size: number) => Array.from({ length: size }, (_, i) => Array.from({ length: size }, (_unused, j) => (i === j ? 2 : 1)));
  const tensor = (factors: number) => {
    const size = 2 ** factors;
    return Array.from({ length: size }, (_, i) => Array.from({ length: size }, (_unused, j) => {
      let entry = 1;
      for (let bit = 0; bit < factors; bit += 1) entry *= oneDimension[(i >> bit) & 1]?.[(j >> bit) & 1] ?? 0;
      return entry;
    }));
  };
  it.each([
    ["linear triangles", simplex(3), 1 / 2, 2],
    ["linear tetrahedra", simplex(4), 1 / 2, 5 / 2],
    ["bilinear quadrilaterals", tensor(2), 1 / 4, 9 / 4],
    ["trilinear bricks", tensor(3), 1 / 8, 27 / 8],
  ])("%s lie in the published interval", (_name, rows, low, high) => {
    const [first, last] = diagonallyScaledInterval(denseMatrix(rows.length, rows.length, (i, j) => rows[i]?.[j] ?? 0));
    expect(first).toBeCloseTo(low, 12);
    expect(last).toBeCloseTo(high, 12);
  });

  // Closed form 2 - 2 cos(i pi / (n + 1)).
  it("the eigenvalues of the second difference matrix are those of the closed form", () => {
    const n = 12;
    const values = symmetricEigenvalues(denseMatrix(n, n, (i, j) => (i === j ? 2 : Math.abs(i - j) === 1 ? -1 : 0)));
    values.forEach((value, i) => expect(value).toBeCloseTo(2 - 2 * Math.cos(((i + 1) * Math.PI) / (n + 1)), 12));
  });
});

describe("Intervals of diag(A)^-1 A", () => {
  // Derived as Wathen does, from the one-dimensional block h/6 [2 1; 1 2].
  it("lowest-order face elements on boxes lie in [1/2, 3/2]", () => {
    const [low, high] = diagonallyScaledInterval(tensorFaceMassMatrix(1));
    expect(low).toBeCloseTo(0.5, 12);
    expect(high).toBeCloseTo(1.5, 12);
  });

  // Eigenvalues of diag(A)^-1 A of assembled reference systems at contrast 1e4, where single cells attain the bound (computed with SciPy).
  it("local matrices reproduce the extreme eigenvalues of assembled reference systems", () => {
    const hexahedra2 = diagonallyScaledInterval(tensorFaceMassMatrix(2));
    expect(hexahedra2[0]).toBeCloseTo(0.1938, 4);
    expect(hexahedra2[1]).toBeCloseTo(2.4186, 4);
    const raviartThomas = diagonallyScaledInterval(simplexMassMatrix("rt", kuhnCorners));
    expect(raviartThomas[0]).toBeCloseTo(0.5, 10);
    expect(raviartThomas[1]).toBeCloseTo(2, 10);
  });

  // tet4-BDM1-cb1e4-flux of the reference systems: [0.1066, 4.6180]. The basis depends on the order of a cell's corners, the table holds all orders.
  it("the tabled interval of BDM at degree 1 holds that of the reference system and of every order of corners", () => {
    const { low, high } = elementInterval("bdm", 1, "tetrahedron");
    expect(low).toBeLessThanOrEqual(0.1066);
    expect(high).toBeGreaterThanOrEqual(4.618);
    const [a, b, c, d] = kuhnCorners;
    for (const corners of [[a, b, c, d], [a, d, b, c], [a, b, d, c], [d, a, b, c]] as const) {
      const [first, last] = diagonallyScaledInterval(simplexMassMatrix("bdm", corners));
      expect(first).toBeGreaterThanOrEqual(low - 1e-4);
      expect(last).toBeLessThanOrEqual(high + 1e-4);
    }
  });

  it.each([
    ["rt-hex", 1, "cube", () => tensorFaceMassMatrix(1)],
    ["rt-hex", 2, "cube", () => tensorFaceMassMatrix(2)],
    ["rt-hex", 3, "cube", () => tensorFaceMassMatrix(3)],
    ["rt-hex", 4, "cube", () => tensorFaceMassMatrix(4)],
    ["rt", 1, "tetrahedron", () => simplexMassMatrix("rt", kuhnCorners)],
    ["vem-mixed", 1, "cube", () => vemMixedMassMatrix(unitCube(), 1)],
    ["vem-mixed", 2, "cube", () => vemMixedMassMatrix(unitCube(), 2)],
    ["vem-mixed", 1, "tetrahedron", () => vemMixedMassMatrix(kuhnTetrahedron(), 1)],
    ["vem-mixed", 2, "tetrahedron", () => vemMixedMassMatrix(kuhnTetrahedron(), 2)],
    ["vem-mixed", 1, "octahedron", () => vemMixedMassMatrix(truncatedOctahedron(), 1)],
  ] as const)("the table holds what the local matrix of %s degree %i on a %s gives", (discretisation, degree, shape, matrix) => {
    const entry = elementInterval(discretisation, degree, shape);
    const [low, high] = diagonallyScaledInterval(matrix());
    expect(entry.computed).toBe(true);
    expect(entry.low).toBeCloseTo(low, 3);
    expect(entry.high).toBeCloseTo(high, 3);
  });

  it("neither size nor contrast moves the interval, cells out of shape widen it", () => {
    const plain = spectralInterval(caseAnswers());
    expect(spectralInterval(caseAnswers({ size: { by: "cells", value: 1e6 }, contrast: { ratio: 1e6, pattern: "blocks" } }))).toEqual(plain);
    const flat = spectralInterval(caseAnswers({ aspectRatio: 10 }));
    expect(flat.low).toBeLessThan(plain.low);
    expect(flat.computed).toBe(false);
  });
});

describe("Bounds on the saddle-point matrix", () => {
  // Rusten & Winther, SIAM J. Matrix Anal. Appl. 13(3), 1992; Silvester & Wathen, SIAM J. Numer. Anal. 31(5), 1994.
  it("for [1/2, 3/2] the eigenvalues lie in [-0.7808, -0.5] and [0.5, 2]", () => {
    const { negative, positive } = saddleIntervals(0.5, 1.5);
    expect(negative[0]).toBeCloseTo(-0.7808, 4);
    expect(negative[1]).toBeCloseTo(-0.5, 12);
    expect(positive).toEqual([0.5, 2]);
  });

  // Murphy, Golub & Wathen, SIAM J. Sci. Comput. 21(6), 2000: eigenvalues 1 and (1 +- sqrt 5)/2.
  it("with A itself as block 1 the intervals shrink to the golden section and 1", () => {
    const { negative, positive } = saddleIntervals(1, 1);
    expect(negative[0]).toBeCloseTo((1 - Math.sqrt(5)) / 2, 12);
    expect(negative[1]).toBeCloseTo((1 - Math.sqrt(5)) / 2, 12);
    expect(positive[0]).toBe(1);
    expect(positive[1]).toBeCloseTo((1 + Math.sqrt(5)) / 2, 12);
  });

  // Greenbaum, SIAM 1997, ch. 3, by hand: a = 1, b = 0.25, c = 0.25, d = 1: (1 - 0.25)/(1 + 0.25) = 0.6; 2 * 0.6^m <= 1e-6 from m = 29.
  it("MINRES on two equal intervals needs what the published factor says", () => {
    expect(minresBound({ negative: [-1, -0.25], positive: [0.25, 1] }, 1e-6)).toBe(58);
  });

  it("extending the shorter interval never lowers the bound", () => {
    expect(minresBound({ negative: [-0.5, -0.25], positive: [0.25, 1] }, 1e-6)).toBe(58);
  });

  // 2 ((sqrt k - 1)/(sqrt k + 1))^m, by hand for k = 9: 2 * 0.5^m = 1e-6 at m = 20.93.
  it("CG on a condition number of 9 takes 20.93 steps to 1e-6", () => {
    expect(conjugateGradientSteps(9, 1e-6)).toBeCloseTo(Math.log2(2e6), 10);
  });
});
