/**
 * Reference values to 44 digits with decimal.js, a general-purpose library that shares
 * no code with the engine. Doubles enter with their exact value, not as they print.
 */
import Decimal from 'decimal.js';
import { dyadic } from './dyadic';

/** Digits carried; the comparisons below lean on the first 30, so that some may cancel. */
export const Big = Decimal.clone({ precision: 44, defaults: true, maxE: 9e15, minE: -9e15 });
export type Big = Decimal;

const powersOfTwo = new Map<number, Big>();

function powerOfTwo(e: number): Big {
  let power = powersOfTwo.get(e);
  if (!power) powersOfTwo.set(e, (power = new Big(2).pow(e)));
  return power;
}

/** The value of a finite double, to 44 digits. */
export function big(x: number): Big {
  if (Number.isSafeInteger(x)) return new Big(x);
  const { m, e } = dyadic(x);
  return powerOfTwo(e).times(m.toString());
}

/** What 30 digits leave open of a value. */
const SLACK = new Big('1e-30');

/** lo ≤ t ≤ hi, for double ends and a reference value. */
export function isBetween(lo: number, t: Big, hi: number): boolean {
  if (t.isNaN()) return false;
  const near = t.toNumber();
  const isAbove = lo < near || (lo === near && isAtMost(lo, t));
  return isAbove && (near < hi || (hi === near && isAtMost(-hi, t.neg())));
}

function isAtMost(x: number, t: Big): boolean {
  if (!Number.isFinite(x)) return x < 0 || !t.isFinite();
  return big(x).minus(t).lte(t.abs().times(SLACK));
}

/** |y − t| in units in the last place of t. */
export function errorInUlps(y: number, t: Big): number {
  const size = Math.abs(t.toNumber());
  const exponent = size < 2 ** -1022 ? -1022 : Math.floor(Math.log2(size));
  return big(y)
    .minus(t)
    .abs()
    .times(powerOfTwo(52 - exponent))
    .toNumber();
}

/**
 * atan x, faster than the library's own: with z near atan x, tan(atan x − z) is
 * (x cos z − sin z) / (cos z + x sin z) = d, about 1e-16, and atan d is d − d³/3.
 */
export function atan(x: Big): Big {
  const z = new Big(Math.atan(x.toNumber()));
  const [s, c] = [z.sin(), z.cos()];
  const d = x
    .times(c)
    .minus(s)
    .div(c.plus(x.times(s)));
  return z.plus(d).minus(d.pow(3).div(3));
}
