import { cross, dot, minus, norm, scale, type Point3 } from "../quadrature";

/** Convex polyhedron: faces list their vertices in order around the face. */
export type Polyhedron = { vertices: readonly Point3[]; faces: readonly (readonly number[])[] };

export function unitCube(): Polyhedron {
  const planes: Plane[] = [];
  for (const axis of [0, 1, 2]) {
    for (const side of [0, 1]) {
      const normal: Point3 = [axis === 0 ? 1 : 0, axis === 1 ? 1 : 0, axis === 2 ? 1 : 0];
      planes.push(side === 1 ? { normal, offset: 1 } : { normal: scale(normal, -1), offset: 0 });
    }
  }
  return fromPlanes(planes);
}

/** One of the six congruent tetrahedra of the Kuhn subdivision of the unit cube. */
export function kuhnTetrahedron(): Polyhedron {
  return tetrahedron([0, 0, 0], [1, 0, 0], [1, 1, 0], [1, 1, 1]);
}

export function tetrahedron(a: Point3, b: Point3, c: Point3, d: Point3): Polyhedron {
  return {
    vertices: [a, b, c, d],
    faces: [
      [1, 2, 3],
      [0, 2, 3],
      [0, 1, 3],
      [0, 1, 2],
    ],
  };
}

/** Voronoi cell of the body-centred cubic lattice with edge 1: 6 squares, 8 hexagons. */
export function truncatedOctahedron(): Polyhedron {
  const neighbours: Point3[] = [];
  for (const axis of [0, 1, 2]) for (const sign of [-1, 1]) neighbours.push([axis === 0 ? sign : 0, axis === 1 ? sign : 0, axis === 2 ? sign : 0]);
  for (const x of [-0.5, 0.5]) for (const y of [-0.5, 0.5]) for (const z of [-0.5, 0.5]) neighbours.push([x, y, z]);
  return voronoiCell([0, 0, 0], neighbours);
}

/** Cell of points nearer to `seed` than to any of `neighbours`, which must enclose it. */
export function voronoiCell(seed: Point3, neighbours: readonly Point3[]): Polyhedron {
  const planes = neighbours.map((neighbour) => {
    const normal = minus(neighbour, seed);
    return { normal, offset: (dot(neighbour, neighbour) - dot(seed, seed)) / 2 };
  });
  return fromPlanes(planes);
}

/** Half space normal . x <= offset. */
type Plane = { normal: Point3; offset: number };

/**
 * Vertices by intersecting every three planes and keeping the points inside all: O(m^4) for m planes, meant for single cells of some dozens of planes. Planes
 * that only touch an edge or a vertex make no face.
 */
function fromPlanes(planes: readonly Plane[]): Polyhedron {
  const size = Math.max(...planes.map(({ normal, offset }) => Math.abs(offset) / norm(normal)), 1e-300);
  const vertices: Point3[] = [];
  planes.forEach((a, i) => {
    planes.slice(i + 1).forEach((b, j) => {
      for (const c of planes.slice(i + j + 2)) {
        const point = intersection(a, b, c);
        if (point === null || !planes.every((plane) => excess(plane, point) < 1e-9 * size)) continue;
        if (!vertices.some((known) => norm(minus(known, point)) < 1e-8 * size)) vertices.push(point);
      }
    });
  });
  const faces = planes.map((plane) => around(plane, vertices, size)).filter((face) => face.length >= 3);
  return { vertices, faces };
}

function excess({ normal, offset }: Plane, point: Point3): number {
  return (dot(normal, point) - offset) / norm(normal);
}

function intersection(a: Plane, b: Plane, c: Plane): Point3 | null {
  const bc = cross(b.normal, c.normal);
  const determinant = dot(a.normal, bc);
  if (Math.abs(determinant) < 1e-10 * norm(a.normal) * norm(b.normal) * norm(c.normal)) return null;
  const ca = cross(c.normal, a.normal);
  const ab = cross(a.normal, b.normal);
  const [p, q, r] = [scale(bc, a.offset), scale(ca, b.offset), scale(ab, c.offset)];
  return scale([p[0] + q[0] + r[0], p[1] + q[1] + r[1], p[2] + q[2] + r[2]], 1 / determinant);
}

/** Vertices on the plane by angle around their mean. */
function around(plane: Plane, vertices: readonly Point3[], size: number): number[] {
  const on = vertices.flatMap((vertex, index) => (Math.abs(excess(plane, vertex)) < 1e-8 * size ? [{ vertex, index }] : []));
  if (on.length < 3) return [];
  const centre = meanOf(on.map(({ vertex }) => vertex));
  const first = on[0];
  if (!first) return [];
  const e1 = minus(first.vertex, centre);
  const e2 = cross(plane.normal, e1);
  const angle = (vertex: Point3) => Math.atan2(dot(minus(vertex, centre), e2) / norm(e2), dot(minus(vertex, centre), e1) / norm(e1));
  return on.sort((a, b) => angle(a.vertex) - angle(b.vertex)).map(({ index }) => index);
}

export function meanOf(points: readonly Point3[]): Point3 {
  let sum: Point3 = [0, 0, 0];
  for (const point of points) sum = [sum[0] + point[0], sum[1] + point[1], sum[2] + point[2]];
  return scale(sum, 1 / points.length);
}

/** Triangles of a face around the mean of its vertices. */
export function faceTriangles({ vertices, faces }: Polyhedron, face: number): [Point3, Point3, Point3][] {
  const corners = (faces[face] ?? []).map((index) => vertexAt(vertices, index));
  const centre = meanOf(corners);
  return corners.map((corner, i) => [centre, corner, cornerAfter(corners, i)]);
}

/** Tetrahedra of a convex cell around the mean of its vertices. */
export function cellTetrahedra(cell: Polyhedron): [Point3, Point3, Point3, Point3][] {
  const centre = meanOf(cell.vertices);
  return cell.faces.flatMap((_, face) => faceTriangles(cell, face).map(([a, b, c]): [Point3, Point3, Point3, Point3] => [centre, a, b, c]));
}

/** Outward unit normal of a face of a convex cell. */
export function outwardNormal(cell: Polyhedron, face: number): Point3 {
  const [triangle] = faceTriangles(cell, face);
  if (!triangle) throw new RangeError("A face needs at least three vertices.");
  const normal = cross(minus(triangle[1], triangle[0]), minus(triangle[2], triangle[0]));
  const outward = dot(normal, minus(triangle[0], meanOf(cell.vertices))) > 0 ? 1 : -1;
  return scale(normal, outward / norm(normal));
}

function vertexAt(vertices: readonly Point3[], index: number): Point3 {
  const vertex = vertices[index];
  if (!vertex) throw new RangeError(`There is no vertex ${index}.`);
  return vertex;
}

function cornerAfter(corners: readonly Point3[], index: number): Point3 {
  const next = corners[(index + 1) % corners.length];
  if (!next) throw new RangeError("A face has no corners.");
  return next;
}
