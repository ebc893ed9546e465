/**
 * The mean of a quantity under a density of several variables, with proved bounds.
 *
 * E q = m + ∫(q − m)f / ∫f, m being about the mean; the limits are cut into boxes, and those that
 * leave most of ∫(q − m)f open are halved. Over a box with measure M that integral lies within
 * (range of q − m) · ∫f, which holds where conditions may fail too. Where none can, ∫qf and ∫f are
 * enclosed by the midpoint rule, one axis after the other: with widths w_i and c the middle
 *
 *      ∫p  ∈  M · (p(c) + Σ_i ½ s_i H_ii),   s_i = w_i²/12, the mean square of x_i − c_i,
 *
 * H_ii the second derivatives of p over the box in the axes up to i and at c in those after it:
 * p(x) − p(c) is the sum of what each axis adds, and its part linear in x_i − c_i cancels. Where
 * H_ii has no bound half the width of the slope's enclosure times the mean of |x_i − c_i| serves.
 * Over n counted values at a distance of h, s_i is h²(n² − 1)/12.
 * Source: derived here. Where the logarithm of f is smooth its tangent plane (envelope/plane.ts)
 * bounds ∫f as well, which is better where f falls steeply.
 * Not handled: digits beyond the proved bounds.
 */
import FlatQueue from 'flatqueue';
import type { BoxEnvelope, Joint } from '../envelope/boxes';
import { widest } from '../envelope/boxscale';
import { planeMasses, planeOver } from '../envelope/plane';
import { pointText } from '../envelope/boxrefusal';
import type { Box, Space } from '../envelope/space';
import { InputError } from '../errors';
import { Encloser } from '../formula/enclose';
import { Defined } from '../formula/operation';
import type { Tape } from '../formula/tape';
import { addDown, addUp, divDown, divUp, ulp } from '../numeric/float';
import * as I from '../numeric/interval';
import type { Expectation } from './expect';

/** Steps of formulas worked over boxes, and what a box costs besides: a second or two. */
const MAX_WORK = 3_000_000;
const WORK_OF_A_BOX = 40;
/** Covers the rounding of exponentials, products and sums behind a mass. */
const ROOM = 1e-11;
/** Refinement ends when the bounds are this near to each other, in units of the quantity's spread. */
const WANTED = 1e-6;

interface Part {
  readonly box: Box;
  readonly open: number;
  /** The range of the quantity. */
  readonly range: I.Interval;
  /** Enclosures of ∫f and, where no condition can fail, of ∫qf. */
  readonly mass: I.Interval;
  readonly moment: I.Interval | null;
  /** What the enclosures owe to the axes, for choosing where to halve; null where that is not known. */
  readonly owed: readonly number[] | null;
}

/** An integral over a box. */
interface Integral {
  readonly value: I.Interval;
  readonly owed: readonly number[];
}

/**
 * The mean of `quantity` under a proved density. `weighted` is quantity · rest as one formula.
 * @throws {InputError} when the quantity is undefined or has no bound where the density is above 0.
 */
export function boxExpectation(
  envelope: BoxEnvelope,
  quantity: Tape,
  weighted: Tape,
  where: string,
): Expectation {
  return new BoxExpecter(envelope, quantity, weighted, where).expect();
}

class BoxExpecter {
  private readonly space: Space;
  private readonly conditions: readonly Encloser[];
  private readonly quantity: Encloser;
  private readonly weighted: Encloser;
  private readonly rest: Encloser | null;
  private readonly queue = new FlatQueue<Part>();
  private readonly parts = new Set<Part>();
  private readonly term = I.interval();
  private readonly other = I.interval();
  private spent = 0;
  /** m of the header. */
  private centre = 0;

  constructor(
    private readonly envelope: BoxEnvelope,
    quantity: Tape,
    weighted: Tape,
    private readonly where: string,
  ) {
    const { space, exponent, conditions, rest }: BoxEnvelope & Joint = envelope;
    this.space = space;
    this.conditions = conditions.map(({ tape }) => new Encloser(tape));
    this.quantity = new Encloser(quantity);
    this.weighted = new Encloser(weighted, exponent);
    this.rest = rest && new Encloser(rest, exponent);
  }

