import {
  kolmogorovBelow,
  kolmogorovDistance,
  kolmogorovExact,
  kolmogorovPValue,
} from '../../src/evidence/kolmogorov';

describe('kolmogorovExact', () => {
  // Marsaglia, Tsang & Wang (2003), Journal of Statistical Software 8(18), recomputed.
  it.each([
    [10, 0.274, 0.6284796154565043],
    [5, 0.4, 0.6912],
    [20, 0.2, 0.647279826376584],
    [100, 0.1, 0.7473072429936098],
    [1000, 0.03, 0.6773097535867001],
    [2000, 0.04, 0.9967694319171368],
  ])('kolmogorovExact(%d, %d) is %d [published]', (n, d, share) => {
    // A product of n matrices, each with rounding 2^-53, summed over half their width.
    expect(Math.abs(kolmogorovExact(n, d) - share)).toBeLessThanOrEqual(n * 1e-16);
  });
});

describe('kolmogorovPValue', () => {
  // Massey (1951), JASA 46; Miller (1956), JASA 51; recomputed to five digits.
  it.each([
    [5, 0.50945, 0.56328, 0.66853],
    [10, 0.36866, 0.40925, 0.48893],
    [20, 0.26473, 0.29408, 0.35241],
    [50, 0.16959, 0.18841, 0.22604],
    [100, 0.12066, 0.13403, 0.16081],
  ])('n = %d reaches 0.10, 0.05 and 0.01 at %d, %d and %d [published]', (n, ...points) => {
    points.forEach((d, i) => {
      const level = [0.1, 0.05, 0.01][i]!;
      expect(kolmogorovPValue(n, d - 5e-6)).toBeGreaterThanOrEqual(level);
      expect(kolmogorovPValue(n, d + 5e-6)).toBeLessThanOrEqual(level);
    });
  });

  it('is what one row and two rows far from their places give [law]', () => {
    // One row: D is the larger of u and 1 − u.
    for (const d of [0.5, 0.6, 0.75, 0.9])
      expect(kolmogorovPValue(1, d)).toBeCloseTo(2 - 2 * d, 14);
    // Two rows below 3/4: both within d of one end, 2(1 − d)².
    for (const d of [0.75, 0.8, 0.95]) {
      expect(kolmogorovPValue(2, d)).toBeCloseTo(2 * (1 - d) ** 2, 14);
    }
  });

  it('has no seam between the matrix, the series and the one-sided chance [law]', () => {
    // The series leaves out terms in n^-2, the tail the chance that both sides are far off.
    for (const [n, d] of [
      [141, 0.11],
      [500, 0.045],
      [1000, 0.03],
      [2000, 0.0149],
      [2000, 0.04],
    ] as const) {
      expect(Math.abs(kolmogorovBelow(n, d) - kolmogorovExact(n, d))).toBeLessThan(1 / (n * n));
    }
    for (const n of [10, 100, 140, 300, 2000]) {
      const d = Math.sqrt(4 / n);
      const [left, right] = [d * (1 - 1e-9), d * (1 + 1e-9)].map((at) => kolmogorovPValue(n, at));
      expect(Math.abs(left! / right! - 1)).toBeLessThan(1e-4);
    }
    // Maag & Dicaire's form leaves out terms in d³.
    const [sum, limit] = [2000, 2001].map((n) => kolmogorovPValue(n, 2.2 / Math.sqrt(n)));
    expect(Math.abs(sum! / limit! - 1)).toBeLessThan(1e-2);
  });

  it('falls with the distance, from 1 to 0 [law]', () => {
    for (const n of [1, 3, 20, 150, 5000, 100_000]) {
      let before = 1;
      for (let k = 0; k <= 400; k++) {
        const p = kolmogorovPValue(n, (k / 100 / Math.sqrt(n)) * 1.1);
        expect(p).toBeLessThanOrEqual(before * (1 + 1e-8));
        before = p;
      }
      expect(kolmogorovPValue(n, 0)).toBe(1);
      expect(kolmogorovPValue(n, 1)).toBe(0);
    }
  });
});

describe('kolmogorovDistance', () => {
  it('is the largest step between both shares, on either side of a value [law]', () => {
    expect(kolmogorovDistance(Float64Array.of(0.3))).toBe(0.7);
    expect(kolmogorovDistance(Float64Array.of(0.7))).toBe(0.7);
    expect(kolmogorovDistance(Float64Array.of(0.25, 0.75))).toBe(0.25);
    expect(kolmogorovDistance(Float64Array.of(0.5, 0.5, 0.5, 0.5))).toBe(0.5);
  });
});
