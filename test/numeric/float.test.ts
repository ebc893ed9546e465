import fc from 'fast-check';
import {
  addDown,
  addUp,
  divDown,
  divUp,
  down,
  looseProductDown,
  looseProductUp,
  looseSumDown,
  looseSumUp,
  middle,
  mulDown,
  mulUp,
  next,
  powerOfTwo,
  prev,
  sqrtDown,
  sqrtUp,
  ulp,
  up,
} from '../../src/numeric/float';
import { finite, pair } from './doubles';
import type { Dyadic } from './dyadic';
import { compare, compareToQuotient, dyadic, isAtLeast, isAtMost, plus, times } from './dyadic';

const MAX = Number.MAX_VALUE;
const LEAST = 5e-324;
const RUNS = { seed: 101, numRuns: 4000 };

/** The double after x, found from its bits alone. */
function successor(x: number): number {
  if (x === 0) return LEAST;
  if (x === Infinity) return x;
  const view = new DataView(new ArrayBuffer(8));
  view.setFloat64(0, x);
  view.setBigInt64(0, view.getBigInt64(0) + (x > 0 ? 1n : -1n));
  return view.getFloat64(0);
}

const predecessor = (x: number): number => -successor(-x);

/** At most two doubles away: what "a little more than half an ulp" may cost. */
const isNear = (bound: number, nearest: number): boolean =>
  bound >= predecessor(predecessor(nearest)) && bound <= successor(successor(nearest));

describe('next and prev', () => {
  it('next(x) is the double with the next bits and prev(next(x)) is x [law]', () => {
    fc.assert(
      fc.property(finite, (x) => {
        return next(x) === successor(x) && (prev(next(x)) === x || x === MAX);
      }),
      RUNS,
    );
  });

  it.each([
    [0, LEAST],
    [-0, LEAST],
    [-LEAST, 0],
    [1, 1 + 2 ** -52],
    [-1, -1 + 2 ** -53],
    [2.225073858507201e-308, 2.2250738585072014e-308],
    [MAX, Infinity],
    [-Infinity, -MAX],
    [Infinity, Infinity],
  ])('next(%d) is %d [published]', (x, expected) => {
    // IEEE 754-2019, 5.3.1, nextUp.
    expect(next(x) === expected).toBe(true);
    expect(prev(-x) === -expected).toBe(true);
  });

  it('next(NaN) is NaN [law]', () => {
    expect(next(NaN)).toBeNaN();
  });
});

describe('ulp', () => {
  it.each([
    [0, LEAST],
    [1, 2 ** -52],
    [-1.5, 2 ** -52],
    [2 ** 53, 2],
    [1e-310, LEAST],
  ])('ulp(%d) is %d [law]', (x, expected) => {
    expect(ulp(x)).toBe(expected);
  });
});

describe('up and down', () => {
  it('up(x) is one or two doubles above x, and down(x) mirrors it [law]', () => {
    fc.assert(
      fc.property(finite, (x) => {
        const isOneOrTwo = up(x) >= successor(x) && up(x) <= successor(successor(x));
        return isOneOrTwo && down(-x) === -up(x);
      }),
      RUNS,
    );
  });

  it('up and down of an infinite result still bound what overflowed [law]', () => {
    expect(up(Infinity)).toBe(Infinity);
    expect(down(Infinity)).toBe(MAX);
    expect(up(-Infinity)).toBe(-MAX);
    expect(down(-Infinity)).toBe(-Infinity);
  });
});

type Rounded = (a: number, b: number) => number;

/** Holds a pair of directed roundings to an exact operation. */
function checkRounding(
  downward: Rounded,
  upward: Rounded,
  nearest: Rounded,
  exactly: (a: Dyadic, b: Dyadic) => Dyadic,
  keepsExact: (size: number) => boolean,
): void {
  fc.assert(
    fc.property(pair, ([a, b]) => {
      const exact = exactly(dyadic(a), dyadic(b));
      const [lo, hi] = [downward(a, b), upward(a, b)];
      const near = nearest(a, b);
      const holds = isAtMost(lo, exact) && isAtLeast(hi, exact);
      const isExact = Number.isFinite(near) && compare(dyadic(near), exact) === 0;
      const isKept = (lo === near && hi === near) || !isExact || !keepsExact(Math.abs(near));
      return holds && isKept && isNear(lo, near) && isNear(hi, near);
    }),
    { ...RUNS, numRuns: 8000 },
  );
}

