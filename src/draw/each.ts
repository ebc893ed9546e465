/**
 * A column in which rows follow different densities: row i has the numbers of row i
 * (random/stream.ts) whatever its density and whichever rows share it, so that columns drawn
 * from one another's values stay paired row by row, and equal densities give the column of
 * column.ts bit for bit. Not handled: several variables.
 */
import type { Key } from '../random/key';
import { RowStream } from '../random/stream';
import type { ColumnDrawer } from './rejection';

/** Rows, from 1, that follow one density. */
export interface RowsOfOne {
  readonly rows: readonly number[];
  /** Called once, when its rows are drawn, so that not all proofs are held at a time. */
  readonly drawer: () => ColumnDrawer;
}

/** Rows 1 … n, each in exactly one of the groups. @throws {Error} as ColumnDrawer. */
export function drawEach(
  groups: readonly RowsOfOne[],
  key: Key,
  n: number,
  method = 0,
): Float64Array {
  const stream = new RowStream(key, method);
  const first = new Float64Array(n);
  stream.fillFirst(1, first, n);
  const values = new Float64Array(n);
  for (const { rows, drawer } of groups) {
    const drawn = drawer().draws(
      {
        fillFirst: (from, out, count) => {
          for (let k = 0; k < count; k++) out[k] = first[rows[from + k]! - 1]!;
        },
        further: (i, attempt, out) => stream.further(rows[i]!, attempt, out),
      },
      rows.length,
    );
    rows.forEach((row, i) => (values[row - 1] = drawn.values[i]!));
  }
  return values;
}
