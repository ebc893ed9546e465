/**
 * Regions and densities of several variables: boxes, acceptance, time to build, and draws a
 * second as a ratio to the normal density of one variable in the same run. Fails where the
 * promised acceptances or ratios do not hold.
 */
import { Drawer } from '../../src/draw/column';
import { BoxDrawer } from '../../src/draw/several';
import { proveBoxes } from '../../src/envelope/boxes';
import { keyOf } from '../../src/random/key';
import { axesOf, joint, type AxisText } from '../envelope/boxProof';
import { proved } from '../envelope/proved';
import { inTurn, median, printTable, seconds } from './timing';

const ROWS = 100_000;
const ROUNDS = 7;
/** Of the one-variable speed, in two and three variables. */
const LEAST_RATIO = 1 / 15;

interface Case {
  readonly name: string;
  readonly text: string;
  readonly axes: readonly AxisText[];
  readonly least?: number;
}

const axes = (names: string, from: number, to: number, step = 0): readonly AxisText[] =>
  [...names].map((name) => [name, from, to, step] as const);

/** EXP(-½ xᵀP x) with P the inverse of the matrix of equal correlations ρ between n variables. */
function gaussian(names: string, rho: number): string {
  const n = names.length;
  const whole = (1 - rho) * (1 + (n - 1) * rho);
  const own = (1 + (n - 2) * rho) / whole;
  const cross = rho / whole;
  const squares = [...names].map((name) => `${name}^2`).join('+');
  const pairs = [...names].flatMap((a, i) => [...names].slice(i + 1).map((b) => `${a}*${b}`));
  return `EXP(-0.5*(${own}*(${squares})-${2 * cross}*(${pairs.join('+')})))`;
}

const CASES: readonly Case[] = [
  { name: 'disc', text: 'a^2+b^2<=1', axes: axes('ab', -1, 1), least: 0.98 },
  {
    name: 'ring of 1 %',
    text: 'AND(a^2+b^2<=1,a^2+b^2>=0.98)',
    axes: axes('ab', -1, 1),
    least: 0.6,
  },
  { name: 'a+b<=10 AND a*b>=2', text: 'AND(a+b<=10,a*b>=2)', axes: axes('ab', 0, 10) },
  { name: 'ball, 3 variables', text: 'a^2+b^2+p^2<=1', axes: axes('abp', -1, 1) },
  { name: 'simplex, 4 variables', text: 'a+b+p+q<=1', axes: axes('abpq', 0, 1), least: 0.6 },
  { name: 'normal, 2 variables', text: gaussian('ab', 0.8), axes: axes('ab', -6, 6) },
  { name: 'normal, 3 variables', text: gaussian('abp', 0.8), axes: axes('abp', -6, 6), least: 0.9 },
  { name: 'normal, 4 variables', text: gaussian('abpq', 0.8), axes: axes('abpq', -6, 6) },
  {
    name: 'crates, 3 whole numbers',
    text: 'AND(3*a+2*b+p<=100,a>=b-5)',
    axes: [
      ['a', 0, 30, 1],
      ['b', 0, 50, 1],
      ['p', 0, 100, 1],
    ],
  },
];

const key = keyOf('plan-2027', 'bench');
const normal = new Drawer(proved('EXP(-0.5*x^2)', -6, 6));
const lines: (string | number)[][] = [
  ['shape', 'boxes', 'promised', 'acceptance', 'build, s', '× one variable', 'million a second'],
];
let isKept = true;
for (const { name, text, axes: texts, least } of CASES) {
  const shape = joint(text, axesOf(texts));
  let envelope = proveBoxes(shape);
  const build = seconds(() => {
    envelope = proveBoxes(shape);
  });
  const drawer = new BoxDrawer(envelope);
  const { proposals } = drawer.rows(key, 1, ROWS);
  const [several, one] = inTurn(
    [() => drawer.rows(key, 1, ROWS), () => normal.column(key, 1, ROWS)],
    ROUNDS,
  ).map(median);
  const ratio = one! / several!;
  const acceptance = ROWS / proposals;
  const isFast = texts.length > 3 || ratio >= LEAST_RATIO;
  isKept &&= isFast && !(least !== undefined && acceptance < least);
  lines.push([
    name,
    envelope.boxes.length,
    (envelope.lowerMass / envelope.upperMass).toFixed(4),
    acceptance.toFixed(4),
    build.toFixed(2),
    ratio.toFixed(3),
    (ROWS / several! / 1e6).toFixed(2),
  ]);
}
printTable(lines);
console.log(
  `\nPromised: acceptance of disc 0.98, ring 0.6, normal of 3 variables 0.9, simplex 0.6, and 1/15 of the one-variable speed in 2 and 3 variables: ${isKept ? 'kept' : 'NOT KEPT'}`,
);
if (!isKept) process.exitCode = 1;
