import * as elementary from '../../src/numeric/elementary';
import type { Points } from './points';
import { points } from './points';
import type { Big } from './reference';
import { atan, big, Big as B, errorInUlps } from './reference';

const N_POINTS = 2000;
const { ERROR_ULPS, LARGE_POWER, LARGE_POWER_ERROR_ULPS, WAVE_LIMIT } = elementary;

interface Claim {
  readonly reference: (x: Big, y: Big) => Big;
  /** Regions of arguments, ordinary and hard; each is asked in turn. */
  readonly regions: readonly ((p: Points) => number | readonly [number, number])[];
}

const WAVE_REGIONS: Claim['regions'] = [
  (p) => p.sign() * p.between(0, 7),
  (p) => p.sign() * p.between(0.5, 1),
  (p) => p.sign() * p.sized(1e-300, 1),
  (p) => p.sign() * p.sized(1, WAVE_LIMIT),
  // Next to multiples of π/2, where one of the waves is near 0 and the argument's last bits decide.
  (p) => p.near((p.whole(1, 40) * Math.PI) / 2),
  (p) => p.near((p.whole(1, 1e6) * Math.PI) / 2, 3),
  (p) => p.near(Math.round(p.sized(1, 6e14)) * (Math.PI / 2), 3),
  (p) => p.near((p.whole(1, 40) * Math.PI) / 4),
];

/** Multiples of ln 2 / 2, between which exp takes another power of two. */
const LN_2 = 0.6931471805599453;

const CLAIMS: Record<string, Claim> = {
  exp: {
    reference: (x) => x.exp(),
    regions: [
      (p) => p.between(-40, 40),
      (p) => p.between(-2, 2),
      (p) => p.sign() * p.sized(1e-300, 1),
      (p) => p.between(-708, 709),
      // Near overflow, and results among the subnormals.
      (p) => p.between(709, 709.78),
      (p) => p.between(-745.13, -708),
      (p) => p.near((p.whole(-1000, 1000) * LN_2) / 2),
    ],
  },
  ln: {
    reference: (x) => x.ln(),
    regions: [
      (p) => p.between(0.5, 2),
      (p) => p.sized(1e-300, 1e300),
      // Near 1, where ln is near 0.
      (p) => 1 + p.sign() * p.sized(1e-16, 0.5),
      (p) => p.near(1),
      (p) => p.between(5e-324, 2e-308),
      (p) => p.near(p.pick([1, Math.SQRT2]) * 2 ** p.whole(-1000, 1000)),
      (p) => p.near(Number.MAX_VALUE / 2),
    ],
  },
  sin: { reference: (x) => x.sin(), regions: WAVE_REGIONS },
  cos: { reference: (x) => x.cos(), regions: WAVE_REGIONS },
  tan: { reference: (x) => x.tan(), regions: WAVE_REGIONS },
  atan: {
    reference: atan,
    regions: [
      (p) => p.sign() * p.between(0, 4),
      (p) => p.sign() * p.sized(1e-300, 1e-8),
      (p) => p.sign() * p.sized(1e-8, 1e3),
      (p) => p.sign() * p.sized(1e3, 1e300),
      // Where the argument is reduced another way.
      (p) => p.near(p.pick([0.4375, 0.6875, 1.1875, 2.4375])),
    ],
  },
  tanh: {
    reference: (x) => x.tanh(),
    regions: [
      (p) => p.sign() * p.between(0, 3),
      (p) => p.sign() * p.between(0.5, 0.8),
      (p) => p.sign() * p.between(0.625, 0.64),
      (p) => p.sign() * p.sized(1e-300, 1e-5),
      (p) => p.sign() * p.between(3, 30),
      (p) => p.near(p.pick([0.625, 1, 19, 22])),
    ],
  },
  pow: {
    reference: (x, y) => x.pow(y),
    regions: [
      (p) => [p.sized(1e-300, 1e300), p.between(-1, 1)],
      (p) => [p.between(0, 10), p.between(-40, 40)],
      (p) => [p.between(0, 100), p.whole(0, 40) / 2],
      // The library multiplies out these two: three roundings at most, 3 · 2^-53 < 3 ulps.
      (p) => [p.between(0, 100), p.pick([3, 4])],
      (p) => [p.between(18, 19), 4],
      (p) => [-p.between(0, 20), p.whole(-30, 30)],
      // Near 1 with powers up to the limit of the claim.
      (p) => [1 + p.sign() * p.sized(3e-7, 0.1), p.sign() * p.sized(1, 2e9)],
      (p) => [p.between(5e-324, 2e-308), p.between(-1, 1)],
      (p) => toSize(p.sized(1e-10, 1e10), p.between(707, 709.78)),
      (p) => toSize(p.sized(1e-10, 1e10), -p.between(708, 744)),
    ],
  },
};