  expect(): Expectation {
    const first = this.envelope.boxes.flatMap((box) => {
      const part = this.examine(box, box.open);
      if (part === null) return [];
      // The proof has bounds of its own.
      I.meet(part.mass, { lo: box.lowerMass, hi: box.upperMass });
      return [part];
    });
    this.centre = this.roughMean(first);
    let gap = 0;
    let mass = 0;
    for (const part of first) {
      gap += this.add(part);
      mass += middleOf(part.mass);
    }
    const scale = Math.max(1e-300, Math.abs(this.centre)) * Math.max(1e-300, mass);
    while (this.spent < MAX_WORK && gap > WANTED * scale) {
      const part = this.queue.pop();
      if (part === undefined) break;
      const axis = this.axisOf(part);
      if (axis < 0) continue;
      this.parts.delete(part);
      gap -= this.gapOf(part);
      for (const half of this.space.halves(part.box, axis)) {
        const next = this.examine(half, part.open);
        if (next !== null) gap += this.add(next);
      }
    }
    return this.answer();
  }

  /** The quantity at the middle of its range in every box, weighted by the boxes' masses. */
  private roughMean(parts: readonly Part[]): number {
    let [moment, mass] = [0, 0];
    for (const part of parts) {
      const weight = middleOf(part.mass);
      moment += middleOf(part.range) * weight;
      mass += weight;
    }
    return Number.isFinite(moment / mass) ? moment / mass : 0;
  }

  private answer(): Expectation {
    const { centre } = this;
    // ∫(q − m)f, box by box, so that what is sure of both is not lost.
    const [mass, offset] = [I.interval(0), I.interval(0)];
    for (const part of this.parts) {
      I.add(mass, mass, part.mass);
      this.offsetOf(part, this.term);
      I.add(offset, offset, this.term);
    }
    const massLo = Math.max(mass.lo, this.envelope.lowerMass);
    const massHi = Math.min(mass.hi, this.envelope.upperMass);
    const { lo, hi } = offset;
    const atLeast = addDown(centre, lo < 0 ? divDown(lo, massLo) : divDown(lo, massHi));
    const atMost = addUp(centre, hi > 0 ? divUp(hi, massLo) : divUp(hi, massHi));
    return { value: Math.min(atMost, Math.max(atLeast, this.likely())), atLeast, atMost };
  }

  /** The mean by the midpoint rule with the second derivatives at the middles, which is no proof. */
  private likely(): number {
    const { centre, rest, term } = this;
    let [mass, offset] = [0, 0];
    for (const part of this.parts) {
      this.offsetOf(part, term);
      const [lo, hi] = [term.lo, term.hi];
      let ownMass = middleOf(part.mass);
      let own = middleOf(term);
      if (part.open === 0 && part.moment !== null) {
        if (rest) ownMass = within(part.mass, this.estimate(rest, part.box));
        const about = this.estimate(this.weighted, part.box) - centre * ownMass;
        own = within({ lo, hi }, about);
      }
      mass += ownMass;
      offset += own;
    }
    return centre + offset / mass;
  }

  /** The integral of a formula over a box, about; not a number where that cannot be told. */
  private estimate(encloser: Encloser, box: Box): number {
    const { space } = this;
    const { lo, hi } = space.corners(box);
    const centre = lo.map((end, i) => end + (hi[i]! - end) / 2);
    const measure = space.measure(box);
    let mean = 0;
    for (let i = 0; i < space.n; i++) {
      const { v, h } = encloser.overBox(centre, centre, [i]).density;
      if (i === 0) mean += middleOf(v);
      if (isBounded(h)) mean += middleOf(h) * this.halfSquare(box, i);
    }
    return mean * (measure.lo / 2 + measure.hi / 2);
  }

  /** Half the mean square of the distance from the middle along an axis. */
  private halfSquare(box: Box, i: number): number {
    const { lo, hi } = this.space.corners(box);
    const width = hi[i]! - lo[i]!;
    if (!this.space.isCounted(i)) return (width * width) / 24;
    const n = box.hi[i]! - box.lo[i]! + 1;
    return n === 1 ? 0 : ((width * width) / 24) * ((n + 1) / (n - 1));
  }

