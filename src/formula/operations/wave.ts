/** SIN, COS, TAN and their inverses. */
import * as elementary from '../../numeric/elementary';
import { lowerAt, upperAt } from '../../numeric/bounded';
import type { Interval } from '../../numeric/interval';
import * as I from '../../numeric/interval';
import * as special from '../../numeric/special';
import type { Operation } from '../operation';
import { smooth } from '../operation';
import type { Maker } from '../row';
import { DIVIDE, NEGATE, SUBTRACT } from './arithmetic';
import { CHOOSE_BY } from './choice';
import { endOfUnit, withinUnit } from './domain';
import { POSITIVE } from './truth';
import { undefinedBecause } from './undefined';

/** Scratch for one rule at a time; it holds nothing between calls. */
const t = I.interval();
const one = I.interval(1);

export const SIN: Operation = smooth({
  name: 'SIN',
  point: elementary.sin,
  enclose: I.sine,
  first: (out, u) => I.cosine(out, u),
  second: (out, _, v) => I.negate(out, v),
});

export const COS: Operation = smooth({
  name: 'COS',
  point: elementary.cos,
  enclose: I.cosine,
  first(out, u) {
    I.sine(out, u);
    I.negate(out, out);
  },
  second: (out, _, v) => I.negate(out, v),
});

/** 1 + v², the derivative of TAN. */
export function onePlusSquare(out: Interval, v: Interval): void {
  I.square(out, v);
  I.add(out, out, one);
}

export const TAN: Operation = smooth({
  name: 'TAN',
  point: elementary.tan,
  enclose: I.tangent,
  first: (out, _, v) => onePlusSquare(out, v),
  second(out, _, v, d) {
    I.multiply(out, v, d);
    I.scale(out, out, 2);
  },
  isSmoothOver: (u) => !I.mayHoldTangentPole(u),
});

export const ATAN: Operation = smooth({
  name: 'ATAN',
  point: elementary.atan,
  enclose: I.arctangent,
  first(out, u) {
    onePlusSquare(out, u);
    I.reciprocal(out, out);
  },
  second(out, u, _, d) {
    I.square(t, d);
    I.multiply(out, u, t);
    I.scale(out, out, -2);
  },
});

/** 1/√(1 − x²), written as a product for the digits near ±1. */
function inverseSlope(out: Interval, u: Interval): void {
  I.add(t, one, u);
  I.subtract(out, one, u);
  I.multiply(out, out, t);
  I.squareRoot(out, out);
  I.reciprocal(out, out);
}

export const ASIN: Operation = smooth({
  name: 'ASIN',
  point: special.asin.at,
  enclose(out, u) {
    const lo = lowerAt(special.asin, Math.max(-1, u.lo));
    I.set(out, lo, upperAt(special.asin, Math.min(1, u.hi)));
  },
  first: (out, u) => inverseSlope(out, u),
  second(out, u, _, d) {
    I.power(t, d, 3);
    I.multiply(out, u, t);
  },
  isSmoothOver: (u) => u.lo >= -1 && u.hi <= 1,
  defined: withinUnit,
  turnsOn: 0,
  level: endOfUnit,
  outside: 'ASIN takes a number that is not from -1 to 1',
});

export const ACOS: Operation = smooth({
  name: 'ACOS',
  point: special.acos.at,
  enclose(out, u) {
    const lo = lowerAt(special.acos, Math.min(1, u.hi));
    I.set(out, lo, upperAt(special.acos, Math.max(-1, u.lo)));
  },
  first(out, u) {
    inverseSlope(out, u);
    I.negate(out, out);
  },
  second(out, u, _, d) {
    I.power(t, d, 3);
    I.multiply(out, u, t);
  },
  isSmoothOver: (u) => u.lo >= -1 && u.hi <= 1,
  defined: withinUnit,
  turnsOn: 0,
  level: endOfUnit,
  outside: 'ACOS takes a number that is not from -1 to 1',
});

/**
 * ATAN2(x, y), the angle of the point (x, y) from −π to π, by quarters: the arctangent
 * of the smaller slope in each.
 */
export function angle(make: Maker, [x, y]: readonly number[]): number {
  const quarter = make.apply(DIVIDE, make.pi(), make.number(2));
  const steep = make.apply(ATAN, make.apply(DIVIDE, x!, y!));
  const onAxis = make.apply(
    CHOOSE_BY,
    make.pi(),
    undefinedBecause(make, 'ATAN2 takes 0 and 0'),
    make.apply(POSITIVE, make.apply(NEGATE, x!)),
  );
  const below = make.apply(
    CHOOSE_BY,
    make.apply(SUBTRACT, make.apply(NEGATE, quarter), steep),
    onAxis,
    make.apply(POSITIVE, make.apply(NEGATE, y!)),
  );
  const left = make.apply(
    CHOOSE_BY,
    make.apply(SUBTRACT, quarter, steep),
    below,
    make.apply(POSITIVE, y!),
  );
  return make.apply(
    CHOOSE_BY,
    make.apply(ATAN, make.apply(DIVIDE, y!, x!)),
    left,
    make.apply(POSITIVE, x!),
  );
}
