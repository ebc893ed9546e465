import { CellErrorPassed } from '../../src/errors';
import type { Range } from '../../src/density/cells';
import { messageOf } from '../message';
import { blanksAs, BLANKS, formula, frozen, givensOf, read } from './shapes';

const EXP = [['EXP(-x)']];
const sourcesOf = (...args: Parameters<typeof read>) =>
  formula(...args).sources.map(({ text, where }) => [text, where]);
const blanks = BLANKS.map((blank) => [JSON.stringify(blank), blank] as const);

describe('a formula as density', () => {
  it('is one text, or a column of texts whose product is meant [law]', () => {
    expect(sourcesOf(EXP)).toEqual([['EXP(-x)', 'Formula']]);
    expect(sourcesOf([['EXP(-x)'], ['x<3']])).toEqual([
      ['EXP(-x)', 'Formula, line 1'],
      ['x<3', 'Formula, line 2'],
    ]);
  });

  it.each(blanks)('skips lines that are blank and arrive as %s [law]', (_, blank) => {
    expect(sourcesOf(blanksAs([['EXP(-x)'], [null], ['x<3'], [null]], blank))).toEqual([
      ['EXP(-x)', 'Formula, line 1'],
      ['x<3', 'Formula, line 3'],
    ]);
  });

  it.each(blanks)('is refused where nothing stands in it: %s [law]', (_, blank) => {
    const message =
      'density (argument 1): it is blank; give a formula such as EXP(-x), a table of points, or a block with a row density.';
    for (const size of [
      [[null]],
      [[null], [null]],
      [[null, null]],
      [
        [null, null],
        [null, null],
      ],
    ])
      expect(messageOf(() => read(blanksAs(size, blank)))).toBe(message);
    expect(messageOf(() => read(null))).toBe(message);
    expect(messageOf(() => read([]))).toBe(message);
  });

  it.each([
    [[[5]], 'density (argument 1): 5 is not a formula; give a formula as text, such as EXP(-x).'],
    [
      [['x'], [5]],
      'density (argument 1), row 2: 5 is not a formula; give a formula as text, such as EXP(-x).',
    ],
    [
      [[true]],
      'density (argument 1): TRUE is not a formula; give a formula as text, such as EXP(-x).',
    ],
    [
      [['x', 'y', 'z']],
      'density (argument 1): 1 row and 3 columns that begin with "x"; give a formula, a column of formulas, a table of points (x and height), or a block with a row density.',
    ],
    [
      [
        ['density', 'x', 'a note'],
        ['from', 0, null],
      ],
      'density (argument 1): a block of 3 columns; give its two columns, words and values.',
    ],
    [[['x'], ['EXP(']], 'Formula, line 2, character 4: "(" is never closed; add ")".'],
  ])('%j is refused with its place [law]', (density, message) => {
    expect(messageOf(() => read(density, [[0, 1]]))).toBe(message);
  });

  it('is unbounded where no limits are given [law]', () => {
    for (const none of [null, [], [[null]], [['']], [[0]]])
      expect(formula(EXP, none).limits).toEqual({ from: -Infinity, to: Infinity });
  });
});

