import { checkPoints, pointsFuzz, provedPoints } from './pointsFuzz';
import { referenceOf } from './reference';

describe('provePoints on random formulas and lattices', () => {
  // The long version takes 2,000 shapes (test/long/fuzz.test.ts).
  test('refuses in words or proves heights that no point misses [law]', () => {
    const report = pointsFuzz('crates', 50);
    expect(report.faults).toEqual([]);
    expect(report.proved).toBeGreaterThanOrEqual(25);
    expect(report.hats).toBeGreaterThanOrEqual(4);
    expect(report.points).toBeGreaterThanOrEqual(400);
  });

  test('checkPoints finds heights and hats that are a little too low [law]', () => {
    const envelope = provedPoints('0.7^x', 0, Infinity, 1);
    const reference = referenceOf('0.7^x');
    const faultsOf = (damaged: typeof envelope): number => {
      let n = 0;
      checkPoints(damaged, reference, () => n++);
      return n;
    };
    const { least, most } = envelope.heights;
    const lower = {
      least: least.map((h) => h * (1 - 1e-9)),
      most: most.map((h) => h * (1 - 1e-9)),
    };
    const hats = envelope.hats.map((hat) => ({ ...hat, height: hat.height / 2 }));
    expect(faultsOf(envelope)).toBe(0);
    expect(faultsOf({ ...envelope, heights: lower })).toBeGreaterThan(0);
    expect(faultsOf({ ...envelope, hats })).toBeGreaterThan(0);
  });
});
