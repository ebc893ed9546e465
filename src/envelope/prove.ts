/**
 * Proves an envelope over a formula's density.
 *
 * Pieces without a bound are halved first, then the piece with the largest gap
 * between its lines, until the area under the lower lines is 0.99 of the area under
 * the upper ones. A step of the formula that changes sign inside a piece (a kink, a
 * jump) is cut out between neighbouring doubles. The refinement depends on the
 * shape alone, never on the number of rows or a clock.
 * Source: src/METHOD.md. Unbounded sides and poles are covered by hats (reach.ts, hat.ts).
 * The file is long because it is one algorithm, read from the top down.
 */
import FlatQueue from 'flatqueue';
import type { InputError } from '../errors';
import type { Enclosure, PointValues, Turn } from '../formula/enclose';
import { byDistance } from '../formula/distance';
import { Encloser } from '../formula/enclose';
import { evaluator } from '../formula/evaluate';
import { Defined } from '../formula/operation';
import { SideEncloser } from '../formula/side';
import type { Tape } from '../formula/tape';
import * as elementary from '../numeric/elementary';
import { middle, powerOfTwo } from '../numeric/float';
import * as I from '../numeric/interval';
import * as J from '../numeric/jet';
import { shortNumber } from '../numeric/text';
import { findCrossing } from './crossing';
import type { Envelope } from './envelope';
import { promisedAcceptance, totalAreas } from './envelope';
import type { Hat } from './hat';
import { hatOver } from './hat';
import type { Piece } from './piece';
import { provePiece } from './piece';
import type { Reach, Reaches } from './reach';
import { findReaches } from './reach';
import {
  acceptedTooRarely,
  negativeAt,
  neverAbove,
  nothingSeen,
  unboundedNear,
  undefinedOn,
  unproved,
  unsettledSign,
  untold,
  zeroEverywhere,
} from './refusal';
import { untoldArea } from './resolution';
import { findExponent } from './scale';
import { undefinedStretch } from './stretch';

export const WANTED_ACCEPTANCE = 0.99;
export const LEAST_ACCEPTANCE = 0.01;
export const MAX_PIECES = 4096;
/** A sign that cannot be settled is taken for rounding up to this share of the peak. */
const SIGN_TOLERANCE = 1e-12;
/** An unbounded or undefined piece narrower than this share of the limits is not halved further. */
const NARROW = powerOfTwo(-60);
/** A stretch this narrow, as a share of the limits, may be undefined: it is within rounding. */
const NEGLIGIBLE = powerOfTwo(-42);
/** At this acceptance the gaps follow the cubes of the widths well enough to place the bounds afresh. */
const SPREAD_AT = 0.96;
/** A hat with more than this share of the area is there because the density's own side is heavy. */
const HEAVY = 0.004;
/** How far a density is looked at on an unbounded side where nothing of it is seen. */
const WIDE = powerOfTwo(20);
const MAX_SIGN_STEPS = 20_000;

interface Part {
  readonly piece: Piece;
  readonly defined: Defined;
  readonly turn: Turn | null;
  /** Why the density is undefined here. */
  readonly reason: string;
}

/**
 * Proves the density of `tape` on [from, to], from < to; ends may be infinite.
 * @throws {InputError} when it is negative, zero everywhere, undefined or unbounded somewhere,
 * its area infinite or not provably finite, or accepted too rarely.
 */
export function proveEnvelope(tape: Tape, from: number, to: number): Envelope {
  const plain = new Encloser(tape);
  const reaches = findReaches(tape, plain, from, to);
  if (reaches === null) {
    // The proof over a wide stretch says best what is wrong: undefined, negative, 0 everywhere.
    const wide = { from: Math.max(from, -WIDE), to: Math.min(to, WIDE), sides: [] };
    if (wide.from < wide.to) new Prover(tape, plain, wide).prove();
    throw nothingSeen();
  }
  return { ...new Prover(tape, plain, reaches).prove(), from, to };
}

