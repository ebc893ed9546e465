import type { Cell, Range } from '../../src/index';
import {
  bestOf,
  CellErrorPassed,
  exceedance,
  pairedChange,
  rowsNeeded,
  summary,
} from '../../src/index';
import { skewed, uniform } from '../evidence/samples';
import { messageOf } from '../message';
import { columnOf } from './shapes';

const HARVEST: Range = [['harvest'], [31], [28], [40], [35], [30]];

/** A zero at the end of a column that is not skewed. */
const LONE: Range = [[5], [-5], [0]];

/** The cells of an item, its name left out. */
function cellsOf(spill: Range, item: string): readonly Cell[] {
  const row = spill.find(([name]) => name === item);
  if (row === undefined) throw new Error(`no ${item}`);
  return row.slice(1);
}

describe('summary', () => {
  it('carries headings, and names columns without one [law]', () => {
    const both = summary(
      [
        ['harvest', ''],
        [31, 2],
        [28, 3],
      ],
      [[0.5]],
      [[0.9]],
      null,
    );
    expect(both[0]).toEqual([
      'item',
      ...['harvest', 'harvest, 90 % interval from', 'harvest, 90 % interval to'],
      ...['column 2', 'column 2, 90 % interval from', 'column 2, 90 % interval to'],
    ]);
    expect(summary([[31], [28]], null, null, null)[0]).toEqual([
      'item',
      'value',
      '95 % interval from',
      '95 % interval to',
    ]);
  });

  it('lists each percentile, then tails, the lowest up to the middle and the highest from it [law]', () => {
    const items = summary(HARVEST, [[0.1, 0.5, 0.975]], null, null).map(([item]) => item);
    expect(items).toEqual([
      ...['item', 'rows', "rows' worth", 'zeros at the end', 'mean', 'standard deviation'],
      ...['P10', 'P50', 'P97.5', 'mean of the lowest 10 %', 'mean of the lowest 50 %'],
      ...['mean of the highest 50 %', 'mean of the highest 2.5 %', 'note'],
    ]);
  });

  it('is the same for a column, for its row, and in any order of the rows [law]', () => {
    const values = Array.from(skewed(200, 'order'));
    const own = summary(columnOf(values), null, null, null);
    expect(summary([values], null, null, null)).toEqual(own);
    expect(summary(columnOf([...values].reverse()), null, null, null)).toEqual(own);
  });

  it('gives each column what it gives alone [law]', () => {
    const [a, b] = [skewed(300, 'a'), uniform(300, 'b')];
    const both = summary([['a', 'b'], ...Array.from(a, (x, i) => [x, b[i]!])], null, null, null);
    const alone = [a, b].map((of) => summary(columnOf(of), null, null, null));
    both.slice(1).forEach((row, i) => {
      expect(row.slice(1)).toEqual(alone.flatMap((spill) => spill[i + 1]!.slice(1)));
    });
  });

  it('has the percentiles of PERCENTILE.INC and the mean of AVERAGE [law]', () => {
    const spill = summary(HARVEST, [[0.25], [0.9]], null, null);
    expect(cellsOf(spill, 'P25')[0]).toBe(30);
    expect(cellsOf(spill, 'P90')[0]).toBeCloseTo(38, 12);
    expect(cellsOf(spill, 'mean')[0]).toBeCloseTo(32.8, 13);
    // Sum of squares 90.8 over four.
    expect(cellsOf(spill, 'standard deviation')[0]).toBeCloseTo(Math.sqrt(22.7), 13);
  });

  it('counts zeros at the end and says what they may mean [law]', () => {
    const spill = summary([...HARVEST, [0], [null], ['']], null, null, null);
    expect(cellsOf(spill, 'rows')[0]).toBe(8);
    expect(cellsOf(spill, 'zeros at the end')[0]).toBe(3);
    expect(cellsOf(spill, 'note')[0]).toBe(
      'the last 3 rows are 0 or blank and count as 0: perhaps more rows were selected than there are',
    );
    expect(cellsOf(summary(LONE, null, null, null), 'note')[0]).toBe(
      'the last row is 0 or blank and counts as 0: perhaps one row too many was selected',
    );
    expect(cellsOf(summary(HARVEST, null, null, null), 'zeros at the end')[0]).toBe(0);
  });

  it('says "unbounded" where the rows are too few to tell, never a number [law]', () => {
    const spill = summary(HARVEST, [[0.5, 0.95]], null, null);
    expect(cellsOf(spill, 'P50').slice(1)).toEqual([28, 'unbounded']);
    expect(cellsOf(spill, 'P95')[2]).toBe('unbounded');
    expect(cellsOf(spill, 'mean of the highest 5 %').slice(1)).toEqual(['unbounded', 'unbounded']);
    expect(cellsOf(spill, 'standard deviation').slice(1)).toEqual(['unbounded', 'unbounded']);
  });

  it('notes a skewness that the rows are too few for, and rows that are all alike [law]', () => {
    const rare = [...Array<number>(49).fill(1), 500];
    expect(cellsOf(summary(columnOf(rare), null, null, null), 'note')[0]).toBe(
      'so skewed (skewness 6.9) or unevenly weighted that the interval of the mean may be too narrow',
    );
    const same = summary([[4], [4], [4]], null, null, null);
    expect(cellsOf(same, 'mean')).toEqual([4, 4, 4]);
    expect(cellsOf(same, 'note')[0]).toBe(
      'all rows are alike: the intervals cannot tell what other rows would show',
    );
  });

  it('with equal weights is that without; rows of weight 0 count for nothing [law]', () => {
    const values = skewed(100, 'weights');
    const own = summary(columnOf(values), null, null, null);
    expect(summary(columnOf(values), null, null, columnOf(values.map(() => 2.5)))).toEqual(own);
    const more = [...values, 1e9, -1e9];
    const spill = summary(columnOf(more), null, null, columnOf([...values.map(() => 2.5), 0, 0]));
    // The shares are 1/100 but for a rounding.
    for (const [i, row] of spill.slice(2).entries()) {
      row.slice(1).forEach((cell, j) => {
        const other = own[i + 2]![j + 1]!;
        if (typeof cell === 'number' && i > 3 && !(row[0] as string).startsWith('P'))
          expect(Math.abs(cell / (other as number) - 1)).toBeLessThan(1e-9);
      });
    }
    expect(cellsOf(spill, "rows' worth")[0]).toBeCloseTo(100, 9);
  });

  it('with weights tells rows’ worth by Kish (1965) [law]', () => {
    const spill = summary(HARVEST, null, null, [['weight'], [1], [1], [2], [4], [0]]);
    expect(cellsOf(spill, "rows' worth")[0]).toBeCloseTo(64 / 22, 12);
    expect(cellsOf(spill, 'mean')[0]).toBeCloseTo((31 + 28 + 80 + 140) / 8, 12);
  });

  it('holds no number that is not finite, whatever the size of the values [law]', () => {
    for (const scale of [1e-300, 1e-160, 1, 1e160, 9e299]) {
      const values = skewed(60, 'finite').map((value) => Math.min(1, value / 5) * scale);
      for (const weights of [null, columnOf(uniform(60, 'finite weights'))]) {
        const cells = summary(columnOf(values), null, null, weights).slice(1).flat();
        for (const cell of cells) {
          if (typeof cell === 'number') expect(Number.isFinite(cell)).toBe(true);
        }
        const [mean, lo, hi] = cellsOf(summary(columnOf(values), null, null, weights), 'mean');
        expect((lo as number) < (mean as number) && (mean as number) < (hi as number)).toBe(true);
      }
    }
  });
});

