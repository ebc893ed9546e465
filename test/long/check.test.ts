/**
 * CHECK over many seeded columns: p-values are uniform under the truth, the overall line is
 * wrong for at most one column in a hundred, and it objects to columns that are off.
 */
import type { FitLine } from '../../src/evidence/fit';
import { comparisonsOf, fitter } from '../../src/evidence/fit';
import { check, draw } from '../../src/index';
import type { Range } from '../../src/index';
import { readShapes } from '../../src/density/shape';
import { prove } from '../../src/worksheet/proved';
import { Z_FALSE_ALARM } from '../draw/statistics';

const REPETITIONS = 20_000;
const SEED = [['plan-2027']];
const PLACES = { density: 'density', limits: 'limits', givens: 3 };

const TRIANGLE: Range = [
  [0, 0],
  [2, 4],
  [5, 0],
];
const SHAPES: readonly (readonly [string, Range, Range | null])[] = [
  ['normal', [['EXP(-0.5*x^2)']], [['unbounded', 'unbounded']]],
  ['exponential', [['EXP(-x)']], [[0, 'unbounded']]],
  ['two-humped', [['EXP(-8*(x-1)^2)+EXP(-8*(x+1)^2)']], [[-4, 4]]],
  ['pole', [['x^-0.5']], [[0, 1]]],
  ['triangle', TRIANGLE, null],
  ['heavy tails', [['T.DIST(x,3,FALSE)']], [['unbounded', 'unbounded']]],
];

const text = (density: Range): string => JSON.stringify(density);

/** Calls back with the lines of each of REPETITIONS columns of n rows. */
function eachColumn(
  density: Range,
  limits: Range | null,
  n: number,
  use: (lines: readonly FitLine[], level: number) => void,
): void {
  const { distribution } = prove(readShapes(density, limits, [], PLACES).shapes[0]!);
  const level = 0.01 / comparisonsOf(distribution);
  const fit = fitter(distribution, n, level);
  const all = draw(density, limits, [[n * REPETITIONS]], SEED, [[`${text(density)} ${n}`]], []);
  for (let r = 0; r < REPETITIONS; r++) {
    const values = Float64Array.from({ length: n }, (_, i) => all[r * n + i]![0] as number);
    use(fit(values), level);
  }
}

describe('CHECK over 20,000 columns that follow their shape', () => {
  it.each(SHAPES.flatMap(([name, ...shape]) => [10, 50].map((n) => [name, n, ...shape] as const)))(
    '%s, %d rows: shows a sign in at most 1 of 100, with uniform p-values [law]',
    (name, n, density, limits) => {
      const levels = [0.001, 0.01, 0.05, 0.25, 0.5, 0.75, 0.95];
      const uniform = ['Kolmogorov', 'Anderson', 'correlation'];
      const counts = uniform.map(() => levels.map(() => 0));
      let wrong = 0;
      eachColumn(density, limits, n, (lines, level) => {
        if (lines.some(({ pValue }) => pValue !== null && pValue < level)) wrong++;
        uniform.forEach((item, k) => {
          const { pValue } = lines.find((line) => line.item.startsWith(item))!;
          levels.forEach((level, i) => (counts[k]![i]! += pValue! < level ? 1 : 0));
        });
      });
      const errorOf = (share: number): number => Math.sqrt((share * (1 - share)) / REPETITIONS);
      console.log(`${name}, ${n} rows: signs in ${wrong} of ${REPETITIONS} columns`);
      expect(wrong / REPETITIONS).toBeLessThan(0.01 + Z_FALSE_ALARM * errorOf(0.01));
      uniform.forEach((item, k) => {
        levels.forEach((level, i) => {
          // The distributions of Anderson–Darling's and the serial statistic for few rows are
          // fitted by their authors: a twentieth of the level is left to that.
          const fitted = item === 'Kolmogorov' ? 0 : 0.05 * Math.min(level, 1 - level);
          const off = Math.abs(counts[k]![i]! / REPETITIONS - level);
          const allowed = Z_FALSE_ALARM * errorOf(level) + fitted;
          expect({ item, level, off, isOff: off > allowed }).toMatchObject({ isOff: false });
        });
      });
    },
  );
});

describe('CHECK of columns that are off', () => {
  const NORMAL = SHAPES[0]!;
  const ROWS = 20_000;
  const COLUMNS = 500;

  it('objects to each of 500 columns of 20,000 rows with 2 % of rows moved by 3 deviations [law]', () => {
    // The mean is off by 8.5 of its errors: a miss has the chance Φ(3.44 − 8.5) = 2e-7.
    const [, density, limits] = NORMAL;
    for (let c = 0; c < COLUMNS; c++) {
      const values = draw(density, limits, [[ROWS]], SEED, [[`moved ${c}`]], []);
      const moved = values.map(([x], i) => [(x as number) + (i % 50 === 0 ? 3 : 0)]);
      expect(check(moved, density, limits, [])[1]![1]).toMatch(/^signs against/);
    }
  });

  it('finds p-values that are not uniform for draws of a near shape [law]', () => {
    // Negative control of the test above.
    const { distribution } = prove(readShapes(NORMAL[1], NORMAL[2], [], PLACES).shapes[0]!);
    const n = 50;
    const fit = fitter(distribution, n, 0.01);
    const all = draw([['EXP(-0.5*(x/1.2)^2)']], NORMAL[2], [[n * 4000]], SEED, [['near']], []);
    let below = 0;
    for (let r = 0; r < 4000; r++) {
      const lines = fit(Float64Array.from({ length: n }, (_, i) => all[r * n + i]![0] as number));
      if (lines.find(({ item }) => item.startsWith('Anderson'))!.pValue! < 0.05) below++;
    }
    expect(below / 4000 - 0.05).toBeGreaterThan(Z_FALSE_ALARM * Math.sqrt((0.05 * 0.95) / 4000));
  });
});