  /** Keeps a part; gives what it leaves open. */
  private add(part: Part): number {
    this.parts.add(part);
    const gap = this.gapOf(part);
    if (gap > 0) this.queue.push(part, -gap);
    return gap;
  }

  /** Encloses ∫(q − m)f over a part. */
  private offsetOf({ range, mass, moment }: Part, out: I.Interval): void {
    const { centre, other } = this;
    I.set(other, centre, centre);
    I.subtract(out, range, other);
    I.multiply(out, out, mass);
    if (moment === null) return;
    I.scale(other, mass, -centre);
    I.add(other, moment, other);
    I.meet(out, other);
  }

  private gapOf(part: Part): number {
    this.offsetOf(part, this.term);
    return this.term.hi - this.term.lo;
  }

  private axisOf({ box, owed }: Part): number {
    const { space } = this;
    let best = -1;
    for (let i = 0; owed !== null && i < space.n; i++) {
      if (!space.isDivisible(box, i) || !(owed[i]! > 0)) continue;
      if (best < 0 || owed[i]! > owed[best]!) best = i;
    }
    return best < 0 ? widest(space, box) : best;
  }

  /** What is known over a box; null where the density surely is 0. */
  private examine(box: Box, open: number): Part | null {
    const { lo, hi } = this.space.corners(box);
    let left = open;
    for (let j = 0; j < this.conditions.length; j++) {
      if (!(open & (1 << j))) continue;
      this.spent += this.conditions[j]!.nSteps;
      const { density, defined } = this.conditions[j]!.overBox(lo, hi, []);
      if (defined === Defined.Everywhere && density.v.hi === 0) return null;
      if (defined === Defined.Everywhere && density.v.lo === 1) left &= ~(1 << j);
    }
    this.spent += WORK_OF_A_BOX;
    const density = this.rest ? this.integral(this.rest, box, left) : this.measure(box, left);
    if (density === null) throw this.refused(box);
    const mass = density.value;
    if (mass.lo < 0) mass.lo = 0;
    if (mass.hi <= 0) return null;
    if (left === 0 && this.rest) this.meetPlane(mass, this.rest, box);
    const moment = left === 0 ? this.integral(this.weighted, box, 0) : null;
    this.spent += this.quantity.nSteps;
    const { density: q, defined } = this.quantity.overBox(lo, hi, []);
    const range = I.interval();
    if (defined === Defined.Everywhere) I.copy(range, q.v);
    else I.setEntire(range);
    if (!isBounded(range) && moment === null) {
      const most = left === 0 ? null : this.integral(this.weighted, box, left);
      if (most === null) throw this.refused(box);
      return { box, open: left, range, mass, moment: most.value, owed: null };
    }
    const owed =
      moment && moment.owed.map((each, i) => each + Math.abs(this.centre) * density.owed[i]!);
    return { box, open: left, range, mass, moment: moment && moment.value, owed };
  }

  /** Tightens the mass of a box by the tangent plane of ln f, if there is one. */
  private meetPlane(mass: I.Interval, rest: Encloser, box: Box): void {
    const { space, envelope } = this;
    if (space.axes.some((_, i) => space.isCounted(i)) || mass.lo === mass.hi) return;
    const plane = planeOver(space, box, rest);
    this.spent += rest.nSteps * (space.n + (space.n * (space.n + 1)) / 2);
    if (plane === null) return;
    const { lowerMass, upperMass } = planeMasses(space, box, plane, envelope.exponent);
    I.meet(mass, { lo: lowerMass, hi: upperMass });
  }

  private measure(box: Box, open: number): Integral {
    const { lo, hi } = this.space.measure(box);
    return { value: I.interval(open === 0 ? lo : 0, hi), owed: box.lo.map(() => 0) };
  }

