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
import type { Hat } from '../envelope/hat';
import { placeOn } from '../envelope/hat';
import { bug } from '../errors';
import { Encloser } from '../formula/enclose';
import { next, prev } from '../numeric/float';
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

/** Where the numbers of draws 0, 1, 2 … come from; multiples of 2^-53 in [0, 1), as of random/stream.ts. */
export interface NumberSource {
  /** Writes the first numbers of draws from … from + count − 1 to out[0 … count − 1]. */
  fillFirst(from: number, out: Float64Array, count: number): void;
  /** Writes u and v of an attempt of draw i to out[0] and out[1]. */
  further(i: number, attempt: number, out: Float64Array): void;
}

const CHUNK = 4096;
/** At an acceptance of 0.01 a row needs this many with a chance far below 10^-1000. */
const MAX_ATTEMPTS = 1_000_000;
/** Room for the rounding of a line's value when asking whether the density lies above it. */
const LINE_ROUNDING = 4e-15;
/** Room for the rounding of what the bounds inside a piece say. */
const INSIDE_ROUNDING = 1e-14;
/** Among smaller numbers rounding is no longer relative. */
const LEAST_EXACT = 1e-290;
/** The same for a hat, whose place and height are rounded over several steps. */
const HAT_ROUNDING = 1e-11;
/** 2^-54: the far end of a hat is never proposed, and its steepest place (2^-54)^-16 is still a double. */
const LEAST_SHARE = 5.551115123125783e-17;

// Mirrors the layout of guide.ts; written out here because the inner loop is twice as fast with literals.
const STRIDE = 6;
const LINES_STRIDE = 16;

/** Draws columns from one envelope. */
export class Drawer {
  private readonly guide: Guide;
  /** For each hat at a pole the density by the distance from it. */
  private readonly near: readonly (Encloser | null)[];
  private readonly density = I.interval();
  private readonly pair = new Float64Array(2);
  private nearTies = 0;

  constructor(private readonly envelope: Envelope) {
    this.guide = guideOf(envelope);
    const { hats, exponent } = envelope;
    this.near = hats.map(({ near }) => near && new Encloser(near, exponent));
  }

  /** Rows `first` … `first + n − 1` under a key. @throws {Error} on a breach, which no proof allows. */
  column(key: Key, first: number, n: number, method = 0): Column {
    const stream = new RowStream(key, method);
    return this.draws(
      {
        fillFirst: (from, out, count) => stream.fillFirst(first + from, out, count),
        further: (i, attempt, out) => stream.further(first + i, attempt, out),
      },
      n,
    );
  }

