import { Student } from '../../src/evidence/student';
import { sampleOf } from '../../src/evidence/sample';
import { highestMean, lowestMean } from '../../src/evidence/tail';
import { jackknife, repeated, skewed, uniform, weighted } from './samples';

const student = new Student(0.95);
const counts = Float64Array.from({ length: 100 }, (_, i) => i + 1);

describe('lowestMean and highestMean', () => {
  it('are means of the rows at an end, a row across it in part [law]', () => {
    const sample = sampleOf(counts, null);
    expect(lowestMean(sample, 0.05, student).mean).toBeCloseTo(3, 12);
    expect(highestMean(sample, 0.05, student).mean).toBeCloseTo(98, 12);
    // One row and a half: (1 + 2/2) / 1.5.
    expect(lowestMean(sample, 0.015, student).mean).toBeCloseTo(4 / 3, 12);
    expect(highestMean(sample, 0.001, student).mean).toBe(100);
  });

  it('of a share and of the rest make up the mean [law]', () => {
    const sample = sampleOf(skewed(777, 'parts'), null);
    const mean = sample.values.reduce((a, b) => a + b, 0) / 777;
    for (const share of [0.01, 0.3, 0.5, 0.77]) {
      const low = lowestMean(sample, share, student).mean;
      const high = highestMean(sample, 1 - share, student).mean;
      expect(share * low + (1 - share) * high).toBeCloseTo(mean, 12);
    }
  });

  it('with whole weights are those of repeated rows [law]', () => {
    const values = skewed(200, 'tail');
    const weights = uniform(200, 'tail weights').map((u) => Math.floor(4 * u));
    const all = sampleOf(repeated(values, weights), null);
    for (const share of [0.05, 0.1234, 0.5]) {
      for (const tail of [lowestMean, highestMean]) {
        const own = tail(weighted(values, weights), share, student).mean;
        expect(own).toBeCloseTo(tail(all, share, student).mean, 11);
      }
    }
  });

  // The influence of a row on the mean of the lowest share is min(x − q, 0) / share, up to a
  // constant: below the percentile q a row moves the sum by its distance, above it not at all. The
  // jackknife knows nothing of that; in a tail of 100 rows they agree within a few percent.
  it.each([
    ['lowest', null],
    ['highest', null],
    ['lowest', uniform(500, 'jack').map((u) => 0.5 + u)],
    ['highest', uniform(500, 'jack').map((u) => 0.5 + u)],
  ])(
    'have the error of the jackknife, %s, weights %#, but for some percent [law]',
    (side, weights) => {
      const values = skewed(500, 'jackknife');
      const tail = side === 'lowest' ? lowestMean : highestMean;
      const sample = weights === null ? sampleOf(values, null) : weighted(values, weights);
      const { interval } = tail(sample, 0.2, student);
      const by = jackknife(values, weights, (own, w) => {
        const rest = w === null ? sampleOf(own, null) : weighted(own, w);
        return tail(rest, 0.2, student).mean;
      });
      // The degrees of freedom are between 30 and 99, where t varies by 3 %.
      const error = (interval.hi! - interval.lo!) / 2 / student.quantile(50);
      expect(Math.abs(error / by - 1)).toBeLessThan(0.08);
    },
  );

  it('have no interval with fewer than 50 rows’ worth in the tail [law]', () => {
    const sample = sampleOf(counts, null);
    expect(lowestMean(sample, 0.49, student).interval).toEqual({ lo: null, hi: null });
    expect(lowestMean(sample, 0.5, student).interval.lo).not.toBeNull();
  });

  it('of values that are all alike have nothing to doubt [law]', () => {
    const sample = sampleOf(new Float64Array(100).fill(7), null);
    expect(highestMean(sample, 0.5, student)).toEqual({ mean: 7, interval: { lo: 7, hi: 7 } });
  });
});
