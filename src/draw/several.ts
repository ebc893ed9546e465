/**
 * Exact draws of several variables: rows of one value a variable, each from its own numbers.
 *
 * An attempt picks a box by its share of the upper masses, then a place in it: even, or
 * along the exponential of a tangent plane by inversion, axis by axis. A height drawn
 * under the upper bound is accepted if it is under the density; below the share that the
 * density surely reaches nothing is evaluated. So row i is the same whatever the number of
 * rows. Rejection sampling: von Neumann (1951).
 * Not handled: one variable (column.ts), whose rows stay paired when the shape moves a
 * little; here they need not.
 */
import type { BoxEnvelope, ProvedBox } from '../envelope/boxes';
import { bug } from '../errors';
import { Encloser } from '../formula/enclose';
import type { Estimator } from '../formula/estimate';
import { estimatorOf } from '../formula/estimate';
import { evaluator } from '../formula/evaluate';
import type { Tape } from '../formula/tape';
import { Defined } from '../formula/operation';
import * as elementary from '../numeric/elementary';
import * as I from '../numeric/interval';
import { expm1, log1p } from '../numeric/special';
import type { Key } from '../random/key';
import { RowStream } from '../random/stream';
import { Picker } from './pick';

/** Drawn rows and what is needed to judge how they came about. */
export interface Rows {
  /** One column a variable. */
  readonly columns: readonly Float64Array[];
  readonly proposals: number;
  /** Rows accepted at their first proposal without evaluating the density. */
  readonly settledAtOnce: number;
  readonly longestWait: number;
  readonly nearTies: number;
}

/** One proposal of a row. */
interface BoxProposal {
  readonly row: number;
  readonly attempt: number;
  readonly place: readonly number[];
  /** The height drawn; NaN where none has to be. */
  readonly height: number;
  readonly isKept: boolean;
}

/** At an acceptance of 0.01 a row needs this many with a chance far below 10^-1000. */
const MAX_ATTEMPTS = 1_000_000;
/** Boxes that one number tells apart; more are told by two, so that shares keep their digits. */
const MOST_AT_ONCE = 4096;
/** Room for the rounding of an upper bound at a place. */
const ROUNDING = 1e-11;

/** Covers the rounding of the sum of an estimate and its bound. */
const SETTLED = 1 + 1e-15;

/** Numbers of an attempt: one for the box, one an axis, one for the height, and one more for the box where two are needed. */
const FOR_BOX = 1;

/** A formula at a place: quickly where that settles a question, else by its enclosure. */
interface AtPlace {
  readonly estimator: Estimator | null;
  readonly encloser: Encloser;
  readonly at: (...place: number[]) => number;
}

function atPlace(tape: Tape, exponent = 0): AtPlace {
  return {
    // Scaled heights are the encloser's business.
    estimator: exponent === 0 ? estimatorOf(tape) : null,
    encloser: new Encloser(tape, exponent),
    at: evaluator(tape),
  };
}

export class BoxDrawer {
  private readonly exponent: number;
  private readonly chooser: Chooser;
  private readonly conditions: readonly AtPlace[];
  private readonly rest: AtPlace | null;
  private readonly axes: readonly AxisPlaces[];
  /** Of every box, side by side: what the inner loop asks. */
  private readonly sure: Float64Array;
  private readonly upper: Float64Array;
  private readonly open: Int32Array;
  /** Null where no box has a plane. */
  private readonly planes: readonly ProvedBox['plane'][] | null;
  private readonly nNumbers: number;
  private readonly numbers: Float64Array;
  private readonly place: Float64Array;
  private readonly value = I.interval();
  private nearTies = 0;

  constructor(envelope: BoxEnvelope) {
    const { boxes, conditions, rest, exponent, space } = envelope;
    this.exponent = exponent;
    this.chooser = new Chooser(boxes.map(({ upperMass }) => upperMass));
    this.conditions = conditions.map(({ tape }) => atPlace(tape));
    this.rest = rest && atPlace(rest, exponent);
    this.axes = Array.from({ length: space.n }, (_, i) => new AxisPlaces(envelope, i));
    this.sure = Float64Array.from(boxes, ({ sure }) => sure);
    this.upper = Float64Array.from(boxes, ({ upper }) => upper);
    this.open = Int32Array.from(boxes, ({ open }) => open);
    const planes = boxes.map(({ plane }) => plane);
    this.planes = planes.some((plane) => plane !== null) ? planes : null;
    this.nNumbers = FOR_BOX + space.n + (this.chooser.needsTwo ? 2 : 1);
    this.numbers = new Float64Array(this.nNumbers + 1);
    this.place = new Float64Array(space.n);
  }

