/**
 * What linked columns cost at 100,000 rows and 5 columns, as ratios to sorting one column of that
 * length in the same run (medians of processor time, the runs taking turns). Fails where the
 * promised ratios do not hold.
 */
import type { Range } from '../../src/index';
import { alignRanks, draw, linkedShares, ranks } from '../../src/index';
import { inTurn, median, printTable } from './timing';

const N = 100_000;
const ROUNDS = 15;
const SEED = [['plan-2027']];
const MOST_TO_SORTING = 15;

/** Each column with the next ones, less and less. */
const matrix: Range = Array.from({ length: 5 }, (_, i) =>
  Array.from({ length: 5 }, (_, j) => [1, 0.7, 0.5, 0.3, 0.2][Math.abs(i - j)]!),
);
const columns = draw(
  [['EXP(-x)']],
  [[0, 9]],
  [[N]],
  SEED,
  [['harvest', 'price', 'presses', 'bottles', 'days']],
  [],
);
const numbers = Float64Array.from(columns, ([x]) => x as number);

let round = 0;
const label = (): Range => [[`link ${round++}`]];

const runs: readonly (readonly [string, number | null, () => unknown])[] = [
  ['sorting', null, () => Float64Array.from(numbers).sort()],
  ['LINKEDSHARES', MOST_TO_SORTING, () => linkedShares(matrix, [[N]], SEED, label())],
  ['ALIGNRANKS', MOST_TO_SORTING, () => alignRanks(columns, matrix, SEED, label())],
  ['RANKS', null, () => ranks(columns, null)],
];

const times = inTurn(
  runs.map(([, , run]) => run),
  ROUNDS,
).map(median);
const ratios = times.map((time) => time / times[0]!);
printTable([
  ['at 100,000 rows, 5 columns', 'ms', 'ratio to sorting', 'promised'],
  ...runs.map(([name, most], i) => [
    name,
    (1000 * times[i]!).toFixed(1),
    ratios[i]!.toFixed(2),
    most === null ? '' : `at most ${most}`,
  ]),
]);
const isFast = runs.every(([, most], i) => most === null || ratios[i]! <= most);
console.log(`Promised ratios: ${isFast ? 'kept' : 'NOT KEPT'}`);
if (!isFast) process.exitCode = 1;
