import type { Cell, Range } from '../../src/index';
import {
  alignRanks,
  below,
  CellErrorPassed,
  draw,
  linkedShares,
  quantile,
  ranks,
} from '../../src/index';
import { averageRanks, correlationOfRanks, rankCorrelations } from '../../src/numeric/ranks';
import { FALSE_ALARM, goodnessOfFit, Z_FALSE_ALARM } from '../draw/statistics';
import { messageOf } from '../message';

const SEED = [['plan-2027']];
const LABEL = [['links']];
const THREE: Range = [
  [1, 0.8, 0.4],
  [0.8, 1, 0.3],
  [0.4, 0.3, 1],
];

const shares = (matrix: Range, rows: Range, label: Range = LABEL): Range =>
  linkedShares(matrix, rows, SEED, label);
const columnOf = (range: Range, j: number): Float64Array =>
  Float64Array.from(range, (row) => row[j] as number);
const ranksOf = (range: Range, j: number): Float64Array => averageRanks(columnOf(range, j));
const between = (range: Range, i: number, j: number): number =>
  correlationOfRanks(ranksOf(range, i), ranksOf(range, j))!;

/** Correlations that fall with the distance of two columns, as of a chain. */
const chain = (n: number, of = 0.8): Range =>
  Array.from({ length: n }, (_, i) =>
    Array.from({ length: n }, (_, j) => Math.round(of ** Math.abs(i - j) * 1000) / 1000),
  );

/** Kolmogorov and Smirnov's distance between shares and the uniform law. */
function distanceFromUniform(values: Float64Array): number {
  const sorted = values.slice().sort();
  return sorted.reduce(
    (most, share, i) => Math.max(most, share - i / sorted.length, (i + 1) / sorted.length - share),
    0,
  );
}

/** Massart (1990): the chance of a larger distance is at most 2·EXP(−2·n·distance²). */
const distanceLimit = (n: number): number => Math.sqrt(Math.log(2 / FALSE_ALARM) / (2 * n));

