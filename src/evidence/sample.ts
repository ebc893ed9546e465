/**
 * A column of rows in rising order with what each row counts for: the common ground of
 * percentiles, tails and moments. What is computed from it does not depend on the order of
 * the rows, not even in the last bit.
 *
 * Source: derived here. Not handled: dependent rows.
 */
import { orderOf } from '../numeric/ranks';
import { rowsWorth, squaredPull, type Shares } from './weights';

/** Values with what each counts for. */
export interface Rows {
  readonly values: Float64Array;
  /** Each value's part of the whole, all above 0; null when all are alike. */
  readonly shares: Shares | null;
  /** How many rows of equal weight it is worth. */
  readonly rowsWorth: number;
}

/** Rows whose values rise. */
export interface Sample extends Rows {
  /** What is known beside each row with weights; null when all are alike. */
  readonly sums: Sums | null;
}

interface Sums {
  /** The share of all rows up to this one. */
  readonly shares: Float64Array;
  /** The squared pulls (weights.ts) of all rows up to this one. */
  readonly pulls: Float64Array;
}

/** A column whose rows all count alike, in the order it has. */
export function rowsOf(values: Float64Array): Rows {
  return { values, shares: null, rowsWorth: values.length };
}

/** Sorts a column; rows of share 0 drop out. Domain: finite numbers, at least one row left. */
export function sampleOf(column: Float64Array, shares: Shares | null): Sample {
  if (shares === null) return { ...rowsOf(column.slice().sort()), sums: null };
  const order = orderOf(column);
  let n = 0;
  for (const i of order) if (shares[i]! > 0) order[n++] = i;
  const [values, own] = [new Float64Array(n), new Float64Array(n)];
  for (let k = 0; k < n; k++) {
    values[k] = column[order[k]!]!;
    own[k] = shares[order[k]!]!;
  }
  shareOutTies(values, own);
  return {
    values,
    shares: own,
    rowsWorth: rowsWorth(own, n),
    sums: { shares: runningSum(own, (share) => share), pulls: runningSum(own, squaredPull) },
  };
}

/** The squared pulls of the first `count` rows. */
export function pullsUpTo({ values, sums }: Sample, count: number): number {
  const n = values.length;
  return sums === null ? count * squaredPull(1 / n) : count === 0 ? 0 : sums.pulls[count - 1]!;
}

function runningSum(shares: Shares, of: (share: number) => number): Float64Array {
  const sums = new Float64Array(shares.length);
  let sum = 0;
  for (let i = 0; i < shares.length; i++) sums[i] = sum += of(shares[i]!);
  return sums;
}

/** Gives equal values the average of their shares, so that their order does not matter. */
function shareOutTies(values: Float64Array, shares: Shares): void {
  const n = values.length;
  for (let first = 0, end = 0; first < n; first = end) {
    let sum = 0;
    for (; end < n && values[end] === values[first]; end++) sum += shares[end]!;
    for (let i = first; i < end; i++) shares[i] = sum / (end - first);
  }
}

/** The first place of the sorted values that is not below x. */
export function firstPlaceOf(x: number, sorted: Float64Array): number {
  let lo = 0;
  let hi = sorted.length;
  while (lo < hi) {
    const mid = (lo + hi) >>> 1;
    if (sorted[mid]! < x) lo = mid + 1;
    else hi = mid;
  }
  return lo;
}
