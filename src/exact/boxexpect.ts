/**
 * The mean of a quantity under a density of several variables, with proved bounds.
 *
 * Where ln f has a tangent plane over a box (envelope/plane.ts), the mass and the means of the
 * axes under the plane's own exponential are elementary; the remainder R of ln f and that of
 * the quantity's own plane, both of second order in the box's widths, bound the rest. Elsewhere:
 * Over a box around c, with widths w and second derivatives H of p, ∫p lies in
 * measure · (p(c) + Σ H_ii w_i²/24 + Σ_{i<j} |H_ij| w_i w_j/16 · [−1, 1]): the linear part
 * cancels. Where p has no second derivatives its range is used, where a condition may fail
 * the range together with 0. Both ∫qf and ∫f are enclosed so, box by box, and the boxes that
 * leave most of ∫(q − m)f open are halved, m being about the mean; E q = m + ∫(q − m)f / ∫f.
 * Source: derived here (midpoint rule with its remainder). Over counted axes ∫ is a sum, and
 * the linear part only cancels for boxes of one value along them; others use the range.
 * Not handled: digits beyond the proved bounds.
 */
import FlatQueue from 'flatqueue';
import type { BoxEnvelope, Joint } from '../envelope/boxes';
import { widest } from '../envelope/boxscale';
import { planeOver, tiltedMean, tiltedPlace } from '../envelope/plane';
import * as elementary from '../numeric/elementary';
import { pointText } from '../envelope/boxrefusal';
import type { Box, Space } from '../envelope/space';
import { InputError } from '../errors';
import { Encloser } from '../formula/enclose';
import { Defined } from '../formula/operation';
import type { Tape } from '../formula/tape';
import { addDown, addUp, divDown, divUp } from '../numeric/float';
import * as I from '../numeric/interval';
import type { Expectation } from './expect';

/** Steps of formulas worked over boxes, and what a box costs besides: a second or two. */
const MAX_WORK = 3_000_000;
const WORK_OF_A_BOX = 40;
const LN_2 = 0.6931471805599453;
/** Covers the rounding of exponentials, products and sums behind a mass. */
const ROOM = 1e-11;
/** Refinement ends when the bounds are this near to each other, in units of the quantity's spread. */
const WANTED = 1e-6;

