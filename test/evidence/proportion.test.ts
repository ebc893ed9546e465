import fc from 'fast-check';
import { Binomial } from '../../src/evidence/binomial';
import {
  chanceInterval,
  clopperPearson,
  FEW,
  waitingPValue,
  wilson,
} from '../../src/evidence/proportion';

describe('wilson', () => {
  // 95 %: cases of Newcombe (1998), "Two-sided confidence intervals for the single proportion",
  // Statistics in Medicine 17, table I, method 3, recomputed to ten digits from the formula.
  // 90 %: NIST/SEMATECH e-Handbook 7.2.4.1.
  it.each([
    [81, 263, 0.95, 0.2552885199, 0.366209577, 5e-11],
    [15, 148, 0.95, 0.0623863995, 0.1604872417, 5e-11],
    [0, 20, 0.95, 0, 0.1611251581, 5e-11],
    [1, 29, 0.95, 0.0061132143, 0.1717552188, 5e-11],
    [4, 20, 0.9, 0.093118016581, 0.378376685835, 5e-13],
  ])('wilson(%d, %d, %d) is %d to %d [published]', (k, n, confidence, lo, hi, halfUnit) => {
    const interval = wilson(k, n, confidence);
    expect(Math.abs(interval.lo - lo)).toBeLessThanOrEqual(halfUnit);
    expect(Math.abs(interval.hi - hi)).toBeLessThanOrEqual(halfUnit);
  });

  const trial = fc
    .integer({ min: 1, max: 1e8 })
    .chain((n) => fc.tuple(fc.integer({ min: 0, max: n }), fc.constant(n)));

  it('wilson(k, n, …) holds k / n, lies within 0 and 1, and mirrors that of n − k [law]', () => {
    fc.assert(
      fc.property(trial, fc.double({ min: 0.5, max: 0.999, noNaN: true }), ([k, n], confidence) => {
        const { lo, hi } = wilson(k, n, confidence);
        expect(0 <= lo && lo <= k / n && k / n <= hi && hi <= 1).toBe(true);
        const mirror = wilson(n - k, n, confidence);
        expect(hi).toBe(1 - mirror.lo);
      }),
      { seed: 21, numRuns: 2000 },
    );
  });

  it('wilson(k, n, …) ends where k / n is z standard errors away [law]', () => {
    // z(.975), Abramowitz & Stegun 26.2. The squared distance in standard errors is z² up to the
    // rounding of end − k/n, at most 2^-53 against a distance above 1e-4 for n ≤ 1e6: 1e-11.
    const z = 1.959963984540054;
    for (const [k, n] of [
      [1, 10],
      [9, 10],
      [995, 1000],
      [500000, 1000000],
    ] as const) {
      const { lo, hi } = wilson(k, n, 0.95);
      for (const end of [lo, hi]) {
        const squared = (k / n - end) ** 2 / ((end * (1 - end)) / n);
        expect(Math.abs(squared / (z * z) - 1)).toBeLessThan(1e-11);
      }
    }
  });

  it('wilson(k, n, …) of none and of all ends at exactly 0 and 1 [law]', () => {
    expect(wilson(0, 7, 0.95).lo).toBe(0);
    expect(wilson(7, 7, 0.95).hi).toBe(1);
  });
});

