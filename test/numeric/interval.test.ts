import fc from 'fast-check';
import type { Interval } from '../../src/numeric/interval';
import * as I from '../../src/numeric/interval';
import { finite } from './doubles';
import { compare, compareToQuotient, dyadic, isAtLeast, isAtMost, plus, times } from './dyadic';
import type { Dyadic } from './dyadic';
import { points } from './points';
import type { Big } from './reference';
import { atan, big, isBetween } from './reference';

const RUNS = { seed: 202, numRuns: 3000 };

/** An interval and a double inside it. */
type Inside = readonly [Interval, number];

const inside: fc.Arbitrary<Inside> = fc
  .oneof(
    fc
      .tuple(finite, finite, finite)
      .map((three) => three.sort((a, b) => a - b))
      .map(([lo, x, hi]): Inside => [I.interval(lo, hi), x]),
    // Narrow ones, single points, and ends at 0 or infinity, where the rules branch.
    fc
      .tuple(finite, fc.integer({ min: 0, max: 3 }))
      .map(([x, k]): Inside => [I.interval(x, x * (1 + Math.sign(x) * k * 2 ** -52)), x]),
    finite.map((x): Inside => [I.interval(Math.min(0, x), Math.max(0, x)), x]),
    finite.map((x): Inside => [I.interval(x, Infinity), x]),
    finite.map((x): Inside => [I.interval(-Infinity, x), x]),
    finite.map((x): Inside => [I.interval(-Infinity, Infinity), x]),
  )
  .filter(([{ lo, hi }]) => lo <= hi);

type Binary = (out: Interval, a: Interval, b: Interval) => void;
type Unary = (out: Interval, a: Interval) => void;

const isHeld = ({ lo, hi }: Interval, exact: Dyadic): boolean =>
  isAtMost(lo, exact) && isAtLeast(hi, exact);

/** The result of an operation, which must be the same when written over its operands. */
function apply(operation: Binary, a: Interval, b: Interval): Interval {
  const out = I.interval();
  operation(out, a, b);
  const first = I.interval(a.lo, a.hi);
  operation(first, first, b);
  const second = I.interval(b.lo, b.hi);
  operation(second, a, second);
  for (const over of [first, second]) {
    if (!(Object.is(over.lo, out.lo) && Object.is(over.hi, out.hi)))
      throw new Error(`differs over its operand: ${JSON.stringify([a, b, out, over])}`);
  }
  return out;
}

const OPERATIONS: readonly [string, Binary, (a: Dyadic, b: Dyadic) => Dyadic][] = [
  ['add', I.add, plus],
  ['addLoosely', I.addLoosely, plus],
  ['subtract', I.subtract, (a, b) => plus(a, { m: -b.m, e: b.e })],
  ['subtractLoosely', I.subtractLoosely, (a, b) => plus(a, { m: -b.m, e: b.e })],
  ['multiply', I.multiply, times],
  ['multiplyLoosely', I.multiplyLoosely, times],
  ['minimum', I.minimum, (a, b) => (compare(a, b) < 0 ? a : b)],
  ['maximum', I.maximum, (a, b) => (compare(a, b) > 0 ? a : b)],
];

