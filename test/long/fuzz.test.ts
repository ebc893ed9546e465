/** Fuzzing the proof at length (npm run check:long). */
import { fuzz } from '../envelope/fuzz';
import { pointsFuzz } from '../envelope/pointsFuzz';
import { randomOpenShape, randomShape } from '../envelope/randomFormula';
import { wideFuzz } from '../envelope/wideFuzz';

const POINTS = 1300;

describe('proveEnvelope on many random formulas', () => {
  test.each([
    { what: 'finite limits', make: randomShape, shapes: 5000, leastPoints: 5_000_000 },
    { what: 'unbounded sides and poles', make: randomOpenShape, shapes: 1500, leastPoints: 1e6 },
  ])(
    'on $what it refuses in words or proves lines that no point passes [law]',
    ({ what, make, shapes, leastPoints }) => {
      const report = fuzz({ seed: `harvest, ${what}`, shapes, points: POINTS, make });
      const { faults, proved, refused, points } = report;
      console.log(
        `${what}: ${shapes} shapes, ${proved} proved, ${refused} refused, ${points} points, ${faults.length} faults`,
      );
      expect(faults).toEqual([]);
      expect(points).toBeGreaterThanOrEqual(leastPoints);
    },
  );
});

describe('proveEnvelope on the whole vocabulary, tables and lists', () => {
  test('refuses in words or proves lines that no point passes [law]', () => {
    const { proved, points, faults } = wideFuzz('mill', 11_000, 1300);
    console.log(`whole vocabulary: ${proved} proved, ${points} points, ${faults.length} faults`);
    expect(faults).toEqual([]);
    expect(points).toBeGreaterThanOrEqual(10_000_000);
  });
});

describe('provePoints on many random formulas and lattices', () => {
  test('refuses in words or proves heights that no point misses [law]', () => {
    const { proved, refused, points, hats, faults } = pointsFuzz('lorries', 2000);
    console.log(
      `counted: ${proved} proved, ${refused} refused, ${hats} hats, ${points} heights, ${faults.length} faults`,
    );
    expect(faults).toEqual([]);
    expect(proved).toBeGreaterThanOrEqual(1000);
  });
});
