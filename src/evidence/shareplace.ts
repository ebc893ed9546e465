/**
 * Whether a column's percentile lies where the exact shares allow, and the range in which it may.
 *
 * The percentile of n rows (rule of PERCENTILE.INC) lies between the k-th and the next of the
 * sorted values, whose exact shares have beta distributions. Source: David & Nagaraja (2003),
 * "Order Statistics", §2.2 (from memory). The p-value is conservative: it takes the end that
 * is further off. Not handled: dependent rows.
 */
import betainc from '@stdlib/math-base-special-betainc';
import betaQuantile from '@stdlib/stats-base-dists-beta-quantile';

/** The place k, from 1, of the sorted value at or below the percentile. */
function placeOfShare(n: number, share: number): number {
  return Math.min(n, Math.floor((n - 1) * share) + 1);
}

/** The shares between which the percentile's own lies but with the chance `level`. */
export function allowedShares(
  n: number,
  share: number,
  level: number,
): { readonly lo: number; readonly hi: number } {
  const k = placeOfShare(n, share);
  const next = Math.min(n, k + 1);
  return {
    lo: betaQuantile(level / 2, k, n + 1 - k),
    hi: betaQuantile(1 - level / 2, next, n + 1 - next),
  };
}

/** The chance of a percentile as far off on either side, doubled; `atMost` and `below` are the exact shares of its value. */
export function sharePValue(n: number, share: number, below: number, atMost: number): number {
  const k = placeOfShare(n, share);
  const next = Math.min(n, k + 1);
  const low = betainc(atMost, k, n + 1 - k, true, false);
  const high = betainc(below, next, n + 1 - next, true, true);
  return Math.min(1, 2 * Math.min(low, high));
}
