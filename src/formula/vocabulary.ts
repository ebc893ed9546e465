/**
 * The vocabulary: one row per operator and function of the formula language.
 *
 * Each row carries its arity and either its operation (the rule at a point, over
 * an interval, for the slopes) or its rewriting into other rows. Adding a function
 * is adding a row. Names, argument order and values are those of OpenFormula 1.2
 * and ECMA-376 part 1 §18.17.7; where spreadsheet programs disagree (0^0, odd roots
 * of negative numbers) the row leaves the case undefined and the proof refuses it.
 * The file is long because it is one table.
 */
import * as elementary from '../numeric/elementary';
import type { Interval } from '../numeric/interval';
import * as I from '../numeric/interval';
import * as J from '../numeric/jet';
import type { Operation } from './operation';
import { Defined, setTruth, smooth, truth } from './operation';

/** What a rewriting may ask for: nodes are the places of a tape. */
export interface Maker {
  number(value: number): number;
  pi(): number;
  apply(operation: Operation, ...args: number[]): number;
  call(name: string, ...args: number[]): number;
  /** The value of a node that does not depend on the variables and is exactly known. */
  exactValue(node: number): number | undefined;
  isConstant(node: number): boolean;
  isTruth(node: number): boolean;
  /** Refuses the call with a message at its place. */
  refuse(found: string, expected: string): Error;
}

export interface Row {
  readonly name: string;
  readonly least: number;
  readonly most: number;
  readonly operation?: Operation;
  readonly rewrite?: (make: Maker, args: readonly number[]) => number;
}

const ANY = Infinity;
/** Scratch for one rule at a time; it holds nothing between calls. */
const t = I.interval();
const one = I.interval(1);

/* ---- operations ---------------------------------------------------------- */

export const NUMBER: Operation = {
  name: 'number',
  point: () => NaN,
  enclose: () => undefined,
  slopes: J.setConstantSlopes,
};

export const VARIABLE: Operation = {
  name: 'variable',
  point: () => NaN,
  enclose: () => undefined,
  slopes(out) {
    I.set(out.d, 1, 1);
    I.set(out.h, 0, 0);
  },
};

const NEGATE: Operation = {
  name: 'negate',
  point: (a) => 0 - a,
  enclose: I.negate,
  slopes(out, a) {
    I.negate(out.d, a.d);
    I.negate(out.h, a.h);
  },
  logarithm: (out, [a]) => J.copyJet(out, a),
};

const logSpread = I.interval();
const logTerm = I.interval();

/** ln(e^a + e^b) with its derivatives: weights of a and b are between 0 and 1 and their product is at most 1/4. */
function logOfSum(out: J.Jet, a: J.Jet, b: J.Jet): void {
  const lo = addedLogs(a.v.lo, b.v.lo, -1);
  const hi = addedLogs(a.v.hi, b.v.hi, 1);
  I.subtract(logSpread, a.d, b.d);
  I.square(logSpread, logSpread);
  I.set(logTerm, 0, 0.25);
  I.multiply(logSpread, logSpread, logTerm);
  I.hull(out.d, a.d, b.d);
  I.hull(out.h, a.h, b.h);
  I.add(out.h, out.h, logSpread);
  I.set(out.v, lo, hi);
}

function addedLogs(a: number, b: number, direction: -1 | 1): number {
  const most = Math.max(a, b);
  const least = Math.min(a, b);
  if (most === -Infinity || most === Infinity || least === -Infinity) return most;
  const sum = most + elementary.ln(1 + elementary.exp(least - most));
  return sum + direction * (Math.abs(sum) + 1) * 1e-14;
}

const ADD: Operation = {
  name: 'add',
  point: (a, b) => a + b,
  enclose: I.add,
  slopes(out, a, b) {
    I.addLoosely(out.d, a.d, b.d);
    I.addLoosely(out.h, a.h, b.h);
  },
  logarithm(out, [a, b], [u, v]) {
    if (u.v.lo >= 0 && v.v.lo >= 0) logOfSum(out, a, b);
    else J.setUnknown(out);
  },
};

const SUBTRACT: Operation = {
  name: 'subtract',
  point: (a, b) => a - b,
  enclose: I.subtract,
  slopes(out, a, b) {
    I.subtractLoosely(out.d, a.d, b.d);
    I.subtractLoosely(out.h, a.h, b.h);
  },
};

const product = J.jet();

const MULTIPLY: Operation = {
  name: 'multiply',
  point: (a, b) => a * b,
  enclose: I.multiply,
  slopes(out, a, b) {
    J.multiplyJet(product, a, b);
    I.copy(out.d, product.d);
    I.copy(out.h, product.h);
  },
  logarithm: (out, [a, b]) => J.addJet(out, a, b),
};

