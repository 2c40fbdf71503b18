import { denseMatrix, invert, multiply, transpose, type DenseMatrix } from "../dense";
import type { Point3 } from "../quadrature";
import { outwardNormal, tetrahedron } from "./polyhedron";
import { meanOn, sampleCell, scalarBasis, vectorBasis, type CellSamples } from "./sampled-fields";

export type Corners = readonly [Point3, Point3, Point3, Point3];

/**
 * Local velocity mass matrix on a tetrahedron with ordered corners, unit coefficient: lowest-order Raviart-Thomas (4 x 4, one mean flux a face) or
 * Brezzi-Douglas-Marini of degree 1 (12 x 12, on each face the flux against 1, 3 L2 - 1 and L1 - L0, L the face's barycentric coordinates in the order
 * of the corners: orthogonal, the basis of the reference runs). The basis functions are dual to these moments: M = E^-T G E^-1, E the moments of an orthonormal
 * basis of the space. Exact quadrature.
 */
export function simplexMassMatrix(element: "rt" | "bdm", corners: Corners): DenseMatrix {
  const samples = sampleCell(tetrahedron(...corners), 4);
  const fields = element === "rt" ? lowestRaviartThomas(samples) : linearFields(samples);
  const moments = faceMoments(samples, corners, element === "rt" ? 0 : 1);
  const evaluation = denseMatrix(moments.length, fields.length, (row, column) => {
    const field = fields[column];
    return field ? (moments[row]?.(field) ?? 0) : 0;
  });
  const dual = invert(evaluation);
  const gram = denseMatrix(fields.length, fields.length, (i, j) => samples.innerVector(fields[i] ?? new Float64Array(0), fields[j] ?? new Float64Array(0)));
  return multiply(transpose(dual), multiply(gram, dual));
}

/** Corners of a Kuhn tetrahedron of the unit cube. */
export const kuhnCorners: Corners = [
  [0, 0, 0],
  [1, 0, 0],
  [1, 1, 0],
  [1, 1, 1],
];

function lowestRaviartThomas(samples: CellSamples): Float64Array[] {
  const constant = [0, 1, 2].map((axis) => field(samples, (component) => (component === axis ? 1 : 0)));
  return [...constant, field(samples, (component, point) => samples.points[3 * point + component] ?? 0)];
}

function linearFields(samples: CellSamples): Float64Array[] {
  const { gradients, complement } = vectorBasis(samples, scalarBasis(samples, 2), 1);
  return [...gradients.map(({ vector }) => vector), ...complement];
}

function field(samples: CellSamples, value: (component: number, point: number) => number): Float64Array {
  return Float64Array.from({ length: 3 * samples.count }, (_, i) => value(i % 3, Math.floor(i / 3)));
}

/** Faces are opposite to their corner; moments are means over the face. */
function faceMoments(samples: CellSamples, corners: Corners, degree: 0 | 1): ((field: Float64Array) => number)[] {
  const cell = tetrahedron(...corners);
  return [0, 1, 2, 3].flatMap((face) => {
    const normal = outwardNormal(cell, face);
    const coordinates = faceCoordinates(samples, face);
    const weights = [() => 1, (point: number) => 3 * coordinates(point)[2] - 1, (point: number) => coordinates(point)[1] - coordinates(point)[0]];
    return weights.slice(0, degree === 0 ? 1 : 3).map((weight) => (values: Float64Array) =>
      meanOn(samples, face, (point) => weight(point) * normal.reduce((sum, n, axis) => sum + n * (values[3 * point + axis] ?? 0), 0)),
    );
  });

  function faceCoordinates(held: CellSamples, face: number): (point: number) => Point3 {
    const [a, b, c] = (cell.faces[face] ?? []).map((index) => relative(held, corners, index));
    if (!a || !b || !c) throw new RangeError("A face of a tetrahedron has three corners.");
    return (point) => barycentric([held.points[3 * point] ?? 0, held.points[3 * point + 1] ?? 0, held.points[3 * point + 2] ?? 0], a, b, c);
  }
}

/** A corner in the samples' coordinates: relative to the mean corner, in units of the cube root of the volume. */
function relative(_samples: CellSamples, corners: Corners, index: number): Point3 | null {
  const corner = corners[index];
  if (!corner) return null;
  const size = Math.cbrt(volumeOf(corners));
  const at = (axis: 0 | 1 | 2) => (corner[axis] - (corners[0][axis] + corners[1][axis] + corners[2][axis] + corners[3][axis]) / 4) / size;
  return [at(0), at(1), at(2)];
}

function volumeOf([a, b, c, d]: Corners): number {
  const [u, v, w] = [b, c, d].map((corner) => [corner[0] - a[0], corner[1] - a[1], corner[2] - a[2]]);
  if (!u || !v || !w) return 0;
  const [ux = 0, uy = 0, uz = 0] = u;
  const [vx = 0, vy = 0, vz = 0] = v;
  const [wx = 0, wy = 0, wz = 0] = w;
  return Math.abs(ux * (vy * wz - vz * wy) - uy * (vx * wz - vz * wx) + uz * (vx * wy - vy * wx)) / 6;
}

/** Barycentric coordinates of a point of the triangle a, b, c by normal equations. */
function barycentric(p: Point3, a: Point3, b: Point3, c: Point3): Point3 {
  const e1 = [b[0] - a[0], b[1] - a[1], b[2] - a[2]] as const;
  const e2 = [c[0] - a[0], c[1] - a[1], c[2] - a[2]] as const;
  const r = [p[0] - a[0], p[1] - a[1], p[2] - a[2]] as const;
  const product = (u: readonly [number, number, number], v: readonly [number, number, number]) => u[0] * v[0] + u[1] * v[1] + u[2] * v[2];
  const [g11, g12, g22] = [product(e1, e1), product(e1, e2), product(e2, e2)];
  const determinant = g11 * g22 - g12 * g12;
  const [r1, r2] = [product(r, e1), product(r, e2)];
  const l1 = (r1 * g22 - r2 * g12) / determinant;
  const l2 = (r2 * g11 - r1 * g12) / determinant;
  return [1 - l1 - l2, l1, l2];
}