class Prover {
  private readonly encloser: Encloser;
  private readonly atLeft: PointValues;
  private readonly atMiddle: PointValues;
  private readonly atRight: PointValues;
  private readonly atCentre = I.interval();
  private readonly bounds = J.jet();
  private readonly urgent = new FlatQueue<Part>();
  private readonly byGap = new FlatQueue<Part>();
  /** All parts of the limits as they stand; the queues hold those that can be halved. */
  private readonly parts = new Set<Part>();
  private readonly notes: string[] = [];
  private readonly width: number;
  /** A height that the density surely reaches. */
  private peak = 0;
  private upperArea = 0;
  private lowerArea = 0;
  /** The largest upper area since the sums were last taken afresh. */
  private largestArea = 0;

  readonly from: number;
  readonly to: number;
  private readonly hats: readonly Hat[];
  private readonly hatArea: number;

  constructor(
    private readonly tape: Tape,
    plain: Encloser,
    reaches: Reaches,
  ) {
    const { from, to } = reaches;
    [this.from, this.to, this.width] = [from, to, to - from];
    const exponent = findExponent(plain, from, to);
    this.encloser = exponent === 0 ? plain : new Encloser(tape, exponent);
    this.atLeft = this.encloser.pointValues();
    this.atMiddle = this.encloser.pointValues();
    this.atRight = this.encloser.pointValues();
    this.hats = reaches.sides.map((reach) => this.hatFor(reach));
    this.hatArea = this.hats.reduce((sum, { area }) => sum + area, 0);
  }

  /** The hat of a side, now that the scale is known. */
  private hatFor({ side, c }: Reach): Hat {
    const steps = new SideEncloser(this.tape, this.encloser, side);
    const factors = steps.factors(c);
    this.encloser.densityAt(steps.pointAt(c), this.atCentre);
    const verdict =
      factors && hatOver(side, c, factors, this.atCentre.hi, twoTo(-this.encloser.exponent));
    // Scales beyond the doubles' own leave some hats without a height.
    if (!verdict || typeof verdict === 'string') throw unproved(side, false);
    return side.isBeyond ? verdict.hat : { ...verdict.hat, near: byDistance(this.tape, side) };
  }

  prove(): Envelope {
    this.refine();
    const parts = this.kept();
    const pieces = parts.map((part) => part.piece);
    const areas = totalAreas(pieces, this.hats);
    this.settleSigns(parts);
    if (areas.upperArea === 0) throw zeroEverywhere(this);
    const promised = promisedAcceptance(areas);
    if (promised < LEAST_ACCEPTANCE) {
      if (this.isOnlySlivers(parts)) throw zeroEverywhere(this, ', apart from single points');
      throw acceptedTooRarely(promised, parts.length, worstOf(parts));
    }
    if (promised < WANTED_ACCEPTANCE) {
      this.notes.push(
        `the proof promises an acceptance of ${shortNumber(promised)} after ${parts.length} pieces; the draws are exact all the same`,
      );
    }
    this.settleHats(areas.lowerArea);
    const { exponent } = this.encloser;
    return {
      from: this.from,
      to: this.to,
      pieces,
      hats: this.hats.filter(({ area }) => area > 0),
      exponent,
      densityAt: (x, out) => this.encloser.densityAt(x, out),
      heightAt: this.heightAt(),
      ...areas,
      notes: this.notes,
    };
  }

  /** Refuses a hat under which the density's digits give out. */
  private settleHats(lowerArea: number): void {
    const densityAt = (x: number, out: I.Interval): void => this.encloser.densityAt(x, out);
    for (const hat of this.hats)
      if (untoldArea(hat, this.encloser.exponent, densityAt) > NEGLIGIBLE * lowerArea)
        throw untold(hat);
  }

