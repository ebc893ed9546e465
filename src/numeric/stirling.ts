/**
 * k^k EXP(−k) / Γ(k + 1): what is left of a factorial once its size is taken out, so
 * that probabilities with large parameters can be written around their peak.
 *
 * Source: DLMF 5.11.1; the series is alternating and its error below the first term
 * left out (5.11(ii)), 2e-16 from 16 on.
 */
import type { Bounded } from './bounded';
import { EPSILON } from './bounded';
import { exp, pow } from './elementary';
import { gamma } from './special';

const SERIES_FROM = 16;
const TWO_PI = 6.283185307179586;

export function stirlingRatio(k: number): number {
  if (k === 0) return 1;
  if (k < SERIES_FROM) return (pow(k, k) * exp(-k)) / gamma.at(k + 1);
  const q = 1 / (k * k);
  const series = (1 / 12 - q * (1 / 360 - q * (1 / 1260 - q * (1 / 1680 - q / 1188)))) / k;
  return exp(-series) / Math.sqrt(TWO_PI * k);
}

/** Falls from 1 at k = 0. */
export const boundedRatio: Bounded = {
  at: stirlingRatio,
  relative: 24 * EPSILON,
  absolute: 0,
  exact: (k) => (k === 0 ? 1 : undefined),
  least: 0,
  most: 1,
};
