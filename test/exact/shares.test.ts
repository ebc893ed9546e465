import fc from 'fast-check';
import { polylineEnvelope } from '../../src/envelope/polyline';
import { Shares } from '../../src/exact/shares';
import { proved, sharesOf } from '../envelope/proved';

/** 12 digits where the density is smooth is what shares.ts promises. */
const DIGITS = 1e-12;
const relative = (got: number, wanted: number): number => Math.abs(got / wanted - 1);

// Each limit cut off leaves a share below 1e-17 outside, or none.
const NORMAL = ['EXP(-0.5*x^2)', -39, 39] as const;
const MISES = ['EXP(2*COS(x))', -Math.PI, Math.PI] as const;

describe('area', () => {
  test.each([
    // √(2π): Abramowitz & Stegun 26.2.1.
    [...NORMAL, 2.5066282746310002],
    // 2π I0(2): Abramowitz & Stegun 9.6, recomputed.
    [...MISES, 14.323056878100513],
    // Beta function B(2.5, 1.5) = π/16: DLMF 5.12.
    ['x^1.5*(1-x)^0.5', 0, 1, Math.PI / 16],
    // The sophomore's dream, recomputed.
    ['x^x', 0, 1, 0.7834305107121344],
    // Γ functions: Γ(1/4)/2 and the rest recomputed by arbitrary-precision quadrature.
    ['EXP(-(x^4))', -5, 5, 1.812804954110954],
    ['EXP(-((x^2-1)^2))', -5, 5, 1.9737321500898237],
    ['EXP(-(x^2)/2)*(1+SIN(3*x)^2)', -12, 12, 3.7599423928585516],
    // Elementary: half a disc; two roots, (2/3)(1 + 2√2).
    ['SQRT(1-x^2)', -1, 1, Math.PI / 2],
    ['SQRT(ABS(x-1))', 0, 3, (2 / 3) * (1 + 2 * Math.SQRT2)],
  ])('area of %s from %d to %d is %d [published]', (text, from, to, wanted) => {
    expect(relative(sharesOf(text, from, to).area, wanted)).toBeLessThan(DIGITS);
  });

  test.each(['x^1.5*(1-x)^0.5', '1+SIN(1/(x+0.001))', 'IF(x<0.3,1,2+x)', '(x-0.4)^2'])(
    'area of %s lies within its proved bounds [law]',
    (text) => {
      const envelope = proved(text, 0, 1);
      const { area } = new Shares(envelope);
      expect(area).toBeGreaterThanOrEqual(envelope.areaLo);
      expect(area).toBeLessThanOrEqual(envelope.areaHi);
    },
  );
});

describe('below(x)', () => {
  test.each([
    // Abramowitz & Stegun 26.1 and 26.2, recomputed to the digits shown.
    [...NORMAL, 0.5, 0.6914624612740131],
    [...NORMAL, 1, 0.8413447460685429],
    [...NORMAL, 1.96, 0.9750021048517795],
    [...NORMAL, 2, 0.9772498680518208],
    [...NORMAL, 3, 0.9986501019683699],
    // von Mises, recomputed from the integral (DLMF 10.32).
    [...MISES, 1, 0.8895777369550365],
    ['EXP(COS(x))', -Math.PI, Math.PI, 0.5, 0.6640764746049931],
    // Incomplete beta and gamma functions: DLMF 8.17 and 8.2.
    ['x*(1-x)^4', 0, 1, 0.3, 0.579825],
    ['x^1.5*(1-x)^0.5', 0, 1, 0.5, 0.2877934092108062],
    ['x^1.5*EXP(-x)', 0, 700, 3, 0.6937810815867216],
    // Wigner semicircle, R = 1.
    ['SQRT(1-x^2)', -1, 1, 0.5, 0.8044988905221147],
    ['1/(1+EXP(x))^2*EXP(x)', -300, 300, 1, 0.7310585786300049],
    ['EXP(-x-EXP(-x))', -6, 60, 0.5, 0.545239211892605],
    ['x^2*EXP(-0.5*x^2)', 0, 39, 1, 0.1987480430987992],
    // Hyperbolic secant, EXP written out.
    ['1/(EXP(PI()*x/2)+EXP(-PI()*x/2))', -25, 25, 1, 0.8695181135728437],
    // Triangular; two-sided power, van Dorp & Kotz (2002).
    ['IF(x<2,x/2,(5-x)/3)', 0, 5, 1, 0.1],
    ['IF(x<2,x/2,(5-x)/3)', 0, 5, 3, 11 / 15],
    ['IF(x<2,(x/2)^2.5,((5-x)/3)^2.5)', 0, 5, 1, 0.035355339059327376],
    ['IF(x<2,(x/2)^2.5,((5-x)/3)^2.5)', 0, 5, 3, 0.8548450522795153],
    // Curvilinear trapezoid CTrap(−1, 1, 0.5): JCGM 101:2008, 6.4.3.2.
    ['LN(1.5/MAX(0.5,ABS(x)))', -1.5, 1.5, 0.75, 0.8849301927099795],
  ] as [string, number, number, number, number][])(
    'below of %s on %d … %d at %d is %d [published]',
    (text, from, to, x, wanted) => {
      expect(relative(sharesOf(text, from, to).below(x), wanted)).toBeLessThan(DIGITS);
    },
  );

  test('below(x) is 0 up to the limits and 1 beyond them [law]', () => {
    const shares = sharesOf('1+x', 0, 2);
    expect([-1, 0, 2, 3].map((x) => shares.below(x))).toEqual([0, 0, 1, 1]);
    expect([-1, 0, 2, 3].map((x) => shares.above(x))).toEqual([1, 1, 0, 0]);
  });
});

