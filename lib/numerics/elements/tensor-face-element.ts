import { denseMatrix, entryOf, invert, multiply, transpose, type DenseMatrix } from "../dense";
import { gaussLegendre, legendre } from "../quadrature";

/**
 * Local mass matrix of one direction of the tensor-product face element of degree r on a box, r^2 (r + 1) square; the three directions do not couple on
 * boxes, and the sides only scale them.
 *
 * The direction's component is of degree r along itself and r - 1 across. Degrees of freedom, as in the basis of the reference runs: on the two faces
 * moments against orthonormal Legendre products; inside moments against Legendre polynomials of degree <= r - 2 along the direction times nodal ones (Gauss-Lobatto
 * points of degree r - 1) across. In the orthonormal Legendre basis the Gram matrix is the identity, so M = (E Eᵀ)^-1 with E the degrees of freedom of that basis.
 */
export function tensorFaceMassMatrix(degree: number): DenseMatrix {
  const across = degree;
  const size = across * across * (degree + 1);
  const nodal = nodalMoments(degree - 1);
  const evaluation = denseMatrix(size, size, (row, column) => {
    const [i, j, k] = [Math.floor(column / (across * across)), Math.floor(column / across) % across, column % across];
    const [p, a, b] = [Math.floor(row / (across * across)), Math.floor(row / across) % across, row % across];
    if (p < 2) return j === a && k === b ? orthonormalLegendre(i, p) : 0;
    return i === p - 2 ? entryOf(nodal, j, a) * entryOf(nodal, k, b) : 0;
  });
  const dual = invert(evaluation);
  return multiply(transpose(dual), dual);
}

/** Legendre polynomial of degree n on [0, 1] with unit mean square. */
function orthonormalLegendre(n: number, x: number): number {
  return Math.sqrt(2 * n + 1) * legendre(n, 2 * x - 1).value;
}

/** Integrals of orthonormal Legendre polynomials (rows) against the nodal basis of the Gauss-Lobatto points (columns). */
function nodalMoments(degree: number): DenseMatrix {
  const nodes = lobattoNodes(degree);
  const rule = gaussLegendre(degree + 2);
  return denseMatrix(degree + 1, degree + 1, (j, a) =>
    rule.nodes.reduce((sum, x, q) => sum + (rule.weights[q] ?? 0) * orthonormalLegendre(j, x) * lagrange(nodes, a, x), 0),
  );
}

function lagrange(nodes: readonly number[], index: number, x: number): number {
  const own = nodes[index] ?? 0;
  return nodes.reduce((product, node, other) => (other === index ? product : (product * (x - node)) / (own - node)), 1);
}

/** Gauss-Lobatto points of degree n on [0, 1]: the ends and the extrema of the Legendre polynomial, by bisection of its derivative between them. */
function lobattoNodes(degree: number): number[] {
  if (degree === 0) return [0.5];
  const inner: number[] = [];
  const steps = 400;
  const slope = (x: number) => legendre(degree, x).derivative;
  for (let i = 0; i < steps; i += 1) {
    let low = Math.cos(Math.PI * (1 - i / steps));
    let high = Math.cos(Math.PI * (1 - (i + 1) / steps));
    if (i === 0 || i === steps - 1 || slope(low) * slope(high) >= 0) {
      if (i > 0 && slope(low) === 0) inner.push((low + 1) / 2);
      continue;
    }
    for (let step = 0; step < 60; step += 1) {
      const middle = (low + high) / 2;
      if (slope(low) * slope(middle) <= 0) high = middle;
      else low = middle;
    }
    inner.push((low + high + 2) / 4);
  }
  return [0, ...inner, 1];
}
