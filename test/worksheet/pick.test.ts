import type { Cell, Range } from '../../src/index';
import { below, CellErrorPassed, draw, pick, thin } from '../../src/index';
import { FALSE_ALARM, goodnessOfFit } from '../draw/statistics';
import { messageOf } from '../message';

const SEED = [['plan-2027']];
const LABEL = [['seasons']];
const SEASONS: Range = [
  ['season', 'tonnes', 'frost'],
  ['2021', 410, false],
  ['2022', 385, true],
  ['2023', null, false],
  ['2024', 440, false],
];
const WEIGHTS: Range = [['weight'], [1], [2], [0], [4]];
const picked = (rows: Cell, table = SEASONS, weights = WEIGHTS): Range =>
  pick(table, weights, [[rows]], SEED, LABEL);
const thinned = (
  bound: Cell,
  table: Range = SEASONS,
  weights: Range = WEIGHTS,
  label: Range = LABEL,
): Range => thin(table, weights, SEED, label, [[bound]]);

describe('pick', () => {
  it('is the heading, then rows of the table as they stand, none of weight 0 [law]', () => {
    const spill = picked(500);
    expect(spill[0]).toEqual(SEASONS[0]);
    expect(spill).toHaveLength(501);
    const kinds = new Set(spill.slice(1).map((row) => JSON.stringify(row)));
    expect([...kinds].sort()).toEqual(
      [SEASONS[1], SEASONS[2], SEASONS[4]].map((row) => JSON.stringify(row)),
    );
  });

  it('takes a table and weights without headings, and weights in a row [law]', () => {
    const body = picked(50).slice(1);
    const bare = SEASONS.slice(1);
    expect(picked(50, bare, WEIGHTS)).toEqual(body);
    expect(picked(50, bare, [[1], [2], [0], [4]])).toEqual(body);
    expect(picked(50, bare, [[1, 2, 0, 4]])).toEqual(body);
    expect(picked(50, SEASONS, [[10], [20], [0], [40]])).toEqual([SEASONS[0], ...body]);
  });

  it('hands a blank over as 0, like every function [law]', () => {
    expect(picked(2, SEASONS, [[0], [0], [5], [0]]).slice(1)).toEqual([
      ['2023', 0, false],
      ['2023', 0, false],
    ]);
  });

  it('has a row that depends on its own number alone [law]', () => {
    const long = picked(300).slice(1);
    expect(picked(100).slice(1)).toEqual(long.slice(0, 100));
    expect(pick(SEASONS, WEIGHTS, [[101, 300]], SEED, LABEL).slice(1)).toEqual(long.slice(100));
  });

  it('shares no random numbers with DRAW under the same seed and label [law]', () => {
    const n = 40_000;
    const uniform = draw([['1']], [[0, 1]], [[n]], SEED, LABEL, []).flat() as number[];
    const picks = pick([[0], [1]], [[1], [1]], [[n]], SEED, LABEL).flat() as number[];
    const cells = [0, 0, 0, 0];
    picks.forEach((row, i) => cells[2 * row + (uniform[i]! < 0.5 ? 0 : 1)]!++);
    expect(goodnessOfFit(cells, [0.25, 0.25, 0.25, 0.25])).toBeGreaterThan(FALSE_ALARM);
    // The same numbers would leave two of the four empty.
    const same = [n / 2, 0, 0, n / 2];
    expect(goodnessOfFit(same, [0.25, 0.25, 0.25, 0.25])).toBeLessThan(FALSE_ALARM);
  });
});

describe('thin', () => {
  it('is a heading row, then surviving rows behind their numbers [law]', () => {
    const spill = thinned(4);
    expect(spill[0]).toEqual(['row', 'season', 'tonnes', 'frost']);
    for (const [number, ...row] of spill.slice(1)) {
      expect(row).toEqual(SEASONS[number as number]);
    }
    // Weight 0 never, weight = bound always.
    const numbers = spill.slice(1).map(([number]) => number);
    expect(numbers).not.toContain(3);
    expect(numbers).toContain(4);
    const bare = thin(SEASONS.slice(1), WEIGHTS, SEED, LABEL, [[4]]);
    expect(bare).toEqual([['row', 'column 1', 'column 2', 'column 3'], ...spill.slice(1)]);
  });

  it('has the largest weight for a bound that is left out or blank [law]', () => {
    expect(thin(SEASONS, WEIGHTS, SEED, LABEL, null)).toEqual(thinned(4));
    expect(thinned(null)).toEqual(thinned(4));
    expect(thinned(0)).toEqual(thinned(4));
  });

  it('keeps earlier survivors when rows are added and the bound is given [law]', () => {
    const rows: Range = Array.from({ length: 400 }, (_, i) => [`row ${i + 1}`]);
    const weights: Range = rows.map((_, i) => [1 + (i % 5)]);
    const whole = thinned(6, rows, weights);
    for (const n of [399, 100, 7]) {
      expect(thinned(6, rows.slice(0, n), weights.slice(0, n))).toEqual(
        whole.filter(([number], i) => i === 0 || (number as number) <= n),
      );
    }
    // Without one a larger last weight thins the rows before it.
    const free = (last: number): Range =>
      thin([...rows, ['new']], [...weights, [last]], SEED, LABEL, null).slice(0, -1);
    expect(free(50)).not.toEqual(free(5));
  });

  // Draws of one density thinned by the ratio of another to it are draws of the other:
  // x on 0 … 1 with weight x has density 2x and area x² below x.
  it('of draws by weights leaves draws of their product, also under the same label [law]', () => {
    const n = 100_000;
    const x = draw([['1']], [[0, 1]], [[n]], SEED, LABEL, []);
    const kept = thinned(1, x, x).slice(1);
    const bins = 50;
    const counts = new Float64Array(bins);
    for (const [, value] of kept) counts[Math.floor((value as number) * bins)]!++;
    const edges = Array.from({ length: bins + 1 }, (_, i) => [i / bins]);
    const shares = (text: string): number[] => {
      const lower = below([[text]], [[0, 1]], edges, []).flat() as number[];
      return lower.slice(1).map((share, i) => share - lower[i]!);
    };
    expect(goodnessOfFit(counts, shares('x'))).toBeGreaterThan(FALSE_ALARM);
    // Without thinning the bins would be level; χ² is then larger by n/2 · 0.33.
    expect(goodnessOfFit(counts, shares('1'))).toBeLessThan(FALSE_ALARM);
    expect(goodnessOfFit(counts, shares('x+0.05'))).toBeLessThan(FALSE_ALARM);
  });
});

