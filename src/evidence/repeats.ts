/**
 * Rows that repeat an earlier one, which a continuous shape hardly ever gives.
 *
 * Draws are doubles, so a few repeats are due to rounding alone: about n²/2 times 2^-52 for the
 * random numbers and the chance that two rows fall on one double. Lumps are left out. Source: derived here; their number is near a Poisson count.
 * Not handled: counted shapes.
 */
import gammainc from '@stdlib/math-base-special-gammainc';
import type { Distribution } from '../exact/distribution';
import { powerOfTwo } from '../numeric/float';
import type { Meeting } from './lumps';
import { LEAST_LUMP } from './lumps';

interface Repeats {
  /** Rows that equal an earlier one and are not explained by rounding. */
  readonly count: (meetings: readonly Meeting[]) => number;
  /** The chance of so many or more. */
  readonly pValue: (count: number) => number;
  /** The most repeats whose p-value is not below a level. */
  readonly allowed: (level: number) => number;
}

/** Domain: a continuous shape. */
export function repeatsIn(distribution: Distribution, n: number): Repeats {
  const expected = (n / 2) * n * (powerOfTwo(-52) + chanceToMeet(distribution));
  const pValue = (k: number): number => (k === 0 ? 1 : gammainc(expected, k, true, false));
  return {
    count: (meetings) =>
      meetings.reduce((sum, { first, end, isLump }) => sum + (isLump ? 0 : end - first - 1), 0),
    pValue,
    allowed: (level) => {
      let k = 0;
      while (pValue(k + 1) >= level) k++;
      return k;
    },
  };
}

/** Places at which the density is looked at. */
const PLACES = 64;

/**
 * About the chance that two rows fall on one double that is no lump: over stretches of equal
 * share, the share that a double has there.
 */
function chanceToMeet(distribution: Distribution): number {
  let sum = 0;
  let from = distribution.quantile(0.5 / PLACES);
  for (let i = 1; i < PLACES; i++) {
    const to = distribution.quantile((i + 0.5) / PLACES);
    const spacing = (Math.max(Math.abs(from), Math.abs(to)) * powerOfTwo(-52)) / (to - from);
    sum += Math.min(LEAST_LUMP, spacing / PLACES) / PLACES;
    from = to;
  }
  return sum;
}
