import { Z_FALSE_ALARM } from '../draw/statistics';
import { uniform } from './samples';
import {
  andersonDarlingDistance,
  andersonDarlingLimit,
  andersonDarlingPValue,
} from '../../src/evidence/andersondarling';

describe('andersonDarlingLimit', () => {
  // Upper points of Marsaglia & Marsaglia (2004), Journal of Statistical Software 9(2), recomputed.
  it.each([
    [0.25, 1.24785963],
    [0.15, 1.62123854],
    [0.1, 1.93295783],
    [0.05, 2.49236716],
    [0.025, 3.07746418],
    [0.01, 3.87812502],
    [0.001, 5.96940134],
  ])('leaves %d above %d [published]', (share, z) => {
    expect(1 - andersonDarlingLimit(z - 5e-9)).toBeGreaterThanOrEqual(share);
    expect(1 - andersonDarlingLimit(z + 5e-9)).toBeLessThanOrEqual(share);
  });
});

describe('andersonDarlingDistance', () => {
  it('is -n - Σ (2i - 1)(ln u_i + ln(1 - u_(n+1-i)))/n [law]', () => {
    const u = [0.1, 0.35, 0.8, 0.97];
    const n = u.length;
    // Anderson & Darling (1954), JASA 49, for four shares, written out.
    const sum = u.reduce(
      (total, x, i) => total + (2 * i + 1) * (Math.log(x) + Math.log(1 - u[n - 1 - i]!)),
      0,
    );
    const distance = andersonDarlingDistance(
      Float64Array.from(u),
      Float64Array.from(u, (x) => 1 - x),
    );
    expect(distance).toBeCloseTo(-n - sum / n, 13);
  });

  it('is infinite for a row where the shape has no area, with p-value 0 [law]', () => {
    const distance = andersonDarlingDistance(Float64Array.of(0, 0.5), Float64Array.of(1, 0.5));
    expect(distance).toBe(Infinity);
    expect(andersonDarlingPValue(2, distance)).toBe(0);
  });
});

describe('andersonDarlingPValue', () => {
  // The correction for n rows is fitted: its authors give it three digits or more.
  it.each([5, 20])('is uniform for %d rows [law]', (n) => {
    const repetitions = 100_000;
    const shares = uniform(n * repetitions, `anderson ${n}`);
    const below = [0.001, 0.01, 0.05, 0.25, 0.5, 0.9];
    const counts = below.map(() => 0);
    for (let r = 0; r < repetitions; r++) {
      const u = shares.slice(r * n, (r + 1) * n).sort();
      const p = andersonDarlingPValue(
        n,
        andersonDarlingDistance(
          u,
          u.map((x) => 1 - x),
        ),
      );
      below.forEach((level, i) => (counts[i]! += p < level ? 1 : 0));
    }
    below.forEach((level, i) => {
      const error = Math.sqrt((level * (1 - level)) / repetitions);
      expect(Math.abs(counts[i]! / repetitions - level)).toBeLessThan(
        Z_FALSE_ALARM * error + level * (1 - level) * 2e-3,
      );
    });
  });

  it('falls with the distance, and has no seam where the far tail takes over [law]', () => {
    for (const n of [5, 100, 100_000]) {
      let before = 1;
      for (let z = 0.1; z < 30; z += 0.05) {
        const p = andersonDarlingPValue(n, z);
        expect(p).toBeLessThanOrEqual(before + 1e-7);
        before = p;
      }
    }
    // The tail's leading term is right to about 1/(2z).
    const [series, tail] = [13.999999, 14.000001].map((z) => andersonDarlingPValue(1e9, z));
    expect(Math.abs(tail! / series! - 1)).toBeLessThan(1 / 28);
  });
});