  private refine(): void {
    this.encloser.at(this.from, this.atLeft);
    this.encloser.at(this.to, this.atRight);
    this.add(this.examine(this.atLeft, this.atRight));
    let isSpread = false;
    while (this.parts.size < MAX_PIECES) {
      if (this.urgent.length === 0 && this.isGoodEnough()) return;
      if (!isSpread && this.urgent.length === 0 && this.lowerArea >= SPREAD_AT * this.upperArea) {
        isSpread = true;
        this.sumAfresh();
        this.spreadGaps();
        continue;
      }
      const part = this.urgent.pop() ?? this.byGap.pop();
      if (!part) return;
      if (!this.parts.has(part)) continue;
      this.remove(part);
      this.split(part);
      if (this.upperArea < this.largestArea / 1000) this.sumAfresh();
    }
    const unbounded = this.urgent.peek();
    if (unbounded) this.refuseUrgent(unbounded);
  }

  /** Running sums lose digits as large areas are replaced by small ones. */
  private sumAfresh(): void {
    this.upperArea = this.lowerArea = 0;
    for (const part of this.parts) {
      if (part.piece.upperArea === Infinity) continue;
      this.upperArea += part.piece.upperArea;
      this.lowerArea += part.piece.lowerArea;
    }
    this.largestArea = this.upperArea;
  }

  private isGoodEnough(): boolean {
    const { hatArea } = this;
    // A heavy hat that cannot be helped must not drive the pieces to their number's end.
    const isEnough = (): boolean =>
      this.lowerArea >= WANTED_ACCEPTANCE * (this.upperArea + hatArea) ||
      (hatArea > HEAVY * this.upperArea && this.lowerArea >= (1 - HEAVY) * this.upperArea);
    if (!isEnough()) return false;
    this.sumAfresh();
    return isEnough();
  }

  private remove(part: Part): void {
    this.parts.delete(part);
    if (part.piece.upperArea === Infinity) return;
    this.upperArea -= part.piece.upperArea;
    this.lowerArea -= part.piece.lowerArea;
  }

  private add(part: Part): void {
    this.parts.add(part);
    if (part.piece.upperArea < Infinity) {
      this.upperArea += part.piece.upperArea;
      this.lowerArea += part.piece.lowerArea;
      this.largestArea = Math.max(this.largestArea, this.upperArea);
    }
    const width = part.piece.to - part.piece.from;
    const isIndivisible = middle(part.piece.from, part.piece.to) === part.piece.from;
    if (part.defined !== Defined.Everywhere || part.piece.upperArea === Infinity) {
      // A narrow part that still has no bound is refused; one that is defined in part loses only its last bits.
      if (width >= NARROW * this.width && !isIndivisible) this.urgent.push(part, -width);
      else if (part.piece.upperArea === Infinity) this.refuseUrgent(part);
    } else if (part.piece.upperArea > part.piece.lowerArea && !isIndivisible) {
      this.byGap.push(part, part.piece.lowerArea - part.piece.upperArea);
    }
  }

  private refuseUrgent(part: Part): never {
    if (part.defined === Defined.Nowhere) throw this.undefinedAround(part);
    const { from, to } = part.piece;
    throw unboundedNear(
      to - from < NARROW * this.width && from <= 0 && to >= 0
        ? 0
        : Math.abs(from) < Math.abs(to)
          ? from
          : to,
    );
  }

  private undefinedAround({ piece, reason }: Part): InputError {
    return undefinedOn(undefinedStretch(this.encloser, piece, this), reason);
  }

  private split(part: Part): void {
    const { from, to } = part.piece;
    if (part.turn) {
      const crossing = findCrossing(this.encloser, part.turn, from, to, this.atMiddle);
      if (crossing && (crossing.lo > from || crossing.hi < to)) {
        this.cut([from, Math.max(from, crossing.lo), Math.min(to, crossing.hi), to]);
        return;
      }
    }
    this.cut([from, middle(from, to), to]);
  }

