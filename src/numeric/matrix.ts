/**
 * Symmetric matrices, as rows: their factor for drawing, and their axes.
 *
 * Sources: Cholesky's factor and the cyclic method of Jacobi, Golub & Van Loan (2013), "Matrix
 * computations", 4.2 and 8.5 (from memory). Both are ours since what is drawn depends on the factor,
 * and it must have the same bits everywhere.
 */
export type Matrix = readonly Float64Array[];

/** What counts as 0 beside a diagonal of 1. */
const TINY = 1e-12;
const MAX_SWEEPS = 60;

/** A matrix with the given entries. */
export function matrixOf(n: number, entry: (i: number, j: number) => number): Matrix {
  return Array.from({ length: n }, (_, i) =>
    Float64Array.from({ length: n }, (_, j) => entry(i, j)),
  );
}

/**
 * The lower factor L with L·Lᵀ the matrix, for one with a diagonal of 1; null when there is none.
 * A matrix without full rank (two variables that move as one) has factors too: columns of zeros.
 * Guarantee: rows of length 1; L·Lᵀ is within 1e-11 of the matrix, within 2e-6 where it lacks rank.
 */
export function correlationFactor(matrix: Matrix): Matrix | null {
  const n = matrix.length;
  const factor = matrixOf(n, () => 0);
  for (let j = 0; j < n; j++) {
    const row = factor[j]!;
    const left = 1 - dot(row, row, j);
    if (left < -TINY) return null;
    const pivot = left > TINY ? Math.sqrt(left) : 0;
    row[j] = pivot;
    for (let i = j + 1; i < n; i++) {
      const rest = matrix[i]![j]! - dot(factor[i]!, row, j);
      if (pivot > 0) factor[i]![j] = rest / pivot;
      // For a matrix with a factor rest² is at most left.
      else if (rest * rest > 2 * TINY) return null;
    }
  }
  for (const row of factor) {
    const length = Math.sqrt(dot(row, row, n));
    row.forEach((entry, j) => (row[j] = entry / length));
  }
  return factor;
}

/** The sum of the first n products. */
function dot(a: Float64Array, b: Float64Array, n: number): number {
  let sum = 0;
  for (let k = 0; k < n; k++) sum += a[k]! * b[k]!;
  return sum;
}

/** Solves L·x = b for a lower factor without zeros on its diagonal. */
export function solveLower(factor: Matrix, b: Float64Array): Float64Array {
  const x = new Float64Array(b.length);
  for (let i = 0; i < b.length; i++) {
    x[i] = (b[i]! - dot(factor[i]!, x, i)) / factor[i]![i]!;
  }
  return x;
}

/** The stretches of a symmetric matrix along its axes, and the axes as columns. */
interface Axes {
  readonly values: Float64Array;
  readonly vectors: Matrix;
}

/** Guarantee: what is left beside the diagonal is below 1e-14 of the whole. */
export function axesOf(matrix: Matrix): Axes {
  const n = matrix.length;
  const a = matrixOf(n, (i, j) => matrix[i]![j]!);
  const vectors = matrixOf(n, (i, j) => (i === j ? 1 : 0));
  for (let sweep = 0; sweep < MAX_SWEEPS; sweep++) {
    let [beside, whole] = [0, 0];
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) {
        const square = a[i]![j]! * a[i]![j]!;
        whole += square;
        if (i !== j) beside += square;
      }
    }
    if (beside <= 1e-28 * whole) break;
    for (let p = 0; p < n; p++) for (let q = p + 1; q < n; q++) rotate(a, vectors, p, q);
  }
  return { values: Float64Array.from(a, (row, i) => row[i]!), vectors };
}

/** Turns axes p and q so that their entry becomes 0. */
function rotate(a: Matrix, vectors: Matrix, p: number, q: number): void {
  const entry = a[p]![q]!;
  if (entry === 0) return;
  const theta = (a[q]![q]! - a[p]![p]!) / (2 * entry);
  const root = Math.sqrt(theta * theta + 1);
  const t = theta >= 0 ? 1 / (theta + root) : 1 / (theta - root);
  const c = 1 / Math.sqrt(t * t + 1);
  const s = t * c;
  for (const row of [...a, ...vectors]) {
    const [x, y] = [row[p]!, row[q]!];
    row[p] = c * x - s * y;
    row[q] = s * x + c * y;
  }
  const [first, second] = [a[p]!, a[q]!];
  for (let k = 0; k < a.length; k++) {
    const [x, y] = [first[k]!, second[k]!];
    first[k] = c * x - s * y;
    second[k] = s * x + c * y;
  }
}
