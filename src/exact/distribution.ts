/**
 * What a column is compared with: the exact shares, quantiles and moments of a shape,
 * continuous or counted.
 */

import type { Lattice } from '../density/lattice';

/** The shares on both sides of each of some values. */
export interface SharesOfValues {
  /** The share below the value. */
  readonly below: Float64Array;
  /** The share above it, with its own digits however small; the rest is the share of the value itself. */
  readonly above: Float64Array;
}

/** Moments of the distance from the mean; null where one is not proved to be finite. */
export interface ExactMoments {
  readonly mean: number | null;
  readonly deviation: number | null;
  /** The mean of ((x − mean)/deviation)^k; null too where it may be infinite. Domain: k ≥ 3. */
  readonly standardised: (k: number) => number | null;
}

export interface Distribution {
  readonly from: number;
  readonly to: number;
  /** The values of a counted shape; null for a continuous one. */
  readonly lattice: Lattice | null;
  /** Domain: rising values. */
  sharesOfRising(values: Float64Array): SharesOfValues;
  /** The least x with the share at or below it. Domain: 0 < share < 1. */
  quantile(share: number): number;
  readonly moments: ExactMoments;
}
