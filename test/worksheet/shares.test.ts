import type { Range } from '../../src/index';
import { above, below, expect as meanOf, profile, quantile } from '../../src/index';

const BLOCK: Range = [
  ['density', 'EXP(-0.5*((x-m)/s)^2)'],
  ['from', 0],
  ['to', 12],
  ['m', 4],
  ['s', 1.3],
];
const LIMITS = [[0, 4]];

type Shape = [Range, Range | null];

describe('below, above, quantile', () => {
  test('below(…, x) has the shape of x and is exact on a flat density [law]', () => {
    const x = [
      [-1, 1, 2],
      [3, 4, null],
    ];
    expect(below([['1']], LIMITS, x, [])).toEqual([
      [0, 0.25, 0.5],
      [0.75, 1, 0],
    ]);
    expect(above([['1']], LIMITS, x, [])).toEqual([
      [1, 0.75, 0.5],
      [0.25, 0, 1],
    ]);
  });

  test('quantile(…, share, side) undoes both, and takes givens and names of limits [law]', () => {
    const givens = [[['k', 3]]];
    const limits = [['t', 0, 'k']];
    const share = [[0.1, 0.5, 0.9]];
    const back = quantile([['t*k']], limits, share, null, givens);
    // The share below t is (t/3)²: 0.3√10 …
    back[0]!.forEach((t, i) => expect(Number(t)).toBeCloseTo(3 * Math.sqrt(share[0]![i]!), 14));
    expect(below([['t*k']], limits, back, givens)[0]!.map((v) => Number(v).toFixed(14))).toEqual(
      share[0]!.map((v) => v.toFixed(14)),
    );
    const upper = quantile(BLOCK, null, [[0.1]], [['above']], []);
    expect(Number(above(BLOCK, null, upper, [])[0]![0])).toBeCloseTo(0.1, 14);
  });

  test.each([
    'EXP(-0.5*x^2)',
    '1E-100*EXP(-0.5*x^2)',
    '1E-200*EXP(-0.5*x^2)',
    'EXP(-800-0.5*x^2)',
    '1E200*EXP(-0.5*x^2)',
  ])('above(…) of %s keeps a share of 1e-300, whatever the heights [published]', (density) => {
    // 1 − Φ(37), recomputed as erfc(37/√2)/2; x² rounds by 6e-14 of the height there.
    for (const limits of [[[-39, 39]], null]) {
      const share = above([[density]], limits, [[37]], [])[0]![0];
      expect(Math.abs(Number(share) / 5.725571222524577e-300 - 1)).toBeLessThan(4e-13);
    }
  });

  // With t = 1/x the first two are normal in t: erfc(1) = .15729920705028513 (A&S 7.1.2, recomputed).
  test.each([
    ['NORM.DIST(7,5,x,FALSE)*NORM.DIST(3,5,x,FALSE)', 'unbounded', 2, 0.15729920705028513],
    ['WEIBULL.DIST(3,2,x,FALSE)', 'unbounded', 3, 0.15729920705028513],
    ['EXPON.DIST(3,x,FALSE)', 20, 1, (1 - 4 * Math.exp(-3)) / (1 - 61 * Math.exp(-60))],
  ])('below(…) of %s, a parameter from 0 to %s, is exact [published]', (density, to, x, exact) => {
    const share = Number(below([[density]], [[0, to]], [[x]], [])[0]![0]);
    expect(Math.abs(share / exact - 1)).toBeLessThan(1e-12);
  });

  test('below(…) of a table takes its ends, and limits truncate it [law]', () => {
    const table = [
      ['x', 'height'],
      [0, 0],
      [2, 1],
      [5, 0],
    ];
    expect(below(table, null, [[1]], [])[0]![0]).toBeCloseTo(0.1, 15);
    expect(below(table, [[0, 2]], [[1]], [])[0]![0]).toBeCloseTo(0.25, 15);
  });

  test.each<[string, () => Range, string]>([
    [
      'a text',
      () => below(BLOCK, null, [[1], ['abc']], []),
      'x (argument 3), row 2: "abc" is not a number; give a number.',
    ],
    [
      'TRUE',
      () => above(BLOCK, null, [[1, true]], []),
      'x (argument 3), row 1, column 2: TRUE is not a number; give a number.',
    ],
    [
      'nothing',
      () => below(BLOCK, null, null, []),
      'x (argument 3): it is missing; give a number or a range of numbers.',
    ],
    [
      'a percentage',
      () => quantile(BLOCK, null, [[10]], null, []),
      'share (argument 3): 10 is not a share; give a fraction from 0 to 1: 0.1 or 10%.',
    ],
    [
      'a negative share',
      () => quantile(BLOCK, null, [[0.5], [-0.5]], null, []),
      'share (argument 3), row 2: -0.5 is not a share; give a fraction from 0 to 1.',
    ],
    [
      'a share of 250',
      () => quantile(BLOCK, null, [[250]], null, []),
      'share (argument 3): 250 is not a share; give a fraction from 0 to 1.',
    ],
    [
      'share 1 without a limit',
      () => quantile([['EXP(-x)']], [[0, 'unbounded']], [[0.5], [1]], null, []),
      'share (argument 3), row 2: the x of share 1 lies beyond all numbers; give a share further from 0 and 1, or finite limits.',
    ],
    [
      'no share',
      () => quantile(BLOCK, null, null, null, []),
      'share (argument 3): it is missing; give a fraction from 0 to 1, or a range of them.',
    ],
    [
      'another side',
      () => quantile(BLOCK, null, [[0.5]], [['left']], []),
      'side (argument 4): "left" is not a side; write below or above.',
    ],
    [
      'several columns of heights',
      () =>
        below(
          [
            [0, 1, 1],
            [1, 1, 2],
          ],
          null,
          [[1]],
          [],
        ),
      'density (argument 1): 2 columns of heights; give x and one column of heights.',
    ],
  ])('%s is refused with its place [law]', (_, run, message) => {
    expect(run).toThrow(message);
  });

  // Closed forms: above 1 the area of x^-4 beyond x is x^-3 of the whole; of 1/(1 + x²) it tends to
  // 1/(πx). Heights fall to 1e-280 and 1e-288; doubles end at 5e-324.
  test('above and quantile keep 12 digits far out in tails of powers, and refuse where heights are no numbers [law]', () => {
    const cubes: Shape = [[['x^-4']], [[1, 'unbounded']]];
    const cauchy: Shape = [[['1/(1+x^2)']], null];
    const [[share, ...rest]] = above(...cubes, [[1e70, 1e72]], []) as [[number, number]];
    expect(share * 1e210).toBeCloseTo(1, 12);
    expect(rest[0] * 1e216).toBeCloseTo(1, 12);
    const [[far]] = above(...cauchy, [[1e144]], []) as [[number]];
    expect(far * 1e144 * Math.PI).toBeCloseTo(1, 12);
    const [[x]] = quantile(...cubes, [[1e-216]], [['above']], []) as [[number]];
    expect(x / 1e72).toBeCloseTo(1, 12);
    expect(above(...cubes, [[0.5]], [])).toEqual([[1]]);
    expect(below(...cubes, [[1e100]], [])).toEqual([[1]]);
    expect(() => above(...cubes, [[2], [1e81]], [])).toThrow(
      'x (argument 3), row 2: the density at 1e+81 is too small for a number, and the share beyond it with it; give an x nearer to the middle.',
    );
    expect(() => below(...cauchy, [[-1e162]], [])).toThrow('the density at -1e+162 is too small');
    for (const side of ['below', 'above']) {
      expect(() => quantile(...cauchy, [[1e-300]], [[side]], [])).toThrow(
        'share (argument 3): the density at the x of share 1e-300 is too small for a number, and x cannot be told; give a share further from 0 and 1.',
      );
    }
  });

  test('an error cell among the numbers comes back as that error [law]', () => {
    expect(() => below(BLOCK, null, [[1], [{ error: '#N/A' }]], [])).toThrow('#N/A');
  });
});