describe('linkedShares', () => {
  // The standard error of artanh is that of Bonett and Wright (2000); 6.2 of them are passed with
  // the chance 6e-10, and there are at most 190 pairs.
  const miss = (reached: number, wished: number, n: number): number =>
    Math.abs(Math.atanh(reached) - Math.atanh(wished)) /
    Math.sqrt((1 + (wished * wished) / 2) / (n - 3));

  it.each([2, 3, 5, 10, 20])(
    'reaches the rank correlations of %d columns within sampling error at 100,000 rows [law]',
    (n) => {
      const matrix = chain(n);
      const spill = shares(matrix, [[100_000]]);
      const reached = rankCorrelations(matrix.map((_, j) => ranksOf(spill, j)));
      const misses = reached.flatMap((row, i) =>
        row.flatMap((value, j) => (j < i ? [miss(value!, matrix[i]![j] as number, 100_000)] : [])),
      );
      expect(Math.max(...misses)).toBeLessThan(6.2);
      // The correlation of the scores in place of that of the ranks is off by up to 0.018.
      const asScores = (6 / Math.PI) * Math.asin(0.8 / 2);
      expect(miss(reached[1]![0]!, asScores, 100_000)).toBeGreaterThan(6.2);
    },
  );

  it('reaches negative ones, and exactly 1 and -1 [law]', () => {
    const matrix: Range = [
      [1, -0.6, 1, -1],
      [-0.6, 1, -0.6, 0.6],
      [1, -0.6, 1, -1],
      [-1, 0.6, -1, 1],
    ];
    const spill = shares(matrix, [[20_000]]);
    expect(miss(between(spill, 0, 1), -0.6, 20_000)).toBeLessThan(6.2);
    for (const [first, second, third, fourth] of spill.slice(0, 1000) as number[][]) {
      expect(Math.abs(third! - first!)).toBeLessThan(1e-12);
      expect(Math.abs(fourth! - (1 - first!))).toBeLessThan(1e-12);
      expect(second).not.toBe(first);
    }
  });

  // Expected counts of 20 in the bins at both ends of 200,000 shares, far into the tails.
  it('has shares that are uniform in the middle and in both tails [law]', () => {
    const n = 200_000;
    const inside = [1e-4, 3e-4, 1e-3, 0.01, ...Array.from({ length: 49 }, (_, i) => (i + 1) / 50)];
    const edges = [0, ...inside, 0.99, 0.999, 0.9997, 0.9999, 1];
    const level = edges.slice(1).map((edge, i) => edge - edges[i]!);
    const spill = shares(THREE, [[n]]);
    const countsOf = (values: Float64Array): number[] => {
      const counts = level.map(() => 0);
      for (const share of values) counts[edges.findIndex((edge) => share < edge) - 1]!++;
      return counts;
    };
    for (let j = 0; j < 3; j++) {
      const values = columnOf(spill, j);
      expect(values.every((share) => 0 < share && share < 1)).toBe(true);
      expect(goodnessOfFit(countsOf(values), level)).toBeGreaterThan(FALSE_ALARM);
      expect(distanceFromUniform(values)).toBeLessThan(distanceLimit(n));
    }
    // A power of a share is not uniform: χ² of 0.03² · n · 1 = 180 more, and a distance of 0.011.
    const wide = columnOf(spill, 1).map((share) => share ** 1.03);
    expect(goodnessOfFit(countsOf(wide), level)).toBeLessThan(FALSE_ALARM);
    expect(distanceFromUniform(wide)).toBeGreaterThan(distanceLimit(n));
  });

  it('through quantile is draws of the shape, column by column [law]', () => {
    const n = 10_000;
    const shapes: readonly (readonly [string, Range])[] = [
      ['EXP(-0.5*((x-4)/1.3)^2)', [[0, 12]]],
      ['x*EXP(-x)', [[0, 'unbounded']]],
    ];
    for (const [formula, limits] of shapes) {
      const spill = shares(THREE, [[n]]);
      for (let j = 0; j < 3; j++) {
        const own: Range = spill.map((row) => [row[j]!]);
        const values = quantile([[formula]], limits, own, null, []);
        const back = columnOf(below([[formula]], limits, values, []), 0);
        const bins = 100;
        const counts = new Float64Array(bins);
        for (const share of back) counts[Math.min(bins - 1, Math.floor(share * bins))]!++;
        const level = Array.from({ length: bins }, () => 1 / bins);
        expect(goodnessOfFit(counts, level)).toBeGreaterThan(FALSE_ALARM);
        expect(distanceFromUniform(back)).toBeLessThan(distanceLimit(n));
        // Against a shape a quarter wider both are far off.
        const other = formula.replace('1.3', '1.625').replace('(-x)', '(-x/1.25)');
        const off = columnOf(below([[other]], limits, values, []), 0);
        expect(distanceFromUniform(off)).toBeGreaterThan(distanceLimit(n));
      }
    }
  });

  it('has a row that depends on its own number alone, and a column on those before it [law]', () => {
    const long = shares(THREE, [[9000]]);
    expect(shares(THREE, [[100]])).toEqual(long.slice(0, 100));
    expect(shares(THREE, [[4090, 9000]])).toEqual(long.slice(4089));
    const two = shares(
      [
        [1, 0.8],
        [0.8, 1],
      ],
      [[50]],
    );
    expect(two).toEqual(long.slice(0, 50).map((row) => row.slice(0, 2)));
  });

  it('shares no random numbers with another label, nor with DRAW [law]', () => {
    const n = 40_000;
    const limit = Z_FALSE_ALARM / Math.sqrt(n);
    const spill = shares(THREE, [[n]]);
    const other = shares(THREE, [[n]], [['other']]);
    const plain = draw([['1']], [[0, 1]], [[n]], SEED, LABEL, []);
    const mixed = spill.map((row, i): Cell[] => [row[0]!, other[i]![0]!, plain[i]![0]!]);
    expect(Math.abs(between(mixed, 0, 1))).toBeLessThan(limit);
    expect(Math.abs(between(mixed, 0, 2))).toBeLessThan(limit);
    expect(Math.abs(between(spill, 0, 2))).toBeGreaterThan(limit);
  });

  it('passes over a row and a column of names [law]', () => {
    const names = ['harvest', 'price', 'days'];
    const named: Range = [['', ...names], ...THREE.map((row, i) => [names[i]!, ...row])];
    expect(shares(named, [[20]])).toEqual(shares(THREE, [[20]]));
    expect(shares([names, ...THREE], [[20]])).toEqual(shares(THREE, [[20]]));
  });

  it('answers an impossible matrix with one that is possible [law]', () => {
    const impossible: Range = [
      [1, 0.9, -0.9],
      [0.9, 1, 0.9],
      [-0.9, 0.9, 1],
    ];
    const message = messageOf(() => shares(impossible, [[5]]));
    expect(message).toBe(
      'rankcorrelations (argument 1): no columns can have all of these together; the nearest possible ones are {1,0.4824,-0.4824;0.4824,1,0.4824;-0.4824,0.4824,1}.',
    );
    const offered = /\{(.*)\}/
      .exec(message)![1]!
      .split(';')
      .map((row) => row.split(',').map(Number));
    expect(shares(offered, [[5]])).toHaveLength(5);
    // Twenty columns, each against every other.
    const many = Array.from({ length: 20 }, (_, i) =>
      Array.from({ length: 20 }, (_, j) => (i === j ? 1 : -0.5)),
    );
    const rows = /\{(.*)\}/.exec(messageOf(() => shares(many, [[5]])))![1]!.split(';');
    expect(
      shares(
        rows.map((row) => row.split(',').map(Number)),
        [[5]],
      ),
    ).toHaveLength(5);
  });
});

