/**
 * Exact draws of a continuous quantity: how its proposals fall from an envelope of pieces and
 * hats, and how they are accepted. rejection.ts makes columns of them.
 * Not handled: several variables.
 */
import type { Envelope } from '../envelope/envelope';
import type { Hat } from '../envelope/hat';
import { placeOn } from '../envelope/hat';
import { Encloser } from '../formula/enclose';
import { next, prev } from '../numeric/float';
import * as I from '../numeric/interval';
import type { Guide } from './guide';
import { guideOf } from './guide';
import type { Place } from './rejection';
import { ColumnDrawer } from './rejection';

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
export class Drawer extends ColumnDrawer {
  private readonly guide: Guide;
  /** For each hat at a pole the density by the distance from it. */
  private readonly near: readonly (Encloser | null)[];
  private readonly density = I.interval();

  constructor(private readonly envelope: Envelope) {
    super();
    this.guide = guideOf(envelope);
    const { hats, exponent } = envelope;
    this.near = hats.map(({ near }) => near && new Encloser(near, exponent));
  }

  protected settleFirst(
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

  /** The proposal at hand: its place, and the gap or hat that decides on it (−1: none has to). */
  private readonly proposal = { x: NaN, isUnderLower: false, t: NaN, height: NaN, gap: -1 };
  private readonly number = new Float64Array(1);
  private readonly oneValue = new Float64Array(1);
  private readonly oneOpen = new Int32Array(1);

  protected propose(u: number): Place {
    const { proposal } = this;
    this.number[0] = u;
    const isOpen = this.settleFirst(this.number, 1, this.oneValue, 0, this.oneOpen) > 0;
    proposal.x = this.oneValue[0]!;
    proposal.gap = -1;
    proposal.isUnderLower = !isOpen;
    if (!isOpen) return proposal;
    const { segments, gapOf, cells } = this.guide;
    let i = cells[(u * cells.length) | 0]!;
    while (u >= segments[(i + 1) * STRIDE]!) i++;
    proposal.gap = gapOf[i]!;
    const hat = this.envelope.hats[proposal.gap - this.envelope.pieces.length];
    if (hat) this.proposeOn(hat, (u - segments[i * STRIDE]!) * segments[i * STRIDE + 1]!);
    return proposal;
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

  protected isAccepted(v: number): boolean {
    const { x, t, gap, height } = this.proposal;
    const { pieces, densityAt } = this.envelope;
    if (gap < pieces.length) return this.isUnderGap(x, gap, v);
    const near = this.near[gap - pieces.length]!;
    // Near a pole the rounding of x is no small part of the distance, which therefore decides.
    if (near) near.densityAt(t, this.density);
    else densityAt!(x, this.density);
    const { lo, hi } = this.density;
    // By the distance there is no other height than the enclosure's.
    const settle = near ? () => lo / 2 + hi / 2 : () => this.envelope.heightAt(x);
    return this.isUnder(this.density, x, v * height, height * (1 + HAT_ROUNDING), settle);
  }

  /** Whether the height at share v of the gap lies under the density at x. */
  private isUnderGap(x: number, piece: number, v: number): boolean {
    const { lower, gap } = this.linesAt(x, piece);
    const height = lower + v * gap;
    const settled = this.settleInside(x, piece, height);
    if (settled !== 0) return settled > 0;
    this.envelope.densityAt!(x, this.density);
    const upper = lower + gap + LINE_ROUNDING * this.sizeOf(piece);
    return this.isUnder(this.density, x, height, upper, () => this.envelope.heightAt(x));
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

  protected heightAtShare(v: number): number {
    const { x, gap, height } = this.proposal;
    if (gap >= this.envelope.pieces.length) return v * height;
    const lines = this.linesAt(x, gap);
    return lines.lower + v * lines.gap;
  }
}
