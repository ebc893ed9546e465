/**
 * Weights of rows as shares of the whole, and how many rows of equal weight they are worth.
 *
 * Source: Kish (1965), "Survey Sampling", §8.2 and §11.7: n / (1 + squared variation of the
 * weights) (from memory). Not handled: weights that say how often a row occurred; a weight is
 * how much of the whole a row stands for.
 */

/** Each row's part of the whole: weight over sum of weights. */
export type Shares = Float64Array;

/**
 * Shares from weights; null when all weights are alike, since rows then count as they are.
 * Domain: weights ≥ 0, some > 0, all finite.
 */
export function sharesOf(weights: ArrayLike<number>): Shares | null {
  let most = 0;
  let least = Infinity;
  for (let i = 0; i < weights.length; i++) {
    most = Math.max(most, weights[i]!);
    least = Math.min(least, weights[i]!);
  }
  if (most === least) return null;
  // Scaled first, so that no sum overflows.
  const shares = new Float64Array(weights.length);
  let whole = 0;
  for (let i = 0; i < weights.length; i++) {
    shares[i] = weights[i]! / most;
    whole += shares[i]!;
  }
  for (let i = 0; i < weights.length; i++) shares[i]! /= whole;
  return shares;
}

/**
 * How far a weighted share or mean moves when a row is left out, as part of the row's distance
 * from it. Squares of this make the jackknife's error, which keeps up where a few weights are
 * large; linearised errors fall behind.
 * Source: Efron & Tibshirani (1993), "An Introduction to the Bootstrap", §11 (from memory).
 */
export function pull(share: number): number {
  return share / (1 - share);
}

export function squaredPull(share: number): number {
  const moved = pull(share);
  return moved * moved;
}

/** How many rows of equal weight would tell as much: (sum of weights)² over sum of squares. */
export function rowsWorth(shares: Shares | null, nRows: number): number {
  if (shares === null) return nRows;
  let squares = 0;
  for (let i = 0; i < shares.length; i++) squares += shares[i]! * shares[i]!;
  return 1 / squares;
}
