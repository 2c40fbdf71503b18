import { cross, dot, minus, norm, scale, tetrahedronQuadrature, triangleQuadrature, type Point3 } from "../quadrature";
import { cellTetrahedra, faceTriangles, meanOf, outwardNormal, type Polyhedron } from "./polyhedron";

/** Values at all sample points of a cell: those inside first, then those of each face. */
export type ScalarField = Float64Array;
/** A gradient field, three values a point, and a potential of it. */
export type GradientField = { vector: Float64Array; potential: ScalarField };

/**
 * Quadrature points of a cell and its faces in one list. Inner products are means over the cell: weights sum to 1. Fields are handled through their
 * values at these points, so that combining them needs no coefficients.
 */
export type CellSamples = {
  count: number;
  points: Float64Array;
  inside: number;
  volume: number;
  faceAreas: number[];
  faceRanges: { start: number; end: number; normal: Point3 }[];
  weights: Float64Array;
  innerScalar: (a: ScalarField, b: ScalarField) => number;
  innerVector: (a: Float64Array, b: Float64Array) => number;
};

/** Samples that integrate polynomials of `exactDegree` exactly, coordinates relative to the cell's mean vertex in units of its size. */
export function sampleCell(cell: Polyhedron, exactDegree: number): CellSamples {
  const inside = tetrahedronQuadrature(cellTetrahedra(cell), exactDegree);
  const faces = cell.faces.map((_, face) => triangleQuadrature(faceTriangles(cell, face), exactDegree));
  const volume = sum(inside.weights);
  const centre = meanOf(cell.vertices);
  const size = Math.cbrt(volume);
  const all = [inside, ...faces];
  const points = Float64Array.from(all.flatMap((rule) => [...rule.points].map((value, i) => (value - (centre[i % 3] ?? 0)) / size)));
  const weights = Float64Array.from(all.flatMap((rule) => {
    const total = sum(rule.weights);
    return [...rule.weights].map((weight) => weight / total);
  }));
  let start = inside.weights.length;
  const faceRanges = faces.map((rule, face) => {
    const range = { start, end: start + rule.weights.length, normal: outwardNormal(cell, face) };
    start = range.end;
    return range;
  });
  return {
    count: weights.length,
    points,
    inside: inside.weights.length,
    volume: 1,
    faceAreas: faces.map((rule) => sum(rule.weights) / size ** 2),
    faceRanges,
    weights,
    innerScalar: (a, b) => weightedSum(weights, inside.weights.length, (i) => (a[i] ?? 0) * (b[i] ?? 0)),
    innerVector: (a, b) =>
      weightedSum(weights, inside.weights.length, (i) => (a[3 * i] ?? 0) * (b[3 * i] ?? 0) + (a[3 * i + 1] ?? 0) * (b[3 * i + 1] ?? 0) + (a[3 * i + 2] ?? 0) * (b[3 * i + 2] ?? 0)),
  };
}

/** Mean over a face of a function of the sample points. */
export function meanOn(samples: CellSamples, face: number, value: (point: number) => number): number {
  const range = samples.faceRanges[face];
  if (!range) return 0;
  let total = 0;
  for (let point = range.start; point < range.end; point += 1) total += (samples.weights[point] ?? 0) * value(point);
  return total;
}

/** Orthonormal basis of P_degree on the cell by ascending degree, with gradients (in units of the cell's size). */
export function scalarBasis(samples: CellSamples, degree: number): { value: ScalarField; gradient: Float64Array }[] {
  const basis: { value: ScalarField; gradient: Float64Array }[] = [];
  for (const exponents of exponents3(degree)) {
    const value = sampled(samples, 1, (x, y, z) => [monomial([x, y, z], exponents)]);
    const gradient = sampled(samples, 3, (x, y, z) => [0, 1, 2].map((axis) => monomialDerivative([x, y, z], exponents, axis)));
    const kept = orthonormalise([value, gradient], basis.map((known) => [known.value, known.gradient]), samples.innerScalar, 0);
    if (kept) basis.push({ value: kept[0], gradient: kept[1] });
  }
  return basis;
}

/** Orthonormal basis of P_degree^3: gradients of P_(degree+1) by ascending degree, then their orthogonal complement. */
export function vectorBasis(
  samples: CellSamples,
  scalars: readonly { value: ScalarField; gradient: Float64Array }[],
  degree: number,
): { gradients: GradientField[]; complement: Float64Array[] } {
  const gradients: GradientField[] = [];
  for (const { value, gradient } of scalars.slice(1)) {
    const kept = orthonormalise([gradient, value], gradients.map((known) => [known.vector, known.potential]), samples.innerVector, 0);
    if (kept) gradients.push({ vector: kept[0], potential: kept[1] });
  }
  const complement: Float64Array[] = [];
  const dimension = 3 * polynomials(degree) - gradients.length;
  for (const { value } of scalars.slice(0, polynomials(degree))) {
    for (const axis of [0, 1, 2]) {
      if (complement.length === dimension) break;
      const field = new Float64Array(3 * samples.count);
      value.forEach((entry, i) => (field[3 * i + axis] = entry));
      const known = [...gradients.map(({ vector }) => vector), ...complement].map((vector): [Float64Array, Float64Array] => [vector, emptyField]);
      const kept = orthonormalise([field, emptyField], known, samples.innerVector, 1e-6);
      if (kept) complement.push(kept[0]);
    }
  }
  return { gradients, complement };
}

