/**
 * TOTAL against laws that are known exactly. Sums of a Poisson number of exponential sizes have
 * the cumulants λ·n!·mⁿ and, given the number, gamma shares (DLMF 8.2.4); sums of normal sizes
 * are normal. Feller (1971), An Introduction to Probability Theory II, XII.2 and I.11, from memory.
 */
import gammainc from '@stdlib/math-base-special-gammainc';
import type { Range } from '../../src/index';
import { draw, total } from '../../src/index';
import { correlation, FALSE_ALARM, goodnessOfFit, Z_FALSE_ALARM } from '../draw/statistics';
import { messageOf } from '../message';
import { numbersOf } from './shapes';

const SEED = [['plan-2027']];
const LABEL = [['spoiled tonnes']];
const SIZES = [['EXP(-x/3)']];
const OPEN = [[0, 'unbounded']];
const N = 100_000;

const of = (
  counts: Range,
  density: Range = SIZES,
  limits: Range | null = OPEN,
  each: Range | null = null,
) => numbersOf(total(counts, density, limits, each, SEED, LABEL, []));
const column = (counts: readonly number[]): Range => counts.map((count) => [count]);
const mean = (values: readonly number[]): number =>
  values.reduce((a, b) => a + b, 0) / values.length;

/** The share of a sum of a Poisson number of exponential sizes up to s. */
function compoundBelow(lambda: number, size: number, s: number): number {
  let [share, chance] = [Math.exp(-lambda), Math.exp(-lambda)];
  for (let k = 1; k < 60; k++) {
    chance *= lambda / k;
    share += chance * gammainc(s / size, k);
  }
  return share;
}

/** Counts of values in bins by their exact shares below the bounds. */
function binned(
  values: readonly number[],
  bounds: readonly number[],
  below: (x: number) => number,
) {
  const counts = new Float64Array(bounds.length + 1);
  for (const value of values) {
    let bin = 0;
    while (bin < bounds.length && value > bounds[bin]!) bin++;
    counts[bin]!++;
  }
  const shares = [...bounds.map(below), 1].map((share, i, all) => share - (all[i - 1] ?? 0));
  // The first bin is not cut from below.
  shares[0] = below(bounds[0]!);
  return { counts, shares };
}

describe('total of a Poisson number of exponential sizes', () => {
  const lambda = 2;
  const counts = draw(
    [['POISSON.DIST(x,2,FALSE)']],
    [['x', 0, 'unbounded', 1]],
    [[N]],
    SEED,
    [['events']],
    [],
  );
  const rows = of(counts);
  const totals = rows.map(([sum]) => sum!);
  // Cumulants λ·n!·3ⁿ of a compound sum.
  const [first, second, fourth] = [1, 2, 4].map((n) => lambda * [1, 1, 2, 6, 24][n]! * 3 ** n);

  it('has the exact mean, variance and chance of 0 [law]', () => {
    const average = mean(totals);
    expect(Math.abs(average - first!)).toBeLessThan(Z_FALSE_ALARM * Math.sqrt(second! / N));
    const variance = mean(totals.map((sum) => (sum - average) ** 2));
    // The variance of a sample's variance is (μ₄ − σ⁴)/n = (κ₄ + 2κ₂²)/n.
    const error = Math.sqrt((fourth! + 2 * second! ** 2) / N);
    expect(Math.abs(variance - second!)).toBeLessThan(Z_FALSE_ALARM * error);
    const none = totals.filter((sum) => sum === 0).length / N;
    const chance = Math.exp(-lambda);
    const room = Z_FALSE_ALARM * Math.sqrt((chance * (1 - chance)) / N);
    expect(Math.abs(none - chance)).toBeLessThan(room);
    // A mean that is 5 % off, a variance that is 15 % off and counts of mean 1.9 would be seen.
    expect(0.05 * first!).toBeGreaterThan(Z_FALSE_ALARM * Math.sqrt(second! / N));
    expect(0.15 * second!).toBeGreaterThan(Z_FALSE_ALARM * error);
    expect(Math.exp(-1.9) - chance).toBeGreaterThan(room);
  });

  it('has the exact distribution, which one more draw in fifteen rows does not [law]', () => {
    const bounds = [0, ...Array.from({ length: 24 }, (_, i) => 1 + i)];
    const below = (s: number): number => compoundBelow(lambda, 3, s);
    const { counts: own, shares } = binned(totals, bounds, below);
    expect(goodnessOfFit(own, shares)).toBeGreaterThan(FALSE_ALARM);
    const more = of(counts.map(([count], i) => [(count as number) + (i % 15 === 0 ? 1 : 0)]));
    const wrong = binned(
      more.map(([sum]) => sum!),
      bounds,
      below,
    );
    expect(goodnessOfFit(wrong.counts, shares)).toBeLessThan(FALSE_ALARM);
  });

  it('shows the count beside, and 0 for what has no draws [law]', () => {
    expect(rows.map(([, , count]) => [count])).toEqual(counts);
    const none = rows.filter(([, , count]) => count === 0);
    expect(none.length).toBeGreaterThan(0);
    expect(none.every(([sum, largest]) => sum === 0 && largest === 0)).toBe(true);
    expect(
      rows.every(([sum, largest, count]) => count! < 2 || (largest! < sum! && largest! > 0)),
    ).toBe(true);
  });

  it('has rows that are uncorrelated with their neighbours [law]', () => {
    const r = correlation(totals.slice(1), totals.slice(0, -1));
    expect(Math.abs(r)).toBeLessThan(Z_FALSE_ALARM / Math.sqrt(N));
    expect(
      correlation(
        totals,
        rows.map(([, largest]) => largest!),
      ),
    ).toBeGreaterThan(0.5);
  });
});

