/**
 * Totals over many draws a row, such as the losses of a season: row i sums its own draws 0, 1, …
 * n − 1, which have their numbers under a key of the row (random/stream.ts). So raising the count
 * of one row only adds draws to that row.
 *
 * Draws are made in blocks across rows and summed as they come, so that their number does not
 * matter to the memory. Sums carry their rounding errors along (Neumaier 1974).
 */
import type { Key } from '../random/key';
import { keyOfRow, RowStream } from '../random/stream';
import type { ColumnDrawer } from './rejection';

/** Draws that are held at a time. */
const BLOCK = 65_536;

/** What becomes of each row: its total and its largest draw, both 0 for a row without draws. */
export interface Totals {
  readonly totals: Float64Array;
  readonly largest: Float64Array;
}

/** A row, from 0, and those of its draws that a block holds. */
interface Stretch {
  readonly row: number;
  readonly stream: RowStream;
  readonly firstDraw: number;
  readonly at: number;
  readonly n: number;
}

/**
 * Sums counts[i] draws for each row i, each first put through `measure` if there is one.
 * Counts are whole numbers ≥ 0. @throws {Error} as ColumnDrawer.
 */
export function drawTotals(
  drawer: ColumnDrawer,
  key: Key,
  counts: readonly number[],
  measure: ((x: number, row: number) => number) | null,
  method = 0,
): Totals {
  const totals = new Float64Array(counts.length);
  const carries = new Float64Array(counts.length);
  const largest = new Float64Array(counts.length);
  for (const block of blocksOf(counts, key, method)) {
    const { values } = drawer.draws(sourceOf(block), block.at(-1)!.at + block.at(-1)!.n);
    for (const { row, firstDraw, at, n } of block) {
      let sum = totals[row]!;
      let carry = carries[row]!;
      let most = firstDraw === 0 ? -Infinity : largest[row]!;
      for (let i = at; i < at + n; i++) {
        const value = measure ? measure(values[i]!, row) : values[i]!;
        const next = sum + value;
        carry += Math.abs(sum) >= Math.abs(value) ? sum - next + value : value - next + sum;
        sum = next;
        if (value > most) most = value;
      }
      totals[row] = sum;
      carries[row] = carry;
      largest[row] = most;
    }
  }
  return { totals: totals.map((sum, row) => sum + carries[row]!), largest };
}

/** The draws of all rows in order, cut into blocks. */
function* blocksOf(
  counts: readonly number[],
  key: Key,
  method: number,
): Generator<readonly Stretch[]> {
  let block: Stretch[] = [];
  let filled = 0;
  for (let row = 0; row < counts.length; row++) {
    const count = counts[row]!;
    if (count === 0) continue;
    const stream = new RowStream(keyOfRow(key, row + 1, method), method);
    for (let done = 0; done < count;) {
      const n = Math.min(count - done, BLOCK - filled);
      block.push({ row, stream, firstDraw: done, at: filled, n });
      filled += n;
      done += n;
      if (filled < BLOCK) continue;
      yield block;
      block = [];
      filled = 0;
    }
  }
  if (filled > 0) yield block;
}

/** The numbers of a block's draws, each under its row's own key. */
function sourceOf(block: readonly Stretch[]): {
  fillFirst: (from: number, out: Float64Array, count: number) => void;
  further: (i: number, attempt: number, out: Float64Array) => void;
} {
  let current = 0;
  const stretchAt = (i: number): Stretch => {
    if (block[current]!.at > i) current = 0;
    while (block[current]!.at + block[current]!.n <= i) current++;
    return block[current]!;
  };
  return {
    fillFirst(from, out, count) {
      for (let filled = 0; filled < count;) {
        const { stream, firstDraw, at, n } = stretchAt(from + filled);
        const skipped = from + filled - at;
        const size = Math.min(n - skipped, count - filled);
        stream.fillFirst(firstDraw + skipped, out, size, filled);
        filled += size;
      }
    },
    further(i, attempt, out) {
      const { stream, firstDraw, at } = stretchAt(i);
      stream.further(firstDraw + i - at, attempt, out);
    },
  };
}
