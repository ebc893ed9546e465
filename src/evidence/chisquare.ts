/**
 * The χ² test of counts in cells with known shares.
 *
 * Source: Pearson (1900), Philosophical Magazine 50; the number of equal cells: Mann & Wald
 * (1942), Annals of Mathematical Statistics 13, as 2 n^(2/5) (both from memory), and no cell
 * with less than 10 rows expected. Not handled: shares that were fitted to the rows.
 */
import gammainc from '@stdlib/math-base-special-gammainc';
import type { Distribution } from '../exact/distribution';
import { pow } from '../numeric/elementary';

/** Rows expected in a cell. */
const LEAST_EXPECTED = 10;

interface ChiSquare {
  readonly statistic: number;
  readonly cells: number;
  readonly pValue: number;
}

/** How many cells of equal share n rows are counted in; below 2 there are too few rows. */
export function cellsFor(n: number): number {
  return Math.min(Math.floor(n / LEAST_EXPECTED), Math.floor(2 * pow(n, 0.4)));
}

/** The chance of a χ² of at least x. Domain: degrees ≥ 1, x ≥ 0. */
export function chiSquarePValue(x: number, degrees: number): number {
  return gammainc(x / 2, degrees / 2, true, true);
}

/** The test of exact shares below the values, in cells of equal share. Domain: cells ≥ 2. */
export function equalCells(below: Float64Array, cells: number): ChiSquare {
  const counts = new Float64Array(cells);
  for (let i = 0; i < below.length; i++) {
    counts[Math.min(cells - 1, Math.floor(below[i]! * cells))]! += 1;
  }
  return chiSquareOf(counts, new Float64Array(cells).fill(below.length / cells));
}

/**
 * Cells of neighbouring points of a counted shape, each with about the share 1/cells and at
 * least half of it; `ends` are the last points of all but the last cell.
 */
export function pointCells(
  distribution: Distribution,
  cells: number,
): { readonly ends: readonly number[]; readonly shares: readonly number[] } {
  const ends: number[] = [];
  const shares: number[] = [];
  let reached = 0;
  for (let j = 1; j < cells; j++) {
    const end = distribution.quantile(j / cells);
    const upTo = 1 - distribution.sharesOfRising(Float64Array.of(end)).above[0]!;
    if (upTo - reached < 0.5 / cells || 1 - upTo < 0.5 / cells) continue;
    ends.push(end);
    shares.push(upTo - reached);
    reached = upTo;
  }
  return { ends, shares: [...shares, 1 - reached] };
}

/** The test of counts against what is expected. Domain: two cells or more, all expected counts above 0. */
export function chiSquareOf(counts: ArrayLike<number>, expected: ArrayLike<number>): ChiSquare {
  const cells = counts.length;
  let statistic = 0;
  for (let i = 0; i < cells; i++) {
    const off = counts[i]! - expected[i]!;
    statistic += (off / expected[i]!) * off;
  }
  return { statistic, cells, pValue: chiSquarePValue(statistic, cells - 1) };
}