describe('alignRanks', () => {
  const N = 2000;
  const columns: Range = draw(
    [['EXP(-x)']],
    [[0, 9]],
    [[N]],
    SEED,
    [['harvest', 'price', 'days']],
    [],
  );
  const aligned = (of: Range, matrix: Range = THREE, label: Range = LABEL): Range =>
    alignRanks(of, matrix, SEED, label);
  const sorted = (range: Range, j: number): Float64Array => columnOf(range, j).sort();

  it('keeps the first column, and every other one is a reordering [law]', () => {
    const spill = aligned([['harvest', 'price', 'days'], ...columns]);
    expect(columnOf(spill, 0)).toEqual(columnOf(columns, 0));
    for (const j of [1, 2]) {
      expect(columnOf(spill, j)).not.toEqual(columnOf(columns, j));
      expect(sorted(spill, j)).toEqual(sorted(columns, j));
    }
  });

  it('comes within a hundredth of the wished rank correlations [law]', () => {
    const spill = aligned(columns);
    for (const [i, j, wished] of [
      [0, 1, 0.8],
      [0, 2, 0.4],
      [1, 2, 0.3],
    ] as const) {
      expect(Math.abs(between(spill, i, j) - wished)).toBeLessThan(0.01);
      expect(Math.abs(between(columns, i, j) - wished)).toBeGreaterThan(0.1);
    }
  });

  it('comes within a hundredth where half of the values are equal [law]', () => {
    const spill = aligned(
      columns.map(([a, b, c]) => [Math.max(0.7, a as number), Math.max(0.5, b as number), c!]),
    );
    expect(Math.abs(between(spill, 0, 1) - 0.8)).toBeLessThan(0.01);
    expect(Math.abs(between(spill, 0, 2) - 0.4)).toBeLessThan(0.01);
    // Equal values of the first column come with those of the third in no order.
    const rows = spill.flatMap((row, i) => (row[0] === 0.7 ? [[i, row[2]!]] : []));
    expect(Math.abs(between(rows, 0, 1))).toBeLessThan(Z_FALSE_ALARM / Math.sqrt(rows.length));
  });

  it('depends on seed and label, and leaves a column that is the same in all rows [law]', () => {
    expect(aligned(columns)).toEqual(aligned(columns));
    expect(aligned(columns, THREE, [['other']])).not.toEqual(aligned(columns));
    const apart: Range = [
      [1, 0, 0.4],
      [0, 1, 0],
      [0.4, 0, 1],
    ];
    const spill = aligned(
      columns.map(([a, , c]) => [a!, 5, c!]),
      apart,
    );
    expect(columnOf(spill, 1).every((x) => x === 5)).toBe(true);
    expect(Math.abs(between(spill, 0, 2) - 0.4)).toBeLessThan(0.01);
  });

  it('reaches exactly 1 and -1 [law]', () => {
    const spill = aligned(columns, [
      [1, 1, -1],
      [1, 1, -1],
      [-1, -1, 1],
    ]);
    expect([between(spill, 0, 1), between(spill, 0, 2)]).toEqual([1, -1]);
  });
});

