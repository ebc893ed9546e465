/**
 * Proves an envelope over a formula's density on finite limits.
 *
 * Pieces without a bound are halved first, then the piece with the largest gap
 * between its lines, until the area under the lower lines is 0.99 of the area under
 * the upper ones. A step of the formula that changes sign inside a piece (a kink, a
 * jump) is cut out between neighbouring doubles. The refinement depends on the
 * shape alone, never on the number of rows or a clock.
 * Source: src/envelope/METHOD.md. Not handled: unbounded limits, integrable poles.
 */
import FlatQueue from 'flatqueue';
import { InputError } from '../errors';
import type { Enclosure, PointValues } from '../formula/enclose';
import { Encloser } from '../formula/enclose';
import { evaluator } from '../formula/evaluate';
import { Defined } from '../formula/operation';
import type { Tape } from '../formula/tape';
import { middle, powerOfTwo } from '../numeric/float';
import * as I from '../numeric/interval';
import * as J from '../numeric/jet';
import { shortNumber } from '../numeric/text';
import { findCrossing } from './crossing';
import type { Envelope } from './envelope';
import { promisedAcceptance, totalAreas } from './envelope';
import type { Piece } from './piece';
import { provePiece } from './piece';
import { findExponent } from './scale';

export const WANTED_ACCEPTANCE = 0.99;
export const LEAST_ACCEPTANCE = 0.01;
export const MAX_PIECES = 4096;
/** A sign that cannot be settled is taken for rounding up to this share of the peak. */
const SIGN_TOLERANCE = 1e-12;
/** An unbounded or undefined piece narrower than this share of the limits is not halved further. */
const NARROW = powerOfTwo(-60);
/** A stretch this narrow, as a share of the limits, may be undefined: it is within rounding. */
const NEGLIGIBLE = powerOfTwo(-42);
const MAX_SIGN_STEPS = 20_000;

const WHERE = 'Density';

interface Part extends Piece {
  readonly defined: Defined;
  readonly turn: number;
  /** Why the density is undefined here. */
  readonly reason: string;
}

/**
 * Proves the density of `tape` on [from, to], from < to.
 * @throws {InputError} when it is negative, zero everywhere, undefined or unbounded somewhere, or accepted too rarely.
 */
