import { denseMatrix, entryOf, type DenseMatrix } from "./dense";

const mostSweeps = 60;

/**
 * Eigenvalues of a real symmetric matrix, ascending: Householder reduction to tridiagonal form, then implicit QL (Golub & Van Loan, "Matrix
 * Computations", sections 8.3.1 and 8.3.3). The input is kept. 4/3 n^3 flops. RangeError when QL does not converge, which symmetric input does not see.
 */
export function symmetricEigenvalues(matrix: DenseMatrix): Float64Array {
  const { diagonal, offDiagonal } = tridiagonalise(matrix);
  implicitQl(diagonal, offDiagonal);
  return diagonal.sort();
}

/** Smallest and largest eigenvalue of diag(M)^-1 M for a symmetric positive definite M. */
export function diagonallyScaledInterval(matrix: DenseMatrix): [number, number] {
  const scale = Float64Array.from({ length: matrix.rows }, (_, i) => 1 / Math.sqrt(entryOf(matrix, i, i)));
  const scaled = denseMatrix(matrix.rows, matrix.rows, (i, j) => entryOf(matrix, i, j) * (scale[i] ?? 0) * (scale[j] ?? 0));
  const values = symmetricEigenvalues(scaled);
  return [values[0] ?? NaN, values[values.length - 1] ?? NaN];
}

function tridiagonalise(matrix: DenseMatrix): { diagonal: Float64Array; offDiagonal: Float64Array } {
  const size = matrix.rows;
  const a = Float64Array.from(matrix.data);
  const offDiagonal = new Float64Array(size);
  const v = new Float64Array(size);
  const p = new Float64Array(size);
  for (let k = 0; k < size - 2; k += 1) {
    let norm = 0;
    for (let i = k + 1; i < size; i += 1) norm = Math.hypot(norm, a[i * size + k] ?? 0);
    if (norm === 0) continue;
    const head = a[(k + 1) * size + k] ?? 0;
    const alpha = head > 0 ? -norm : norm;
    let length = 0;
    for (let i = k + 1; i < size; i += 1) {
      v[i] = (a[i * size + k] ?? 0) - (i === k + 1 ? alpha : 0);
      length += (v[i] ?? 0) ** 2;
    }
    if (length > 0) applyReflection(a, v, p, k + 1, size, 2 / length);
    offDiagonal[k] = alpha;
  }
  if (size >= 2) offDiagonal[size - 2] = a[(size - 1) * size + size - 2] ?? 0;
  return { diagonal: Float64Array.from({ length: size }, (_, i) => a[i * size + i] ?? 0), offDiagonal };
}

/** A <- H A H on rows and columns from `start`, H = I - beta v vᵀ: A - v wᵀ - w vᵀ. */
function applyReflection(a: Float64Array, v: Float64Array, p: Float64Array, start: number, size: number, beta: number): void {
  let dot = 0;
  for (let i = start; i < size; i += 1) {
    let sum = 0;
    for (let j = start; j < size; j += 1) sum += (a[i * size + j] ?? 0) * (v[j] ?? 0);
    p[i] = beta * sum;
    dot += (p[i] ?? 0) * (v[i] ?? 0);
  }
  const half = (beta / 2) * dot;
  for (let i = start; i < size; i += 1) p[i] = (p[i] ?? 0) - half * (v[i] ?? 0);
  for (let i = start; i < size; i += 1) {
    for (let j = start; j < size; j += 1) {
      a[i * size + j] = (a[i * size + j] ?? 0) - (v[i] ?? 0) * (p[j] ?? 0) - (p[i] ?? 0) * (v[j] ?? 0);
    }
  }
}

/** Overwrites `d` with the eigenvalues of the tridiagonal matrix with diagonal d and off-diagonal e. */
function implicitQl(d: Float64Array, e: Float64Array): void {
  const size = d.length;
  for (let l = 0; l < size; l += 1) {
    for (let sweep = 0; ; sweep += 1) {
      const m = splitPoint(d, e, l);
      if (m === l) break;
      if (sweep === mostSweeps) throw new RangeError("QL did not converge.");
      qlStep(d, e, l, m);
    }
  }
}

function splitPoint(d: Float64Array, e: Float64Array, l: number): number {
  let m = l;
  while (m < d.length - 1) {
    const size = Math.abs(d[m] ?? 0) + Math.abs(d[m + 1] ?? 0);
    if (Math.abs(e[m] ?? 0) <= Number.EPSILON * size) break;
    m += 1;
  }
  return m;
}

function qlStep(d: Float64Array, e: Float64Array, l: number, m: number): void {
  const el = e[l] ?? 0;
  const dl = d[l] ?? 0;
  let g = ((d[l + 1] ?? 0) - dl) / (2 * el);
  let r = Math.hypot(g, 1);
  g = (d[m] ?? 0) - dl + el / (g + (g >= 0 ? r : -r));
  let s = 1;
  let c = 1;
  let p = 0;
  for (let i = m - 1; i >= l; i -= 1) {
    const f = s * (e[i] ?? 0);
    const b = c * (e[i] ?? 0);
    r = Math.hypot(f, g);
    e[i + 1] = r;
    if (r === 0) {
      d[i + 1] = (d[i + 1] ?? 0) - p;
      e[m] = 0;
      return;
    }
    s = f / r;
    c = g / r;
    g = (d[i + 1] ?? 0) - p;
    r = ((d[i] ?? 0) - g) * s + 2 * c * b;
    p = s * r;
    d[i + 1] = g + p;
    g = c * r - b;
  }
  d[l] = (d[l] ?? 0) - p;
  e[l] = g;
  e[m] = 0;
}
