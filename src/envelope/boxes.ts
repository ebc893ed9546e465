/**
 * Proves a density of several variables: the limits are cut into boxes, each with a proved
 * upper bound, constant or the exponential of a tangent plane, and a proved lower one.
 *
 * The box with the largest gap between its bounds is halved, along the axis that leaves
 * least open, until the lower bounds hold 0.99 of the upper ones or a budget of boxes and
 * steps is spent. Boxes in which a condition surely fails are left out; where all hold and
 * nothing else is asked, upper and lower bound are one. The refinement depends on the shape
 * alone, never on the number of rows or a clock; it can be run in slices.
 * Source: branch and prune over interval bounds; src/METHOD.md, "Boxes".
 * Not handled: unbounded limits, kinks cut out by themselves.
 * The file is long because it is one algorithm.
 */
import FlatQueue from 'flatqueue';
import type { Axis } from '../density/limits';
import { InputError } from '../errors';
import { Encloser } from '../formula/enclose';
import { Defined } from '../formula/operation';
import type { Tape } from '../formula/tape';
import * as elementary from '../numeric/elementary';
import { addDown, addUp, mulDown, mulUp, powerOfTwo } from '../numeric/float';
import * as I from '../numeric/interval';
import { shortNumber } from '../numeric/text';
import { findBoxExponent } from './boxscale';
import * as refusal from './boxrefusal';
import { LEAST_ACCEPTANCE, WANTED_ACCEPTANCE } from './prove';
import type { Plane } from './plane';
import { planeMasses, planeOver } from './plane';
import type { Box } from './space';
import { Space } from './space';

interface Condition {
  readonly text: string;
  /** The sides of an equation; null for any other condition. */
  readonly sides: readonly [left: string, right: string] | null;
  readonly tape: Tape;
}

/** What is to be proved: a product of conditions and, if there is more, a formula. */
export interface Joint {
  readonly axes: readonly Axis[];
  readonly conditions: readonly Condition[];
  /** The density where all conditions hold; null stands for 1. */
  readonly rest: Tape | null;
}

export interface ProvedBox extends Box {
  /** The conditions that may fail in it, a bit each. */
  readonly open: number;
  /** Bounds of the density; `upper` is what heights are drawn under at the centre of a plane, everywhere else. */
  readonly upper: number;
  readonly lower: number;
  /** The slopes of ln(upper bound) and where they start from; null for a constant. */
  readonly plane: { readonly centre: readonly number[]; readonly slopes: readonly number[] } | null;
  /** A share of the upper bound that the density surely reaches all over the box. */
  readonly sure: number;
  readonly upperMass: number;
  readonly lowerMass: number;
}

export interface BoxEnvelope extends Joint {
  readonly space: Space;
  readonly boxes: readonly ProvedBox[];
  /** Heights and masses are those of the density × 2^-exponent. */
  readonly exponent: number;
  readonly upperMass: number;
  readonly lowerMass: number;
  readonly notes: readonly string[];
}

/** Most boxes for 1, 2, 3 … variables. */
const MAX_BOXES = [4096, 16384, 16384, 16384, 32768, 65536];
/** With more boxes a lower acceptance will do: the rest costs more to prove than to draw. */
const ENOUGH = [
  { boxes: 8192, acceptance: 0.8 },
  { boxes: 4096, acceptance: 0.9 },
  { boxes: 2048, acceptance: 0.95 },
  { boxes: 0, acceptance: WANTED_ACCEPTANCE },
];
/** Steps of formulas worked over boxes, after which refinement ends: some seconds. */
const MAX_WORK = 12_000_000;
/** A sign that cannot be settled is taken for rounding up to this share of the peak. */
const SIGN_TOLERANCE = 1e-12;
const MAX_SIGN_STEPS = 20_000;
/** What is undefined in part and smaller than this share of the limits is within rounding. */
const NEGLIGIBLE = powerOfTwo(-42);

interface Part {
  readonly box: ProvedBox;
  readonly defined: Defined;
  /** What the bounds owe to each axis; null where nothing tells. */
  readonly owed: readonly number[] | null;
  readonly least: number;
}

/** Proves the joint density. @throws {InputError} as BoxProver.result. */
export function proveBoxes(joint: Joint): BoxEnvelope {
  const prover = new BoxProver(joint);
  while (!prover.isDone) prover.work(MAX_WORK);
  return prover.result();
}