/** Orthonormal basis of P_degree of a face, sampled at its own points (0 elsewhere). */
export function faceBasis(samples: CellSamples, face: number, degree: number): ScalarField[] {
  const range = samples.faceRanges[face];
  if (!range) return [];
  const at = (i: number): Point3 => [samples.points[3 * i] ?? 0, samples.points[3 * i + 1] ?? 0, samples.points[3 * i + 2] ?? 0];
  const origin = at(range.start);
  const helper: Point3 = Math.abs(range.normal[0]) < 0.7 ? [1, 0, 0] : [0, 1, 0];
  const first = cross(range.normal, helper);
  const e1 = scale(first, 1 / norm(first));
  const e2 = cross(range.normal, e1);
  const inner = (a: ScalarField, b: ScalarField) => meanOn(samples, face, (i) => (a[i] ?? 0) * (b[i] ?? 0));
  const basis: ScalarField[] = [];
  for (let total = 0; total <= degree; total += 1) {
    for (let a = total; a >= 0; a -= 1) {
      const field = new Float64Array(samples.count);
      for (let i = range.start; i < range.end; i += 1) {
        const offset = minus(at(i), origin);
        field[i] = dot(offset, e1) ** a * dot(offset, e2) ** (total - a);
      }
      const kept = orthonormalise([field, emptyField], basis.map((known): [Float64Array, Float64Array] => [known, emptyField]), inner, 0);
      if (kept) basis.push(kept[0]);
    }
  }
  return basis;
}

const emptyField = new Float64Array(0);

/**
 * Gram-Schmidt, twice for stability: `field` made orthonormal to `known` in the inner product of the first components, the second ones combined alike.
 * Null when less than `threshold` of its length remains.
 */
function orthonormalise(
  [first, second]: [Float64Array, Float64Array],
  known: readonly [Float64Array, Float64Array][],
  inner: (a: Float64Array, b: Float64Array) => number,
  threshold: number,
): [Float64Array, Float64Array] | null {
  const [a, b] = [Float64Array.from(first), Float64Array.from(second)];
  const before = Math.sqrt(inner(a, a));
  for (let pass = 0; pass < 2; pass += 1) {
    for (const [p, q] of known) {
      const share = inner(a, p);
      a.forEach((entry, i) => (a[i] = entry - share * (p[i] ?? 0)));
      b.forEach((entry, i) => (b[i] = entry - share * (q[i] ?? 0)));
    }
  }
  const length = Math.sqrt(inner(a, a));
  if (!(length > threshold * before)) return null;
  return [a.map((entry) => entry / length), b.map((entry) => entry / length)];
}

function exponents3(degree: number): Point3[] {
  const all: Point3[] = [];
  for (let total = 0; total <= degree; total += 1) {
    for (let a = total; a >= 0; a -= 1) for (let b = total - a; b >= 0; b -= 1) all.push([a, b, total - a - b]);
  }
  return all;
}

function monomial(point: Point3, exponents: Point3): number {
  return point[0] ** exponents[0] * point[1] ** exponents[1] * point[2] ** exponents[2];
}

function monomialDerivative(point: Point3, exponents: Point3, axis: number): number {
  const power = exponents[axis] ?? 0;
  if (power === 0) return 0;
  const lowered: Point3 = [exponents[0] - (axis === 0 ? 1 : 0), exponents[1] - (axis === 1 ? 1 : 0), exponents[2] - (axis === 2 ? 1 : 0)];
  return power * monomial(point, lowered);
}

function sampled(samples: CellSamples, width: number, values: (x: number, y: number, z: number) => number[]): Float64Array {
  const field = new Float64Array(width * samples.count);
  for (let i = 0; i < samples.count; i += 1) {
    field.set(values(samples.points[3 * i] ?? 0, samples.points[3 * i + 1] ?? 0, samples.points[3 * i + 2] ?? 0), width * i);
  }
  return field;
}

function weightedSum(weights: Float64Array, count: number, value: (i: number) => number): number {
  let total = 0;
  for (let i = 0; i < count; i += 1) total += (weights[i] ?? 0) * value(i);
  return total;
}

function sum(values: Float64Array): number {
  return values.reduce((total, value) => total + value, 0);
}

function polynomials(degree: number): number {
  return degree < 0 ? 0 : ((degree + 1) * (degree + 2) * (degree + 3)) / 6;
}
