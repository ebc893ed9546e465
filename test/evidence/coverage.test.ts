/** The coverage of test/long, a twentieth as often and with fewer rows. */
import {
  breaches,
  changeCoverage,
  exceedanceCoverage,
  laws,
  summaryCoverage,
  weightedCoverage,
} from './coverage';

const ROWS = 500;
const REPETITIONS = 1000;

describe('95 % intervals', () => {
  it.each(laws)('of SUMMARY hold in 95 of 100 columns, $name [law]', (law) => {
    expect(breaches(summaryCoverage(law, ROWS, REPETITIONS), REPETITIONS)).toEqual([]);
  });

  it('of SUMMARY with weights hold in 95 of 100 columns or more [law]', () => {
    const tooSeldom = breaches(weightedCoverage(ROWS, REPETITIONS), REPETITIONS).filter((breach) =>
      /: 0\.[0-8]|: 0\.9[0-4]/.test(breach),
    );
    expect(tooSeldom).toEqual([]);
  });

  it.each([0.001, 0.01, 0.05, 0.5])('of EXCEEDANCE hold for a chance of %d [law]', (chance) => {
    // The shape does not matter: rows are above or not.
    const tally = exceedanceCoverage(laws[1]!, chance, ROWS, REPETITIONS);
    expect(breaches(tally, REPETITIONS)).toEqual([]);
  });

  it.each(laws)('of PAIREDCHANGE hold in 95 of 100 pairs, $name [law]', (law) => {
    expect(breaches(changeCoverage(law, ROWS, REPETITIONS), REPETITIONS)).toEqual([]);
  });

  it('of another confidence do not pass for them [law]', () => {
    const narrow = breaches(summaryCoverage(laws[0]!, ROWS, REPETITIONS, 0.85), REPETITIONS);
    expect(narrow.map((breach) => breach.split(':')[0])).toContain('mean');
    expect(narrow.length).toBeGreaterThan(5);
    const wide = breaches(summaryCoverage(laws[0]!, ROWS, REPETITIONS, 0.9999), REPETITIONS);
    expect(wide.map((breach) => breach.split(':')[0])).toContain('mean');
  });
});
