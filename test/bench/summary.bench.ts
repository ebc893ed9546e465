/**
 * From a column of draws to its figures: the time of SUMMARY and its kin for 100,000 rows, as a
 * multiple of the time of sorting one such column in the same run. Fails above the promised ratio.
 */
import type { Range } from '../../src/index';
import { bestOf, draw, exceedance, pairedChange, rowsNeeded, summary } from '../../src/index';
import { inTurn, median, printTable } from './timing';

const ROWS = 100_000;
const ROUNDS = 15;
const MOST = 3;

const columnOf = (label: string): Range =>
  draw(
    [['0.6*EXP(-0.5*(x-2)^2)+0.4*EXP(-2*(x-7)^2)']],
    [[0, 10]],
    [[ROWS]],
    [['plan-2027']],
    [[label]],
    [],
  );
const [column, other] = [columnOf('harvest'), columnOf('press')];
const numbers = Float64Array.from(column, (row) => row[0] as number);
const threeCases: Range = column.map((row, i) => [row[0]!, other[i]![0]!, 3.5]);
const isLate: Range = column.map((row) => [(row[0] as number) > 6]);

const runs: readonly (readonly [name: string, run: () => unknown])[] = [
  ['SUMMARY', () => summary(column, null, null, null)],
  ['SUMMARY with weights', () => summary(column, null, null, other)],
  ['EXCEEDANCE', () => exceedance(column, [[6]], null, null)],
  ['EXCEEDANCE of TRUE', () => exceedance(isLate, null, null, null)],
  ['EXCEEDANCE with weights', () => exceedance(column, [[6]], null, other)],
  ['ROWSNEEDED, mean', () => rowsNeeded(column, null, [[0.01]], null)],
  ['ROWSNEEDED, P95', () => rowsNeeded(column, [[0.95]], [[0.01]], null)],
  ['PAIREDCHANGE', () => pairedChange(column, other, null)],
  ['BESTOF of three', () => bestOf(threeCases, [[true]], null)],
];
const [sort, ...times] = inTurn(
  [
    () => void numbers.slice().sort(),
    ...runs.map(
      ([, run]) =>
        () =>
          void run(),
    ),
  ],
  ROUNDS,
).map(median);

printTable([
  ['function', '× sorting', 'milliseconds'],
  ...runs.map(([name], i) => [name, (times[i]! / sort!).toFixed(2), (times[i]! * 1000).toFixed(1)]),
]);
const isFast = times.every((time) => time / sort! <= MOST);
console.log(
  `\nSorting ${ROWS} numbers: ${(sort! * 1000).toFixed(1)} ms. Promised: ≤ ${MOST} × that: ${isFast ? 'kept' : 'NOT KEPT'}`,
);
if (!isFast) process.exitCode = 1;
