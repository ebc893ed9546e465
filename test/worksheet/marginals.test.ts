/** Columns that belong together have the exact law of their shape, each by itself: CHECK's tests at 1e-6. */
import { fitter } from '../../src/evidence/fit';
import { readShapes } from '../../src/density/shape';
import type { Range } from '../../src/index';
import { cases, draw, each, linkedShares, quantile, stratified, thin } from '../../src/index';
import { prove } from '../../src/worksheet/proved';
import { FALSE_ALARM } from '../draw/statistics';

const SEED = [['plan-2027']];
const LABEL = [['downtime']];
const PLACES = { density: 'density', limits: 'limits', givens: 3 };
const HOURS = [['EXP(-0.5*((x-m)/1.3)^2)*(1+SIN(3*x)^2)']];
const LIMITS = [[0, 12]];
const N = 3000;

/** The least p-value of all comparisons of CHECK, times their number. */
function leastChance(values: readonly number[], density: Range, m: number): number {
  const shape = readShapes(density, LIMITS, [[['m', m]]], PLACES).shapes[0]!;
  const lines = fitter(prove(shape).distribution, values.length, 0.01)(Float64Array.from(values));
  const chances = lines.flatMap(({ pValue }) => (pValue === null ? [] : [pValue]));
  return Math.min(...chances) * chances.length;
}
const numbers = (spill: Range, column = 0): number[] => spill.map((row) => row[column] as number);

describe('columns that follow their shape by all comparisons of CHECK', () => {
  it('CASES: every case its own, not that of its neighbour [law]', () => {
    const table: Range = [
      ['presses', 'two', 'three'],
      ['m', 5, 4.4],
    ];
    const [, ...rows] = cases(HOURS, LIMITS, [[N]], SEED, LABEL, table, []);
    [5, 4.4].forEach((m, j) => {
      expect(leastChance(numbers(rows, j), HOURS, m)).toBeGreaterThan(FALSE_ALARM);
      expect(leastChance(numbers(rows, 1 - j), HOURS, m)).toBeLessThan(FALSE_ALARM);
    });
  });

  it('EACH: the rows of one condition among many [law]', () => {
    const conditions = Array.from({ length: 3 * N }, (_, i) => [3 + (i % 3)]);
    const drawn = numbers(each(HOURS, LIMITS, SEED, LABEL, [['m'], ...conditions], []));
    for (const rest of [0, 1, 2]) {
      const own = drawn.filter((_, i) => i % 3 === rest);
      expect(leastChance(own, HOURS, 3 + rest)).toBeGreaterThan(FALSE_ALARM);
      expect(leastChance(own, HOURS, 3.4 + rest)).toBeLessThan(FALSE_ALARM);
    }
  });

  it('STRATIFIED: one row over many seeds, unlike all rows of one seed [law]', () => {
    const givens = [[['m', 4]]];
    const spills = Array.from({ length: 1500 }, (_, s) =>
      stratified(HOURS, LIMITS, [[5]], [[`seed ${s}`]], LABEL, givens),
    );
    for (const row of [0, 4]) {
      const values = spills.map((spill) => spill[row]![0] as number);
      expect(leastChance(values, HOURS, 4)).toBeGreaterThan(FALSE_ALARM);
      expect(leastChance(values, HOURS, 4.4)).toBeLessThan(FALSE_ALARM);
    }
  });

  it('QUANTILE of LINKEDSHARES: each linked column [law]', () => {
    const link = [
      [1, 0.7],
      [0.7, 1],
    ];
    const shares = linkedShares(link, [[N]], SEED, LABEL);
    const linked = quantile(HOURS, LIMITS, shares, null, [[['m', 4]]]);
    for (const column of [0, 1]) {
      expect(leastChance(numbers(linked, column), HOURS, 4)).toBeGreaterThan(FALSE_ALARM);
      expect(leastChance(numbers(linked, column), HOURS, 4.4)).toBeLessThan(FALSE_ALARM);
    }
  });

  it('THIN: survivors have the product of density and weight [law]', () => {
    const before = draw(HOURS, LIMITS, [[4 * N]], SEED, LABEL, [[['m', 4]]]);
    const weights = before.map(([x]) => [(x as number) / 12]);
    const [, ...rows] = thin(before, weights, SEED, LABEL, [[1]]);
    const survivors = numbers(rows, 1);
    const product = [[`x*${HOURS[0]![0]!}`]];
    expect(leastChance(survivors, product, 4)).toBeGreaterThan(FALSE_ALARM);
    expect(leastChance(survivors, HOURS, 4)).toBeLessThan(FALSE_ALARM);
  });
});
