/**
 * Histograms as tables of points: a step for every bin, the area of a step being the
 * bin's share. Bins of data by the rule of Freedman and Diaconis.
 */
import * as elementary from '../numeric/elementary';

/** A row of a table of points. */
export type Point = readonly [x: number, height: number];

/**
 * Steps over the bins between the edges; the whole area is 1.
 * Domain: edges rise, one share ≥ 0 for each bin, some share > 0.
 */
export function steps(edges: readonly number[], shares: readonly number[]): readonly Point[] {
  const total = shares.reduce((sum, share) => sum + share, 0);
  return shares.flatMap((share, i): Point[] => {
    const [from, to] = [edges[i]!, edges[i + 1]!];
    const height = share / total / (to - from);
    return [
      [from, height],
      [to, height],
    ];
  });
}

/** The quantile of sorted values with straight lines between the order statistics, as PERCENTILE.INC has it. */
export function sampleQuantile(sorted: ArrayLike<number>, share: number): number {
  const place = (sorted.length - 1) * share;
  const i = Math.floor(place);
  const [low, high] = [sorted[i]!, sorted[Math.min(i + 1, sorted.length - 1)]!];
  return low + (high - low) * (place - i);
}

/**
 * The number of equal bins over a stretch of this width for sorted values.
 * Source: Freedman and Diaconis (1981), "On the histogram as a density estimator",
 * Z. Wahrscheinlichkeitstheorie verw. Gebiete 57: bins of width 2·IQR·n^(-1/3). Where the
 * middle half of the values are all alike, Sturges (1926), JASA 21: 1 + log2 n bins.
 */
export function binCount(sorted: readonly number[], width: number): number {
  const n = sorted.length;
  const spread = sampleQuantile(sorted, 0.75) - sampleQuantile(sorted, 0.25);
  if (spread === 0) return sturges(n);
  return Math.max(1, Math.ceil(width / (2 * spread * elementary.pow(n, -1 / 3))));
}

/** 1 + log2 n, rounded up. */
function sturges(n: number): number {
  let bins = 1;
  for (let reach = 1; reach < n; reach *= 2) bins++;
  return bins;
}

/** How many values lie in each bin: from its lower edge up to, not including, its upper one; the last bin includes both. */
export function countInBins(edges: readonly number[], values: readonly number[]): number[] {
  const counts = edges.slice(1).map(() => 0);
  for (const value of values) {
    let lo = 0;
    let hi = counts.length - 1;
    while (lo < hi) {
      const mid = (lo + hi + 1) >> 1;
      if (edges[mid]! <= value) lo = mid;
      else hi = mid - 1;
    }
    counts[lo]!++;
  }
  return counts;
}