const N: Range = [[31], ['n/a'], [40]];
const NUMBER = 'is not a number; give a number.';
const refused: readonly (readonly [string, () => unknown, string])[] = [
  [
    'no values',
    () => summary(null, null, null, null),
    'values (argument 1): it is missing; give a column of values.',
  ],
  [
    'a text in a column',
    () => summary([['harvest'], ...N], null, null, null),
    `values (argument 1), row 3: "n/a" ${NUMBER}`,
  ],
  [
    'a text in a table',
    () =>
      summary(
        [
          ['a', 'b'],
          [1, 2],
          [3, 'x'],
        ],
        null,
        null,
        null,
      ),
    `values (argument 1), row 3, column 2: "x" ${NUMBER}`,
  ],
  [
    'a text in a row',
    () => summary([[1, 2, 'x']], null, null, null),
    `values (argument 1), column 3: "x" ${NUMBER}`,
  ],
  [
    'TRUE and FALSE',
    () => summary([[true], [false]], null, null, null),
    'values (argument 1): TRUE and FALSE are not numbers; give numbers, or ask EXCEEDANCE for the share of TRUE.',
  ],
  [
    'TRUE among numbers',
    () => summary([[5], [true]], null, null, null),
    'values (argument 1), row 1: 5 stands among TRUE and FALSE; give numbers, or TRUE and FALSE.',
  ],
  [
    'one row',
    () => summary([['harvest'], [5]], null, null, null),
    'values (argument 1): 1 row of values; give at least 2.',
  ],
  [
    'a value that cannot be added up',
    () => summary([[5], [1e301]], null, null, null),
    'values (argument 1), row 2: 1e+301 is beyond 1e300; give a larger unit.',
  ],
  [
    'a percentage for a share',
    () => summary(HARVEST, [[0.5, 95]], null, null),
    'shares (argument 2), column 2: 95 is not between 0 and 1; write 0.95 or 95%.',
  ],
  [
    'a share of 1',
    () => summary(HARVEST, [[1]], null, null),
    'shares (argument 2): 1 is not between 0 and 1; give fractions such as 0.1, 0.5, 0.9; for the ends use MIN and MAX.',
  ],
  [
    'a confidence of 95',
    () => summary(HARVEST, null, [[95]], null),
    'confidence (argument 3): 95 is not between 0 and 1; write 0.95 or 95%.',
  ],
  [
    'a negative confidence',
    () => summary(HARVEST, null, [[-1]], null),
    'confidence (argument 3): -1 is not between 0 and 1; give a fraction such as 0.95.',
  ],
  [
    'too few weights',
    () => summary(HARVEST, null, null, [[1], [2]]),
    'weights (argument 4): 2 weights for 5 rows of values; give one weight for each row.',
  ],
  [
    'a negative weight',
    () => summary(HARVEST, null, null, [[1], [2], [-3], [1], [1]]),
    'weights (argument 4), row 3: -3 is negative; give weights of 0 or more.',
  ],
  [
    'one row that counts',
    () => summary(HARVEST, null, null, [[0], [2], [0], [0], [0]]),
    'weights (argument 4): the rows are worth 1.00 rows of equal weight; give weights that spread over more rows.',
  ],
  [
    'no threshold',
    () => exceedance(HARVEST, null, null, null),
    'threshold (argument 2): it is missing; give a number in the unit of the values (only TRUE and FALSE need none).',
  ],
  [
    'a threshold for TRUE and FALSE',
    () => exceedance([[true], [false]], [[5]], null, null),
    'threshold (argument 2): 5 is given for TRUE and FALSE; leave it out for the share of TRUE, or give numbers.',
  ],
  [
    'a threshold that is a text',
    () => exceedance(HARVEST, [['high']], null, null),
    `threshold (argument 2): "high" ${NUMBER}`,
  ],
  [
    'two thresholds',
    () => exceedance(HARVEST, [[30, 40]], null, null),
    'threshold (argument 2): 1 row and 2 columns; give one cell.',
  ],
  [
    'several columns to plan rows for',
    () =>
      rowsNeeded(
        [
          [1, 2],
          [3, 4],
        ],
        null,
        [[1]],
        null,
      ),
    'values (argument 1): 2 columns; give one column.',
  ],
  [
    'no halfwidth',
    () => rowsNeeded(HARVEST, null, null, null),
    'halfwidth (argument 3): it is missing; give how far off the value may be, in its unit.',
  ],
  [
    'a negative halfwidth',
    () => rowsNeeded(HARVEST, null, [[-1]], null),
    'halfwidth (argument 3): -1 is not above 0; give how far off the value may be, in its unit.',
  ],
  [
    'a share of 2',
    () => rowsNeeded(HARVEST, [[2]], [[1]], null),
    'share (argument 2): 2 is not between 0 and 1; write 0.02 or 2%.',
  ],
  [
    'rows that do not vary',
    () => rowsNeeded([[4], [4]], null, [[1]], null),
    'values (argument 1): all 2 rows are 4; give rows that vary.',
  ],
  [
    'columns of different length',
    () => pairedChange(HARVEST, [[1], [2]], null),
    'after (argument 2): 2 rows for 5 rows before; give as many, in the same order.',
  ],
  [
    'nothing to compare with',
    () => pairedChange(HARVEST, null, null),
    'after (argument 2): it is missing; give a column of values.',
  ],
  [
    'one case',
    () => bestOf(HARVEST, [[true]], null),
    'table (argument 1): one column; give one column for each case, at least two.',
  ],
  [
    'no word on what is best',
    () => bestOf([[1, 2]], null, null),
    'table (argument 1): one column; give one column for each case, at least two.',
  ],
  [
    'no direction',
    () =>
      bestOf(
        [
          [1, 2],
          [3, 4],
        ],
        null,
        null,
      ),
    'largest (argument 2): it is missing; give TRUE if the largest value is the best, FALSE if the smallest is.',
  ],
  [
    'a number for a direction',
    () =>
      bestOf(
        [
          [1, 2],
          [3, 4],
        ],
        [[0]],
        null,
      ),
    'largest (argument 2): 0 is neither TRUE nor FALSE; give TRUE if the largest value is the best, FALSE if the smallest is.',
  ],
];

describe('summary and its kin', () => {
  it.each(refused)('with %s say where and what [law]', (_, call, message) => {
    expect(messageOf(call)).toBe(message);
  });

  it('with an error value are that error, whatever else is wrong [law]', () => {
    const bad: Range = [['harvest'], ['n/a'], [{ error: '#N/A' }], [3]];
    const good: Range = [[1], [2], [3]];
    const error: Range = [[{ error: '#REF!' }]];
    for (const call of [
      () => summary(bad, null, null, null),
      () => summary(good, error, null, null),
      () => summary(good, null, error, null),
      () => summary(good, null, null, [[1], [{ error: '#REF!' }], [2]]),
      () => exceedance(bad, [[1]], null, null),
      () => exceedance(good, error, null, null),
      () => rowsNeeded(bad, null, [[1]], null),
      () => rowsNeeded(good, null, error, null),
      () => pairedChange(good, bad, null),
      () => bestOf([bad[0]!, [{ error: '#N/A' }]], [[true]], null),
      () =>
        bestOf(
          [
            [1, 2],
            [3, 4],
          ],
          error,
          null,
        ),
    ]) {
      expect(call).toThrow(CellErrorPassed);
    }
  });
});