/** The power to which x comes to about e^size. */
function toSize(x: number, size: number): readonly [number, number] {
  return [x, size / Math.log(x)];
}

type Call = (x: number, y: number) => number;

/** The largest error over points of the regions, in ulps. */
function largestError(f: Call, { reference, regions }: Claim, n: number): number {
  const p = points(7);
  let largest = 0;
  for (let i = 0; i < n; i++) {
    const drawn = regions[i % regions.length]!(p);
    const [x, y] = typeof drawn === 'number' ? [drawn, 0] : drawn;
    const t = reference(big(x), big(y));
    const size = Math.abs(t.toNumber());
    if (size === Infinity || size === 0) continue;
    largest = Math.max(largest, errorInUlps(f(x, y), t));
  }
  return largest;
}

const FUNCTIONS = Object.entries(elementary).filter(
  (entry): entry is [string, Call] => typeof entry[1] === 'function',
);

describe('elementary', () => {
  it('every function has its claim tested here [law]', () => {
    expect(FUNCTIONS.map(([name]) => name).sort()).toEqual(Object.keys(CLAIMS).sort());
  });

  // Largest errors over 3·10^6 points of the same regions, against quadruple precision: exp 0.90,
  // ln 0.85, sin 0.78, cos 0.76, tan 0.88, atan 0.93, tanh 1.31, pow 1.85 (at power 4).
  it.each(FUNCTIONS)('%s errs by less than half of ERROR_ULPS [law]', (name, f) => {
    const error = largestError(f, CLAIMS[name]!, N_POINTS);
    expect(error).toBeGreaterThan(0.5);
    expect(error).toBeLessThanOrEqual(ERROR_ULPS / 2);
  });

  it('pow(x, y) beyond LARGE_POWER errs by more, and less than half of its own bound [law]', () => {
    const near1: Claim['regions'] = [
      (p) => toSize(1 + p.sign() * p.sized(1e-12, 3e-7), p.sign() * p.between(600, 709)),
      (p) => toSize(p.near(1 + p.sign() * p.sized(1e-9, 3e-7)), p.sign() * p.sized(1, 709)),
      (p) => [p.near(1, 1000), p.sign() * p.sized(2 * LARGE_POWER, 1e15)],
    ];
    const error = largestError(elementary.pow, { ...CLAIMS.pow!, regions: near1 }, 600);
    expect(error).toBeGreaterThan(ERROR_ULPS);
    expect(error).toBeLessThanOrEqual(LARGE_POWER_ERROR_ULPS / 2);
  });

  it.each([
    ['exp(0)', elementary.exp(0), 1],
    ['exp(-∞)', elementary.exp(-Infinity), 0],
    ['exp(∞)', elementary.exp(Infinity), Infinity],
    ['exp(-746)', elementary.exp(-746), 0],
    ['exp(710)', elementary.exp(710), Infinity],
    ['ln(1)', elementary.ln(1), 0],
    ['ln(0)', elementary.ln(0), -Infinity],
    ['ln(∞)', elementary.ln(Infinity), Infinity],
    ['sin(0)', elementary.sin(0), 0],
    ['cos(0)', elementary.cos(0), 1],
    ['tan(0)', elementary.tan(0), 0],
    ['atan(0)', elementary.atan(0), 0],
    ['tanh(0)', elementary.tanh(0), 0],
    ['tanh(∞)', elementary.tanh(Infinity), 1],
    ['pow(0, 2)', elementary.pow(0, 2), 0],
    ['pow(2, 10)', elementary.pow(2, 10), 1024],
    ['pow(1, 1e308)', elementary.pow(1, 1e308), 1],
    ['pow(0.5, 1074)', elementary.pow(0.5, 1074), 5e-324],
  ])('%s is exact [published]', (_, value, expected) => {
    // The values the enclosures keep exact: IEEE 754-2019, 9.2.
    expect(value).toBe(expected);
  });

  it('the reference has the first digits of e, ln 2, sin 1 and π/4 [published]', () => {
    // Abramowitz & Stegun, tables 1.1 and 4.6, from memory.
    expect(new B(1).exp().toFixed(20)).toBe('2.71828182845904523536');
    expect(new B(2).ln().toFixed(20)).toBe('0.69314718055994530942');
    expect(new B(1).sin().toFixed(20)).toBe('0.84147098480789650665');
    expect(new B(1).atan().toFixed(20)).toBe('0.78539816339744830962');
    expect(atan(new B(1)).toFixed(20)).toBe('0.78539816339744830962');
  });

  it('a function that is one unit off fails the measure [law]', () => {
    const off: Call = (x) => elementary.exp(x) * (1 + 5 * 2 ** -52);
    expect(largestError(off, CLAIMS.exp!, 100)).toBeGreaterThan(ERROR_ULPS / 2);
  });
});
