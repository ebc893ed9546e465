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
import type { Sample } from './sample';
import type { Ends } from './student';
import { NO_ENDS } from './student';
import { pull } from './weights';

/** The value at a share. Domain: 0 ≤ share ≤ 1. */
export function percentile({ values, shares }: Sample, share: number): number {
  if (shares === null) return sampleQuantile(values, share);
  const n = values.length;
  if (n === 1) return values[0]!;
  const wanted = share * (1 - (shares[0]! + shares[n - 1]!) / 2);
  let reached = 0;
  for (let i = 1; i < n; i++) {
    const step = (shares[i - 1]! + shares[i]!) / 2;
    if (reached + step >= wanted) {
      const [from, to] = [values[i - 1]!, values[i]!];
      return from + (to - from) * Math.min(1, (wanted - reached) / step);
    }
    reached += step;
  }
  return values[n - 1]!;
}

/**
 * The interval of the percentile at a share.
 * Guarantee: without weights the coverage is at least `confidence`, whatever the shape; with
 * weights near it.
 */
export function percentileInterval(sample: Sample, share: number, confidence: number): Ends {
  const { values, shares } = sample;
  const n = effectiveRows(sample, share);
  if (n < 1) return NO_ENDS;
  const { lower, upper } = ranksAround(n, share, confidence);
  return {
    lo: lower < 1 ? null : shares === null ? values[lower - 1]! : lowerAt(sample, (lower - 1) / n),
    hi: upper > n ? null : shares === null ? values[upper - 1]! : upperAt(sample, upper / n),
  };
}

/** How many rows of equal weight would tell the share below the percentile as well. */
function effectiveRows({ values, shares }: Sample, share: number): number {
  if (shares === null) return values.length;
  let [below, squaredBelow, squaredAbove] = [0, 0, 0];
  for (let i = 0; i < values.length; i++) {
    const own = pull(shares[i]!) * pull(shares[i]!);
    // Half a row on either side of the percentile does not matter.
    if (below < share) squaredBelow += own;
    else squaredAbove += own;
    below += shares[i]!;
  }
  const miss = 1 - share;
  const variance = squaredBelow * miss * miss + squaredAbove * share * share;
  return Math.floor(Math.min(values.length, (share * miss) / variance));
}

/** The last value with at most that share before it. */
function lowerAt({ values, shares }: Sample, share: number): number {
  let before = 0;
  let i = 0;
  while (i + 1 < values.length && before + shares![i]! <= share) before += shares![i++]!;
  return values[i]!;
}

/** The first value with at least that share up to it. */
function upperAt({ values, shares }: Sample, share: number): number {
  let upTo = shares![0]!;
  let i = 0;
  while (i + 1 < values.length && upTo < share) upTo += shares![++i]!;
  return values[i]!;
}
