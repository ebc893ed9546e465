import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import fc from 'fast-check';
import type { Range } from '../../src/index';
import { below, draw, fromBins, fromData, fromPercentiles } from '../../src/index';

const column = (numbers: readonly number[]): Range => numbers.map((number) => [number]);
const row = (numbers: readonly number[]): Range => [[...numbers]];
const at = (table: Range, x: readonly number[]): number[] =>
  below(table, null, row(x), [])[0]!.map(Number);

/** Old Faithful, Azzalini & Bowman (1990): see test/published/data/README.md. */
const eruptions = readFileSync(resolve(__dirname, '../published/data/faithful.csv'), 'utf8')
  .trim()
  .split('\n')
  .slice(1)
  .map((line) => Number(line.split(',')[0]));

describe('fromBins(edges, shares)', () => {
  test('fromBins(…) spreads each share evenly over its bin, with x twice at the edges [law]', () => {
    expect(fromBins(row([0, 1, 3]), row([0.2, 0.8]))).toEqual([
      ['x', 'height'],
      [0, 0.2],
      [1, 0.2],
      [1, 0.4],
      [3, 0.4],
    ]);
  });

  test('fromBins(…) has shares that come back through BELOW, whatever the widths [law]', () => {
    const bins = fc.array(
      fc.tuple(fc.double({ min: 0.001, max: 1000, noNaN: true }), fc.integer({ min: 0, max: 50 })),
      { minLength: 1, maxLength: 15 },
    );
    fc.assert(
      fc.property(bins, fc.integer({ min: -500, max: 500 }), (all, start) => {
        const counts = all.map(([, count]) => count);
        const total = counts.reduce((sum, count) => sum + count, 0);
        fc.pre(total > 0);
        const edges = [start];
        for (const [width] of all) edges.push(edges.at(-1)! + width);
        const shares = at(fromBins(column(edges), column(counts)), edges);
        let sum = 0;
        shares.slice(1).forEach((share, i) => {
          sum += counts[i]!;
          expect(Math.abs(share - sum / total)).toBeLessThan(1e-14 * all.length);
        });
      }),
      { seed: 3, numRuns: 300 },
    );
  });

  test.each<[string, Range | null, Range | null, string]>([
    [
      'no edges',
      null,
      row([1]),
      'edges (argument 1): it is missing; give the edges of the bins, rising.',
    ],
    [
      'falling edges',
      row([0, 2, 1]),
      row([1, 1]),
      'edges (argument 1), column 3: 1 follows 2; give edges that rise.',
    ],
    [
      'as many shares as edges',
      row([0, 1, 2]),
      column([1, 1, 1]),
      'shares (argument 2): 3 shares for 3 edges; give one share for each bin, one less than there are edges.',
    ],
    [
      'a negative share',
      row([0, 1, 2]),
      column([1, -1]),
      'shares (argument 2), row 2: -1 is negative; give shares of 0 or more.',
    ],
    [
      'no share above 0',
      row([0, 1, 2]),
      column([0, 0]),
      'shares (argument 2): they are all 0; give some bin a share above 0.',
    ],
    [
      'a text',
      row([0, 1, 2]),
      [['share'], [1], ['?']],
      'shares (argument 2), row 3: "?" is not a number; give a number.',
    ],
  ])('%s is refused with its place [law]', (_, edges, shares, message) => {
    expect(() => fromBins(edges, shares)).toThrow(message);
  });
});

describe('fromPercentiles(levels, values, lowest, highest)', () => {
  test('fromPercentiles(…) has the levels as shares below the values [law]', () => {
    const table = fromPercentiles(row([0.1, 0.5, 0.9]), row([20, 32, 55]), [[10]], [[90]]);
    const shares = at(table, [10, 20, 32, 55, 90]);
    [0, 0.1, 0.5, 0.9, 1].forEach((level, i) => expect(shares[i]).toBeCloseTo(level, 14));
    // Evenly spread in between: halfway from 20 to 32 half of 0.4.
    expect(at(table, [26])[0]).toBeCloseTo(0.3, 14);
  });

  test.each<[string, Parameters<typeof fromPercentiles>, string]>([
    [
      'a percentage',
      [row([10, 50]), row([1, 2]), [[0]], [[9]]],
      'levels (argument 1), column 1: 10 is not between 0 and 1; write 0.1 or 10%.',
    ],
    [
      'level 0',
      [row([0, 0.5]), row([1, 2]), [[0]], [[9]]],
      'levels (argument 1), column 1: 0 is not between 0 and 1; give levels between 0 and 1; the ends are lowest and highest.',
    ],
    [
      'falling levels',
      [row([0.5, 0.1]), row([1, 2]), [[0]], [[9]]],
      'levels (argument 1), column 2: 0.1 follows 0.5; give levels that rise.',
    ],
    [
      'equal values',
      [row([0.1, 0.5]), row([2, 2]), [[0]], [[9]]],
      'values (argument 2), column 2: 2 follows 2; give values that rise with the levels.',
    ],
    [
      'too few values',
      [row([0.1, 0.5]), row([2]), [[0]], [[9]]],
      'values (argument 2): 1 values for 2 levels; give one value for each level.',
    ],
    [
      'no lowest',
      [row([0.1, 0.5]), row([2, 3]), null, [[9]]],
      'lowest (argument 3): it is missing; give a value below 2.',
    ],
    [
      'a lowest inside',
      [row([0.1, 0.5]), row([2, 3]), [[2]], [[9]]],
      'lowest (argument 3): 2 is not below the first value, 2; give the least that can happen.',
    ],
    [
      'a highest inside',
      [row([0.1, 0.5]), row([2, 3]), [[0]], [[3]]],
      'highest (argument 4): 3 is not above the last value, 3; give the most that can happen.',
    ],
  ])('%s is refused with its place [law]', (_, args, message) => {
    expect(() => fromPercentiles(...args)).toThrow(message);
  });
});

