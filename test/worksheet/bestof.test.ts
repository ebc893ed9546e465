import type { Cell, Range } from '../../src/index';
import { bestOf, pairedChange, summary } from '../../src/index';
import { Z_FALSE_ALARM } from '../draw/statistics';
import { skewed, uniform } from '../evidence/samples';

const CASES: Range = [
  ['two', 'three', 'four'],
  [10, 12, 11],
  [20, 20, 14],
  [15, 9, 15],
  [8, 16, 12],
];
/** The cells of a case below the headings of these names. */
const cellsOf = (spill: Range, name: string, ...headings: string[]): Cell[] => {
  const row = spill.find(([own]) => own === name)!;
  return headings.map((heading) => row[spill[0]!.indexOf(heading)]!);
};

describe('bestOf', () => {
  it('shares a row among the cases that are best in it [law]', () => {
    const spill = bestOf(CASES, [[true]], null);
    const chances = ['two', 'three', 'four'].map(
      (name) => cellsOf(spill, name, 'chance to be best')[0],
    );
    // Rows: three; two and three; two and four; three.
    expect(chances).toEqual([0.25, 0.625, 0.125]);
    const least = bestOf(CASES, [[false]], null);
    const lowest = ['two', 'three', 'four'].map(
      (name) => cellsOf(least, name, 'chance to be best')[0],
    );
    expect(lowest).toEqual([0.5, 0.25, 0.25]);
  });

  it('has the means’ places, and the regret against the best of each row [law]', () => {
    const spill = bestOf(CASES, [[true]], null);
    expect(cellsOf(spill, 'two', 'place', 'mean', 'average regret')).toEqual([2, 13.25, 2.5]);
    expect(cellsOf(spill, 'three', 'place', 'mean', 'average regret')).toEqual([1, 14.25, 1.5]);
    expect(cellsOf(spill, 'four', 'place', 'mean', 'average regret')).toEqual([3, 13, 2.75]);
    const least = bestOf(CASES, [[false]], null);
    expect(cellsOf(least, 'four', 'place', 'average regret')).toEqual([1, 2.75]);
    // Least of the rows: 10, 14, 9, 8.
    expect(cellsOf(least, 'two', 'average regret')).toEqual([3]);
  });

  it('keeps the order and the headings of the table, and counts zeros at its end [law]', () => {
    const spill = bestOf([...CASES, [0, 5, null]], [[true]], [[0.9]]);
    expect(spill.map(([name]) => name)).toEqual(['case', 'two', 'three', 'four']);
    expect(spill[0]).toEqual([
      ...['case', 'place', 'mean', 'mean, 90 % interval from', 'mean, 90 % interval to'],
      ...['chance to be best', 'chance to be best, 90 % interval from'],
      ...['chance to be best, 90 % interval to', 'average regret'],
      ...['average regret, 90 % interval from', 'average regret, 90 % interval to'],
      'zeros at the end',
    ]);
    expect(spill.slice(1).map((row) => row.at(-1))).toEqual([1, 0, 1]);
    expect(bestOf(CASES.slice(1), [[true]], null).map(([name]) => name)).toEqual([
      'case',
      'column 1',
      'column 2',
      'column 3',
    ]);
  });

  it('gives equal means the same place [law]', () => {
    const tied = bestOf(
      [
        [1, 2, 0],
        [2, 1, 0],
      ],
      [[true]],
      null,
    );
    expect(tied.slice(1).map((row) => row[1])).toEqual([1, 1, 3]);
  });

  it('for two cases agrees with SUMMARY and PAIREDCHANGE [law]', () => {
    const [a, b] = [skewed(400, 'a'), skewed(400, 'b')];
    const column = (of: Float64Array): Range => Array.from(of, (value) => [value]);
    const spill = bestOf([['a', 'b'], ...Array.from(a, (x, i) => [x, b[i]!])], [[true]], null);
    const mean = summary(column(a), null, null, null).find(([item]) => item === 'mean')!;
    cellsOf(spill, 'a', 'mean', 'mean, 95 % interval from', 'mean, 95 % interval to').forEach(
      (cell, i) => expect(cell).toBeCloseTo(mean[i + 1] as number, 12),
    );
    const change = new Map(
      pairedChange(column(a), column(b), null).map(([item, value]) => [item, value]),
    );
    const chance = [
      ...['', ', 95 % interval from', ', 95 % interval to'].map(
        (end) => `share of rows that rise${end}`,
      ),
    ].map((item) => change.get(item));
    const ends = ['chance to be best, 95 % interval from', 'chance to be best, 95 % interval to'];
    expect(cellsOf(spill, 'b', 'chance to be best', ...ends)).toEqual(chance);
    const [ofA, ofB] = ['a', 'b'].map(
      (name) => cellsOf(spill, name, 'average regret')[0] as number,
    );
    expect(ofA! - ofB!).toBeCloseTo(change.get('mean change') as number, 12);
  });

  // In a tie each of five cases has the best mean in a fifth of all repetitions; a case that leads by
  // one standard error √(2/n) … the chance that its mean is the best of five is ∫ φ(z − d) Φ(z)^4 dz
  // with d its lead in standard errors of a mean, by the midpoint rule on 4,000 steps.
  it.each([0, 1.5, 4])(
    'finds a lead of %d standard errors as often as theory says [law]',
    (lead) => {
      const [repetitions, rows] = [1500, 30];
      const numbers = uniform(repetitions * rows * 5, `lead ${lead}`);
      // Uniform on ±√3 has variance 1; its mean of 30 is normal to 1e-3 in the cumulative share.
      let found = 0;
      for (let k = 0, at = 0; k < repetitions; k++) {
        const table = Array.from({ length: rows }, () =>
          Array.from(
            { length: 5 },
            (_, j) =>
              (2 * numbers[at++]! - 1) * Math.sqrt(3) + (j === 2 ? lead / Math.sqrt(rows) : 0),
          ),
        );
        if (bestOf(table, [[true]], null)[3]![1] === 1) found++;
      }
      let chance = 0;
      let below = 0;
      const step = 20 / 4000;
      const normal = (z: number): number => Math.exp((-z * z) / 2) / Math.sqrt(2 * Math.PI);
      for (let z = -10 + step / 2; z < 10; z += step) {
        below += normal(z) * step;
        chance += normal(z - lead) * (below - (normal(z) * step) / 2) ** 4 * step;
      }
      const error = Math.sqrt((chance * (1 - chance)) / repetitions);
      expect(Math.abs(found / repetitions - chance)).toBeLessThan(Z_FALSE_ALARM * error + 5e-3);
      // The negative control: one of the other leads has another chance.
      const wrong = lead === 0 ? 0.2 + 0.1 : 0.2;
      expect(Math.abs(found / repetitions - wrong)).toBeGreaterThan(Z_FALSE_ALARM * error);
    },
  );
});
