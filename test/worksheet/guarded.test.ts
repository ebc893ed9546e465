/** Densities that are defined, or not negative, only where their own condition holds. */
import type { Range } from '../../src/index';
import { acceptance, below, draw, expect as mean } from '../../src/index';
import { messageOf } from '../message';

const numberOf = (range: Range): number => Number(range[0]![0]);
const SEED = [['plan-2027']];
const LABEL = [['plans']];
const UNIT: Range = [
  ['early', 0, 1],
  ['late', 0, 1],
];

describe('one variable', () => {
  // ∫ (x − 1)^½ from 1 is proportional to (x − 1)^1.5.
  it.each([['(x>=1)*SQRT(x-1)'], ['SQRT(x-1)*AND(x>=1,x<9)'], ['(2*x-2>0)*(x-1)^0.5']])(
    'BELOW of %s has the share of the part where it is defined [law]',
    (text) => {
      expect(numberOf(below([[text]], [[0, 3]], [[2]], []))).toBeCloseTo(0.5 ** 1.5, 12);
    },
  );

  // Gamma with shape 1.5 from 1 on has the mean 2.5 (Johnson, Kotz & Balakrishnan 1994, 17.3).
  it('EXPECT takes a side without a limit [published]', () => {
    const [, row] = mean([['(x>=1)*SQRT(x-1)*EXP(1-x)']], [[0, 'unbounded']], [['x']], []);
    const [value, atLeast, atMost] = row as number[];
    expect(value).toBeCloseTo(2.5, 9);
    expect(atLeast! <= 2.5 && atMost! >= 2.5).toBe(true);
  });

  it('counted values where the condition fails are left out [law]', () => {
    const share = (text: string, from: number): number =>
      numberOf(below([[text]], [['x', from, 10, 1]], [[6]], []));
    expect(share('(x>=3)*SQRT(x-2)', 0)).toBeCloseTo(share('SQRT(x-2)', 3), 14);
  });

  it('ACCEPTANCE tells of it as of any other density [law]', () => {
    const lines = acceptance([['(x>=1)*SQRT(x-1)']], [[0, 3]], [[200]], SEED, LABEL, []);
    const end = (name: string): number => Number(lines.find(([item]) => item === name)?.[1]);
    const area = (2 / 3) * 2 ** 1.5;
    expect(end('area at least')).toBeLessThan(area);
    expect(end('area at most')).toBeGreaterThan(area);
    expect(end('breaches')).toBe(0);
  });

  it('what its condition does not leave out is refused [law]', () => {
    const call = () => draw([['(x>=0.2)*SQRT(x-1)']], [[0, 3]], [[5]], SEED, LABEL, []);
    expect(messageOf(call)).toBe(
      'Density: it is undefined from x = 0.2 to x = 1, where the square root of a negative number is taken; keep the limits where it is defined, or give it a height there with IF.',
    );
  });
});

describe('several variables', () => {
  it('DRAW keeps to the condition, with conditions in cells of their own [law]', () => {
    const density: Range = [['early>=late'], ['SQRT(early-late)'], ['late>0.25'], ['LN(4*late)']];
    const rows = draw(density, UNIT, [[300]], SEED, LABEL, []) as number[][];
    for (const [early, late] of rows) expect(early! >= late! && late! > 0.25).toBe(true);
  });

  // ∫∫ √(x − y) over 0 ≤ y ≤ x ≤ 1 is 4/15, on an area of ½.
  it('EXPECT takes a quantity that is defined only where the density is [law]', () => {
    const [, row] = mean([['early>=late']], UNIT, [['SQRT(early-late)']], []);
    const [, atLeast, atMost] = row as number[];
    expect(atLeast! <= 8 / 15 && atMost! >= 8 / 15).toBe(true);
    expect(atMost! - atLeast!).toBeLessThan(0.02);
  });
});
