/**
 * A column of n rows spread evenly: the numbers that propose are cut into n strata of equal share,
 * and each row has one stratum of its own.
 *
 * Row i has the number (s + v) / n with s = (π(i) + S) mod n: π a permutation of 0 … n − 1 that the
 * key shuffles (shuffle.ts), S a whole number that is uniform
 * on 0 … n − 1, v the row's own first number.
 * Each row alone is distributed exactly: S and v are independent of one another and of π, so
 * whatever π is, s is uniform on 0 … n − 1 and (s + v) / n uniform on [0, 1), as the first number of
 * a row of column.ts. A proposal that is not kept goes on with the row's further numbers, which are
 * independent of all this. Only the rows together differ from independent ones: every stratum has
 * exactly one. What rejection draws anew is not spread, a share of rows near 1 − acceptance.
 * Rounding of s + v and of the quotient moves a number by at most 2^-53, which is the grid itself.
 *
 * Source: stratified sampling, Cochran (1977), chapter 5. Not handled: a part of the column by
 * itself, since another n is another column.
 */
import type { Key } from '../random/key';
import { PURPOSE, RowStream } from '../random/stream';
import type { Column, ColumnDrawer } from './rejection';
import { shuffle } from './shuffle';

const GRID = 9007199254740992;
const BELOW_ONE = 1 - 1 / GRID;

/** Rows 1 … n. @throws {Error} as ColumnDrawer. */
export function drawStratified(drawer: ColumnDrawer, key: Key, n: number, method = 0): Column {
  const stream = new RowStream(key, method);
  const strata = strataOf(key, n, method);
  return drawer.draws(
    {
      fillFirst: (from, out, count) => {
        stream.fillFirst(1 + from, out, count);
        for (let k = 0; k < count; k++) {
          const u = (strata[from + k]! + out[k]!) / n;
          out[k] = u < BELOW_ONE ? u : BELOW_ONE;
        }
      },
      further: (i, attempt, out) => stream.further(1 + i, attempt, out),
    },
    n,
  );
}

/** The strata, from 0, of rows 1 … n. */
export function strataOf(key: Key, n: number, method = 0): Int32Array {
  const shift = shiftOf(key, n, method);
  const strata = Int32Array.from({ length: n }, (_, i) => (i + shift) % n);
  shuffle(strata, key, PURPOSE.shuffle, method);
  return strata;
}

/** Uniform on 0 … n − 1, exactly: numbers of the grid beyond the last whole multiple of n are passed over. */
function shiftOf(key: Key, n: number, method: number): number {
  const stream = new RowStream(key, method, PURPOSE.shift);
  const number = new Float64Array(1);
  for (let row = 1; ; row++) {
    stream.fillFirst(row, number, 1);
    const whole = number[0]! * GRID;
    if (whole < GRID - (GRID % n)) return whole % n;
  }
}
