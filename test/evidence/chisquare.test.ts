import { cellsFor, chiSquareOf, chiSquarePValue, equalCells } from '../../src/evidence/chisquare';

describe('chiSquarePValue', () => {
  // Abramowitz & Stegun table 26.8, recomputed.
  it.each([
    [1, 3.841459, 6.634897],
    [9, 16.918978, 21.665994],
    [29, 42.556968, 49.587884],
    [99, 123.225221, 134.641617],
  ])('%d degrees have 0.05 above %d and 0.01 above %d [published]', (degrees, p95, p99) => {
    for (const [x, share] of [
      [p95, 0.05],
      [p99, 0.01],
    ] as const) {
      expect(chiSquarePValue(x - 5e-7, degrees)).toBeGreaterThanOrEqual(share);
      expect(chiSquarePValue(x + 5e-7, degrees)).toBeLessThanOrEqual(share);
    }
  });
});

describe('chiSquareOf', () => {
  it('is the sum of (observed - expected)²/expected [law]', () => {
    const { statistic, cells } = chiSquareOf([12, 8, 30], [10, 10, 30]);
    expect(statistic).toBeCloseTo(4 / 10 + 4 / 10, 15);
    expect(cells).toBe(3);
  });
});

describe('equalCells', () => {
  it('counts shares in cells, 1 in the last one [law]', () => {
    const { statistic } = equalCells(Float64Array.of(0, 0.1, 0.49, 0.5, 1), 2);
    expect(statistic).toBeCloseTo((2 * 0.5 * 0.5) / 2.5, 15);
  });

  it('has cells with ten rows or more each, none with too few rows [law]', () => {
    for (const n of [2, 19, 20, 57, 100, 1000, 100_000, 1_000_000]) {
      const cells = cellsFor(n);
      if (n < 20) expect(cells).toBeLessThan(2);
      else expect(n / cells).toBeGreaterThanOrEqual(10);
    }
  });
});