describe('clopperPearson', () => {
  // As above: method 5 of Newcombe (1998), and NIST/SEMATECH e-Handbook 7.2.4.1.
  it.each([
    [81, 263, 0.95, 0.2527367456, 0.3676219226, 5e-11],
    [15, 148, 0.95, 0.0578440101, 0.1616504903, 5e-11],
    [0, 20, 0.95, 0, 0.168433471, 5e-11],
    [1, 29, 0.95, 0.0008726469, 0.1776442955, 5e-11],
    [4, 20, 0.9, 0.071353884309, 0.401028117332, 5e-13],
  ])('clopperPearson(%d, %d, %d) is %d to %d [published]', (k, n, confidence, lo, hi, halfUnit) => {
    const interval = clopperPearson(k, n, confidence);
    expect(Math.abs(interval.lo - lo)).toBeLessThanOrEqual(halfUnit);
    expect(Math.abs(interval.hi - hi)).toBeLessThanOrEqual(halfUnit);
  });

  it('clopperPearson(0, n, …) ends where no success has the chance 2.5 % [law]', () => {
    for (const n of [1, 7, 500, 100_000]) {
      const { lo, hi } = clopperPearson(0, n, 0.95);
      expect(lo).toBe(0);
      expect(Math.abs((1 - hi) ** n / 0.025 - 1)).toBeLessThan(1e-10);
      const all = clopperPearson(n, n, 0.95);
      expect(all.hi).toBe(1);
      expect(Math.abs(all.lo ** n / 0.025 - 1)).toBeLessThan(1e-10);
    }
  });

  it('clopperPearson(k, n, …) ends where k or more, or k or fewer, have 2.5 % [law]', () => {
    for (const [k, n] of [
      [1, 10],
      [29, 1000],
      [500, 1000],
      [29, 100_000],
    ] as const) {
      const { lo, hi } = clopperPearson(k, n, 0.95);
      expect(Math.abs(new Binomial(n, lo).between(k, n) - 0.025)).toBeLessThan(1e-12);
      expect(Math.abs(new Binomial(n, hi).between(0, k) - 0.025)).toBeLessThan(1e-12);
    }
  });

  it('clopperPearson(k, n, …) of fractions lies between its whole neighbours [law]', () => {
    const at = (k: number, n: number) => clopperPearson(k, n, 0.95);
    expect(at(4.5, 50).lo).toBeGreaterThan(at(4, 50).lo);
    expect(at(4.5, 50).lo).toBeLessThan(at(5, 50).lo);
    expect(at(4, 50.5).hi).toBeLessThan(at(4, 50).hi);
    expect(at(4, 50.5).hi).toBeGreaterThan(at(4, 51).hi);
  });
});

describe('chanceInterval', () => {
  it('is exact below FEW successes or failures, Wilson from there on [law]', () => {
    expect(FEW).toBe(30);
    expect(chanceInterval(29, 1000, 0.95)).toEqual(clopperPearson(29, 1000, 0.95));
    expect(chanceInterval(971, 1000, 0.95)).toEqual(clopperPearson(971, 1000, 0.95));
    expect(chanceInterval(30, 1000, 0.95)).toEqual(wilson(30, 1000, 0.95));
    expect(chanceInterval(970, 1000, 0.95)).toEqual(wilson(970, 1000, 0.95));
  });
});

/** P(N = n) for n = r … last, in exact 64ths: chance = m / 64. Entry i is over 64^(r + i). */
function waitingChances(r: number, m: number, last: number): bigint[] {
  const chances: bigint[] = [];
  let ways = 1n;
  for (let n = r; n <= last; n++) {
    chances.push(ways * BigInt(m) ** BigInt(r) * BigInt(64 - m) ** BigInt(n - r));
    ways = (ways * BigInt(n)) / BigInt(n - r + 1);
  }
  return chances;
}

/** P(N ≤ n) for n = r … last and P(N ≥ n), each rounded once from whole numbers. */
function waitingSums(r: number, m: number, last: number): { atMost: number; atLeast: number }[] {
  let below = 0n;
  return waitingChances(r, m, last).map((chance, i) => {
    const whole = 64n ** BigInt(r + i);
    const atLeast = quotient(whole - below * 64n, whole);
    below = below * 64n + chance;
    return { atMost: quotient(below, whole), atLeast };
  });
}

/** a / b with at least 60 bits kept. */
function quotient(a: bigint, b: bigint): number {
  const shift = BigInt(Math.max(0, b.toString(2).length - a.toString(2).length + 60));
  return Number((a << shift) / b) / 2 ** Number(shift);
}