describe('above(x)', () => {
  test.each([
    // 1 − Φ(6): Abramowitz & Stegun 26.2; 1 − Φ(37) = 5.725571222524577e-300, recomputed as
    // erfc(37/√2)/2. Limits at ±39 leave 1e-330 outside.
    [...NORMAL, 6, 9.86587645037698e-10],
    [...NORMAL, 37, 5.725571222524577e-300],
    // e^-600 for an exponential: 1.
    ['EXP(-x)', 0, 700, 600, 2.6503965530043108e-261],
  ] as const)('above of %s on %d … %d at %d is %d [published]', (text, from, to, x, wanted) => {
    // The normal's own doubles lose digits as x² rounds: 0.5 ulp of 684 is 6e-14 of the height.
    expect(relative(sharesOf(text, from, to).above(x), wanted)).toBeLessThan(1.2e-13);
  });

  test('above(x) of a symmetric density is below(−x) to the last digits, however small [law]', () => {
    const shares = sharesOf(...NORMAL);
    for (const x of [0, 0.1, 1, 5, 10, 20, 30, 37, 38]) {
      // Half a unit in the last place of x²/2 = 722 is 6e-14 of the height.
      expect(relative(shares.above(x), shares.below(-x))).toBeLessThan(1.2e-13);
    }
  });

  test('above(x) near a root at the upper end keeps its digits [law]', () => {
    // (1 − x)^0.5 alone: the share above x is (1 − x)^1.5 exactly.
    const shares = sharesOf('SQRT(1-x)', 0, 1);
    for (const k of [4, 10, 20, 30]) {
      const gap = 1 / 2 ** k;
      // Doubles near 1 are 2^-53 apart: that much of the gap the nodes cannot tell.
      const wanted = gap * Math.sqrt(gap);
      expect(relative(shares.above(1 - gap), wanted)).toBeLessThan(DIGITS + 2 ** -53 / gap);
    }
  });
});

/** Finite forms of many kinds: kinks, jumps, gaps, spikes, roots, waves, scaled heights. */
const FORMS: [string, number, number][] = [
  ['0.6*EXP(-0.5*(x-2)^2)+0.4*EXP(-2*(x-7)^2)', 0, 10],
  ['x^1.5*(1-x)^0.5', 0, 1],
  ['MAX(0,1-ABS(x-2)/1.5)', 0, 5],
  ['IF(x<2,1+x,0.5*EXP(-(x-2)))', 0, 6],
  ['1+2000*EXP(-(((x-31)/0.0001)^2))', 0, 100],
  ['1/(1+((x-3)/0.01)^2)', -1000, 1000],
  ['x^4-4*x^3+6*x^2-4*x+1', 0, 2],
  ['ABS(SIN(5*x))*EXP(-x/3)', 0, 9],
  ['EXP(800-5*(x-3)^2)', 0, 6],
  ['EXP(-900-x)', 0, 5],
  ['(x-1)^2*(x-3)^2', 0, 4],
  ['IF(AND(x>1,x<3),0,EXP(-x/2))', 0, 6],
  ['SIN(1/x)+1.5', 0.05, 1],
  ['ATAN(5*(x-1))+2', 0, 3],
];

