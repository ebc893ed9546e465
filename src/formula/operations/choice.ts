/** Operations that follow one operand or another: ABS, SIGN, MIN, MAX, IF. They kink or jump where they change over. */
import type { Interval } from '../../numeric/interval';
import * as I from '../../numeric/interval';
import * as J from '../../numeric/jet';
import type { Operation } from '../operation';
import type { Maker } from '../row';
import { SUBTRACT } from './arithmetic';

/** Slopes of a function that follows `a` or `b`, whichever, without a jump between them. */
function eitherSlope(out: J.Jet, a: J.Jet, b: J.Jet): void {
  I.hull(out.d, a.d, b.d);
  I.setEntire(out.h);
}

function takeSlopes(out: J.Jet, a: J.Jet): void {
  I.copy(out.d, a.d);
  I.copy(out.h, a.h);
}

const mirrored = J.jet();

export const ABS: Operation = {
  name: 'ABS',
  growth: { kind: 'same' },
  point: Math.abs,
  enclose: I.absolute,
  slopes(out, a) {
    if (a.v.lo >= 0) takeSlopes(out, a);
    else {
      I.negate(mirrored.d, a.d);
      I.negate(mirrored.h, a.h);
      if (a.v.hi <= 0) takeSlopes(out, mirrored);
      else eitherSlope(out, a, mirrored);
    }
  },
  logarithm: (out, [a]) => J.copyJet(out, a),
  turnsOn: 0,
};

export const SIGN: Operation = {
  name: 'SIGN',
  point: (a) => (a > 0 ? 1 : a < 0 ? -1 : 0),
  enclose(out, a) {
    I.set(out, a.lo > 0 ? 1 : a.lo === 0 ? 0 : -1, a.hi < 0 ? -1 : a.hi === 0 ? 0 : 1);
  },
  slopes(out) {
    if (out.v.lo === out.v.hi) J.setConstantSlopes(out);
    else J.setJump(out);
  },
  turnsOn: 0,
};

/** The lesser or the greater of a and b, told by the sign of their difference c. */
function extreme(
  name: string,
  sign: 1 | -1,
  point: (a: number, b: number) => number,
  enclose: Operation['enclose'],
): Operation {
  const takesFirst = (c: Interval): boolean => (sign > 0 ? c.hi <= 0 : c.lo >= 0);
  const takesSecond = (c: Interval): boolean => (sign > 0 ? c.lo >= 0 : c.hi <= 0);
  return {
    name,
    growth: { kind: 'extreme', sign },
    point,
    enclose(out, a, b, c) {
      if (takesFirst(c)) I.copy(out, a);
      else if (takesSecond(c)) I.copy(out, b);
      else enclose(out, a, b, c);
    },
    slopes(out, a, b, c) {
      if (takesFirst(c.v)) takeSlopes(out, a);
      else if (takesSecond(c.v)) takeSlopes(out, b);
      else eitherSlope(out, a, b);
    },
    logarithm(out, [a, b], [, , c]) {
      if (takesFirst(c.v)) J.copyJet(out, a);
      else if (takesSecond(c.v)) J.copyJet(out, b);
      else J.setUnknown(out);
    },
    turnsOn: 2,
  };
}

export const MIN = extreme('MIN', 1, (a, b) => Math.min(a, b), I.minimum);
export const MAX = extreme('MAX', -1, (a, b) => Math.max(a, b), I.maximum);

/** IF(c, a, b) with operands in the order a, b, c. */
export const CHOOSE_BY: Operation = {
  name: 'IF',
  growth: { kind: 'choice' },
  point: (a, b, c) => (c !== c ? NaN : c !== 0 ? a : b),
  enclose(out, a, b, c) {
    if (c.lo === 1) I.copy(out, a);
    else if (c.hi === 0) I.copy(out, b);
    else I.hull(out, a, b);
  },
  slopes(out, a, b, c) {
    if (c.v.lo === 1) takeSlopes(out, a);
    else if (c.v.hi === 0) takeSlopes(out, b);
    else J.setJump(out);
  },
  logarithm(out, [a, b], [, , c]) {
    if (c.v.lo === 1) J.copyJet(out, a);
    else if (c.v.hi === 0) J.copyJet(out, b);
    else {
      I.hull(out.v, a.v, b.v);
      J.setJump(out);
    }
  },
};

export function lesser(make: Maker, a: number, b: number): number {
  return make.apply(MIN, a, b, make.apply(SUBTRACT, a, b));
}

export function greater(make: Maker, a: number, b: number): number {
  return make.apply(MAX, a, b, make.apply(SUBTRACT, a, b));
}
