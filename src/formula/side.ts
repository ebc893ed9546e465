/**
 * A tape on one side of a point: towards ±∞, or towards a finite end of the limits.
 *
 * With t the distance from an origin, x = origin ± t, every step u gets enclosures,
 * over all t of [c, ∞) or of (0, c], of
 *   v   u itself                   d   (ln|u|)′ = u′/u
 *   e   the elasticity t·u′/u      g   t·u′
 *   s   u′
 * (derivatives by t). They bound how fast a density falls or grows, which is all
 * that a proof of a finite area needs.
 * Source: src/METHOD.md, "Unbounded sides" and "Poles".
 * Not handled: a side on which a condition is not settled, or a step undefined.
 * The file is long because the five enclosures of a step depend on each other.
 */
import { bug } from '../errors';
import type { Interval } from '../numeric/interval';
import * as I from '../numeric/interval';
import type { Jet } from '../numeric/jet';
import * as J from '../numeric/jet';
import type { Encloser, PointValues } from './enclose';
import type { Operation } from './operation';
import { Defined } from './operation';
import type { Step, Tape } from './tape';

/** Where a side lies: x = origin + direction · t for t ≥ c (`isBeyond`) or 0 < t ≤ c. */
export interface Side {
  readonly origin: number;
  readonly direction: 1 | -1;
  readonly isBeyond: boolean;
}

/** What is known of one step over a side. */
interface Growth {
  readonly v: Interval;
  readonly d: Interval;
  readonly e: Interval;
  readonly g: Interval;
  readonly s: Interval;
}

/** A factor of the density: its growth, and its value where the side begins. */
export interface Factor {
  readonly growth: Growth;
  /** −1 for a factor that divides. */
  readonly power: 1 | -1;
  readonly atStart: Interval;
}

function unknown(): Growth {
  const entire = (): Interval => I.interval(-Infinity, Infinity);
  return { v: entire(), d: entire(), e: entire(), g: entire(), s: entire() };
}

function copyGrowth(out: Growth, a: Growth): void {
  I.copy(out.v, a.v);
  I.copy(out.d, a.d);
  I.copy(out.e, a.e);
  I.copy(out.g, a.g);
  I.copy(out.s, a.s);
}

function isZero({ lo, hi }: Interval): boolean {
  return lo === 0 && hi === 0;
}

/** Scratch for one rule at a time; it holds nothing between calls. */
const p = I.interval();
const q = I.interval();
const r = I.interval();
const ONE = I.interval(1);

export class SideEncloser {
  private readonly growths: Growth[];
  private readonly jets: readonly Jet[];
  private readonly out = J.jet();
  private readonly t = I.interval();
  private readonly atStart: PointValues;
  /** Values at the finite end of a pole's side, where t = 0. */
  private readonly atOrigin: PointValues;

  constructor(
    private readonly tape: Tape,
    private readonly encloser: Encloser,
    private readonly side: Side,
  ) {
    this.growths = tape.steps.map(unknown);
    this.jets = [J.jet(), J.jet(), J.jet()];
    this.atStart = encloser.pointValues();
    this.atOrigin = encloser.pointValues();
    if (!side.isBeyond) encloser.at(side.origin, this.atOrigin);
  }

  /** The x at distance t. */
  pointAt(t: number): number {
    return this.side.origin + this.side.direction * t;
  }

  /**
   * The density's factors over the side that begins at distance c > 0; null where a
   * condition or a domain is not settled all over it.
   */
  factors(c: number): readonly Factor[] | null {
    const { isBeyond } = this.side;
    I.set(this.t, isBeyond ? c : 0, isBeyond ? Infinity : c);
    this.encloser.at(this.pointAt(c), this.atStart);
    const { steps, root } = this.tape;
    for (let place = 0; place < steps.length; place++) {
      if (!this.encloseStep(steps[place]!, place)) return null;
    }
    return this.split(root, 1);
  }

  private encloseStep(step: Step, place: number): boolean {
    const out = this.growths[place]!;
    Object.assign(out, unknown());
    if (step.enclosure) {
      I.copy(out.v, step.enclosure);
      for (const part of [out.d, out.e, out.g, out.s]) I.set(part, 0, 0);
      return true;
    }
    if (step.nOperands === 0) {
      this.setVariable(out);
      return true;
    }
    const { operation } = step;
    const [a, b, c] = [this.growths[step.a]!, this.growths[step.b]!, this.growths[step.c]!];
    if (operation.growth?.kind === 'choice' && c.v.lo !== c.v.hi) return false;
    if (operation.defined && operation.defined(a.v, b.v) !== Defined.Everywhere) {
      // Only the branch that a settled condition takes has to be defined; its steps say so themselves.
      return true;
    }
    this.apply(operation, out, a, b, c);
    this.startFrom0(out, place);
    this.settleRules(operation, step, out, a, b, c);
    this.tighten(out, place);
    return true;
  }