interface Part {
  readonly box: Box;
  readonly open: number;
  /** Enclosures of ∫qf and ∫f over the box. */
  readonly moment: I.Interval;
  readonly mass: I.Interval;
  readonly gap: number;
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
  private readonly bend = I.interval();
  private readonly term = I.interval();
  private spent = 0;
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
    const { boxes } = this.envelope;
    const first = boxes.map((box) => this.examine(box, box.open)).filter((part) => part !== null);
    const sums = this.sums(first);
    this.centre = middleOf(sums.moment) / middleOf(sums.mass);
    if (!Number.isFinite(this.centre)) this.centre = 0;
    for (const part of first) this.add({ ...part, gap: this.gapOf(part) });
    let gap = first.reduce((sum, part) => sum + this.gapOf(part), 0);
    const scale = Math.max(1e-300, Math.abs(this.centre)) * Math.max(1e-300, middleOf(sums.mass));
    while (this.spent < MAX_WORK && gap > WANTED * scale) {
      const part = this.queue.pop();
      if (part === undefined) break;
      const axis = widest(this.space, part.box);
      if (axis < 0) continue;
      this.parts.delete(part);
      gap -= part.gap;
      for (const half of this.space.halves(part.box, axis)) {
        const next = this.examine(half, part.open);
        if (next === null) continue;
        this.add(next);
        gap += next.gap;
      }
    }
    return this.answer();
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
    const value = centre + middleOf(offset) / middleOf(mass);
    return { value: Math.min(atMost, Math.max(atLeast, value)), atLeast, atMost };
  }

  private add(part: Part): void {
    this.parts.add(part);
    if (part.gap > 0) this.queue.push(part, -part.gap);
  }

  private sums(parts: readonly Part[]): { moment: I.Interval; mass: I.Interval } {
    const sums = { moment: I.interval(0), mass: I.interval(0) };
    for (const { moment, mass } of parts) {
      I.add(sums.moment, sums.moment, moment);
      I.add(sums.mass, sums.mass, mass);
    }
    return sums;
  }

  private offsetOf({ moment, mass }: Pick<Part, 'moment' | 'mass'>, out: I.Interval): void {
    I.scale(out, mass, -this.centre);
    I.add(out, moment, out);
  }

  private gapOf(part: Pick<Part, 'moment' | 'mass'>): number {
    this.offsetOf(part, this.term);
    return this.term.hi - this.term.lo;
  }

  /** Both integrals over a box; null where the density surely is 0. */
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
    const smooth = this.rest && this.byPlane(this.rest, box, left);
    const moment = smooth ? smooth.moment : this.integral(this.weighted, box, left);
    const mass = smooth
      ? smooth.mass
      : this.rest
        ? this.integral(this.rest, box, left)
        : this.measure(box, left);
    if (moment === null || mass === null) throw this.refused(box);
    if (mass.lo < 0) mass.lo = 0;
    if (mass.hi === 0) return null;
    const part = { box, open: left, moment, mass };
    return { ...part, gap: this.gapOf(part) };
  }

  /** Both integrals by tangent planes of ln f and of the quantity; null where either has none. */
  private byPlane(
    rest: Encloser,
    box: Box,
    open: number,
  ): { readonly moment: I.Interval; readonly mass: I.Interval } | null {
    const { space } = this;
    if (space.axes.some((_, i) => space.isCounted(i))) return null;
    const plane = planeOver(space, box, rest);
    const flat = plane && this.quantityOver(box);
    if (!plane || !flat) return null;
    const { slopes, at, logLo, logHi, meanLo } = plane;
    const widths = slopes.map((_, i) => box.hi[i]! - box.lo[i]!);
    const measure = space.measure(box);
    const shift = this.envelope.exponent * LN_2;
    const share = slopes.reduce((product, g, i) => product * tiltedMean(g * widths[i]!), 1);
    const whole = (log: number, sign: 1 | -1): number =>
      elementary.exp(log - shift) *
      share *
      (sign > 0 ? measure.hi : measure.lo) *
      (1 + sign * ROOM);
    const mass = I.interval(open === 0 ? whole(meanLo, -1) : 0, whole(logHi, 1));
    if (!(mass.hi < Infinity)) return null;
    const moment = I.interval();
    I.multiply(moment, flat.range, mass);
    if (open !== 0) I.hull(moment, moment, I.interval(0));
    else {
      // q(c)·∫f + Σ g_i ∫ξ_i f + the quantity's own remainder.
      const open2 = whole(logHi, 1) - whole(logLo, -1);
      const base = whole(at.lo / 2 + at.hi / 2, 1);
      const better = I.interval();
      I.multiply(better, flat.value, mass);
      let [linear, room] = [0, flat.remainder * mass.hi];
      slopes.forEach((g, i) => {
        const mean = tiltedPlace(g * widths[i]!) * widths[i]! * base;
        linear += flat.slopes[i]! * mean;
        room += Math.abs(flat.slopes[i]!) * widths[i]! * (open2 / 2 + ROOM * base);
      });
      room = (room + Math.abs(linear) * ROOM) * (1 + ROOM);
      I.add(better, better, I.interval(linear - room, linear + room));
      if (better.lo === better.lo && better.hi === better.hi) I.meet(moment, better);
    }
    return { moment, mass };
  }

  /** The quantity over a box: its range, and its tangent plane with a bound of what that leaves. */
  private quantityOver(box: Box): {
    readonly range: I.Interval;
    readonly value: I.Interval;
    readonly slopes: readonly number[];
    readonly remainder: number;
  } | null {
    const { space, quantity } = this;
    const { lo, hi } = space.corners(box);
    const centre = space.centre(box);
    const radii = centre.map((c, i) => Math.max(c - lo[i]!, hi[i]! - c) * (1 + ROOM));
    const n = space.n;
    this.spent += quantity.nSteps * (n + (n * (n + 1)) / 2);
    const bends: I.Interval[] = [];
    const slopes: number[] = [];
    const range = I.interval();
    const value = I.interval();
    let remainder = 0;
    for (let i = 0; i < n; i++) {
      const { density, defined } = quantity.overBox(lo, hi, [i]);
      const { v, h } = density;
      if (defined !== Defined.Everywhere || !isBounded(v) || !isBounded(h)) return null;
      if (i === 0) I.copy(range, v);
      bends.push(I.interval(h.lo, h.hi));
      remainder += (largest(h) / 2) * radii[i]! * radii[i]!;
    }
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < i; j++) {
        I.copy(this.bend, quantity.overBox(lo, hi, [i, j]).density.h);
        if (!isBounded(this.bend)) return null;
        I.subtract(this.bend, this.bend, bends[i]!);
        I.subtract(this.bend, this.bend, bends[j]!);
        remainder += (largest(this.bend) / 2) * radii[i]! * radii[j]!;
      }
    }
    for (let i = 0; i < n; i++) {
      const { density } = quantity.overBox(centre, centre, [i]);
      if (i === 0) I.copy(value, density.v);
      const slope = density.d.lo / 2 + density.d.hi / 2;
      slopes.push(slope);
      remainder += (density.d.hi - density.d.lo) * radii[i]!;
    }
    return { range, value, slopes, remainder: remainder * (1 + ROOM) };
  }

  private measure(box: Box, open: number): I.Interval {
    const { lo, hi } = this.space.measure(box);
    return I.interval(open === 0 ? lo : 0, hi);
  }

  /** Encloses the integral of a formula over a box; null where it is undefined or has no bound. */
  private integral(encloser: Encloser, box: Box, open: number): I.Interval | null {
    const { space } = this;
    const { lo, hi } = space.corners(box);
    this.spent += encloser.nSteps;
    const { density, defined } = encloser.overBox(lo, hi, []);
    const { v } = density;
    if (defined !== Defined.Everywhere || !(v.lo > -Infinity && v.hi < Infinity)) return null;
    const measure = space.measure(box);
    const size = I.interval(measure.lo, measure.hi);
    const range = I.interval(v.lo, v.hi);
    if (open !== 0) I.hull(range, range, I.interval(0));
    const out = I.interval();
    I.multiply(out, range, size);
    if (open === 0 && v.lo !== v.hi) this.tighten(out, encloser, box, size);
    return out;
  }

  /** By the midpoint rule with its remainder, where there are second derivatives. */
  private tighten(out: I.Interval, encloser: Encloser, box: Box, size: I.Interval): void {
    const { space, bend, term } = this;
    const n = space.n;
    const { lo, hi } = space.corners(box);
    const wide = Array.from({ length: n }, (_, i) => i).filter((i) => hi[i]! > lo[i]!);
    if (wide.some((i) => space.isCounted(i))) return;
    const centre = space.centre(box);
    const mean = I.interval();
    this.spent += encloser.nSteps * (1 + (wide.length * (wide.length + 1)) / 2);
    I.copy(mean, encloser.overBox(centre, centre, []).density.v);
    const bends = new Map<number, I.Interval>();
    for (const i of wide) {
      const { h, d } = encloser.overBox(lo, hi, [i]).density;
      if (!(h.lo > -Infinity && h.hi < Infinity)) return;
      bends.set(i, I.interval(h.lo, h.hi));
      const width = addUp(hi[i]!, -lo[i]!);
      I.scale(term, h, (width * width) / 24);
      // The factor w²/24 is rounded; so is the centre, which leaves a little of the slope.
      widen(term, 1e-14);
      I.add(mean, mean, term);
      const off = Math.abs(centre[i]! - lo[i]! - (hi[i]! - centre[i]!)) / 2;
      const slope = Math.max(Math.abs(d.lo), Math.abs(d.hi));
      if (off > 0) I.add(mean, mean, I.interval(-slope * off * 1.01, slope * off * 1.01));
    }
    for (const [k, i] of wide.entries()) {
      for (const j of wide.slice(0, k)) {
        I.copy(bend, encloser.overBox(lo, hi, [i, j]).density.h);
        if (!(bend.lo > -Infinity && bend.hi < Infinity)) return;
        I.subtract(bend, bend, bends.get(i)!);
        I.subtract(bend, bend, bends.get(j)!);
        const most = Math.max(Math.abs(bend.lo), Math.abs(bend.hi)) / 2;
        const area = addUp(hi[i]!, -lo[i]!) * addUp(hi[j]!, -lo[j]!);
        const reach = ((most * area) / 16) * (1 + 1e-12);
        I.add(mean, mean, I.interval(-reach, reach));
      }
    }
    I.multiply(mean, mean, size);
    if (mean.lo === mean.lo && mean.hi === mean.hi) I.meet(out, mean);
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

function widen(out: I.Interval, share: number): void {
  I.set(out, out.lo - Math.abs(out.lo) * share, out.hi + Math.abs(out.hi) * share);
}

function largest({ lo, hi }: I.Interval): number {
  return Math.max(Math.abs(lo), Math.abs(hi));
}

function isBounded({ lo, hi }: I.Interval): boolean {
  return lo > -Infinity && hi < Infinity;
}
