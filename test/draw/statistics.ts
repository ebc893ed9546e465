/**
 * What the tests of draws judge by. Upper points of χ² come from an incomplete gamma
 * function that is none of the engine's business.
 */
import gammainc from '@stdlib/math-base-special-gammainc';

/** False-alarm rate of every random check: one in a million. */
export const FALSE_ALARM = 1e-6;
/** Both tails of the normal distribution beyond this hold FALSE_ALARM (A&S 26.2, recomputed: 4.8916384757). */
export const Z_FALSE_ALARM = 4.8916384757;

/** The chance that χ² with `degrees` exceeds `x`: Q(degrees/2, x/2), DLMF 8.2.4. */
export function chiSquareTail(x: number, degrees: number): number {
  return gammainc(x / 2, degrees / 2, true, true);
}

/** Pearson's χ² of counts against shares, as a tail probability; every expected count must be 5 or more. */
export function goodnessOfFit(counts: ArrayLike<number>, shares: readonly number[]): number {
  const n = Array.from(counts).reduce((sum, count) => sum + count, 0);
  const x = shares.reduce((sum, share, i) => {
    if (!(n * share >= 5)) throw new Error(`bin ${i} expects ${n * share} draws`);
    return sum + (counts[i]! - n * share) ** 2 / (n * share);
  }, 0);
  return chiSquareTail(x, shares.length - 1);
}

/** Pearson's correlation. */
export function correlation(a: ArrayLike<number>, b: ArrayLike<number>): number {
  const n = a.length;
  const mean = (of: ArrayLike<number>): number => {
    let sum = 0;
    for (let i = 0; i < n; i++) sum += of[i]!;
    return sum / n;
  };
  const [meanA, meanB] = [mean(a), mean(b)];
  let [ab, aa, bb] = [0, 0, 0];
  for (let i = 0; i < n; i++) {
    const [u, v] = [a[i]! - meanA, b[i]! - meanB];
    ab += u * v;
    aa += u * u;
    bb += v * v;
  }
  return ab / Math.sqrt(aa * bb);
}

/** Ranks from 0; draws of a continuous quantity do not tie. */
function ranks(values: ArrayLike<number>): Float64Array {
  const order = Array.from(values, (_, i) => i).sort((i, j) => values[i]! - values[j]!);
  const of = new Float64Array(values.length);
  order.forEach((i, rank) => (of[i] = rank));
  return of;
}

/** Spearman's rank correlation. */
export function rankCorrelation(a: ArrayLike<number>, b: ArrayLike<number>): number {
  return correlation(ranks(a), ranks(b));
}