  private setVariable(out: Growth): void {
    const { origin, direction } = this.side;
    I.set(out.s, direction, direction);
    I.scale(out.g, this.t, direction);
    I.set(p, origin, origin);
    I.add(out.v, p, out.g);
    if (origin === 0) {
      I.set(out.e, 1, 1);
      I.reciprocal(out.d, this.t);
    } else {
      I.divide(out.d, out.s, out.v);
      I.divide(out.e, out.g, out.v);
    }
  }

  /** Any operation: the value directly, u′ and t·u′ by its slope rule, which is linear in them. */
  private apply(operation: Operation, out: Growth, a: Growth, b: Growth, c: Growth): void {
    operation.enclose(out.v, a.v, b.v, c.v);
    this.slopeOf(operation, out.v, out.s, [a, b, c], 's');
    this.slopeOf(operation, out.v, out.g, [a, b, c], 'g');
  }

  private slopeOf(
    operation: Operation,
    v: Interval,
    out: Interval,
    operands: readonly Growth[],
    part: 's' | 'g',
  ): void {
    operands.forEach((operand, i) => {
      const jet = this.jets[i]!;
      I.copy(jet.v, operand.v);
      I.copy(jet.d, operand[part]);
      I.setEntire(jet.h);
    });
    I.copy(this.out.v, v);
    operation.slopes(this.out, this.jets[0]!, this.jets[1]!, this.jets[2]!);
    I.copy(out, this.out.d);
  }

  /** A step that is exactly 0 where t = 0 is t times a mean of its slopes. */
  private startFrom0(out: Growth, place: number): void {
    if (this.side.isBeyond || this.atOrigin.defined[place] !== Defined.Everywhere) return;
    const { lo, hi } = this.atOrigin.values[place]!;
    const isSteady = out.s.lo > 0 || out.s.hi < 0;
    if (lo !== 0 || hi !== 0 || !isSteady || !(out.s.lo > -Infinity && out.s.hi < Infinity)) return;
    I.multiply(p, this.t, out.s);
    I.meet(out.v, p);
    I.divide(p, out.s, out.s);
    I.meet(out.e, p);
  }

  /** The rules that know more than the slope does: how growth passes through products, powers, EXP, LN and sums. */
  private settleRules(
    operation: Operation,
    step: Step,
    out: Growth,
    a: Growth,
    b: Growth,
    c: Growth,
  ): void {
    if (operation.logSlope) {
      operation.logSlope(r, a.v);
      meetProduct(out.d, r, a.s);
      meetProduct(out.e, r, a.g);
    }
    switch (operation.growth?.kind) {
      case 'product':
        I.add(p, a.e, b.e);
        I.meet(out.e, p);
        I.add(p, a.d, b.d);
        I.meet(out.d, p);
        break;
      case 'quotient':
        I.subtract(p, a.e, b.e);
        I.meet(out.e, p);
        I.subtract(p, a.d, b.d);
        I.meet(out.d, p);
        break;
      case 'power':
        I.multiply(p, a.e, operation.growth.power ?? b.v);
        I.meet(out.e, p);
        I.multiply(p, a.d, operation.growth.power ?? b.v);
        I.meet(out.d, p);
        break;
      case 'same':
        I.meet(out.e, a.e);
        I.meet(out.d, a.d);
        break;
      case 'exponential':
        I.meet(out.d, a.s);
        I.meet(out.e, a.g);
        break;
      case 'logarithm':
        I.divide(p, a.e, out.v);
        I.meet(out.e, p);
        I.divide(p, a.d, out.v);
        I.meet(out.d, p);
        I.meet(out.s, a.d);
        I.meet(out.g, a.e);
        break;
      case 'sum':
        this.sum(step, out, a, b, operation.growth.sign);
        break;
      case 'choice':
        copyGrowth(out, c.v.lo === 1 ? a : b);
        break;
      case 'extreme':
        extreme(out, a, b, c.v, operation.growth.sign);
        break;
      case undefined:
        break;
    }
  }

  /**
   * a ± b as a weighted mean: with k = ±b/a the weight of a is 1/(1 + k). The ratio
   * is bounded by its value where the side begins when its elasticity keeps its sign.
   */
  private sum(step: Step, out: Growth, a: Growth, b: Growth, sign: 1 | -1): void {
    // A term that is 0 all over the side adds nothing, and the ratio to it says nothing.
    if (isZero(b.v) || (isZero(a.v) && sign > 0)) {
      copyGrowth(out, isZero(b.v) ? a : b);
      return;
    }
    const ratio = r;
    this.ratio(step, ratio, a, b);
    if (sign < 0) I.negate(ratio, ratio);
    const ofA = I.interval();
    const ofB = I.interval();
    I.add(q, ONE, ratio);
    if (I.holds(q, 0)) return;
    I.reciprocal(ofA, q);
    if (ratio.lo >= 0) {
      // Weights of terms of one sign lie between 0 and 1, whatever the ratio.
      ofA.lo = Math.max(0, ofA.lo);
      ofA.hi = Math.min(1, ofA.hi);
    }
    I.subtract(ofB, ONE, ofA);
    this.weigh(out.e, a.e, b.e, ofA, ofB);
    this.weigh(out.d, a.d, b.d, ofA, ofB);
    I.multiply(p, a.v, q);
    I.meet(out.v, p);
  }

