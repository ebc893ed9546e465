/** Function tables among the givens, as operations of a formula and as cells. */
import fc from 'fast-check';
import type { Cell, Range } from '../../src/index';
import { draw, envelope } from '../../src/index';
import type { Operation } from '../../src/formula/operation';
import { turningLevel } from '../../src/formula/operation';
import { pointFunction } from '../../src/formula/operations/points';
import * as I from '../../src/numeric/interval';
import * as J from '../../src/numeric/jet';
import { messageOf } from '../message';

/** Rises from 1 to 3, jumps to 2, is level, falls to 0: jumps at 0 and 10, bends at 20 and 36. */
const X = [0, 10, 10, 20, 36];
const HEIGHTS = [1, 3, 2, 2, 0];
const base = pointFunction('base', X, HEIGHTS);

function over(operation: Operation, lo: number, hi: number): J.Jet {
  const [out, u] = [J.jet(), J.jet()];
  I.set(u.v, lo, hi);
  I.set(u.d, 1, 1);
  I.set(u.h, 0, 0);
  operation.enclose(out.v, u.v, u.v, u.v);
  operation.slopes(out, u, u, u);
  return out;
}

function at(operation: Operation, u: number): number {
  return operation.point(u, u, u);
}

describe('pointFunction', () => {
  test.each([
    [-1, 0],
    [0, 1],
    [5, 2],
    [10, 2],
    [15, 2],
    [28, 1],
    [36, 0],
    [37, 0],
  ])('at %d is %d: straight between the points, 0 outside [law]', (x, height) => {
    expect(at(base, x)).toBe(height);
    expect(over(base, x, x).v).toEqual({ lo: height, hi: height });
  });

  test('at the last point takes the last height, and NaN of NaN [law]', () => {
    const step = pointFunction('step', [0, 1], [2, 2]);
    expect([at(step, 1), at(step, 1.0000001), at(step, NaN)]).toEqual([2, 0, NaN]);
  });

  test('over an interval is the hull of its heights, those just before a jump included [law]', () => {
    expect(over(base, 5, 10).v).toEqual({ lo: 2, hi: 3 });
    expect(over(base, 9, 12).v.hi).toBe(3);
    expect(over(base, -5, 5).v).toEqual({ lo: 0, hi: 2 });
    expect(over(base, -Infinity, Infinity).v).toEqual({ lo: 0, hi: 3 });
  });

  test('on one line has its slope and no curvature, over a bend the hull of slopes, over a jump none [law]', () => {
    // The chain rule rounds a slope outward, by less than 2^-53 here.
    const isSlope = ({ d }: J.Jet, lo: number, hi: number): boolean =>
      d.lo <= lo && d.hi >= hi && lo - d.lo < 2 ** -53 && d.hi - hi < 2 ** -53;
    expect(isSlope(over(base, 20, 36), -0.125, -0.125)).toBe(true);
    const isZero = ({ lo, hi }: I.Interval): boolean => lo === 0 && hi === 0;
    expect(isZero(over(base, 20, 36).h)).toBe(true);
    expect(isSlope(over(base, 15, 30), -0.125, 0)).toBe(true);
    expect(over(base, 15, 30).h).toEqual({ lo: -Infinity, hi: Infinity });
    expect(isSlope(over(base, 30, 50), -0.125, 0)).toBe(true);
    expect(over(base, 5, 10).d).toEqual({ lo: -Infinity, hi: Infinity });
    expect(over(base, -1, 5).d).toEqual({ lo: -Infinity, hi: Infinity });
    expect(isZero(over(base, 50, 60).d)).toBe(true);
  });

  test('turns at the middle jump inside an interval, else at the middle bend [law]', () => {
    const level = (lo: number, hi: number): number => turningLevel(base, I.interval(lo, hi));
    expect([level(-1, 50), level(5, 50), level(12, 50), level(25, 35), level(20, 36)]).toEqual([
      0,
      10,
      20,
      NaN,
      NaN,
    ]);
  });

  test('encloses values and slopes between random points [law]', () => {
    const point = fc.tuple(
      fc.double({ min: -100, max: 100, noNaN: true }),
      fc.integer({ min: -9, max: 9 }),
    );
    const share = fc.double({ min: 0, max: 1, noNaN: true });
    const breaches = (
      points: [number, number][],
      ends: [number, number],
      shares: number[],
    ): number => {
      const sorted = [...points].sort((p, q) => p[0] - q[0]);
      const f = pointFunction(
        'f',
        sorted.map(([x]) => x),
        sorted.map(([, y]) => y),
      );
      const [lo, hi] = ends[0] <= ends[1] ? ends : [ends[1], ends[0]];
      const { v, d } = over(f, lo, hi);
      const xs = [
        lo,
        hi,
        ...sorted.map(([x]) => x),
        ...shares.map((s) => lo + (hi - lo) * s),
      ].filter((x) => x >= lo && x <= hi);
      // A height computed in doubles is within 3 roundings of the largest height, 9.
      const tolerance = 9 * 3 * 2 ** -53;
      return xs.filter((x, i) => {
        const y = at(f, x);
        const isOutside = y < v.lo - tolerance || y > v.hi + tolerance;
        const [p, q] = [x, xs[(i + 1) % xs.length]!];
        const quotient = (at(f, q) - y) / (q - p);
        const slack = (2 * tolerance) / Math.abs(q - p);
        return isOutside || (q !== p && (quotient < d.lo - slack || quotient > d.hi + slack));
      }).length;
    };
    fc.assert(
      fc.property(
        fc
          .array(point, { minLength: 2, maxLength: 12 })
          .filter((p) => new Set(p.map(([x]) => x)).size > 1),
        fc.tuple(
          fc.double({ min: -120, max: 120, noNaN: true }),
          fc.double({ min: -120, max: 120, noNaN: true }),
        ),
        fc.array(share, { maxLength: 10 }),
        (points, ends, shares) => breaches(points, ends, shares) === 0,
      ),
      { numRuns: 3000, seed: 7 },
    );
  });

  test('the check above finds a height outside [law]', () => {
    const { v } = over(base, 0, 9);
    expect(at(base, 10 - 1e-9) > v.hi).toBe(true);
  });
});

