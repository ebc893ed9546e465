/** Shape lists: one input a line, one column each. */
import type { Cell, Range } from '../../src/index';
import { acceptance, CellErrorPassed, draw, envelope, profile } from '../../src/index';
import { messageOf } from '../message';

const HEADINGS = ['label', 'density', 'from', 'to', 'm', 's'];
const LINES: Cell[][] = [
  ['downtime', 'EXP(-0.5*((x-m)/s)^2)', 0, 12, 4, 1.3],
  ['harvest', 'x*EXP(-x/m)', 0, 100, 20, null],
  ['presses', 'IF(x<3,1,2)', 1, 5, null, null],
];
const LIST: Range = [HEADINGS, ...LINES];
const ROWS: Range = [[50]];
const SEED: Range = [['plan-2027']];

/** The line as a block of two columns. */
function block(line: readonly Cell[]): Range {
  return HEADINGS.map((name, j): Cell[] => [name, line[j]!]);
}

function columns(spill: Range): Cell[][] {
  return spill[0]!.map((_, j) => spill.map((row) => row[j]!));
}

const place = (line: number, label: string): string =>
  `density (argument 1), line ${line} "${label}"`;
const withLine = (...cells: Cell[]): Range => [HEADINGS, ...LINES, cells];

describe('DRAW of a shape list', () => {
  test('each column is that of its line as a block [law]', () => {
    const spill = columns(draw(LIST, null, ROWS, SEED, null, []));
    const single = LINES.map((line) => draw(block(line), null, ROWS, SEED, null, []));
    expect(spill).toEqual(single.map((column) => column.map(([value]) => value)));
  });

  test('headings in any order and case, blank lines and columns between change nothing [law]', () => {
    const order = [3, 1, 5, 0, 2, 4];
    const shuffled = LIST.map((row) => [...order.map((j) => row[j]!), null]);
    const spaced: Range = [
      shuffled[0]!.map((cell) => (cell === null ? null : ` ${(cell as string).toUpperCase()} `)),
      shuffled[1]!,
      shuffled[1]!.map(() => 0),
      ...shuffled.slice(2),
      shuffled[1]!.map(() => null),
    ];
    expect(draw(spaced, null, ROWS, SEED, null, [])).toEqual(
      draw(LIST, null, ROWS, SEED, null, []),
    );
  });

  test('a blank counts as 0, as some hosts hand it over [law]', () => {
    const zeros = LIST.map((row) => row.map((cell) => cell ?? 0));
    expect(draw(zeros, null, ROWS, SEED, null, [])).toEqual(draw(LIST, null, ROWS, SEED, null, []));
  });

  test('a list without limits is drawn over the whole line, a limit may be unbounded or name a given [law]', () => {
    const list: Range = [
      ['label', 'density', 'from', 'to', 'most'],
      ['a', 'EXP(-0.5*x^2)', null, null, 1],
      ['b', 'EXP(-x)', 0, 'unbounded', 1],
      ['c', 'EXP(-x)', 0, 'most', 2],
    ];
    const [a, b, c] = columns(draw(list, null, [[200]], SEED, null, [])) as number[][];
    expect([Math.min(...a!) < 0, Math.min(...b!) >= 0, Math.max(...c!) <= 2]).toEqual([
      true,
      true,
      true,
    ]);
    expect(Math.max(...b!)).toBeGreaterThan(2);
  });

  test('arguments win over the list, and a label goes before its labels [law]', () => {
    const list: Range = [
      ['label', 'density', 'from', 'to', 'rows', 'seed'],
      ['a', 'EXP(-x)', 0, 9, 7, 'own'],
    ];
    expect(draw(list, null, null, null, null, [])).toHaveLength(7);
    const wanted = draw([['EXP(-x)']], [[0, 1]], [[3]], [['other']], [['plan a']], []);
    expect(draw(list, [[0, 1]], [[3]], [['other']], [['plan']], [])).toEqual(wanted);
  });

  test('each line may have its own seed, the rows may stand in any line [law]', () => {
    const list: Range = [
      ['label', 'density', 'from', 'to', 'rows', 'seed'],
      ['a', 'EXP(-x)', 0, 9, null, 'one'],
      ['b', 'EXP(-x)', 0, 9, 5, 'two'],
    ];
    const single = (seed: string, label: string): Range =>
      draw([['EXP(-x)']], [[0, 9]], [[5]], [[seed]], [[label]], []);
    expect(columns(draw(list, null, null, null, null, []))).toEqual([
      single('one', 'a').map(([value]) => value),
      single('two', 'b').map(([value]) => value),
    ]);
  });

  test('tables and lists among the givens serve every line [law]', () => {
    const table: Range = [
      ['day', 'base'],
      [0, 1],
      [10, 3],
    ];
    const list: Range = [
      ['label', 'density', 'from', 'to', 'shift'],
      ['a', 'base(x)', 0, 10, 0],
      ['b', 'base(x-shift)', 0, 20, 5],
    ];
    const [a, b] = columns(draw(list, null, ROWS, SEED, null, [table])) as number[][];
    expect(Math.max(...a!)).toBeLessThanOrEqual(10);
    expect([Math.min(...b!) >= 5, Math.max(...b!) <= 15]).toEqual([true, true]);
  });

  test('changes none of its arguments [law]', () => {
    const freeze = <T>(value: T): T => {
      if (typeof value === 'object' && value !== null) Object.values(value).forEach(freeze);
      return Object.freeze(value);
    };
    const list = freeze(structuredClone(LIST));
    const given = freeze([['obs'], [3], [4]]);
    expect(draw(list, null, ROWS, SEED, null, [given])).toHaveLength(50);
    expect(list).toEqual(LIST);
  });

  test('200 lines are 200 columns [law]', () => {
    const lines = Array.from({ length: 200 }, (_, i): Cell[] => [
      `press ${i}`,
      'x*EXP(-x/m)',
      0,
      50,
      4 + i / 50,
      0,
    ]);
    const spill = draw([HEADINGS, ...lines], null, [[20]], SEED, null, []);
    expect([spill.length, new Set(spill.map((row) => row.length))]).toEqual([20, new Set([200])]);
  });
});

