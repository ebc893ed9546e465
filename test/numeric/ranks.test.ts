import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import fc from 'fast-check';
import { averageRanks, correlationOfRanks, orderOf } from '../../src/numeric/ranks';

const spearman = (a: readonly number[], b: readonly number[]): number | null =>
  correlationOfRanks(averageRanks(Float64Array.from(a)), averageRanks(Float64Array.from(b)));

/** Values that share their upper halves, ties, both zeros and both signs. */
const hard = fc.oneof(
  fc.double({ noNaN: true, min: -1e300, max: 1e300 }),
  fc.integer({ min: -3, max: 3 }),
  fc.constant(-0),
  fc.integer({ min: 0, max: 100 }).map((k) => 1 + k * 2 ** -50),
  fc.integer({ min: 0, max: 100 }).map((k) => -5e-324 * k),
);

describe('orderOf', () => {
  it('is the order of a stable sort with a comparison [law]', () => {
    fc.assert(
      fc.property(fc.array(hard, { maxLength: 300, size: 'max' }), (list) => {
        const values = Float64Array.from(list);
        const expected = list.map((_, i) => i).sort((i, j) => list[i]! - list[j]! || i - j);
        expect(Array.from(orderOf(values))).toEqual(expected);
      }),
      { seed: 61, numRuns: 400 },
    );
  });
});

describe('averageRanks', () => {
  it('gives equal values the mean of their ranks [law]', () => {
    expect(Array.from(averageRanks(Float64Array.of(5, 2, 5, -1, 2, 5)))).toEqual([
      5, 2.5, 5, 1, 2.5, 5,
    ]);
  });
});

describe('correlationOfRanks', () => {
  // A common worked example of Spearman's coefficient (common practice): 1 − 6·194/990.
  it('of ten pairs is -29/165 [published]', () => {
    const a = [106, 86, 100, 101, 99, 103, 97, 113, 112, 110];
    const b = [7, 0, 27, 50, 28, 29, 20, 12, 6, 17];
    expect(spearman(a, b)).toBeCloseTo(-29 / 165, 14);
  });

  // Azzalini & Bowman (1990), the copy in R; computed there with cor(…, method = "spearman"). Many ties.
  it('of eruptions and waiting times is .777972057651612 [published]', () => {
    const file = join(__dirname, '../published/data/faithful.csv');
    const pairs = readFileSync(file, 'utf8').trim().split('\n').slice(1);
    const column = (j: number): number[] => pairs.map((line) => Number(line.split(',')[j]));
    expect(Math.abs(spearman(column(0), column(1))! - 0.777972057651612)).toBeLessThanOrEqual(
      5e-16 * 2,
    );
  });

  it('is exactly 1 for equal ranks, -1 for opposite ones, null for a constant column [law]', () => {
    const list = [3, 1, 4, 1, 5, 9, 2, 6, 5, 3, 5];
    expect(
      spearman(
        list,
        list.map((x) => x ** 3),
      ),
    ).toBe(1);
    expect(
      spearman(
        list,
        list.map((x) => -x),
      ),
    ).toBe(-1);
    expect(
      spearman(
        list,
        list.map(() => 2),
      ),
    ).toBeNull();
  });
});