describe('ranks', () => {
  const N = 500;
  const spill = shares(THREE, [[N]]);

  it('is a heading row, then names, correlations, ends of intervals and partners [law]', () => {
    const table = ranks([['harvest', 'price', ''], ...spill], [[0.9]]);
    expect(table[0]).toEqual([
      'rank correlation',
      'harvest',
      'price',
      'column 3',
      'harvest, 90 % interval from',
      'harvest, 90 % interval to',
      'price, 90 % interval from',
      'price, 90 % interval to',
      'column 3, 90 % interval from',
      'column 3, 90 % interval to',
      'moves exactly with',
    ]);
    const price = table[2]!;
    expect(price.slice(0, 2)).toEqual(['price', between(spill, 0, 1)]);
    expect(price[2]).toBe(1);
    expect(price.slice(6, 8)).toEqual([1, 1]);
    const [lo, hi] = [price[4] as number, price[5] as number];
    expect(lo).toBeLessThan(price[1] as number);
    expect(hi).toBeGreaterThan(price[1] as number);
    expect(price.at(-1)).toBe('none');
    expect(ranks(spill, null)).toEqual(ranks(spill, [[0.95]]));
  });

  it('names columns that move exactly together, or against one another [law]', () => {
    const limits = [[0, 9]];
    const [yields, price] = ['EXP(-x)', 'EXP(-x/2)'].map((text) =>
      draw([[text]], limits, [[50]], SEED, [['same']], []),
    );
    const table = ranks(
      [
        ['yield', 'price', 'waste', 'fee'],
        ...yields!.map(([x], i): Cell[] => [x!, price![i]![0]!, 3 - (x as number), 2]),
      ],
      null,
    );
    expect(table.slice(1).map((row) => row.at(-1))).toEqual([
      'price (same label?); waste, the other way round',
      'yield (same label?); waste, the other way round',
      'yield, the other way round; price, the other way round',
      'none',
    ]);
    const fee = table[4]!.slice(1, -1);
    expect(fee).toEqual(fee.map(() => 'same in all rows'));
    // The end inside is that of the next lower value that 50 rows can have, r = 1 − 12/(50·2499):
    // TANH(ATANH(r) − 1.95996·√((1 + r²/2)/47)) = 0.9998066.
    expect(table[1]!.slice(7, 9)).toEqual([expect.closeTo(0.9998066, 7), 1]);
  });

  // 4,000 samples: the share of intervals that hold the correlation is told to ±0.017, and the
  // formula's own error is below a hundredth (Bonett and Wright 2000, from memory).
  it('has 95 % intervals that hold the correlation in 95 % of samples [law]', () => {
    const [samples, n] = [4000, 40];
    const limit = Z_FALSE_ALARM * Math.sqrt((0.95 * 0.05) / samples) + 0.01;
    for (const wished of [0.2, 0.8]) {
      const all = shares(
        [
          [1, wished],
          [wished, 1],
        ],
        [[samples * n]],
      );
      const coverage = (confidence: number): number => {
        let held = 0;
        for (let k = 0; k < samples; k++) {
          const row = ranks(all.slice(k * n, (k + 1) * n), [[confidence]])[1]!;
          if ((row[5] as number) <= wished && wished <= (row[6] as number)) held++;
        }
        return held / samples;
      };
      expect(Math.abs(coverage(0.95) - 0.95)).toBeLessThan(limit);
      expect(Math.abs(coverage(0.9) - 0.95)).toBeGreaterThan(limit);
    }
  });

  it('of three rows has ends that are unbounded [law]', () => {
    expect(
      ranks(
        [
          [1, 2],
          [2, 1],
          [3, 5],
        ],
        null,
      )[1],
    ).toEqual(['column 1', 1, 0.5, 1, 1, 'unbounded', 'unbounded', 'none']);
  });
});

const TWO: Range = [
  [1, 0.5],
  [0.5, 1],
];
const COLUMNS: Range = Array.from({ length: 60 }, (_, i) => [i, (i * 7) % 60]);
const SQUARE =
  'give a square of rank correlations, one row and one column for each input, 1 on the diagonal.';