/** Bottles asked for against day, in hundreds: the curve that the formulas below weigh. */
const DEMAND: Range = [
  ['day', 'base', 'Promo'],
  ...X.map((x, i): Cell[] => [x, HEIGHTS[i]!, x / 10]),
];

/** Areas under the lower and under the upper lines of ENVELOPE. */
function areas(
  density: string,
  limits: readonly Cell[],
  ...givens: readonly Range[]
): [number, number] {
  const [, ...pieces] = envelope([[density]], [limits], givens) as number[][];
  const sum = (left: number, right: number): number =>
    pieces.reduce((total, p) => total + ((p[left]! + p[right]!) / 2) * (p[1]! - p[0]!), 0);
  return [sum(4, 5), sum(2, 3)];
}

/** The lines lie on either side of the density and, at the promised acceptance, within 1 %; sums here round by less than 1e-9. */
function isBracketed(area: number, [lower, upper]: readonly [number, number]): boolean {
  const rounding = 1e-9 * area;
  return lower <= area + rounding && upper >= area - rounding && lower >= 0.99 * upper - rounding;
}

describe('a function table in a formula', () => {
  // Area of the table: (1 + 3)/2·10 + 2·10 + 2·16/2 = 56.
  test.each([
    ['base(x)', [-20, 60], 56],
    ['base(x-10)', [-20, 60], 56],
    ['BASE(2*x)', [-20, 60], 28],
    ['base(20-x)', [-60, 60], 56],
    ['LAMBDA(t,base(t))', [0, 40], 56],
    ['LET(f,2*base(x),f)', [0, 10], 40],
    ['SUM(base(x-{0,10}))', [-20, 60], 112],
  ] as const)('%s has the area of its lines [law]', (density, limits, area) => {
    const [lower, upper] = areas(density, limits, DEMAND);
    expect(isBracketed(area, [lower, upper])).toBe(true);
  });

  test('every further column is a function of its own [law]', () => {
    const [lower, upper] = areas('base(x)*promo(x)', [10, 20], DEMAND);
    // ∫ 2·x/10 from 10 to 20 = 30; one factor is level there.
    expect(isBracketed(30, [lower, upper])).toBe(true);
  });

  test('a table of 1,000 points times EXP is proved to 0.99 within the pieces there are [law]', () => {
    const rows = Array.from({ length: 1000 }, (_, i): Cell[] => {
      const x = (100 * i) / 999;
      return [x, 1 + Math.sin(x / 7) + 0.2 * Math.sin(x * 1.7) + 0.2];
    });
    const table: Range = [['day', 'base'], ...rows];
    const pieces = envelope([['base(x)*EXP(-x/50)']], [[0, 100]], [table]).length - 1;
    const [lower, upper] = areas('base(x)*EXP(-x/50)', [0, 100], table);
    expect(pieces).toBeLessThanOrEqual(4096);
    expect(lower / upper).toBeGreaterThanOrEqual(0.99);
  });

  test('draws stay where the table has height, and follow it [law]', () => {
    const values = draw(
      [['base(x)']],
      [[-100, 100]],
      [[20000]],
      [['plan-2027']],
      [['demand']],
      [DEMAND],
    ).map(([value]) => value as number);
    expect(values.every((value) => value >= 0 && value <= 36)).toBe(true);
    // 20/56 of the area lies below 10; false alarm 1e-6: 4.9 standard deviations.
    const [share, wanted] = [values.filter((value) => value < 10).length / values.length, 20 / 56];
    const deviation = Math.sqrt((wanted * (1 - wanted)) / values.length);
    expect(Math.abs(share - wanted)).toBeLessThan(4.9 * deviation);
  });
});

