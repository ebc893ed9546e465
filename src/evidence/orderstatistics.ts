/**
 * Distribution-free intervals for a percentile: two order statistics, whatever the shape.
 * The number of rows at or below the percentile is binomial, so X(r) … X(s) holds it with the
 * chance P(r ≤ B ≤ s − 1); for columns with ties with more.
 *
 * Source: Hahn & Meeker (1991), "Statistical Intervals", §5.2: ranks on both sides of
 * (n + 1) share, rounded to halves, as near as they can be (from memory; test/evidence checks
 * the published ranks and coverages).
 * Not handled: dependent rows.
 */
import { Binomial } from './binomial';

interface Ranks {
  /** The rank of the lower end, 1 the smallest; 0 where even the smallest row is no end. */
  readonly lower: number;
  /** The rank of the upper end; n + 1 where even the largest row is no end. */
  readonly upper: number;
  /** The chance that the interval holds the percentile, for a column without ties. */
  readonly coverage: number;
}

/**
 * The ranks of the interval for the percentile at `share` from `n` rows.
 * Domain: n ≥ 1, whole; 0 < share < 1; 0 < confidence < 1.
 * Guarantee: the coverage is at least `confidence`; a side is left open only if the smallest and
 * the largest row together do not reach it, the side that is nearer to the percentile first.
 */
export function ranksAround(n: number, share: number, confidence: number): Ranks {
  const rows = new Binomial(n, share);
  if (rows.between(1, n - 1) >= confidence) return closed(rows, confidence);
  return share < 0.5 ? openBelow(rows, confidence) : openAbove(rows, confidence);
}

/** Goes out in equal steps from the rank (n + 1) share, or from the two ranks around it. */
function closed(rows: Binomial, confidence: number): Ranks {
  const { n, p } = rows;
  const centre =
    p <= 0.5 ? Math.round(2 * (n + 1) * p) / 2 : n + 1 - Math.round(2 * (n + 1) * (1 - p)) / 2;
  let lower = Math.min(n, Math.max(1, Math.floor(centre)));
  let upper = Math.min(n, Math.max(1, Math.ceil(centre)));
  let coverage = rows.between(lower, upper - 1);
  while (coverage < confidence && (lower > 1 || upper < n)) {
    if (lower > 1) coverage += rows.at(--lower);
    if (upper < n) coverage += rows.at(upper++);
  }
  return { lower, upper, coverage };
}

/** The largest lower rank that does alone. */
function openAbove(rows: Binomial, confidence: number): Ranks {
  let lower = rows.n + 1;
  let coverage = 0;
  while (coverage < confidence && lower > 0) coverage += rows.at(--lower);
  return { lower, upper: rows.n + 1, coverage };
}

/** The smallest upper rank that does alone. */
function openBelow(rows: Binomial, confidence: number): Ranks {
  let upper = 0;
  let coverage = 0;
  while (coverage < confidence && upper <= rows.n) coverage += rows.at(upper++);
  return { lower: 0, upper, coverage };
}

/** The fewest rows whose smallest and largest hold the percentile with that confidence. */
export function fewestRows(share: number, confidence: number): number {
  const reaches = (n: number): boolean => new Binomial(n, share).between(1, n - 1) >= confidence;
  let hi = 2;
  while (!reaches(hi)) hi *= 2;
  let lo = hi / 2;
  while (hi - lo > 1) {
    const mid = (lo + hi) >> 1;
    if (reaches(mid)) hi = mid;
    else lo = mid;
  }
  return hi;
}
