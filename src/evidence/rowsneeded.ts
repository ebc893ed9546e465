/**
 * How many rows a wanted precision takes, judged by the rows of a first column.
 *
 * Sources: for the mean, half-width t s / √n (Cochran 1977, "Sampling Techniques", §4.4); for a
 * percentile, the share of rows within the half-width on either side against the standard error
 * √(share (1 − share) / n) of a share (David & Nagaraja 2003, "Order Statistics", §7.1; both from
 * memory). Not handled: dependent rows, weights.
 */
import normalQuantile from '@stdlib/stats-base-dists-normal-quantile';
import { fewestRows } from './orderstatistics';
import { percentile } from './percentile';
import { clopperPearson } from './proportion';
import type { Sample } from './sample';
import { firstPlaceOf } from './sample';
import type { Ends, Student } from './student';

/** Beyond this many rows Student's t is the normal quantile to six digits. */
const MANY = 1e6;

/** Rows for the mean, from a standard deviation. Domain: deviation > 0, halfwidth > 0. */
export function rowsForMean(deviation: number, halfwidth: number, student: Student): number {
  const ratio = deviation / halfwidth;
  const z = normalQuantile((1 + student.confidence) / 2, 0, 1);
  let rows = Math.max(2, Math.ceil(z * ratio * (z * ratio)));
  while (rows < MANY && student.quantile(rows - 1) * ratio > Math.sqrt(rows)) rows++;
  return rows;
}

interface RowsForPercentile {
  /** Null when the column has no row on one side of the percentile. */
  readonly rows: number | null;
  /** The ends that the column's own noise leaves open. */
  readonly interval: Ends;
  /** Over which distance from the percentile rows were counted: the half-width, or farther where it held fewer than ENOUGH. */
  readonly window: number;
  /** How many they were. */
  readonly within: number;
}

/** So many rows on a side tell how dense they lie there. */
export const ENOUGH = 30;

/**
 * Rows for a percentile, by the side on which rows lie less dense.
 * Domain: 0 < share < 1, halfwidth > 0.
 */
export function rowsForPercentile(
  { values, ...rest }: Sample,
  share: number,
  halfwidth: number,
  confidence: number,
): RowsForPercentile {
  const n = values.length;
  const centre = percentile({ values, ...rest }, share);
  const place = firstPlaceOf(centre, values);
  const enoughBelow = centre - values[Math.max(0, place - ENOUGH)]!;
  const enoughAbove = values[Math.min(n, place + ENOUGH) - 1]! - centre;
  const [below, above] = [Math.max(halfwidth, enoughBelow), Math.max(halfwidth, enoughAbove)];
  // By rank where rounding might leave out the row that the window reaches.
  const sides = [
    {
      window: below,
      within: Math.max(Math.min(ENOUGH, place), place - firstPlaceOf(centre - below, values)),
    },
    {
      window: above,
      within: Math.max(Math.min(ENOUGH, n - place), placeAfter(centre + above, values) - place),
    },
  ];
  const density = (side: { window: number; within: number }): number => side.within / side.window;
  const { window, within } = density(sides[0]!) < density(sides[1]!) ? sides[0]! : sides[1]!;

  const z = normalQuantile((1 + confidence) / 2, 0, 1);
  const fewest = fewestRows(share, confidence);
  const rowsAt = (part: number): number | null => {
    const off = part * (halfwidth / window);
    return off > 0
      ? Math.max(fewest, Math.ceil((z * z * share * (1 - share)) / (off * off)))
      : null;
  };
  const { lo, hi } = clopperPearson(within, n, confidence);
  const interval = { lo: rowsAt(hi), hi: rowsAt(lo) };
  return { rows: rowsAt(within / n), interval, window, within };
}

/** The first place of the sorted values that is above x. */
function placeAfter(x: number, sorted: Float64Array): number {
  let place = firstPlaceOf(x, sorted);
  while (place < sorted.length && sorted[place] === x) place++;
  return place;
}
