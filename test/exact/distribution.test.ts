import type { Distribution } from '../../src/exact/distribution';
import { readShapes } from '../../src/density/shape';
import type { Cell, Range } from '../../src/index';
import { prove } from '../../src/worksheet/proved';

const PLACES = { density: 'density', limits: 'limits', givens: 3 };

function shapeOf(density: Range, limits: Range | null) {
  return prove(readShapes(density, limits, [], PLACES).shapes[0]!);
}
const of = (formula: string, from: Cell, to: Cell): Distribution =>
  shapeOf([[formula]], [[from, to]]).distribution;

const SHAPES: readonly (readonly [string, Cell, Cell])[] = [
  ['EXP(-(x^2)/2)', 'unbounded', 'unbounded'],
  ['T.DIST(x,1,FALSE)', 'unbounded', 'unbounded'],
  ['x^-0.5', 0, 1],
  ['(1-x)^-0.9', 0, 1],
  ['x*EXP(-x)', 0, 'unbounded'],
  ['EXP(-((x-50)^2)/200)*(1+SIN(x)^2)', 0, 100],
  ['IF(x<1,1,IF(x<2,0,3))', 0, 3],
  ['EXP(-ABS(x))', -40, 40],
  ['LOGNORM.DIST(x,0,1,FALSE)', 0, 'unbounded'],
];

describe('sharesOfRising', () => {
  it.each(SHAPES)(
    '%s from %s to %s: many values at a time have the shares of each [law]',
    (...args) => {
      const [formula, from, to] = args;
      const { distribution, shares } = shapeOf([[formula]], [[from, to]]);
      const n = 500;
      const values: number[] = [];
      for (let i = 1; i < n; i++) values.push(shares.quantile(i / n, 'below'));
      for (const tail of [1e-15, 1e-9, 1e-5])
        values.push(shares.quantile(tail, 'below'), shares.quantile(tail, 'above'));
      values.push(
        from === 'unbounded' ? -1e6 : Number(from) - 1,
        to === 'unbounded' ? 1e6 : Number(to),
      );
      const rising = Float64Array.from(values).sort();
      const { below, above } = distribution.sharesOfRising(rising);
      rising.forEach((x, i) => {
        // Derived: cells are known to 1e-12 of their area, tails below 1e-6 of a cell by themselves.
        const [low, high] = [shares.below(x), shares.above(x)];
        expect(Math.abs(below[i]! - low)).toBeLessThanOrEqual(1e-13 + 1e-6 * low);
        expect(Math.abs(above[i]! - high)).toBeLessThanOrEqual(1e-13 + 1e-6 * high);
        expect(below[i]! + above[i]!).toBeCloseTo(1, 12);
      });
    },
  );
});

describe('moments', () => {
  // Mean, variance, skewness and kurtosis of named distributions: Johnson, Kotz & Balakrishnan
  // (1994), "Continuous Univariate Distributions" 1 and 2, from memory.
  it.each([
    ['EXP(-((x-7)^2)/18)', 'unbounded', 'unbounded', 7, 3, 0, 3],
    ['EXP(-x/4)', 0, 'unbounded', 4, 4, 2, 9],
    ['x^2*EXP(-x)', 0, 'unbounded', 3, Math.sqrt(3), 2 / Math.sqrt(3), 5],
    ['1', 1000, 1012, 1006, Math.sqrt(12), 0, 1.8],
    ['x^-0.5', 0, 1, 1 / 3, Math.sqrt(4 / 45), 0.6388765649999399, 15 / 7],
    ['T.DIST(x,5,FALSE)', 'unbounded', 'unbounded', 0, Math.sqrt(5 / 3), 0, 9],
    ['EXP(-ABS(x))', 'unbounded', 'unbounded', 0, Math.SQRT2, 0, 6],
  ] as const)('of %s from %s to %s [published]', (formula, from, to, mean, sd, third, fourth) => {
    const { moments } = of(formula, from, to);
    expect(Math.abs(moments.mean! - mean)).toBeLessThan(1e-10 * (Math.abs(mean) + sd));
    expect(Math.abs(moments.deviation! / sd - 1)).toBeLessThan(1e-9);
    expect(Math.abs(moments.standardised(3)! - third)).toBeLessThan(1e-7);
    expect(Math.abs(moments.standardised(4)! / fourth - 1)).toBeLessThan(1e-6);
  });

  it('of a table are those of its straight lines [law]', () => {
    const { moments } = shapeOf(
      [
        [0, 0],
        [2, 4],
        [5, 0],
      ],
      null,
    ).distribution;
    // Triangular (0, 2, 5): mean 7/3, variance (a² + b² + c² − ab − ac − bc)/18.
    expect(moments.mean).toBeCloseTo(7 / 3, 12);
    expect(moments.deviation).toBeCloseTo(Math.sqrt(19 / 18), 12);
  });

  it('are not told where they are not proved to be finite [law]', () => {
    const one = of('T.DIST(x,1,FALSE)', 'unbounded', 'unbounded').moments;
    expect([one.mean, one.deviation, one.standardised(3)]).toEqual([null, null, null]);
    const two = of('T.DIST(x,2,FALSE)', 'unbounded', 'unbounded').moments;
    expect(two.mean).toBeCloseTo(0, 9);
    expect([two.deviation, two.standardised(3)]).toEqual([null, null]);
    const three = of('T.DIST(x,3,FALSE)', 'unbounded', 'unbounded').moments;
    expect(three.deviation).toBeCloseTo(Math.sqrt(3), 6);
    expect(three.standardised(4)).toBeNull();
  });
});
