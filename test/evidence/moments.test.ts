import fc from 'fast-check';
import {
  deviationInterval,
  isTooSkewed,
  meanInterval,
  momentsOf,
} from '../../src/evidence/moments';
import { Student } from '../../src/evidence/student';
import { rowsWorth, sharesOf } from '../../src/evidence/weights';
import { jackknife, repeated, rows, skewed, uniform } from './samples';

const student = new Student(0.95);

describe('Student', () => {
  // Abramowitz & Stegun, table 26.10 (from memory).
  it.each([
    [1, 12.706, 5e-4],
    [5, 2.571, 5e-4],
    [10, 2.228, 5e-4],
    [30, 2.042, 5e-4],
    [120, 1.98, 5e-4],
    [1e7, 1.959964, 1e-6],
  ])('quantile(%d) is %d [published]', (degrees, t, halfUnit) => {
    expect(Math.abs(student.quantile(degrees) - t)).toBeLessThanOrEqual(halfUnit);
  });

  // NIST/SEMATECH e-Handbook 1.3.5.2, heat flow meter: 195 rows, mean 9.261460, standard deviation
  // 0.02278881 (from memory).
  it('interval(heat flow meter) is 9.258242 to 9.264679 [published]', () => {
    const { lo, hi } = student.interval(9.26146, 0.02278881 / Math.sqrt(195), 194);
    expect(Math.abs(lo! - 9.258242)).toBeLessThanOrEqual(1e-6);
    expect(Math.abs(hi! - 9.264679)).toBeLessThanOrEqual(1e-6);
  });

  it('interval(…) has no ends with less than one degree of freedom [law]', () => {
    expect(student.interval(5, 1, 0.9)).toEqual({ lo: null, hi: null });
  });
});

describe('rowsWorth', () => {
  // Kish (1965): n / (1 + squared coefficient of variation).
  it('rowsWorth(shares) is Kish’s effective number of rows [law]', () => {
    const weights = [1, 1, 2, 4];
    const [mean, square] = [2, 5.5];
    const variation = (square - mean * mean) / (mean * mean);
    expect(rowsWorth(sharesOf(weights), 4)).toBeCloseTo(4 / (1 + variation), 13);
  });

  it('rowsWorth(shares) does not depend on the unit, and of equal weights is all rows [law]', () => {
    expect(sharesOf([3, 3, 3])).toBeNull();
    expect(rowsWorth(null, 3)).toBe(3);
    const weights = [1, 3, 2.5, 0];
    for (const unit of [1e-300, 7, 1e300]) {
      const scaled = sharesOf(weights.map((weight) => weight * unit));
      expect(rowsWorth(scaled, 4)).toBeCloseTo(rowsWorth(sharesOf(weights), 4), 12);
    }
  });
});

