import type { Cell, Range } from '../../src/density/cells';
import { Givens, readGivens } from '../../src/density/givens';
import type { List, PointFunction } from '../../src/formula/given';
import { messageOf } from '../message';
import { blanksAs, BLANKS } from './shapes';

const named = (...ranges: readonly Range[]): Record<string, unknown> =>
  Object.fromEntries(readGivens(ranges, 6).values.map(({ name, value }) => [name, value]));
const refusal = (...ranges: readonly Range[]): string =>
  messageOf(() => {
    const givens = new Givens(['x']);
    for (const value of readGivens(ranges, 6).values) givens.add(value);
  });
const blanks = BLANKS.map((blank) => [JSON.stringify(blank), blank] as const);

describe('constants', () => {
  it('are rows of a name and a number, below a heading of texts if there is one [law]', () => {
    const rows = [
      ['m', 4],
      ['$B$2', -1.5],
      ['Sheet1!C3', 1e300],
    ];
    expect(named(rows)).toEqual({ m: 4, $B$2: -1.5, 'Sheet1!C3': 1e300 });
    expect(named([['name', 'value'], ...rows])).toEqual(named(rows));
  });

  it.each(blanks)(
    'skip rows with a blank name, and take a blank value for 0: %s [law]',
    (_, blank) => {
      const rows: Range = [
        [null, null],
        ['m', 4],
        [null, 7],
        ['s', null],
      ];
      const values = readGivens([blanksAs(rows, blank)], 6).values;
      const givens = new Givens(['x']);
      for (const value of values) givens.add(value);
      expect([...givens.map]).toEqual([
        ['m', 4],
        ['s', 0],
      ]);
    },
  );

  it('may bear any name that is not taken [law]', () => {
    const names = ['constructor', '__proto__', 'toString', 'c', 'r', 'x1', 'µ', 'a b'];
    const givens = new Givens(['x']);
    names.forEach((name, i) => givens.add({ name, value: i + 1, where: 'givens' }));
    names.forEach((name, i) => expect(givens.find(name)).toBe(i + 1));
    expect(givens.find('valueOf')).toBeUndefined();
    expect(givens.find(' CONSTRUCTOR ')).toBe(1);
  });

  const at = 'givens (argument 6)';
  const kinds =
    'give two columns name and value, a table with headings (x, then a named column of heights), or one column with a heading.';
  it.each([
    [[['m', 4, 5]], `${at}: 3 columns; ${kinds}`],
    [[[4, 'm']], `${at}, row 1: 4 is not a name; ${kinds}`],
    [
      [
        ['m', 4],
        [5, 6],
      ],
      `${at}, row 2: 5 is not a name; ${kinds}`,
    ],
    [
      [
        ['m', 4],
        ['s', 'much'],
      ],
      `${at}, "s": "much" is not a number; give a number.`,
    ],
    [[['m', true]], `${at}, "m": TRUE is not a number; give a number.`],
    [
      [
        ['m', 4],
        ['M ', 5],
      ],
      `${at}, "M": it is the same name as "m"; keep one of the two.`,
    ],
    [
      [
        ['B2', 4],
        ['$b$2', 5],
      ],
      `${at}, "$b$2": it is the same name as "B2"; keep one of the two.`,
    ],
    [
      [
        ["'Our sheet'!B2", 4],
        ['our sheet!$B$2', 5],
      ],
      `${at}, "our sheet!$B$2": it is the same name as "'Our sheet'!B2"; keep one of the two.`,
    ],
    [
      [['X', 4]],
      `${at}, "X": it is the name of the variable; rename the given, or the variable in limits.`,
    ],
    [[['exp', 4]], `${at}, "exp": it is the name of a formula function; rename the given.`],
    [[['method', 7]], `${at}, "method": there is no method 7; use 0, the only one so far.`],
    [
      [
        ['q'.repeat(99), 'z'],
        ['q'.repeat(99), 'z'],
      ],
      `${at}, "${'q'.repeat(40)}…": "z" is not a number; give a number.`,
    ],
  ])('%j are refused [law]', (range, message) => {
    expect(refusal(range as Range)).toBe(message);
  });

  it('of a second range are told by its place [law]', () => {
    expect(refusal([['m', 1]], [['m', 2]])).toBe(
      'givens (argument 7), "m": it is given twice; keep one of the two.',
    );
  });

  it('may be 100,000 [law]', () => {
    const rows = Array.from({ length: 100_000 }, (_, i) => [`n${i}z`, i]);
    expect(readGivens([rows], 6).values).toHaveLength(100_000);
  });
});