export class BoxProver {
  private readonly space: Space;
  private readonly conditions: readonly Encloser[];
  private readonly rest: Encloser | null;
  private readonly urgent = new FlatQueue<Part>();
  private readonly byGap = new FlatQueue<Part>();
  private readonly parts = new Set<Part>();
  /** Urgent parts as small as doubles allow. */
  private readonly stuck: Part[] = [];
  private readonly notes: string[] = [];
  private readonly exponent: number;
  private readonly maxBoxes: number;
  private readonly wholeMeasure: number;
  private readonly height = I.interval();
  private upperMass = 0;
  private lowerMass = 0;
  private largestMass = 0;
  private dropped = 0;
  private peak = 0;
  private spent = 0;
  isDone = false;

  /** @throws {InputError} for a density that the first look already refuses. */
  constructor(private readonly joint: Joint) {
    this.space = new Space(joint.axes);
    this.conditions = joint.conditions.map(({ tape }) => new Encloser(tape));
    const plain = joint.rest && new Encloser(joint.rest);
    this.exponent = plain ? findBoxExponent(this.space, plain) : 0;
    this.rest = plain && this.exponent !== 0 ? new Encloser(joint.rest, this.exponent) : plain;
    this.maxBoxes = MAX_BOXES[this.space.n - 1]!;
    const whole = this.space.whole();
    this.wholeMeasure = this.space.measure(whole).hi;
    this.add(whole, (1 << this.conditions.length) - 1);
  }

  /** Refines until it is done or about so many steps of formulas have been worked. */
  work(steps: number): void {
    const until = this.spent + steps;
    while (!this.isDone && this.spent < until) this.refineOnce();
  }

  private refineOnce(): void {
    const isSpent = this.parts.size >= this.maxBoxes || this.spent >= MAX_WORK;
    const wanted = ENOUGH.find(({ boxes }) => this.parts.size >= boxes)!.acceptance;
    const isGood = this.urgent.length === 0 && this.lowerMass >= wanted * this.upperMass;
    const part = isSpent || isGood ? undefined : (this.urgent.pop() ?? this.byGap.pop());
    if (part === undefined) {
      this.isDone = true;
      return;
    }
    if (!this.parts.has(part)) return;
    const axis = this.axisOf(part);
    if (axis < 0) {
      if (isUrgent(part)) this.stuck.push(part);
      return;
    }
    this.remove(part);
    for (const half of this.space.halves(part.box, axis)) this.add(half, part.box.open);
    if (this.upperMass < this.largestMass / 1000) this.sumAfresh();
  }

  /** @throws {InputError} when the density is negative, zero everywhere, undefined or unbounded somewhere, or accepted too rarely. */
  result(): BoxEnvelope {
    this.leaveOutStuck();
    const left = this.urgent.pop();
    if (left) this.refuseUrgent(left);
    this.settleSigns();
    this.sumAfresh();
    const parts = [...this.parts].filter(({ box }) => box.upperMass > 0);
    if (parts.length === 0 || this.upperMass === 0) throw refusal.emptyRegion(this.joint.axes);
    const promised = this.lowerMass / this.upperMass;
    const boxes = parts.map(({ box }) => box).sort(byPlace);
    if (promised < LEAST_ACCEPTANCE) throw this.tooRare(boxes, promised);
    if (promised < WANTED_ACCEPTANCE) {
      this.notes.push(
        `the proof promises an acceptance of ${shortNumber(promised)} after ${boxes.length} boxes; the draws are exact all the same`,
      );
    }
    const { space, exponent, upperMass, lowerMass, notes } = this;
    return { ...this.joint, space, boxes, exponent, upperMass, lowerMass, notes };
  }

  /** Proved bounds of the mass as they stand. */
  bounds(): { readonly lower: number; readonly upper: number } {
    this.sumAfresh();
    return { lower: this.lowerMass, upper: this.upperMass };
  }

  /** Drops what is undefined in part and holds next to nothing. @throws {InputError} where it may hold more. */
  private leaveOutStuck(): void {
    let mass = 0;
    for (const part of this.stuck) {
      mass = addUp(mass, part.box.upperMass);
      if (!(mass <= NEGLIGIBLE * this.lowerMass)) this.refuseUrgent(part);
      this.parts.delete(part);
    }
  }

