import { Shares } from '../../src/exact/shares';
import { ulp } from '../../src/numeric/float';
import { proved, sharesOf } from '../envelope/proved';

const U = Infinity;
const relative = (got: number, wanted: number): number => Math.abs(got / wanted - 1);

describe('shares on unbounded limits and at poles', () => {
  test.each([
    // √(2π); quartics and the wave recomputed: Γ(1/4)/2, quadrature, √(2π)(3/2 − e^-18/2).
    ['EXP(-0.5*x^2)', -U, U, 2.5066282746310002],
    ['EXP(-(x^4))', -U, U, 1.812804954110954],
    ['EXP(-((x^2-1)^2))', -U, U, 1.9737321500898237],
    ['EXP(-(x^2)/2)*(1+SIN(3*x)^2)', -U, U, 3.7599423928585516],
    // Γ(1/2), Γ(1/3), Γ(1/4): Abramowitz & Stegun 6.1.
    ['x^-0.5*EXP(-x)', 0, U, 1.772453850905516],
    ['x^(-2/3)*EXP(-x)', 0, U, 2.6789385347077475],
    ['x^-0.75*EXP(-x)', 0, U, 3.625609908221908],
  ] as const)('area of %s from %d to %d is %d [published]', (text, from, to, wanted) => {
    expect(relative(sharesOf(text, from, to).area, wanted)).toBeLessThan(1e-12);
  });

  test.each(
    [
      // Abramowitz & Stegun 26.2 (normal), 26.7 (t with 5 degrees); arcsine, logistic, Cauchy,
      // Gumbel, Maxwell, hyperbolic secant from their closed forms, recomputed.
      ['EXP(-0.5*x^2)', -U, U, 1.96, 0.9750021048517796],
      ['(1+x^2/5)^-3', -U, U, 1, 0.8183912661754387],
      ['x^-0.5*(1-x)^-0.5', 0, 1, 0.3, 0.36901011956554536],
      ['EXP(x)/(1+EXP(x))^2', -U, U, 1, 0.7310585786300049],
      ['1/(1+x^2)', -U, U, 2, 0.8524163823495667],
      ['EXP(-x-EXP(-x))', -U, U, 0.5, 0.545239211892605],
      ['x^2*EXP(-0.5*x^2)', 0, U, 1, 0.1987480430987992],
      ['x^1.5*EXP(-x)', 0, U, 3, 0.6937810815867216],
    ].map(
      ([text, from, to, x, wanted]) =>
        [text, from, to, x, wanted] as [string, number, number, number, number],
    ),
  )('below of %s on %d … %d at %d is %d [published]', (text, from, to, x, wanted) => {
    expect(relative(sharesOf(text, from, to).below(x), wanted)).toBeLessThan(1e-12);
  });

  test.each([
    // 1 − Φ: Abramowitz & Stegun 26.2, recomputed as erfc(x/√2)/2.
    ['EXP(-0.5*x^2)', -U, U, 6, 9.86587645037698e-10],
    ['EXP(-0.5*x^2)', -U, U, 37, 5.725571222524577e-300],
    // Cauchy: arctan(1/x)/π ≈ 1/(πx).
    ['1/(1+x^2)', -U, U, 1e6, 3.183098861836858e-7],
    ['1/(1+x^2)', -U, U, 1e100, 3.183098861837907e-101],
    ['x^-3.5', 2, U, 1e9, 2 ** 2.5 * 10 ** -22.5],
    ['EXP(-x)', 0, U, 600, 2.6503965530043108e-261],
  ] as [string, number, number, number, number][])(
    'above of %s on %d … %d at %d is %d, far down the tail [published]',
    (text, from, to, x, wanted) => {
      expect(relative(sharesOf(text, from, to).above(x), wanted)).toBeLessThan(2e-13);
    },
  );

  test.each([
    ['EXP(-0.5*x^2)', -U, U],
    ['1/(1+x^2)', -U, U],
    ['x^-0.5*EXP(-x)', 0, U],
    ['x^-0.5*(1-x)^-0.5', 0, 1],
    ['-LN(x)', 0, 1],
    ['x^-1.5', 1, U],
    ['EXP(x)', -U, 3],
  ] as const)('quantile(share) of %s has that share, in either tail [law]', (text, from, to) => {
    const envelope = proved(text, from, to);
    const shares = new Shares(envelope);
    for (const side of ['below', 'above'] as const) {
      for (const share of [1e-30, 1e-12, 1e-6, 1e-4, 0.01, 0.3, 0.5]) {
        const x = shares.quantile(share, side);
        const back = shares[side](x);
        // Doubles stand ulp(x) apart: near a finite end at another place than 0 a share jumps by
        // that times the density.
        const jump = (ulp(x) * envelope.heightAt(x)) / shares.area;
        expect(Math.abs(back - share)).toBeLessThan(1e-10 * share + 4 * jump);
      }
    }
  });
});