const refused: readonly (readonly [string, () => unknown, string])[] = [
  [
    'no matrix',
    () => shares([[null]], [[5]]),
    `rankcorrelations (argument 1): it is missing; ${SQUARE}`,
  ],
  [
    'a matrix that is no square',
    () =>
      shares(
        [
          [1, 0.5, 0.2],
          [0.5, 1, 0.1],
        ],
        [[5]],
      ),
    `rankcorrelations (argument 1): 2 rows and 3 columns; ${SQUARE}`,
  ],
  [
    'a text in the matrix',
    () =>
      shares(
        [
          ['', 'a', 'b'],
          ['a', 1, 'high'],
          ['b', 0.5, 1],
        ],
        [[5]],
      ),
    'rankcorrelations (argument 1), row 2, column 3: "high" is not a number; give a number.',
  ],
  [
    'names in another order',
    () =>
      shares(
        [
          ['', 'a', 'b'],
          ['b', 1, 0.5],
          ['a', 0.5, 1],
        ],
        [[5]],
      ),
    'rankcorrelations (argument 1), row 2: its name is "b", that of column 2 is "a"; give rows and columns the same names in the same order.',
  ],
  [
    'another diagonal',
    () =>
      shares(
        [
          [1, 0.5],
          [0.5, 0.9],
        ],
        [[5]],
      ),
    'rankcorrelations (argument 1), row 2, column 2: 0.9 is on the diagonal; give 1: a column moves with itself.',
  ],
  [
    'percentages',
    () =>
      shares(
        [
          [1, 60],
          [60, 1],
        ],
        [[5]],
      ),
    'rankcorrelations (argument 1), row 1, column 2: 60 is not between -1 and 1; write 0.6 or 60%.',
  ],
  [
    'a number just outside',
    () =>
      shares(
        [
          [1, -1.2],
          [-1.2, 1],
        ],
        [[5]],
      ),
    'rankcorrelations (argument 1), row 1, column 2: -1.2 is not between -1 and 1; give a number from -1 to 1.',
  ],
  [
    'a number far outside',
    () =>
      shares(
        [
          [1, 1e6],
          [1e6, 1],
        ],
        [[5]],
      ),
    'rankcorrelations (argument 1), row 1, column 2: 1000000 is not between -1 and 1; give a number from -1 to 1.',
  ],
  [
    'two sides that differ',
    () =>
      shares(
        [
          [1, 0.5],
          [0.4, 1],
        ],
        [[5]],
      ),
    'rankcorrelations (argument 1), row 2, column 1: 0.4 differs from 0.5 on the other side of the diagonal; give the same number on both sides.',
  ],
  [
    'no rows',
    () => shares(TWO, [[0]]),
    'rows (argument 2): they are missing; give a whole number from 1 to 1048575.',
  ],
  [
    'no seed',
    () => linkedShares(TWO, [[5]], null, LABEL),
    'seed (argument 3): it is blank; give a text or a number other than 0, so that the draws can be rebuilt.',
  ],
  [
    'a text among the columns',
    () =>
      alignRanks(
        [
          ['a', 'b'],
          [1, 2],
          [3, 'many'],
          [4, 5],
        ],
        TWO,
        SEED,
        LABEL,
      ),
    'columns (argument 1), row 3, column 2: "many" is not a number; give a number.',
  ],
  [
    'a matrix for other columns',
    () => alignRanks(COLUMNS, THREE, SEED, LABEL),
    'rankcorrelations (argument 2): 3 rows for 2 columns of values; give one row and one column for each column of values.',
  ],
  [
    'a constant column with a wish',
    () =>
      alignRanks(
        COLUMNS.map(([a]) => [a!, 7]),
        TWO,
        SEED,
        LABEL,
      ),
    'columns (argument 1): column 2 is the same in all rows, so it has no rank correlation with column 1; give 0 instead of 0.5, or leave the column out.',
  ],
  [
    'two rows',
    () =>
      alignRanks(
        [
          [1, 2],
          [2, 1],
        ],
        TWO,
        SEED,
        LABEL,
      ),
    'columns (argument 1): 2 rows are too few to reorder; give more rows.',
  ],
  // One value of 60 apart from the rest: sorted like the other column the rank correlation is
  // ρ = √(3·(1/60)·(59/60))/√(1 − 1/60²) = 0.2218.
  [
    'ties that allow less',
    () =>
      alignRanks(
        COLUMNS.map(([a], i) => [a!, i === 9 ? 1 : 0]),
        TWO,
        SEED,
        LABEL,
      ),
    'rankcorrelations (argument 2): columns 1 and 2 reach 0.222 instead of 0.5; ties let them reach 0.222 at most; give no more than that.',
  ],
  [
    'few rows',
    () => alignRanks(COLUMNS.slice(0, 4), TWO, SEED, [['few']]),
    'rankcorrelations (argument 2): columns 1 and 2 reach 0.4 instead of 0.5; give 0.4, more rows, or another label.',
  ],
  [
    'a confidence in percent',
    () => ranks(COLUMNS, [[95]]),
    'confidence (argument 2): 95 is not between 0 and 1; write 0.95 or 95%.',
  ],
];

describe('linkedShares, alignRanks and ranks', () => {
  it.each(refused)('with %s say where and what [law]', (_, call, message) => {
    expect(messageOf(call)).toBe(message);
  });

  it('with an error value are that error [law]', () => {
    const bad: Range = [
      [1, { error: '#N/A' }],
      [0.5, 1],
    ];
    expect(() => shares(bad, [[5]])).toThrow(CellErrorPassed);
    expect(() => alignRanks(bad, TWO, SEED, LABEL)).toThrow(CellErrorPassed);
    expect(() => ranks(bad, null)).toThrow(CellErrorPassed);
  });
});
