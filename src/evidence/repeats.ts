/**
 * Rows that repeat an earlier one, which a continuous shape hardly ever gives.
 *
 * Draws are doubles, so a few repeats are due to rounding alone: about n²/2 times 2^-52 for the
 * random numbers and the chance that two rows fall on one double. Values with so large a share
 * that this shows are left out. Source: derived here; their number is near a Poisson count.
 * Not handled: counted shapes.
 */
import gammainc from '@stdlib/math-base-special-gammainc';
import type { Distribution } from '../exact/distribution';
import { next, powerOfTwo, prev } from '../numeric/float';

/** A double with more than this share is one on which rows meet by rounding. */
export const LUMP = 1e-12;

export interface Repeats {
  /** Rows among rising values that equal an earlier one and are not explained by rounding. */
  readonly count: (sorted: Float64Array) => number;
  /** The chance of so many or more. */
  readonly pValue: (count: number) => number;
  /** The most repeats whose p-value is not below a level. */
  readonly allowed: (level: number) => number;
}

/** Domain: a continuous shape. */
export function repeatsIn(distribution: Distribution, n: number): Repeats {
  const expected = (n / 2) * n * (powerOfTwo(-52) + meetings(distribution));
  const pValue = (k: number): number => (k === 0 ? 1 : gammainc(expected, k, true, false));
  return {
    count: (sorted) => countRepeats(sorted, distribution),
    pValue,
    allowed: (level) => {
      let k = 0;
      while (pValue(k + 1) >= level) k++;
      return k;
    },
  };
}

function countRepeats(sorted: Float64Array, distribution: Distribution): number {
  const n = sorted.length;
  const values: number[] = [];
  const extra: number[] = [];
  for (let i = 0; i < n;) {
    let end = i + 1;
    while (end < n && sorted[end] === sorted[i]) end++;
    if (end > i + 1) {
      values.push(sorted[i]!);
      extra.push(end - i - 1);
    }
    i = end;
  }
  if (values.length === 0) return 0;
  const neighbours = Float64Array.from(values.flatMap((value) => [prev(value), next(value)]));
  const { below } = distribution.sharesOfRising(neighbours);
  return extra.reduce(
    (sum, rows, i) => (below[2 * i + 1]! - below[2 * i]! > LUMP ? sum : sum + rows),
    0,
  );
}

/** Places at which the density is looked at. */
const PLACES = 64;

/**
 * About the chance that two rows fall on one double that is no lump: over stretches of equal
 * share, the share that a double has there.
 */
function meetings(distribution: Distribution): number {
  let sum = 0;
  let from = distribution.quantile(0.5 / PLACES);
  for (let i = 1; i < PLACES; i++) {
    const to = distribution.quantile((i + 0.5) / PLACES);
    const spacing = (Math.max(Math.abs(from), Math.abs(to)) * powerOfTwo(-52)) / (to - from);
    sum += Math.min(LUMP, spacing / PLACES) / PLACES;
    from = to;
  }
  return sum;
}
