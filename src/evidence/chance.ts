/**
 * The share of rows that something is true of, and the interval of the chance behind it, with
 * weights or without.
 *
 * Source: the intervals of proportion.ts; with weights the effective number of rows of Korn &
 * Graubard (1998), Survey Methodology 24: as many rows of equal weight as have the error of the
 * weighted share, at most the rows there are (from memory).
 * Not handled: dependent rows.
 */
import type { Interval } from './proportion';
import { chanceInterval } from './proportion';
import type { Shares } from './weights';
import { rowsWorth, squaredPull } from './weights';

interface Chance {
  readonly chance: number;
  readonly interval: Interval;
}

/** Domain: nRows ≥ 1; shares as sharesOf gives them, one a row. */
export function chanceOf(
  isTrue: (i: number) => boolean,
  nRows: number,
  shares: Shares | null,
  confidence: number,
): Chance {
  let count = 0;
  if (shares === null) {
    for (let i = 0; i < nRows; i++) if (isTrue(i)) count++;
    return { chance: count / nRows, interval: chanceInterval(count, nRows, confidence) };
  }
  let [nCounting, chance, squaresTrue, squaresFalse] = [0, 0, 0, 0];
  for (let i = 0; i < nRows; i++) {
    const share = shares[i]!;
    if (share > 0) nCounting++;
    const squared = squaredPull(share);
    if (!isTrue(i)) squaresFalse += squared;
    else if (share > 0) {
      count++;
      chance += share;
      squaresTrue += squared;
    }
  }
  // No and all rows have no error to go by, and the sum of all shares may miss 1 by rounding.
  if (count === 0 || count === nCounting) {
    const all = rowsWorth(shares, nRows);
    const none = count === 0;
    return { chance: none ? 0 : 1, interval: chanceInterval(none ? 0 : all, all, confidence) };
  }
  const miss = 1 - chance;
  const variance = squaresTrue * miss * miss + squaresFalse * chance * chance;
  const worth = Math.min(nCounting, (chance * miss) / variance);
  return { chance, interval: chanceInterval(chance * worth, worth, confidence) };
}
