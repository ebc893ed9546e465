/** How often 95 % intervals hold over 20,000 columns each (npm run check:long). */
import {
  breaches,
  changeCoverage,
  exceedanceCoverage,
  laws,
  summaryCoverage,
  type Tally,
  weightedCoverage,
} from '../evidence/coverage';

const ROWS = 4000;
const REPETITIONS = 20_000;

function show(name: string, tally: Tally): void {
  const shares = [...tally.shares()].map(([item, share]) => `${item} ${share.toFixed(4)}`);
  console.log(`${name}: ${shares.join(', ')}`);
}

describe('95 % intervals over 20,000 columns', () => {
  it.each(laws)('of SUMMARY hold in 95 of 100, $name [law]', (law) => {
    const tally = summaryCoverage(law, ROWS, REPETITIONS);
    show(law.name, tally);
    expect(breaches(tally, REPETITIONS)).toEqual([]);
  });

  it('of SUMMARY with weights hold in 95 of 100 or more [law]', () => {
    const tally = weightedCoverage(ROWS, REPETITIONS);
    show('weighted', tally);
    const tooSeldom = breaches(tally, REPETITIONS).filter((breach) =>
      /: 0\.[0-8]|: 0\.9[0-4]/.test(breach),
    );
    expect(tooSeldom).toEqual([]);
  });

  it.each([0.001, 0.01, 0.05, 0.5])('of EXCEEDANCE hold for a chance of %d [law]', (chance) => {
    for (const law of laws) {
      const tally = exceedanceCoverage(law, chance, 1000, REPETITIONS);
      show(law.name, tally);
      expect(breaches(tally, REPETITIONS)).toEqual([]);
    }
  });

  it.each(laws)('of PAIREDCHANGE hold in 95 of 100, $name [law]', (law) => {
    const tally = changeCoverage(law, 1000, REPETITIONS);
    show(law.name, tally);
    expect(breaches(tally, REPETITIONS)).toEqual([]);
  });

  it('of confidence 0.93 do not pass for them [law]', () => {
    const tally = summaryCoverage(laws[0]!, 1000, REPETITIONS, 0.93);
    const wrong = breaches(tally, REPETITIONS).map((breach) => breach.split(':')[0]);
    expect(wrong).toEqual(expect.arrayContaining(['mean', 'standard deviation']));
  });
});
