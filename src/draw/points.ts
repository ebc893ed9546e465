/**
 * Exact draws of a counted quantity: points in place of pieces. The guide table is laid over
 * numbers of points, each of width 1; what falls into a piece of one point is that point, what
 * falls into a run is the point at the same share of the run, and what falls under a hat the
 * next point outward. rejection.ts makes columns of them.
 *
 * In a run 53 random bits would leave each point with a whole number of the 2^53 values; so the
 * place in a run has 53 more, from a counter of their own (LOW_BITS + attempt).
 * Source: src/METHOD.md, "Counted quantities". Not handled: several variables.
 */
import type { Hat } from '../envelope/hat';
import { placeOn } from '../envelope/hat';
import type { PointEnvelope } from '../envelope/points';
import { powerOfTwo } from '../numeric/float';
import * as I from '../numeric/interval';
import type { Guide } from './guide';
import { guideOf, INVERSE_SHARE, LEFT, START, STRIDE, WIDTH } from './guide';
import type { NumberSource, Place } from './rejection';
import { ColumnDrawer } from './rejection';

/** Attempts from here on are no attempts: their numbers are the low bits of the place. */
const LOW_BITS = powerOfTwo(31);
const UNIT = powerOfTwo(-53);
/** The far end of a hat is never proposed. */
const LEAST_SHARE = powerOfTwo(-54);
/** Room for the rounding of a hat's place and height when asking whether the density lies above it. */
const HAT_ROUNDING = 1e-11;
/** Room for what a sum and a product round when a height is placed between two others. */
const ROUNDING = 4e-16;

/** Draws columns from the points of one envelope. */
export class PointDrawer extends ColumnDrawer {
  private readonly guide: Guide;
  /** For each segment its first point, and how many it has; NaN and 0 for a hat. */
  private readonly firstOf: Float64Array;
  private readonly countOf: Float64Array;
  private readonly xOf: Float64Array;
  /** 1 where the first number alone does not tell the draw. */
  private readonly isOpen: Uint8Array;
  private readonly proposal = { x: NaN, isUnderLower: false, gap: -1, height: NaN };
  private readonly onHat = { x: NaN, t: NaN, height: NaN };
  private readonly density = I.interval();
  private readonly low = new Float64Array(2);

  constructor(private readonly envelope: PointEnvelope) {
    super();
    this.guide = guideOf(envelope);
    const { segments, gapOf } = this.guide;
    const { pieces, lattice } = envelope;
    const isHat = (i: number): boolean => gapOf[i]! >= pieces.length;
    this.firstOf = Float64Array.from(gapOf, (_, i) =>
      isHat(i) ? NaN : segments[i * STRIDE + LEFT]! + 0.5,
    );
    this.countOf = Float64Array.from(gapOf, (_, i) => segments[i * STRIDE + WIDTH]!);
    this.xOf = this.firstOf.map((number) => (number === number ? lattice.at(number) : NaN));
    this.isOpen = Uint8Array.from(gapOf, (gap, i) => (gap >= 0 || this.countOf[i]! > 1 ? 1 : 0));
  }

  protected settleFirst(
    numbers: Float64Array,
    size: number,
    values: Float64Array,
    offset: number,
    open: Int32Array,
  ): number {
    const { xOf, isOpen } = this;
    let nOpen = 0;
    for (let k = 0; k < size; k++) {
      const i = this.segmentOf(numbers[k]!);
      values[offset + k] = xOf[i]!;
      if (isOpen[i]! > 0) open[nOpen++] = k;
    }
    return nOpen;
  }

  private segmentOf(u: number): number {
    const { segments, cells } = this.guide;
    let i = cells[(u * cells.length) | 0]!;
    while (u >= segments[(i + 1) * STRIDE + START]!) i++;
    return i;
  }

  protected propose(u: number, source: NumberSource, i: number, attempt: number): Place {
    const { proposal, envelope } = this;
    const segment = this.segmentOf(u);
    const gap = this.guide.gapOf[segment]!;
    proposal.gap = gap;
    proposal.isUnderLower = gap < 0;
    const { segments } = this.guide;
    const at = segment * STRIDE;
    const r = (u - segments[at + START]!) * segments[at + INVERSE_SHARE]!;
    const hat = envelope.hats[gap - envelope.pieces.length];
    if (hat) {
      proposal.x = envelope.lattice.at(this.numberUnder(hat, r));
      proposal.height = this.onHat.height;
      return proposal;
    }
    const n = this.countOf[segment]!;
    if (n === 1) {
      proposal.x = this.xOf[segment]!;
      return proposal;
    }
    source.further(i, LOW_BITS + attempt, this.low);
    const share = r + this.low[0]! * UNIT * segments[at + INVERSE_SHARE]!;
    const place = Math.min(n - 1, Math.floor(share * n));
    proposal.x = envelope.lattice.at(this.firstOf[segment]! + place);
    return proposal;
  }

  /** The number of the point for share r of a hat, further right for a larger one. */
  private numberUnder(hat: Hat, r: number): number {
    const { origin, direction, c } = hat;
    const s = direction > 0 ? 1 - r : r;
    placeOn(hat, s > LEAST_SHARE ? s : LEAST_SHARE, this.onHat);
    // Where the hat begins is half a point beyond the last point of the pieces.
    const begin = Math.round(origin + direction * (c - 0.5));
    return begin + direction * Math.max(1, Math.ceil(this.onHat.t - c));
  }

  protected isAccepted(v: number): boolean {
    const { x, gap, height } = this.proposal;
    const { pieces, densityAt } = this.envelope;
    densityAt(x, this.density);
    const upper =
      gap < pieces.length ? pieces[gap]!.upperLeft * (1 + ROUNDING) : height * (1 + HAT_ROUNDING);
    return this.isUnder(this.density, x, this.heightAtShare(v), upper, () =>
      this.envelope.heightAt(x),
    );
  }

  protected heightAtShare(v: number): number {
    const { gap, height } = this.proposal;
    const piece = this.envelope.pieces[gap];
    if (piece === undefined) return v * height;
    return piece.lowerLeft + v * (piece.upperLeft - piece.lowerLeft);
  }
}