  /** n draws by numbers of the caller's, each draw by its own. @throws {Error} on a breach. */
  draws(source: NumberSource, n: number): Column {
    const values = new Float64Array(n);
    const chunk = Math.min(CHUNK, n);
    const numbers = new Float64Array(chunk);
    const open = new Int32Array(chunk);
    this.nearTies = 0;
    let proposals = n;
    let settledAtOnce = 0;
    let longestWait = n > 0 ? 1 : 0;
    for (let done = 0; done < n; done += CHUNK) {
      const size = Math.min(CHUNK, n - done);
      source.fillFirst(done, numbers, size);
      const nOpen = this.settleFirst(numbers, size, values, done, open);
      settledAtOnce += size - nOpen;
      for (let k = 0; k < nOpen; k++) {
        const at = open[k]!;
        const wait = this.finish(source, done + at, numbers[at]!, values);
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

  /** Every proposal of rows `first` … `first + n − 1`, as `column` makes them; null when there are more than `most`. */
  proposals(key: Key, first: number, n: number, most: number, method = 0): Proposal[] | null {
    const stream = new RowStream(key, method);
    const made: Proposal[] = [];
    for (let row = first; row < first + n; row++) {
      stream.fillFirst(row, this.one, 1);
      const u = this.one[0]!;
      stream.further(row, 0, this.pair);
      this.propose(u);
      for (let attempt = 0, isKept = false; !isKept; attempt++) {
        if (made.length === most) return null;
        const v = this.pair[1]!;
        isKept = this.isAccepted(v);
        made.push({ row, attempt, x: this.proposal.x, height: this.heightAtShare(v), isKept });
        stream.further(row, attempt + 1, this.pair);
        if (!isKept) this.propose(this.pair[0]!);
      }
    }
    return made;
  }

  /** Finishes draw i, whose first number u fell into a gap or a hat; returns the proposals it took. */
  private finish(source: NumberSource, i: number, u: number, values: Float64Array): number {
    const proposal = this.proposal;
    source.further(i, 0, this.pair);
    this.propose(u);
    for (let attempt = 0; attempt < MAX_ATTEMPTS; attempt++) {
      if (this.isAccepted(this.pair[1]!)) {
        values[i] = proposal.x;
        return attempt + 1;
      }
      source.further(i, attempt + 1, this.pair);
      this.propose(this.pair[0]!);
    }
    throw bug(`draw ${i} found no place in ${MAX_ATTEMPTS} attempts`);
  }

  /** The proposal at hand: its place, and the gap or hat that decides on it (−1: none has to). */
  private readonly proposal = { x: NaN, t: NaN, height: NaN, gap: -1 };
  private readonly one = new Float64Array(1);
  private readonly oneValue = new Float64Array(1);
  private readonly oneOpen = new Int32Array(1);

  private propose(u: number): void {
    this.one[0] = u;
    const isOpen = this.settleFirst(this.one, 1, this.oneValue, 0, this.oneOpen) > 0;
    this.proposal.x = this.oneValue[0]!;
    this.proposal.gap = -1;
    if (!isOpen) return;
    const { segments, gapOf, cells } = this.guide;
    let i = cells[(u * cells.length) | 0]!;
    while (u >= segments[(i + 1) * STRIDE]!) i++;
    this.proposal.gap = gapOf[i]!;
    const hat = this.envelope.hats[this.proposal.gap - this.envelope.pieces.length];
    if (hat) this.proposeOn(hat, (u - segments[i * STRIDE]!) * segments[i * STRIDE + 1]!);
  }

  /** A place on a hat, further right for a larger share r of it. */
  private proposeOn(hat: Hat, r: number): void {
    // s runs from the far end of the hat (0, never reached) to where it begins (1).
    const s = hat.isBeyond === hat.direction > 0 ? 1 - r : r;
    placeOn(hat, s > LEAST_SHARE ? s : LEAST_SHARE, this.proposal);
    if (this.proposal.x === hat.origin && !hat.isBeyond) {
      // Nearer to the pole than doubles are to each other: the nearest one stands for it.
      this.proposal.x = hat.direction > 0 ? next(hat.origin) : prev(hat.origin);
    }
  }

  private isAccepted(v: number): boolean {
    const { x, t, gap, height } = this.proposal;
    if (gap < 0) return true;
    const { pieces, densityAt } = this.envelope;
    if (gap < pieces.length) return this.isUnderGap(x, gap, v);
    const near = this.near[gap - pieces.length]!;
    // Near a pole the rounding of x is no small part of the distance, which therefore decides.
    if (near) near.densityAt(t, this.density);
    else densityAt!(x, this.density);
    return this.isUnder(x, v * height, height * (1 + HAT_ROUNDING), near !== null);
  }

  /** Whether the height at share v of the gap lies under the density at x. */
  private isUnderGap(x: number, piece: number, v: number): boolean {
    const { lower, gap } = this.linesAt(x, piece);
    const height = lower + v * gap;
    const settled = this.settleInside(x, piece, height);
    if (settled !== 0) return settled > 0;
    this.envelope.densityAt!(x, this.density);
    return this.isUnder(x, height, lower + gap + LINE_ROUNDING * this.sizeOf(piece));
  }

  /**
   * Whether a height lies below (1) or above (−1) all that the density can be at x, by the chord
   * of the half piece that holds x: f(x) = chord − f″(ξ)(x − a)(b − x)/2 for a ξ in it. 0 where
   * that does not tell.
   */
  private settleInside(x: number, piece: number, height: number): number {
    const { lines } = this.guide;
    const at = piece * LINES_STRIDE;
    const isLeft = x < lines[at + 7]!;
    const a = lines[isLeft ? at : at + 7]!;
    const b = lines[isLeft ? at + 7 : at + 6]!;
    const [bendLo, bendHi] = [lines[at + 14]!, lines[at + 15]!];
    // Bounds of the density at a and b.
    const ends = isLeft ? at + 8 : at + 10;
    const [atA, atB] = [lines[ends + 1]!, lines[ends + 3]!];
    const t = (x - a) / (b - a);
    const arc = ((x - a) * (b - x)) / 2;
    if (!(arc > LEAST_EXACT && height > LEAST_EXACT)) return 0;
    const most = atA * (1 - t) + atB * t - bendLo * arc;
    const least = lines[ends]! * (1 - t) + lines[ends + 2]! * t - bendHi * arc;
    const bend = Math.abs(bendLo) + Math.abs(bendHi);
    const room = INSIDE_ROUNDING * (Math.abs(atA) + Math.abs(atB) + bend * arc + height);
    return height < least - room ? 1 : height > most + room ? -1 : 0;
  }

  /** The height of the lower line at x, and from there to the upper one. */
  private linesAt(x: number, piece: number): { readonly lower: number; readonly gap: number } {
    const { lines } = this.guide;
    const at = piece * LINES_STRIDE;
    const t = (x - lines[at]!) * lines[at + 1]!;
    return {
      lower: lines[at + 2]! + lines[at + 3]! * t,
      gap: lines[at + 4]! + lines[at + 5]! * t,
    };
  }

  /** A bound of what goes into a line's value: its rounding is relative to that. */
  private sizeOf(piece: number): number {
    const { lines } = this.guide;
    const at = piece * LINES_STRIDE;
    return lines[at + 2]! + Math.abs(lines[at + 3]!) + lines[at + 4]! + Math.abs(lines[at + 5]!);
  }

  /** The height that share v stands for at the proposal at hand; NaN under the lower line. */
  private heightAtShare(v: number): number {
    const { x, gap, height } = this.proposal;
    if (gap < 0) return NaN;
    if (gap >= this.envelope.pieces.length) return v * height;
    const lines = this.linesAt(x, gap);
    return lines.lower + v * lines.gap;
  }

  /** Whether a height lies under the density, which is enclosed already. */
  private isUnder(x: number, height: number, upper: number, isByDistance = false): boolean {
    const { lo, hi } = this.density;
    if (lo > upper) throw bug(`breach: the density at x = ${x} lies above the envelope`);
    if (lo >= height) return true;
    if (hi < height) return false;
    this.nearTies++;
    return (isByDistance ? lo / 2 + hi / 2 : this.envelope.heightAt(x)) >= height;
  }
}
