import type { Range } from '../../src/index';
import { expect as mean } from '../../src/index';
import { meanFuzz } from './boxMeans';

interface Mean {
  readonly value: number;
  readonly atLeast: number;
  readonly atMost: number;
}

function meanOf(density: string, limits: Range, quantity: string): Mean {
  const [, row] = mean([[density]], limits, [[quantity]], []);
  const [value, atLeast, atMost] = row as [number, number, number];
  return { value, atLeast, atMost };
}

const cube = (names: string, from = 0, to = 1): Range =>
  [...names].map((name) => [name, from, to, 0]);

const E = Math.exp(-1);

describe('boxExpectation', () => {
  test.each<[string, string, Range, string, number, number]>([
    // By elementary integrals.
    ['a kink across the square', '1', cube('ab'), 'ABS(a-b)', 1 / 3, 1e-5],
    ['a product', '1', cube('abpq'), 'a*b*p*q', 1 / 16, 1e-9],
    ['a product in a triangle', 'a+b<=1', cube('ab'), 'a*b', 1 / 12, 1e-4],
    ['the mean square in a ball', 'a^2+b^2+p^2<=1', cube('abp', -1), 'a^2', 1 / 5, 0.04],
    [
      'the larger of two exponential quantities up to 1',
      'EXP(0-a-b)',
      cube('ab'),
      'MAX(a,b)',
      1 - (1 - 2 * (1 - E) + (1 - E ** 2) / 2) / (1 - E) ** 2,
      1e-4,
    ],
    [
      'counted and continuous variables',
      '1+a*b',
      [
        ['a', 0, 4, 1],
        ['b', 0, 1, 0],
      ],
      'a^2*b',
      29 / 6,
      1e-4,
    ],
  ])('encloses %s [law]', (_, density, limits, quantity, exact, width) => {
    const { value, atLeast, atMost } = meanOf(density, limits, quantity);
    expect(atLeast).toBeLessThanOrEqual(exact);
    expect(atMost).toBeGreaterThanOrEqual(exact);
    expect(atMost - atLeast).toBeLessThan(width);
    expect(Math.abs(value - exact)).toBeLessThan(width / 10);
  });

  // A quantity whose enclosures with the density are far wider than its own range: √((1 + ρ)/π)-like
  // sizes, not 10¹¹. P(a ≥ 0) = ½, so the mean lies between those of |a| and |a| + |b|.
  test('stays within the range of a kinked quantity under a steep density [law]', () => {
    const text = 'EXP(-0.5*(a^2+b^2-1.6*a*b)/0.36)*(a>=0)';
    const { atLeast, atMost } = meanOf(text, cube('ab', -6, 6), 'MAX(a,b)');
    expect(atLeast).toBeGreaterThan(Math.sqrt(2 / Math.PI));
    expect(atMost).toBeLessThan(2 * Math.sqrt(2 / Math.PI));
    expect(atMost - atLeast).toBeLessThan(2e-3);
  });

  // Bounds so wide that they hold anything would be no proof.
  test('encloses the means of random polynomials over mixed variables [law]', () => {
    const { faults, widest } = meanFuzz('box means', 2);
    expect(faults).toEqual([]);
    expect(widest).toBeLessThan(0.01);
  });
});
