import type { Range } from '../../src/index';
import { check, draw } from '../../src/index';
import { line, overall } from './checks';

const SEED = [['plan-2027']];
const POISSON = [['POISSON.DIST(crates,4.5,FALSE)']];
const COUNTS = [['crates', 0, 'unbounded', 1]];
const drawn = (rows: number, density: Range = POISSON, limits: Range = COUNTS): Range =>
  draw(density, limits, [[rows]], SEED, [['crates']], []);

describe('check of a counted shape', () => {
  it('compares percentiles, moments, cells of values, order, and values that are none [law]', () => {
    const spill = check(drawn(3000), POISSON, COUNTS, []);
    expect(spill.slice(4).map(([item]) => item)).toEqual([
      ...['P1', 'P5', 'P10', 'P25', 'P50', 'P75', 'P90', 'P95', 'P99'],
      'mean',
      'standard deviation',
      'χ² of cells with about equal shares',
      "correlation of a row's rank with the next one's",
      'rows that are none of the values',
      'note',
    ]);
    expect(overall(spill)).toMatch(/^no sign against the shape in 14 comparisons/);
    // Poisson: mean and variance 4.5 (Johnson, Kemp & Kotz 2005, §4.3, from memory).
    expect(line(spill, 'mean')[0]).toBeCloseTo(4.5, 10);
    expect(line(spill, 'standard')[0]).toBeCloseTo(Math.sqrt(4.5), 10);
    expect(line(spill, 'P50')[0]).toBe(4);
    for (const cell of spill.flat())
      if (typeof cell === 'number') expect(Number.isFinite(cell)).toBe(true);
  });

  it('objects to another mean, to sorted rows and to a value between the points [law]', () => {
    const values = drawn(3000);
    const other = drawn(3000, [['POISSON.DIST(crates,4.9,FALSE)']]);
    expect(overall(check(other, POISSON, COUNTS, []))).toMatch(/^signs .*mean/);
    const sorted = [...values].sort((a, b) => Number(a[0]) - Number(b[0]));
    expect(overall(check(sorted, POISSON, COUNTS, []))).toMatch(
      /^signs against the shape in 1 of 14 comparisons: correlation of/,
    );
    const between = values.map((row, i) => (i === 4 ? [2.5] : row));
    const spill = check(between, POISSON, COUNTS, []);
    expect(line(spill, 'rows that are none')).toEqual([0, 1, 0, 0, 0]);
    expect(overall(spill)).toContain('rows that are none of the values');
  });

  it('finds two shares exchanged by the cells alone [law]', () => {
    // Of a fair die's 1 and 2 one is three times as likely: χ² sees it, the mean hardly.
    const die = [['1']];
    const faces = [['face', 1, 6, 1]];
    const values = drawn(3000, die, faces);
    expect(overall(check(values, die, faces, []))).toMatch(/^no sign/);
    const loaded = values.map(([x], i) => (x === 3 && i % 2 === 0 ? [4] : [x!]));
    expect(overall(check(loaded, die, faces, []))).toContain('χ² of cells');
  });

  it('shows few signs against many columns that follow it [law]', () => {
    // At most 1 in 100 by construction; 400 columns give more than 17 with a chance below 1e-6
    // (binomial with 0.01).
    const limits = [['late', 0, 3, 1]];
    const density = [['CHOOSE(late+1,60,30,9,1)']];
    const columns = 400;
    const all = drawn(columns * 60, density, limits);
    let signs = 0;
    for (let c = 0; c < columns; c++) {
      const spill = check(all.slice(c * 60, (c + 1) * 60), density, limits, []);
      if (overall(spill).startsWith('signs')) signs++;
    }
    expect(signs).toBeLessThanOrEqual(17);
  });

  it('stands beside a continuous one, each with its own lines [law]', () => {
    const list: Range = [
      ['label', 'density', 'from', 'to', 'step'],
      ['crates', 'POISSON.DIST(x,4.5,FALSE)', 0, 40, 1],
      ['juice', 'EXP(-x)', 0, 'unbounded', 0],
    ];
    const values = draw(list, null, [[500]], SEED, null, []);
    const spill = check(values, list, null, []);
    expect(line(spill, 'rows that are none').slice(5)).toEqual([null, null, null, null, null]);
    expect(line(spill, 'Kolmogorov').slice(0, 5)).toEqual([null, null, null, null, null]);
    expect(typeof line(spill, 'Kolmogorov')[9]).toBe('number');
    for (const row of spill) expect(row).toHaveLength(11);
  });
});