describe('operations of two intervals', () => {
  it.each(OPERATIONS)(
    '%s(a, b) holds x ∘ y for all x in a, y in b [law]',
    (_, operation, exactly) => {
      fc.assert(
        fc.property(inside, inside, ([a, x], [b, y]) =>
          isHeld(apply(operation, a, b), exactly(dyadic(x), dyadic(y))),
        ),
        RUNS,
      );
    },
  );

  it('divide(a, b) holds x / y for all x in a, y ≠ 0 in b [law]', () => {
    fc.assert(
      fc.property(inside, inside, ([a, x], [b, y]) => {
        fc.pre(y !== 0);
        const { lo, hi } = apply(I.divide, a, b);
        return compareToQuotient(lo, x, y) <= 0 && compareToQuotient(hi, x, y) >= 0;
      }),
      RUNS,
    );
  });

  it('scale(a, k) holds k · x for all x in a [law]', () => {
    fc.assert(
      fc.property(inside, finite, ([a, x], k) => {
        const out = I.interval(a.lo, a.hi);
        I.scale(out, out, k);
        return isHeld(out, times(dyadic(x), dyadic(k)));
      }),
      RUNS,
    );
  });

  it('hull(a, b) holds both and meet(a, b) the part in both [law]', () => {
    fc.assert(
      fc.property(inside, inside, ([a, x], [b, y]) => {
        const out = apply(I.hull, a, b);
        if (!I.holds(out, x) || !I.holds(out, y)) return false;
        const common = I.interval(a.lo, a.hi);
        if (Math.max(a.lo, b.lo) > Math.min(a.hi, b.hi)) return true;
        I.meet(common, b);
        return I.holds(b, x) === I.holds(common, x) && I.holds(a, y) === I.holds(common, y);
      }),
      RUNS,
    );
  });

  it('meet throws for intervals that do not meet, since one of them is then wrong [law]', () => {
    expect(() => I.meet(I.interval(0, 1), I.interval(2, 3))).toThrow(
      'bug: enclosures do not meet: [2, 1]',
    );
  });
});

type Ends = readonly [number, number];
const show = ([lo, hi]: Ends): string => `[${lo}, ${hi}]`;

