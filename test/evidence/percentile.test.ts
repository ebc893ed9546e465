import fc from 'fast-check';
import { percentile, percentileInterval } from '../../src/evidence/percentile';
import { sampleOf } from '../../src/evidence/sample';
import { sharesOf } from '../../src/evidence/weights';
import { skewed, uniform, weighted } from './samples';

const plain = (values: readonly number[]) => sampleOf(Float64Array.from(values), null);

describe('percentile', () => {
  // PERCENTILE.INC({1,3,7,12}, 0.3) = 2.8 etc., place 1 + 3 · share; evaluated in LibreOffice Calc 7.4.
  it.each([
    [0, 1],
    [0.1, 1.6],
    [0.3, 2.8],
    [0.5, 5],
    [0.9, 10.5],
    [1, 12],
  ])('percentile([1, 3, 7, 12], %d) is %d [published]', (share, value) => {
    expect(percentile(plain([7, 1, 12, 3]), share)).toBeCloseTo(value, 14);
  });

  it('percentile(…) of equal weights, almost, is that without [law]', () => {
    const values = skewed(37, 'percentile');
    const weights = Array.from(values, (_, i) => (i === 5 ? 1 + 1e-12 : 1));
    for (const share of [0.01, 0.1, 0.37, 0.5, 0.95]) {
      const without = percentile(sampleOf(values, null), share);
      expect(percentile(weighted(values, weights), share)).toBeCloseTo(without, 9);
    }
  });

  // Middles of the rows' shares 1/8, 3/8 + …: 0.5, 2, 5.5 of 8, stretched to 0, 0.3, 1.
  it('percentile(…) with weights lies between the middles of the rows [law]', () => {
    const sample = weighted(Float64Array.of(30, 10, 20), [5, 1, 2]);
    expect(percentile(sample, 0)).toBe(10);
    expect(percentile(sample, 0.3)).toBeCloseTo(20, 12);
    expect(percentile(sample, 0.15)).toBeCloseTo(15, 12);
    expect(percentile(sample, 0.65)).toBeCloseTo(25, 12);
    expect(percentile(sample, 1)).toBeCloseTo(30, 12);
  });

  it('percentile(…) depends on no order of the rows, not even among equal values [law]', () => {
    const values = fc.array(
      fc.tuple(fc.integer({ min: 0, max: 4 }), fc.integer({ min: 0, max: 3 })),
      {
        minLength: 2,
        maxLength: 20,
      },
    );
    fc.assert(
      fc.property(values, fc.double({ min: 0, max: 1, noNaN: true }), (pairs, share) => {
        fc.pre(pairs.some(([, weight]) => weight > 0));
        const of = (own: typeof pairs): number =>
          percentile(
            weighted(
              Float64Array.from(own, ([value]) => value),
              own.map(([, weight]) => weight),
            ),
            share,
          );
        const turned = [...pairs].reverse();
        expect(Math.abs(of(pairs) - of(turned))).toBeLessThan(1e-12);
      }),
      { seed: 62, numRuns: 500 },
    );
  });

  it('percentile(…) rises with the share and stays within the rows that count [law]', () => {
    const values = skewed(50, 'rising');
    const weights = uniform(50, 'rising weights').map((u) => (u < 0.2 ? 0 : u));
    const sample = weighted(values, weights);
    let last = sample.values[0]!;
    for (let share = 0; share <= 1; share += 0.01) {
      const value = percentile(sample, share);
      expect(value).toBeGreaterThanOrEqual(last);
      last = value;
    }
    expect(last).toBeLessThanOrEqual(sample.values.at(-1)!);
  });
});

describe('percentileInterval', () => {
  // Hahn & Meeker (1991): the ranks of test/evidence/orderstatistics.test.ts.
  it.each([
    [10, 0.5, 2, 9],
    [100, 0.9, 85, 97],
    [1000, 0.95, 937, 965],
  ])('percentileInterval(1 … %d, %d) is from %d to %d [published]', (n, share, lo, hi) => {
    const sample = plain(Array.from({ length: n }, (_, i) => i + 1));
    expect(percentileInterval(sample, share, 0.95)).toEqual({ lo, hi });
  });

  it('percentileInterval(…) has no end beyond the rows [law]', () => {
    const sample = plain([1, 2, 3, 4, 5]);
    expect(percentileInterval(sample, 0.95, 0.95)).toEqual({ lo: 4, hi: null });
    expect(percentileInterval(sample, 0.05, 0.95)).toEqual({ lo: null, hi: 2 });
  });

  it('percentileInterval(…) with equal weights, almost, is that without, or a rank wider [law]', () => {
    const values = skewed(1000, 'interval');
    const sorted = values.slice().sort();
    const weights = Array.from(values, (_, i) => 1 + 1e-9 * (i % 2));
    for (const share of [0.05, 0.5, 0.95]) {
      const one = percentileInterval(sampleOf(values, null), share, 0.95);
      const other = percentileInterval(weighted(values, weights), share, 0.95);
      const rank = (x: number | null): number => sorted.indexOf(x!);
      expect(Math.abs(rank(one.lo) - rank(other.lo))).toBeLessThanOrEqual(1);
      expect(Math.abs(rank(one.hi) - rank(other.hi))).toBeLessThanOrEqual(1);
    }
  });

  // Ten copies of each row tell nothing new; weights of ten do not pretend to.
  it('percentileInterval(…) is wider the fewer rows the weights amount to [law]', () => {
    const values = uniform(2000, 'spread');
    const even = sharesOf(values.map(() => 3));
    const uneven = sharesOf(values.map((_, i) => (i % 10 === 0 ? 1 : 0.001)));
    const width = (shares: Float64Array | null): number => {
      const { lo, hi } = percentileInterval(sampleOf(values, shares), 0.5, 0.95);
      return hi! - lo!;
    };
    expect(width(even)).toBe(width(null));
    // A tenth of the rows count: about √10 times as wide, give or take what spacings vary.
    expect(width(uneven) / width(even)).toBeGreaterThan(2.2);
    expect(width(uneven) / width(even)).toBeLessThan(4.5);
  });
});
