import type { Range } from '../../src/index';
import { below, draw, stratified } from '../../src/index';
import { strataOf } from '../../src/draw/stratified';
import { keyOf } from '../../src/random/key';
import { correlation, FALSE_ALARM, goodnessOfFit, Z_FALSE_ALARM } from '../draw/statistics';
import { messageOf } from '../message';

const SEED = [['plan-2027']];
const LABEL = [['yield']];
const HUMP = [['EXP(-0.5*((x-4)/1.3)^2)']];
const LIMITS = [[0, 12]];
const TABLE: Range = [
  ['x', 'h'],
  [0, 1],
  [2, 4],
  [5, 0],
];
const of = (
  rows: Range | null,
  density: Range = HUMP,
  limits: Range | null = LIMITS,
  label: Range = LABEL,
): Range => stratified(density, limits, rows, SEED, label, []);

describe('stratified', () => {
  it('of a table has one value in every stratum of equal share [law]', () => {
    for (const n of [1, 2, 7, 1000]) {
      const values = of([[n]], TABLE, null);
      // A table is drawn without rejection. The share below is told to 1e-12, and no value stands
      // nearer to a bound than that in these columns.
      const strata = below(TABLE, null, values, []).map(([share]) =>
        Math.floor((share as number) * n),
      );
      expect(strata.sort((a, b) => a - b)).toEqual(Array.from({ length: n }, (_, i) => i));
    }
    // Independent rows leave about a third of the strata empty.
    const independent = draw(TABLE, null, [[1000]], SEED, LABEL, []);
    const shares = below(TABLE, null, independent, []).map(([share]) => share as number);
    expect(new Set(shares.map((share) => Math.floor(share * 1000))).size).toBeLessThan(800);
  });

  it('has its values in no order [law]', () => {
    const n = 10_000;
    const values = of([[n]]).flat() as number[];
    const order = values.map((_, i) => i);
    const limit = Z_FALSE_ALARM / Math.sqrt(n);
    expect(Math.abs(correlation(values, order))).toBeLessThan(limit);
    expect(Math.abs(correlation(values.slice(1), values.slice(0, -1)))).toBeLessThan(limit);
    expect(
      Math.abs(
        correlation(
          [...values].sort((a, b) => a - b),
          order,
        ),
      ),
    ).toBeGreaterThan(limit);
  });

  it('has columns of two labels that are uncorrelated, each as alone [law]', () => {
    const n = 10_000;
    const both = of([[n]], HUMP, LIMITS, [['yield', 'price']]);
    const columns = [0, 1].map((j) => both.map((row) => row[j] as number));
    expect(Math.abs(correlation(columns[0]!, columns[1]!))).toBeLessThan(Z_FALSE_ALARM / 100);
    expect(both.map((row) => [row[1]])).toEqual(of([[n]], HUMP, LIMITS, [['price']]));
  });

  // Row 1 and row 6 of 8 rows, each over its own 40,000 seeds; the strata alone would put it into
  // one eighth, and a permutation that is not uniform into some eighths more often.
  it.each([1, 6])('has row %d of 8 exactly distributed over many seeds [law]', (row) => {
    const [seeds, bins] = [40_000, 50];
    const counts = new Float64Array(bins);
    for (let seed = 1; seed <= seeds; seed++) {
      const value = stratified(TABLE, null, [[8]], [[seed]], [[`row ${row}`]], [])[row - 1]!;
      const share = below(TABLE, null, [value], [])[0]![0] as number;
      counts[Math.min(bins - 1, Math.floor(share * bins))]!++;
    }
    const level = Array.from({ length: bins }, () => 1 / bins);
    expect(goodnessOfFit(counts, level)).toBeGreaterThan(FALSE_ALARM);
    // 80 of the 800 draws that a bin expects, moved into the bin beside it, add 50 · 80²/800 = 400
    // to χ²; with 49 degrees of freedom one in 10^6 is above 113.
    const moved = counts.map(
      (count, i) => count + (i % 2 === 0 ? -1 : 1) * Math.round(seeds / bins / 10),
    );
    expect(goodnessOfFit(moved, level)).toBeLessThan(FALSE_ALARM);
  });

  it('has strata of a row that are uniform over many seeds [law]', () => {
    const [seeds, n] = [60_000, 12];
    const counts = new Float64Array(n * n);
    for (let seed = 1; seed <= seeds; seed++)
      strataOf(keyOf(seed, 'strata'), n).forEach((stratum, i) => counts[i * n + stratum]!++);
    const level = Array.from({ length: n }, () => 1 / n);
    for (let row = 0; row < n; row++)
      expect(goodnessOfFit(counts.slice(row * n, row * n + n), level)).toBeGreaterThan(FALSE_ALARM);
    // Were row 1 to keep its first stratum once in fifty seeds, χ² would be 60,000 · 0.02² · 11 = 264 larger.
    const kept = counts.slice(0, n).map((count, i) => count * 0.98 + (i === 0 ? seeds * 0.02 : 0));
    expect(goodnessOfFit(kept, level)).toBeLessThan(FALSE_ALARM);
  });

  // In a piece of the envelope under the lower line a row's stratum has 1/n of the share, so the
  // mean of n rows errs like n^-1.5 there; the share that is drawn anew, at most 0.02, errs like
  // independent rows of that number: √0.02 = 0.14 of DRAW's error.
  it('has a mean whose standard error is at most a fifth of that of DRAW at 1,000 rows [law]', () => {
    const spread = (column: (seed: Range) => Range): number => {
      const means = Array.from({ length: 300 }, (_, seed) => {
        const values = column([[seed + 1]]).flat() as number[];
        return values.reduce((a, b) => a + b, 0) / values.length;
      });
      const mean = means.reduce((a, b) => a + b, 0) / means.length;
      return Math.sqrt(means.reduce((sum, m) => sum + (m - mean) ** 2, 0) / (means.length - 1));
    };
    const even = spread((seed) => stratified(HUMP, LIMITS, [[1000]], seed, LABEL, []));
    const plain = spread((seed) => draw(HUMP, LIMITS, [[1000]], seed, LABEL, []));
    expect(even).toBeLessThan(plain / 5);
    expect(even).toBeGreaterThan(0);
  });

  it('of another number of rows is another column [law]', () => {
    const [long, short] = [of([[100]]), of([[99]])];
    expect(short.filter(([x], i) => x === long[i]![0]).length).toBeLessThan(10);
    expect(of([[100]])).toEqual(long);
  });

  it('takes the rows, seed and label of a block [law]', () => {
    const block: Range = [
      ['density', HUMP[0]![0]!],
      ['from', 0],
      ['to', 12],
      ['rows', 40],
      ['seed', 'plan-2027'],
      ['label', 'yield'],
    ];
    expect(stratified(block, null, null, null, null, [])).toEqual(of([[40]]));
  });

  it.each([
    [
      [[2, 9]],
      'rows (argument 3): rows 2 to 9; give one number of rows: a stratified column is made as a whole.',
    ],
    [null, 'rows (argument 3): they are missing; give a whole number from 1 to 1048575.'],
    [[[0.5]], 'rows (argument 3): 0.5 is not whole; give a whole number from 1 to 1048575.'],
  ])('of rows %j says where and what [law]', (rows, message) => {
    expect(messageOf(() => of(rows))).toBe(message);
  });
});