describe('known results', () => {
  // IEEE 1788-2015, 10.5 and table 10.1: the hull of the values where the operation is defined;
  // a divisor with 0 inside gives everything, with 0 at an end a half-line.
  const ofTwo: readonly (readonly [string, Binary, Ends, Ends, Ends])[] = [
    ['add', I.add, [1, 2], [3, 5], [4, 7]],
    ['add', I.add, [-Infinity, 2], [3, Infinity], [-Infinity, Infinity]],
    ['subtract', I.subtract, [1, 2], [3, 5], [-4, -1]],
    ['multiply', I.multiply, [-1, 2], [-3, 4], [-6, 8]],
    ['multiply', I.multiply, [-3, -2], [4, 5], [-15, -8]],
    ['multiply', I.multiply, [0, 0], [-Infinity, Infinity], [0, 0]],
    ['multiply', I.multiply, [0, 2], [1, Infinity], [0, Infinity]],
    ['multiply', I.multiply, [-1, 1], [-Infinity, Infinity], [-Infinity, Infinity]],
    ['divide', I.divide, [1, 2], [4, 8], [0.125, 0.5]],
    ['divide', I.divide, [-1, 2], [4, 8], [-0.25, 0.5]],
    ['divide', I.divide, [1, 2], [-8, -4], [-0.5, -0.125]],
    ['divide', I.divide, [1, 2], [0, 4], [0.25, Infinity]],
    ['divide', I.divide, [1, 2], [-4, 0], [-Infinity, -0.25]],
    ['divide', I.divide, [-2, -1], [0, 4], [-Infinity, -0.25]],
    ['divide', I.divide, [-2, -1], [-4, 0], [0.25, Infinity]],
    ['divide', I.divide, [1, 2], [-1, 1], [-Infinity, Infinity]],
    ['divide', I.divide, [-1, 1], [0, 1], [-Infinity, Infinity]],
    ['divide', I.divide, [1, 2], [1, Infinity], [0, 2]],
    ['divide', I.divide, [0, 0], [1, 2], [0, 0]],
    ['minimum', I.minimum, [1, 5], [2, 3], [1, 3]],
    ['maximum', I.maximum, [1, 5], [2, 3], [2, 5]],
  ];

  it.each(
    ofTwo.map(([name, ...row]) => [`${name}(${show(row[1])}, ${show(row[2])})`, ...row] as const),
  )('%s is its tightest interval [published]', (_, operation, a, b, expected) => {
    const out = apply(operation, I.interval(...a), I.interval(...b));
    expect([out.lo + 0, out.hi + 0]).toEqual(expected);
  });

  const ofOne: readonly (readonly [string, Unary, Ends, Ends])[] = [
    ['negate', I.negate, [-1, 2], [-2, 1]],
    ['negate', I.negate, [0, 0], [0, 0]],
    ['absolute', I.absolute, [-3, 2], [0, 3]],
    ['absolute', I.absolute, [-3, -2], [2, 3]],
    ['square', I.square, [-3, 2], [0, 9]],
    ['square', I.square, [-3, -2], [4, 9]],
    ['square', I.square, [-Infinity, 2], [0, Infinity]],
    ['reciprocal', I.reciprocal, [2, 4], [0.25, 0.5]],
    ['reciprocal', I.reciprocal, [0, 4], [0.25, Infinity]],
    ['reciprocal', I.reciprocal, [-4, 0], [-Infinity, -0.25]],
    ['reciprocal', I.reciprocal, [-1, 1], [-Infinity, Infinity]],
    ['reciprocal', I.reciprocal, [0, 0], [-Infinity, Infinity]],
    ['reciprocal', I.reciprocal, [1, Infinity], [0, 1]],
    ['squareRoot', I.squareRoot, [4, 9], [2, 3]],
    ['squareRoot', I.squareRoot, [-1, 9], [0, 3]],
    ['squareRoot', I.squareRoot, [0, Infinity], [0, Infinity]],
    ['exponential', I.exponential, [0, 0], [1, 1]],
    ['exponential', I.exponential, [-Infinity, 0], [0, 1]],
    ['exponential', I.exponential, [0, Infinity], [1, Infinity]],
    ['logarithm', I.logarithm, [1, 1], [0, 0]],
    ['logarithm', I.logarithm, [0, 1], [-Infinity, 0]],
    ['logarithm', I.logarithm, [-5, 1], [-Infinity, 0]],
    ['logarithm', I.logarithm, [1, Infinity], [0, Infinity]],
    ['sine', I.sine, [0, 0], [0, 0]],
    ['sine', I.sine, [-10, 10], [-1, 1]],
    ['sine', I.sine, [1e15, 1e15], [-1, 1]],
    ['sine', I.sine, [-Infinity, Infinity], [-1, 1]],
    ['cosine', I.cosine, [-10, 10], [-1, 1]],
    ['tangent', I.tangent, [0, 0], [0, 0]],
    ['tangent', I.tangent, [1, 2], [-Infinity, Infinity]],
    ['arctangent', I.arctangent, [0, 0], [0, 0]],
    ['hyperbolicTangent', I.hyperbolicTangent, [0, 0], [0, 0]],
    ['hyperbolicTangent', I.hyperbolicTangent, [0, Infinity], [0, 1]],
    ['hyperbolicTangent', I.hyperbolicTangent, [-Infinity, 0], [-1, 0]],
  ];

  it.each(ofOne.map(([name, ...row]) => [`${name}(${show(row[1])})`, ...row] as const))(
    '%s is its tightest interval [published]',
    (_, operation, a, expected) => {
      const out = I.interval(...a);
      operation(out, out);
      expect([out.lo + 0, out.hi + 0]).toEqual(expected);
    },
  );

  it.each([
    [[-2, 3], 0, [1, 1]],
    [[-2, 3], 1, [-2, 3]],
    [[-2, 3], 2, [0, 9]],
    [[-2, 3], 3, [-8, 27]],
    [[-2, 1], 4, [0, 16]],
    [[-2, -1], 3, [-8, -1]],
    [[2, 3], 5, [32, 243]],
    [[-3, -2], 6, [64, 729]],
    [[-1, Infinity], 3, [-1, Infinity]],
    [[0, 0], 7, [0, 0]],
  ] as const)('power(%j, %d) is %j [published]', (a, n, expected) => {
    // IEEE 1788-2015, 9.1, pown.
    const out = I.interval(...a);
    I.power(out, out, n);
    expect([out.lo + 0, out.hi + 0]).toEqual(expected);
  });

  it.each([
    [[0, 4], 0.5, [0, 2]],
    [[1, 4], -0.5, [0.5, 1]],
    [[0, 1], -0.5, [1, Infinity]],
    [[-3, 1], 1.5, [0, 1]],
    [[1, Infinity], 1.5, [1, Infinity]],
    [[1, Infinity], -1.5, [0, 1]],
    [[0, 0], 1.5, [0, 0]],
  ] as const)('realPower(%j, %d) is within 1e-15 of %j [published]', (a, p, [lo, hi]) => {
    // IEEE 1788-2015, 9.1, pow, for the part of the base that is ≥ 0.
    const out = I.interval(...a);
    I.realPower(out, out, I.interval(p));
    expect(out.lo <= lo && out.lo >= lo - 1e-15).toBe(true);
    expect(out.hi >= hi && (out.hi === hi || out.hi <= hi * (1 + 1e-15))).toBe(true);
  });

  it('realPower takes 0^0 for 1, as x^0 is for every x above 0 [law]', () => {
    const out = I.interval(0, 4);
    I.realPower(out, out, I.interval(0));
    expect(out).toEqual({ lo: 1, hi: 1 });
    I.set(out, 0, 4);
    I.realPower(out, out, I.interval(-0.5, 0.5));
    expect(out).toEqual({ lo: 0, hi: Infinity });
  });

  it('setPi encloses π between neighbouring doubles [published]', () => {
    // π to 30 digits, Abramowitz & Stegun table 1.1, from memory.
    const out = I.interval();
    I.setPi(out);
    expect(isBetween(out.lo, big(0).plus('3.14159265358979323846264338328'), out.hi)).toBe(true);
    expect(out.hi - out.lo).toBe(2 ** -51);
  });
});