  /** Rows `first` … `first + n − 1` under a key. @throws {Error} on a breach, which no proof allows. */
  rows(key: Key, first: number, n: number, method = 0): Rows {
    const stream = new RowStream(key, method);
    const columns = this.axes.map(() => new Float64Array(n));
    this.nearTies = 0;
    let [proposals, settledAtOnce, longestWait] = [0, 0, 0];
    for (let i = 0; i < n; i++) {
      let attempt = 0;
      let verdict = this.attempt(stream, first + i, attempt);
      if (verdict === SURE) settledAtOnce++;
      while (verdict === REJECTED) {
        if (++attempt === MAX_ATTEMPTS)
          throw bug(`row ${first + i} found no place in ${MAX_ATTEMPTS} attempts`);
        verdict = this.attempt(stream, first + i, attempt);
      }
      proposals += attempt + 1;
      if (attempt >= longestWait) longestWait = attempt + 1;
      for (let j = 0; j < columns.length; j++) columns[j]![i] = this.place[j]!;
    }
    return { columns, proposals, settledAtOnce, longestWait, nearTies: this.nearTies };
  }

  /** Every proposal of rows `first` … `first + n − 1`, as `rows` makes them; null when there are more than `most`. */
  proposals(key: Key, first: number, n: number, most: number, method = 0): BoxProposal[] | null {
    const stream = new RowStream(key, method);
    const made: BoxProposal[] = [];
    for (let row = first; row < first + n; row++) {
      for (let attempt = 0, isKept = false; !isKept; attempt++) {
        if (made.length === most) return null;
        const verdict = this.attempt(stream, row, attempt);
        isKept = verdict !== REJECTED;
        const height = verdict === SURE ? NaN : this.drawnHeight;
        made.push({ row, attempt, place: Array.from(this.place), height, isKept });
      }
    }
    return made;
  }

  /** The density at a place, scaled by 2^-exponent; 0 where a condition fails. */
  densityAt(place: readonly number[]): number {
    for (const { at } of this.conditions) if (!(at(...place) > 0)) return 0;
    return this.heightThere(place);
  }

  private drawnHeight = NaN;

  private attempt(stream: RowStream, row: number, attempt: number): Verdict {
    const { numbers, axes, place } = this;
    const n = axes.length;
    stream.place(row, attempt, numbers, this.nNumbers);
    const at = this.chooser.choose(numbers[0]!, numbers[FOR_BOX + n + 1]!);
    for (let i = 0; i < n; i++) place[i] = axes[i]!.placeFor(at, numbers[FOR_BOX + i]!);
    const v = numbers[FOR_BOX + n]!;
    if (v < this.sure[at]!) return SURE;
    const upper = this.upperAt(at);
    this.drawnHeight = v * upper;
    return this.holds(this.open[at]!) && this.isUnder(v * upper, upper) ? KEPT : REJECTED;
  }

  private upperAt(box: number): number {
    const upper = this.upper[box]!;
    const plane = this.planes?.[box];
    if (!plane) return upper;
    const { slopes, centre } = plane;
    let rise = 0;
    for (let i = 0; i < this.place.length; i++) rise += slopes[i]! * (this.place[i]! - centre[i]!);
    return upper * elementary.exp(rise);
  }

  /** Whether all conditions of these bits hold at the place. */
  private holds(open: number): boolean {
    const { place, value } = this;
    for (let j = 0; j < this.conditions.length; j++) {
      if (!(open & (1 << j))) continue;
      const { estimator, encloser, at } = this.conditions[j]!;
      if (estimator) {
        estimator.estimate(place);
        if (estimator.value === 1) continue;
        if (estimator.value === 0) return false;
      }
      const state = encloser.densityAtPoint(place, value);
      if (state === Defined.Everywhere && value.lo === 1) continue;
      if (state === Defined.Everywhere && value.hi === 0) return false;
      // Too near to where it changes for its enclosure to tell: the doubles decide.
      this.nearTies++;
      if (!(at(...place) > 0)) return false;
    }
    return true;
  }

