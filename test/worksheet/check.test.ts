import type { Range } from '../../src/index';
import { CellErrorPassed, check, draw, quantile, stratified } from '../../src/index';
import { messageOf } from '../message';
import { line, overall, text } from './checks';

const SEED = [['plan-2027']];
const NORMAL = [['EXP(-0.5*((x-40)/5)^2)']];
const WHOLE = [['unbounded', 'unbounded']];
const drawn = (rows: number, density: Range = NORMAL, limits: Range | null = WHOLE): Range =>
  draw(density, limits, [[rows]], SEED, [['harvest']], []);
const moved = (values: Range, by: (x: number, i: number) => number): Range =>
  values.map(([x], i) => [by(x as number, i)]);

const signs = (spill: Range): string[] =>
  spill.flatMap(([item, , , , , p]) =>
    typeof p === 'number' && p < 0.01 / 17 ? [text(item!)] : [],
  );

describe('check', () => {
  it('is the overall line, percentiles and moments beside exact ones, then tests [law]', () => {
    const values = drawn(2000);
    const spill = check([['harvest'], ...values], NORMAL, WHOLE, []);
    expect(spill.map(([item]) => item)).toEqual([
      'item',
      'overall',
      'rows',
      'zeros at the end',
      ...['P1', 'P5', 'P10', 'P25', 'P50', 'P75', 'P90', 'P95', 'P99'],
      'mean',
      'standard deviation',
      'Kolmogorov–Smirnov distance',
      'Anderson–Darling distance',
      'χ² of cells with about equal shares',
      "correlation of a row's rank with the next one's",
      'rows that repeat an earlier one',
      'rows outside the limits',
      'note',
    ]);
    expect(spill[0]).toEqual(['item', 'exact', 'drawn', 'allowed from', 'allowed to', 'p-value']);
    expect(check(values, NORMAL, WHOLE, [])).toEqual(spill);
    expect(overall(spill)).toMatch(
      /^no sign against the shape in 17 comparisons: the least p-value is 0\.\d+ \(.+\), below 0\.000588 it would be a sign$/,
    );
    // Normal deviates: Abramowitz & Stegun 26.2.
    expect(line(spill, 'P95')[0]).toBeCloseTo(40 + 5 * 1.6448536269514726, 9);
    expect(line(spill, 'P25')[0]).toBeCloseTo(40 - 5 * 0.6744897501960817, 9);
    expect(line(spill, 'mean')[0]).toBeCloseTo(40, 9);
    expect(line(spill, 'standard deviation')[0]).toBeCloseTo(5, 9);
    // z for one of 17 comparisons at 0.01 in all, both tails: 3.4392 (A&S 26.2, recomputed).
    const [, , from, to] = line(spill, 'mean') as number[];
    expect(to! - from!).toBeCloseTo((2 * 3.4392 * 5) / Math.sqrt(2000), 3);
    for (const row of spill) expect(row).toHaveLength(6);
    for (const cell of spill.flat())
      if (typeof cell === 'number') expect(Number.isFinite(cell)).toBe(true);
  });

  it('has p-values below the level exactly where the drawn figure is outside [law]', () => {
    for (const by of [0, 0.3, 0.6, 1]) {
      const spill = check(
        moved(drawn(1000), (x) => x + by),
        NORMAL,
        WHOLE,
        [],
      );
      for (const item of ['P1', 'P10', 'P50', 'P90', 'P99', 'mean', 'Kolm', 'Anderson', 'χ²']) {
        const [, value, from, to, p] = line(spill, item) as (number | null)[];
        const isOutside = value! > to! || (from !== null && value! < from!);
        expect([by, item, p! < 0.01 / 17]).toEqual([by, item, isOutside]);
      }
    }
  });

  it('finds rows that were moved, spread, sorted, rounded or copied, and says where [law]', () => {
    const values = drawn(5000);
    const found = (wrong: Range): string[] => signs(check(wrong, NORMAL, WHOLE, []));
    expect(found(values)).toEqual([]);
    expect(found(moved(values, (x) => x + 0.5))).toEqual(
      expect.arrayContaining(['P50', 'mean', 'Kolmogorov–Smirnov distance']),
    );
    expect(found(moved(values, (x) => 40 + (x - 40) * 1.1))).toEqual(
      expect.arrayContaining(['P95', 'standard deviation', 'Anderson–Darling distance']),
    );
    const sorted = [...values].sort((a, b) => Number(a[0]) - Number(b[0]));
    expect(found(sorted)).toEqual(["correlation of a row's rank with the next one's"]);
    expect(found(moved(values, (x) => Math.round(x * 100) / 100))).toEqual([
      'rows that repeat an earlier one',
    ]);
    const copied = moved(values, (x, i) => (i === 9 ? Number(values[2]![0]) : x));
    expect(found(copied)).toEqual(['rows that repeat an earlier one']);
    expect(overall(check(copied, NORMAL, WHOLE, []))).toBe(
      'signs against the shape in 1 of 17 comparisons: rows that repeat an earlier one; at most 1 in 100 columns that follow their shape shows any',
    );
  });

  it('counts rows outside the limits, one being enough [law]', () => {
    const limits = [[30, 50]];
    const values = drawn(500, NORMAL, limits);
    const beyond = moved(values, (x, i) => (i === 7 ? 50.5 : x));
    const spill = check(beyond, NORMAL, limits, []);
    expect(line(spill, 'rows outside')).toEqual([0, 1, 0, 0, 0]);
    expect(overall(spill)).toContain('rows outside the limits');
    expect(line(spill, 'Anderson')[1]).toBe('unbounded');
    expect(line(check(values, NORMAL, limits, []), 'rows outside')[1]).toBe(0);
  });

  it('names zeros at the end [law]', () => {
    const spill = check([...drawn(500), [null], [0]], NORMAL, WHOLE, []);
    expect(line(spill, 'zeros')[1]).toBe(2);
    expect(line(spill, 'note')[0]).toBe(
      'the last 2 rows are 0 or blank and count as 0: perhaps more rows were selected than there are',
    );
    expect(overall(spill)).toMatch(/; see the note$/);
    expect(line(check(drawn(500), NORMAL, WHOLE, []), 'note')[0]).toBe('none');
  });

  it('takes repeats next to a strong pole for what rounding makes of them [law]', () => {
    // (1e-16)^0.1: one row in forty lies nearer to 1 than doubles tell.
    const [pole, limits] = [[['(1-x)^-0.9']], [[0, 1]]];
    const values = drawn(3000, pole, limits).flat() as number[];
    expect(new Set(values).size).toBeLessThan(2990);
    const spill = check(
      values.map((x) => [x]),
      pole,
      limits,
      [],
    );
    expect(line(spill, 'rows that repeat')[1]).toBe(0);
    expect(line(spill, 'rows that repeat')[4]).toBe(1);
    expect(overall(spill)).toMatch(/^no sign/);
    const many = drawn(50_000, pole, limits);
    expect(overall(check(many, pole, limits, []))).toMatch(/^no sign/);
    const near = drawn(50_000, [['(1-x)^-0.88']], limits);
    expect(overall(check(near, pole, limits, []))).toMatch(/^signs/);
  });

  it('says so where mean and deviation are not finite, or cannot be told [law]', () => {
    const t = (degrees: number, rows: number): Range => {
      const density = [[`T.DIST(x,${degrees},FALSE)`]];
      return check(drawn(rows, density), density, WHOLE, []);
    };
    const [one, two] = [t(1, 1000), t(2, 1000)];
    const without = 'not finite, or not proved to be';
    expect(line(one, 'mean')).toEqual([without, expect.any(Number), null, null, null]);
    expect(line(one, 'standard')).toEqual([without, expect.any(Number), null, null, null]);
    expect(line(two, 'mean').slice(2)).toEqual(['tails too heavy to tell', null, null]);
    expect(overall(one)).toMatch(/^no sign against the shape in 15 comparisons/);
  });

  it('says what few rows cannot tell [law]', () => {
    const spill = check(drawn(5), NORMAL, WHOLE, []);
    expect(line(spill, 'standard').slice(2)).toEqual(['too few rows to tell', null, null]);
    expect(line(spill, 'χ²')[1]).toBe('too few rows to tell');
    expect(line(spill, 'correlation')[1]).toBe('too few rows to tell');
    expect(overall(spill)).toMatch(/; 5 rows show large differences only$/);
  });

  it('takes several columns, against one shape or each against its own [law]', () => {
    const labels = [['early', 'late']];
    const two = draw(NORMAL, WHOLE, [[400]], SEED, labels, []);
    const spill = check([...labels, ...two], NORMAL, WHOLE, []);
    expect(spill[0]!.slice(1, 7)).toEqual([
      'early, exact',
      'early, drawn',
      'early, allowed from',
      'early, allowed to',
      'early, p-value',
      'late, exact',
    ]);
    expect(overall(spill)).toContain('below 0.000294 it would be a sign');

    const table: Range = [
      ['tonnes', 'early', 'late'],
      [0, 0, 1],
      [10, 1, 0],
    ];
    const own = draw(table, null, [[400]], SEED, [['juice']], []);
    const each = check(own, table, null, []);
    expect(line(each, 'P50')[0]).toBeCloseTo(Math.sqrt(50), 9);
    expect(line(each, 'P50')[5]).toBeCloseTo(10 - Math.sqrt(50), 9);
    expect([overall(each), text(each[1]![6]!)].every((line) => line.startsWith('no sign'))).toBe(
      true,
    );
    const swapped = check(
      own.map(([a, b]) => [b!, a!]),
      table,
      null,
      [],
    );
    expect(overall(swapped)).toMatch(/^signs against/);
    expect(text(swapped[1]![6]!)).toMatch(/^signs against/);
  });

  it('takes a block and givens as DRAW does [law]', () => {
    const block: Range = [
      ['density', 'EXP(-0.5*((x-m)/s)^2)'],
      ['rows', 300],
      ['seed', 'plan-2027'],
      ['label', 'harvest'],
      ['m', 40],
      ['s', 5],
    ];
    const values = draw(block, null, null, null, null, []);
    expect(check(values, block, null, [])).toEqual(check(values, NORMAL, WHOLE, []));
  });

  it('agrees with QUANTILE on every exact percentile [law]', () => {
    const density = [['x*EXP(-x)']];
    const limits = [[0, 'unbounded']];
    const spill = check(drawn(200, density, limits), density, limits, []);
    const shares = [[0.01], [0.05], [0.1], [0.25], [0.5], [0.75], [0.9], [0.95], [0.99]];
    expect(spill.slice(4, 13).map((row) => [row[1]])).toEqual(
      quantile(density, limits, shares, null, []),
    );
  });

  it('does not fit stratified columns, whose distances are too small [law]', () => {
    const values = stratified(NORMAL, WHOLE, [[2000]], SEED, [['harvest']], []);
    expect(line(check(values, NORMAL, WHOLE, []), 'Kolmogorov')[4]).toBeGreaterThan(1 - 1e-6);
  });

  it('refuses what it cannot compare, in full words [law]', () => {
    const two = drawn(20).map(([x]) => [x!, x!]);
    const table: Range = [
      ['x', 'a', 'b', 'c'],
      [0, 1, 1, 1],
      [1, 1, 1, 1],
    ];
    expect(messageOf(() => check(two, table, null, []))).toBe(
      'values (argument 1): 2 columns for 3 shapes; give one column for each shape, or one shape.',
    );
    expect(messageOf(() => check([[1]], NORMAL, WHOLE, []))).toBe(
      'values (argument 1): 1 row of values; give at least 2.',
    );
    expect(messageOf(() => check(null, NORMAL, WHOLE, []))).toBe(
      'values (argument 1): it is missing; give a column of values.',
    );
    expect(messageOf(() => check([[1], ['late'], [3]], NORMAL, WHOLE, []))).toBe(
      'values (argument 1), row 2: "late" is not a number; give a number.',
    );
    expect(messageOf(() => check([[1], [2]], [['1/x']], [[0, 1]], []))).toBe(
      'Density: its area is infinite at x = 0; start the limits above 0.',
    );
    expect(() => check([[1], [{ error: '#N/A' }]], NORMAL, WHOLE, [])).toThrow(CellErrorPassed);
    expect(() => check([[1], [2]], [[{ error: '#REF!' }]], WHOLE, [])).toThrow(CellErrorPassed);
  });

  it('is right, too, for values far beyond the shape and for all alike [law]', () => {
    for (const wild of [
      [[1e300], [-1e300], [40]],
      [[40], [40], [40]],
      [[0], [0]],
    ]) {
      const spill = check(wild, NORMAL, WHOLE, []);
      for (const cell of spill.flat())
        if (typeof cell === 'number') expect(Number.isFinite(cell)).toBe(true);
      expect(overall(spill)).toMatch(/^signs against/);
    }
  });
});
