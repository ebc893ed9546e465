/**
 * Powers and the square root. Whole powers take any base, others a base ≥ 0.
 * Not handled: 0^0 and odd roots of negative numbers, on which spreadsheet programs disagree.
 */
import * as elementary from '../../numeric/elementary';
import type { Interval } from '../../numeric/interval';
import * as I from '../../numeric/interval';
import * as J from '../../numeric/jet';
import type { Operation } from '../operation';
import { Defined, smooth } from '../operation';
import type { Maker } from '../row';
import { MULTIPLY } from './arithmetic';
import { nonNegative } from './domain';
import { EXP, LN } from './exponential';

/** Scratch for one rule at a time; it holds nothing between calls. */
const t = I.interval();
const one = I.interval(1);

/** x^n for a fixed whole n ≠ 0. */
export function wholePower(n: number): Operation {
  const raise = (out: Interval, u: Interval, k: number): void => {
    I.power(out, u, Math.abs(k));
    if (k < 0) I.reciprocal(out, out);
  };
  return smooth({
    name: `power ${n}`,
    growth: { kind: 'power', power: I.interval(n) },
    point: (x) => elementary.pow(x, n),
    enclose: (out, u) => raise(out, u, n),
    first(out, u) {
      raise(out, u, n - 1);
      I.scale(out, out, n);
    },
    second(out, u) {
      if (n === 1) I.set(out, 0, 0);
      else {
        raise(out, u, n - 2);
        I.scale(out, out, n * (n - 1));
      }
    },
    ...(n < 0 && {
      isSmoothOver: (u: Interval) => !I.holds(u, 0),
      defined: (u: Interval) => (u.lo === 0 && u.hi === 0 ? Defined.Nowhere : Defined.Everywhere),
      turnsOn: 0 as const,
      outside: `0 is raised to the power ${n}`,
    }),
    logarithm(out, [a]) {
      I.set(t, n, n);
      J.scaleJet(out, a, t);
    },
  });
}

/** x^p for a constant p that is not whole; x ≥ 0. */
const REAL_POWER: Operation = {
  name: 'real power',
  growth: { kind: 'power' },
  point: (x, p) => (x < 0 ? NaN : elementary.pow(x, p)),
  enclose: (out, x, p) => I.realPower(out, x, p),
  slopes(out, x, p) {
    if (x.v.lo < 0 || (x.v.lo === 0 && p.v.hi < 0)) {
      J.setJump(out);
      return;
    }
    I.subtract(powerLess1, p.v, one);
    I.subtract(powerLess2, powerLess1, one);
    powerOrOne(slope, x.v, powerLess1);
    I.multiply(slope, slope, p.v);
    powerOrOne(curvature, x.v, powerLess2);
    I.multiply(curvature, curvature, powerLess1);
    I.multiply(curvature, curvature, p.v);
    J.chain(out, x, slope, curvature);
  },
  logarithm: (out, [a], [, p]) => J.scaleJet(out, a, p.v),
  defined: nonNegative,
  turnsOn: 0,
  outside: 'a negative number is raised to a power that is not whole',
};
const powerLess1 = I.interval();
const powerLess2 = I.interval();
const slope = I.interval();
const curvature = I.interval();

/** realPower, also where p's enclosure touches 0. */
function powerOrOne(out: Interval, x: Interval, p: Interval): void {
  if (p.lo > 0 || p.hi < 0) I.realPower(out, x, p);
  else I.set(out, 0, Infinity);
}

export const SQRT: Operation = smooth({
  name: 'SQRT',
  growth: { kind: 'power', power: I.interval(0.5) },
  point: Math.sqrt,
  enclose: I.squareRoot,
  first(out, _, v) {
    I.scale(out, v, 2);
    I.reciprocal(out, out);
  },
  second(out, u, v) {
    I.multiply(out, v, u);
    I.scale(out, out, -4);
    I.reciprocal(out, out);
  },
  isSmoothOver: (u) => u.lo >= 0,
  logarithm(out, [a]) {
    I.set(t, 0.5, 0.5);
    J.scaleJet(out, a, t);
  },
  defined: nonNegative,
  turnsOn: 0,
  outside: 'the square root of a negative number is taken',
});

/** LN as a power that varies uses it, which must speak of the power where it is undefined. */
const LN_OF_BASE: Operation = {
  ...LN,
  outside: 'a number that is not above 0 is raised to a power that varies',
};

const MAX_WHOLE_POWER = 1024;

export function raise(make: Maker, [base, power]: readonly number[]): number {
  const p = make.exactValue(power!);
  if (p === 0) {
    if (make.exactValue(base!) === 0)
      throw make.refuse(
        '0^0, on which spreadsheet programs disagree',
        'write the value that is meant',
      );
    return make.number(1);
  }
  if (p === 0.5) return make.apply(SQRT, base!);
  if (p !== undefined && Math.floor(p) === p && Math.abs(p) <= MAX_WHOLE_POWER) {
    return p === 1 ? base! : make.apply(wholePower(p), base!);
  }
  const b = make.exactValue(base!);
  if (b !== undefined && b < 0) {
    throw make.refuse(
      `(${b}) to a power that is not whole, on which spreadsheet programs disagree`,
      'use a base that is not negative',
    );
  }
  if (make.isConstant(power!)) {
    return make.apply(REAL_POWER, base!, power!);
  }
  return make.apply(EXP, make.apply(MULTIPLY, power!, make.apply(LN_OF_BASE, base!)));
}

const SQUARE = wholePower(2);

export function square(make: Maker, x: number): number {
  return make.apply(SQUARE, x);
}