describe('expect', () => {
  test('expect(…, quantity) spills value, at least and at most, and knows the givens [law]', () => {
    const [heading, values] = meanOf([['1']], LIMITS, [['MAX(0,x-k)']], [[['k', 2]]]);
    expect(heading).toEqual(['value', 'at least', 'at most']);
    const [value, atLeast, atMost] = values!.map(Number);
    // ∫(2…4)(x − 2)dx / 4.
    expect(value).toBeCloseTo(0.5, 14);
    expect(atLeast).toBeLessThanOrEqual(value!);
    expect(atMost).toBeGreaterThanOrEqual(value!);
  });

  test('expect(…) of a table uses the givens and the variable of its limits [law]', () => {
    const table = [
      [0, 0],
      [2, 1],
      [5, 0],
    ];
    const mean = meanOf(table, [['litres', 0, 5]], [['k*litres']], [[['k', 3]]]);
    expect(Number(mean[1]![0])).toBeCloseTo(7, 13);
  });

  test.each<[string, Range | null, string]>([
    [
      'nothing',
      null,
      'quantity (argument 3): it is missing; give a formula as text, such as x or MAX(0,x-60).',
    ],
    [
      'TRUE',
      [[true]],
      'quantity (argument 3): TRUE is not a formula; give a formula as text, such as x or MAX(0,x-60).',
    ],
    ['two cells', [['x', 'x^2']], 'quantity (argument 3): 1 row and 2 columns; give one cell.'],
    [
      'an unknown name',
      [['x+y']],
      'Quantity, character 3: "y" is not a known name; add it to the givens, or use one of: x.',
    ],
    [
      'a pole',
      [['1/x']],
      'quantity (argument 3): it cannot be bounded near x = 0; cap it with MIN or MAX, or give limits that leave the place out.',
    ],
  ])('%s is refused with its place [law]', (_, quantity, message) => {
    expect(() => meanOf([['1']], LIMITS, quantity, [])).toThrow(message);
  });
});

describe('profile', () => {
  test('profile(…)[share below] is that of BELOW, from 0 to 1 [law]', () => {
    const [heading, ...rows] = profile(BLOCK, null, [[25]], []);
    expect(heading).toEqual(['x', 'density', 'upper', 'lower', 'share below']);
    const shares = rows.map((row) => [row[4]!]);
    expect(shares).toEqual(
      below(
        BLOCK,
        null,
        rows.map((row) => [row[0]!]),
        [],
      ),
    );
    expect([shares[0]![0], shares.at(-1)![0]]).toEqual([0, 1]);
  });
});