interface Elementary {
  readonly operation: Unary;
  readonly reference: (x: Big) => Big;
  /** Widest and furthest interval that is tried, and its least end. */
  readonly reach: number;
  readonly least?: number;
}

const ELEMENTARY: Record<string, Elementary> = {
  square: { operation: I.square, reference: (x) => x.times(x), reach: 1e150 },
  squareLoosely: { operation: I.squareLoosely, reference: (x) => x.times(x), reach: 1e150 },
  absolute: { operation: I.absolute, reference: (x) => x.abs(), reach: 1e300 },
  negate: { operation: I.negate, reference: (x) => x.neg(), reach: 1e300 },
  reciprocal: { operation: I.reciprocal, reference: (x) => x.pow(-1), reach: 1e300 },
  squareRoot: { operation: I.squareRoot, reference: (x) => x.sqrt(), reach: 1e300, least: 0 },
  exponential: { operation: I.exponential, reference: (x) => x.exp(), reach: 745 },
  logarithm: { operation: I.logarithm, reference: (x) => x.ln(), reach: 1e300, least: 5e-324 },
  sine: { operation: I.sine, reference: (x) => x.sin(), reach: 1e14 },
  cosine: { operation: I.cosine, reference: (x) => x.cos(), reach: 1e14 },
  tangent: { operation: I.tangent, reference: (x) => x.tan(), reach: 1e14 },
  arctangent: { operation: I.arctangent, reference: atan, reach: 1e300 },
  hyperbolicTangent: { operation: I.hyperbolicTangent, reference: (x) => x.tanh(), reach: 40 },
};

/** Intervals from single points to everything in reach, with a point inside. */
function* intervalsWithin(reach: number, least: number, n: number): Generator<Inside> {
  const p = points(31);
  for (let i = 0; i < n; i++) {
    const size = i % 3 === 0 ? p.sized(1e-300, reach) : p.sized(1e-3, Math.min(reach, 30));
    const a = Math.max(least, least < 0 ? p.sign() * size : size);
    const width = i % 4 === 0 ? 0 : p.sized(1e-18, 2) * Math.abs(a);
    const b = Math.min(reach, a + width);
    const x = i % 2 === 0 ? p.pick([a, b]) : Math.min(b, Math.max(a, p.between(a, b)));
    yield [I.interval(a, b), x];
  }
}