const NEED = 'give one weight for each row, or for each row below its heading.';
const refused: readonly (readonly [string, () => unknown, string])[] = [
  [
    'no table',
    () => pick(null, WEIGHTS, [[5]], SEED, LABEL),
    'table (argument 1): it is missing; give a range of rows.',
  ],
  [
    'no weights',
    () => pick(SEASONS, null, [[5]], SEED, LABEL),
    'weights (argument 2): it is missing; give one weight for each row.',
  ],
  [
    'a negative weight',
    () => picked(5, SEASONS, [['weight'], [1], [-2], [0], [4]]),
    'weights (argument 2), row 3: -2 is negative; give weights of 0 or more.',
  ],
  [
    'a text among the weights',
    () => picked(5, SEASONS, [[1], ['two'], [0], [4]]),
    'weights (argument 2), row 2: "two" is not a number; give a number.',
  ],
  [
    'weights of 0',
    () => picked(5, SEASONS, [[0], [0], [0], [null]]),
    'weights (argument 2): all of them are 0; give at least one weight above 0.',
  ],
  [
    'too few weights',
    () => picked(5, SEASONS, [[1], [2]]),
    `weights (argument 2): 2 weights for a table of 5 rows; ${NEED}`,
  ],
  [
    'too many weights',
    () => picked(5, [['one']], [[1], [2]]),
    `weights (argument 2): 2 weights for a table of 1 row; ${NEED}`,
  ],
  [
    'weights of two columns',
    () => picked(5, SEASONS, SEASONS),
    'weights (argument 2): 5 rows and 3 columns; give one row or one column.',
  ],
  [
    'no rows',
    () => pick(SEASONS, WEIGHTS, null, SEED, LABEL),
    'rows (argument 3): they are missing; give a whole number from 1 to 1048575.',
  ],
  [
    'too many rows',
    () => picked(1_048_576),
    'rows (argument 3): 1048576 is above 1048575; give a whole number from 1 to 1048575.',
  ],
  [
    'no seed',
    () => pick(SEASONS, WEIGHTS, [[5]], null, LABEL),
    'seed (argument 4): it is blank; give a text or a number other than 0, so that the draws can be rebuilt.',
  ],
  [
    'no label to pick by',
    () => pick(SEASONS, WEIGHTS, [[5]], SEED, [['']]),
    'label (argument 5): it is blank; give a text or a number other than 0 (inputs without labels would share their random numbers).',
  ],
  [
    'two labels',
    () => pick(SEASONS, WEIGHTS, [[5]], SEED, [['a', 'b']]),
    'label (argument 5): 1 row and 2 columns; give one cell.',
  ],
  [
    'a weight above the bound',
    () => thinned(3),
    'weights (argument 2), row 5: 4 is above the bound (3); give a bound of at least 4.',
  ],
  [
    'a negative bound',
    () => thinned(-1),
    'bound (argument 5): -1 is not above 0; give a number that no weight exceeds, or leave it out for the largest weight.',
  ],
  [
    'a bound that is a text',
    () => thinned('much'),
    'bound (argument 5): "much" is not a number; give a number.',
  ],
  [
    'nothing left',
    () => thinned(1e9),
    'weights (argument 2): none of the 4 rows survives; give more rows, or a bound nearer to the largest weight (4).',
  ],
  [
    'no seed to thin by',
    () => thin(SEASONS, WEIGHTS, [[0]], LABEL, null),
    'seed (argument 3): it is blank; give a text or a number other than 0, so that the draws can be rebuilt.',
  ],
  [
    'no label',
    () => thin(SEASONS, WEIGHTS, SEED, null, null),
    'label (argument 4): it is blank; give a text or a number other than 0 (inputs without labels would share their random numbers).',
  ],
];

describe('pick and thin', () => {
  it.each(refused)('with %s say where and what [law]', (_, call, message) => {
    expect(messageOf(call)).toBe(message);
  });

  it('with an error value are that error [law]', () => {
    const bad: Range = [...SEASONS.slice(0, 4), ['2024', { error: '#N/A' }, false]];
    expect(() => picked(5, bad)).toThrow(CellErrorPassed);
    expect(() => thinned(4, bad)).toThrow(CellErrorPassed);
    expect(() => picked(5, SEASONS, [[1], [2], [{ error: '#REF!' }], [1]])).toThrow(
      CellErrorPassed,
    );
  });
});
