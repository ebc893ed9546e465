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
import { ADD, DIVIDE, MULTIPLY, NEGATE, NUMBER, SUBTRACT, VARIABLE } from './operations/arithmetic';
import { ABS, CHOOSE_BY, extremeOf, MAX, MIN, SIGN } from './operations/choice';
import { EXP, LN } from './operations/exponential';
import { raise, SQRT } from './operations/power';
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
import { ATAN, COS, SIN, TAN, TANH } from './operations/wave';
import type { Maker, Row } from './row';
import { ANY } from './row';

export type { Maker, Row };
export { CHOOSE_BY, EXP, NUMBER, VARIABLE };

function unary(name: string, operation: Operation): Row {
  return { name, least: 1, most: 1, operation };
}

/**
 * A function of any number of arguments from one of two, as a balanced tree: the
 * rounding of a sum of n terms then grows with log n instead of n.
 */
function folded(name: string, operation: Operation): Row {
  const fold = (make: Maker, args: readonly number[], from: number, to: number): number => {
    if (to - from === 1) return args[from]!;
    const half = from + Math.ceil((to - from) / 2);
    return make.apply(operation, fold(make, args, from, half), fold(make, args, half, to));
  };
  return { name, least: 1, most: ANY, rewrite: (make, args) => fold(make, args, 0, args.length) };
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
