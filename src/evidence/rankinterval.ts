/**
 * What a rank correlation of independent rows says about the one behind it.
 *
 * Source: Bonett & Wright (2000), "Sample size requirements for estimating Pearson, Kendall and
 * Spearman correlations", Psychometrika 65: artanh of the rank correlation is near normal with
 * variance (1 + ρ²/2)/(n − 3) (from memory; coverage in the test).
 * Not handled: dependent rows; correlations beyond 0.95 in few rows, where the coverage is less.
 */
import { tanh } from '../numeric/elementary';
import { normalQuantile } from '../numeric/normal';
import { atanh } from '../numeric/special';
import type { Ends } from './student';
import { NO_ENDS } from './student';

/**
 * The interval of a rank correlation of n rows.
 * Domain: −1 ≤ rank ≤ 1, 0 < confidence < 1. Guarantee: coverage near the confidence. Where the
 * ranks agree (or oppose) fully, the end inside is that of the next value that n rows can have.
 */
export function rankInterval(rank: number, n: number, confidence: number): Ends {
  if (n < 4) return NO_ENDS;
  if (rank < 0) {
    const { lo, hi } = rankInterval(-rank, n, confidence);
    return { lo: hi === null ? null : -hi, hi: lo === null ? null : -lo };
  }
  const next = 1 - 12 / (n * (n * n - 1));
  const inside = Math.min(rank, next);
  const spread = Math.sqrt((1 + (inside * inside) / 2) / (n - 3));
  const reach = -normalQuantile((1 - confidence) / 2) * spread;
  const middle = atanh.at(inside);
  return { lo: tanh(middle - reach), hi: rank > next ? 1 : tanh(middle + reach) };
}
