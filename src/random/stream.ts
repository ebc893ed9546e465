/**
 * The random numbers of one input: every number belongs to (method, seed, label, row, attempt)
 * and is the same whatever else is drawn. Seed and label are in the key (key.ts); the rest is
 * the Philox counter (philox.ts):
 *
 * | word | first number of a row        | further numbers of a row |
 * |------|------------------------------|--------------------------|
 * | 0    | row pair, floor(row / 2)     | row                      |
 * | 1    | 0                            | attempt                  |
 * | 2    | purpose 0, "first"           | purpose 1, "further"     |
 * | 3    | method number                | method number            |
 *
 * Purposes 2, "pick", and 3, "thin", hold one number a row, laid out as the first one: rows that
 * are picked or thinned do not share the numbers of draws under the same seed and label. So do
 * purposes 4, "shuffle", and 5, "shift", for the strata of a stratified column.
 *
 * Purpose 6, "total", serves rows of many draws: draw j of row i is the same however many others
 * there are. With draws in the place of rows and the row in word 1, first numbers are laid out as
 * above; further ones have 2^31 + draw in word 0, which nothing else has, and the attempt in word 2.
 *
 * Purposes from 4096 on, "link", hold one number a row for each of the linked shares, and those from
 * 8192 on, "align", one a row for the shuffle of each aligned column.
 *
 * Purposes from 16 on, "place", serve proposals of several variables: with words 0 and 1 as of
 * a further number, block b of a proposal has purpose 16 + b and gives numbers 2b and 2b + 1.
 *
 * A first block serves two rows: its words 0, 1 the even row, its words 2, 3 the odd one. A
 * further block gives the pair u (words 0, 1) and v (words 2, 3) of one attempt: attempt k ≥ 1
 * is a fresh proposal and uses both; attempt 0 continues the row's first number and uses only v.
 *
 * Two words w, w′ make one number with 53 random bits, a multiple of 2^-53 in [0, 1).
 * Rows and draws are whole numbers below 2^31, and so are attempts; from there on the further numbers are the
 * low bits of a place that one number does not tell finely enough (draw/points.ts).
 */
import type { Key } from './key';
import { fillFractions, fraction, philox4x32 } from './philox';

/** What the numbers serve: word 2 of the counter. */
export const PURPOSE = {
  first: 0,
  further: 1,
  pick: 2,
  thin: 3,
  shuffle: 4,
  shift: 5,
  total: 6,
  place: 16,
  link: 4096,
  align: 8192,
} as const;

/** 2^31: what word 0 of the further numbers of a draw has above the draw. */
const FURTHER_DRAW = 0x80000000;

/** The numbers of one key, first ones for one purpose; holds no position, so calls may come in any order. */
export class RowStream {
  private readonly k0: number;
  private readonly k1: number;
  private readonly block = new Uint32Array(4);
  private readonly pair = new Float64Array(2);

  constructor(
    key: Key,
    private readonly method = 0,
    private readonly purpose: number = PURPOSE.first,
  ) {
    [this.k0, this.k1] = key;
  }

  /**
   * Writes the first numbers of rows firstRow … firstRow + count − 1 to out[0 … count − 1].
   * Guarantee: multiples of 2^-53 in [0, 1), the same bits on every engine.
   */
  fillFirst(firstRow: number, out: Float64Array, count: number): void {
    let filled = 0;
    if (count > 0 && firstRow & 1) out[filled++] = this.first(firstRow);
    const pairs = (count - filled) >>> 1;
    const pair = (firstRow + filled) >>> 1;
    fillFractions(pair, 0, this.purpose, this.method, this.k0, this.k1, out, filled, pairs);
    filled += 2 * pairs;
    if (filled < count) out[filled] = this.first(firstRow + filled);
  }

  /**
   * Writes u and v of an attempt of a row to out[0] and out[1].
   * Guarantee: multiples of 2^-53 in [0, 1), the same bits on every engine.
   */
  further(row: number, attempt: number, out: Float64Array): void {
    const { block } = this;
    philox4x32(row, attempt, PURPOSE.further, this.method, this.k0, this.k1, block);
    out[0] = fraction(block[0]!, block[1]!);
    out[1] = fraction(block[2]!, block[3]!);
  }

  /**
   * Writes `count` numbers of an attempt of a row, a place in several variables, to out.
   * Guarantee: multiples of 2^-53 in [0, 1), the same bits on every engine.
   */
  place(row: number, attempt: number, out: Float64Array, count: number): void {
    const { block } = this;
    for (let b = 0; 2 * b < count; b++) {
      philox4x32(row, attempt, PURPOSE.place + b, this.method, this.k0, this.k1, block);
      out[2 * b] = fraction(block[0]!, block[1]!);
      out[2 * b + 1] = fraction(block[2]!, block[3]!);
    }
  }

  /**
   * The first number of one row: half of its block. (A function that is called from one place only
   * is moved there by minimizers, as a new one for each call, which engines optimize badly.)
   */
  private first(row: number): number {
    fillFractions(row >>> 1, 0, this.purpose, this.method, this.k0, this.k1, this.pair, 0, 1);
    return this.pair[row & 1]!;
  }
}

/** The numbers of rows that have many draws each; holds no position, so calls may come in any order. */
export class DrawStream {
  private readonly k0: number;
  private readonly k1: number;
  private readonly block = new Uint32Array(4);
  private readonly pair = new Float64Array(2);

  constructor(
    key: Key,
    private readonly method = 0,
  ) {
    [this.k0, this.k1] = key;
  }

  /**
   * Writes the first numbers of draws firstDraw … firstDraw + count − 1 of a row to out from `at`
   * on, and may write one number more behind them.
   * Guarantee: multiples of 2^-53 in [0, 1), the same bits on every engine.
   */
  fillFirst(row: number, firstDraw: number, out: Float64Array, at: number, count: number): void {
    let [draw, place, left] = [firstDraw, at, count];
    if (left > 0 && draw & 1) {
      this.fillPairs(row, draw >>> 1, this.pair, 0, 1);
      out[place++] = this.pair[1]!;
      draw++;
      left--;
    }
    this.fillPairs(row, draw >>> 1, out, place, (left + 1) >>> 1);
  }

  /**
   * Writes u and v of an attempt of a draw of a row to out[0] and out[1].
   * Guarantee: multiples of 2^-53 in [0, 1), the same bits on every engine.
   */
  further(row: number, draw: number, attempt: number, out: Float64Array): void {
    const { block } = this;
    philox4x32(draw | FURTHER_DRAW, row, attempt, this.method, this.k0, this.k1, block);
    out[0] = fraction(block[0]!, block[1]!);
    out[1] = fraction(block[2]!, block[3]!);
  }

  private fillPairs(row: number, pair: number, out: Float64Array, at: number, pairs: number): void {
    fillFractions(pair, row, PURPOSE.total, this.method, this.k0, this.k1, out, at, pairs);
  }
}
