/**
 * What columns that belong together cost, at 100,000 rows, as ratios to sorting one column of
 * that length in the same run (medians of processor time, the runs taking turns): the cells' values
 * by comparison, as cells are sorted, and as bare doubles, the fastest way there is.
 */
import type { Cell, Range } from '../../src/index';
import { cases, draw, each, pick, stratified, thin, total } from '../../src/index';
import { inTurn, median, printTable, seconds } from './timing';

const N = 100_000;
const ROUNDS = 31;
const SEED = [['plan-2027']];
const DENSITY = [['EXP(-0.5*((x-m)/s)^2)']];
const LIMITS = [[0, 12]];
const GIVENS: Range[] = [[['s', 1.3]]];
const HUMP: Range[] = [
  [
    ['m', 4],
    ['s', 1.3],
  ],
];
const COUNTED: Range = [['x', 0, 'unbounded', 1]];

const column = draw([['EXP(-x)']], [[0, 9]], [[N]], SEED, [['column']], []);
const numbers = Float64Array.from(column, ([x]) => x as number);
const table: Range = column.map(([x], i): Cell[] => [`season ${i}`, x!, i]);

let round = 0;
/** Another label for every round, so that no result is kept from the one before. */
const label = (): Range => [[`press ${round++}`]];

const runs: (readonly [string, number, () => unknown])[] = [
  ['sorting by comparison', 1, () => Array.from(numbers).sort((a, b) => a - b)],
  ['sorting doubles', 1, () => Float64Array.from(numbers).sort()],
  ['PICK', 1, () => pick(table, column, [[N]], SEED, label())],
  ['THIN', 1, () => thin(table, column, SEED, label(), [[9]])],
  [
    'CASES, a case of 4',
    4,
    () =>
      cases(
        DENSITY,
        LIMITS,
        [[N]],
        SEED,
        label(),
        [
          ['presses', 1, 2, 3, 4],
          ['m', 6, 5, 4, 3],
        ],
        GIVENS,
      ),
  ],
  [
    'EACH, 10 different lines',
    1,
    () =>
      each(
        DENSITY,
        LIMITS,
        SEED,
        label(),
        [['m'], ...column.map((_, i) => [3 + (i % 10) / 5])],
        GIVENS,
      ),
  ],
];

const counts: Range = column.map((_, i) => [i % 11]);
runs.push(
  ['STRATIFIED', 1, () => stratified(DENSITY, LIMITS, [[N]], SEED, label(), HUMP)],
  ['DRAW', 1, () => draw(DENSITY, LIMITS, [[N]], SEED, label(), HUMP)],
  [
    'DRAW of counted values',
    1,
    () => draw([['POISSON.DIST(x,6.5,FALSE)']], COUNTED, [[N]], SEED, label(), []),
  ],
  ['TOTAL, 500,000 draws', 1, () => total(counts, DENSITY, LIMITS, null, SEED, label(), HUMP)],
  [
    'TOTAL, 500,000 draws with each',
    1,
    () => total(counts, DENSITY, LIMITS, [['MIN(x,5)']], SEED, label(), HUMP),
  ],
);

const times = inTurn(
  runs.map(([, , run]) => run),
  ROUNDS,
).map(median);
printTable([
  ['at 100,000 rows', 'ms', 'ratio to sorting by comparison', 'to sorting doubles'],
  ...runs.map(([name, parts], i) => [
    name,
    ((1000 * times[i]!) / parts).toFixed(1),
    ...[0, 1].map((sorting) => (times[i]! / parts / times[sorting]!).toFixed(2)),
  ]),
]);

const lines: Range = [['m'], ...column.slice(0, 20_000)];
const took = seconds(() => void each(DENSITY, LIMITS, SEED, label(), lines, GIVENS));
console.log(`EACH of 20,000 different lines: ${took.toFixed(1)} s`);

/** The variance of many numbers. */
function variance(values: readonly number[]): number {
  const mean = values.reduce((a, b) => a + b, 0) / values.length;
  return values.reduce((sum, x) => sum + (x - mean) ** 2, 0) / (values.length - 1);
}

const shifted = (m: number, of: string): number[] =>
  draw(
    DENSITY,
    LIMITS,
    [[N]],
    SEED,
    [[of]],
    [
      [
        ['m', m],
        ['s', 1.3],
      ],
    ],
  ).flat() as number[];

// The rows that a difference of means needs are in proportion to the variance of one difference.
const before = shifted(4, 'harvest');
const differences = (after: readonly number[]): number =>
  variance(after.map((x, i) => x - before[i]!));
const saved = differences(shifted(4.2, 'other')) / differences(shifted(4.2, 'harvest'));
console.log(
  `a mean moved by 5 %: paired columns need ${saved.toFixed(1)} times fewer rows (20 wanted)`,
);

const ROWS = 1000;
const SEEDS = 400;
const meansOf = (of: (seed: Range) => Range): number[] =>
  Array.from({ length: SEEDS }, (_, seed) => {
    const values = of([[seed + 1]]).flat() as number[];
    return values.reduce((a, b) => a + b, 0) / ROWS;
  });
const even = meansOf((seed) => stratified(DENSITY, LIMITS, [[ROWS]], seed, [['harvest']], HUMP));
const plain = meansOf((seed) => draw(DENSITY, LIMITS, [[ROWS]], seed, [['harvest']], HUMP));
const ratio = Math.sqrt(variance(even) / variance(plain));
console.log(
  `STRATIFIED at ${ROWS} rows: standard error of the mean ${ratio.toFixed(3)} of DRAW's over ${SEEDS} seeds (0.2 at most wanted)`,
);
