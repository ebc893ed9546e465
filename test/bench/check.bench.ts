/**
 * CHECK and DRIVERS at 100,000 rows beside sorting one such column in the same run. Fails where
 * the promised ratios do not hold.
 */
import { check, draw, drivers } from '../../src/index';
import { inTurn, median, printTable } from './timing';

const ROWS = 100_000;
const ROUNDS = 15;
const MOST_OF_CHECK = 8;
const MOST_OF_DRIVERS = 40;
const INPUTS = 10;

const UNBOUNDED = [['unbounded', 'unbounded']];
const shapes: readonly (readonly [string, (string | number)[][]])[] = [
  ['EXP(-(x^2)/2)', UNBOUNDED],
  ['x*EXP(-x)', [[0, 'unbounded']]],
  ['x^-0.5', [[0, 1]]],
  ['T.DIST(x,2,FALSE)', UNBOUNDED],
  ['EXP(-((x-50)^2)/200)*(1+SIN(x)^2)', [[0, 100]]],
];

const lines: (string | number)[][] = [['call', '× sorting a column', 'ms']];
let isFast = true;
const measure = (name: string, call: () => unknown, most: number): void => {
  const column = Float64Array.from({ length: ROWS }, () => Math.random());
  call();
  const [own, sort] = inTurn([call, () => column.slice().sort()], ROUNDS).map(median);
  const ratio = own! / sort!;
  isFast &&= ratio <= most;
  lines.push([name, ratio.toFixed(2), (own! * 1000).toFixed(1)]);
};

for (const [formula, limits] of shapes) {
  const density = [[formula]];
  const values = draw(density, limits, [[ROWS]], [['plan-2027']], [['bench']], []);
  measure(`CHECK of ${formula}`, () => check(values, density, limits, []), MOST_OF_CHECK);
}

const labels = [Array.from({ length: INPUTS }, (_, j) => `input ${j + 1}`)];
const inputs = draw([['1']], [[0, 1]], [[ROWS]], [['plan-2027']], labels, []);
const output = inputs.map((row) => [
  row.reduce<number>((sum, x, j) => sum + (j + 1) * (x as number), 0),
]);
measure(`DRIVERS of ${INPUTS} inputs`, () => drivers(inputs, output), MOST_OF_DRIVERS);

printTable(lines);
if (!isFast) process.exitCode = 1;
