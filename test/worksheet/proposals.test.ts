import type { Range } from '../../src/index';
import { acceptance, draw, proposals } from '../../src/index';

const SEED = [['plan-2027']];
const LABEL = [['downtime']];

describe('proposals(…)', () => {
  test.each<[string, Range, Range | null, number]>([
    ['a smooth formula', [['EXP(-0.5*((x-4)/1.3)^2)']], [[0, 12]], 3000],
    ['unbounded sides', [['1/(1+x^2)']], null, 3000],
    ['a pole', [['x^-0.5*EXP(-x)']], [[0, 'unbounded']], 3000],
    ['endless waves', [['SIN(1/x)+1.5']], [[0, 1]], 2000],
    [
      'a table',
      [
        [0, 0],
        [2, 1],
        [5, 0],
      ],
      null,
      100,
    ],
  ])('proposals(…) of %s keep exactly the draws of DRAW [law]', (_, density, limits, n) => {
    const [heading, ...made] = proposals(density, limits, [[n]], SEED, LABEL, []);
    expect(heading).toEqual(['row', 'attempt', 'value', 'height drawn', 'density there', 'kept']);
    const kept = made.filter((line) => line[5]);
    expect(kept.map((line) => [line[2]!])).toEqual(draw(density, limits, [[n]], SEED, LABEL, []));
    expect(kept.map((line) => line[0])).toEqual(Array.from({ length: n }, (__, i) => i + 1));
    const told = new Map(
      acceptance(density, limits, [[n]], SEED, LABEL, []).map(([a, b]) => [a, b]),
    );
    expect(made).toHaveLength(Number(told.get('proposals')));
    expect(made.filter((line) => line[3] === 'under the lower line').length).toBeGreaterThan(0);
    made.forEach(([row, attempt, , drawn, there, isKept], i) => {
      // Attempts of a row are counted from 1 and end with the kept one.
      expect(attempt).toBe(i > 0 && made[i - 1]![0] === row ? Number(made[i - 1]![1]) + 1 : 1);
      if (typeof drawn === 'number') expect(drawn <= Number(there)).toBe(isKept);
      else expect(isKept).toBe(true);
    });
  });

  test('proposals(…) of rows 41 to 45 are those of the longer list [law]', () => {
    const density = [['SIN(1/x)+1.5']];
    const all = proposals(density, [[0, 1]], [[60]], SEED, LABEL, []);
    const some = proposals(density, [[0, 1]], [[41, 45]], SEED, LABEL, []);
    expect(some.slice(1)).toEqual(all.filter(([row]) => Number(row) >= 41 && Number(row) <= 45));
  });

  test.each<[string, Range, Range, string]>([
    [
      'two labels',
      [[5]],
      [['a', 'b']],
      'label (argument 5): 2 columns are asked for; give one shape and one label.',
    ],
    [
      'too many rows',
      [[100_001]],
      LABEL,
      'rows (argument 3): 100001 rows of draws; give at most 100000, or two cells: first row and last row.',
    ],
  ])('%s is refused with its place [law]', (_, rows, label, message) => {
    expect(() => proposals([['1']], [[0, 1]], rows, SEED, label, [])).toThrow(message);
  });
});

describe('acceptance(…), shares of terms', () => {
  const told = (density: Range, limits: Range): [string, number][] =>
    acceptance(density, limits, [[10]], SEED, LABEL, [[['k', 2]]])
      .filter(([item]) => (item as string).startsWith('share of area'))
      .map(([item, value]) => [item as string, Number(value)]);

  test('acceptance(…) names the share of area of every term of a sum [law]', () => {
    // Areas 0.9·5√(2π) and 0.1·0.5√(2π): 90 to 1. The limits cut off less than 1e-8.
    const lines = told(
      [['0.9*EXP(-0.5*((x-30)/5)^2) + 0.1*EXP(-0.5*((x-45)/0.5)^2)']],
      [[-10, 70]],
    );
    expect(lines.map(([item]) => item)).toEqual([
      'share of area, term 1: 0.9*EXP(-0.5*((x-30)/5)^2)',
      'share of area, term 2: 0.1*EXP(-0.5*((x-45)/0.5)^2)',
    ]);
    expect(lines[0]![1]).toBeCloseTo(90 / 91, 12);
    expect(lines[1]![1]).toBeCloseTo(1 / 91, 12);
  });

  test('acceptance(…) multiplies the other lines of the density into each term [law]', () => {
    // On 0 … 1: ∫x·k·x = 2/3 and ∫x = 1/2.
    const lines = told([['x'], ['k*x+1']], [[0, 1]]);
    expect(lines.map(([, share]) => share.toFixed(12))).toEqual([
      (4 / 7).toFixed(12),
      (3 / 7).toFixed(12),
    ]);
  });

  test.each([['1+x-x^2'], ['x*(1+x)'], ['(x+1)>0.5'], ['x+SIN(9*x)*x']])(
    'acceptance(…) of %s names none where a term is no density of its own [law]',
    (text) => {
      const lines = told([[text]], [[0, 1]]);
      expect(lines.every(([, share]) => share >= 0)).toBe(true);
      if (text !== '1+x-x^2') expect(lines).toEqual([]);
    },
  );
});
