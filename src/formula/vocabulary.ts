/**
 * The vocabulary: one row per operator and function of the formula language.
 *
 * Each row carries its arity and either its operation (the rule at a point, over
 * an interval, for the slopes) or its rewriting into other rows; both are written in
 * operations/, a file a family. Adding a function is adding a row. Names, argument
 * order and values are those of OpenFormula 1.2 and ECMA-376 part 1 §18.17.7; where
 * spreadsheet programs disagree (0^0, odd roots of negative numbers) the row leaves
 * the case undefined and the proof refuses it.
 */
import type { Operation } from './operation';
import { ADD, DIVIDE, MULTIPLY, NEGATE, SUBTRACT } from './operations/arithmetic';
import { BETA_ROWS } from './operations/betas';
import { BRANCH_ROWS } from './operations/branch';
import { CALENDAR_ROWS } from './operations/calendar';
import { ABS, SIGN } from './operations/choice';
import { COUNT_ROWS } from './operations/counts';
import { ERF, ERFC } from './operations/error';
import { EXP, LN, LOG10 } from './operations/exponential';
import { GAMMA, GAMMALN } from './operations/gamma';
import { GAMMA_ROWS } from './operations/gammas';
import { ACOSH, ASINH, ATANH, COSH, SINH, TANH } from './operations/hyperbolic';
import { MANY_ROWS } from './operations/many';
import { NORMAL_ROWS } from './operations/normal';
import { raise, SQRT } from './operations/power';
import { ROUNDING_ROWS } from './operations/rounding';
import {
  BOTH,
  comparison,
  EITHER,
  gate,
  NOT,
  NOT_NEGATIVE,
  NOT_ZERO,
  POSITIVE,
  truthOf,
} from './operations/truth';
import { ACOS, angle, ASIN, ATAN, COS, SIN, TAN } from './operations/wave';
import type { Maker, Row } from './row';

function unary(name: string, operation: Operation): Row {
  return { name, least: 1, most: 1, operation };
}

/** A function of one argument written out in others. */
function written(name: string, rewrite: (make: Maker, x: number) => number): Row {
  return { name, least: 1, most: 1, rewrite: (make, [x]) => rewrite(make, x!) };
}

function logarithm(make: Maker, [x, base]: readonly number[]): number {
  if (base === undefined || make.exactValue(base) === 10) return make.apply(LOG10, x!);
  return make.apply(DIVIDE, make.apply(LN, x!), make.apply(LN, base));
}

/** ERF(x), or ERF(from, to). */
function errorBetween(make: Maker, [from, to]: readonly number[]): number {
  if (to === undefined) return make.apply(ERF, from!);
  return make.apply(SUBTRACT, make.apply(ERF, to), make.apply(ERF, from!));
}

const ROWS: readonly Row[] = [
  { name: '+', least: 2, most: 2, operation: ADD },
  { name: '-', least: 2, most: 2, operation: SUBTRACT },
  { name: '*', least: 2, most: 2, operation: MULTIPLY },
  { name: '/', least: 2, most: 2, operation: DIVIDE },
  { name: '^', least: 2, most: 2, rewrite: raise },
  { name: 'POWER', least: 2, most: 2, rewrite: raise },
  { name: 'negative', least: 1, most: 1, operation: NEGATE },
  written('%', (make, x) => make.apply(DIVIDE, x, make.number(100))),

  comparison('<', POSITIVE, true),
  comparison('>', POSITIVE, false),
  comparison('<=', NOT_NEGATIVE, true),
  comparison('>=', NOT_NEGATIVE, false),
  comparison('<>', NOT_ZERO, false),
  comparison('=', NOT_ZERO, false, true),
  gate('AND', BOTH),
  gate('OR', EITHER),
  written('NOT', (make, x) => make.apply(NOT, truthOf(make, x))),
  { name: 'TRUE', least: 0, most: 0, rewrite: (make) => make.apply(NOT_ZERO, make.number(1)) },
  { name: 'FALSE', least: 0, most: 0, rewrite: (make) => make.apply(NOT_ZERO, make.number(0)) },
  ...BRANCH_ROWS,

  unary('ABS', ABS),
  unary('SIGN', SIGN),
  ...ROUNDING_ROWS,
  ...MANY_ROWS,

  unary('SQRT', SQRT),
  written('SQRTPI', (make, x) => make.apply(SQRT, make.apply(MULTIPLY, x, make.pi()))),
  unary('EXP', EXP),
  unary('LN', LN),
  unary('LOG10', LOG10),
  { name: 'LOG', least: 1, most: 2, rewrite: logarithm },

  { name: 'PI', least: 0, most: 0, rewrite: (make) => make.pi() },
  unary('SIN', SIN),
  unary('COS', COS),
  unary('TAN', TAN),
  unary('ASIN', ASIN),
  unary('ACOS', ACOS),
  unary('ATAN', ATAN),
  { name: 'ATAN2', least: 2, most: 2, rewrite: angle },
  written('DEGREES', (make, x) =>
    make.apply(DIVIDE, make.apply(MULTIPLY, x, make.number(180)), make.pi()),
  ),
  written('RADIANS', (make, x) =>
    make.apply(DIVIDE, make.apply(MULTIPLY, x, make.pi()), make.number(180)),
  ),
  unary('SINH', SINH),
  unary('COSH', COSH),
  unary('TANH', TANH),
  unary('ASINH', ASINH),
  unary('ACOSH', ACOSH),
  unary('ATANH', ATANH),

  unary('GAMMA', GAMMA),
  unary('GAMMALN', GAMMALN),
  { name: 'ERF', least: 1, most: 2, rewrite: errorBetween },
  unary('ERFC', ERFC),
  ...NORMAL_ROWS,
  ...GAMMA_ROWS,
  ...BETA_ROWS,
  ...COUNT_ROWS,

  ...CALENDAR_ROWS,
];

/** Every row by its name in capitals. */
export const VOCABULARY: ReadonlyMap<string, Row> = new Map(ROWS.map((row) => [row.name, row]));
