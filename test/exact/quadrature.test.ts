import { endpointIntegral, refinedIntegral, smoothIntegral } from '../../src/exact/quadrature';

describe('smoothIntegral(f, a, b)', () => {
  test('smoothIntegral of a polynomial is exact up to degree 31 and not at 32 [published]', () => {
    // Degree of the 21-point Kronrod extension: 3n + 1 = 31 for n = 10 (Piessens et al. 1983).
    for (let k = 0; k <= 31; k++) {
      const { value } = smoothIntegral((x) => x ** k, -1, 1);
      expect(Math.abs(value - (k % 2 === 0 ? 2 / (k + 1) : 0))).toBeLessThan(1e-15);
    }
    const { value } = smoothIntegral((x) => x ** 32, -1, 1);
    expect(Math.abs(value - 2 / 33)).toBeGreaterThan(1e-13);
  });

  test('smoothIntegral tells a smooth stretch from one with a kink [law]', () => {
    const smooth = smoothIntegral(Math.exp, 0, 1);
    expect(Math.abs(smooth.value - (Math.E - 1))).toBeLessThan(1e-15);
    expect(smooth.error).toBeLessThan(1e-14);
    const kinked = smoothIntegral((x) => Math.abs(x - 0.3), 0, 1);
    // ∫|x − 0.3| = (0.09 + 0.49) / 2.
    expect(Math.abs(kinked.value - 0.29)).toBeGreaterThan(1e-6);
    expect(kinked.error).toBeGreaterThan(Math.abs(kinked.value - 0.29));
  });
});

describe('endpointIntegral(f, a, b, wanted)', () => {
  test.each([1.5, 0.5, 0.1, -0.3, -0.5, -0.9])(
    'endpointIntegral of x^%d over (0, 1) is 1/(p + 1) [law]',
    (p) => {
      const { value } = endpointIntegral((x) => x ** p, 0, 1, 1e-15);
      expect(Math.abs(value * (p + 1) - 1)).toBeLessThan(2e-14);
    },
  );

  test('endpointIntegral takes a logarithm at an end [law]', () => {
    const { value } = endpointIntegral((x) => -Math.log(x), 0, 1, 1e-15);
    expect(Math.abs(value - 1)).toBeLessThan(1e-14);
  });
});

describe('refinedIntegral(f, stretches)', () => {
  test('refinedIntegral halves its way to a kink inside a stretch [law]', () => {
    const value = refinedIntegral((x) => Math.abs(x - 0.3), [[0, 1]]);
    expect(Math.abs(value - 0.29)).toBeLessThan(1e-14);
  });
});