  /** Encloses the integral of a formula over a box; null where it is undefined or has no bound. */
  private integral(encloser: Encloser, box: Box, open: number): Integral | null {
    const { space } = this;
    const { lo, hi } = space.corners(box);
    this.spent += encloser.nSteps;
    const { density, defined } = encloser.overBox(lo, hi, []);
    const { v } = density;
    if (defined !== Defined.Everywhere || !isBounded(v)) return null;
    const measure = space.measure(box);
    const size = I.interval(measure.lo, measure.hi);
    const range = I.interval(v.lo, v.hi);
    if (open !== 0) I.hull(range, range, I.interval(0));
    const value = I.interval();
    I.multiply(value, range, size);
    const owed = box.lo.map(() => 0);
    if (open === 0 && v.lo !== v.hi) this.tighten(value, owed, encloser, box, size);
    return { value, owed };
  }

  /** By the midpoint rule, one axis after the other; sets what each leaves open. */
  private tighten(
    out: I.Interval,
    owed: number[],
    encloser: Encloser,
    box: Box,
    size: I.Interval,
  ): void {
    const { space, term } = this;
    const { lo, hi } = space.corners(box);
    const centre = lo.map((end, i) => end + (hi[i]! - end) / 2);
    const mean = I.interval();
    this.spent += encloser.nSteps;
    I.copy(mean, encloser.overBox(centre, centre, []).density.v);
    const [from, to] = [[...centre], [...centre]];
    for (let i = 0; i < space.n; i++) {
      if (!(hi[i]! > lo[i]!)) continue;
      [from[i], to[i]] = [lo[i]!, hi[i]!];
      this.spent += encloser.nSteps;
      const { d, h } = encloser.overBox(from, to, [i]).density;
      if (!isBounded(d)) {
        // What this axis adds has no bound of its own: the range serves.
        owed.fill(0);
        return;
      }
      const width = hi[i]! - lo[i]!;
      const nValues = space.isCounted(i) ? box.hi[i]! - box.lo[i]! + 1 : Infinity;
      const away = (width / 4) * (nValues < Infinity ? nValues / (nValues - 1) : 1) * (1 + ROOM);
      const reach = ((d.hi - d.lo) / 2) * away * (1 + ROOM);
      // The middle is a double: it is off by so much at most.
      const off = 2 * ulp(Math.max(Math.abs(lo[i]!), Math.abs(hi[i]!))) * largest(d);
      I.set(term, -reach, reach);
      if (isBounded(h)) {
        const bend = I.interval();
        I.scale(bend, h, this.halfSquare(box, i));
        widen(bend, ROOM);
        I.meet(term, bend);
      }
      I.set(term, term.lo - off, term.hi + off);
      owed[i] = (term.hi - term.lo) * size.hi;
      I.add(mean, mean, term);
    }
    I.multiply(mean, mean, size);
    if (isBounded(mean)) I.meet(out, mean);
  }

  private refused(box: Box): InputError {
    const centre = this.space.centre(box);
    const { lo, hi } = this.space.corners(box);
    const { defined } = this.quantity.overBox(lo, hi, []);
    const place = pointText(this.space.axes, centre);
    return defined === Defined.Everywhere
      ? new InputError(
          this.where,
          `it cannot be bounded near ${place}`,
          'cap it with MIN or MAX, or give limits that leave the place out',
        )
      : new InputError(
          this.where,
          `it is undefined near ${place}, where ${this.quantity.undefinedReason()}`,
          'keep the limits where it is defined, or give it a value there with IF',
        );
  }
}

function middleOf({ lo, hi }: I.Interval): number {
  return lo / 2 + hi / 2;
}

/** A number put within an interval; its middle for no number. */
function within(bounds: I.Interval, x: number): number {
  return x === x ? Math.min(bounds.hi, Math.max(bounds.lo, x)) : middleOf(bounds);
}

function widen(out: I.Interval, share: number): void {
  I.set(out, out.lo - Math.abs(out.lo) * share, out.hi + Math.abs(out.hi) * share);
}

function largest({ lo, hi }: I.Interval): number {
  return Math.max(Math.abs(lo), Math.abs(hi));
}

function isBounded({ lo, hi }: I.Interval): boolean {
  return lo > -Infinity && hi < Infinity;
}
