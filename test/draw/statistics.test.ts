import { chiSquareTail, goodnessOfFit, rankCorrelation } from './statistics';

describe('statistics of the tests', () => {
  // Upper 5 % and 1 % points of χ², Abramowitz and Stegun (1964), table 26.8, recomputed.
  test.each([
    [1, 3.841459, 0.05],
    [1, 6.634897, 0.01],
    [9, 16.918978, 0.05],
    [9, 21.665994, 0.01],
    [29, 42.556968, 0.05],
    [99, 123.225221, 0.05],
    [99, 134.641617, 0.01],
  ])('chiSquareTail: %d degrees exceed %d with chance %d [published]', (degrees, point, chance) => {
    expect(chiSquareTail(point - 5e-7, degrees)).toBeGreaterThan(chance);
    expect(chiSquareTail(point + 5e-7, degrees)).toBeLessThan(chance);
  });

  test('goodnessOfFit is 1 for counts that are exactly the shares [law]', () => {
    expect(goodnessOfFit([100, 300, 600], [0.1, 0.3, 0.6])).toBe(1);
  });

  // Two variables of ten rows, worked by hand in many textbooks; common practice.
  test('rankCorrelation of the worked example is −29/165 [published]', () => {
    const iq = [106, 86, 100, 101, 99, 103, 97, 113, 112, 110];
    const hours = [7, 0, 27, 50, 28, 29, 20, 12, 6, 17];
    expect(rankCorrelation(iq, hours)).toBeCloseTo(-29 / 165, 14);
  });
});
