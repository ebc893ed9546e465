/** Shapes that the worksheet functions are tried on, and what their answers are read with. */
import type { Cell, Range } from '../../src/index';

interface Tried {
  readonly name: string;
  readonly density: Range;
  readonly limits: Range | null;
  readonly givens: readonly Range[];
}

const tried = (
  name: string,
  density: Range | string,
  limits: Range | null = null,
  ...givens: readonly Range[]
): Tried => ({
  name,
  density: typeof density === 'string' ? [[density]] : density,
  limits,
  givens,
});

export const SHAPES: readonly Tried[] = [
  tried(
    'a hump',
    'EXP(-0.5*((x-m)/s)^2)',
    [[0, 12]],
    [
      ['m', 4],
      ['s', 1.3],
    ],
  ),
  tried('two humps', '0.6*EXP(-0.5*(x-2)^2)+0.4*EXP(-2*(x-7)^2)', [[0, 10]]),
  tried('kinks and a zero stretch', 'MAX(0,1-ABS(x-2)/1.5)', [[0, 5]]),
  tried('a jump', 'IF(x<2,1+x,0.5*EXP(-(x-2)))', [[0, 6]]),
  tried('a gap', 'IF(AND(x>1,x<3),0,EXP(-x/2))', [[0, 6]]),
  tried('a spike on a floor', '1+2000*EXP(-(((x-31)/0.0001)^2))', [[0, 100]]),
  tried('an infinite slope', 'x^1.5*(1-x)^0.5', [[0, 1]]),
  tried('an overflow', 'EXP(800-5*(x-3)^2)', [[0, 6]]),
  tried('an underflow', 'EXP(-900-x)', [[0, 5]]),
  tried(
    'a product of lines',
    [['EXP(-x)'], ['x>0.5'], ['1+x']],
    [['t', 0, 4]].map((row) => ['x', ...row.slice(1)]),
  ),
  tried('a table with a jump', [
    ['tonnes', 'harvest'],
    [0, 0],
    [4, 3],
    [4, 1],
    [9, 0],
  ]),
  tried(
    'a cut table',
    [
      [0, 1],
      [10, 3],
    ],
    [[2, 5]],
  ),
  tried('a block', [
    ['density', 'EXP(-x/m)'],
    ['from', 0],
    ['to', 'most'],
    ['m', 2],
    ['most', 8],
  ]),
];

/** Values as a column of cells. */
export function columnOf(values: ArrayLike<number>): Range {
  return Array.from(values, (value) => [value]);
}

/** The numbers below a heading row. */
export function numbersOf(range: Range): readonly (readonly number[])[] {
  return range.slice(1) as readonly (readonly number[])[];
}

/** Lines of item | value by their items. */
export function itemsOf(range: Range, column = 1): ReadonlyMap<string, Cell> {
  return new Map(range.map((row) => [row[0] as string, row[column]!]));
}
