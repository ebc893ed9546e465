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
  const nRows = order.length;
  const [values, own] = [new Float64Array(nRows), new Float64Array(nRows)];
  let n = 0;
  for (let k = 0; k < nRows; k++) {
    const i = order[k]!;
    const share = shares[i]!;
    if (share === 0) continue;
    values[n] = column[i]!;
    own[n++] = share;
  }
  const left = { values: values.subarray(0, n), shares: own.subarray(0, n) };
  shareOutTies(left.values, left.shares);
  return { ...left, rowsWorth: rowsWorth(left.shares, n), sums: sumsOf(left.shares) };
}

/** The squared pulls of the first `count` rows. */
export function pullsUpTo({ values, sums }: Sample, count: number): number {
  const n = values.length;
  return sums === null ? count * squaredPull(1 / n) : count === 0 ? 0 : sums.pulls[count - 1]!;
}

function sumsOf(shares: Shares): Sums {
  const n = shares.length;
  const [upTo, pulls] = [new Float64Array(n), new Float64Array(n)];
  let [share, pulled] = [0, 0];
  for (let i = 0; i < n; i++) {
    upTo[i] = share += shares[i]!;
    pulls[i] = pulled += squaredPull(shares[i]!);
  }
  return { shares: upTo, pulls };
}

/** Gives equal values the average of their shares, so that their order does not matter. */
function shareOutTies(values: Float64Array, shares: Shares): void {
  const n = values.length;
  for (let first = 0; first + 1 < n; first++) {
    if (values[first + 1] !== values[first]) continue;
    let end = first;
    let sum = 0;
    for (; end < n && values[end] === values[first]; end++) sum += shares[end]!;
    for (let i = first; i < end; i++) shares[i] = sum / (end - first);
    first = end - 1;
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
