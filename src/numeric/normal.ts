/**
 * The standard normal distribution as draws need it: the share below a place and the place
 * of a share, with the digits of both tails and the same bits everywhere.
 *
 * Source: ERFC and its inverse from @stdlib (pinned). Errors: test/numeric/normal.test.ts, against
 * 40 digits. Not handled: shares below 2^-54, which no uniform number of a row has.
 */
import erfcinv from '@stdlib/math-base-special-erfcinv';
import { erfc } from './special';

const ROOT_2 = 1.4142135623730951;
const ROOT_HALF = 0.7071067811865476;
const HALF_STEP = 5.551115123125783e-17;
const LEAST = 2.2250738585072014e-308;
const MOST = 0.9999999999999999;

/**
 * The place with the share u + 2^-54 below it: the middle of the step of the grid that u stands for.
 * Domain: multiples of 2^-53 in [0, 1). Rises with u, and 1 − 2^-53 − u gives the same place with
 * the other sign.
 * Guarantee: relative error ≤ 1e-15.
 */
export function normalPlace(u: number): number {
  return u < 0.5
    ? -ROOT_2 * erfcinv(2 * (u + HALF_STEP))
    : ROOT_2 * erfcinv(2 * (1 - u - HALF_STEP));
}

/** The place with a share below it. Domain: 0 < share < 1. Guarantee: relative error ≤ 1e-15 for share ≤ 0.5. */
export function normalQuantile(share: number): number {
  return -ROOT_2 * erfcinv(2 * share);
}

/**
 * The share below a place, always within (0, 1).
 * Guarantee: relative error ≤ 2e-14 for −9 ≤ z ≤ 0, absolute error ≤ 3e-16 above.
 */
export function normalShare(z: number): number {
  const share = 0.5 * erfc.at(-z * ROOT_HALF);
  return share < LEAST ? LEAST : share > MOST ? MOST : share;
}