describe('limits', () => {
  it.each([
    [[[0, 3]], 'x', 0, 3],
    [[[0], [3]], 'x', 0, 3],
    [[[null, 3]], 'x', 0, 3],
    [[[-3, '']], 'x', -3, 0],
    [[['t', 0, 3]], 't', 0, 3],
    [[[' t ', 0, 3, null]], 't', 0, 3],
    [[['t', 0, 3, 0]], 't', 0, 3],
    [
      [
        ['name', 'from', 'to'],
        ['x1', 1, 2],
      ],
      'x1',
      1,
      2,
    ],
    [
      [
        ['variable', ' FROM ', 'to', 'step'],
        ['c', 1, 2, 0],
        [null, null, null, null],
      ],
      'c',
      1,
      2,
    ],
    [[['sum', 0, 3]], 'sum', 0, 3],
    [[[0, 'unbounded']], 'x', 0, Infinity],
    [[[' Unbounded', 4]], 'x', -Infinity, 4],
    [[['unbounded', 'UNBOUNDED']], 'x', -Infinity, Infinity],
    [[['lowest', 'Highest']], 'x', -1, 7],
    [[['r', 'lowest', '$B$2']], 'r', -1, 9],
    [[[-1e150, 1e150]], 'x', -1e150, 1e150],
  ] as const)('%j reads as %s from %d to %d [law]', (limits, variable, from, to) => {
    const givens = [
      ['lowest', -1],
      ['highest', 7],
      ['B2', 9],
    ];
    const shape = formula([[`EXP(-${variable})`]], limits, givens);
    expect([shape.variable, shape.limits]).toEqual([variable, { from, to }]);
  });

  it.each([
    [[[1, 1]], 'from (1) is not below to (1); give from first and a larger to.', ''],
    [[[2, 1]], 'from (2) is not below to (1); give from first and a larger to.', ''],
    [[[0, 0]], 'from (0) is not below to (0); give from first and a larger to.', ''],
    [[[null, null]], 'from (0) is not below to (0); give from first and a larger to.', ''],
    [[[5]], '1 row and 1 column; give two cells, from and to, or a row name, from, to.', ''],
    [
      [[0, 1, 2, 3, 4]],
      '1 row and 5 columns; give two cells, from and to, or a row name, from, to.',
      '',
    ],
    [
      [[0], [1], [2]],
      '3 rows and 1 column; give two cells, from and to, or a row name, from, to.',
      '',
    ],
    [
      [
        ['name', 'from', 'to'],
        [null, null, null],
      ],
      '2 rows and 3 columns; give two cells, from and to, or a row name, from, to.',
      '',
    ],
    [[[1, 2, 3]], "1 is not a variable's name; give a row name, from, to.", ''],
    [
      [
        ['x', 0, 1],
        ['y', 0, 1],
      ],
      '2 variables; give one: only DRAW, ENVELOPE, ACCEPTANCE, PROPOSALS and EXPECT take several.',
      '',
    ],
    [
      [['x', 0, 9, -1]],
      '-1 is negative; give the distance of neighbouring values, such as 1, or 0 for a continuous quantity.',
      ', step',
    ],
    [[['x', 0, 9, 'a']], '"a" is not a number; give a number.', ', step'],
    [
      [[0, 'high']],
      '"high" is neither a number nor the name of a given; give a number, or the word unbounded.',
      ', to',
    ],
    [
      [['0', 1]],
      '"0" is neither a number nor the name of a given; give a number, or the word unbounded.',
      ', from',
    ],
    [[[true, 2]], 'TRUE is not a number; give a number.', ', from'],
    [[[0, 1e151]], '1e+151 is too far out; give a number between -1e+150 and 1e+150.', ', to'],
    [[[0, 'obs']], '"obs" is the name of a list; give a number or the name of a constant.', ', to'],
    [
      [[0, 'base']],
      '"base" is the name of a function; give a number or the name of a constant.',
      ', to',
    ],
  ] as const)('%j is refused: %s [law]', (limits, text, part) => {
    const list = [['obs'], [1], [2]];
    const points = [
      ['x', 'base'],
      [0, 1],
      [1, 2],
    ];
    expect(messageOf(() => read(EXP, limits as Range, list, points))).toBe(
      `limits (argument 2)${part}: ${text}`,
    );
  });
});

const BLOCK: Range = [
  ['density', 'm*EXP(-x)'],
  ['from', 0],
  ['to', 'm'],
  ['m', 3],
  ['s', 1.3],
];

