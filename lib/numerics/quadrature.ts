/** Points in three dimensions, three coordinates each, with weights. */
export type Quadrature = { points: Float64Array; weights: Float64Array };

export type Point3 = readonly [number, number, number];

/**
 * Gauss-Legendre rule with n points on [0, 1], exact to degree 2 n - 1: Newton's method on the Legendre polynomial from Chebyshev's guesses.
 */
export function gaussLegendre(n: number): { nodes: Float64Array; weights: Float64Array } {
  const nodes = new Float64Array(n);
  const weights = new Float64Array(n);
  for (let i = 0; i < n; i += 1) {
    let x = Math.cos((Math.PI * (i + 0.75)) / (n + 0.5));
    let slope = 1;
    for (let step = 0; step < 50; step += 1) {
      const { value, derivative } = legendre(n, x);
      slope = derivative;
      const change = value / derivative;
      x -= change;
      if (Math.abs(change) < 1e-16) break;
    }
    nodes[i] = (1 - x) / 2;
    weights[i] = 1 / ((1 - x * x) * slope * slope);
  }
  return { nodes, weights };
}

/** Legendre polynomial of degree n on [-1, 1] and its derivative. */
export function legendre(n: number, x: number): { value: number; derivative: number } {
  let previous = 1;
  let value = n === 0 ? 1 : x;
  for (let k = 2; k <= n; k += 1) {
    [previous, value] = [value, ((2 * k - 1) * x * value - (k - 1) * previous) / k];
  }
  if (n === 0) return { value, derivative: 0 };
  const derivative = Math.abs(x) === 1 ? (x ** (n + 1) * n * (n + 1)) / 2 : (n * (x * value - previous)) / (x * x - 1);
  return { value, derivative };
}

/** Rule on a union of triangles, exact for polynomials of `degree`: collapsed Gauss rules. Weights sum to the area. */
export function triangleQuadrature(triangles: readonly (readonly [Point3, Point3, Point3])[], degree: number): Quadrature {
  const { nodes, weights } = gaussLegendre(Math.ceil((degree + 2) / 2));
  const points: number[] = [];
  const all: number[] = [];
  for (const [a, b, c] of triangles) {
    const area = norm(cross(minus(b, a), minus(c, a)));
    nodes.forEach((s, i) => {
      nodes.forEach((t, j) => {
        const [u, v] = [s, (1 - s) * t];
        points.push(...along(a, [minus(b, a), u], [minus(c, a), v]));
        all.push(area * (1 - s) * (weights[i] ?? 0) * (weights[j] ?? 0));
      });
    });
  }
  return { points: Float64Array.from(points), weights: Float64Array.from(all) };
}

/** Rule on a union of tetrahedra, exact for polynomials of `degree`: collapsed Gauss rules. Weights sum to the volume. */
export function tetrahedronQuadrature(tetrahedra: readonly (readonly [Point3, Point3, Point3, Point3])[], degree: number): Quadrature {
  const { nodes, weights } = gaussLegendre(Math.ceil((degree + 3) / 2));
  const points: number[] = [];
  const all: number[] = [];
  for (const [a, b, c, d] of tetrahedra) {
    const volume = Math.abs(dot(minus(b, a), cross(minus(c, a), minus(d, a))));
    nodes.forEach((r, i) => {
      nodes.forEach((s, j) => {
        nodes.forEach((t, k) => {
          const [u, v, w] = [r, (1 - r) * s, (1 - r) * (1 - s) * t];
          points.push(...along(a, [minus(b, a), u], [minus(c, a), v], [minus(d, a), w]));
          all.push(volume * (1 - r) ** 2 * (1 - s) * (weights[i] ?? 0) * (weights[j] ?? 0) * (weights[k] ?? 0));
        });
      });
    });
  }
  return { points: Float64Array.from(points), weights: Float64Array.from(all) };
}

export function minus(a: Point3, b: Point3): Point3 {
  return [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
}

export function cross(a: Point3, b: Point3): Point3 {
  return [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
}

export function dot(a: Point3, b: Point3): number {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
}

export function norm(a: Point3): number {
  return Math.hypot(a[0], a[1], a[2]);
}

export function scale(a: Point3, factor: number): Point3 {
  return [a[0] * factor, a[1] * factor, a[2] * factor];
}

function along(origin: Point3, ...steps: (readonly [Point3, number])[]): Point3 {
  let [x, y, z] = origin;
  for (const [direction, length] of steps) {
    x += direction[0] * length;
    y += direction[1] * length;
    z += direction[2] * length;
  }
  return [x, y, z];
}
