/** Columns for the tests of evidence, and what their errors are judged by. */
import { rowsOf, sampleOf, type Rows, type Sample } from '../../src/evidence/sample';
import { rowsWorth, sharesOf } from '../../src/evidence/weights';
import { keyOf } from '../../src/random/key';
import { RowStream } from '../../src/random/stream';

/** Uniform numbers of a fixed seed. */
export function uniform(n: number, label: string): Float64Array {
  const values = new Float64Array(n);
  new RowStream(keyOf('plan-2027', label)).fillFirst(1, values, n);
  return values;
}

/** An exponential column with mean 1. */
export function skewed(n: number, label: string): Float64Array {
  return uniform(n, label).map((u) => -Math.log1p(-u));
}

export function weighted(values: Float64Array, weights: ArrayLike<number>): Sample {
  return sampleOf(values, sharesOf(weights));
}

/** Rows that are not sorted. */
export function rows(values: Float64Array, weights: ArrayLike<number> | null = null): Rows {
  if (weights === null) return rowsOf(values);
  const shares = sharesOf(weights);
  return { values, shares, rowsWorth: rowsWorth(shares, values.length) };
}

/** A copy of each value, as often as its whole weight says. */
export function repeated(values: Float64Array, weights: ArrayLike<number>): Float64Array {
  return Float64Array.from(
    Array.from(values).flatMap((v, i) => Array<number>(weights[i]!).fill(v)),
  );
}

/** The jackknife's standard error of a figure (Efron & Tibshirani 1993, §11, from memory). */
export function jackknife(
  values: Float64Array,
  weights: ArrayLike<number> | null,
  figure: (values: Float64Array, weights: Float64Array | null) => number,
): number {
  const without = (of: ArrayLike<number>, i: number): Float64Array =>
    Float64Array.from(of).filter((_, k) => k !== i);
  const n = values.length;
  const each = Array.from(values, (_, i) =>
    figure(without(values, i), weights === null ? null : without(weights, i)),
  );
  const mean = each.reduce((a, b) => a + b, 0) / n;
  return Math.sqrt(((n - 1) / n) * each.reduce((sum, value) => sum + (value - mean) ** 2, 0));
}