describe('a shape block', () => {
  it('is read in any order and case, and its other rows are givens [law]', () => {
    const shape = formula(BLOCK);
    expect(shape.limits).toEqual({ from: 0, to: 3 });
    expect(givensOf(BLOCK)).toEqual({ m: 3, s: 1.3 });
    expect(formula([...BLOCK].reverse())).toMatchObject({ limits: { from: 0, to: 3 } });
    expect(
      formula(BLOCK.map(([name, value]) => [` ${(name as string).toUpperCase()} `, value!])),
    ).toEqual({
      ...shape,
      givens: new Map([
        ['M', 3],
        ['S', 1.3],
      ]),
    });
  });

  it('loses to limits that are given explicitly, and adds the givens of the arguments [law]', () => {
    expect(formula(BLOCK, [[1, 2]]).limits).toEqual({ from: 1, to: 2 });
    expect(formula(BLOCK, [['t', 1, 2]]).variable).toBe('t');
    expect(givensOf(BLOCK, null, [['k', 7]])).toEqual({ m: 3, s: 1.3, k: 7 });
  });

  it('may leave its limits out, which are unbounded then [law]', () => {
    const rows = BLOCK.filter(([name]) => name !== 'from' && name !== 'to');
    expect(formula(rows).limits).toEqual({ from: -Infinity, to: Infinity });
  });

  it.each(blanks)('skips rows whose name is blank and arrives as %s [law]', (_, blank) => {
    const rows = blanksAs([...BLOCK, [null, null], [null, 5]], blank);
    expect(formula(rows).givens).toEqual(formula(BLOCK).givens);
    const blankValues = blanksAs([...BLOCK, ['step', null], ['k', null], ['method', null]], blank);
    expect(givensOf(blankValues)).toEqual({ m: 3, s: 1.3, k: 0 });
  });

  it.each([
    [['density', 'x'], 'row 6: "density" stands twice; keep one of the two.', ', '],
    [['From', 1], 'row 6: "from" stands twice; keep one of the two.', ', '],
    [
      [7, 1],
      'row 6: 7 is not a name; give a word such as density or from, or the name of a given.',
      ', ',
    ],
    [['M', 1], '"M": it is the same name as "m"; keep one of the two.', ', '],
    [['m', 1], '"m": it is given twice; keep one of the two.', ', '],
    [['unit', 'hours'], '"unit": "hours" is not a number; give a number.', ', '],
    [['flag', true], '"flag": TRUE is not a number; give a number.', ', '],
    [
      ['x', 1],
      '"x": it is the name of the variable; rename the given, or the variable in limits.',
      ', ',
    ],
    [['Sum', 1], '"Sum": it is the name of a formula function; rename the given.', ', '],
    [
      ['step', -2],
      'step: -2 is negative; give the distance of neighbouring values, such as 1, or 0 for a continuous quantity.',
      ', ',
    ],
    [['method', 1], 'method: there is no method 1; use 0, the only one so far.', ', '],
  ] as const)('with a row %j is refused: %s [law]', (row, text, join) => {
    expect(messageOf(() => read([...BLOCK, row] as Range))).toBe(
      `density (argument 1)${join}${text}`,
    );
  });

  it.each([
    ['to', 'the block has no row "to"; add a row to and its value.'],
    ['from', 'the block has no row "from"; add a row from and its value.'],
  ])('without a row %s but with the other is refused [law]', (name, text) => {
    const rows = BLOCK.filter(([word]) => word !== name);
    expect(messageOf(() => read(rows))).toBe(`density (argument 1): ${text}`);
  });

  it('with a blank or a number for its density is refused [law]', () => {
    const withDensity = (cell: null | number): Range => [
      ['density', cell],
      ['from', 0],
      ['to', 1],
    ];
    expect(messageOf(() => read(withDensity(null)))).toBe(
      'density (argument 1), density: a blank is not a formula; give a formula as text, such as EXP(-x).',
    );
    expect(messageOf(() => read(withDensity(5)))).toBe(
      'density (argument 1), density: 5 is not a formula; give a formula as text, such as EXP(-x).',
    );
  });
});

