/**
 * What columns that belong together cost, at 100,000 rows, as ratios to sorting one column of
 * that length in the same run (medians of processor time, the runs taking turns).
 */
import type { Cell, Range } from '../../src/index';
import { cases, draw, each, pick, thin } from '../../src/index';
import { inTurn, median, printTable, seconds } from './timing';

const N = 100_000;
const ROUNDS = 9;
const SEED = [['plan-2027']];
const DENSITY = [['EXP(-0.5*((x-m)/s)^2)']];
const LIMITS = [[0, 12]];
const GIVENS: Range[] = [[['s', 1.3]]];

const column = draw([['EXP(-x)']], [[0, 9]], [[N]], SEED, [['column']], []);
const numbers = Float64Array.from(column, ([x]) => x as number);
const table: Range = column.map(([x], i): Cell[] => [`season ${i}`, x!, i]);

let round = 0;
/** Another label for every round, so that no result is kept from the one before. */
const label = (): Range => [[`press ${round++}`]];

const runs: readonly (readonly [string, number, () => unknown])[] = [
  ['sorting', 1, () => Float64Array.from(numbers).sort()],
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

const times = inTurn(
  runs.map(([, , run]) => run),
  ROUNDS,
).map(median);
printTable([
  ['at 100,000 rows', 'ms', 'ratio to sorting'],
  ...runs.map(([name, parts], i) => [
    name,
    ((1000 * times[i]!) / parts).toFixed(1),
    (times[i]! / parts / times[0]!).toFixed(2),
  ]),
]);

const lines: Range = [['m'], ...column.slice(0, 20_000)];
const took = seconds(() => void each(DENSITY, LIMITS, SEED, label(), lines, GIVENS));
console.log(`EACH of 20,000 different lines: ${took.toFixed(1)} s`);
