/**
 * Monotone functions that are known in doubles with a bound of their error: from a
 * value to a proved lower and upper value, and from these to enclosures.
 * Not handled: functions with turning points inside (each sees to its own).
 */
import { bug } from '../errors';
import type { Interval } from './interval';
import { set } from './interval';

/** The distance from 1 to the next double. */
export const EPSILON = 2.220446049250313e-16;
/** Room for results among the subnormals, where errors are no longer relative. */
const TINY = 1e-323;

export interface Bounded {
  readonly at: (x: number) => number;
  /** |computed − true| ≤ relative · |computed| + absolute. */
  readonly relative: number;
  readonly absolute: number;
  /** Where the true value is a double, which `at` need not hit. */
  readonly exact?: (x: number) => number | undefined;
  /** The range of the true function. */
  readonly least: number;
  readonly most: number;
}

/** At least f(x). */
export function upperAt(f: Bounded, x: number): number {
  const exact = f.exact?.(x);
  return exact ?? raised(f, f.at(x));
}

/** At most f(x). */
export function lowerAt(f: Bounded, x: number): number {
  const exact = f.exact?.(x);
  return exact ?? lowered(f, f.at(x));
}

function raised(f: Bounded, y: number): number {
  if (y === -Infinity) return Math.max(-Number.MAX_VALUE, f.least);
  return Math.min(f.most, y + (Math.abs(y) * (f.relative + EPSILON) + (f.absolute + TINY)));
}

function lowered(f: Bounded, y: number): number {
  if (y !== y) throw bug('a function was asked for a value outside its domain');
  if (y === Infinity) return Number.MAX_VALUE;
  return Math.max(f.least, y - (Math.abs(y) * (f.relative + EPSILON) + (f.absolute + TINY)));
}

/** Encloses a rising function. */
export function setRising(out: Interval, f: Bounded, u: Interval): void {
  const lo = lowerAt(f, u.lo);
  set(out, lo, upperAt(f, u.hi));
}

/** Encloses a falling function. */
export function setFalling(out: Interval, f: Bounded, u: Interval): void {
  const lo = lowerAt(f, u.hi);
  set(out, lo, upperAt(f, u.lo));
}
