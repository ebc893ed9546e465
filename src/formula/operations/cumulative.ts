/**
 * Shares below or above a value: functions whose slope is a density that the tape
 * already holds. The operands are u and that density at u, so that the chain rule
 * needs nothing else:  F(u)′ = f u′,  F(u)″ = f′ u′ + f u″  with f′ taken along x.
 */
import type { Bounded } from '../../numeric/bounded';
import { lowerAt, upperAt } from '../../numeric/bounded';
import { betaShare, gammaShare, LEAST_PARAMETER, MOST_PARAMETER } from '../../numeric/incomplete';
import type { Interval } from '../../numeric/interval';
import * as I from '../../numeric/interval';
import type { Operation } from '../operation';
import type { Maker } from '../row';

interface Share {
  readonly name: string;
  readonly point: (u: number) => number;
  readonly lowerAt: (u: number) => number;
  readonly upperAt: (u: number) => number;
  readonly isFalling: boolean;
}

const s = I.interval();
const t = I.interval();

function shareOperation({ name, point, lowerAt, upperAt, isFalling }: Share): Operation {
  return {
    name,
    point,
    enclose(out, u) {
      if (isFalling) I.set(out, lowerAt(u.hi), upperAt(u.lo));
      else I.set(out, lowerAt(u.lo), upperAt(u.hi));
    },
    slopes(out, u, f) {
      I.multiplyLoosely(s, f.d, u.d);
      I.multiplyLoosely(t, f.v, u.h);
      I.addLoosely(out.h, s, t);
      I.multiplyLoosely(out.d, f.v, u.d);
      if (!isFalling) return;
      I.negate(out.d, out.d);
      I.negate(out.h, out.h);
    },
  };
}

function checkMeasured(make: Maker, ...parameters: readonly Interval[]): void {
  for (const { lo, hi } of parameters) {
    if (lo >= LEAST_PARAMETER && hi <= MOST_PARAMETER) continue;
    throw make.refuse(
      `a shape of ${hi <= MOST_PARAMETER ? lo : hi} in a cumulative share`,
      `use shapes from ${LEAST_PARAMETER} to ${MOST_PARAMETER}, for which the error is known`,
    );
  }
}

function middleOf({ lo, hi }: Interval): number {
  return lo === hi ? lo : lo / 2 + hi / 2;
}

type Corner = (f: Bounded, u: number) => number;

/** The share of a gamma variable below (above) u. The share below falls as the shape grows. */
export function gammaShareAt(
  make: Maker,
  isAbove: boolean,
  shape: Interval,
  u: number,
  density: number,
): number {
  checkMeasured(make, shape);
  const small = gammaShare(shape.lo, isAbove);
  const large = gammaShare(shape.hi, isAbove);
  const operation = shareOperation({
    name: `gamma share ${isAbove ? 'above' : 'below'} ${shape.lo} ${shape.hi}`,
    point: gammaShare(middleOf(shape), isAbove).at,
    lowerAt: (x) => lowerAt(isAbove ? small : large, x),
    upperAt: (x) => upperAt(isAbove ? large : small, x),
    isFalling: isAbove,
  });
  return make.apply(operation, u, density);
}

/** The share of a beta variable below (above) u: the share below falls with a, rises with b. */
function betaCorners(
  a: Interval,
  b: Interval,
  isAbove: boolean,
): { at: (u: number) => number; lowerAt: (u: number) => number; upperAt: (u: number) => number } {
  const left = betaShare(a.lo, b.hi, isAbove);
  const right = betaShare(a.hi, b.lo, isAbove);
  const [least, most] = isAbove ? [left, right] : [right, left];
  return {
    at: betaShare(middleOf(a), middleOf(b), isAbove).at,
    lowerAt: (u) => lowerAt(least, u),
    upperAt: (u) => upperAt(most, u),
  };
}

export function betaShareAt(
  make: Maker,
  isAbove: boolean,
  a: Interval,
  b: Interval,
  u: number,
  density: number,
): number {
  checkMeasured(make, a, b);
  const { at, ...corners } = betaCorners(a, b, isAbove);
  const operation = shareOperation({
    name: `beta share ${isAbove ? 'above' : 'below'} ${a.lo} ${a.hi} ${b.lo} ${b.hi}`,
    point: at,
    ...corners,
    isFalling: isAbove,
  });
  return make.apply(operation, u, density);
}

const whole = I.interval();
const ratio = I.interval();
const room = I.interval();

/**
 * The share of a t variable with n degrees of freedom below x, from that of a beta
 * variable: half of the share of (n/2, 1/2) below n/(n + x²) lies beyond ±|x|. Near 0
 * the same share is had from above x²/(n + x²), which keeps its digits.
 */
export function tShareAt(make: Maker, n: number, x: number, density: number): number {
  const shape = I.interval(n / 2);
  checkMeasured(make, shape);
  const far = betaShare(n / 2, 0.5, false);
  const near = betaShare(0.5, n / 2, true);
  const bothTails = (u: number, corner: Corner, side: -1 | 1): number => {
    if (Math.abs(u) === Infinity) return 0;
    I.set(whole, u, u);
    I.square(ratio, whole);
    I.set(room, n, n);
    I.add(room, ratio, room);
    if (u * u > n) {
      I.set(whole, n, n);
      I.divide(ratio, whole, room);
      return corner(far, side > 0 ? ratio.hi : ratio.lo);
    }
    I.divide(ratio, ratio, room);
    return corner(near, side > 0 ? ratio.lo : ratio.hi);
  };
  const plain: Corner = (f, u) => f.at(u);
  const lower = (u: number): number =>
    u <= 0 ? bothTails(u, lowerAt, -1) / 2 : 1 - bothTails(u, upperAt, 1) / 2 - ROUNDING;
  const upper = (u: number): number =>
    u < 0 ? bothTails(u, upperAt, 1) / 2 : 1 - bothTails(u, lowerAt, -1) / 2 + ROUNDING;
  const operation = shareOperation({
    name: `t share below ${n}`,
    point: (u) => (u < 0 ? bothTails(u, plain, 1) / 2 : 1 - bothTails(u, plain, 1) / 2),
    lowerAt: lower,
    upperAt: (u) => Math.min(1, upper(u)),
    isFalling: false,
  });
  return make.apply(operation, x, density);
}

/** Room for the rounding of 1 − share. */
const ROUNDING = 1.2e-16;
