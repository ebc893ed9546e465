/**
 * Whether the order of a column's rows tells anything: von Neumann's ratio of their ranks, and
 * the chance of one as far from what a random order gives.
 *
 * Source: Bartels (1982), "The rank version of von Neumann's ratio test for randomness",
 * JASA 77 (from memory; its mean and variance are enumerated in the test): the ratio over 4
 * is near a beta distribution with the same variance, symmetric about 1/2.
 * Not handled: dependence that neighbouring rows do not show.
 */
import betainc from '@stdlib/math-base-special-betainc';
import { keyOf } from '../random/key';
import { RowStream } from '../random/stream';

/** Fewer rows have too few orders. */
export const FEWEST_FOR_SERIAL = 10;

interface Serial {
  /** 1 − ratio/2, which is near the correlation of a row's rank with the next one's. */
  readonly correlation: number;
  readonly pValue: number;
}

/**
 * The serial correlation of ranks in the order of rows.
 * Domain: at least FEWEST_FOR_SERIAL ranks; a column of equal values gives correlation 0 and p-value 1.
 */
export function serialOrder(ranks: Float64Array): Serial {
  const n = ranks.length;
  const middle = (n + 1) / 2;
  let squares = 0;
  let steps = 0;
  for (let i = 0; i < n; i++) {
    const off = ranks[i]! - middle;
    squares += off * off;
    if (i === 0) continue;
    const step = ranks[i]! - ranks[i - 1]!;
    steps += step * step;
  }
  if (squares === 0) return { correlation: 0, pValue: 1 };
  const ratio = steps / squares;
  const shape = betaShape(n);
  const nearer = Math.min(ratio, 4 - ratio) / 4;
  const pValue = nearer <= 0 ? 0 : Math.min(1, 2 * betainc(nearer, shape, shape, true, false));
  return { correlation: 1 - ratio / 2, pValue };
}

/** Both parameters of the beta distribution of a quarter of the ratio. */
export function betaShape(n: number): number {
  return (4 / varianceOfRatio(n) - 1) / 2;
}

/** The variance of the ratio over all orders of n different ranks; its mean is 2. */
export function varianceOfRatio(n: number): number {
  return (4 * (n - 2) * (5 * n * n - 2 * n - 9)) / (5 * n * (n + 1) * (n - 1) * (n - 1));
}

/**
 * Each row's rank from 1, equal values in an order of random numbers that are always the same:
 * what a column of counted values is judged by.
 */
export function ranksWithoutTies(sorted: Float64Array, order: Int32Array): Float64Array {
  const n = sorted.length;
  const ranks = new Float64Array(n);
  const random = new Float64Array(n);
  new RowStream(keyOf('ranks', 'equal values')).fillFirst(1, random, n);
  for (let i = 0; i < n;) {
    let end = i + 1;
    while (end < n && sorted[end] === sorted[i]) end++;
    const rows = order.slice(i, end).sort((a, b) => random[a]! - random[b]!);
    rows.forEach((row, k) => (ranks[row] = i + 1 + k));
    i = end;
  }
  return ranks;
}