describe('momentsOf', () => {
  const n = 400;
  const values = skewed(n, 'moments');
  const weights = uniform(n, 'weights').map((u) => 1 + Math.floor(3 * u));

  it('has the error of the jackknife, which is exact for a mean [law]', () => {
    const error = jackknife(values, null, (own) => momentsOf(rows(own)).mean);
    expect(Math.abs(momentsOf(rows(values)).error / error - 1)).toBeLessThan(1e-12);
  });

  // Ours is taken around the mean itself and not around the mean of all means with a row left out,
  // which differ by less than an error's part in √n.
  it('has the error of the jackknife for weighted rows, also heavy ones [law]', () => {
    for (const own of [weights, values.map((value) => 1 + value * value)]) {
      const { error } = momentsOf(rows(values, own));
      const by = jackknife(values, own, (rest, w) => momentsOf(rows(rest, w)).mean);
      expect(error).toBeGreaterThanOrEqual(by * (1 - 1e-12));
      expect(error / by - 1).toBeLessThan(1 / n);
    }
  });

  it('has the mean, spread and skewness of repeated rows for whole weights [law]', () => {
    const some = momentsOf(rows(values, weights));
    const all = momentsOf(rows(repeated(values, weights)));
    expect(some.mean).toBeCloseTo(all.mean, 12);
    expect(some.skewness).toBeCloseTo(all.skewness, 10);
    // But not their number: the denominator n − 1 is that of rows' worth.
    expect(some.standardDeviation).toBeGreaterThan(all.standardDeviation);
  });

  it('is moved and stretched with the values, to their last bits [law]', () => {
    const unit = fc.integer({ min: -900, max: 900 });
    fc.assert(
      fc.property(unit, (exponent) => {
        const scale = 2 ** exponent;
        const [one, other] = [
          momentsOf(rows(values)),
          momentsOf(rows(values.map((v) => v * scale))),
        ];
        expect(other.mean).toBe(one.mean * scale);
        expect(other.error).toBe(one.error * scale);
        expect(other.standardDeviation).toBe(one.standardDeviation * scale);
        expect(other.skewness).toBe(one.skewness);
        expect(other.varianceNoise).toBe(one.varianceNoise);
      }),
      { seed: 61, numRuns: 100 },
    );
  });

  it('has no spread where all values are alike, whatever they are [law]', () => {
    for (const value of [0, 0.1, -1e300]) {
      const same = momentsOf(rows(Float64Array.from({ length: 7 }, () => value)));
      expect(same.standardDeviation).toBeLessThanOrEqual(Math.abs(value) * 1e-15);
      expect(Math.abs(same.mean - value)).toBeLessThanOrEqual(Math.abs(value) * 1e-15);
    }
  });
});

describe('deviationInterval', () => {
  const values = skewed(400, 'deviation');

  // On the logarithm of the variance the interval reaches t · c · √((kurtosis − (n − 3)/n)/(n − 1))
  // with c = n/(n − t), Bonett (2006); the jackknife of ln s² knows nothing of that formula.
  it('is as wide as the jackknife of ln s² says, but for parts of 1/n [law]', () => {
    const moments = momentsOf(rows(values));
    const { lo, hi } = deviationInterval(moments, student);
    const error = jackknife(values, null, (own) =>
      Math.log(momentsOf(rows(own)).standardDeviation),
    );
    const reach = (Math.log(hi!) - Math.log(lo!)) / 2;
    const degrees = Math.min(399, moments.varianceDegrees);
    expect(Math.abs(reach / (student.quantile(degrees) * error) - 1)).toBeLessThan(0.05);
    expect(lo!).toBeLessThan(moments.standardDeviation);
    expect(hi!).toBeGreaterThan(moments.standardDeviation);
  });

  it('has no ends for fewer than ten rows, and none to doubt where nothing varies [law]', () => {
    expect(deviationInterval(momentsOf(rows(values.slice(0, 9))), student)).toEqual({
      lo: null,
      hi: null,
    });
    expect(deviationInterval(momentsOf(rows(new Float64Array(5))), student)).toEqual({
      lo: 0,
      hi: 0,
    });
  });
});

describe('meanInterval and isTooSkewed', () => {
  it('meanInterval(…) takes its degrees of freedom from rows’ worth [law]', () => {
    const moments = momentsOf(rows(Float64Array.of(1, 2, 4, 9), [1, 1, 2, 4]));
    const { lo, hi } = meanInterval(moments, student);
    const reach = student.quantile(moments.rowsWorth - 1) * moments.error;
    expect([lo, hi]).toEqual([moments.mean - reach, moments.mean + reach]);
  });

  // Cochran (1977): more than 25 · 2² rows for an exponential column.
  it('isTooSkewed(…) asks for 25 skewness² rows [law]', () => {
    const values = skewed(300, 'cochran');
    for (const n of [20, 60, 150, 300]) {
      const moments = momentsOf(rows(values.slice(0, n)));
      expect(isTooSkewed(moments)).toBe(n <= 25 * moments.skewness ** 2);
    }
    // Weights that single out a few rows make it worse.
    const weights = values.map((value) => (value > 3 ? 100 : 1));
    expect(isTooSkewed(momentsOf(rows(values)))).toBe(false);
    expect(isTooSkewed(momentsOf(rows(values, weights)))).toBe(true);
  });
});
