import { isPointTable, readPoints, readTable, truncate } from '../../src/density/table';
import { messageOf } from '../message';
import { blanksAs, BLANKS, frozen, read, table } from './shapes';

const TWO = [
  [0, 1],
  [2, 3],
];

describe('readTable', () => {
  it('reads x and heights with and without a heading row [law]', () => {
    const columns = [{ heading: '', heights: [1, 3] }];
    expect(readTable(TWO, 'density')).toEqual({ x: [0, 2], columns, notes: [] });
    expect(readTable([['tonnes', ' harvest '], ...TWO], 'density')).toEqual({
      x: [0, 2],
      columns: [{ heading: 'harvest', heights: [1, 3] }],
      notes: [],
    });
  });

  it('reads several columns of heights, a year as heading too [law]', () => {
    const range = [
      ['x', 'early', 2027, null],
      [0, 1, 2, 5],
      [1, 0, 3, 6],
    ];
    expect(readTable(range, 'density').columns).toEqual([
      { heading: 'early', heights: [1, 0] },
      { heading: '2027', heights: [2, 3] },
      { heading: '', heights: [5, 6] },
    ]);
  });

  it.each(BLANKS.map((blank) => [JSON.stringify(blank), blank] as const))(
    'leaves out blank rows at the end that arrive as %s, with a note [law]',
    (_, blank) => {
      const range = blanksAs([...TWO, [null, null], [null, null], [null, null]], blank);
      expect(readTable(range, 'density')).toEqual({
        x: [0, 2],
        columns: [{ heading: '', heights: [1, 3] }],
        notes: ['3 blank or (0, 0) rows at the end of the table left out'],
      });
      const one = blanksAs([...TWO, [null, null]], blank);
      expect(readTable(one, 'density').notes).toEqual([
        '1 blank or (0, 0) row at the end of the table left out',
      ]);
    },
  );

  it('keeps a last point (0, 0) that makes x rise [law]', () => {
    const rising = [
      [-2, 1],
      [-1, 1],
      [0, 0],
    ];
    expect(readTable(rising, 'density').x).toEqual([-2, -1, 0]);
    expect(readTable([...rising, [0, 0], [null, null]], 'density')).toMatchObject({
      x: [-2, -1, 0],
      notes: ['2 blank or (0, 0) rows at the end of the table left out'],
    });
  });

  it.each(BLANKS.map((blank) => [JSON.stringify(blank), blank] as const))(
    'reads a blank among the points that arrives as %s as 0 [law]',
    (_, blank) => {
      const range = blanksAs(
        [
          ['x', null],
          [null, 4],
          [1, null],
          [2, 6],
        ],
        blank,
      );
      const { x, columns } = readTable(range, 'density');
      expect([x, columns]).toEqual([[0, 1, 2], [{ heading: '', heights: [4, 0, 6] }]]);
    },
  );

  it('takes −0 for 0 everywhere [law]', () => {
    const { x, columns } = readTable(
      [
        [-0, -0],
        [1, 2],
      ],
      'density',
    );
    expect([x[0], columns[0]!.heights[0]].every((value) => Object.is(value, 0))).toBe(true);
  });

  it('reads a jump as a repeated x, also with points between that take no area [law]', () => {
    const range = [
      [0, 1],
      [1, 1],
      [1, 9],
      [1, 3],
      [2, 3],
    ];
    expect(readTable(range, 'density').x).toEqual([0, 1, 1, 1, 2]);
  });

  it.each([
    [[[1, 1]], 'density: a table of 1 point; give two points or more, x and height.'],
    [
      [
        ['x', 'h'],
        [1, 1],
      ],
      'density: a table of 1 point; give two points or more, x and height.',
    ],
    [
      [
        [0, 1],
        [2, 1],
        [1, 1],
      ],
      'density, row 3: x falls from 2 to 1; order the points so that x never falls.',
    ],
    [
      [
        ['x', 'h'],
        [0, 1],
        [2, 1],
        [1, 1],
      ],
      'density, row 4: x falls from 2 to 1; order the points so that x never falls.',
    ],
    [
      [
        [0, 1],
        [null, null],
        [1, -0.5],
      ],
      'density, row 3, column 2: the height -0.5 is negative; give heights of 0 or more.',
    ],
    [
      [
        [0, 1],
        ['two', 1],
      ],
      'density, row 2, x: "two" is not a number; give a number.',
    ],
    [
      [
        [0, 1],
        [2, 'much'],
      ],
      'density, row 2, column 2: "much" is not a number; give a number.',
    ],
    [
      [
        [0, 1],
        [2, true],
      ],
      'density, row 2, column 2: TRUE is not a number; give a number.',
    ],
    [
      [
        [null, 'h'],
        [2, 1],
      ],
      'density, row 1, column 2: "h" is not a number; give a number.',
    ],
    [
      [
        [0, 0],
        [2, 0],
        [3, 0],
      ],
      'density, column 2: there is no area under the points; give some height above 0 over a stretch of x.',
    ],
    [
      [
        [1, 0],
        [1, 5],
        [1, 5],
      ],
      'density, column 2: there is no area under the points; give some height above 0 over a stretch of x.',
    ],
    [
      [
        ['x', 'a', 'b'],
        [0, 1, 0],
        [2, 1, 0],
      ],
      'density, column 3: there is no area under the points; give some height above 0 over a stretch of x.',
    ],
  ])('refuses %j [law]', (range, message) => {
    expect(messageOf(() => readTable(range, 'density'))).toBe(message);
  });

  it('does not write into what it reads [law]', () => {
    expect(() => readTable(frozen([['x', 'h'], ...TWO, [null, null]]), 'density')).not.toThrow();
  });

  it('reads 100,000 points, and finds the last of them wrong, at once [law]', () => {
    const many = Array.from({ length: 100_000 }, (_, i) => [i, i % 7]);
    const start = performance.now();
    expect(readTable(many, 'density').x).toHaveLength(100_000);
    expect(messageOf(() => readTable([...many, [5, 1]], 'density'))).toBe(
      'density, row 100001: x falls from 99999 to 5; order the points so that x never falls.',
    );
    // 200,000 rows read; ten times what a slow machine takes.
    expect(performance.now() - start).toBeLessThan(3000);
  });
});

