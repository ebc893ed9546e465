/**
 * Columns reordered so that their rank correlations come near wished ones; the first stays.
 *
 * Source: Iman & Conover (1982), "A distribution-free approach to inducing rank correlation among
 * input variables", Communications in Statistics B11: normal scores Φ⁻¹(i/(n + 1)), one order of them
 * a column; the correlation T that these orders happen to have is taken out and the wished one C put
 * in, R* = R·(P·F⁻¹)ᵀ with T = F·Fᵀ and C = P·Pᵀ; each column's values then stand in the order of its
 * scores in R*. Two things are ours: the first column's scores stand in the order of its values, so
 * that it stays as it is; and where ties (or few rows) leave a rank correlation more than a hundredth
 * off, C is moved by what is missing, a few times at most.
 * Not handled: part of the rows by themselves, since the whole column decides.
 */
import type { Matrix } from '../numeric/matrix';
import { correlationFactor, matrixOf, solveLower } from '../numeric/matrix';
import { nearestCorrelation } from '../numeric/nearest';
import { normalQuantile } from '../numeric/normal';
import { asTheyStand, averageRanks, orderOf, rankCorrelations } from '../numeric/ranks';
import type { Key } from '../random/key';
import { PURPOSE } from '../random/stream';
import { scoreCorrelations } from './rankcorrelation';
import { shuffle } from './shuffle';

/** A miss that is not worth another turn. */
const NEAR = 0.01;
const MAX_TURNS = 8;
/** Corrected correlations of scores stay this far from impossible ones. */
const LEAST_STRETCH = 1e-6;

export interface Aligned {
  readonly columns: readonly Float64Array[];
  /** The rank correlations that these have. */
  readonly ranks: Matrix;
}

/**
 * Columns of equal length, none the same in all rows, with rank correlations near `wished`.
 * Null when the rows are too few to tell the columns' orders apart.
 */
export function alignRanks(
  columns: readonly Float64Array[],
  wished: Matrix,
  key: Key,
  method = 0,
): Aligned | null {
  const n = columns[0]!.length;
  const orders = columns.map((column, j) => startingOrder(column, j, key, method));
  const scores = scoreColumns(orders);
  const sorted = columns.map((column, j) => (j === 0 ? column : column.slice().sort()));
  const identity = asTheyStand(n);
  const ranks = sorted.map((column, j) => averageRanks(column, j === 0 ? orders[0]! : identity));
  let wanted = scoreCorrelations(wished);
  let best: { readonly aligned: Aligned; readonly miss: number } | null = null;
  for (let turn = 0; turn < MAX_TURNS; turn++) {
    const adjusted = adjustedScores(scores, wanted);
    if (adjusted === null) break;
    const places = adjusted.slice(1).map(orderOf);
    const placed = (of: readonly Float64Array[]): Float64Array[] =>
      of.map((values, j) => (j === 0 ? values : inOrder(values, places[j - 1]!)));
    const between = rankCorrelations(placed(ranks));
    const reached = matrixOf(columns.length, (i, j) => between[i]![j] ?? 0);
    const miss = largestMiss(reached, wished);
    if (best === null || miss < best.miss)
      best = { aligned: { columns: placed(sorted), ranks: reached }, miss };
    if (miss <= NEAR) break;
    wanted = moved(wanted, reached, wished);
  }
  return best && best.aligned;
}

/** The rows of a column from the least score to the largest. */
function startingOrder(column: Float64Array, j: number, key: Key, method: number): Int32Array {
  const own = j === 0 ? orderOf(column) : null;
  if (own !== null && !own.some((i, k) => k > 0 && column[i] === column[own[k - 1]!])) return own;
  const shuffled = asTheyStand(column.length);
  shuffle(shuffled, key, PURPOSE.align + j, method);
  if (own === null) return shuffled;
  // Equal values of the first column stand in no order.
  const values = new Float64Array(column.length);
  for (let k = 0; k < values.length; k++) values[k] = column[shuffled[k]!]!;
  const order = orderOf(values);
  for (let k = 0; k < order.length; k++) order[k] = shuffled[order[k]!]!;
  return order;
}

/** The scores Φ⁻¹(i/(n + 1)) of each column, row by row. */
export function scoreColumns(orders: readonly Int32Array[]): readonly Float64Array[] {
  const n = orders[0]!.length;
  const scores = new Float64Array(n);
  for (let i = 0; 2 * i + 1 < n; i++) {
    const score = normalQuantile((i + 1) / (n + 1));
    scores[i] = score;
    scores[n - 1 - i] = -score;
  }
  return orders.map((order) => inOrder(scores, order));
}

/** The recipe's R*; null where the columns' scores cannot be told apart. */
export function adjustedScores(
  scores: readonly Float64Array[],
  wanted: Matrix,
): readonly Float64Array[] | null {
  const n = scores.length;
  const squares = product(scores[0]!, scores[0]!);
  const had = correlationFactor(
    matrixOf(n, (i, j) => (i === j ? 1 : product(scores[i]!, scores[j]!) / squares)),
  );
  const want = correlationFactor(wanted);
  if (had === null || want === null || had.some((row, j) => row[j] === 0)) return null;
  const inverse = matrixOf(n, () => 0);
  for (let j = 0; j < n; j++) {
    const unit = Float64Array.from({ length: n }, (_, i) => (i === j ? 1 : 0));
    solveLower(had, unit).forEach((entry, i) => (inverse[i]![j] = entry));
  }
  return scores.map((own, j) => {
    const sums = new Float64Array(own.length);
    for (let l = 0; l <= j; l++) {
      let weight = 0;
      for (let m = l; m <= j; m++) weight += want[j]![m]! * inverse[m]![l]!;
      const of = scores[l]!;
      for (let i = 0; i < sums.length; i++) sums[i]! += weight * of[i]!;
    }
    return sums;
  });
}

/** The k-th of the values in row order[k]. */
function inOrder(values: Float64Array, order: Int32Array): Float64Array {
  const placed = new Float64Array(values.length);
  for (let k = 0; k < order.length; k++) placed[order[k]!] = values[k]!;
  return placed;
}

function product(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i]! * b[i]!;
  return sum;
}

function largestMiss(reached: Matrix, wished: Matrix): number {
  return reached.reduce(
    (most, row, i) =>
      row.reduce((a, value, j) => Math.max(a, Math.abs(value - wished[i]![j]!)), most),
    0,
  );
}

/** Wanted correlations of scores after a turn that missed. */
function moved(wanted: Matrix, reached: Matrix, wished: Matrix): Matrix {
  const next = matrixOf(wanted.length, (i, j) => {
    if (i === j) return 1;
    const entry = wanted[i]![j]! + wished[i]![j]! - reached[i]![j]!;
    return Math.max(-1, Math.min(1, entry));
  });
  return correlationFactor(next) === null
    ? nearestCorrelation(next, LEAST_STRETCH, LEAST_STRETCH / 100)
    : next;
}
