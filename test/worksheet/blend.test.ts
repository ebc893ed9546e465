import type { Range } from '../../src/index';
import { below, blend, draw, fromBins } from '../../src/index';

const TRIANGLE: Range = [
  [0, 0],
  [2, 30],
  [5, 0],
];
const STEPS: Range = fromBins([[4, 6, 7]], [[0.5, 0.5]]);
const WIDE: Range = [
  ['density', 'EXP(-0.5*((x-m)/s)^2)'],
  ['from', 0],
  ['to', 60],
  ['m', 30],
  ['s', 5],
];
const NARROW: Range = [
  ['density', '=EXP(-0.5*((x-m)/s)^2)'],
  ['from', 35],
  ['to', 'unbounded'],
  ['rows', 10],
  ['m', 45],
  ['s', 0.5],
];
const at = (shape: Range, x: number): number => Number(below(shape, null, [[x]], [])[0]![0]);
const textOf = (block: Range): unknown => block[0]![1];

describe('blend(shares, shapes…)', () => {
  test('blend(…) of tables is a table on the union of their points, jumps kept [law]', () => {
    const pool = blend([[0.25, 0.75]], [TRIANGLE, STEPS]);
    expect(pool[0]).toEqual(['x', 'height']);
    expect(pool.slice(1).map(([x]) => x)).toEqual([0, 2, 4, 4, 5, 6, 6, 7]);
    for (const x of [1, 3.3, 4, 4.5, 6, 6.7]) {
      expect(at(pool, x)).toBeCloseTo(0.25 * at(TRIANGLE, x) + 0.75 * at(STEPS, x), 13);
    }
    expect(draw(pool, null, [[5]], [['plan']], [['a']], [])).toHaveLength(5);
  });

  test('blend(…) of blocks is a block whose shares below are the pooled ones [law]', () => {
    const pool = blend([[0.9], [0.1]], [WIDE, NARROW]);
    expect(pool.slice(0, 3)).toEqual([
      [
        'density',
        'share_1/area_1*IF(x<=60,(EXP(-0.5*((x-m)/s)^2)),0)+share_2/area_2*IF(x>=35,(EXP(-0.5*((x-m_2)/s_2)^2)),0)',
      ],
      ['from', 0],
      ['to', 'unbounded'],
    ]);
    for (const x of [20, 30, 36, 44.8, 45.6, 59]) {
      expect(at(pool, x)).toBeCloseTo(0.9 * at(WIDE, x) + 0.1 * at(NARROW, x), 12);
    }
    const values = draw(pool, null, [[2000]], [['plan']], [['a']], []).map(Number);
    // 1 in 10 within 45 ± 2.5, where the wide hump alone has 0.006: 4.9 sd of 2000 draws is 0.034.
    const share = values.filter((x) => Math.abs(x - 45) < 2.5).length / 2000;
    expect(Math.abs(share - 0.1)).toBeLessThan(0.04);
  });

  test('blend(…) of a table and a block has both shares, and blends again [law]', () => {
    const pool = blend([[0.5, 0.5]], [STEPS, WIDE]);
    const again = blend([[0.2, 0.8]], [pool, NARROW]);
    for (const x of [4.5, 5, 6.5, 29, 40, 45]) {
      const wanted = 0.5 * at(STEPS, x) + 0.5 * at(WIDE, x);
      expect(at(pool, x)).toBeCloseTo(wanted, 12);
      expect(at(again, x)).toBeCloseTo(0.2 * wanted + 0.8 * at(NARROW, x), 12);
    }
  });

  test('blend(…) keeps formulas apart that use one name for different things [law]', () => {
    // The local name m_2 of the second formula must not hide the renamed given.
    const second: Range = [
      ['density', 'LET(m_2,0.1,m_2+m*x)'],
      ['from', 0],
      ['to', 10],
      ['m', 5],
    ];
    const first: Range = [
      ['density', 'LAMBDA(t,1+m*t)'],
      ['from', 0],
      ['to', 10],
      ['m', 1],
    ];
    const pool = blend([[0.5, 0.5]], [first, second]);
    for (const x of [1, 4, 9]) {
      expect(at(pool, x)).toBeCloseTo(0.5 * at(first, x) + 0.5 * at(second, x), 13);
    }
    expect(textOf(pool)).toContain('LET(m_2,0.1,m_2+m_3*x)');
  });

  test('blend(…) leaves out shapes with share 0 [law]', () => {
    expect(blend([[1, 0]], [TRIANGLE, WIDE]).map(([x]) => x)).toEqual(['x', 0, 2, 5]);
  });

  test.each<[string, Range | null, Range[], string]>([
    [
      'no shares',
      null,
      [TRIANGLE],
      'shares (argument 1): it is missing; give one share for each shape.',
    ],
    [
      'fewer shapes',
      [[0.9, 0.1]],
      [TRIANGLE],
      'shares (argument 1): 2 shares for 1 shape; give one share for each shape.',
    ],
    [
      'percentages',
      [[90, 10]],
      [TRIANGLE, WIDE],
      'shares (argument 1): they add up to 100; give shares that add up to 1, such as 0.9 and 0.1.',
    ],
    [
      'a negative share',
      [[1.5, -0.5]],
      [TRIANGLE, WIDE],
      'shares (argument 1), column 2: -0.5 is negative; give shares of 0 or more.',
    ],
    [
      'several columns of heights',
      [[1]],
      [
        [
          [0, 1, 1],
          [1, 1, 2],
        ],
      ],
      'shape 1 (argument 2): 2 shapes in one range; give each shape a range of its own.',
    ],
    [
      'a mistake in a shape',
      [[0.5, 0.5]],
      [
        TRIANGLE,
        [
          ['density', 'EXP(-x'],
          ['from', 0],
          ['to', 1],
        ],
      ],
      'Formula, character 4: "(" is never closed; add ")".',
    ],
    [
      'an area beyond the numbers',
      [[0.5, 0.5]],
      [
        TRIANGLE,
        [
          ['density', 'EXP(-900-x)'],
          ['from', 0],
          ['to', 1],
        ],
      ],
      'shape 2 (argument 3): its area is beyond the numbers that a cell holds; divide its formula by its largest height; heights need no unit.',
    ],
  ])('%s is refused with its place [law]', (_, shares, shapes, message) => {
    expect(() => blend(shares, shapes)).toThrow(message);
  });
});