describe('a shape list', () => {
  const LIST: Range = [
    ['label', 'density', 'from', 'to', 'm'],
    ['press', 'EXP(-x/m)', 0, 9, 4],
    ['harvest', 'm+x', 0, 1, 2],
  ];

  it('is one shape a line, each with its own limits and givens [law]', () => {
    const { shapes, lines } = read(LIST);
    expect(shapes).toMatchObject([
      { limits: { from: 0, to: 9 }, givens: new Map([['m', 4]]) },
      { limits: { from: 0, to: 1 }, givens: new Map([['m', 2]]) },
    ]);
    expect(lines!.map(({ where }) => where)).toEqual([
      'density (argument 1), line 1 "press"',
      'density (argument 1), line 2 "harvest"',
    ]);
  });

  it.each(blanks)('skips blank lines and columns that arrive as %s [law]', (_, blank) => {
    const wide = LIST.map((row, i) => [...row, i === 0 ? null : 99]);
    const range = blanksAs([...wide, [null, null, null, null, null, null]], blank);
    expect(read(range).shapes).toHaveLength(2);
    expect(read(range).shapes).toMatchObject([{ givens: new Map([['m', 4]]) }, {}]);
  });

  it('names the line of a mistake [law]', () => {
    expect(messageOf(() => read([...LIST, ['late', 'EXP(-x', 0, 1, 1]]))).toBe(
      'density (argument 1), line 3 "late", formula, character 4: "(" is never closed; add ")".',
    );
    expect(messageOf(() => read([...LIST, ['late', 'x', 3, 1, 1]]))).toBe(
      'density (argument 1), line 3 "late": from (3) is not below to (1); give from first and a larger to.',
    );
    expect(messageOf(() => read([...LIST, ['late', 'x', 0, 1, 'many']]))).toBe(
      'density (argument 1), line 3 "late", "m": "many" is not a number; give a number.',
    );
  });

  it('without lines, or with headings that stand twice, is refused [law]', () => {
    expect(messageOf(() => read([['label', 'density']]))).toBe(
      'density (argument 1): a list without lines; give one line or more below label and density.',
    );
    expect(
      messageOf(() =>
        read([
          ['label', 'density', 'Label'],
          ['a', 'x', 1],
        ]),
      ),
    ).toBe('density (argument 1), column 3: "label" stands twice; keep one of the two.');
    expect(
      messageOf(() =>
        read([
          ['label', 'density', 7],
          ['a', 'x', 1],
        ]),
      ),
    ).toBe(
      'density (argument 1), column 3: 7 is not a heading; give a word such as density or from, or the name of a given.',
    );
  });

  it('is told from a block of two columns by its heading [law]', () => {
    expect(
      read([
        ['label', 'density'],
        ['a', 'EXP(-x)'],
      ]).lines,
    ).toHaveLength(1);
    expect(
      read([
        ['label', 'a'],
        ['density', 'EXP(-x)'],
      ]).lines,
    ).toBeNull();
  });
});

describe('error values', () => {
  const error = { error: '#N/A' };

  it.each([
    ['density', [[error]], null, []],
    [
      'a table',
      [
        [0, 1],
        [1, error],
      ],
      null,
      [],
    ],
    ['a block', [...BLOCK, ['k', error]], null, []],
    ['limits', EXP, [[0, error]], []],
    ['givens', EXP, [[0, 1]], [[['k', error]]]],
    ['a list', EXP, [[0, 1]], [[['obs'], [error]]]],
  ] as const)('in %s are passed on as they are [law]', (_, density, limits, givens) => {
    const call = () => read(density, limits, ...(givens as readonly Range[]));
    expect(call).toThrow(CellErrorPassed);
    expect(messageOf(call)).toBe('#N/A');
  });
});

describe('what is read', () => {
  it('is not written into [law]', () => {
    const given = frozen([
      ['k', 1],
      [null, null],
    ]);
    const list = frozen([['obs'], [1], [2]]);
    expect(() => read(frozen(BLOCK), frozen([[0, 2]]), given, list)).not.toThrow();
    expect(() =>
      read(
        frozen([
          ['label', 'density'],
          ['a', 'EXP(-x)'],
        ]),
      ),
    ).not.toThrow();
  });
});
