/**
 * Chances and quantiles of a statistic that is nearly normal, by its skewness: a shifted gamma
 * distribution with the same three moments, exact for the variance of normal rows.
 *
 * Source: Pearson's type III curve, Johnson, Kotz & Balakrishnan (1994), "Continuous Univariate
 * Distributions" 1, §17.2 (from memory). Not handled: statistics further from normal.
 */
import gammainc from '@stdlib/math-base-special-gammainc';
import { erfc } from '../numeric/special';

const ROOT_HALF = 0.7071067811865476;
/** Below this the distribution is normal to four digits, eight standard deviations out. */
const STRAIGHT = 1e-5;

/** P(T ≤ t) for mean 0, variance 1 and this skewness. */
export function skewedBelow(t: number, skewness: number): number {
  if (skewness < 0) return skewedAbove(-t, -skewness);
  if (skewness < STRAIGHT) return erfc.at(-t * ROOT_HALF) / 2;
  const shape = 4 / (skewness * skewness);
  const place = shape + t * Math.sqrt(shape);
  return place <= 0 ? 0 : gammainc(place, shape, true, false);
}

/** P(T > t). */
export function skewedAbove(t: number, skewness: number): number {
  if (skewness < 0) return skewedBelow(-t, -skewness);
  if (skewness < STRAIGHT) return erfc.at(t * ROOT_HALF) / 2;
  const shape = 4 / (skewness * skewness);
  const place = shape + t * Math.sqrt(shape);
  return place <= 0 ? 1 : gammainc(place, shape, true, true);
}

/** The chance of a t as far out on either side, doubled. */
export function skewedPValue(t: number, skewness: number): number {
  return Math.min(1, 2 * Math.min(skewedBelow(t, skewness), skewedAbove(t, skewness)));
}
