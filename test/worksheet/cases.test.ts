import type { Range } from '../../src/index';
import { cases, CellErrorPassed, draw } from '../../src/index';
import { messageOf } from '../message';
import { rankCorrelation, Z_FALSE_ALARM } from '../draw/statistics';

const SEED = [['plan-2027']];
const LABEL = [['downtime']];
const DENSITY = [['EXP(-0.5*((x-m)/s)^2)']];
const LIMITS = [[0, 12]];
const GIVENS: Range[] = [
  [
    ['m', 4],
    ['s', 1.3],
  ],
];
const PRESSES: Range = [
  ['presses', 'two', 'three', 4],
  ['m', 5, 4, 3],
  ['s', 1.5, 1.3, 1.1],
];

const table = (
  what: Range | null,
  density: Range = DENSITY,
  limits: Range | null = LIMITS,
  givens: readonly Range[] = GIVENS,
  rows: Range | null = [[200]],
): Range => cases(density, limits, rows, SEED, LABEL, what, givens);

const column = (spill: Range, j: number): Range => spill.slice(1).map((row) => [row[j]!]);

describe('cases', () => {
  it('has a column a case that is DRAW with its values, bit for bit [law]', () => {
    const spill = table(PRESSES, DENSITY, LIMITS, GIVENS, [[5000]]);
    expect(spill[0]).toEqual(['two', 'three', 4]);
    expect(spill).toHaveLength(5001);
    [1, 2, 3].forEach((j) => {
      const values: Range = [
        ['m', PRESSES[1]![j]!],
        ['s', PRESSES[2]![j]!],
      ];
      expect(column(spill, j - 1)).toEqual(draw(DENSITY, LIMITS, [[5000]], SEED, LABEL, [values]));
    });
    expect(column(spill, 0)).not.toEqual(column(spill, 1));
  });

  it('pairs the rows of its columns [law]', () => {
    const n = 5000;
    // Independent columns are correlated less than this but once in 10^6 (standard deviation 1/√n).
    const limit = Z_FALSE_ALARM / Math.sqrt(n);
    const spill = table(PRESSES, DENSITY, LIMITS, GIVENS, [[n]]);
    const [two, three] = [0, 1].map((j) => column(spill, j).flat() as number[]);
    expect(rankCorrelation(two!, three!)).toBeGreaterThan(limit);
    const apart = draw(DENSITY, LIMITS, [[n]], SEED, [['wait']], GIVENS).flat() as number[];
    expect(Math.abs(rankCorrelation(two!, apart))).toBeLessThan(limit);
  });

  it('moves the limits by rows from and to [law]', () => {
    const what: Range = [
      ['shift', 'short', 'long', 'open'],
      ['FROM', 1, 2, 'unbounded'],
      ['to', 'm', 9, 'unbounded'],
    ];
    const ends: Range = [
      [1, 4],
      [2, 9],
      ['unbounded', 'unbounded'],
    ];
    for (const limits of [LIMITS, null]) {
      const spill = table(what, DENSITY, limits);
      ends.forEach((own, j) => {
        expect(column(spill, j)).toEqual(draw(DENSITY, [own], [[200]], SEED, LABEL, GIVENS));
      });
    }
  });

  it('leaves the other end as it is, also where there are no limits [law]', () => {
    const what: Range = [
      ['least', 'a', 'b'],
      ['from', 1, 3],
    ];
    expect(column(table(what), 1)).toEqual(draw(DENSITY, [[3, 12]], [[200]], SEED, LABEL, GIVENS));
    expect(column(table(what, DENSITY, null), 1)).toEqual(
      draw(DENSITY, [[3, 'unbounded']], [[200]], SEED, LABEL, GIVENS),
    );
    const named: Range = [['u', 0, 12]];
    expect(column(table(what, [['EXP(-u)']], named), 0)).toEqual(
      draw([['EXP(-u)']], [['u', 1, 12]], [[200]], SEED, LABEL, []),
    );
  });

  it('truncates a table of points, and moves what limits name [law]', () => {
    const points: Range = [
      ['x', 'height'],
      [0, 1],
      [5, 3],
      [10, 0],
    ];
    const what: Range = [
      ['most', 'a', 'b'],
      ['to', 6, 20],
    ];
    const spill = table(what, points, null, []);
    expect(column(spill, 0)).toEqual(draw(points, [[0, 6]], [[200]], SEED, LABEL, []));
    expect(column(spill, 1)).toEqual(draw(points, null, [[200]], SEED, LABEL, []));
    const capacity: Range = [
      ['case', 'a', 'b'],
      ['capacity', 6, 7],
    ];
    expect(column(table(capacity, points, [[0, 'capacity']], [[['capacity', 9]]]), 1)).toEqual(
      draw(points, [[0, 7]], [[200]], SEED, LABEL, []),
    );
  });

  it('takes a block, its rows, seed and label, and gives a name that only the formula has its values [law]', () => {
    const block: Range = [
      ['density', 'EXP(-x/k)*x^p'],
      ['from', 0],
      ['to', 30],
      ['rows', 40],
      ['seed', 'plan-2027'],
      ['label', 'downtime'],
      ['k', 2],
    ];
    const what: Range = [
      ['', 'low', 'high'],
      ['k', 2, 3],
      ['p', 1, 2],
      ['to', 30, 50],
    ];
    const spill = cases(block, null, null, null, null, what, []);
    const high: Range = [
      ['density', 'EXP(-x/k)*x^p'],
      ['from', 0],
      ['to', 50],
      ['k', 3],
      ['p', 2],
    ];
    expect(column(spill, 1)).toEqual(draw(high, null, [[40]], SEED, LABEL, []));
  });

  it('of rows first to last is a part of the whole [law]', () => {
    const whole = table(PRESSES);
    expect(table(PRESSES, DENSITY, LIMITS, GIVENS, [[51, 60]])).toEqual([
      whole[0],
      ...whole.slice(51, 61),
    ]);
  });

  it('drops blank rows and columns of the table of cases [law]', () => {
    const padded = [...PRESSES.map((row) => [...row, null]), [0, 0, 0, 0, 0]];
    expect(table(padded)).toEqual(table(PRESSES));
  });

  const FORM =
    'give a heading row with the name of each case, then a row of a name and its values.';
  const refused: readonly (readonly [string, () => unknown, string])[] = [
    ['no table of cases', () => table(null), `cases (argument 6): they are missing; ${FORM}`],
    [
      'a heading alone',
      () => table([['presses', 'two']]),
      `cases (argument 6): 1 row and 2 columns; ${FORM}`,
    ],
    [
      'names without values',
      () => table([['presses'], ['m']]),
      `cases (argument 6): 2 rows and 1 column; ${FORM}`,
    ],
    [
      'no case',
      () =>
        table([
          ['presses', null],
          ['m', null],
        ]),
      `cases (argument 6): there is no case; ${FORM}`,
    ],
    [
      'a name that is not known',
      () =>
        table([
          ['presses', 'two'],
          ['m', 4],
          ['sd', 2],
        ]),
      'cases (argument 6), row 3: "sd" is no given and no end of the limits; use one of: m, s, from, to.',
    ],
    [
      'a number for a name',
      () =>
        table([
          ['presses', 'two'],
          [7, 4],
        ]),
      'cases (argument 6), row 2: 7 is not a name; write the name of a given, from or to before the values.',
    ],
    [
      'a name that stands twice',
      () =>
        table([
          ['presses', 'two'],
          ['m', 4],
          ['M', 5],
        ]),
      'cases (argument 6), row 3: "M" stands twice; keep one of the two.',
    ],
    [
      'a case that stands twice',
      () =>
        table([
          ['presses', 'two', 'Two'],
          ['m', 4, 5],
        ]),
      'cases (argument 6), column 3: "Two" stands twice; keep one of the two.',
    ],
    [
      'a case without a name',
      () =>
        table([
          ['presses', 'two', 0],
          ['m', 4, 5],
        ]),
      'cases (argument 6), column 3: the case has no name; write a text or a number other than 0 above its values.',
    ],
    [
      'a text for a value',
      () =>
        table([
          ['presses', 'two', 'three'],
          ['m', 4, 'five'],
        ]),
      'cases (argument 6), column 3 "three", row 2, "m": "five" is not a number; give a number.',
    ],
    [
      'the variable among the names',
      () =>
        table([
          ['presses', 'two'],
          ['x', 4],
        ]),
      'cases (argument 6), column 2 "two", row 2, "x": it is the name of the variable; rename the given, or the variable in limits.',
    ],
    [
      'a list among the names',
      () =>
        table(
          [
            ['presses', 'two'],
            ['obs', 4],
          ],
          [['EXP(-SUM((x-obs)^2))']],
          LIMITS,
          [[['obs'], [3], [5]]],
        ),
      'cases (argument 6), column 2 "two", row 2, "obs": it is the name of a list or a function; give other values to constants only.',
    ],
    [
      'a given called from',
      () =>
        table(
          [
            ['presses', 'two'],
            ['from', 4],
          ],
          [['EXP(-x/from)']],
          LIMITS,
          [[['from', 3]]],
        ),
      'cases (argument 6), row 2: "from" is an end of the limits and the name of a given; rename the given.',
    ],
    [
      'ends in the wrong order',
      () =>
        table([
          ['presses', 'two'],
          ['from', 13],
        ]),
      'cases (argument 6), column 2 "two", limits (argument 2): from (13) is not below to (12); give from first and a larger to.',
    ],
    [
      'an end that is a word',
      () =>
        table([
          ['presses', 'two'],
          ['to', 'never'],
        ]),
      'cases (argument 6), column 2 "two", row 2, to: "never" is neither a number nor the name of a given; give a number, or the word unbounded.',
    ],
    [
      'a table with nothing left of it',
      () =>
        table(
          [
            ['presses', 'two'],
            ['to', -1],
          ],
          [
            [0, 1],
            [2, 1],
          ],
          null,
        ),
      'cases (argument 6), column 2 "two", limits (argument 2): the table has no area between "unbounded" and -1; give limits that meet its points, which go from 0 to 2.',
    ],
    [
      'a case that cannot be proved',
      () =>
        table([
          ['presses', 'two', 'none'],
          ['s', 1, 0],
        ]),
      'cases (argument 6), column 3 "none", density: it is undefined from x = 0 to x = 12, where it divides by zero; keep the limits where it is defined, or give it a height there with IF.',
    ],
    [
      'two labels',
      () => cases(DENSITY, LIMITS, [[9]], SEED, [['a', 'b']], PRESSES, GIVENS),
      'label (argument 5): 2 labels; give one label.',
    ],
    [
      'no label',
      () => cases(DENSITY, LIMITS, [[9]], SEED, null, PRESSES, GIVENS),
      'label (argument 5): it is blank; give a text or a number other than 0 (inputs without labels would share their random numbers).',
    ],
    [
      'no seed',
      () => cases(DENSITY, LIMITS, [[9]], null, LABEL, PRESSES, GIVENS),
      'seed (argument 4): it is blank; give a text or a number other than 0, so that the draws can be rebuilt.',
    ],
    [
      'no rows',
      () => table(PRESSES, DENSITY, LIMITS, GIVENS, null),
      'rows (argument 3): they are missing; give a whole number from 1 to 1048575.',
    ],
    [
      'a list of inputs',
      () =>
        table(PRESSES, [
          ['label', 'density'],
          ['a', 'EXP(-x)'],
        ]),
      'density (argument 1): a list of 1 input; give one formula, table or block.',
    ],
    [
      'two columns of heights',
      () =>
        table(PRESSES, [
          ['x', 'a', 'b'],
          [0, 1, 1],
          [1, 1, 1],
        ]),
      'density (argument 1): 2 columns of heights; give x and one column of heights.',
    ],
    [
      'a wrong given',
      () => table(PRESSES, DENSITY, LIMITS, [[['m', 'four', 5]]]),
      'givens (argument 7): 3 columns; give two columns name and value, a table with headings (x, then a named column of heights), or one column with a heading.',
    ],
  ];

  it.each(refused)('with %s says where and what [law]', (_, call, message) => {
    expect(messageOf(call)).toBe(message);
  });

  it('with an error value in the table of cases is that error [law]', () => {
    expect(() => table([...PRESSES, ['m', 1, { error: '#N/A' }, 2]])).toThrow(CellErrorPassed);
  });
});