  private tooRare(boxes: readonly ProvedBox[], promised: number): InputError {
    const equation = this.joint.conditions.find(
      ({ sides }, j) => sides !== null && boxes.every(({ open }) => open & (1 << j)),
    );
    return equation
      ? refusal.holdsOnNoVolume(equation.text, ...equation.sides!)
      : refusal.acceptedTooRarely(this.space, boxes, promised);
  }

  private add(box: Box, open: number): void {
    const part = this.examine(box, open);
    if (part === null) return;
    this.parts.add(part);
    const { upperMass, lowerMass } = part.box;
    const { hi: measure } = this.space.measure(box);
    if (isUrgent(part)) {
      this.urgent.push(part, -measure);
      return;
    }
    this.upperMass += upperMass;
    this.lowerMass += lowerMass;
    this.largestMass = Math.max(this.largestMass, this.upperMass);
    if (upperMass > lowerMass) this.byGap.push(part, lowerMass - upperMass);
  }

  private remove(part: Part): void {
    this.parts.delete(part);
    if (isUrgent(part)) return;
    this.upperMass -= part.box.upperMass;
    this.lowerMass -= part.box.lowerMass;
  }

  private sumAfresh(): void {
    [this.upperMass, this.lowerMass] = [0, 0];
    for (const part of this.parts) {
      if (isUrgent(part)) continue;
      const { box } = part;
      this.upperMass = addUp(this.upperMass, box.upperMass);
      this.lowerMass = addDown(this.lowerMass, box.lowerMass);
    }
    this.largestMass = this.upperMass;
  }

  /** What is known over a box; null where the density surely is 0. */
  private examine(box: Box, open: number): Part | null {
    const corners = this.space.corners(box);
    const conditions = this.settle(corners, open);
    if (conditions === null) return null;
    const { rest } = this;
    const measure = this.space.measure(box);
    if (rest === null) return this.region(box, conditions, measure);
    this.spent += rest.nSteps;
    const { density, defined: ofRest } = rest.overBox(corners.lo, corners.hi, []);
    const defined = Math.max(conditions.defined, ofRest) as Defined;
    if (ofRest === Defined.Nowhere) {
      if (conditions.open === 0 && conditions.defined === Defined.Everywhere)
        return this.nowhere(box, rest.undefinedReason());
      // Where a condition may fail smaller boxes will tell.
      return this.bounded(box, conditions.open, Defined.InPart, density.v, 0);
    }
    const least = density.v.lo;
    const v = I.interval(density.v.lo, density.v.hi);
    if (ofRest === Defined.Everywhere && v.hi <= 0) {
      if (conditions.open === 0 && least < 0) {
        // A box that only touches 0 is not 0: at its centre it shows.
        rest.densityAtPoint(this.space.centre(box), this.height);
        if (this.height.hi < 0) throw this.negative(box);
      }
      if (least >= 0) return null;
    }
    return this.bounded(box, conditions.open, defined, v, least);
  }

  private region(
    box: Box,
    { open, defined }: { open: number; defined: Defined },
    measure: { lo: number; hi: number },
  ): Part {
    const lower = open === 0 ? 1 : 0;
    return {
      box: {
        ...box,
        open,
        upper: 1,
        lower,
        plane: null,
        sure: lower,
        upperMass: measure.hi,
        lowerMass: lower * measure.lo,
      },
      defined,
      owed: null,
      least: 0,
    };
  }

  /** The better of a constant and a tangent plane. */
  private bounded(box: Box, open: number, defined: Defined, v: I.Interval, least: number): Part {
    const measure = this.space.measure(box);
    const isSettled = open === 0 && defined === Defined.Everywhere;
    const [lo, hi] = [Math.max(0, v.lo), Math.max(0, v.hi)];
    const flat: ProvedBox = {
      ...box,
      open,
      upper: hi,
      lower: isSettled ? lo : 0,
      plane: null,
      sure: isSettled && hi > 0 ? lo / hi : 0,
      upperMass: hi === 0 ? 0 : mulUp(hi, measure.hi),
      lowerMass: isSettled ? mulDown(lo, measure.lo) : 0,
    };
    const isConstant = lo === hi;
    const plane =
      defined === Defined.Everywhere && v.lo >= 0 && !isConstant
        ? planeOver(this.space, box, this.rest!)
        : null;
    if (plane === null) return { box: flat, defined, owed: null, least };
    const { n } = this.space;
    this.spent += this.rest!.nSteps * (n + (n * (n + 1)) / 2);
    const tilted = this.tilted(box, open, plane);
    const lowerMass = isSettled ? Math.max(flat.lowerMass, tilted.lowerMass) : 0;
    const best = tilted.upperMass < flat.upperMass ? tilted : flat;
    return { box: { ...best, lowerMass }, defined, owed: plane.owed, least };
  }

