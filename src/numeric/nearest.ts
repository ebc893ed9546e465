/**
 * The nearest correlation matrix: what to take for a matrix of wishes that no columns can have.
 *
 * Source: Higham (2002), "Computing the nearest correlation matrix — a problem from finance", IMA
 * Journal of Numerical Analysis 22, algorithm 3.3 without weights: turns of projection onto the
 * matrices with no stretch below `least` (with Dykstra's correction) and onto a diagonal of 1.
 * Not handled: speed for hundreds of columns.
 */
import type { Matrix } from './matrix';
import { axesOf, matrixOf } from './matrix';

const MAX_TURNS = 2000;

/**
 * The matrix with diagonal 1 and no stretch below `least` that is nearest in the sum of squares.
 * Domain: symmetric, 0 ≤ least < 1.
 * Guarantee: the last turn moved no entry by more than `tolerance`.
 */
export function nearestCorrelation(wished: Matrix, least: number, tolerance: number): Matrix {
  const n = wished.length;
  let correction = matrixOf(n, () => 0);
  let y = wished;
  for (let turn = 0; turn < MAX_TURNS; turn++) {
    const shifted = matrixOf(n, (i, j) => y[i]![j]! - correction[i]![j]!);
    const x = withoutStretchBelow(shifted, least);
    correction = matrixOf(n, (i, j) => x[i]![j]! - shifted[i]![j]!);
    const next = matrixOf(n, (i, j) => (i === j ? 1 : x[i]![j]!));
    const before = y;
    const moved = next.some((row, i) =>
      row.some((v, j) => Math.abs(v - before[i]![j]!) > tolerance),
    );
    y = next;
    if (!moved) break;
  }
  return y;
}

function withoutStretchBelow(matrix: Matrix, least: number): Matrix {
  const { values, vectors } = axesOf(matrix);
  const raised = values.map((value) => Math.max(value, least));
  const n = matrix.length;
  const half = matrixOf(n, (i, k) => vectors[i]![k]! * raised[k]!);
  const whole = matrixOf(n, (i, j) => {
    let sum = 0;
    for (let k = 0; k < n; k++) sum += half[i]![k]! * vectors[j]![k]!;
    return sum;
  });
  return matrixOf(n, (i, j) => (whole[i]![j]! + whole[j]![i]!) / 2);
}