describe('fromData(values, lowest, highest)', () => {
  test('fromData(…) of Old Faithful has the five bins of its rule, with the data’s shares [published]', () => {
    // Quartiles 2.16275 and 4.45425 (R 4.2, quantile type 7): width 2·2.2915/272^(1/3) = 0.7073,
    // range 1.6 to 5.1: five bins of 0.7.
    const table = fromData(column(eruptions), null, null);
    expect(table).toHaveLength(1 + 2 * 5);
    const edges = [1.6, ...[1, 2, 3, 4, 5].map((i) => Number(table[2 * i]![0]))];
    const shares = at(table, edges);
    edges.slice(1, -1).forEach((edge, i) => {
      const nBelow = eruptions.filter((value) => value < edge).length;
      expect(shares[i + 1]).toBeCloseTo(nBelow / 272, 12);
    });
  });

  test('fromData(…) and DRAW keep both humps of Old Faithful [published]', () => {
    // 97 of 272 values lie below 3; n draws, 4.9 standard deviations: false alarm 1e-6.
    const table = fromData(column(eruptions), null, null);
    const n = 20_000;
    const values = draw(table, null, [[n]], [['plan-2027']], [['eruptions']], []).map(Number);
    const share = values.filter((value) => value < 3).length / n;
    const p = 97 / 272;
    expect(Math.abs(share - p)).toBeLessThan(4.9 * Math.sqrt((p * (1 - p)) / n));
    // The valley is far below either hump: a single hump over the same mean would fill it.
    const within = (a: number, b: number): number =>
      values.filter((value) => value >= a && value < b).length;
    expect(within(2.3, 3)).toBeLessThan(within(1.6, 2.3) / 2);
    expect(within(2.3, 3)).toBeLessThan(within(3.7, 4.4) / 2);
  });

  test('fromData(…) takes ties: equal quartiles get 1 + log2 n bins [published]', () => {
    // Sturges (1926): 8 values, 4 bins.
    expect(fromData(column([5, 5, 5, 5, 5, 5, 5, 9]), null, null)).toHaveLength(1 + 2 * 4);
  });

  test('fromData(…) takes one repeated value between given ends [law]', () => {
    const shares = at(fromData(column([5, 5, 5]), [[0]], [[9]]), [3, 6]);
    expect(shares).toEqual([0, 1]);
  });

  test.each<[string, Parameters<typeof fromData>, string]>([
    [
      'one repeated value',
      [column([5, 5, 5]), null, null],
      'values (argument 1): all 3 values are 5; give lowest and highest around it, or use the number itself.',
    ],
    [
      'a single value',
      [column([5]), null, null],
      'values (argument 1): one value 5; give lowest and highest around it, or use the number itself.',
    ],
    [
      'ends the wrong way',
      [column([5, 6]), [[9]], [[2]]],
      'lowest (argument 2): 9 is not below 2; give lowest below highest.',
    ],
    [
      'a value outside',
      [column([5, 60]), [[0]], [[9]]],
      'values (argument 1), row 2: 60 lies outside 0 … 9; give lowest and highest that hold all values, or leave them out.',
    ],
    [
      'far outliers',
      [column([1, 2, 3, 4, 1e6]), null, null],
      'values (argument 1): the rule asks for 427494 bins, since most values lie close together; count them into bins of your own, at most 1000, and give these to FROMBINS.',
    ],
    [
      'two columns',
      [
        [
          [1, 2],
          [3, 4],
        ],
        null,
        null,
      ],
      'values (argument 1): 2 rows and 2 columns; give one row or one column.',
    ],
  ])('%s is refused with its place [law]', (_, args, message) => {
    expect(() => fromData(...args)).toThrow(message);
  });
});
