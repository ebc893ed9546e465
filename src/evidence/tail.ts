/**
 * The mean of the lowest or of the highest share of a column, with its interval.
 *
 * Source: the mean of a share of the order statistics, its error from the influence of a row,
 * min(x − q, 0) / share with q the percentile (Manistre & Hancock 2005, North American Actuarial
 * Journal 9, from memory; derived in test/evidence/tail.test.ts). Degrees of freedom of a sum of
 * squares: Satterthwaite (1946), Biometrics Bulletin 2 (from memory). Not handled: dependent rows;
 * tails so heavy that they have no variance.
 */
import { pullsUpTo, type Sample } from './sample';
import type { Ends, Student } from './student';
import { NO_ENDS } from './student';
import { pull } from './weights';

interface TailMean {
  readonly mean: number;
  readonly interval: Ends;
}

/** Rows' worth in the tail from which an interval is given. */
const FEWEST_IN_TAIL = 50;

/** The mean of the lowest `share`; a row that lies across its end counts in part. Domain: 0 < share < 1. */
export function lowestMean(sample: Sample, share: number, student: Student): TailMean {
  return tailMean(sample, share, student, false);
}

/** The mean of the highest `share`. */
export function highestMean(sample: Sample, share: number, student: Student): TailMean {
  return tailMean(sample, share, student, true);
}

function tailMean(sample: Sample, share: number, student: Student, fromTop: boolean): TailMean {
  const { values, shares } = sample;
  const n = values.length;
  const even = 1 / n;
  const at = (i: number): number => (fromTop ? n - 1 - i : i);

  // The row at which the share is reached; sums that fall short of it by rounding count as it.
  const wanted = share * (1 - 1e-12);
  let [reached, squares, last] = [0, 0, 0];
  for (; last < n; last++) {
    const own = shares === null ? even : shares[at(last)]!;
    reached = shares === null ? (last + 1) / n : reached + own;
    squares += own * own;
    if (reached >= wanted) break;
  }
  const end = values[at(Math.min(last, n - 1))]!;

  let off = 0;
  for (let i = 0; i < last; i++) {
    off += (values[at(i)]! - end) * (shares === null ? even : shares[at(i)]!);
  }
  const mean = end + off / share;
  const worth = (reached * reached) / squares;
  if (worth < FEWEST_IN_TAIL) return { mean, interval: NO_ENDS };

  // The influence of a row is its distance beyond `end`; of all rows before it, none.
  const scale = Math.abs(values[at(0)]! - end);
  if (scale === 0) return { mean, interval: { lo: mean, hi: mean } };
  const average = off / scale;
  let [squared, fourth] = [0, 0];
  for (let i = 0; i < last; i++) {
    const own = shares === null ? even : shares[at(i)]!;
    const moved = pull(own) * ((values[at(i)]! - end) / scale - average);
    squared += moved * moved;
    fourth += moved * moved * moved * moved;
  }
  const all = pullsUpTo(sample, n);
  const rest = fromTop ? pullsUpTo(sample, n - last) : all - pullsUpTo(sample, last);
  squared += rest * average * average;
  const error = (scale * Math.sqrt((squared * (n - 1)) / n)) / share;
  // As many degrees of freedom as the noise of the squares leaves.
  const degrees = Math.min(worth - 1, (2 * squared * squared) / fourth);
  return { mean, interval: student.interval(mean, error, degrees) };
}
