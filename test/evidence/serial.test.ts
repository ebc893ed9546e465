import { averageRanks, inOrder, orderOf } from '../../src/numeric/ranks';
import { ranksWithoutTies, serialOrder, varianceOfRatio } from '../../src/evidence/serial';
import { Z_FALSE_ALARM } from '../draw/statistics';
import { uniform } from './samples';

function permutations(n: number): number[][] {
  if (n === 0) return [[]];
  return permutations(n - 1).flatMap((rest) =>
    Array.from({ length: n }, (_, i) => [...rest.slice(0, i), n, ...rest.slice(i)]),
  );
}

describe('serialOrder', () => {
  it.each([3, 4, 5, 6, 7])('has the variance of all orders of %d ranks, and mean 0 [law]', (n) => {
    const ratios = permutations(n).map(
      (ranks) => 2 * (1 - serialOrder(Float64Array.from(ranks)).correlation),
    );
    const mean = ratios.reduce((a, b) => a + b, 0) / ratios.length;
    const variance = ratios.reduce((sum, r) => sum + (r - mean) ** 2, 0) / ratios.length;
    expect(mean).toBeCloseTo(2, 12);
    expect(variance).toBeCloseTo(varianceOfRatio(n), 12);
  });

  it.each([10, 50])('has uniform p-values for %d rows in random order [law]', (n) => {
    const repetitions = 40_000;
    const values = uniform(n * repetitions, `serial ${n}`);
    const levels = [0.001, 0.01, 0.1, 0.5];
    const counts = levels.map(() => 0);
    for (let r = 0; r < repetitions; r++) {
      const { pValue } = serialOrder(averageRanks(values.slice(r * n, (r + 1) * n)));
      levels.forEach((level, i) => (counts[i]! += pValue < level ? 1 : 0));
    }
    levels.forEach((level, i) => {
      const error = Math.sqrt((level * (1 - level)) / repetitions);
      // Bartels (1982) gives the beta distribution to about a hundredth for 10 rows.
      expect(counts[i]! / repetitions - level).toBeLessThan(Z_FALSE_ALARM * error + 0.05 * level);
      expect(level - counts[i]! / repetitions).toBeLessThan(Z_FALSE_ALARM * error + 0.3 * level);
    });
  });

  it('objects to sorted rows and to rows that swing [law]', () => {
    const n = 200;
    const rising = Float64Array.from({ length: n }, (_, i) => i + 1);
    expect(serialOrder(rising).pValue).toBeLessThan(1e-100);
    expect(serialOrder(rising).correlation).toBeGreaterThan(0.99);
    const swinging = rising.map((rank, i) => (i % 2 === 0 ? (rank + 1) / 2 : n - rank / 2 + 1));
    expect(serialOrder(swinging).pValue).toBeLessThan(1e-30);
    expect(serialOrder(swinging).correlation).toBeLessThan(-0.4);
  });
});

describe('ranksWithoutTies', () => {
  it('ranks every row, equal values in an order that does not follow the rows [law]', () => {
    const values = uniform(2000, 'ties').map((u) => Math.floor(u * 3));
    const order = orderOf(values);
    const ranks = ranksWithoutTies(inOrder(values, order), order);
    expect([...ranks].sort((a, b) => a - b)).toEqual(Array.from(ranks, (_, i) => i + 1));
    values.forEach((value, i) => {
      const j = (i * 7) % 2000;
      if (value < values[j]!) expect(ranks[i]).toBeLessThan(ranks[j]!);
    });
    expect(serialOrder(ranks).pValue).toBeGreaterThan(1e-6);
    // Of equal values alone, ranks in the order of the rows would look like a trend.
    const same = new Float64Array(2000);
    const rising = orderOf(same);
    expect(serialOrder(ranksWithoutTies(same, rising)).pValue).toBeGreaterThan(1e-6);
    expect(serialOrder(Float64Array.from(rising, (row) => row + 1)).pValue).toBeLessThan(1e-100);
  });
});
