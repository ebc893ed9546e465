/**
 * Step functions, dates and choices: values from other definitions (JavaScript's own
 * calendar, whole-number arithmetic), jumps cut exactly, and refusals.
 */
import { proveEnvelope } from '../../src/envelope/prove';
import { Encloser } from '../../src/formula/enclose';
import { evaluator } from '../../src/formula/evaluate';
import { chances } from './containment';
import { tapeOf, valueOf } from './formulas';
import { RULES } from './rules';

const N_POINTS = 60;
const N_INTERVALS = 1000;
describe.each(RULES)('%s', (formula, rule, least, largest) => {
  const tape = tapeOf(formula);
  const at = evaluator(tape);
  const chance = chances(23);
  const between = (): number => least + (largest - least) * chance();

  test(`is what its definition says at ${N_POINTS} points [law]`, () => {
    for (let i = 0; i < N_POINTS; i++) {
      const x = between();
      // A multiple of 0.1 or a sum of squares may round another way.
      expect([x, Math.abs(at(x) - rule(x)) <= 1e-13 * (1 + Math.abs(x))]).toEqual([x, true]);
    }
  });

  test('has enclosures that hold its values over 1,000 random intervals [law]', () => {
    const encloser = new Encloser(tape);
    for (let i = 0; i < N_INTERVALS; i++) {
      const a = between();
      const b = Math.min(largest, a + (largest - least) * 10 ** (-8 * chance()));
      const { lo, hi } = encloser.over(a, b, null, null).density.v;
      for (const x of [a, b, a + (b - a) * chance()]) {
        const y = at(x);
        const room = 1e-13 * (1 + Math.abs(y));
        expect([a, b, x, lo - room <= y && y <= hi + room]).toEqual([a, b, x, true]);
      }
    }
  });
});

describe('constants', () => {
  test.each([
    ['TIME(7,30,45)+0*x', (7 * 3600 + 30 * 60 + 45) / 86400],
    ['TIME(27,0,0)+0*x', 0.125],
    // OpenFormula 1.2 §6.10.3 and §6.17, from memory.
    ['INT(-2.5)+0*x', -3],
    ['ROUND(-2.5,0)+0*x', -3],
    ['MOD(-7,3)+0*x', 2],
    ['LOG10(1000)+0*x', 3],
    ['LOG(0.001*1000000,10)+0*x', 3],
    ['FACT(20)+0*x', 2432902008176640000],
    ['COMBIN(49,6)+0*x', 13983816],
    ['SUMPRODUCT({1,2;3,4},{5,6;7,8})+0*x', 70],
    ['SUMSQ({3,4})+0*x', 25],
    ['MEDIAN({9,1,4})+0*x', 4],
    ['MEDIAN({9,1,4,5})+0*x', 4.5],
  ])('%s is %d exactly [law]', (formula, value) => {
    expect(valueOf(formula, 1)).toBe(value);
  });
});

describe('jumps', () => {
  test.each([
    ['INT(x)+1', 0, 5],
    ['ROUND(x,1)', 0, 3],
    ['2+MOD(x,1)', 0, 5],
    ['MONTH(x)', 46_631, 47_400],
    ['WEEKDAY(x,2)', 46_631, 46_661],
    ['POISSON.DIST(x,5,FALSE)', 0, 25],
    ['CHOOSE(x,5,6,7)', 1, 3.9],
  ])('%s from %d to %d is cut at its jumps [law]', (formula, from, to) => {
    const { lowerArea, upperArea, pieces } = proveEnvelope(tapeOf(formula), from, to);
    expect(lowerArea / upperArea).toBeGreaterThanOrEqual(0.99);
    expect(pieces.length).toBeLessThan(150);
  });
});

