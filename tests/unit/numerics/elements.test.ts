import { describe, expect, it } from "vitest";
import { denseMatrix, entryOf, identity, invert, multiply } from "@/lib/numerics/dense";
import { symmetricEigenvalues } from "@/lib/numerics/eigen";
import { cellTetrahedra, kuhnTetrahedron, outwardNormal, truncatedOctahedron, unitCube, voronoiCell, type Polyhedron } from "@/lib/numerics/elements/polyhedron";
import { vemMixedMatrices } from "@/lib/numerics/elements/vem-mixed";
import { gaussLegendre, tetrahedronQuadrature, type Point3 } from "@/lib/numerics/quadrature";
import { seededRandom } from "@/lib/shared/random";

function randomCell(seed: number): Polyhedron {
  const random = seededRandom(seed);
  const coordinate = () => 5 * random() - 2.5;
  const seeds = Array.from({ length: 160 }, (): Point3 => [coordinate(), coordinate(), coordinate()]);
  return voronoiCell([0, 0, 0], seeds.sort((a, b) => Math.hypot(...a) - Math.hypot(...b)).slice(0, 40));
}

const cells: [string, Polyhedron, number][] = [
  ["cube", unitCube(), 6],
  ["Kuhn tetrahedron", kuhnTetrahedron(), 4],
  ["truncated octahedron", truncatedOctahedron(), 14],
  ["first random Voronoi cell", randomCell(1), randomCell(1).faces.length],
  ["second random Voronoi cell", randomCell(2), randomCell(2).faces.length],
];

describe("Polyhedra", () => {
  // Euler 1758: V - E + F = 2 for every convex polyhedron.
  it.each(cells)("a %s has V - E + F = 2 and its faces", (_name, cell, faces) => {
    const edges = cell.faces.reduce((sum, face) => sum + face.length, 0) / 2;
    expect(cell.vertices.length - edges + cell.faces.length).toBe(2);
    expect(cell.faces).toHaveLength(faces);
  });

  // Known volumes: the Kuhn tetrahedra are a sixth of the cube, the octahedral lattice has two cells a cube.
  it.each([
    ["cube", unitCube(), 1],
    ["Kuhn tetrahedron", kuhnTetrahedron(), 1 / 6],
    ["truncated octahedron", truncatedOctahedron(), 1 / 2],
  ] as const)("a %s has its volume", (_name, cell, volume) => {
    const { weights } = tetrahedronQuadrature(cellTetrahedra(cell), 2);
    expect(weights.reduce((sum, weight) => sum + weight, 0)).toBeCloseTo(volume, 12);
  });
});

describe("Quadrature", () => {
  it("Gauss-Legendre with n points integrates x^(2n-1) exactly on [0, 1]", () => {
    for (let n = 1; n <= 8; n += 1) {
      const { nodes, weights } = gaussLegendre(n);
      const integral = nodes.reduce((sum, x, i) => sum + (weights[i] ?? 0) * x ** (2 * n - 1), 0);
      expect(integral).toBeCloseTo(1 / (2 * n), 13);
    }
  });

  // Integral of x^2 y z over the unit cube: 1/3 * 1/2 * 1/2.
  it("the cell rule integrates polynomials up to its degree", () => {
    const { points, weights } = tetrahedronQuadrature(cellTetrahedra(unitCube()), 4);
    const integral = weights.reduce((sum, weight, i) => sum + weight * (points[3 * i] ?? 0) ** 2 * (points[3 * i + 1] ?? 0) * (points[3 * i + 2] ?? 0), 0);
    expect(integral).toBeCloseTo(1 / 12, 13);
  });
});

describe("Dense matrices", () => {
  it("a matrix times its inverse is the identity, a singular one is refused", () => {
    const matrix = denseMatrix(4, 4, (i, j) => 1 / (i + j + 1) + (i === j ? 0.5 : 0));
    const product = multiply(matrix, invert(matrix));
    product.data.forEach((value, i) => expect(value).toBeCloseTo(identity(4).data[i] ?? 0, 12));
    expect(() => invert(denseMatrix(2, 2, () => 1))).toThrow(RangeError);
  });
});

describe("Mixed virtual elements", () => {
  // Dimensions: Beirao da Veiga, Brezzi, Marini & Russo, Numer. Math. 133, 2016.
  it.each(cells)("the local matrix of degree 1 on a %s has 3 moments a face and 3 inside, and is symmetric positive definite", (_name, cell, faces) => {
    const { mass } = vemMixedMatrices(cell, 1);
    expect(mass.rows).toBe(3 * faces + 3);
    for (let i = 0; i < mass.rows; i += 1) for (let j = 0; j < i; j += 1) expect(entryOf(mass, i, j)).toBeCloseTo(entryOf(mass, j, i), 10);
    expect(symmetricEigenvalues(mass)[0]).toBeGreaterThan(0);
  });

  // A constant field c is in the space: vᵀ M v = |c|^2 for cell volume 1, and its divergence vanishes. Its only moments are those of the faces' constants.
  it.each(cells.slice(0, 4))("constant fields on a %s have their own energy and no divergence", (_name, cell) => {
    const { mass, divergence } = vemMixedMatrices(cell, 1);
    const direction = [0.6, -0.3, 0.7];
    const dofs = new Float64Array(mass.rows);
    cell.faces.forEach((_face, face) => (dofs[3 * face] = outwardNormal(cell, face).reduce((sum, n, axis) => sum + n * (direction[axis] ?? 0), 0)));
    let energy = 0;
    dofs.forEach((v, i) => dofs.forEach((w, j) => (energy += v * entryOf(mass, i, j) * w)));
    expect(energy).toBeCloseTo(0.36 + 0.09 + 0.49, 8);
    expect(dofs.reduce((sum, v, j) => sum + entryOf(divergence, 0, j) * v, 0)).toBeCloseTo(0, 10);
  });
});