describe('lists', () => {
  const listOf = (range: Range): readonly number[] => (named(range).obs as List).values;

  it('are one column, a heading and numbers [law]', () => {
    expect(listOf([[' obs '], [1], [2.5], [-3]])).toEqual([1, 2.5, -3]);
  });

  it.each(blanks)('take a blank that arrives as %s for 0 [law]', (_, blank) => {
    expect(listOf(blanksAs([['obs'], [1], [null], [3]], blank))).toEqual([1, 0, 3]);
  });

  it('with equal values have equal fingerprints, others do not [law]', () => {
    const print = (...values: Cell[]): string =>
      (named([['obs'], ...values.map((v) => [v])]).obs as List).fingerprint;
    expect(print(1, 2)).toBe(print(1, 2));
    expect(print(1, 2)).not.toBe(print(2, 1));
    expect(print(-0)).toBe(print(0));
  });

  it.each([
    [
      [[1], [2]],
      `givens (argument 6): a column that begins with 1; write the list's name above its values.`,
    ],
    [
      [['obs']],
      'givens (argument 6), "obs": a list without values; give numbers below the heading.',
    ],
    [
      [['obs'], [1], ['two']],
      'givens (argument 6), "obs", row 3: "two" is not a number; give a number.',
    ],
  ])('%j are refused [law]', (range, message) => {
    expect(refusal(range as Range)).toBe(message);
  });

  it('of 20,000 values are read and of 20,001 refused [law]', () => {
    const list = (n: number): Range => [['obs'], ...Array.from({ length: n }, (_, i) => [i])];
    expect(listOf(list(20_000))).toHaveLength(20_000);
    expect(refusal(list(20_001))).toBe(
      'givens (argument 6), "obs": a list of 20001 values; give at most 20000.',
    );
  });
});

describe('function tables', () => {
  const TABLE: Range = [
    ['x', 'base', 'late'],
    [0, 1, 5],
    [2, 3, -5],
    [2, 4, 0],
    [4, 0, 1],
  ];
  const functionOf = (range: Range, name: string): ((x: number) => number) => {
    const { operation } = named(range)[name] as PointFunction;
    return (x) => operation.point(x, x, x);
  };

  it('are straight lines between points, jumping where x repeats, 0 outside [law]', () => {
    const base = functionOf(TABLE, 'base');
    expect([-1, 0, 1, 2, 3, 4, 5].map(base)).toEqual([0, 1, 2, 4, 2, 0, 0]);
    expect([0, 1, 2, 4].map(functionOf(TABLE, 'late'))).toEqual([5, 0, 0, 1]);
  });

  it('are told from constants by numbers in the first column [law]', () => {
    expect(Object.keys(named(TABLE))).toEqual(['base', 'late']);
    expect(
      Object.keys(
        named([
          ['name', 'value'],
          ['m', 1],
        ]),
      ),
    ).toEqual(['m']);
  });

  it.each(blanks)(
    'leave out blank rows at the end that arrive as %s, with a note [law]',
    (_, blank) => {
      const { values, notes } = readGivens([blanksAs([...TABLE, [null, null, null]], blank)], 6);
      expect(values).toHaveLength(2);
      expect(notes).toEqual(['1 blank or (0, 0) row at the end of the table left out']);
    },
  );

  it.each([
    [
      [
        ['x', 'base', null],
        [0, 1, 2],
        [1, 1, 2],
      ],
      "givens (argument 6), column 3: it has no heading; write the function's name above its heights.",
    ],
    [
      [
        ['x', 'base'],
        [1, 1],
        [1, 2],
      ],
      'givens (argument 6): all points stand at x = 1; give points with two different x or more.',
    ],
    [
      [
        ['x', 'base'],
        [1, 1],
        [0, 2],
        [5, 2],
      ],
      'givens (argument 6), row 3: x falls from 1 to 0; order the points so that x never falls.',
    ],
    [
      [
        ['x', 'base'],
        [1, 1],
        [2, 'a'],
      ],
      'givens (argument 6), row 3, column 2: "a" is not a number; give a number.',
    ],
    [
      [
        ['x', 'base'],
        [1, 1],
        [2, 1e200],
      ],
      'givens (argument 6), row 3, column 2: 1e+200 is too large; give numbers between -1e+150 and 1e+150.',
    ],
    [
      [
        ['x', 'exp'],
        [1, 1],
        [2, 1],
      ],
      'givens (argument 6), "exp": it is the name of a formula function; rename the given.',
    ],
  ])('%j are refused [law]', (range, message) => {
    expect(refusal(range as Range)).toBe(message);
  });
});

describe('ranges of blanks', () => {
  it.each(blanks)('%s are no givens at all [law]', (_, blank) => {
    expect(readGivens([[[blank]], [[blank, blank]], [[blank], [blank]]], 6).values).toEqual([]);
  });
});