describe('isPointTable', () => {
  it('is true for two columns or more with numbers in the first [law]', () => {
    expect(isPointTable(TWO)).toBe(true);
    expect(isPointTable([['x', 'h'], ...TWO])).toBe(true);
    expect(isPointTable([[null, null], ['x', 'h'], ...TWO])).toBe(true);
    expect(isPointTable([[1], [2]])).toBe(false);
    expect(isPointTable([['density', 'x']])).toBe(false);
  });
});

describe('readPoints', () => {
  it('reads heights of any sign where the caller allows them [law]', () => {
    const points = readPoints(
      [
        ['x', 'f'],
        [0, -1],
        [1, 2],
      ],
      'givens',
      true,
      Number,
    );
    expect(points.columns).toEqual([{ heading: 'f', heights: [-1, 2] }]);
  });
});

describe('truncate', () => {
  const x = [0, 2, 2, 4];
  const heights = [0, 2, 1, 1];

  it('keeps the part of every line that lies within the limits [law]', () => {
    expect(truncate(x, heights, { from: 1, to: 3 }, 'limits')).toEqual({
      x: [1, 2, 2, 3],
      heights: [1, 2, 1, 1],
    });
    expect(truncate(x, heights, { from: -5, to: Infinity }, 'limits')).toEqual({
      x: [0, 2, 2, 4],
      heights: [0, 2, 1, 1],
    });
  });

  it('keeps the heights at its own points exactly [law]', () => {
    const cut = truncate([0, 0.1, 0.3], [0.1, 0.7, 0.2], { from: 0.1, to: 0.3 }, 'limits');
    expect(cut).toEqual({ x: [0.1, 0.3], heights: [0.7, 0.2] });
  });

  it('refuses limits without any area of the table [law]', () => {
    const flat = [0, 0, 1, 1];
    expect(messageOf(() => truncate(x, flat, { from: 0, to: 2 }, 'limits'))).toBe(
      'limits: the table has no area between 0 and 2; give limits that meet its points, which go from 0 to 4.',
    );
    expect(messageOf(() => truncate(x, heights, { from: 7, to: 9 }, 'limits'))).toBe(
      'limits: the table has no area between 7 and 9; give limits that meet its points, which go from 0 to 4.',
    );
  });
});

describe('a table as shape', () => {
  it('has its own ends as limits, and given limits only cut it [law]', () => {
    expect(table(TWO).limits).toEqual({ from: 0, to: 2 });
    expect(table(TWO, [[-4, 1]]).limits).toEqual({ from: 0, to: 1 });
    expect(table(TWO, [['unbounded', 'unbounded']]).limits).toEqual({ from: 0, to: 2 });
    expect(table(TWO, [[1], [9]]).polyline).toEqual({ x: [1, 2], heights: [2, 3] });
  });

  it('is one shape per column of heights [law]', () => {
    const { shapes } = read([
      ['x', 'a', 'b'],
      [0, 1, 2],
      [1, 1, 0],
    ]);
    expect(shapes).toMatchObject([
      { kind: 'table', heading: 'a' },
      { kind: 'table', heading: 'b' },
    ]);
  });

  it('carries the notes of its reading and of the givens [law]', () => {
    expect(read([...TWO, [null, null]]).notes).toEqual([
      '1 blank or (0, 0) row at the end of the table left out',
    ]);
  });
});