  /**
   * Places the bounds afresh so that all parts have about the same gap, which is how
   * the fewest parts reach a total: a part's gap falls with the cube of its width, so
   * a total of G wants gaps of (G / Σ ∛gap)^(3/2) each. Halving alone is a factor of
   * two too coarse here and too fine there.
   */
  private spreadGaps(): void {
    const parts = [...this.parts].sort((p, q) => p.piece.from - q.piece.from);
    const roots = parts.map((part) =>
      elementary.pow(part.piece.upperArea - part.piece.lowerArea, 1 / 3),
    );
    const total = roots.reduce((sum, root) => sum + root, 0);
    const share = Math.sqrt(((1 - WANTED_ACCEPTANCE) * this.upperArea) / total);
    for (let i = 0; i < parts.length; i++) {
      const first = i;
      let run = 0;
      for (; i < parts.length && canMove(parts[i]!); i++) run += roots[i]!;
      if (i - first > 1)
        this.cutEvenly(
          parts.slice(first, i),
          roots.slice(first, i),
          run,
          Math.max(1, Math.round(run / share)),
        );
    }
  }

  /** Replaces neighbouring parts by n parts, each with the same share of their roots' sum. */
  private cutEvenly(
    parts: readonly Part[],
    roots: readonly number[],
    sum: number,
    n: number,
  ): void {
    const bounds = [parts[0]!.piece.from];
    let before = 0;
    parts.forEach((part, i) => {
      this.remove(part);
      const after = before + roots[i]!;
      for (let k = bounds.length; k < n && (sum * k) / n <= after; k++) {
        bounds.push(
          part.piece.from +
            (part.piece.to - part.piece.from) * (((sum * k) / n - before) / roots[i]!),
        );
      }
      before = after;
    });
    bounds.push(parts.at(-1)!.piece.to);
    this.cut(bounds);
  }

  /** Replaces a part by the parts between these bounds; empty ones are left out. */
  private cut(bounds: readonly number[]): void {
    let [left, right] = [this.atLeft, this.atMiddle];
    this.encloser.at(bounds[0]!, left);
    for (const x of bounds.slice(1)) {
      if (x <= left.x) continue;
      this.encloser.at(x, right);
      this.add(this.examine(left, right));
      [left, right] = [right, left];
    }
  }

  private examine(left: PointValues, right: PointValues): Part {
    this.seePoint(left);
    this.seePoint(right);
    const enclosure = this.encloser.over(left.x, right.x, left, right);
    const { defined, density, turn } = enclosure;
    if (defined === Defined.Everywhere && density.v.hi < 0) throw this.negative(left.x, density.v);
    const isBeyondRounding = right.x - left.x > NEGLIGIBLE * this.width;
    const reason = defined === Defined.Everywhere ? '' : this.encloser.undefinedReason();
    if (defined === Defined.Nowhere) {
      const part = { piece: nothing(left.x, right.x), defined, turn, reason };
      if (isBeyondRounding) throw this.undefinedAround(part);
      this.notes.push(
        `the density is undefined on a stretch of ${shortNumber(right.x - left.x)} at x = ${shortNumber(left.x)}, where ${reason}; nothing is drawn there`,
      );
      return { ...part, defined: Defined.Everywhere };
    }
    this.useMonotone(enclosure, left, right);
    // Asking for the middle ends the life of the enclosure, so its bounds are kept first.
    J.copyJet(this.bounds, density);
    this.encloser.densityAt(middle(left.x, right.x), this.atCentre);
    const ends = { atFrom: left.density, atTo: right.density, atMiddle: this.atCentre };
    return { piece: provePiece(left.x, right.x, this.bounds, ends), defined, turn, reason };
  }

  private seePoint({ density, x, defined }: PointValues): void {
    if (defined[this.tape.root] !== Defined.Everywhere) return;
    if (density.hi < 0) throw this.negative(x, density);
    if (density.lo > this.peak) this.peak = density.lo;
  }

  /** A scaled density is tightened here; an unscaled one already was, as a step of the tape. */
  private useMonotone(
    { density, defined }: Enclosure,
    left: PointValues,
    right: PointValues,
  ): void {
    if (this.encloser.exponent === 0 || defined !== Defined.Everywhere) return;
    const { lo, hi } = density.d;
    if (lo >= 0) I.meet(density.v, { lo: left.density.lo, hi: right.density.hi });
    else if (hi <= 0) I.meet(density.v, { lo: right.density.lo, hi: left.density.hi });
  }

