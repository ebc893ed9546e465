import type { Range } from '../../src/index';
import { acceptance, draw, envelope, profile } from '../../src/index';
import { frozen } from '../density/shapes';
import { SHAPES } from './shapes';

const SEED = [['plan-2027']];
const LABEL = [['press']];
const HUMP = [['EXP(-0.5*((x-4)/1.3)^2)']];
const LIMITS = [[0, 12]];
const BLOCK: Range = [
  ['density', 'EXP(-0.5*((x-m)/s)^2)'],
  ['from', 0],
  ['to', 12],
  ['rows', 50],
  ['seed', 'plan-2027'],
  ['label', 'press'],
  ['m', 4],
  ['s', 1.3],
];
const drawBlock = (
  block: Range,
  rows: Range | null = null,
  seed: Range | null = null,
  label: Range | null = null,
): Range => draw(block, null, rows, seed, label, []);

describe('draw', () => {
  it.each(SHAPES.map((shape) => [shape.name, shape] as const))(
    'of %s is one column of numbers within its limits [law]',
    (_, { density, limits, givens }) => {
      const values = draw(density, limits, [[500]], SEED, LABEL, givens);
      expect(values).toHaveLength(500);
      expect(values.every((row) => row.length === 1)).toBe(true);
      const pieces = envelope(density, limits, givens).slice(1) as unknown as number[][];
      const [from, to] = [pieces[0]![0]!, pieces.at(-1)![1]!];
      expect(values.every(([x]) => (x as number) >= from && (x as number) <= to)).toBe(true);
      expect(new Set(values.flat()).size).toBe(500);
    },
  );

  it('has a row that depends on its own number alone [law]', () => {
    const long = draw(HUMP, LIMITS, [[300]], SEED, LABEL, []);
    expect(draw(HUMP, LIMITS, [[100]], SEED, LABEL, [])).toEqual(long.slice(0, 100));
    expect(draw(HUMP, LIMITS, [[101, 300]], SEED, LABEL, [])).toEqual(long.slice(100));
    expect(draw(HUMP, LIMITS, [[200], [200]], SEED, LABEL, [])).toEqual([long[199]]);
  });

  it('has a column that depends on its own label alone [law]', () => {
    const labels = [['press', 'harvest', 'bottles']];
    const together = draw(HUMP, LIMITS, [[40]], SEED, labels, []);
    expect(together.every((row) => row.length === 3)).toBe(true);
    labels[0]!.forEach((label, j) => {
      const alone = draw(HUMP, LIMITS, [[40]], SEED, [[label]], []);
      expect(together.map((row) => row[j])).toEqual(alone.map((row) => row[0]));
    });
    const down = draw(HUMP, LIMITS, [[40]], SEED, [['press'], ['harvest'], ['bottles']], []);
    expect(down).toEqual(together);
  });

  it('draws other numbers for another seed or label [law]', () => {
    const one = draw(HUMP, LIMITS, [[20]], SEED, LABEL, []).flat();
    for (const [seed, label] of [
      ['plan-2028', 'press'],
      ['plan-2027', 'Press 2'],
    ]) {
      const other = draw(HUMP, LIMITS, [[20]], [[seed!]], [[label!]], []).flat();
      expect(other.filter((x) => one.includes(x))).toEqual([]);
    }
    expect(draw(HUMP, LIMITS, [[20]], [[' PLAN-2027 ']], [['Press']], []).flat()).toEqual(one);
  });

  it('draws a column per column of heights under its heading, the label before it [law]', () => {
    const table = [
      ['x', 'early', 'late'],
      [0, 1, 0],
      [1, 0, 2],
    ];
    const both = draw(table, null, [[30]], SEED, null, []);
    const early = draw(
      [
        ['x', 'early'],
        [0, 1],
        [1, 0],
      ],
      null,
      [[30]],
      SEED,
      null,
      [],
    );
    const late = draw(
      [
        ['x', 'h'],
        [0, 0],
        [1, 2],
      ],
      null,
      [[30]],
      SEED,
      [['late']],
      [],
    );
    expect(both.map((row) => [row[0]])).toEqual(early);
    expect(both.map((row) => [row[1]])).toEqual(late);
    const labelled = draw(table, null, [[30]], SEED, [['apples']], []);
    const alone = draw(
      [
        [0, 1],
        [1, 0],
      ],
      null,
      [[30]],
      SEED,
      [['apples early']],
      [],
    );
    expect(labelled.map((row) => [row[0]])).toEqual(alone);
  });

  it('draws a line of a shape list as its own block does [law]', () => {
    const list: Range = [
      ['label', 'density', 'from', 'to', 'm'],
      ['press', 'EXP(-x/m)', 0, 9, 4],
      ['harvest', 'm+x', 0, 1, 2],
    ];
    const both = draw(list, null, [[25]], SEED, null, []);
    const alone = draw([['2+x']], [[0, 1]], [[25]], SEED, [['harvest']], []);
    expect(both.map((row) => [row[1]])).toEqual(alone);
  });

  it('draws of a block what the same arguments draw, and explicit ones win [law]', () => {
    const givens = [
      ['m', 4],
      ['s', 1.3],
    ];
    const plain = draw([['EXP(-0.5*((x-m)/s)^2)']], LIMITS, [[50]], SEED, LABEL, [givens]);
    expect(drawBlock(BLOCK)).toEqual(plain);
    expect(drawBlock([...BLOCK].reverse())).toEqual(plain);
    expect(drawBlock(BLOCK, [[20]])).toEqual(plain.slice(0, 20));
    expect(drawBlock(BLOCK, null, [['other']])).not.toEqual(plain);
    expect(drawBlock(BLOCK, null, null, [['harvest']])).toEqual(
      draw([['EXP(-0.5*((x-m)/s)^2)']], LIMITS, [[50]], SEED, [['harvest']], [givens]),
    );
    expect(
      draw(BLOCK, [[0, 5]], null, null, null, [])
        .flat()
        .every((x) => (x as number) <= 5),
    ).toBe(true);
    // A blank cell as argument is an argument left out, whatever the host makes of it.
    for (const blank of [null, '', 0])
      expect(drawBlock(BLOCK, [[blank]], [[blank]], [[blank]])).toEqual(plain);
  });

  it('of a product of lines is that of the product in one line [law]', () => {
    // Paired in distribution only: the two envelopes differ, so shares are compared.
    const n = 4000;
    const share = (density: Range): number =>
      draw(density, [[0, 5]], [[n]], SEED, LABEL, []).filter(([x]) => (x as number) < 1).length / n;
    const [one, lines] = [share([['EXP(-x)*x']]), share([['EXP(-x)'], ['x']])];
    // Each within 4.9 standard deviations, √(pq/n) ≤ 0.0079, of one share: false alarm 1e-6 each.
    expect(Math.abs(one - lines)).toBeLessThan(2 * 4.9 * 0.0079);
    const whole = share([['EXP(-x)*x'], ['x<1']]);
    expect(whole).toBe(1);
  });

  it('gives the same bits when called again, in any order and from a cold start [law]', () => {
    const call = (engine: { draw: typeof draw }): string =>
      JSON.stringify(
        SHAPES.map(({ density, limits, givens }) =>
          engine.draw(density, limits, [[200]], SEED, LABEL, givens),
        ),
      );
    const first = call({ draw });
    expect(call({ draw })).toBe(first);
    jest.isolateModules(() => {
      // eslint-disable-next-line @typescript-eslint/no-require-imports
      const cold = require('../../src/index') as { draw: typeof draw };
      for (const { density, limits, givens } of [...SHAPES].reverse())
        cold.draw(density, limits, [[3]], SEED, LABEL, givens);
      expect(call(cold)).toBe(first);
    });
  });

  it('writes into none of its arguments, and its answer may be written into [law]', () => {
    const [block, limits] = [frozen(BLOCK), frozen(LIMITS)];
    const answer = draw(block, limits, frozen([[5]]), frozen(SEED), frozen(LABEL), [
      frozen([['k', 1]]),
    ]);
    const again = (): Range => draw(block, limits, [[5]], SEED, LABEL, [[['k', 1]]]);
    const before = JSON.stringify(answer);
    (answer as number[][]).forEach((row) => (row[0] = NaN));
    expect(JSON.stringify(again())).toBe(before);
  });

  it('draws 100,000 rows of 10 labels, and of a table of 100,000 points [law]', () => {
    const labels = [Array.from({ length: 10 }, (_, i) => `input ${i + 1}`)];
    const many = draw(HUMP, LIMITS, [[100_000]], SEED, labels, []);
    expect([many.length, many[0]!.length]).toEqual([100_000, 10]);
    const table = Array.from({ length: 100_000 }, (_, i) => [i, (i * 7919) % 101]);
    const drawn = draw(table, null, [[1000]], SEED, LABEL, []);
    // The mean of heights spread evenly over 0 … 99,999 is near the middle: 4.9 standard errors, 1e-6.
    const mean = drawn.reduce((sum, [x]) => sum + (x as number), 0) / 1000;
    expect(Math.abs(mean - 50_000)).toBeLessThan(
      (4.9 * (100_000 / Math.sqrt(12))) / Math.sqrt(1000),
    );
  });
});

describe('these draws', () => {
  it('stay what they are [pinned]', () => {
    const harvest = [
      ['tonnes', 'harvest'],
      [0, 0],
      [4, 3],
      [4, 1],
      [9, 0],
    ];
    expect(draw(harvest, null, [[4]], SEED, null, [])).toEqual([
      [6.219715247965813],
      [2.3652102686444536],
      [2.5498547916847047],
      [0.7355880585026734],
    ]);
    expect(draw(HUMP, LIMITS, [[4]], SEED, [['downtime']], [])).toEqual([
      [5.909825273035344],
      [3.3563608995466114],
      [3.1573695057050832],
      [5.159691937417467],
    ]);
  });
});

describe('the four functions', () => {
  it('answer the same again after one another [law]', () => {
    const args = [HUMP, LIMITS, [[100]], SEED, LABEL, []] as const;
    const all = (): string =>
      JSON.stringify([
        draw(...args),
        acceptance(...args),
        envelope(HUMP, LIMITS, []),
        profile(HUMP, LIMITS, null, []),
      ]);
    const first = all();
    draw([['x']], [[0, 1]], [[10]], SEED, LABEL, []);
    expect(all()).toBe(first);
  });
});
