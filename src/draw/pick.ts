/**
 * Whole rows picked with given weights: one number settles a row, by inversion of the
 * running shares with a guide table, so that a slight change of the weights moves few rows.
 *
 * Source: guide tables, Chen and Asau (1974). Running sums: Neumaier (1974), compensated.
 * Shares stand on the grid of the numbers, 2^-53. A running share is off by the rounding of the
 * sum, of the total, of their quotient and of the grid, 2^-54 or less each, so a row's own share is
 * off by at most 2^-51: weights below about 10^-15 of the total are not told from 0 or from
 * each other. Rows of weight 0 are left out and never picked. Not handled: picks without putting back.
 */
import { bug } from '../errors';
import { powerOfTwo } from '../numeric/float';
import type { Key } from '../random/key';
import { PURPOSE, RowStream } from '../random/stream';

const CHUNK = 4096;
const GRID = 9007199254740992;
/** A sum of this many times a sheet's rows is still a double. */
const MAX_UNSCALED = 1e290;

/** Picks from one list of weights. */
export class Picker {
  /** The rows of weight above 0, in order. */
  private readonly rows: Int32Array;
  /** Where each one's numbers start, and a closing 1: multiples of 2^-53. */
  private readonly starts: Float64Array;
  /** Cell ⌊u · cells⌋ names the row to begin the search at. */
  private readonly cells: Int32Array;

  /** Weights of 0 or more, one of them above 0. */
  constructor(private readonly weights: readonly number[]) {
    this.rows = positive(weights);
    if (this.rows.length === 0) throw bug('no weight is above 0');
    this.starts = startsOf(this.rows, weights);
    this.cells = cellsOf(this.starts);
  }

  /** The chance of every row, rebuilt from the table. Guarantee: exact. */
  shares(): Float64Array {
    const shares = new Float64Array(this.weights.length);
    this.rows.forEach((row, i) => (shares[row] = this.starts[i + 1]! - this.starts[i]!));
    return shares;
  }

  /** The pick for a number in [0, 1). */
  pick(u: number): number {
    const { rows, starts, cells } = this;
    let i = cells[(u * cells.length) | 0]!;
    while (u >= starts[i + 1]!) i++;
    return rows[i]!;
  }

  /** The picks, from 0, of rows `first` … `first + n − 1` under a key. */
  picks(key: Key, first: number, n: number, method = 0): Int32Array {
    const stream = new RowStream(key, method, PURPOSE.pick);
    const { rows, starts, cells } = this;
    const numbers = new Float64Array(CHUNK);
    const picks = new Int32Array(n);
    for (let done = 0; done < n; done += CHUNK) {
      const size = Math.min(CHUNK, n - done);
      stream.fillFirst(first + done, numbers, size);
      for (let k = 0; k < size; k++) {
        const u = numbers[k]!;
        let i = cells[(u * cells.length) | 0]!;
        while (u >= starts[i + 1]!) i++;
        picks[done + k] = rows[i]!;
      }
    }
    return picks;
  }
}

function positive(weights: readonly number[]): Int32Array {
  const rows = new Int32Array(weights.length);
  let n = 0;
  weights.forEach((weight, i) => {
    if (weight > 0) rows[n++] = i;
  });
  return rows.slice(0, n);
}

/** Where the running shares of rows with positive weights start, on the grid. */
function startsOf(rows: Int32Array, weights: readonly number[]): Float64Array {
  const n = rows.length;
  const largest = weights.reduce((a, b) => Math.max(a, b));
  const scale = largest > MAX_UNSCALED ? powerOfTwo(-30) : 1;
  const starts = new Float64Array(n + 1);
  let [sum, lost] = [0, 0];
  for (let i = 0; i < n; i++) {
    const term = weights[rows[i]!]! * scale;
    const next = sum + term;
    lost += sum >= term ? sum - next + term : term - next + sum;
    sum = next;
    // What was lost is itself rounded; the running sum must not fall for it.
    starts[i + 1] = Math.max(starts[i]!, sum + lost);
  }
  const total = starts[n]!;
  for (let i = 1; i <= n; i++) starts[i] = Math.round((starts[i]! / total) * GRID) / GRID;
  return starts;
}

function cellsOf(starts: Float64Array): Int32Array {
  const n = starts.length - 1;
  let size = 4;
  while (size < 2 * n) size *= 2;
  const cells = new Int32Array(size);
  for (let cell = 0, i = 0; cell < size; cell++) {
    while (i + 1 < n && starts[i + 1]! <= cell / size) i++;
    cells[cell] = i;
  }
  return cells;
}
