/**
 * Exact draws of one variable: a column of values, row by row from its own numbers.
 *
 * Row i proposes until a proposal is accepted. Its first number settles most rows at
 * once (the segment lies under the lower line); otherwise attempt 0 draws a height
 * in the gap, and every further attempt k = 1, 2 … is a fresh proposal with its own
 * counter. So row i is the same whatever the number of rows. Rejection sampling:
 * von Neumann (1951); the lower bound as a squeeze: Marsaglia (1977).
 * Not handled: several variables.
 */
import type { Envelope } from '../envelope/envelope';
import { bug } from '../errors';
import * as I from '../numeric/interval';
import { RowStream } from '../random/stream';
import type { Key } from '../random/key';
import type { Guide } from './guide';
import { guideOf } from './guide';

/** Drawn values and what is needed to judge how they came about. */
export interface Column {
  readonly values: Float64Array;
  /** Proposals made for all rows together. */
  readonly proposals: number;
  /** Rows whose first number fell under the lower line. */
  readonly settledAtOnce: number;
  /** Most proposals that one row needed. */
  readonly longestWait: number;
  /** Heights so near the density that its enclosure could not tell, settled by comparing doubles. */
  readonly nearTies: number;
}

/** One proposal of a row. */
export interface Proposal {
  readonly row: number;
  readonly attempt: number;
  readonly x: number;
  /** The height drawn; under the lower line no height is drawn, and it is NaN. */
  readonly height: number;
  readonly isKept: boolean;
}

const CHUNK = 4096;
/** At an acceptance of 0.01 a row needs this many with a chance far below 10^-1000. */
const MAX_ATTEMPTS = 1_000_000;
/** Room for the rounding of a line's value when asking whether the density lies above it. */
const LINE_ROUNDING = 4e-15;

// Mirrors the layout of guide.ts; written out here because the inner loop is twice as fast with literals.
const STRIDE = 6;
const LINES_STRIDE = 6;

/** Draws columns from one envelope. */
export class Drawer {
  private readonly guide: Guide;
  private readonly density = I.interval();
  private readonly pair = new Float64Array(2);
  private nearTies = 0;

  constructor(private readonly envelope: Envelope) {
    this.guide = guideOf(envelope);
  }

  /** Rows `first` … `first + n − 1` under a key. @throws {Error} on a breach, which no proof allows. */
  column(key: Key, first: number, n: number, method = 0): Column {
    const stream = new RowStream(key, method);
    const values = new Float64Array(n);
    const numbers = new Float64Array(CHUNK);
    const open = new Int32Array(CHUNK);
    this.nearTies = 0;
    let proposals = n;
    let settledAtOnce = 0;
    let longestWait = n > 0 ? 1 : 0;
    for (let done = 0; done < n; done += CHUNK) {
      const size = Math.min(CHUNK, n - done);
      stream.fillFirst(first + done, numbers, size);
      const nOpen = this.settleFirst(numbers, size, values, done, open);
      settledAtOnce += size - nOpen;
      for (let k = 0; k < nOpen; k++) {
        const at = open[k]!;
        const wait = this.finish(stream, first + done + at, numbers[at]!, values, done + at);
        proposals += wait - 1;
        if (wait > longestWait) longestWait = wait;
      }
    }
    return { values, proposals, settledAtOnce, longestWait, nearTies: this.nearTies };
  }

  /** Writes x of every first number; returns how many lie in gaps and lists them in `open`. */
  private settleFirst(
    numbers: Float64Array,
    size: number,
    values: Float64Array,
    offset: number,
    open: Int32Array,
  ): number {
    const { segments, gapOf, cells } = this.guide;
    const nCells = cells.length;
    let nOpen = 0;
    for (let k = 0; k < size; k++) {
      const u = numbers[k]!;
      let i = cells[(u * nCells) | 0]!;
      let at = i * STRIDE;
      while (u >= segments[at + STRIDE]!) {
        i++;
        at += STRIDE;
      }
      const r = (u - segments[at]!) * segments[at + 1]!;
      const slant = segments[at + 4]!;
      const square = segments[at + 5]! + (4 - 4 * slant) * r;
      // The least double keeps 0/0 away and changes nothing else.
      const s = (2 * r) / (slant + (square > 0 ? Math.sqrt(square) : 0) + 5e-324);
      values[offset + k] = segments[at + 2]! + segments[at + 3]! * (s < 1 ? s : 1);
      if (gapOf[i]! >= 0) open[nOpen++] = k;
    }
    return nOpen;
  }

  /** Finishes a row whose first number u fell into a gap; returns the proposals it took. */
  private finish(
    stream: RowStream,
    row: number,
    u: number,
    values: Float64Array,
    at: number,
  ): number {
    stream.further(row, 0, this.pair);
    if (this.isUnder(values[at]!, this.gapAt(u), this.pair[1]!)) return 1;
    for (let attempt = 1; attempt < MAX_ATTEMPTS; attempt++) {
      stream.further(row, attempt, this.pair);
      const { x, gap } = this.propose(this.pair[0]!);
      if (gap < 0 || this.isUnder(x, gap, this.pair[1]!)) {
        values[at] = x;
        return attempt + 1;
      }
    }
    throw bug(`row ${row} found no draw in ${MAX_ATTEMPTS} attempts`);
  }

  private readonly one = new Float64Array(1);
  private readonly oneValue = new Float64Array(1);
  private readonly oneOpen = new Int32Array(1);

  private propose(u: number): { x: number; gap: number } {
    this.one[0] = u;
    const isOpen = this.settleFirst(this.one, 1, this.oneValue, 0, this.oneOpen) > 0;
    return { x: this.oneValue[0]!, gap: isOpen ? this.gapAt(u) : -1 };
  }

  private gapAt(u: number): number {
    const { segments, gapOf, cells } = this.guide;
    let i = cells[(u * cells.length) | 0]!;
    while (u >= segments[(i + 1) * STRIDE]!) i++;
    return gapOf[i]!;
  }

  /** Whether the height at share v of the gap lies under the density at x. */
  private isUnder(x: number, piece: number, v: number): boolean {
    const { lines } = this.guide;
    const at = piece * LINES_STRIDE;
    const t = (x - lines[at]!) * lines[at + 1]!;
    const lower = lines[at + 2]! + lines[at + 3]! * t;
    const gap = lines[at + 4]! + lines[at + 5]! * t;
    const height = lower + v * gap;
    this.envelope.densityAt!(x, this.density);
    const { lo, hi } = this.density;
    if (lo > (lower + gap) * (1 + LINE_ROUNDING)) {
      throw bug(`breach: the density at x = ${x} lies above the envelope`);
    }
    if (lo >= height) return true;
    if (hi < height) return false;
    this.nearTies++;
    return this.envelope.heightAt(x) >= height;
  }
}
