/**
 * Rank correlations that are wished for, as correlations of normal scores, and back.
 *
 * Sources: ρ = (6/π)·arcsin(r/2) for two normal variables with correlation r, Pearson (1907); Kruskal
 * (1958), "Ordinal measures of association", JASA 53 (from memory). Nearest matrix: nearest.ts.
 * Not handled: dependence that normal scores do not have, such as between extremes only.
 */
import { sin } from '../numeric/elementary';
import type { Matrix } from '../numeric/matrix';
import { correlationFactor, matrixOf } from '../numeric/matrix';
import { nearestCorrelation } from '../numeric/nearest';
import { asin } from '../numeric/special';

const PI_BY_6 = 0.5235987755982988;
/** Digits after the point of the matrix that is offered instead of an impossible one. */
const OFFERED = 10_000;

/** The correlation of normal scores that gives a rank correlation: 2·sin(πρ/6). */
function scoreCorrelation(rank: number): number {
  // Whole ones exactly: sin(π/6) in doubles is a little below a half.
  return rank === 1 || rank === -1 ? rank : 2 * sin(PI_BY_6 * rank);
}

export function scoreCorrelations(ranks: Matrix): Matrix {
  return matrixOf(ranks.length, (i, j) => scoreCorrelation(ranks[i]![j]!));
}

/** The rank correlation of two normal variables. */
function rankOf(score: number): number {
  return asin.at(score / 2) / PI_BY_6;
}

/**
 * Rank correlations in steps of 1/10000 that are possible and, as correlations of scores, next to
 * nearest to impossible ones: the rounding is paid for by a stretch that stays a little above 0.
 */
export function nearestRankCorrelations(wished: Matrix): Matrix {
  const n = wished.length;
  const scores = scoreCorrelations(wished);
  for (let least = n / OFFERED; ; least *= 2) {
    const nearest = nearestCorrelation(scores, Math.min(least, 0.5), 0.01 / OFFERED);
    const offered = matrixOf(n, (i, j) =>
      i === j ? 1 : Math.round(rankOf(nearest[i]![j]!) * OFFERED) / OFFERED,
    );
    if (correlationFactor(scoreCorrelations(offered)) !== null) return offered;
  }
}