describe('shares of many forms', () => {
  test.each(FORMS)(
    'below(x) + above(x) of %s is 1, and below(x) never falls [law]',
    (text, a, b) => {
      const shares = sharesOf(text, a, b);
      let last = 0;
      for (let i = 0; i <= 80; i++) {
        const x = a + (b - a) * (i / 80);
        const below = shares.below(x);
        // Each is rounded once after the smaller is subtracted from 1.
        expect(Math.abs(below + shares.above(x) - 1)).toBeLessThanOrEqual(2 ** -52);
        expect(below).toBeGreaterThanOrEqual(last - 1e-15);
        last = below;
      }
    },
  );

  test.each(FORMS)('quantile(below(x)) of %s is x, from either side [law]', (text, a, b) => {
    const envelope = proved(text, a, b);
    const shares = new Shares(envelope);
    const peak = Math.max(...envelope.pieces.map((piece) => piece.lowerLeft));
    let nChecked = 0;
    for (let i = 1; i < 120; i++) {
      const x = a + (b - a) * (i / 120);
      // Beside a stretch of height 0, too, x cannot be told.
      const near = [x - 1e-9 * (b - a), x, x + 1e-9 * (b - a)];
      if (near.some((y) => envelope.heightAt(y) < 1e-6 * peak)) continue;
      nChecked++;
      for (const side of ['below', 'above'] as const) {
        const back = shares.quantile(shares[side](x), side);
        expect(Math.abs(back - x)).toBeLessThanOrEqual(1e-10 * (b - a));
      }
    }
    expect(nChecked).toBeGreaterThan(0);
  });

  test.each(FORMS)(
    'quantile of %s rises with the share from limit to limit [law]',
    (text, a, b) => {
      const shares = sharesOf(text, a, b);
      let last = a;
      for (let i = 0; i <= 100; i++) {
        const x = shares.quantile(i / 100, 'below');
        expect(x).toBeGreaterThanOrEqual(last - 1e-14 * (b - a));
        last = x;
      }
      expect([shares.quantile(0, 'below'), shares.quantile(1, 'below')]).toEqual([a, b]);
      expect([shares.quantile(0, 'above'), shares.quantile(1, 'above')]).toEqual([b, a]);
    },
  );
});

describe('quantile(share, side)', () => {
  test.each([
    // Normal percentiles: Abramowitz & Stegun 26.2, recomputed.
    [0.95, 'below', 1.6448536269514726],
    [0.975, 'below', 1.9599639845400543],
    [0.995, 'below', 2.575829303548901],
    [0.005, 'above', 2.575829303548901],
    [9.86587645037698e-10, 'above', 6],
    [5.725571222524577e-300, 'above', 37],
    [5.725571222524577e-300, 'below', -37],
  ] as const)('quantile(%d, %s) of the normal is %d [published]', (share, side, wanted) => {
    const shares = sharesOf(...NORMAL);
    expect(relative(shares.quantile(share, side), wanted)).toBeLessThan(1e-13);
  });

  test('quantile(share) at the edge of a gap is the least x with that share [law]', () => {
    const shares = new Shares(
      polylineEnvelope({ x: [0, 1, 1, 3, 3, 4], heights: [1, 1, 0, 0, 1, 1] }),
    );
    expect(shares.quantile(0.5, 'below')).toBe(1);
  });
});

describe('shares of a table', () => {
  const table = fc
    .array(
      fc.tuple(fc.double({ min: 0.01, max: 5, noNaN: true }), fc.integer({ min: 0, max: 9 })),
      {
        minLength: 3,
        maxLength: 12,
      },
    )
    .filter((steps) => steps.some(([, height], i) => i > 0 && height > 0));

  test('below(x) of straight lines is their trapezoids, and quantile undoes it [law]', () => {
    fc.assert(
      fc.property(table, fc.double({ min: 0, max: 1, noNaN: true }), (steps, place) => {
        const x: number[] = [];
        for (const [step] of steps) x.push((x.at(-1) ?? 0) + step);
        const heights = steps.map(([, height]) => height);
        const shares = new Shares(polylineEnvelope({ x, heights }));
        const i = 1 + Math.floor(place * (x.length - 1.001));
        const t = place * (x.length - 1.001) - (i - 1);
        const at = x[i - 1]! + (x[i]! - x[i - 1]!) * t;
        const area = (k: number, s: number): number => {
          const [l, r] = [heights[k - 1]!, heights[k]!];
          return (x[k]! - x[k - 1]!) * s * (l + ((r - l) * s) / 2);
        };
        const total = x.slice(1).reduce((sum, _, k) => sum + area(k + 1, 1), 0);
        const before = x.slice(1, i).reduce((sum, _, k) => sum + area(k + 1, 1), 0);
        const wanted = (before + area(i, t)) / total;
        const below = shares.below(at);
        expect(Math.abs(below - wanted)).toBeLessThan(1e-13);
        const back = shares.quantile(below, 'below');
        // Where lines are at 0 any x has the same share.
        expect(Math.abs(shares.below(back) - below)).toBeLessThan(1e-14);
      }),
      { seed: 5, numRuns: 500 },
    );
  });
});