describe('other functions of a shape list', () => {
  test('ACCEPTANCE has one column a line [law]', () => {
    const items = acceptance(LIST, null, ROWS, SEED, null, []);
    const line = (item: string): Range[number] | undefined => items.find(([name]) => name === item);
    expect(line('label')).toEqual(['label', 'downtime', 'harvest', 'presses']);
    expect(line('x to')).toEqual(['x to', 12, 100, 5]);
    expect(line('given m')).toEqual(['given m', 4, 20, 0]);
    const single = acceptance(block(LINES[1]!), null, ROWS, SEED, null, []);
    expect(items.map((row) => [row[0], row[2]])).toEqual(single);
  });

  test('ENVELOPE and PROFILE take a list of one line and refuse more [law]', () => {
    expect(envelope([HEADINGS, LINES[0]!], null, [])).toEqual(envelope(block(LINES[0]!), null, []));
    const message =
      'density (argument 1): a list of 3 inputs; give one input: the headings and its line.';
    expect(messageOf(() => envelope(LIST, null, []))).toBe(message);
    expect(messageOf(() => profile(LIST, null, null, []))).toBe(message);
  });
});

describe('a mistake in a shape list names its line', () => {
  test.each([
    [
      'a formula that cannot be read',
      ['tank', 'EXP(-x', 0, 9, 1, 1],
      `${place(4, 'tank')}, formula, character 4: "(" is never closed; add ")".`,
    ],
    [
      'an unknown name',
      ['tank', 'EXP(-q*x)', 0, 9, 1, 1],
      `${place(4, 'tank')}, formula, character 6: "q" is not a known name; add it to the givens, or use one of: x, m, s.`,
    ],
    [
      'no formula',
      ['tank', 5, 0, 9, 1, 1],
      `${place(4, 'tank')}, density: 5 is not a formula; give a formula as text, such as EXP(-x).`,
    ],
    [
      'a blank formula',
      ['tank', null, 0, 9, 1, 1],
      `${place(4, 'tank')}, density: a blank is not a formula; give a formula as text, such as EXP(-x).`,
    ],
    [
      'a negative density',
      ['tank', 'x-5', 0, 9, 1, 1],
      `${place(4, 'tank')}, density: it is negative at x = 0 (-5); heights must be 0 or more; use MAX(0, …) if that is meant.`,
    ],
    [
      'limits the wrong way round',
      ['tank', 'EXP(-x)', 9, 1, 1, 1],
      `${place(4, 'tank')}: from (9) is not below to (1); give from first and a larger to.`,
    ],
    [
      'a limit that is a text',
      ['tank', 'EXP(-x)', 'low', 1, 1, 1],
      `${place(4, 'tank')}, from: "low" is neither a number nor the name of a given; give a number, or the word unbounded.`,
    ],
    [
      'a given that is a text',
      ['tank', 'EXP(-x)', 0, 1, 'four', 1],
      `${place(4, 'tank')}, "m": "four" is not a number; give a number.`,
    ],
    [
      'no label',
      [null, 'EXP(-x)', 0, 1, 1, 1],
      'density (argument 1), line 4: it has no label; give every line a label of its own.',
    ],
    [
      'a label that stands twice',
      ['Harvest', 'EXP(-x)', 0, 1, 1, 1],
      `${place(4, 'Harvest')}, label: "Harvest" stands twice; give each column its own label; equal labels draw equal numbers.`,
    ],
  ] as [string, Cell[], string][])('%s [law]', (_, cells, message) => {
    expect(messageOf(() => draw(withLine(...cells), null, ROWS, SEED, null, []))).toBe(message);
  });

  const small = (headings: Cell[], ...lines: Cell[][]): Range => [
    ['label', 'density', ...headings],
    ...lines,
  ];

  test.each([
    [
      'rows that differ',
      small(['to', 'from', 'rows'], ['a', '1', 1, 0, 100], ['b', '1', 1, 0, 200]),
      'density (argument 1), line 2 "b", rows: 200 where an earlier line says 100; give all lines the same number of rows, or give rows as an argument.',
    ],
    [
      'a missing column to',
      small(['from', 'rows'], ['a', '1', 3, 100]),
      'density (argument 1), line 1 "a": the list has no column "to"; add a column to and its value.',
    ],
    [
      'a heading to that is misspelt beside a from of 0',
      small(['from', 'too', 'rows'], ['a', 'EXP(-(x^2))', 0, 3, 100]),
      'density (argument 1), line 1 "a": the list has no column "to"; add a column to and its value.',
    ],
    [
      'a step',
      small(['from', 'to', 'step', 'rows'], ['a', '1', 0, 9, -1, 100]),
      'density (argument 1), line 1 "a", step: -1 is negative; give the distance of neighbouring values, such as 1, or 0 for a continuous quantity.',
    ],
    [
      'a method there is not',
      small(['from', 'to', 'method', 'rows'], ['a', '1', 0, 9, 7, 100]),
      'density (argument 1), line 1 "a", method: there is no method 7; use 0, the only one so far.',
    ],
    [
      'a word that stands twice',
      small(['from', 'to', 'From'], ['a', '1', 0, 9, 1]),
      'density (argument 1), column 5: "from" stands twice; keep one of the two.',
    ],
    [
      'a given that stands twice',
      small(['to', 'from', 'm', 'M'], ['a', '1', 1, 0, 9, 1]),
      'density (argument 1), line 1 "a", "M": it is the same name as "m"; keep one of the two.',
    ],
    [
      'a heading that is a number',
      small([7], ['a', '1', 0]),
      'density (argument 1), column 3: 7 is not a heading; give a word such as density or from, or the name of a given.',
    ],
    [
      'no lines',
      small(['from']),
      'density (argument 1): a list without lines; give one line or more below label and density.',
    ],
    [
      'rows nowhere',
      small(['to', 'from'], ['a', '1', 1, 0]),
      'rows (argument 3): they are missing; give a whole number from 1 to 1048575.',
    ],
    [
      'a seed nowhere',
      small(['to', 'from', 'rows'], ['a', '1', 1, 0, 5]),
      'seed (argument 4): it is blank; give a text or a number other than 0, so that the draws can be rebuilt.',
    ],
  ] as [string, Range, string][])('%s [law]', (_, list, message) => {
    const seed = message.startsWith('seed') ? null : SEED;
    expect(messageOf(() => draw(list, null, null, seed, null, []))).toBe(message);
  });

  test('two labels as an argument [law]', () => {
    expect(messageOf(() => draw(LIST, null, ROWS, SEED, [['a', 'b']], []))).toBe(
      'label (argument 5): 2 labels for a list of 3 inputs; give one label or none: the lines of the list have their own.',
    );
  });

  test('an error cell passes as that error [law]', () => {
    const list = withLine('tank', 'EXP(-x)', { error: '#N/A' }, 1, 1, 1);
    expect(() => draw(list, null, ROWS, SEED, null, [])).toThrow(CellErrorPassed);
  });
});