describe('waitingPValue', () => {
  it('waitingPValue(r, n, m / 64) is the doubled smaller sum of exact chances [law]', () => {
    // Tolerance: ten times what the incomplete beta function was measured to err by at this size.
    for (const r of [1, 2, 7, 40]) {
      for (const m of [1, 13, 32, 50, 63]) {
        const last = Math.ceil((r * 64) / m) + 60;
        for (const [i, { atMost, atLeast }] of waitingSums(r, m, last).entries()) {
          const exact = Math.min(1, 2 * Math.min(atMost, atLeast));
          const p = waitingPValue(r, r + i, m / 64);
          expect(Math.abs(p / exact - 1)).toBeLessThan(1e-12);
        }
      }
    }
  });

  // DLMF 8.17.22 (continued fraction), recomputed with mpmath in 40 digits; printed to 12.
  it.each([
    [2000, 2004, 0.995, 0.0571912490231],
    [2000, 2022, 0.995, 0.00154332318493],
    [1000000, 1005026, 0.995, 0.993906843012],
    [1000000, 1005200, 0.995, 0.0146064775434],
    [1048575, 104857500, 0.01, 0.999744184097],
    [1048575, 105000000, 0.01, 0.162023842109],
    [300000, 300040, 0.9998779296875, 0.61975800524],
    [1048575, 1048575, 0.999999, 0.700873164257],
  ])('waitingPValue(%d, %d, %d) is %d [published]', (accepted, proposals, chance, p) => {
    // The promised relative error, which is wider than half a unit of the twelfth digit.
    expect(Math.abs(waitingPValue(accepted, proposals, chance) / p - 1)).toBeLessThan(1e-9);
  });

  it('waitingPValue(r, n, chance) nears the normal p-value as r grows [law]', () => {
    // N is a sum of r geometric waits: P(N ≤ n) and P(N < n) are within 0.4748 ρ / (σ³ √r) of
    // the normal law (Berry–Esseen; constant of Shevtsova 2011, from memory), ρ the third
    // absolute central moment of a wait. Rounding n moves z by at most 0.5 / (σ √r), the normal
    // law by at most 0.4 times that. Doubling doubles both.
    for (const chance of [0.5, 0.9, 0.995]) {
      const mean = 1 / chance;
      const sigma = Math.sqrt(1 - chance) / chance;
      let rho = 0;
      for (let wait = 1, weight = chance; weight > 1e-30; wait++, weight *= 1 - chance) {
        rho += weight * Math.abs(wait - mean) ** 3;
      }
      for (const r of [1e5, 1e6, 5e7]) {
        const spread = sigma * Math.sqrt(r);
        const tolerance = 2 * ((0.4748 * rho) / (sigma ** 3 * Math.sqrt(r)) + 0.2 / spread);
        // Two-sided points: Abramowitz & Stegun 26.2.
        for (const [z, p] of [
          [1, 2 * (1 - 0.841344746068543)],
          [1.959963984540054, 0.05],
          [2.575829303548901, 0.01],
        ] as const) {
          for (const side of [-1, 1]) {
            const n = Math.round(r * mean + side * z * spread);
            expect(Math.abs(waitingPValue(r, n, chance) - p)).toBeLessThan(tolerance);
          }
        }
      }
    }
  });

  it('waitingPValue(…) is at most α with chance at most α, for every α [law]', () => {
    // Exact: the chances of all n with a p-value ≤ α add up to ≤ α. Chances beyond `last` add up
    // to P(N > last), which is counted in; 1e-12 covers the rounding.
    const [r, m, last] = [9, 40, 90];
    const sums = waitingSums(r, m, last);
    const beyond = 1 - sums.at(-1)!.atMost;
    const waits = sums.map(({ atMost }, i) => ({
      chance: atMost - (i > 0 ? sums[i - 1]!.atMost : 0),
      p: waitingPValue(r, r + i, m / 64),
    }));
    for (const alpha of waits.map(({ p }) => p).filter((p) => p > 2 * beyond)) {
      const rejected = waits.filter(({ p }) => p <= alpha).reduce((s, { chance }) => s + chance, 0);
      expect(rejected + beyond).toBeLessThanOrEqual(alpha + 1e-12);
    }
  });

  it('waitingPValue(…) tells a chance 0.5 % off at a million rows [law]', () => {
    expect(waitingPValue(1e6, 1005025, 0.995)).toBeGreaterThan(0.9);
    expect(waitingPValue(1e6, 1005025, 0.99)).toBeLessThan(1e-100);
    expect(waitingPValue(1e6, 1005025, 0.9999)).toBeLessThan(1e-100);
  });

  it('waitingPValue(r, n, 1) is 1 without failures and 0 with any [law]', () => {
    expect(waitingPValue(2000, 2000, 1)).toBe(1);
    expect(waitingPValue(2000, 2001, 1)).toBe(0);
  });
});
