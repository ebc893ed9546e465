/**
 * A column of rows in rising order with what each row counts for: the common ground of
 * percentiles, tails and moments. What is computed from it does not depend on the order of
 * the rows, not even in the last bit.
 *
 * Source: derived here. Not handled: dependent rows.
 */
import { rowsWorth, type Shares } from './weights';

/** Values with what each counts for. */
export interface Rows {
  readonly values: Float64Array;
  /** Each value's part of the whole, all above 0; null when all are alike. */
  readonly shares: Shares | null;
  /** How many rows of equal weight it is worth. */
  readonly rowsWorth: number;
}

/** Rows whose values rise. */
export type Sample = Rows & { readonly isRising: true };

/** A column whose rows all count alike, in the order it has. */
export function rowsOf(values: Float64Array): Rows {
  return { values, shares: null, rowsWorth: values.length };
}

/** Sorts a column; rows of share 0 drop out. Domain: finite numbers, at least one row left. */
export function sampleOf(column: Float64Array, shares: Shares | null): Sample {
  if (shares === null) {
    return { ...rowsOf(column.slice().sort()), isRising: true };
  }
  const isLeft = (_: number, i: number): boolean => shares[i]! > 0;
  const kept = column.filter(isLeft);
  const own = shares.filter((share) => share > 0);
  const values = kept.slice().sort();
  return {
    values,
    shares: inOrderOf(values, kept, own),
    rowsWorth: rowsWorth(own, values.length),
    isRising: true,
  };
}

/**
 * The shares beside the sorted values. Equal values get the average of their shares, so that
 * their order does not matter; places are found by bisection, since sorting pairs takes longer
 * than all the rest.
 */
function inOrderOf(sorted: Float64Array, column: Float64Array, shares: Shares): Shares {
  const n = sorted.length;
  const ordered = new Float64Array(n);
  const counts = new Uint32Array(n);
  for (let i = 0; i < n; i++) {
    const first = firstPlaceOf(column[i]!, sorted);
    ordered[first]! += shares[i]!;
    counts[first]!++;
  }
  for (let i = 0; i < n; i += counts[i]!) ordered.fill(ordered[i]! / counts[i]!, i, i + counts[i]!);
  return ordered;
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
