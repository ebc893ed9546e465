/**
 * Whether a column's mean and standard deviation lie where the shape's exact moments allow.
 *
 * Source: mean and variance of a sample's mean and variance, Cramér (1946), "Mathematical
 * Methods of Statistics", §27.4; chances by skewed.ts. A statistic counts only where its third
 * and fourth moments say that this is near enough; otherwise there are too few rows for it.
 * Not handled: dependent rows.
 */
import type { Lattice } from '../density/lattice';
import type { ExactMoments } from '../exact/distribution';
import { criticalValue } from './critical';
import { skewedAbove, skewedBelow, skewedPValue } from './skewed';

/** A nearly normal statistic of n rows. */
export interface Statistic {
  readonly centre: number;
  readonly error: number;
  readonly skewness: number;
  /** Half the distance of its values, for counted shapes; 0 for continuous ones. */
  readonly half: number;
}

/** The skewness up to which a shifted gamma distribution stands for the statistic. */
const MOST_SKEWED = 0.5;
/** What the kurtosis may change of the chance beyond 3.5 errors: a half, by Edgeworth's series. */
const FAR_OUT = 150;
const MOST_CHANGED = 0.5;
/** Part of a variance's variance that may come from the mean of the rows. */
const MOST_FROM_MEAN = 0.05;

/** The mean of n rows; a text says why it cannot be told. */
export function meanStatistic(
  n: number,
  moments: ExactMoments,
  lattice: Lattice | null,
): Statistic | string {
  const { mean, deviation, standardised } = moments;
  if (mean === null) return NOT_FINITE;
  if (deviation === null) return HEAVY;
  const [third, fourth] = [standardised(3), standardised(4)];
  if (third === null || fourth === null) return HEAVY;
  const skewness = third / Math.sqrt(n);
  if (!isNearNormal(skewness, (fourth - 3) / n)) return TOO_FEW;
  const half = (lattice?.step ?? 0) / (2 * n);
  return { centre: mean, error: deviation / Math.sqrt(n), skewness, half };
}

/** The variance of n rows (with n − 1) over the shape's own. */
export function varianceStatistic(n: number, moments: ExactMoments): Statistic | string {
  const { deviation, standardised } = moments;
  if (deviation === null) return NOT_FINITE;
  const [m4, m6, m8] = [standardised(4), standardised(6), standardised(8)];
  if (m4 === null || m6 === null || m8 === null) return HEAVY;
  const squares = m4 - 1;
  if (!(2 / (n - 1) <= MOST_FROM_MEAN * squares)) return TOO_FEW;
  const variance = (m4 - (n - 3) / (n - 1)) / n;
  const error = Math.sqrt(variance);
  // Cumulants of the square of a standardised row.
  const third = m6 - 3 * m4 + 2;
  const fourth = m8 - 4 * m6 + 6 * m4 - 3 - 3 * squares * squares;
  const skewness = third / (n * n * variance * error);
  if (!isNearNormal(skewness, fourth / (n * n * n * variance * variance))) return TOO_FEW;
  return { centre: 1, error, skewness, half: 0 };
}

export const NOT_FINITE = 'not finite, or not proved to be';
const HEAVY = 'tails too heavy to tell';
export const TOO_FEW = 'too few rows to tell';

function isNearNormal(skewness: number, kurtosis: number): boolean {
  const left = Math.abs(kurtosis - 1.5 * skewness * skewness);
  return Math.abs(skewness) <= MOST_SKEWED && (left * FAR_OUT) / 24 <= MOST_CHANGED;
}

export function statisticPValue(statistic: Statistic, value: number): number {
  const { centre, error, skewness, half } = statistic;
  const off = value - centre;
  const nearer = off < 0 ? Math.min(0, off + half) : Math.max(0, off - half);
  return skewedPValue(nearer / error, skewness);
}

/** The range of the statistic but for the chance `level`. */
export function allowedRange(
  { centre, error, skewness, half }: Statistic,
  level: number,
): { readonly lo: number; readonly hi: number } {
  const up = criticalValue((t) => skewedAbove(t, skewness), level / 2, 0, 4);
  const down = criticalValue((t) => skewedBelow(-t, skewness), level / 2, 0, 4);
  return { lo: centre - down * error - half, hi: centre + up * error + half };
}