  private weigh(out: Interval, a: Interval, b: Interval, ofA: Interval, ofB: Interval): void {
    I.subtract(p, a, b);
    I.multiply(p, p, ofA);
    I.add(p, b, p);
    I.meet(out, p);
    I.subtract(p, b, a);
    I.multiply(p, p, ofB);
    I.add(p, a, p);
    I.meet(out, p);
    if (ofA.lo >= 0 && ofA.hi <= 1) {
      I.hull(p, a, b);
      I.meet(out, p);
    }
  }

  /** Encloses b/a. */
  private ratio(step: Step, out: Interval, a: Growth, b: Growth): void {
    I.divide(out, b.v, a.v);
    const { values, defined } = this.atStart;
    if (defined[step.a] !== Defined.Everywhere || defined[step.b] !== Defined.Everywhere) return;
    const atA = values[step.a]!;
    if (I.holds(atA, 0)) return;
    I.divide(q, values[step.b]!, atA);
    // The ratio's relative growth has one sign if either measure of it shows that.
    I.subtract(p, b.e, a.e);
    this.meetMonotone(out, p, q);
    I.subtract(p, b.d, a.d);
    this.meetMonotone(out, p, q);
  }

  /** |u| grows or falls all over the side when its elasticity keeps its sign: u lies on one side of its first value. */
  private meetMonotone(out: Interval, growth: Interval, atStart: Interval): void {
    const { lo, hi } = growth;
    if (lo < 0 && hi > 0) return;
    const isPositive = atStart.lo > 0;
    if (!isPositive && !(atStart.hi < 0)) return;
    // Towards ∞ the start is the least t, towards a pole the largest.
    const movesAway = this.side.isBeyond ? lo >= 0 : hi <= 0;
    const movesTo0 = this.side.isBeyond ? hi <= 0 : lo >= 0;
    if (movesAway) {
      if (isPositive) I.set(p, atStart.lo, Infinity);
      else I.set(p, -Infinity, atStart.hi);
      I.meet(out, p);
    } else if (movesTo0) {
      if (isPositive) I.set(p, 0, atStart.hi);
      else I.set(p, atStart.lo, 0);
      I.meet(out, p);
    }
  }

  private tighten(out: Growth, place: number): void {
    if (this.atStart.defined[place] === Defined.Everywhere) {
      I.copy(q, out.e);
      this.meetMonotone(out.v, q, this.atStart.values[place]!);
    }
    const { v, d, e, g, s } = out;
    const { t } = this;
    if (!I.holds(v, 0)) {
      meetQuotient(d, s, v);
      meetQuotient(e, g, v);
    }
    meetProduct(e, t, d);
    meetProduct(g, e, v);
    meetProduct(g, t, s);
    meetQuotient(s, g, t);
    meetProduct(s, d, v);
    meetQuotient(d, e, t);
  }

  /** The product that the root is, factor by factor. */
  private split(place: number, power: 1 | -1): Factor[] {
    const step = this.tape.steps[place]!;
    const kind = step.nOperands > 0 ? step.operation.growth?.kind : undefined;
    if (kind === 'product') return [...this.split(step.a, power), ...this.split(step.b, power)];
    if (kind === 'quotient') {
      return [...this.split(step.a, power), ...this.split(step.b, power === 1 ? -1 : 1)];
    }
    if (kind === 'choice') {
      return this.split(this.growths[step.c]!.v.lo === 1 ? step.a : step.b, power);
    }
    const atStart = this.atStart.values[place];
    if (!atStart) throw bug(`no value of step ${place}`);
    return [{ growth: this.growths[place]!, power, atStart }];
  }
}

/** MIN (sign 1) or MAX (sign −1) of a and b, whose difference is c. */
function extreme(out: Growth, a: Growth, b: Growth, c: Interval, sign: 1 | -1): void {
  const [below, above] = sign > 0 ? [a, b] : [b, a];
  if (c.hi <= 0) copyGrowth(out, below);
  else if (c.lo >= 0) copyGrowth(out, above);
  else {
    I.hull(p, a.e, b.e);
    I.meet(out.e, p);
    I.hull(p, a.d, b.d);
    I.meet(out.d, p);
  }
}

function meetQuotient(out: Interval, a: Interval, b: Interval): void {
  I.divide(p, a, b);
  I.meet(out, p);
}

function meetProduct(out: Interval, a: Interval, b: Interval): void {
  I.multiply(p, a, b);
  I.meet(out, p);
}