describe('addUp and addDown', () => {
  it('addUp and addDown hold a + b within two doubles and keep exact sums [law]', () => {
    checkRounding(
      addDown,
      addUp,
      (a, b) => a + b,
      plus,
      () => true,
    );
  });

  it('looseSumUp and looseSumDown hold a + b within two doubles and keep 0 [law]', () => {
    checkRounding(
      looseSumDown,
      looseSumUp,
      (a, b) => a + b,
      plus,
      (size) => size === 0,
    );
  });

  it.each([
    [Infinity, 1, Infinity, Infinity],
    [-Infinity, 1, -Infinity, -Infinity],
    [Infinity, Infinity, Infinity, Infinity],
    [MAX, MAX, MAX, Infinity],
    [-MAX, -MAX, -Infinity, -MAX],
    [MAX, -MAX, 0, 0],
    [1, 2 ** -53, 1, 1 + 2 ** -52],
  ])('%d + %d is between %d and %d [law]', (a, b, lo, hi) => {
    expect(addDown(a, b)).toBe(lo);
    expect(addUp(a, b)).toBe(hi);
  });

  it('the sum of opposite infinities is everything [law]', () => {
    expect([addDown(Infinity, -Infinity), addUp(Infinity, -Infinity)]).toEqual([
      -Infinity,
      Infinity,
    ]);
    expect(looseSumUp(Infinity, -Infinity)).toBe(Infinity);
    expect(looseSumDown(Infinity, -Infinity)).toBe(-Infinity);
  });
});

/** Sizes at which a product's rounding error is itself a double. */
const isMid = (size: number): boolean => size === 0 || (size > 1e-290 && size < 1e290);

describe('mulUp and mulDown', () => {
  it('mulUp and mulDown hold a · b within two doubles and keep exact products of 1e-290 to 1e290 [law]', () => {
    fc.assert(
      fc.property(pair, ([a, b]) => {
        const exact = times(dyadic(a), dyadic(b));
        const [lo, hi] = [mulDown(a, b), mulUp(a, b)];
        const holds = isAtMost(lo, exact) && isAtLeast(hi, exact);
        const isExact = Number.isFinite(a * b) && compare(dyadic(a * b), exact) === 0;
        const isPlain = isMid(Math.abs(a * b)) && Math.max(Math.abs(a), Math.abs(b)) < 1e290;
        const isKept = (lo === a * b && hi === a * b) || !isExact || !isPlain;
        return holds && isKept && isNear(lo, a * b) && isNear(hi, a * b);
      }),
      { ...RUNS, numRuns: 8000 },
    );
  });

  it('looseProductUp and looseProductDown hold a · b within two doubles and keep 0 [law]', () => {
    checkRounding(
      looseProductDown,
      looseProductUp,
      (a, b) => a * b,
      times,
      (size) => size === 0,
    );
  });

  it.each([0, 1, -3, Infinity, -Infinity])('0 · %d is 0 in every direction [published]', (x) => {
    // IEEE 1788-2015: products of intervals take 0 · ∞ for 0.
    for (const product of [mulUp, mulDown, looseProductUp, looseProductDown]) {
      expect(product(0, x) === 0 && product(x, 0) === 0).toBe(true);
    }
  });

  it.each([
    [Infinity, 2, Infinity, Infinity],
    [-Infinity, 2, -Infinity, -Infinity],
    [1e200, 1e200, MAX, Infinity],
    [-1e200, 1e200, -Infinity, -MAX],
    [1e-200, 1e-200, 0, LEAST],
    [-1e-200, 1e-200, -LEAST, 0],
  ])('%d · %d is between %d and %d [law]', (a, b, lo, hi) => {
    expect(mulDown(a, b)).toBe(lo);
    expect(mulUp(a, b)).toBe(hi);
    expect(looseProductDown(a, b)).toBeLessThanOrEqual(lo);
    expect(looseProductUp(a, b)).toBeGreaterThanOrEqual(hi);
  });
});