  private isSliver({ piece: { from, to } }: Part): boolean {
    return to - from < NEGLIGIBLE * this.width;
  }

  /** True if the density can be above 0 only where its parts are next to nothing wide. */
  private isOnlySlivers(parts: readonly Part[]): boolean {
    return parts.every((part) => part.piece.upperArea === 0 || this.isSliver(part));
  }

  /** The parts in order, without slivers around jumps that carry less than rounding does. */
  private kept(): Part[] {
    const sorted = [...this.parts].sort((p, q) => p.piece.from - q.piece.from);
    const limit = NEGLIGIBLE * this.lowerArea;
    let dropped = 0;
    return sorted.filter((part) => {
      if (!this.isSliver(part) || dropped + part.piece.upperArea > limit) return true;
      dropped += part.piece.upperArea;
      return false;
    });
  }

  /** Proves f ≥ −10^-12 of the peak wherever a piece's own bound does not. */
  private settleSigns(parts: readonly Part[]): void {
    const tolerance = -SIGN_TOLERANCE * this.peak;
    const open = parts
      .filter((part) => part.piece.least < tolerance)
      .map(({ piece: { from, to } }) => ({ from, to }));
    let isRounded = parts.find((part) => part.piece.least < 0 && part.piece.least >= tolerance);
    for (let steps = 0; open.length > 0; steps++) {
      const { from, to } = open.pop()!;
      this.encloser.at(from, this.atLeft);
      this.encloser.at(to, this.atRight);
      const part = this.examine(this.atLeft, this.atRight);
      if (part.piece.least >= tolerance) {
        if (part.piece.least < 0) isRounded ??= part;
        continue;
      }
      const m = middle(from, to);
      if (steps >= MAX_SIGN_STEPS || m === from) throw unsettledSign(part.piece.from);
      open.push({ from: m, to }, { from, to: m });
    }
    if (isRounded) {
      this.notes.push(
        `the sign of the density cannot be settled to the last digit near x = ${shortNumber(isRounded.piece.from)}; MAX(0, density) is drawn, which differs by less than 10^-12 of its peak`,
      );
    }
  }

  /** Heights of a scaled density are not the user's, so they are not shown. */
  private negative(x: number, height: I.Interval): InputError {
    const value = this.encloser.exponent === 0 ? height.hi : undefined;
    const { density, defined } = this.encloser.over(this.from, this.to, null, null);
    // Beyond the limits of the pieces nothing is known of it here.
    const isNeverAbove =
      this.hats.length === 0 && defined === Defined.Everywhere && density.v.hi <= 0;
    return isNeverAbove ? neverAbove(x, value) : negativeAt(x, value);
  }

  private heightAt(): (x: number) => number {
    if (this.encloser.exponent === 0) return evaluator(this.tape);
    const out = I.interval();
    return (x) => {
      this.encloser.densityAt(x, out);
      return out.lo / 2 + out.hi / 2;
    };
  }
}

/** Where the gap between the lines is largest. */
function worstOf(parts: readonly Part[]): number {
  const gap = ({ piece }: Part): number => piece.upperArea - piece.lowerArea;
  return parts.reduce((p, q) => (gap(q) > gap(p) ? q : p)).piece.from;
}

/** True for a part whose ends may move: nothing turns inside and its gap is not nil. */
function canMove(part: Part): boolean {
  return (
    part.turn === null &&
    part.defined === Defined.Everywhere &&
    part.piece.upperArea > part.piece.lowerArea &&
    part.piece.upperArea < Infinity
  );
}

/** 2^k, also where it is no double: 0 or Infinity then. */
function twoTo(k: number): number {
  return k < -1074 ? 0 : k > 1023 ? Infinity : powerOfTwo(k);
}

/** A part with no height. */
function nothing(from: number, to: number): Piece {
  const zero = { upperLeft: 0, upperRight: 0, lowerLeft: 0, lowerRight: 0 };
  return {
    from,
    to,
    ...zero,
    upperArea: 0,
    lowerArea: 0,
    areaLo: 0,
    areaHi: 0,
    least: 0,
    inside: null,
  };
}