const DIVIDE: Operation = {
  name: 'divide',
  point: (a, b) => a / b,
  enclose: I.divide,
  slopes(out, a, b) {
    J.divideJet(product, a, b);
    I.copy(out.d, product.d);
    I.copy(out.h, product.h);
  },
  logarithm: (out, [a, b]) => J.subtractJet(out, a, b),
  defined: (_, b) => (b.lo === 0 && b.hi === 0 ? Defined.Nowhere : Defined.Everywhere),
  turnsOn: 1,
  outside: 'it divides by zero',
};

/** x^n for a fixed whole n ≠ 0. */
function wholePower(n: number): Operation {
  const raise = (out: Interval, u: Interval, k: number): void => {
    I.power(out, u, Math.abs(k));
    if (k < 0) I.reciprocal(out, out);
  };
  return smooth({
    name: `power ${n}`,
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

function nonNegative(u: Interval): Defined {
  return u.lo >= 0 ? Defined.Everywhere : u.hi >= 0 ? Defined.InPart : Defined.Nowhere;
}

function positive(u: Interval): Defined {
  return u.lo >= 0 && u.hi > 0 ? Defined.Everywhere : u.hi > 0 ? Defined.InPart : Defined.Nowhere;
}

export const EXP: Operation = smooth({
  name: 'EXP',
  point: elementary.exp,
  enclose: I.exponential,
  first: (out, _, v) => I.copy(out, v),
  second: (out, _, v) => I.copy(out, v),
  logarithm: (out, _, [u]) => J.copyJet(out, u),
});

const LN: Operation = smooth({
  name: 'LN',
  point: (x) => (x < 0 ? NaN : elementary.ln(x)),
  enclose: I.logarithm,
  first: (out, u) => I.reciprocal(out, u),
  second(out, u) {
    I.square(out, u);
    I.reciprocal(out, out);
    I.negate(out, out);
  },
  isSmoothOver: (u) => u.lo > 0,
  defined: positive,
  turnsOn: 0,
  outside: 'LN takes a number that is not above 0',
});

const SQRT: Operation = smooth({
  name: 'SQRT',
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
  outside: 'SQRT takes a negative number',
});

const SIN: Operation = smooth({
  name: 'SIN',
  point: elementary.sin,
  enclose: I.sine,
  first: (out, u) => I.cosine(out, u),
  second: (out, _, v) => I.negate(out, v),
});

const COS: Operation = smooth({
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
function onePlusSquare(out: Interval, v: Interval): void {
  I.square(out, v);
  I.add(out, out, one);
}

const TAN: Operation = smooth({
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

const ATAN: Operation = smooth({
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

const TANH: Operation = smooth({
  name: 'TANH',
  point: elementary.tanh,
  enclose: I.hyperbolicTangent,
  // 1 − tanh² cancels where TANH is near ±1; (1 − v)(1 + v) loses less and stays ≥ 0.
  first(out, _, v) {
    I.add(t, one, v);
    I.subtract(out, one, v);
    I.multiply(out, out, t);
  },
  second(out, _, v, d) {
    I.multiply(out, v, d);
    I.scale(out, out, -2);
  },
});

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

const ABS: Operation = {
  name: 'ABS',
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

const SIGN: Operation = {
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

const MIN = extreme('MIN', 1, Math.min, I.minimum);
const MAX = extreme('MAX', -1, Math.max, I.maximum);

/** IF(c, a, b) with operands in the order a, b, c. */
export const CHOOSE_BY: Operation = {
  name: 'IF',
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

const POSITIVE = truth({
  name: 'is positive',
  point: (a) => (a > 0 ? 1 : a <= 0 ? 0 : NaN),
  enclose: (out, a) => setTruth(out, a.lo > 0, a.hi <= 0),
  turnsOn: 0,
});

const NOT_NEGATIVE = truth({
  name: 'is not negative',
  point: (a) => (a >= 0 ? 1 : a < 0 ? 0 : NaN),
  enclose: (out, a) => setTruth(out, a.lo >= 0, a.hi < 0),
  turnsOn: 0,
});

const NOT_ZERO = truth({
  name: 'is not zero',
  point: (a) => (a === 0 ? 0 : a === a ? 1 : NaN),
  enclose: (out, a) => setTruth(out, a.lo > 0 || a.hi < 0, a.lo === 0 && a.hi === 0),
  turnsOn: 0,
});

const BOTH = truth({
  name: 'AND',
  point: (a, b) => a * b,
  enclose: I.minimum,
});

const EITHER = truth({
  name: 'OR',
  point: (a, b) => Math.max(a, b),
  enclose: I.maximum,
});

const NOT = truth({
  name: 'NOT',
  point: (a) => 1 - a,
  enclose: (out, a) => I.set(out, 1 - a.hi, 1 - a.lo),
});

/* ---- rows ---------------------------------------------------------------- */

function unary(name: string, operation: Operation): Row {
  return { name, least: 1, most: 1, operation };
}

/** A function of any number of arguments as a chain of one of two. */
function folded(name: string, operation: Operation): Row {
  return {
    name,
    least: 1,
    most: ANY,
    rewrite: (make, args) => args.reduce((a, b) => make.apply(operation, a, b)),
  };
}

function extremeOf(name: string, operation: Operation): Row {
  return {
    name,
    least: 1,
    most: ANY,
    rewrite: (make, args) =>
      args.reduce((a, b) => make.apply(operation, a, b, make.apply(SUBTRACT, a, b))),
  };
}

function truthOf(make: Maker, node: number): number {
  return make.isTruth(node) ? node : make.apply(NOT_ZERO, node);
}

function gate(name: string, operation: Operation): Row {
  return {
    name,
    least: 1,
    most: ANY,
    rewrite: (make, args) =>
      args.map((a) => truthOf(make, a)).reduce((a, b) => make.apply(operation, a, b)),
  };
}

/** A comparison by the sign of a difference; `swap` takes b − a. */
function comparison(name: string, operation: Operation, swap: boolean, opposite = false): Row {
  return {
    name,
    least: 2,
    most: 2,
    rewrite(make, [a, b]) {
      if (make.isTruth(a!) !== make.isTruth(b!)) {
        throw make.refuse(
          'a TRUE or FALSE is compared with a number, on which spreadsheet programs disagree',
          'write IF(…, 1, 0) around the condition, or AND(…, …) for a chain such as 1<x<3',
        );
      }
      const difference = make.apply(SUBTRACT, swap ? b! : a!, swap ? a! : b!);
      const holds = make.apply(operation, difference);
      return opposite ? make.apply(NOT, holds) : holds;
    },
  };
}

const MAX_WHOLE_POWER = 1024;

function raise(make: Maker, [base, power]: readonly number[]): number {
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
  if (make.isConstant(power!)) {
    const b = make.exactValue(base!);
    if (b !== undefined && b < 0) {
      throw make.refuse(
        `(${b}) to a power that is not whole, on which spreadsheet programs disagree`,
        'use a base that is not negative',
      );
    }
    return make.apply(REAL_POWER, base!, power!);
  }
  return make.apply(EXP, make.apply(MULTIPLY, power!, make.apply(LN, base!)));
}

const ROWS: readonly Row[] = [
  { name: '+', least: 2, most: 2, operation: ADD },
  { name: '-', least: 2, most: 2, operation: SUBTRACT },
  { name: '*', least: 2, most: 2, operation: MULTIPLY },
  { name: '/', least: 2, most: 2, operation: DIVIDE },
  { name: '^', least: 2, most: 2, rewrite: raise },
  { name: 'negative', least: 1, most: 1, operation: NEGATE },
  {
    name: '%',
    least: 1,
    most: 1,
    rewrite: (make, [x]) => make.apply(DIVIDE, x!, make.number(100)),
  },
  comparison('<', POSITIVE, true),
  comparison('>', POSITIVE, false),
  comparison('<=', NOT_NEGATIVE, true),
  comparison('>=', NOT_NEGATIVE, false),
  comparison('<>', NOT_ZERO, false),
  comparison('=', NOT_ZERO, false, true),
  { name: 'PI', least: 0, most: 0, rewrite: (make) => make.pi() },
  unary('ABS', ABS),
  unary('SIGN', SIGN),
  extremeOf('MIN', MIN),
  extremeOf('MAX', MAX),
  folded('SUM', ADD),
  folded('PRODUCT', MULTIPLY),
  {
    name: 'AVERAGE',
    least: 1,
    most: ANY,
    rewrite: (make, args) =>
      make.apply(DIVIDE, make.call('SUM', ...args), make.number(args.length)),
  },
  unary('SQRT', SQRT),
  unary('EXP', EXP),
  unary('LN', LN),
  {
    name: 'LOG',
    least: 1,
    most: 2,
    rewrite: (make, [x, base]) =>
      make.apply(DIVIDE, make.apply(LN, x!), make.apply(LN, base ?? make.number(10))),
  },
  { name: 'LOG10', least: 1, most: 1, rewrite: (make, [x]) => make.call('LOG', x!) },
  { name: 'POWER', least: 2, most: 2, rewrite: raise },
  unary('SIN', SIN),
  unary('COS', COS),
  unary('TAN', TAN),
  unary('ATAN', ATAN),
  unary('TANH', TANH),
  {
    name: 'IF',
    least: 2,
    most: 3,
    rewrite: (make, [c, a, b]) => make.apply(CHOOSE_BY, a!, b ?? make.number(0), truthOf(make, c!)),
  },
  gate('AND', BOTH),
  gate('OR', EITHER),
  { name: 'NOT', least: 1, most: 1, rewrite: (make, [a]) => make.apply(NOT, truthOf(make, a!)) },
  { name: 'TRUE', least: 0, most: 0, rewrite: (make) => make.apply(NOT_ZERO, make.number(1)) },
  { name: 'FALSE', least: 0, most: 0, rewrite: (make) => make.apply(NOT_ZERO, make.number(0)) },
];

/** Every row by its name in capitals. */
export const VOCABULARY: ReadonlyMap<string, Row> = new Map(ROWS.map((row) => [row.name, row]));
