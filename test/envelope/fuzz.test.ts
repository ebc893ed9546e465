import { fuzz } from './fuzz';
import { randomShape } from './randomFormula';

describe('proveEnvelope on random formulas', () => {
  // The long version takes 4,000 shapes and 5 million points (test/long/fuzz.test.ts).
  test('refuses in words or proves lines that no point passes [law]', () => {
    const report = fuzz({ seed: 'orchard', shapes: 160, points: 900, make: randomShape });
    expect(report.faults).toEqual([]);
    expect(report.points).toBeGreaterThanOrEqual(100_000);
    expect(report.proved).toBeGreaterThanOrEqual(report.shapes / 2);
  });
});