describe('divUp and divDown', () => {
  it('divUp and divDown hold a / b within two doubles and keep exact quotients [law]', () => {
    fc.assert(
      fc.property(pair, ([a, b]) => {
        fc.pre(b !== 0);
        const [lo, hi] = [divDown(a, b), divUp(a, b)];
        const holds = compareToQuotient(lo, a, b) <= 0 && compareToQuotient(hi, a, b) >= 0;
        const isExact = Number.isFinite(a / b) && compareToQuotient(a / b, a, b) === 0;
        const isPlain = [a, b, a / b].every((x) => isMid(Math.abs(x)));
        const isKept = (lo === a / b && hi === a / b) || !isExact || !isPlain;
        return holds && isKept && isNear(lo, a / b) && isNear(hi, a / b);
      }),
      { ...RUNS, numRuns: 8000 },
    );
  });

  it.each([
    [0, 5, 0, 0],
    [0, Infinity, 0, 0],
    [1, Infinity, 0, 0],
    [-1, -Infinity, 0, 0],
    [Infinity, 2, Infinity, Infinity],
    [Infinity, -2, -Infinity, -Infinity],
    [1e300, 1e-300, MAX, Infinity],
    [1e-300, 1e300, 0, LEAST],
    [1e-300, -1e300, -LEAST, 0],
    [6, 3, 2, 2],
    [Infinity, Infinity, 0, Infinity],
    [Infinity, -Infinity, -Infinity, 0],
  ])('%d / %d is between %d and %d [law]', (a, b, lo, hi) => {
    expect(divDown(a, b) === lo).toBe(true);
    expect(divUp(a, b) === hi).toBe(true);
  });
});

describe('sqrtUp and sqrtDown', () => {
  it('sqrtUp and sqrtDown hold √x within two doubles and keep exact roots [law]', () => {
    const square = fc.integer({ min: 0, max: 94906265 }).map((n) => n * n);
    const positive = fc.oneof(finite.map(Math.abs), square);
    fc.assert(
      fc.property(positive, (x) => {
        const [lo, hi] = [sqrtDown(x), sqrtUp(x)];
        const near = Math.sqrt(x);
        const squareToX = (r: number): number => compare(times(dyadic(r), dyadic(r)), dyadic(x));
        const holds = lo >= 0 && squareToX(lo) <= 0 && squareToX(hi) >= 0;
        const isKept = (lo === near && hi === near) || squareToX(near) !== 0 || !isMid(x);
        return holds && isKept && isNear(lo, near) && isNear(hi, near);
      }),
      { ...RUNS, numRuns: 8000 },
    );
  });

  it('sqrtUp(∞) is ∞, sqrtDown(∞) a double, and √0 is 0 [law]', () => {
    expect([sqrtDown(Infinity), sqrtUp(Infinity)]).toEqual([MAX, Infinity]);
    expect([sqrtDown(0), sqrtUp(0)]).toEqual([0, 0]);
  });
});

describe('middle', () => {
  it('middle(a, b) lies inside (a, b), or is a when no double does [law]', () => {
    const close = finite.map((x): readonly [number, number] => [x, successor(x)]);
    const two = finite.map((x): readonly [number, number] => [x, successor(successor(x))]);
    fc.assert(
      fc.property(fc.oneof(pair, close, two), ([p, q]) => {
        const [a, b] = [Math.min(p, q), Math.max(p, q)];
        fc.pre(a < b && b < Infinity);
        const m = middle(a, b);
        return successor(a) === b ? m === a : a < m && m < b;
      }),
      RUNS,
    );
  });
});

describe('powerOfTwo', () => {
  it('powerOfTwo(k) is 2^k for every k from −1074 to 1023 [law]', () => {
    expect(powerOfTwo(0)).toBe(1);
    expect(powerOfTwo(-1074)).toBe(LEAST);
    for (let k = -1073; k <= 1023; k++) expect(powerOfTwo(k)).toBe(2 * powerOfTwo(k - 1));
  });
});

describe('the exact reference', () => {
  it('compare tells a half ulp apart, so that a wrong direction fails [law]', () => {
    const sum = plus(dyadic(1), dyadic(2 ** -54));
    expect(isAtLeast(1, sum)).toBe(false);
    expect(isAtMost(1, sum)).toBe(true);
  });
});