describe('readGivens', () => {
  const call = (table: Range, density = 'base(x)'): string =>
    messageOf(() => draw([[density]], [[0, 40]], [[5]], [['s']], [['l']], [table]));

  test.each([
    [
      'x that falls',
      [
        ['x', 'base'],
        [0, 1],
        [5, 2],
        [3, 1],
      ],
      'Givens (argument 6), row 4: x falls from 5 to 3; order the points so that x never falls.',
    ],
    [
      'text among the heights',
      [
        ['x', 'base'],
        [0, 1],
        [5, 'two'],
        [7, 1],
      ],
      'Givens (argument 6), row 3, column 2: "two" is not a number; give a number.',
    ],
    [
      'one point',
      [
        ['x', 'base'],
        [1, 1],
      ],
      'Givens (argument 6): a table of 1 point; give two points or more, x and height.',
    ],
    [
      'points at one x',
      [
        ['x', 'base'],
        [3, 1],
        [3, 2],
      ],
      'Givens (argument 6): all points stand at x = 3; give points with two different x or more.',
    ],
    [
      'a column without a heading',
      [
        ['x', 'base', null],
        [0, 1, 1],
        [5, 2, 2],
      ],
      "Givens (argument 6), column 3: it has no heading; write the function's name above its heights.",
    ],
    [
      'a height too large',
      [
        ['x', 'base'],
        [0, 1],
        [5, 1e200],
      ],
      'Givens (argument 6), row 3, column 2: 1e+200 is too large; give numbers between -1e+150 and 1e+150.',
    ],
    [
      "the variable's name",
      [
        ['t', 'x'],
        [0, 1],
        [5, 1],
      ],
      'Givens (argument 6), "x": it is the name of the variable; rename the given, or the variable in limits.',
    ],
    [
      "a formula function's name",
      [
        ['x', 'Exp'],
        [0, 1],
        [5, 1],
      ],
      'Givens (argument 6), "Exp": it is the name of a formula function; rename the given.',
    ],
    [
      'one name twice',
      [
        ['x', 'base', 'BASE'],
        [0, 1, 1],
        [5, 1, 1],
      ],
      'Givens (argument 6), "BASE": it is the same name as "base"; keep one of the two.',
    ],
    [
      'the reserved name',
      [
        ['x', 'method'],
        [0, 1],
        [5, 1],
      ],
      'Givens (argument 6), "method": the name stands for the method of drawing; rename the given.',
    ],
    [
      'numbers without headings',
      [
        [1, 1],
        [5, 1],
      ],
      'Givens (argument 6), row 1: 1 is not a name; give two columns name and value, a table with headings (x, then a named column of heights), or one column with a heading.',
    ],
  ] as [string, Range, string][])('refuses %s in a function table [law]', (_, table, message) => {
    expect(call(table)).toBe(message[0]!.toLowerCase() + message.slice(1));
  });

  test.each([
    ['base', 'Formula, character 1: "base" is a function without its brackets; write base(…).'],
    ['base(x,1)', 'Formula, character 1: base has 2 arguments; give it 1.'],
    [
      'base(-x)-1',
      'Density: it is never above 0 within the limits, and negative at x = 0 (-1); heights must be 0 or more, and above 0 somewhere: turn the sign, or write MAX where MIN stands.',
    ],
  ])('refuses %s in a formula [law]', (density, message) => {
    const table: Range = [
      ['x', 'base'],
      [0, 0],
      [5, 1],
    ];
    expect(call(table, density)).toBe(message);
  });

  test('heights may be negative where the density is not [law]', () => {
    const table: Range = [
      ['x', 'slant'],
      [0, -1],
      [10, 1],
    ];
    const [lower, upper] = areas('2+slant(x)', [0, 10], table);
    expect(isBracketed(20, [lower, upper])).toBe(true);
  });

  test('drops blank rows at the end, as hosts hand them over [law]', () => {
    const table: Range = [
      ['x', 'base'],
      [1, 1],
      [5, 1],
      [0, 0],
      [null, null],
    ];
    expect(isBracketed(4, areas('base(x)', [0, 6], table))).toBe(true);
  });

  test('constants with blank rows below stay constants [law]', () => {
    const constants: Range = [
      ['name', 'value'],
      ['m', 4],
      [0, 0],
      [null, null],
    ];
    expect(isBracketed(4, areas('IF(x<m,1,0)', [0, 10], constants))).toBe(true);
  });
});
