import { describe, expect, it } from "vitest";
import { computeSizes } from "@/lib/sizes/compute-sizes";
import { elementDimensions } from "@/lib/sizes/element-dimensions";
import { flatCuts, meanFaces, meshCounts } from "@/lib/sizes/mesh-counts";
import { caseAnswers } from "@/tests/support/case-answers";

describe("Element dimensions", () => {
  // Beirao da Veiga, Brezzi, Marini & Russo, Numer. Math. 133, 2016: face moments, gradient and cross moments, pressures.
  it.each([
    [1, 3, 0, 3, 1],
    [2, 6, 3, 11, 4],
    [3, 10, 9, 26, 10],
    [4, 15, 19, 50, 20],
    [5, 21, 34, 85, 35],
    [6, 28, 55, 133, 56],
  ])("mixed virtual elements of degree %i have %i face, %i gradient and %i cross moments and %i pressures", (k, face, gradient, cross, pressure) => {
    expect(elementDimensions("vem-mixed", k)).toEqual({ perFace: face, perCellVelocity: gradient + cross, perCellPressure: pressure });
  });

  // Arnold & Logg, Periodic Table of the Finite Elements, SIAM News 47(9), 2014.
  it.each([
    ["rt", 4, [4, 15, 36], [1, 4, 10]],
    ["bdm", 4, [12, 30, 60], [1, 4, 10]],
    ["rt-hex", 6, [6, 36, 108], [1, 8, 27]],
  ] as const)("%s with %i faces has the table's dimensions at degrees 1 to 3", (discretisation, faces, velocity, pressure) => {
    const local = [1, 2, 3].map((degree) => elementDimensions(discretisation, degree));
    expect(local.map(({ perFace, perCellVelocity }) => faces * perFace + perCellVelocity)).toEqual(velocity);
    expect(local.map(({ perCellPressure }) => perCellPressure)).toEqual(pressure);
  });
});

describe("Sizes", () => {
  // Counted by hand: n^3 cubes have 3 n^2 (n + 1) faces.
  it("31 cubed cubes at degree 1 have 92 256 faces and 395 932 unknowns", () => {
    const sizes = computeSizes(caseAnswers({ size: { by: "unknowns", value: 400_000 } }));
    expect(sizes).toMatchObject({ divisions: 31, cells: 29_791, faces: 92_256, velocityUnknowns: 366_141, pressureUnknowns: 29_791, unknowns: 395_932 });
    expect(sizes).toMatchObject({ eliminatedVelocityUnknowns: 17_298, nonzeros: { velocityBlock: 12_359_421, divergenceBlock: 178_746, total: 12_716_913 } });
  });

  it("22 cubed cubes at degree 2 have 392 040 unknowns", () => {
    const sizes = computeSizes(caseAnswers({ degree: 2, size: { by: "unknowns", value: 392_040 } }));
    expect(sizes).toMatchObject({ divisions: 22, velocityUnknowns: 349_448, pressureUnknowns: 42_592, unknowns: 392_040 });
  });

  it.each(["cells", "unknowns", "spacing"] as const)("the same mesh follows when its %s are asked for", (by) => {
    const value = { cells: 29_791, unknowns: 395_932, spacing: 1 / 31 }[by];
    expect(computeSizes(caseAnswers({ size: { by, value } })).divisions).toBe(31);
  });

  it("spacing is the cube root of the domain's volume over the cells for every family", () => {
    for (const meshFamily of ["cubes", "tetrahedra", "truncated-octahedra", "voronoi", "voronoi-relaxed", "distorted"] as const) {
      const sizes = computeSizes(caseAnswers({ meshFamily, domainVolume: 250, size: { by: "cells", value: 5000 } }));
      expect(sizes.spacing ** 3 * sizes.cells).toBeCloseTo(250, 8);
    }
  });

  it("an imported mesh keeps its counts", () => {
    const sizes = computeSizes(caseAnswers({ meshFamily: "imported", imported: { cells: 1000, faces: 7100, boundaryFaces: 600 } }));
    expect(sizes).toMatchObject({ cells: 1000, faces: 7100, boundaryFaces: 600, facesPerCell: 13.6, exact: true, divisions: null });
  });

  it("a pressure boundary removes no velocity unknowns", () => {
    expect(computeSizes(caseAnswers({ boundary: "pressure-somewhere" })).eliminatedVelocityUnknowns).toBe(0);
  });
});

describe("Meshes", () => {
  // Counted by hand on one cube: 6 tetrahedra, 6 inner and 12 boundary triangles.
  it("the Kuhn subdivision of one cube has 18 faces, 12 of them outside", () => {
    expect(meshCounts("tetrahedra", 1)).toMatchObject({ cells: 6, faces: 18, boundaryFaces: 12 });
  });

  it("structured faces make up the cells' sides: each inner face has two, each boundary face one", () => {
    for (const [kind, perCell] of [["cubes", 6], ["tetrahedra", 4]] as const) {
      const { cells, faces, boundaryFaces } = meshCounts(kind, 7);
      expect(2 * faces - boundaryFaces).toBe(perCell * cells);
    }
  });

  // Octahedra: whole ones have 14 faces; cut ones 10, 8 and 7 (counted by hand).
  it("the sides of the cut octahedral lattice are those of its whole and cut cells", () => {
    const n = 5;
    const { faces, boundaryFaces } = meshCounts("truncated-octahedra", n);
    expect(2 * faces - boundaryFaces).toBe(14 * (n ** 3 + (n - 1) ** 3) + 10 * 6 * (n - 1) ** 2 + 8 * 12 * (n - 1) + 7 * 8);
  });

  // Kelvin 1887 (14); Meijering, Philips Res. Rep. 8, 1953 (48 pi^2/35 + 2 = 15.535).
  it("large meshes approach 14 and 15.535 faces a cell", () => {
    const perCell = ({ cells, faces, boundaryFaces }: ReturnType<typeof meshCounts>) => (2 * faces - boundaryFaces) / cells;
    expect(perCell(meshCounts("truncated-octahedra", 2000))).toBeCloseTo(14, 1);
    expect(perCell(meshCounts("voronoi", 1e10))).toBeCloseTo(15.535, 1);
    expect(meanFaces.poissonVoronoi).toBeCloseTo(15.535, 3);
  });

  // Derived on the lattices; Poisson-Voronoi from a periodic Delaunay triangulation of 8 000 points.
  it("flat cuts cross 1, 3.780, 0.606 and about 4.99 faces per N^(2/3) cells", () => {
    expect(flatCuts.cubes).toBe(1);
    expect(flatCuts["truncated-octahedra"]).toBeCloseTo(3.78, 3);
    expect(flatCuts.tetrahedra).toBeCloseTo(0.606, 3);
    expect(flatCuts.voronoi).toBeCloseTo(4.99, 2);
  });
});