describe('total', () => {
  /** Φ by the incomplete gamma function: erf(x) = P(1/2, x²), DLMF 7.11.1. */
  const phi = (z: number): number => 0.5 + (Math.sign(z) * gammainc((z * z) / 2, 0.5)) / 2;

  it('of twelve normal sizes is normal, and the largest has the twelfth power of their share [law]', () => {
    const n = 40_000;
    const rows = of(
      column(Array.from({ length: n }, () => 12)),
      [['EXP(-0.5*((x-10)/3)^2)']],
      null,
    );
    const sums = rows.map(([sum]) => (sum! - 120) / (3 * Math.sqrt(12)));
    const bounds = Array.from({ length: 31 }, (_, i) => -3 + i / 5);
    const whole = binned(sums, bounds, phi);
    expect(goodnessOfFit(whole.counts, whole.shares)).toBeGreaterThan(FALSE_ALARM);
    const largest = rows.map(([, most]) => (most! - 10) / 3);
    const upper = Array.from({ length: 20 }, (_, i) => 0.4 + i / 8);
    const most = binned(largest, upper, (z) => phi(z) ** 12);
    expect(goodnessOfFit(most.counts, most.shares)).toBeGreaterThan(FALSE_ALARM);
    // Eleven draws instead of twelve.
    const fewer = of(
      column(Array.from({ length: n }, () => 11)),
      [['EXP(-0.5*((x-10)/3)^2)']],
      null,
    );
    const wrong = binned(
      fewer.map(([, one]) => (one! - 10) / 3),
      upper,
      (z) => phi(z) ** 12,
    );
    expect(goodnessOfFit(wrong.counts, wrong.shares)).toBeLessThan(FALSE_ALARM);
  });

  it('keeps all other rows bit for bit when one count is raised, and only adds to that row [law]', () => {
    const counts = Array.from({ length: 500 }, (_, i) => i % 7);
    const before = of(column(counts));
    const raised = of(column(counts.map((count, i) => (i === 250 ? count + 4 : count))));
    expect(raised.filter((_, i) => i !== 250)).toEqual(before.filter((_, i) => i !== 250));
    expect(raised[250]![0]!).toBeGreaterThan(before[250]![0]!);
    expect(raised[250]![1]!).toBeGreaterThanOrEqual(before[250]![1]!);
    // The rows before are the same however many follow.
    expect(of(column(counts.slice(0, 300)))).toEqual(before.slice(0, 300));
    const other = numbersOf(total(column(counts), SIZES, OPEN, null, SEED, [['other']], []));
    expect(other.filter(([sum], i) => sum !== 0 && sum === before[i]![0])).toEqual([]);
  });

  it('adds the same draws one by one, across the blocks in which they are made [law]', () => {
    // Counts n of the same row end with draw n, which is the difference of their totals.
    const upTo = (n: number): number => of([[n]])[0]![0]!;
    for (const n of [1, 2, 65_536, 65_537, 131_073]) {
      const last = upTo(n) - upTo(n - 1);
      expect(last).toBeGreaterThan(0);
      expect(last).toBeLessThan(60);
    }
    // Row 2 begins somewhere in a block and does not know it.
    const [, second] = of([[65_530], [70_000]]);
    expect(of([[0], [70_000]])[1]).toEqual(second);
    const many = of([[1_000_000]])[0]!;
    expect(Math.abs(many[0]! / 1e6 - 3)).toBeLessThan((Z_FALSE_ALARM * 3) / 1000);
  });

  it('puts each draw through a formula [law]', () => {
    const counts = column(Array.from({ length: 1000 }, (_, i) => 1 + (i % 2)));
    const plain = of(counts);
    const capped = of(counts, SIZES, OPEN, [['MIN(x,2)']]);
    plain.forEach(([sum], i) => {
      if (i % 2 === 0) expect(capped[i]![0]).toBe(Math.min(sum!, 2));
      else expect(capped[i]![0]!).toBeLessThanOrEqual(4);
    });
    const givens = [[['cover', 2]]];
    expect(
      numbersOf(total(counts, SIZES, OPEN, [['MIN(x,cover)']], SEED, LABEL, givens as Range[])),
    ).toEqual(capped);
    // E MIN(X, 2) = 3(1 − e^(−2/3)); a thousand rows with 1.5 draws each.
    const size = mean(capped.map(([sum]) => sum!)) / 1.5;
    expect(Math.abs(size - 3 * (1 - Math.exp(-2 / 3)))).toBeLessThan(
      (Z_FALSE_ALARM * 1) / Math.sqrt(1500),
    );
  });

  it('takes tables, blocks and counted sizes, and a heading above the counts [law]', () => {
    const block: Range = [
      ['density', 'EXP(-x/3)'],
      ['from', 0],
      ['to', 'unbounded'],
      ['seed', 'plan-2027'],
      ['label', 'spoiled tonnes'],
    ];
    const counts: Range = [['events'], [2], [null], [3]];
    const own = numbersOf(total(counts, block, null, null, null, null, []));
    expect(own).toEqual(of([[2], [0], [3]]));
    const crates = of(column([4, 9]), [['POISSON.DIST(x,6,FALSE)']], [['x', 0, 'unbounded', 1]]);
    expect(crates.flat().every(Number.isInteger)).toBe(true);
    const table: Range = [
      [1, 1],
      [2, 1],
    ];
    const [[sum]] = of([[100]], table, null) as [[number]];
    expect(sum).toBeGreaterThan(100);
    expect(sum).toBeLessThan(200);
    expect(total([[1]], table, null, null, SEED, LABEL, [])[0]).toEqual([
      'total',
      'largest',
      'count',
    ]);
  });

  test.each([
    [
      [['events'], [3], [2.5]],
      null,
      'counts (argument 1), row 3: 2.5 is not whole; give a whole number from 0 to 1000000 for each row.',
    ],
    [
      [[3], [-1]],
      null,
      'counts (argument 1), row 2: -1 is negative; give a whole number from 0 to 1000000 for each row.',
    ],
    [
      [[3, 1000001]],
      null,
      'counts (argument 1), column 2: 1000001 is above 1000000; give a whole number from 0 to 1000000 for each row.',
    ],
    [[[3], ['many']], null, 'counts (argument 1), row 2: "many" is not a number; give a number.'],
    [
      column(Array.from({ length: 101 }, () => 1e6)),
      null,
      'counts (argument 1): 101000000 draws in all; give counts that add up to at most 100000000, or total them in parts under labels of their own.',
    ],
    [[[3]], [['MIN(x']], 'Each, character 4: "(" is never closed; add ")".'],
    [
      [[3]],
      [['MIN(x,cap)']],
      'Each, character 7: "cap" is not a known name; add it to the givens, or use one of: x.',
    ],
    [
      [[3]],
      [['LN(x-1000)']],
      'each (argument 4): it is undefined or has no bound at x = 5.51369, a draw of row 1; give it a value there with IF, or limits that leave the place out.',
    ],
  ] as [Range, Range | null, string][])(
    'of %j with each %j says where and what [law]',
    (counts, each, message) => {
      expect(messageOf(() => of(counts, SIZES, OPEN, each))).toBe(message);
    },
  );

  it('without counts, or of several variables, says so [law]', () => {
    expect(messageOf(() => total(null, SIZES, OPEN, null, SEED, LABEL, []))).toBe(
      'counts (argument 1): it is missing; give a whole number from 0 to 1000000 for each row.',
    );
    expect(
      messageOf(() =>
        total(
          [[1]],
          [['a*b']],
          [
            ['a', 0, 1],
            ['b', 0, 1],
          ],
          null,
          SEED,
          LABEL,
          [],
        ),
      ),
    ).toMatch(/^limits \(argument 3\): 2 variables; /);
  });
});
