/**
 * Second-order jets over an interval: enclosures of f, f′ and f″ for all x in it.
 *
 * Source: Moore, Kearfott, Cloud (2009), "Introduction to Interval Analysis",
 * chapter 9 (automatic differentiation of interval functions). The first and
 * second derivative enclose the derivative wherever it exists; a function that
 * jumps has `v` only (`d` and `h` are entire), one with a kink has `v` and `d`.
 * Not handled: third and higher derivatives.
 */
import type { Interval } from './interval';
import * as I from './interval';

/** Enclosures of a value, its slope and its curvature. */
export interface Jet {
  readonly v: Interval;
  readonly d: Interval;
  readonly h: Interval;
}

export function jet(): Jet {
  return { v: I.interval(), d: I.interval(), h: I.interval() };
}

export function copyJet(out: Jet, a: Jet): void {
  I.copy(out.v, a.v);
  I.copy(out.d, a.d);
  I.copy(out.h, a.h);
}

/** Nothing is known of the slope and the curvature: the function may jump. */
export function setJump(out: Jet): void {
  I.setEntire(out.d);
  I.setEntire(out.h);
}

/** Nothing is known at all. */
export function setUnknown(out: Jet): void {
  I.setEntire(out.v);
  setJump(out);
}

export function setConstantSlopes(out: Jet): void {
  I.set(out.d, 0, 0);
  I.set(out.h, 0, 0);
}

export function meetJet(out: Jet, a: Jet): void {
  I.meet(out.v, a.v);
  I.meet(out.d, a.d);
  I.meet(out.h, a.h);
}

export function hullJet(out: Jet, a: Jet, b: Jet): void {
  I.hull(out.v, a.v, b.v);
  I.hull(out.d, a.d, b.d);
  I.hull(out.h, a.h, b.h);
}

export function negateJet(out: Jet, a: Jet): void {
  I.negate(out.v, a.v);
  I.negate(out.d, a.d);
  I.negate(out.h, a.h);
}

export function addJet(out: Jet, a: Jet, b: Jet): void {
  I.add(out.v, a.v, b.v);
  I.addLoosely(out.d, a.d, b.d);
  I.addLoosely(out.h, a.h, b.h);
}

export function subtractJet(out: Jet, a: Jet, b: Jet): void {
  I.subtract(out.v, a.v, b.v);
  I.subtractLoosely(out.d, a.d, b.d);
  I.subtractLoosely(out.h, a.h, b.h);
}

/** Scratch for one rule at a time; it holds nothing between calls. */
const s = I.interval();
const t = I.interval();

/** (uv)′ = u′v + uv′ and (uv)″ = u″v + 2u′v′ + uv″. `out` is none of the operands. */
export function multiplyJet(out: Jet, a: Jet, b: Jet): void {
  I.multiply(out.v, a.v, b.v);
  I.multiplyLoosely(s, a.d, b.v);
  I.multiplyLoosely(t, a.v, b.d);
  I.addLoosely(out.d, s, t);
  I.multiplyLoosely(s, a.h, b.v);
  I.multiplyLoosely(t, a.v, b.h);
  I.addLoosely(s, s, t);
  I.multiplyLoosely(t, a.d, b.d);
  I.scale(t, t, 2);
  I.addLoosely(out.h, s, t);
}

/** (u/v)′ = (u′ − qv′)/v and (u/v)″ = (u″ − 2q′v′ − qv″)/v with q = u/v. `out` is none of the operands. */
export function divideJet(out: Jet, a: Jet, b: Jet): void {
  I.divide(out.v, a.v, b.v);
  if (I.holds(b.v, 0)) {
    setJump(out);
    return;
  }
  I.multiplyLoosely(s, out.v, b.d);
  I.subtractLoosely(s, a.d, s);
  I.divide(out.d, s, b.v);
  I.multiplyLoosely(s, out.d, b.d);
  I.scale(s, s, 2);
  I.multiplyLoosely(t, out.v, b.h);
  I.addLoosely(s, s, t);
  I.subtractLoosely(s, a.h, s);
  I.divide(out.h, s, b.v);
}

/** Multiplication by an enclosed constant. */
export function scaleJet(out: Jet, a: Jet, k: Interval): void {
  I.multiply(out.v, a.v, k);
  I.multiplyLoosely(out.d, a.d, k);
  I.multiplyLoosely(out.h, a.h, k);
}

/**
 * Derivatives of g(u) by the chain rule: g′u′ and g″u′² + g′u″.
 * `slope` and `curvature` enclose g′ and g″ over u.v and may be overwritten.
 */
export function chain(out: Jet, u: Jet, slope: Interval, curvature: Interval): void {
  I.squareLoosely(s, u.d);
  I.multiplyLoosely(s, curvature, s);
  I.multiplyLoosely(t, slope, u.h);
  I.multiplyLoosely(out.d, slope, u.d);
  I.addLoosely(out.h, s, t);
}
