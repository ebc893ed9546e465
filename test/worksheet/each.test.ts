import fc from 'fast-check';
import type { Cell, Range } from '../../src/index';
import { below, CellErrorPassed, draw, each } from '../../src/index';
import { MAX_DIFFERENT } from '../../src/worksheet/each';
import { FALSE_ALARM, goodnessOfFit } from '../draw/statistics';
import { messageOf } from '../message';

const SEED = [['plan-2027']];
const LABEL = [['days in store']];
const DENSITY = [['x^(k-1)*EXP(-x/t)']];
const LIMITS = [[0, 'unbounded']];
const KEPT: Range[] = [[['t', 2]]];
const eachOf = (
  lines: Range | null,
  density: Range = DENSITY,
  limits: Range | null = LIMITS,
  givens: readonly Range[] = KEPT,
): Range => each(density, limits, SEED, LABEL, lines, givens);
const drawOf = (rows: Range, ...givens: Range[]): Range =>
  draw(DENSITY, LIMITS, rows, SEED, LABEL, givens);
const repeated = (heading: readonly Cell[], line: readonly Cell[], n: number): Range => [
  heading,
  ...Array.from({ length: n }, () => line),
];

describe('each', () => {
  it('of equal lines is DRAW with their values, bit for bit [law]', () => {
    const n = 10_000;
    expect(eachOf(repeated(['k', 't'], [3, 2.5], n))).toEqual(
      drawOf(
        [[n]],
        [
          ['k', 3],
          ['t', 2.5],
        ],
      ),
    );
  });

  it('has in line i row i of DRAW with the values of that line [law]', () => {
    const kinds = [1, 2, 3.5];
    const columns = kinds.map((k) => drawOf([[5000]], [['k', k]], [['t', 2]]));
    fc.assert(
      fc.property(
        fc.array(fc.integer({ min: 0, max: 2 }), { minLength: 1, maxLength: 5000 }),
        (which) => {
          const spill = eachOf([['k'], ...which.map((j) => [kinds[j]!])]);
          expect(spill).toEqual(which.map((j, i) => columns[j]![i]));
        },
      ),
      { seed: 5, numRuns: 20 },
    );
  });

  it('moves limits by columns from and to, and by names in the limits [law]', () => {
    const lines: Range = [
      ['from', 'k', 'to'],
      [0, 2, 5],
      [1, 3, 'unbounded'],
      [0, 2, 't'],
    ];
    const ends: Range = [
      [0, 5],
      [1, 'unbounded'],
      [0, 2],
    ];
    const spill = eachOf(lines, DENSITY, null);
    ends.forEach((own, i) => {
      const givens: Range[] = [[['k', lines[i + 1]![1]!]], [['t', 2]]];
      const column = draw(DENSITY, [own], [[i + 1, i + 1]], SEED, LABEL, givens);
      expect([spill[i]]).toEqual(column);
    });
    const named = eachOf([['most'], [3], [9]], [['x']], [[0, 'most']], []);
    expect(named[1]).toEqual(draw([['x']], [[0, 9]], [[2]], SEED, LABEL, [])[1]);
  });

  it('takes tables of points, blocks with their seed and label, and a blank for 0 [law]', () => {
    const table: Range = [
      ['x', 'h'],
      [0, 1],
      [4, 3],
    ];
    expect(eachOf([['to'], [2], [4]], table, null, [])[0]).toEqual(
      draw(table, [[0, 2]], [[1]], SEED, LABEL, [])[0],
    );
    const block: Range = [
      ['density', 'EXP(-x*(1+m))'],
      ['from', 0],
      ['to', 9],
      ['seed', 'plan-2027'],
      ['label', 'days in store'],
      ['m', 5],
    ];
    const spill = each(block, null, null, null, [['m'], [null], [0]], []);
    const zero = [['EXP(-x*(1+0))']];
    expect(spill).toEqual(draw(zero, [[0, 9]], [[2]], SEED, LABEL, []));
  });

  it('chained on its own draws keeps rows paired [law]', () => {
    const n = 300;
    const lines = (moved: number): Range => [
      ['k'],
      ...Array.from({ length: n }, (_, i) => [i === 40 ? moved : 1 + (i % 3)]),
    ];
    const chain = (moved: number): readonly [Range, Range] => {
      const first = eachOf(lines(moved));
      const second = each(
        [['EXP(-x/mean)']],
        LIMITS,
        SEED,
        [['cost']],
        [['mean'], ...first.map(([x]) => [(x as number) + 1])],
        [],
      );
      return [first, second];
    };
    const [before, after] = [chain(2), chain(2.5)];
    for (const step of [0, 1] as const) {
      const changed = before[step].flatMap(([x], i) => (x === after[step][i]![0] ? [] : [i]));
      expect(changed).toEqual([40]);
    }
  });

  // x given m is exponential with mean m, and m is 1 or 4 with equal chances: a blend of the two.
  it('of drawn conditions follows the blend of the densities [law]', () => {
    const n = 100_000;
    const u = draw([['1']], [[0, 1]], [[n]], SEED, [['kind']], []).flat() as number[];
    const values = eachOf(
      [['m'], ...u.map((v) => [v < 0.5 ? 1 : 4])],
      [['EXP(-x/m)']],
      LIMITS,
      [],
    ).flat() as number[];
    const edges = [...Array.from({ length: 40 }, (_, i) => i / 4), Infinity];
    const counts = new Float64Array(40);
    for (const x of values) counts[Math.min(39, Math.floor(x * 4))]!++;
    const shares = (mean: number): number[] =>
      edges.slice(1).map((to, i) => {
        const [lower, upper] = [edges[i]!, to].map((x) =>
          x === Infinity
            ? 1
            : (below(
                [['0.5*EXP(-x)+0.5*EXP(-x/m)/m']],
                LIMITS,
                [[x]],
                [[['m', mean]]],
              )[0]![0] as number),
        );
        return upper! - lower!;
      });
    expect(goodnessOfFit(counts, shares(4))).toBeGreaterThan(FALSE_ALARM);
    // The last bin alone, beyond 9.75, expects 4,369 for 4 and 5,453 for 4.4, which adds 215 to χ²;
    // with 39 degrees of freedom one in 10^6 is above 97.
    expect(goodnessOfFit(counts, shares(4.4))).toBeLessThan(FALSE_ALARM);
  });

  it(`takes ${MAX_DIFFERENT} different lines, equal ones counted once [law]`, () => {
    const different = Array.from({ length: MAX_DIFFERENT }, (_, i) => [10 + i]);
    const table: Range = [
      [0, 1],
      [1, 1],
    ];
    const spill = eachOf([['to'], ...different, ...different], table, null, []);
    expect(spill).toHaveLength(2 * MAX_DIFFERENT);
    expect(messageOf(() => eachOf([['to'], ...different, [0.5]], table, null, []))).toBe(
      `lines (argument 5), row ${MAX_DIFFERENT + 2}: more than ${MAX_DIFFERENT} different lines; give at most ${MAX_DIFFERENT} different ones (equal lines count once), or round their values.`,
    );
  });

  const FORM = 'give a heading row of names and a line of values for each draw.';
  const refused: readonly (readonly [string, () => unknown, string])[] = [
    ['no lines', () => eachOf(null), `lines (argument 5): they are missing; ${FORM}`],
    ['a heading alone', () => eachOf([['k']]), `lines (argument 5): 1 row and 1 column; ${FORM}`],
    ['no name', () => eachOf([[null], [null]]), `lines (argument 5): there is no name; ${FORM}`],
    [
      'a number for a heading',
      () => eachOf([[2], [3]]),
      'lines (argument 5), column 1: 2 is not a name; write the name of a given, from or to above the values.',
    ],
    [
      'values without a heading',
      () =>
        eachOf([
          ['k', null],
          [3, 4],
        ]),
      'lines (argument 5), column 2: a blank is not a name; write the name of a given, from or to above the values.',
    ],
    [
      'a name that is not known',
      () =>
        eachOf([
          ['k', 'tt'],
          [3, 4],
        ]),
      'lines (argument 5), column 2: "tt" is no given and no end of the limits; use one of: t, k, from, to.',
    ],
    [
      'a name that stands twice',
      () =>
        eachOf([
          ['k', 'K'],
          [3, 4],
        ]),
      'lines (argument 5), column 2: "K" stands twice; keep one of the two.',
    ],
    [
      'a text for a value',
      () => eachOf([['k'], [3], ['four']]),
      'lines (argument 5), row 3, "k": "four" is not a number; give a number.',
    ],
    [
      'a line that cannot be proved',
      () => eachOf([['k'], [3], [3], [-1]]),
      'lines (argument 5), row 4, density: its area is infinite at x = 0; start the limits above 0.',
    ],
    [
      'ends in the wrong order',
      () =>
        eachOf([
          ['k', 'from', 'to'],
          [3, 2, 1],
        ]),
      'lines (argument 5), row 2, limits (argument 2): from (2) is not below to (1); give from first and a larger to.',
    ],
    [
      'an end that is a word',
      () =>
        eachOf([
          ['k', 'to'],
          [3, 'soon'],
        ]),
      'lines (argument 5), row 2, to: "soon" is neither a number nor the name of a given; give a number, or the word unbounded.',
    ],
    [
      'a name that has no value',
      () => eachOf([['t'], [3]]),
      'lines (argument 5), row 2, formula, character 4: "k" is not a known name; add it to the givens, or use one of: x, t.',
    ],
    [
      'two labels',
      () => each(DENSITY, LIMITS, SEED, [['a', 'b']], [['k'], [3]], KEPT),
      'label (argument 4): 2 labels; give one label.',
    ],
    [
      'no seed',
      () => each(DENSITY, LIMITS, null, LABEL, [['k'], [3]], KEPT),
      'seed (argument 3): it is blank; give a text or a number other than 0, so that the draws can be rebuilt.',
    ],
    [
      'a wrong given',
      () =>
        each(
          DENSITY,
          LIMITS,
          SEED,
          LABEL,
          [['k'], [3]],
          [
            [
              ['t', 'two'],
              ['k', 'three'],
            ],
          ],
        ),
      'givens (argument 6), "k": "three" is not a number; give a number.',
    ],
  ];

  it.each(refused)('with %s says where and what [law]', (_, call, message) => {
    expect(messageOf(call)).toBe(message);
  });

  it('with an error value in a line is that error [law]', () => {
    expect(() => eachOf([['k'], [3], [{ error: '#N/A' }]])).toThrow(CellErrorPassed);
  });
});