const REFUSED: readonly (readonly [string, string])[] = [
  [
    'ROUND(x,x)',
    'Formula, character 1: a number of digits that is not a constant; give a whole number of digits from -15 to 15.',
  ],
  [
    'FLOOR(x,-1)',
    'Formula, character 1: a significance that is not above 0, on which spreadsheet programs disagree; give a constant above 0.',
  ],
  ['WEEKDAY(x,5)', 'Formula, character 1: WEEKDAY with the type 5; give 1, 2, 3 or 11 to 17.'],
  [
    'DATE(27,9,x)',
    'Formula, character 1: DATE with month 9 of the year 27; give a year from 1900 to 9999.',
  ],
  [
    'x+TIME(1.5,0,0)',
    'Formula, character 3: TIME with a part that is not a whole number from 0, on which spreadsheet programs disagree; give whole constants, or write hours as hours/24.',
  ],
  [
    'IFS(x<1,2,3)',
    'Formula, character 1: IFS with 3 arguments; give conditions and values in pairs, the last condition TRUE for all the rest.',
  ],
  [
    'SUMPRODUCT({1,2},{1,2,3})*x',
    'Formula, character 1: SUMPRODUCT of arrays of 1 x 2 and 1 x 3 elements; use arrays of the same rows and columns.',
  ],
  [
    'SUMPRODUCT({1,2}>1)*x',
    'Formula, character 1: TRUE or FALSE inside SUMPRODUCT, on which spreadsheet programs disagree; multiply the condition by 1 or by another array, as in SUMPRODUCT((a>1)*b).',
  ],
  [
    'NORM.DIST(x,0,-1,FALSE)',
    'Formula, character 1: a standard deviation that is not above 0; give a standard deviation above 0.',
  ],
  [
    'NORM.DIST(x,0,1,x)',
    'Formula, character 1: a last argument that is not TRUE or FALSE; give TRUE for the share below x, FALSE for the density.',
  ],
  [
    'GAMMA.DIST(2,x,1,FALSE)',
    'Formula, character 1: a shape that is not a constant; give a constant shape above 0.',
  ],
  [
    'T.DIST(x,2.5,FALSE)',
    'Formula, character 1: 2.5 degrees of freedom; give a whole constant from 1 on, as worksheets cut the rest off.',
  ],
  [
    'BINOM.DIST(4,3,x,FALSE)',
    'Formula, character 1: 4 successes in 3 trials; give a count from 0 to 3.',
  ],
  [
    'GAMMA.DIST(x,20000,1,TRUE)',
    'Formula, character 1: a shape of 20000 in a cumulative share; use shapes from 0.01 to 10000, for which the error is known.',
  ],
];

describe('refusals', () => {
  test.each(REFUSED)('%s says %s [law]', (formula, message) => {
    expect(() => tapeOf(formula)).toThrow(message);
  });

  test.each([
    ['GAMMA(x)', -1, 2, 'GAMMA takes a number that is not above 0'],
    ['ASIN(x)+3', -2, 1, 'ASIN takes a number that is not from -1 to 1'],
    [
      'EXPON.DIST(x,2,FALSE)',
      -1,
      3,
      'EXPON.DIST takes a number below 0, on which spreadsheet programs disagree',
    ],
    [
      'YEAR(x)',
      1,
      400,
      'YEAR takes a date before 1 March 1900, on which spreadsheet programs disagree, or after 9999',
    ],
    ['CHOOSE(x,5,6)', 0, 2, 'the index of CHOOSE is not from 1 to 2'],
    ['IFS(x<1,2)', 0, 2, 'no condition of IFS holds'],
    ['SWITCH(INT(x),1,2)', 0, 2, 'no case of SWITCH fits'],
    [
      'BINOM.DIST(x,3,0.5,FALSE)',
      0,
      5,
      'BINOM.DIST takes a count outside 0 to the number of trials, on which spreadsheet programs disagree',
    ],
  ])('%s from %d to %d is refused where %s [law]', (formula, from, to, reason) => {
    expect(() => proveEnvelope(tapeOf(formula), from, to)).toThrow(`where ${reason}`);
  });
});
