/**
 * Totals over many draws a row, such as the losses of a season: row i sums its own draws 0, 1, …
 * n − 1, each of which has its own numbers (random/stream.ts). So raising the count of one row only
 * adds draws to that row.
 *
 * Draws are made in blocks across rows and summed as they come, so that their number does not
 * matter to the memory. Sums carry their rounding errors along (Knuth, The Art of Computer
 * Programming 2, 4.2.2, theorem B, which has no branch to guess).
 */
import type { Key } from '../random/key';
import { DrawStream } from '../random/stream';
import type { ColumnDrawer, NumberSource } from './rejection';

/** Draws that are held at a time. */
const BLOCK = 65_536;

/** What becomes of each row: its total and its largest draw, both 0 for a row without draws. */
interface Totals {
  readonly totals: Float64Array;
  readonly largest: Float64Array;
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
  const block = new Block(counts, key, method);
  while (block.fill()) {
    const { values } = drawer.draws(block, block.size);
    for (let stretch = 0; stretch < block.nStretches; stretch++) {
      const row = block.rows[stretch]!;
      const end = block.starts[stretch + 1]!;
      let sum = totals[row]!;
      let carry = carries[row]!;
      let most = block.firstDraws[stretch] === 0 ? -Infinity : largest[row]!;
      const start = block.starts[stretch]!;
      if (measure) for (let i = start; i < end; i++) values[i] = measure(values[i]!, row);
      for (let i = start; i < end; i++) {
        const value = values[i]!;
        const next = sum + value;
        const added = next - sum;
        carry += sum - (next - added) + (value - added);
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

/** The draws of all rows in order, so many at a time: stretches of draws of one row each. */
class Block implements NumberSource {
  size = 0;
  nStretches = 0;
  /** The row, from 0, of each stretch, its first draw, and where it starts; then where the last one ends. */
  readonly rows = new Int32Array(BLOCK);
  readonly firstDraws = new Int32Array(BLOCK);
  readonly starts = new Int32Array(BLOCK + 1);
  private readonly numbers = new Float64Array(BLOCK + 1);
  private readonly stream: DrawStream;
  /** The row and draw that come next. */
  private row = 0;
  private draw = 0;

  constructor(
    private readonly counts: readonly number[],
    key: Key,
    method: number,
  ) {
    this.stream = new DrawStream(key, method);
  }

  /** Takes the next draws; false when there are none left. */
  fill(): boolean {
    const { counts, rows, firstDraws, starts, numbers, stream } = this;
    let [size, nStretches] = [0, 0];
    for (; this.row < counts.length && size < BLOCK; this.row++, this.draw = 0) {
      const n = Math.min(counts[this.row]! - this.draw, BLOCK - size);
      if (n === 0) continue;
      rows[nStretches] = this.row;
      firstDraws[nStretches] = this.draw;
      starts[nStretches++] = size;
      stream.fillFirst(this.row + 1, this.draw, numbers, size, n);
      size += n;
      if (this.draw + n === counts[this.row]!) continue;
      this.draw += n;
      break;
    }
    starts[nStretches] = size;
    this.size = size;
    this.nStretches = nStretches;
    return size > 0;
  }

  fillFirst(from: number, out: Float64Array, count: number): void {
    out.set(this.numbers.subarray(from, from + count));
  }

  further(i: number, attempt: number, out: Float64Array): void {
    const stretch = this.stretchOf(i);
    const draw = this.firstDraws[stretch]! + i - this.starts[stretch]!;
    this.stream.further(this.rows[stretch]! + 1, draw, attempt, out);
  }

  /** The stretch that holds draw i of the block. */
  private stretchOf(i: number): number {
    let lo = 0;
    let hi = this.nStretches - 1;
    while (lo < hi) {
      const middle = (lo + hi + 1) >> 1;
      if (this.starts[middle]! <= i) lo = middle;
      else hi = middle - 1;
    }
    return lo;
  }
}
