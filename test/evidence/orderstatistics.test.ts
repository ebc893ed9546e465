import fc from 'fast-check';
import { Binomial } from '../../src/evidence/binomial';
import { fewestRows, ranksAround } from '../../src/evidence/orderstatistics';

/** The chances of Binomial(n, m / 64) as exact 64ths, each rounded once. */
function exactChances(n: number, m: number): number[] {
  let ways = 1n;
  const whole = 64n ** BigInt(n);
  return Array.from({ length: n + 1 }, (_, k) => {
    if (k > 0) ways = (ways * BigInt(n - k + 1)) / BigInt(k);
    const chance = ways * BigInt(m) ** BigInt(k) * BigInt(64 - m) ** BigInt(n - k);
    return Number((chance << 900n) / whole) / 2 ** 900;
  });
}

describe('Binomial', () => {
  it('at(k) is the exact chance [law]', () => {
    for (const n of [1, 2, 17, 150]) {
      for (const m of [1, 20, 32, 63]) {
        const law = new Binomial(n, m / 64);
        for (const [k, exact] of exactChances(n, m).entries()) {
          // A chance that is left out is below 1e-25 of the largest; the rest err by a few
          // roundings a step.
          expect(Math.abs(law.at(k) - exact)).toBeLessThan(1e-13 * exact + 1e-25);
        }
      }
    }
  });

  it('between(0, n) is 1, and outside of the counts there is nothing [law]', () => {
    for (const n of [1, 30, 1_000_000]) {
      const law = new Binomial(n, 0.3);
      expect(Math.abs(law.between(-5, n + 5) - 1)).toBeLessThan(1e-12);
      expect(law.at(-1)).toBe(0);
      expect(law.at(n + 1)).toBe(0);
      expect(law.between(4, 3)).toBe(0);
    }
  });

  // Wilks (1941), Annals of Mathematical Statistics 12 (from memory), recomputed: with 59 rows the
  // largest is above the 95th percentile with 95 %; with 93 the smallest and the largest hold 95 %.
  it.each([
    [59, 0, 58, 0.95150547],
    [93, 0, 91, 0.9500242],
  ])('Binomial(%d, 0.95).between(%d, %d) is %d [published]', (n, from, to, chance) => {
    expect(Math.abs(new Binomial(n, 0.95).between(from, to) - chance)).toBeLessThanOrEqual(5e-9);
  });

  // Mean and variance of the law, A&S 26.1.20, at a size where its terms are summed by the thousand.
  it('has mean n p and variance n p (1 − p) at a million trials [law]', () => {
    const [n, p] = [1_000_000, 0.95];
    const law = new Binomial(n, p);
    let [mean, variance] = [0, 0];
    for (let k = n * p - 4000; k <= n * p + 4000; k++) {
      mean += law.at(k) * (k - n * p);
      variance += law.at(k) * (k - n * p) ** 2;
    }
    expect(Math.abs(mean)).toBeLessThan(1e-7);
    expect(Math.abs(variance / (n * p * (1 - p)) - 1)).toBeLessThan(1e-11);
  });
});

describe('ranksAround', () => {
  // Hahn & Meeker (1991), "Statistical Intervals", tables of distribution-free intervals for a
  // percentile (from memory); coverages recomputed to the digits shown.
  it.each([
    [10, 0.5, 2, 9, 0.978515625, 1e-15],
    [100, 0.5, 40, 61, 0.9647997998, 5e-11],
    [100, 0.9, 85, 97, 0.9522729858, 5e-11],
    [1000, 0.95, 937, 965, 0.9573516448, 5e-11],
    [10000, 0.5, 4902, 5099, 0.9511670501, 5e-11],
  ])(
    'ranksAround(%d, %d, 0.95) is X(%d) … X(%d) with coverage %d [published]',
    (n, share, lower, upper, coverage, halfUnit) => {
      const ranks = ranksAround(n, share, 0.95);
      expect(ranks).toMatchObject({ lower, upper });
      expect(Math.abs(ranks.coverage - coverage)).toBeLessThanOrEqual(halfUnit);
    },
  );

  const cases = fc.record({
    n: fc.integer({ min: 1, max: 3000 }),
    share: fc.double({ min: 0.001, max: 0.999, noNaN: true }),
    confidence: fc.double({ min: 0.5, max: 0.999, noNaN: true }),
  });

  it('covers with at least the confidence, and with one step less not [law]', () => {
    fc.assert(
      fc.property(cases, ({ n, share, confidence }) => {
        const { lower, upper, coverage } = ranksAround(n, share, confidence);
        const law = new Binomial(n, share);
        expect(0 <= lower && lower < upper && upper <= n + 1).toBe(true);
        expect(coverage).toBeGreaterThanOrEqual(confidence);
        // P(r ≤ B ≤ s − 1), summed in another order.
        expect(Math.abs(law.between(lower, upper - 1) - coverage)).toBeLessThan(1e-12);
        const isOpen = lower === 0 || upper === n + 1;
        const narrower = isOpen
          ? law.between(lower + (lower > 0 ? 1 : 0), upper - (lower > 0 ? 1 : 2))
          : law.between(lower + 1, upper - 2);
        if (lower > 1 || upper < n) expect(narrower).toBeLessThan(confidence + 1e-12);
      }),
      { seed: 6, numRuns: 2000 },
    );
  });

  it('leaves a side open only where the smallest and the largest row do not reach [law]', () => {
    fc.assert(
      fc.property(cases, ({ n, share, confidence }) => {
        const { lower, upper } = ranksAround(n, share, confidence);
        const reach = new Binomial(n, share).between(1, n - 1);
        expect(lower === 0 || upper === n + 1).toBe(reach < confidence);
      }),
      { seed: 7, numRuns: 2000 },
    );
  });

  it('is mirrored by the other share [law]', () => {
    for (const n of [3, 20, 21, 100, 1001]) {
      for (const share of [0.05, 0.125, 0.25]) {
        const low = ranksAround(n, share, 0.95);
        const high = ranksAround(n, 1 - share, 0.95);
        expect([high.lower, high.upper]).toEqual([n + 1 - low.upper, n + 1 - low.lower]);
      }
    }
  });

  it('leaves both sides open for one row [law]', () => {
    expect(ranksAround(1, 0.5, 0.95)).toMatchObject({ lower: 0, upper: 2 });
  });
});

describe('fewestRows', () => {
  // 1 − p^n − (1 − p)^n ≥ 0.95: for the median 6 rows, for P95 59 (Wilks) rows.
  it.each([
    [0.5, 6],
    [0.95, 59],
    [0.05, 59],
    [0.99, 299],
  ])('fewestRows(%d, 0.95) is %d [law]', (share, rows) => {
    expect(fewestRows(share, 0.95)).toBe(rows);
    const reach = (n: number): number => 1 - share ** n - (1 - share) ** n;
    expect(reach(rows)).toBeGreaterThanOrEqual(0.95);
    expect(reach(rows - 1)).toBeLessThan(0.95);
  });
});
