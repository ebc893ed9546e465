/**
 * Steps: INT, TRUNC, ROUND, ROUNDUP, ROUNDDOWN, FLOOR, CEILING, MOD. Each jumps at
 * known levels of its operand and is flat between them, so that the proof cuts it
 * exactly.
 *
 * Source: OpenFormula 1.2 §6.17, ECMA-376 part 1 §18.17.7. Not handled: significances
 * and divisors of the other sign where spreadsheet programs disagree; the decimal
 * repair that some programs make when a tie is missed by rounding.
 */
import type { Interval } from '../../numeric/interval';
import * as I from '../../numeric/interval';
import * as J from '../../numeric/jet';
import type { Operation } from '../operation';
import type { Maker, Row } from '../row';
import { ABS, CHOOSE_BY } from './choice';
import { DIVIDE, MULTIPLY, NEGATE } from './arithmetic';
import { NOT_NEGATIVE } from './truth';

/** A rising step function that jumps only at levels `shift` + a whole number. */
function steps(name: string, point: (x: number) => number, shift: number): Operation {
  return {
    name,
    point,
    enclose: (out, u) => I.set(out, point(u.lo), point(u.hi)),
    slopes(out) {
      if (out.v.lo === out.v.hi) J.setConstantSlopes(out);
      else J.setJump(out);
    },
    turnsOn: 0,
    level: (u) => wholeLevel(u, shift),
  };
}

/** The level shift + k (k whole) nearest to the middle of u among those inside. */
function wholeLevel({ lo, hi }: Interval, shift: number): number {
  if (!(hi - lo < Infinity)) return lo < shift && hi > shift ? shift : NaN;
  const level = Math.round(lo / 2 + hi / 2 - shift) + shift;
  if (lo < level && level < hi) return level;
  return lo < level + 1 && level + 1 < hi ? level + 1 : level - 1;
}

export const INT = steps('INT', Math.floor, 0);

/** Ties go away from zero. |x| − ⌊|x|⌋ is exact, which |x| + 0.5 is not. */
function roundHalfAway(x: number): number {
  const size = Math.abs(x);
  const down = Math.floor(size);
  const rounded = size - down >= 0.5 ? down + 1 : down;
  return x < 0 ? 0 - rounded : rounded;
}

const TO_NEAREST = steps('round', roundHalfAway, 0.5);
const TO_ZERO = steps('TRUNC', (x) => (x < 0 ? 0 - Math.floor(-x) : Math.floor(x)), 0);
const FROM_ZERO = steps('round up', (x) => (x < 0 ? Math.floor(x) : 0 - Math.floor(-x)), 0);

const MAX_DIGITS = 15;

/** x in units of 10^-digits, rounded, and back. */
function rounded(make: Maker, step: Operation, x: number, digits: number): number {
  const n = make.exactValue(digits);
  if (n === undefined || Math.floor(n) !== n || Math.abs(n) > MAX_DIGITS) {
    throw make.refuse(
      n === undefined ? 'a number of digits that is not a constant' : `${n} digits`,
      `give a whole number of digits from -${MAX_DIGITS} to ${MAX_DIGITS}`,
    );
  }
  if (n === 0) return make.apply(step, x);
  // 10^15 is a double, 10^-1 is not.
  const unit = make.number(Number(`1e${Math.abs(n)}`));
  const [into, back] = n > 0 ? [MULTIPLY, DIVIDE] : [DIVIDE, MULTIPLY];
  return make.apply(back, make.apply(step, make.apply(into, x, unit)), unit);
}

function roundingTo(name: string, step: Operation, least: 1 | 2): Row {
  return {
    name,
    least,
    most: 2,
    rewrite: (make, [x, digits]) => rounded(make, step, x!, digits ?? make.number(0)),
  };
}

/** The next multiple of `unit` below. */
function multipleBelow(make: Maker, x: number, unit: number): number {
  if (make.exactValue(unit) === 1) return make.apply(INT, x);
  return make.apply(MULTIPLY, make.apply(INT, make.apply(DIVIDE, x, unit)), unit);
}

