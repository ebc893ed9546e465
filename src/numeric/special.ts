/**
 * Special functions with the bounds of their errors.
 *
 * Source: @stdlib's pure JavaScript (pinned versions). Each bound is at least twice
 * the largest error measured against mpmath (test/numeric/vectors/make.py), relative
 * to the value or, near a zero, absolute.
 * Not handled: GAMMA and its logarithm at arguments ≤ 0.
 */
import acosOf from '@stdlib/math-base-special-acos';
import acoshOf from '@stdlib/math-base-special-acosh';
import asinOf from '@stdlib/math-base-special-asin';
import asinhOf from '@stdlib/math-base-special-asinh';
import atanhOf from '@stdlib/math-base-special-atanh';
import coshOf from '@stdlib/math-base-special-cosh';
import digammaOf from '@stdlib/math-base-special-digamma';
import erfOf from '@stdlib/math-base-special-erf';
import erfcOf from '@stdlib/math-base-special-erfc';
import erfcxOf from '@stdlib/math-base-special-erfcx';
import expm1Of from '@stdlib/math-base-special-expm1';
import gammaOf from '@stdlib/math-base-special-gamma';
import gammalnOf from '@stdlib/math-base-special-gammaln';
import log10Of from '@stdlib/math-base-special-log10';
import log1pOf from '@stdlib/math-base-special-log1p';
import sinhOf from '@stdlib/math-base-special-sinh';
import trigammaOf from '@stdlib/math-base-special-trigamma';
import type { Bounded } from './bounded';
import { EPSILON } from './bounded';
import * as elementary from './elementary';

type Fixed = (x: number) => number | undefined;

export const log1p: (x: number) => number = log1pOf;

/** An elementary function that is monotone all over its domain. */
function plain(at: (x: number) => number, exact: Fixed, least: number, most: number): Bounded {
  return { at, relative: 3 * EPSILON, absolute: 0, exact, least, most };
}

const at0: Fixed = (x) => (x === 0 ? 0 : undefined);
const HALF_PI = 1.5707963267948968;
const PI_UP = 3.1415926535897936;

export const asin = plain(asinOf, at0, -HALF_PI, HALF_PI);
export const acos = plain(acosOf, (x) => (x === 1 ? 0 : undefined), 0, PI_UP);
export const sinh = plain(sinhOf, at0, -Infinity, Infinity);
/** For x ≥ 0. */
export const cosh = plain(coshOf, (x) => (x === 0 ? 1 : undefined), 1, Infinity);
export const asinh = plain(asinhOf, at0, -Infinity, Infinity);
export const acosh = plain(acoshOf, (x) => (x === 1 ? 0 : undefined), 0, Infinity);
export const atanh = plain(atanhOf, at0, -Infinity, Infinity);
export const expm1 = plain(expm1Of, at0, -1, Infinity);

const POWERS_OF_TEN = new Map(Array.from({ length: 23 }, (_, k) => [Number(`1e${k}`), k]));

/** Exact at 1, 10, 100, … as worksheets are. */
export const log10 = plain(
  (x) => POWERS_OF_TEN.get(x) ?? log10Of(x),
  (x) => POWERS_OF_TEN.get(x),
  -Infinity,
  Infinity,
);

export const erf: Bounded = {
  at: erfOf,
  relative: 3 * EPSILON,
  absolute: 0,
  exact: at0,
  least: -1,
  most: 1,
};

export const erfc: Bounded = {
  at: erfcOf,
  relative: 6 * EPSILON,
  absolute: 1e-320,
  exact: (x) => (x === 0 ? 1 : undefined),
  least: 0,
  most: 2,
};

/** ERFC(x)·EXP(x²) for x ≥ −5. */
export const erfcx: Bounded = {
  at: erfcxOf,
  relative: 24 * EPSILON,
  absolute: 0,
  least: 0,
  most: Infinity,
};

/** Γ(1), Γ(2), …: as far as factorials are doubles. */
const FACTORIALS: readonly number[] = Array.from({ length: 22 }).reduce<number[]>(
  (list, _, i) => [...list, list[i]! * (i + 1)],
  [1],
);

/** n! for a whole n ≥ 0 where it is a double. */
export function exactFactorial(n: number): number | undefined {
  return FACTORIALS[n];
}

/** Γ for x > 0: falls up to GAMMA_TURN, rises after it. */
export const gamma: Bounded = {
  at: (x) => exactFactorial(x - 1) ?? gammaOf(x),
  relative: 10 * EPSILON,
  absolute: 0,
  exact: (x) => exactFactorial(x - 1),
  least: 0.8856031944108886,
  most: Infinity,
};

/** ln Γ for x > 0, which turns where Γ does. */
export const gammaln: Bounded = {
  at: (x) => (x === 1 || x === 2 ? 0 : gammalnOf(x)),
  relative: 8 * EPSILON,
  absolute: 1e-14,
  exact: (x) => (x === 1 || x === 2 ? 0 : undefined),
  least: -0.1214862905358498,
  most: Infinity,
};

/** Doubles on either side of the place where Γ is least. */
export const GAMMA_TURN = { lo: 1.4616321449683622, hi: 1.4616321449683625 };

/** ψ = (ln Γ)′ for x > 0, rising. */
export const digamma: Bounded = {
  at: (x) => (x === 0 ? -Infinity : digammaOf(x)),
  relative: 8 * EPSILON,
  absolute: 1e-15,
  least: -Infinity,
  most: Infinity,
};

/** ψ′ for x > 0, falling. */
export const trigamma: Bounded = {
  at: (x) => (x === 0 ? Infinity : x === Infinity ? 0 : trigammaOf(x)),
  relative: 8 * EPSILON,
  absolute: 0,
  least: 0,
  most: Infinity,
};

const LN_2 = 0.6931471805599453;

/** ln COSH(x) for x ≥ 0, without overflow. */
export const lncosh: Bounded = {
  at: (x) => x + log1p(elementary.exp(-2 * x)) - LN_2,
  relative: 8 * EPSILON,
  absolute: 1e-15,
  exact: at0,
  least: 0,
  most: Infinity,
};

/** ln SINH(x) for x > 0, without overflow. */
export const lnsinh: Bounded = {
  at: (x) => x + elementary.ln(-expm1Of(-2 * x)) - LN_2,
  relative: 8 * EPSILON,
  absolute: 2e-15,
  least: -Infinity,
  most: Infinity,
};

/** ln ERFC(x), falling, without underflow. */
export const lnerfc: Bounded = {
  at: (x) => (x < 1 ? elementary.ln(erfcOf(x)) : elementary.ln(erfcxOf(x)) - x * x),
  relative: 32 * EPSILON,
  absolute: 1e-14,
  exact: at0,
  least: -Infinity,
  most: 0.6931471805599454,
};

const TWO_BY_ROOT_PI = 1.1283791670955126;

/** −(ln ERFC)′ = 2/√π · EXP(−x²)/ERFC(x), rising from 0. */
export const erfcHazard: Bounded = {
  at: (x) => (x < -5 ? (TWO_BY_ROOT_PI / 2) * elementary.exp(-x * x) : TWO_BY_ROOT_PI / erfcxOf(x)),
  // Below −5 ERFC is taken for 2, which is 8e-13 too much at most.
  relative: 1e-11,
  absolute: 0,
  least: 0,
  most: Infinity,
};
