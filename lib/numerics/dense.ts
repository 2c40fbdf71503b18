/** Dense matrix, row after row. */
export type DenseMatrix = { rows: number; columns: number; data: Float64Array };

export function denseMatrix(rows: number, columns: number, entry?: (row: number, column: number) => number): DenseMatrix {
  const data = new Float64Array(rows * columns);
  if (entry) for (let i = 0; i < rows; i += 1) for (let j = 0; j < columns; j += 1) data[i * columns + j] = entry(i, j);
  return { rows, columns, data };
}

export function entryOf(matrix: DenseMatrix, row: number, column: number): number {
  return matrix.data[row * matrix.columns + column] ?? 0;
}

/** a b, (m x k) times (k x n); 2 m k n flops. */
export function multiply(a: DenseMatrix, b: DenseMatrix): DenseMatrix {
  if (a.columns !== b.rows) throw new RangeError(`Cannot multiply ${a.rows} x ${a.columns} by ${b.rows} x ${b.columns}.`);
  const product = denseMatrix(a.rows, b.columns);
  for (let i = 0; i < a.rows; i += 1) {
    for (let k = 0; k < a.columns; k += 1) {
      const factor = a.data[i * a.columns + k] ?? 0;
      if (factor === 0) continue;
      for (let j = 0; j < b.columns; j += 1) {
        product.data[i * b.columns + j] = (product.data[i * b.columns + j] ?? 0) + factor * (b.data[k * b.columns + j] ?? 0);
      }
    }
  }
  return product;
}

export function transpose(matrix: DenseMatrix): DenseMatrix {
  return denseMatrix(matrix.columns, matrix.rows, (i, j) => entryOf(matrix, j, i));
}

/** alpha a + beta b, entry by entry. */
export function combine(alpha: number, a: DenseMatrix, beta: number, b: DenseMatrix): DenseMatrix {
  if (a.rows !== b.rows || a.columns !== b.columns) throw new RangeError("Shapes differ.");
  return denseMatrix(a.rows, a.columns, (i, j) => alpha * entryOf(a, i, j) + beta * entryOf(b, i, j));
}

export function identity(size: number): DenseMatrix {
  return denseMatrix(size, size, (i, j) => (i === j ? 1 : 0));
}

/** Inverse by Gauss-Jordan with partial pivoting; RangeError when a pivot vanishes. 2 n^3 flops. */
export function invert(matrix: DenseMatrix): DenseMatrix {
  const size = matrix.rows;
  if (size !== matrix.columns) throw new RangeError("Only square matrices have an inverse.");
  const work = denseMatrix(size, 2 * size, (i, j) => (j < size ? entryOf(matrix, i, j) : i === j - size ? 1 : 0));
  for (let column = 0; column < size; column += 1) {
    swapRows(work, column, pivotRow(work, column));
    const pivot = entryOf(work, column, column);
    if (Math.abs(pivot) < 1e-300) throw new RangeError("The matrix is singular.");
    scaleRow(work, column, 1 / pivot);
    for (let row = 0; row < size; row += 1) if (row !== column) addRow(work, row, column, -entryOf(work, row, column));
  }
  return denseMatrix(size, size, (i, j) => entryOf(work, i, j + size));
}

function pivotRow(work: DenseMatrix, column: number): number {
  let best = column;
  for (let row = column + 1; row < work.rows; row += 1) {
    if (Math.abs(entryOf(work, row, column)) > Math.abs(entryOf(work, best, column))) best = row;
  }
  return best;
}

function swapRows(work: DenseMatrix, a: number, b: number): void {
  if (a === b) return;
  const { columns, data } = work;
  const held = data.slice(a * columns, (a + 1) * columns);
  data.copyWithin(a * columns, b * columns, (b + 1) * columns);
  data.set(held, b * columns);
}

function scaleRow({ columns, data }: DenseMatrix, row: number, factor: number): void {
  for (let j = 0; j < columns; j += 1) data[row * columns + j] = (data[row * columns + j] ?? 0) * factor;
}

function addRow({ columns, data }: DenseMatrix, to: number, from: number, factor: number): void {
  if (factor === 0) return;
  for (let j = 0; j < columns; j += 1) data[to * columns + j] = (data[to * columns + j] ?? 0) + factor * (data[from * columns + j] ?? 0);
}