/** The next multiple of `unit` above. */
function multipleAbove(make: Maker, x: number, unit: number): number {
  return make.apply(NEGATE, multipleBelow(make, make.apply(NEGATE, x), unit));
}

type ToMultiple = typeof multipleBelow;

function checkUnit(make: Maker, unit: number): void {
  const known = make.enclosure(unit);
  if (known && known.lo > 0) return;
  throw make.refuse(
    known
      ? 'a significance that is not above 0, on which spreadsheet programs disagree'
      : 'a significance that is not a constant',
    'give a constant above 0',
  );
}

/** FLOOR and CEILING of two arguments. */
function toMultiple(name: string, round: ToMultiple): Row {
  return {
    name,
    least: 2,
    most: 2,
    rewrite(make, [x, unit]) {
      checkUnit(make, unit!);
      return round(make, x!, unit!);
    },
  };
}

/** FLOOR.MATH and CEILING.MATH: the sign of the significance does not count; mode turns negative numbers round. */
function toMultipleByMode(name: string, round: ToMultiple, opposite: ToMultiple): Row {
  return {
    name,
    least: 1,
    most: 3,
    rewrite(make, [x, significance, mode]) {
      const unit = make.apply(ABS, significance ?? make.number(1));
      checkUnit(make, unit);
      const plain = round(make, x!, unit);
      const turned = mode === undefined ? 0 : make.exactValue(mode);
      if (turned === undefined) throw make.refuse('a mode that is not a constant', 'give 0 or 1');
      if (turned === 0) return plain;
      return make.apply(CHOOSE_BY, plain, opposite(make, x!, unit), make.apply(NOT_NEGATIVE, x!));
    },
  };
}

/**
 * x − d·⌊x/d⌋ with the operands x, d, x/d: the sign of d, and flat steps taken off a
 * straight line. JavaScript's % is exact.
 */
const REMAINDER: Operation = {
  name: 'MOD',
  point(x, d) {
    const r = x % d;
    return r !== 0 && r < 0 !== d < 0 ? r + d : r === 0 ? 0 : r;
  },
  enclose(out, x, d, q) {
    const turns = Math.floor(q.lo);
    I.set(bounds, Math.min(0, d.lo), Math.max(0, d.hi));
    if (turns === Math.floor(q.hi)) {
      I.scale(taken, d, turns);
      I.subtract(out, x, taken);
      I.set(out, Math.max(out.lo, bounds.lo), Math.min(out.hi, bounds.hi));
      if (out.lo <= out.hi) return;
    }
    I.copy(out, bounds);
  },
  slopes(out, x, d, q) {
    const turns = Math.floor(q.v.lo);
    if (turns !== Math.floor(q.v.hi)) {
      J.setJump(out);
      return;
    }
    I.scale(taken, d.d, turns);
    I.subtract(out.d, x.d, taken);
    I.scale(taken, d.h, turns);
    I.subtract(out.h, x.h, taken);
  },
  turnsOn: 2,
  level: (q) => wholeLevel(q, 0),
};

/** Scratch for one rule at a time; it holds nothing between calls. */
const taken = I.interval();
const bounds = I.interval();

function remainder(make: Maker, [x, d]: readonly number[]): number {
  return make.apply(REMAINDER, x!, d!, make.apply(DIVIDE, x!, d!));
}

export const ROUNDING_ROWS: readonly Row[] = [
  { name: 'INT', least: 1, most: 1, operation: INT },
  roundingTo('TRUNC', TO_ZERO, 1),
  roundingTo('ROUND', TO_NEAREST, 2),
  roundingTo('ROUNDUP', FROM_ZERO, 2),
  roundingTo('ROUNDDOWN', TO_ZERO, 2),
  toMultiple('FLOOR', multipleBelow),
  toMultiple('CEILING', multipleAbove),
  toMultipleByMode('FLOOR.MATH', multipleBelow, multipleAbove),
  toMultipleByMode('CEILING.MATH', multipleAbove, multipleBelow),
  { name: 'MOD', least: 2, most: 2, rewrite: remainder },
];