  private tilted(box: Box, open: number, plane: Plane): ProvedBox {
    const { space, exponent } = this;
    const { centre, slopes, logLo, logHi } = plane;
    const { upper, upperMass, lowerMass, room } = planeMasses(space, box, plane, exponent);
    return {
      ...box,
      open,
      upper,
      lower: 0,
      plane: { centre, slopes },
      sure: open === 0 ? elementary.exp(logLo - logHi - 2 * room) : 0,
      upperMass,
      lowerMass,
    };
  }

  /** The conditions that may still fail over a box; null when one surely does. */
  private settle(
    { lo, hi }: { lo: readonly number[]; hi: readonly number[] },
    open: number,
  ): { open: number; defined: Defined } | null {
    let left = open;
    let defined: Defined = Defined.Everywhere;
    let isOutside = false;
    for (let j = 0; j < this.conditions.length; j++) {
      if (!(open & (1 << j))) continue;
      const condition = this.conditions[j]!;
      this.spent += condition.nSteps;
      const over = condition.overBox(lo, hi, []);
      if (over.defined === Defined.Nowhere) {
        throw refusal.undefinedIn(this.space.axes, lo, hi, condition.undefinedReason());
      }
      if (over.defined !== Defined.Everywhere) defined = Defined.InPart;
      else if (over.density.v.lo === 1) left &= ~(1 << j);
      else if (over.density.v.hi === 0) isOutside = true;
    }
    if (isOutside && defined === Defined.Everywhere) return null;
    return { open: left, defined };
  }

  private nowhere(box: Box, reason: string): null {
    const { lo, hi } = this.space.corners(box);
    const { hi: measure } = this.space.measure(box);
    if (measure > NEGLIGIBLE * this.wholeMeasure)
      throw refusal.undefinedIn(
        this.space.axes,
        lo,
        hi,
        reason,
        this.conditions.length > 0 ? 'the conditions hold there' : '',
      );
    if (this.dropped === 0) {
      this.notes.push(
        `the density is undefined next to ${refusal.pointText(this.space.axes, lo)}, where ${reason}; nothing is drawn there`,
      );
    }
    this.dropped += measure;
    return null;
  }

  private negative(box: Box): InputError {
    const centre = this.space.centre(box);
    this.rest!.densityAtPoint(centre, this.height);
    const value = this.exponent === 0 ? this.height.hi : undefined;
    const { lo, hi } = this.space.corners(this.space.whole());
    const { density, defined } = this.rest!.overBox(lo, hi, []);
    const isNeverAbove = defined === Defined.Everywhere && density.v.hi <= 0;
    return refusal.negativeAt(this.space.axes, centre, value, isNeverAbove);
  }

  /** The axis along which halving leaves least open; −1 where none can be halved. */
  private axisOf({ box, owed, defined }: Part): number {
    const { space } = this;
    const axes = Array.from({ length: space.n }, (_, i) => i).filter((i) =>
      space.isDivisible(box, i),
    );
    if (axes.length <= 1) return axes[0] ?? -1;
    const open = axes.map((i) =>
      box.open === 0 && defined === Defined.Everywhere ? 0 : this.leftOpen(box, i),
    );
    const least = Math.min(...open);
    const best = axes.filter((_, k) => open[k] === least);
    // Where a condition is open the widest axis serves it best, whatever the rest owes.
    const tells = box.open === 0 && owed?.some((each) => each > 0 && each < Infinity);
    const weight = (i: number): number => (tells ? owed![i]! : space.share(box, i));
    return best.reduce((a, b) => (weight(b) > weight(a) ? b : a));
  }

