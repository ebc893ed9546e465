import fc from 'fast-check';
import { polylineEnvelope } from '../../src/envelope/polyline';
import { expectation } from '../../src/exact/expect';
import { proved, sharesOf } from '../envelope/proved';
import { tapeOf } from '../formula/formulas';

function meanOf(density: string, from: number, to: number, quantity: string) {
  const envelope = proved(density, from, to);
  return expectation(envelope, tapeOf(density), tapeOf(quantity), 'quantity');
}

const NORMAL = ['EXP(-0.5*x^2)', -12, 12] as const;

describe('expectation(envelope, tape, quantity)', () => {
  test.each([
    // Moments of the normal; E max(0, Z − 1) = φ(1) − (1 − Φ(1)): Abramowitz & Stegun 26.2.
    [...NORMAL, 'x', 0],
    [...NORMAL, 'x^2', 1],
    [...NORMAL, 'ABS(x)', 0.7978845608028654],
    [...NORMAL, 'x>1', 0.15865525393145705],
    [...NORMAL, 'MAX(0,x-1)', 0.08331547058768628],
    [...NORMAL, 'EXP(x)', 1.6487212707001282],
    // Beta(2.5, 1.5): a/(a + b). Two-sided power, van Dorp & Kotz (2002).
    ['x^1.5*(1-x)^0.5', 0, 1, 'x', 0.625],
    ['IF(x<2,(x/2)^2.5,((5-x)/3)^2.5)', 0, 5, 'x', 20 / 9],
    // Curvilinear trapezoid, JCGM 101:2008, 6.4.3.2: variance 13/36.
    ['LN(1.5/MAX(0.5,ABS(x)))', -1.5, 1.5, 'x^2', 13 / 36],
    // Elementary, on heights that underflow: (1 − 6e^-5)/(1 − e^-5).
    ['EXP(-900-x)', 0, 5, 'x', 0.9660817254684801],
    // ∫|sin 5x| on 0 … 9 is (28 + 1 − cos(45 − 14π))/5, over 9.
    ['1', 0, 9, 'ABS(SIN(5*x))', (29 - Math.cos(45 - 14 * Math.PI)) / 45],
    ['x', 0, 1, 'SQRT(x)', 0.8],
    // Whole lines and poles: normal and t moments; E ln of gamma(1/2) = ψ(1/2), Abramowitz & Stegun
    // 6.3.3; ∫ −x ln x = 1/4; lognormal exp(μ + σ²/2); Pareto a·m/(a − 1) with a = 2.5, m = 2.
    ['EXP(-0.5*x^2)', -Infinity, Infinity, 'x^2', 1],
    ['EXP(-0.5*x^2)', -Infinity, Infinity, 'EXP(x)', 1.6487212707001282],
    ['(1+x^2/3)^-2', -Infinity, Infinity, 'x/10', 0],
    ['x^-0.5*EXP(-x)', 0, Infinity, 'LN(x)', -1.9635100260214235],
    ['-LN(x)', 0, 1, 'x', 0.25],
    ['EXP(-2*(LN(x)-1)^2)/x', 0, Infinity, 'x', 3.080216848918031],
    ['x^-3.5', 2, Infinity, 'x', 10 / 3],
  ] as [string, number, number, string, number][])(
    'mean under %s on %d … %d of %s is %d, within its bounds [published]',
    (density, from, to, quantity, wanted) => {
      const { value, atLeast, atMost } = meanOf(density, from, to, quantity);
      const size = Math.max(1, Math.abs(wanted));
      expect(Math.abs(value - wanted)).toBeLessThan(1e-12 * size);
      // The figures above are rounded to a double themselves.
      expect(atLeast).toBeLessThanOrEqual(wanted + 1e-15 * size);
      expect(atMost).toBeGreaterThanOrEqual(wanted - 1e-15 * size);
      expect(atMost - atLeast).toBeLessThan(2e-6 * size);
    },
  );

  test('mean of a constant is that constant, bounds and all [law]', () => {
    for (const constant of ['1', '0', '2025.7']) {
      const c = Number(constant);
      expect(meanOf(...NORMAL, constant)).toEqual({ value: c, atLeast: c, atMost: c });
    }
  });

  test('a large constant in the quantity widens no bounds [law]', () => {
    const plain = meanOf(...NORMAL, 'x');
    const moved = meanOf(...NORMAL, '1E6+x');
    expect(moved.atMost - moved.atLeast).toBeLessThan(plain.atMost - plain.atLeast + 1e-9);
  });

  test('mean of a condition is the share of area [law]', () => {
    const text = '0.6*EXP(-0.5*(x-2)^2)+0.4*EXP(-2*(x-7)^2)';
    for (const c of [1, 3, 6.5]) {
      const { value } = meanOf(text, 0, 10, `x<${c}`);
      expect(Math.abs(value - sharesOf(text, 0, 10).below(c))).toBeLessThan(1e-13);
    }
  });

  test('mean of a polynomial under straight lines is enclosed and exact to 12 digits [law]', () => {
    const moment = (x0: number, x1: number, h0: number, h1: number, k: number): number => {
      // ∫ x^k (h0 + (h1 − h0)(x − x0)/(x1 − x0)) dx.
      const slope = (h1 - h0) / (x1 - x0);
      const power = (p: number): number => (x1 ** (p + 1) - x0 ** (p + 1)) / (p + 1);
      return (h0 - slope * x0) * power(k) + slope * power(k + 1);
    };
    const points = fc.array(fc.integer({ min: 0, max: 9 }), { minLength: 2, maxLength: 8 });
    fc.assert(
      fc.property(points, fc.integer({ min: 1, max: 4 }), (heights, k) => {
        fc.pre(heights.some((h) => h > 0));
        const x = heights.map((_, i) => i + 1);
        const sum = (p: number): number =>
          heights.slice(1).reduce((s, h, i) => s + moment(x[i]!, x[i + 1]!, heights[i]!, h, p), 0);
        const wanted = sum(k) / sum(0);
        const envelope = polylineEnvelope({ x, heights });
        const { value, atLeast, atMost } = expectation(envelope, null, tapeOf(`x^${k}`), 'q');
        expect(Math.abs(value / wanted - 1)).toBeLessThan(1e-11);
        expect(atLeast).toBeLessThanOrEqual(wanted * (1 + 1e-11));
        expect(atMost).toBeGreaterThanOrEqual(wanted * (1 - 1e-11));
      }),
      { seed: 11, numRuns: 100 },
    );
  });

  test('mean of a density that has none is refused [law]', () => {
    expect(() => meanOf('1/(1+x^2)', -Infinity, Infinity, 'x')).toThrow(
      'quantity: its mean is infinite, by what lies towards smaller x; cap it with MIN or MAX, or give limits that leave the place out.',
    );
  });

  test.each([
    [
      '1/x',
      'quantity: it cannot be bounded near x = 0; cap it with MIN or MAX, or give limits that leave the place out.',
    ],
    [
      'SQRT(x-1)',
      'quantity: it is undefined from x = 0 to x = 1, where the square root of a negative number is taken; give it a value there with IF, or limits that leave the place out.',
    ],
  ])('mean of %s is refused where it has none [law]', (quantity, message) => {
    expect(() => meanOf('1', 0, 9, quantity)).toThrow(message);
  });

  test('a quantity may be undefined where the density is 0 [law]', () => {
    const { value } = meanOf('IF(x<1,0,x)', 0, 2, 'SQRT(x-1)');
    // ∫(1…2) √(x−1)·x dx / 1.5 = (2/5 + 2/3)/1.5.
    expect(Math.abs(value - 32 / 45)).toBeLessThan(1e-11);
  });
});
