/**
 * Draws a second at 10^6 rows on one thread, beside two yardsticks of the same run: an
 * approximate inverse table of 1,000 points (binary search, Math.random), and filling the
 * array with Math.random(). Fails where the promised ratios do not hold.
 */
import { Drawer } from '../../src/draw/column';
import { draw } from '../../src/index';
import { keyOf } from '../../src/random/key';
import type { Target } from '../draw/targets';
import { targets } from '../draw/targets';
import { inTurn, median, printTable } from './timing';

const ROWS = 1_000_000;
const ROUNDS = 15;
const POINTS = 1000;
const LEAST_OF_TABLE = 1.2;
const LEAST_OF_FILL = 0.15;

/** Cumulative shares at evenly spaced places. */
function inverseTable({ from, to, areaBelow }: Target): { x: Float64Array; below: Float64Array } {
  const x = Float64Array.from(
    { length: POINTS },
    (_, i) => from + ((to - from) * i) / (POINTS - 1),
  );
  const whole = areaBelow(to) - areaBelow(from);
  return { x, below: x.map((at) => (areaBelow(at) - areaBelow(from)) / whole) };
}

function fromTable(x: Float64Array, below: Float64Array, out: Float64Array): void {
  for (let k = 0; k < out.length; k++) {
    const u = Math.random();
    let lo = 0;
    let hi = x.length - 1;
    while (hi - lo > 1) {
      const mid = (lo + hi) >> 1;
      if (below[mid]! <= u) lo = mid;
      else hi = mid;
    }
    const share = (u - below[lo]!) / (below[hi]! - below[lo]!);
    out[k] = x[lo]! + (x[hi]! - x[lo]!) * share;
  }
}

let label = 0;
const lines: (string | number)[][] = [
  ['draws from', '× inverse table', '× filling', 'million a second', 'table', 'filling'],
];
let isFast = true;
for (const target of targets) {
  const drawer = new Drawer(target.envelope());
  const { x, below } = inverseTable(target);
  const out = new Float64Array(ROWS);
  const key = keyOf('plan-2027', 'bench');
  const [ours, table, fill] = inTurn(
    [
      () => drawer.column(key, 1, ROWS),
      () => fromTable(x, below, out),
      () => {
        for (let k = 0; k < out.length; k++) out[k] = Math.random();
      },
    ],
    ROUNDS,
  ).map(median);
  const [ofTable, ofFill] = [table! / ours!, fill! / ours!];
  isFast &&= ofTable >= LEAST_OF_TABLE && ofFill >= LEAST_OF_FILL;
  const rate = (time: number): string => (ROWS / time / 1e6).toFixed(1);
  lines.push([
    target.name,
    ofTable.toFixed(2),
    ofFill.toFixed(3),
    rate(ours!),
    rate(table!),
    rate(fill!),
  ]);
}
printTable(lines);

// What the worksheet function adds: one row of cells for every draw.
const [spilled] = inTurn(
  [
    () =>
      draw(
        [['0.6*EXP(-0.5*(x-2)^2)+0.4*EXP(-2*(x-7)^2)']],
        [[0, 10]],
        [[ROWS]],
        [['plan-2027']],
        [[`bench ${++label}`]],
        [],
      ),
  ],
  5,
).map(median);
console.log(
  `\nDRAW as rows of cells: ${(ROWS / spilled! / 1e6).toFixed(1)} million a second, ${(spilled! * 1000).toFixed(0)} ms for ${ROWS} rows`,
);
console.log(
  `Promised: ${LEAST_OF_TABLE} × the inverse table, ${LEAST_OF_FILL} × filling: ${isFast ? 'kept' : 'NOT KEPT'}`,
);
if (!isFast) process.exitCode = 1;