export function proveEnvelope(tape: Tape, from: number, to: number): Envelope {
  return new Prover(tape, from, to).prove();
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

  constructor(
    private readonly tape: Tape,
    private readonly from: number,
    private readonly to: number,
  ) {
    this.width = to - from;
    this.encloser = new Encloser(tape, findExponent(tape, from, to));
    this.atLeft = this.encloser.pointValues();
    this.atMiddle = this.encloser.pointValues();
    this.atRight = this.encloser.pointValues();
  }

  prove(): Envelope {
    this.refine();
    const parts = this.kept();
    const areas = totalAreas(parts);
    if (areas.upperArea === 0) throw this.zeroEverywhere();
    this.settleSigns(parts);
    const promised = promisedAcceptance(areas);
    if (promised < LEAST_ACCEPTANCE) throw this.acceptedTooRarely(promised, parts);
    if (promised < WANTED_ACCEPTANCE) {
      this.notes.push(`the proof promises an acceptance of ${shortNumber(promised)} after ${MAX_PIECES} pieces; the draws are exact all the same`);
    }
    const { exponent } = this.encloser;
    return {
      from: this.from,
      to: this.to,
      pieces: parts,
      exponent,
      densityAt: (x, out) => this.encloser.densityAt(x, out),
      heightAt: this.heightAt(),
      ...areas,
      notes: this.notes,
    };
  }

  private refine(): void {
    this.encloser.at(this.from, this.atLeft);
    this.encloser.at(this.to, this.atRight);
    this.add(this.examine(this.atLeft, this.atRight));
    while (this.parts.size < MAX_PIECES) {
      if (this.urgent.length === 0 && this.isGoodEnough()) return;
      const part = this.urgent.pop() ?? this.byGap.pop();
      if (!part) return;
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
      if (part.upperArea === Infinity) continue;
      this.upperArea += part.upperArea;
      this.lowerArea += part.lowerArea;
    }
    this.largestArea = this.upperArea;
  }

  private isGoodEnough(): boolean {
    const isEnough = (): boolean => this.lowerArea >= WANTED_ACCEPTANCE * this.upperArea;
    if (!isEnough()) return false;
    this.sumAfresh();
    return isEnough();
  }

  private remove(part: Part): void {
    this.parts.delete(part);
    if (part.upperArea === Infinity) return;
    this.upperArea -= part.upperArea;
    this.lowerArea -= part.lowerArea;
  }

  private add(part: Part): void {
    this.parts.add(part);
    if (part.upperArea < Infinity) {
      this.upperArea += part.upperArea;
      this.lowerArea += part.lowerArea;
      this.largestArea = Math.max(this.largestArea, this.upperArea);
    }
    const width = part.to - part.from;
    const isIndivisible = middle(part.from, part.to) === part.from;
    if (part.defined !== Defined.Everywhere || part.upperArea === Infinity) {
      // A narrow part that still has no bound is refused; one that is defined in part loses only its last bits.
      if (width >= NARROW * this.width && !isIndivisible) this.urgent.push(part, -width);
      else if (part.upperArea === Infinity) this.refuseUrgent(part);
    } else if (part.upperArea > part.lowerArea && !isIndivisible) {
      this.byGap.push(part, part.lowerArea - part.upperArea);
    }
  }

  private refuseUrgent(part: Part): never {
    if (part.defined === Defined.Nowhere) throw this.undefinedOn(part);
    const near = shortNumber(Math.abs(part.from) < Math.abs(part.to) ? part.from : part.to);
    throw new InputError(WHERE, `it cannot be bounded near x = ${near}`, 'keep the limits away from there, or write the formula so that it stays finite');
  }

  private undefinedOn(part: Part): InputError {
    return new InputError(
      WHERE,
      `it is undefined from x = ${shortNumber(part.from)} to x = ${shortNumber(part.to)}, where ${part.reason}`,
      'keep the limits where it is defined, or give it a height there with IF',
    );
  }

  private split(part: Part): void {
    const { from, to } = part;
    if (part.turn >= 0) {
      const crossing = findCrossing(this.encloser, part.turn, from, to, this.atMiddle);
      if (crossing && (crossing.lo > from || crossing.hi < to)) {
        this.cut([from, Math.max(from, crossing.lo), Math.min(to, crossing.hi), to]);
        return;
      }
    }
    this.cut([from, middle(from, to), to]);
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
    for (const { density, x, defined } of [left, right]) {
      if (defined[this.tape.root] !== Defined.Everywhere) continue;
      if (density.hi < 0) throw this.negativeAt(x, density);
      if (density.lo > this.peak) this.peak = density.lo;
    }
    const enclosure = this.encloser.over(left.x, right.x, left, right);
    const { defined, density, turn } = enclosure;
    if (defined === Defined.Everywhere && density.v.hi < 0) throw this.negativeAt(left.x, density.v);
    const isBeyondRounding = right.x - left.x > NEGLIGIBLE * this.width;
    const reason = defined === Defined.Everywhere ? '' : this.encloser.undefinedReason();
    if (defined === Defined.Nowhere) {
      const part = { ...nothing(left.x, right.x), defined, turn, reason };
      if (isBeyondRounding) throw this.undefinedOn(part);
      this.notes.push(`the density is undefined on a stretch of ${shortNumber(right.x - left.x)} at x = ${shortNumber(left.x)}, where ${reason}; nothing is drawn there`);
      return { ...part, defined: Defined.Everywhere };
    }
    this.useMonotone(enclosure, left, right);
    const part = { defined, turn, reason };
    // Asking for the middle ends the life of the enclosure, so its bounds are kept first.
    J.copyJet(this.bounds, density);
    this.encloser.densityAt(middle(left.x, right.x), this.atCentre);
    const ends = { atFrom: left.density, atTo: right.density, atMiddle: this.atCentre };
    return { ...provePiece(left.x, right.x, this.bounds, ends), ...part };
  }

  /** A scaled density is tightened here; an unscaled one already was, as a step of the tape. */
  private useMonotone({ density, defined }: Enclosure, left: PointValues, right: PointValues): void {
    if (this.encloser.exponent === 0 || defined !== Defined.Everywhere) return;
    const { lo, hi } = density.d;
    if (lo >= 0) I.meet(density.v, { lo: left.density.lo, hi: right.density.hi });
    else if (hi <= 0) I.meet(density.v, { lo: right.density.lo, hi: left.density.hi });
  }

  /** The parts in order, without slivers around jumps that carry less than rounding does. */
  private kept(): Part[] {
    const sorted = [...this.parts].sort((p, q) => p.from - q.from);
    const limit = NEGLIGIBLE * this.lowerArea;
    let dropped = 0;
    return sorted.filter((part) => {
      const isSliver = part.to - part.from < NEGLIGIBLE * this.width;
      if (!isSliver || dropped + part.upperArea > limit) return true;
      dropped += part.upperArea;
      return false;
    });
  }

  /** Proves f ≥ −10^-12 of the peak wherever a piece's own bound does not. */
  private settleSigns(parts: readonly Part[]): void {
    const tolerance = -SIGN_TOLERANCE * this.peak;
    const open = parts.filter((part) => part.least < tolerance).map(({ from, to }) => ({ from, to }));
    let isRounded = parts.find((part) => part.least < 0 && part.least >= tolerance);
    for (let steps = 0; open.length > 0; steps++) {
      const { from, to } = open.pop()!;
      this.encloser.at(from, this.atLeft);
      this.encloser.at(to, this.atRight);
      const part = this.examine(this.atLeft, this.atRight);
      if (part.least >= tolerance) {
        if (part.least < 0) isRounded ??= part;
        continue;
      }
      const m = middle(from, to);
      if (steps >= MAX_SIGN_STEPS || m === from) throw this.unsettledSign(part);
      open.push({ from: m, to }, { from, to: m });
    }
    if (isRounded) {
      this.notes.push(
        `the sign of the density cannot be settled to the last digit near x = ${shortNumber(isRounded.from)}; MAX(0, density) is drawn, which differs by less than 10^-12 of its peak`,
      );
    }
  }

  private negativeAt(x: number, height: I.Interval): InputError {
    const value = this.encloser.exponent === 0 ? ` (${shortNumber(height.hi)})` : '';
    return new InputError(WHERE, `it is negative at x = ${shortNumber(x)}${value}`, 'heights must be 0 or more; use MAX(0, …) if that is meant');
  }

  private unsettledSign(part: Part): InputError {
    return new InputError(
      WHERE,
      `whether it is negative near x = ${shortNumber(part.from)} cannot be settled`,
      'write it so that it cannot be negative, for example as a square instead of its expanded powers, or with MAX(0, …)',
    );
  }

  private zeroEverywhere(): InputError {
    return new InputError(
      WHERE,
      `it is 0 everywhere from x = ${shortNumber(this.from)} to x = ${shortNumber(this.to)}`,
      'some height within the limits must be above 0',
    );
  }

  private acceptedTooRarely(promised: number, parts: readonly Part[]): InputError {
    const worst = parts.reduce((p, q) => (q.upperArea - q.lowerArea > p.upperArea - p.lowerArea ? q : p));
    return new InputError(
      WHERE,
      `only ${shortNumber(promised)} of proposals are sure to be accepted after ${MAX_PIECES} pieces (worst near x = ${shortNumber(worst.from)})`,
      'narrow the limits to where the density matters, or simplify the formula there',
    );
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

/** A part with no height. */
function nothing(from: number, to: number): Piece {
  const zero = { upperLeft: 0, upperRight: 0, lowerLeft: 0, lowerRight: 0 };
  return { from, to, ...zero, upperArea: 0, lowerArea: 0, areaLo: 0, areaHi: 0, least: 0 };
}