describe('elementary functions of an interval', () => {
  it.each(Object.entries(ELEMENTARY))(
    '%s(a) holds the value at every x in a [law]',
    (_, { operation, reference, reach, least = -Infinity }) => {
      const out = I.interval();
      for (const [a, x] of intervalsWithin(reach, least, 1000)) {
        operation(out, a);
        const t = reference(big(x));
        if (!isBetween(out.lo, t, out.hi))
          throw new Error(`${t.toString()} of ${x} in ${JSON.stringify([a, out])}`);
      }
    },
  );

  it('power(a, n) and its reciprocal hold x^n for all x in a, n from 3 to 60 [law]', () => {
    const p = points(32);
    const out = I.interval();
    for (const [a, x] of intervalsWithin(1e5, -1e5, 1500)) {
      const n = p.whole(3, 60);
      I.power(out, a, n);
      if (!isBetween(out.lo, big(x).pow(n), out.hi))
        throw new Error(`${x}^${n} in ${JSON.stringify([a, out])}`);
    }
  });

  it('realPower(a, p) holds x^q for all x in a, q in p, also for powers beyond 2^31 [law]', () => {
    const p = points(33);
    const out = I.interval();
    for (const [a, y] of intervalsWithin(1e5, 0, 1200)) {
      const size = p.sign() * (p.uniform() < 0.2 ? p.sized(2 ** 31, 1e13) : p.sized(1e-3, 40));
      const power = I.interval(size, size * (size > 0 ? 1 + 2 ** -52 : 1));
      // Large powers overflow at once unless the base is next to 1.
      const isLarge = Math.abs(size) > 2 ** 31;
      const x = isLarge ? 1 + p.sign() * p.sized(1e-16, 500 / Math.abs(size)) : y;
      const base = isLarge ? I.interval(Math.min(1, x), x) : a;
      I.realPower(out, base, power);
      const t = big(x).pow(big(size));
      if (!isBetween(out.lo, t, out.hi))
        throw new Error(`${x}^${size} = ${t.toString()} in ${JSON.stringify([base, out])}`);
    }
  });

  it('sine and cosine reach 1 and −1 exactly where a wave has its top or bottom inside [law]', () => {
    const p = points(34);
    const out = I.interval();
    for (let i = 0; i < 2000; i++) {
      const k = p.whole(-1000, 1000);
      const top = (k + 0.5) * Math.PI;
      // The top is off the double by at most 1e-12 at these sizes.
      const [before, after] = [top - p.sized(1e-9, 3), top + p.sized(1e-9, 3)];
      I.sine(out, I.interval(before, after));
      expect(k % 2 === 0 ? out.hi : out.lo).toBe(k % 2 === 0 ? 1 : -1);
      const clear = top + p.sized(1e-5, 1);
      I.sine(out, I.interval(clear, Math.min(top + Math.PI - 1e-5, clear + p.sized(1e-9, 1))));
      expect(Math.max(Math.abs(out.lo), Math.abs(out.hi))).toBeLessThan(1);
    }
  });

  it('mayHoldTangentPole(a) is true wherever a holds an odd multiple of π/2 [law]', () => {
    const p = points(35);
    for (let i = 0; i < 2000; i++) {
      const pole = (p.whole(-1000, 1000) + 0.5) * Math.PI;
      const around = I.interval(pole - p.sized(1e-9, 1), pole + p.sized(1e-9, 1));
      expect(I.mayHoldTangentPole(around)).toBe(true);
      expect(I.mayHoldTangentPole(I.interval(pole + 1e-5, pole + p.between(1e-5, 3)))).toBe(false);
    }
  });
});
