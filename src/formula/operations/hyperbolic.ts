/**
 * SINH, COSH, TANH and their inverses. SINH and COSH know their logarithms, so that
 * densities such as 1/COSH(x) neither overflow nor lose digits far out.
 */
import * as elementary from '../../numeric/elementary';
import { lowerAt, setRising, upperAt } from '../../numeric/bounded';
import type { Interval } from '../../numeric/interval';
import * as I from '../../numeric/interval';
import * as special from '../../numeric/special';
import type { Operation } from '../operation';
import { Defined, smooth } from '../operation';
import { endOfUnit } from './domain';
import { onePlusSquare } from './wave';

/** Scratch for one rule at a time; it holds nothing between calls. */
const t = I.interval();
const size = I.interval();
const one = I.interval(1);

/** 1 − v², which cancels where v is near ±1; (1 − v)(1 + v) loses less and stays ≥ 0. */
function oneLessSquare(out: Interval, v: Interval): void {
  I.add(t, one, v);
  I.subtract(out, one, v);
  I.multiply(out, out, t);
}

function cosine(out: Interval, u: Interval): void {
  I.absolute(size, u);
  setRising(out, special.cosh, size);
}

export const SINH: Operation = smooth({
  name: 'SINH',
  point: special.sinh.at,
  enclose: (out, u) => setRising(out, special.sinh, u),
  first: (out, u) => cosine(out, u),
  second: (out, _, v) => I.copy(out, v),
  log: {
    value(out, u) {
      I.set(out, lowerAt(special.lnsinh, u.lo), upperAt(special.lnsinh, u.hi));
    },
    first(out, u) {
      I.hyperbolicTangent(out, u);
      I.reciprocal(out, out);
    },
    second(out, u) {
      setRising(out, special.sinh, u);
      I.square(out, out);
      I.reciprocal(out, out);
      I.negate(out, out);
    },
    holdsOver: (u) => u.lo > 0,
  },
});

export const COSH: Operation = smooth({
  name: 'COSH',
  point: special.cosh.at,
  enclose: cosine,
  first: (out, u) => setRising(out, special.sinh, u),
  second: (out, _, v) => I.copy(out, v),
  log: {
    value(out, u) {
      I.absolute(size, u);
      setRising(out, special.lncosh, size);
    },
    first: I.hyperbolicTangent,
    second(out, u) {
      I.hyperbolicTangent(out, u);
      oneLessSquare(out, out);
    },
  },
});

export const TANH: Operation = smooth({
  name: 'TANH',
  point: elementary.tanh,
  enclose: I.hyperbolicTangent,
  first: (out, _, v) => oneLessSquare(out, v),
  second(out, _, v, d) {
    I.multiply(out, v, d);
    I.scale(out, out, -2);
  },
});

export const ASINH: Operation = smooth({
  name: 'ASINH',
  point: special.asinh.at,
  enclose: (out, u) => setRising(out, special.asinh, u),
  first(out, u) {
    onePlusSquare(out, u);
    I.squareRoot(out, out);
    I.reciprocal(out, out);
  },
  second(out, u, _, d) {
    I.power(t, d, 3);
    I.multiply(out, u, t);
    I.negate(out, out);
  },
});

function atLeast1(u: Interval): Defined {
  return u.lo >= 1 ? Defined.Everywhere : u.hi >= 1 ? Defined.InPart : Defined.Nowhere;
}

export const ACOSH: Operation = smooth({
  name: 'ACOSH',
  point: special.acosh.at,
  enclose(out, u) {
    I.set(out, lowerAt(special.acosh, Math.max(1, u.lo)), upperAt(special.acosh, u.hi));
  },
  // 1/√(x² − 1), written as a product for the digits near 1.
  first(out, u) {
    I.subtract(t, u, one);
    I.add(out, u, one);
    I.multiply(out, out, t);
    I.squareRoot(out, out);
    I.reciprocal(out, out);
  },
  second(out, u, _, d) {
    I.power(t, d, 3);
    I.multiply(out, u, t);
    I.negate(out, out);
  },
  isSmoothOver: (u) => u.lo >= 1,
  defined: atLeast1,
  turnsOn: 0,
  level: () => 1,
  outside: 'ACOSH takes a number below 1',
});

function withinOne(u: Interval): Defined {
  if (u.lo >= -1 && u.hi <= 1 && u.lo < 1 && u.hi > -1) return Defined.Everywhere;
  return u.lo < 1 && u.hi > -1 ? Defined.InPart : Defined.Nowhere;
}

export const ATANH: Operation = smooth({
  name: 'ATANH',
  point: special.atanh.at,
  enclose(out, u) {
    const lo = u.lo <= -1 ? -Infinity : lowerAt(special.atanh, u.lo);
    I.set(out, lo, u.hi >= 1 ? Infinity : upperAt(special.atanh, u.hi));
  },
  first(out, u) {
    oneLessSquare(out, u);
    I.reciprocal(out, out);
  },
  second(out, u, _, d) {
    I.square(out, d);
    I.multiply(out, u, out);
    I.scale(out, out, 2);
  },
  isSmoothOver: (u) => u.lo > -1 && u.hi < 1,
  defined: withinOne,
  turnsOn: 0,
  level: endOfUnit,
  outside: 'ATANH takes a number that is not between -1 and 1',
});
