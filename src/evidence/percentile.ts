/**
 * Percentiles by the rule of PERCENTILE.INC, with distribution-free intervals, with weights or
 * without.
 *
 * Sources: Hyndman & Fan (1996), American Statistician 50, rule 7; with weights the same rule
 * between the middles of the rows' shares, the first at 0 and the last at 1 (derived here: for
 * equal weights it is rule 7). Intervals as in orderstatistics.ts; with weights by shares of an
 * effective number of rows, Woodruff (1952), JASA 47, and Korn & Graubard (1998), Survey
 * Methodology 24 (from memory). Not handled: dependent rows.
 */
import { sampleQuantile } from '../density/histogram';
import { ranksAround } from './orderstatistics';
import { pullsUpTo, type Sample } from './sample';
import type { Ends } from './student';
import { NO_ENDS } from './student';

/** The value at a share. Domain: 0 ≤ share ≤ 1. */
export function percentile({ values, shares, sums }: Sample, share: number): number {
  if (shares === null || sums === null) return sampleQuantile(values, share);
  const last = values.length - 1;
  const middle = (i: number): number => sums.shares[i]! - shares[i]! / 2;
  const wanted = middle(0) + share * (middle(last) - middle(0));
  const i = Math.max(
    1,
    firstOf(values.length, (at) => middle(at) >= wanted),
  );
  if (i > last) return values[last]!;
  const [from, to] = [values[i - 1]!, values[i]!];
  const part = (wanted - middle(i - 1)) / (middle(i) - middle(i - 1));
  return from + (to - from) * Math.min(1, Math.max(0, part));
}

/**
 * The interval of the percentile at a share.
 * Guarantee: without weights the coverage is at least `confidence`, whatever the shape; with
 * weights near it.
 */
export function percentileInterval(sample: Sample, share: number, confidence: number): Ends {
  const { values, sums } = sample;
  const n = values.length;
  if (sums === null) {
    const { lower, upper } = ranksAround(n, share, confidence);
    return {
      lo: lower < 1 ? null : values[lower - 1]!,
      hi: upper > n ? null : values[upper - 1]!,
    };
  }
  const worth = effectiveRows(sample, sums.shares, share);
  if (worth < 1) return NO_ENDS;
  const { lower, upper } = ranksAround(worth, share, confidence);
  // The last row with at most the lower share before it, the first with the upper share up to it.
  const lo = firstOf(n, (i) => sums.shares[i]! > (lower - 1) / worth);
  const hi = firstOf(n, (i) => sums.shares[i]! >= upper / worth);
  return {
    lo: lower < 1 ? null : values[Math.min(lo, n - 1)]!,
    hi: upper > worth ? null : values[Math.min(hi, n - 1)]!,
  };
}

/** How many rows of equal weight would tell the share below the percentile as well. */
function effectiveRows(sample: Sample, upTo: Float64Array, share: number): number {
  const n = sample.values.length;
  // Half a row on either side of the percentile does not matter.
  const below = pullsUpTo(
    sample,
    firstOf(n, (i) => upTo[i]! > share),
  );
  const above = pullsUpTo(sample, n) - below;
  const miss = 1 - share;
  const variance = below * miss * miss + above * share * share;
  return Math.floor(Math.min(n, (share * miss) / variance));
}

/** The first of 0 … n − 1 from which on something is true; n if it never is. */
function firstOf(n: number, isTrue: (i: number) => boolean): number {
  let lo = 0;
  let hi = n;
  while (lo < hi) {
    const mid = (lo + hi) >>> 1;
    if (isTrue(mid)) hi = mid;
    else lo = mid + 1;
  }
  return lo;
}