  private isUnder(height: number, upper: number): boolean {
    if (this.rest === null) return true;
    const { place, value } = this;
    const { estimator, encloser } = this.rest;
    if (estimator) {
      estimator.estimate(place);
      const { value: v, error } = estimator;
      // A height above the upper bound is looked at once more, by its enclosure.
      if (v - error >= height * SETTLED && v + error <= upper) return true;
      if (v + error < height / SETTLED) return false;
    }
    encloser.densityAtPoint(place, value);
    if (value.lo > upper * (1 + ROUNDING))
      throw bug(`breach: the density at ${Array.from(place).join(', ')} lies above the envelope`);
    if (value.lo >= height) return true;
    if (value.hi < height) return false;
    this.nearTies++;
    return this.heightThere(place) >= height;
  }

  private heightThere(place: ArrayLike<number>): number {
    if (this.rest === null) return 1;
    if (this.exponent === 0) return Math.max(0, this.rest.at(...Array.from(place)));
    this.rest.encloser.densityAtPoint(place, this.value);
    return Math.max(0, this.value.lo / 2 + this.value.hi / 2);
  }
}

/** How an attempt ended: accepted without evaluating the density, accepted, rejected. */
type Verdict = typeof SURE | typeof KEPT | typeof REJECTED;
const SURE = 2;
const KEPT = 1;
const REJECTED = 0;

/** Where a number in [0, 1) leads along one axis, for every box. */
class AxisPlaces {
  private readonly lo: Float64Array;
  private readonly hi: Float64Array;
  /** How far ln(upper bound) rises over the box; 0 for even places. */
  private readonly rise: Float64Array;
  /** e^-|rise| − 1. */
  private readonly fall: Float64Array;
  private readonly from: number;
  private readonly step: number;

  constructor({ boxes, axes }: BoxEnvelope, i: number) {
    ({ from: this.from, step: this.step } = axes[i]!);
    this.lo = Float64Array.from(boxes, ({ lo }) => lo[i]!);
    this.hi = Float64Array.from(boxes, ({ hi }) => hi[i]!);
    this.rise = Float64Array.from(boxes, ({ plane, lo, hi }) =>
      plane ? plane.slopes[i]! * (hi[i]! - lo[i]!) : 0,
    );
    this.fall = this.rise.map((rise) => expm1.at(-Math.abs(rise)));
  }

  placeFor(box: number, u: number): number {
    const lo = this.lo[box]!;
    const hi = this.hi[box]!;
    if (this.step > 0) {
      const value = lo + Math.floor(u * (hi - lo + 1));
      return this.from + Math.min(hi, value) * this.step;
    }
    const rise = this.rise[box]!;
    let t = u;
    if (rise !== 0) {
      // From the higher end down: t = −ln(1 + u(e^-|rise| − 1))/|rise|.
      const down = -log1p(u * this.fall[box]!) / Math.abs(rise);
      t = rise > 0 ? 1 - down : down;
    }
    return Math.min(hi, Math.max(lo, lo + (hi - lo) * t));
  }
}

/** Picks by shares of many weights: one number while there are few, then a group and one of it. */
class Chooser {
  private readonly outer: Picker;
  private readonly inner: readonly Picker[] | null;
  private readonly size: number;

  /** True if both numbers count. */
  get needsTwo(): boolean {
    return this.inner !== null;
  }

  constructor(weights: readonly number[]) {
    const isFew = weights.length <= MOST_AT_ONCE;
    this.size = isFew ? 1 : Math.ceil(Math.sqrt(weights.length));
    const groups: number[][] = [];
    for (let i = 0; i < weights.length; i += this.size)
      groups.push(weights.slice(i, i + this.size));
    this.inner = isFew ? null : groups.map((group) => new Picker(group));
    this.outer = new Picker(groups.map((group) => group.reduce((sum, weight) => sum + weight, 0)));
  }

  choose(u: number, v: number): number {
    const group = this.outer.pick(u);
    return this.inner ? group * this.size + this.inner[group]!.pick(v) : group;
  }
}