  /** How many halves of a box along an axis stay open. */
  private leftOpen(box: ProvedBox, axis: number): number {
    let left = 0;
    for (const half of this.space.halves(box, axis)) {
      const { lo, hi } = this.space.corners(half);
      let isOutside = false;
      let isOpen = false;
      for (let j = 0; j < this.conditions.length && !isOutside; j++) {
        if (!(box.open & (1 << j))) continue;
        const condition = this.conditions[j]!;
        this.spent += condition.nSteps;
        const { density, defined } = condition.overBox(lo, hi, []);
        if (defined !== Defined.Everywhere) isOpen = true;
        else if (density.v.hi === 0) isOutside = true;
        else if (density.v.lo !== 1) isOpen = true;
      }
      if (this.rest && !isOutside) {
        this.spent += this.rest.nSteps;
        const { defined } = this.rest.overBox(lo, hi, []);
        if (defined !== Defined.Everywhere) isOpen = true;
      }
      if (isOpen && !isOutside) left++;
    }
    return left;
  }

  private refuseUrgent({ box, defined }: Part): never {
    const { lo, hi } = this.space.corners(box);
    if (defined === Defined.Everywhere) throw refusal.unboundedIn(this.space.axes, lo, hi);
    const { rest } = this;
    const isOfRest = rest !== null && rest.overBox(lo, hi, []).defined !== Defined.Everywhere;
    throw isOfRest && box.open !== 0
      ? refusal.unsettledDomain(this.space.axes, lo, rest.undefinedReason())
      : refusal.undefinedIn(this.space.axes, lo, hi, this.reasonIn(lo, hi));
  }

  /** Why a box is undefined, by the first of all formulas that is. */
  private reasonIn(lo: readonly number[], hi: readonly number[]): string {
    const all = this.rest ? [this.rest, ...this.conditions] : this.conditions;
    const bad = all.find((each) => each.overBox(lo, hi, []).defined !== Defined.Everywhere);
    return (bad ?? all[0]!).undefinedReason();
  }

  /** Proves f ≥ −10^-12 of the peak wherever a box's own bound does not. */
  private settleSigns(): void {
    const { rest, space } = this;
    if (rest === null) return;
    for (const { box } of this.parts) {
      rest.densityAtPoint(space.centre(box), this.height);
      if (box.open === 0) this.peak = Math.max(this.peak, this.height.lo);
    }
    const tolerance = -SIGN_TOLERANCE * this.peak;
    // The lowest bound first: it leads to where the density is negative, if it is.
    const open = new FlatQueue<{ box: Box; conditions: number }>();
    for (const { box, least } of this.parts)
      if (least < tolerance) open.push({ box, conditions: box.open }, least);
    let isRounded = [...this.parts].some(({ least }) => least < 0 && least >= tolerance);
    for (let steps = 0; open.length > 0; steps++) {
      const { box, conditions } = open.pop()!;
      const corners = space.corners(box);
      const settled = this.settle(corners, conditions);
      if (settled === null) continue;
      const { lo } = rest.overBox(corners.lo, corners.hi, []).density.v;
      rest.densityAtPoint(space.centre(box), this.height);
      if (this.height.hi < tolerance && settled.open === 0) throw this.negative(box);
      if (lo >= tolerance) {
        if (lo < 0) isRounded = true;
        continue;
      }
      const axis = Array.from({ length: space.n }, (_, i) => i)
        .filter((i) => space.isDivisible(box, i))
        .reduce((a, b) => (a < 0 || space.share(box, b) > space.share(box, a) ? b : a), -1);
      if (steps >= MAX_SIGN_STEPS || axis < 0) throw refusal.unsettledSign(space.axes, corners.lo);
      for (const half of space.halves(box, axis))
        open.push({ box: half, conditions: settled.open }, lo);
    }
    if (isRounded) {
      this.notes.push(
        'the sign of the density cannot be settled to the last digit everywhere; MAX(0, density) is drawn, which differs by less than 10^-12 of its peak',
      );
    }
  }
}

/** True for a part without a bound, or not defined all over. */
function isUrgent({ defined, box }: Part): boolean {
  return defined !== Defined.Everywhere || box.upperMass === Infinity;
}

function byPlace(a: Box, b: Box): number {
  for (let i = 0; i < a.lo.length; i++) {
    const difference = a.lo[i]! - b.lo[i]!;
    if (difference !== 0) return difference;
  }
  return 0;
}
