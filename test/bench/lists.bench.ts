/**
 * What lists, function tables and shape lists cost: the build of a proof on first use
 * ("cold", in a process where other shapes have been proved before), its pieces and its
 * acceptance; a shape list of 200 inputs with 1,000 rows each, first and again.
 */
import type { Cell, Range } from '../../src/index';
import { draw } from '../../src/index';
import { DRAW_PLACES } from '../../src/worksheet/request';
import { readShapes } from '../../src/density/shape';
import { promisedAcceptance } from '../../src/envelope/envelope';
import { prove } from '../../src/worksheet/proved';

/** Invented measurements: evenly spread quantities with a wobble, the same in every run. */
function values(n: number, mean: number, spread: number): number[] {
  return Array.from({ length: n }, (_, i) => {
    const t = ((i * 0.6180339887498949) % 1) - 0.5;
    return mean + spread * (3 * t + 2 * t * t * t);
  });
}

function column(name: string, numbers: readonly number[]): Range {
  return [[name], ...numbers.map((value) => [value])];
}

const weights = column('obs', values(1000, 4, 1.3));
const counts = column(
  'k',
  values(1000, 6, 2).map((value) => Math.round(Math.abs(value))),
);
const constants: Range = [
  ['m', 4],
  ['s', 1.3],
];

function table(n: number): Range {
  const rows = Array.from({ length: n }, (_, i): Cell[] => {
    const x = (100 * i) / (n - 1);
    return [x, 1.3 + Math.sin(x / 7) + 0.2 * Math.sin(x * 1.7)];
  });
  return [['x', 'base'], ...rows];
}

interface Case {
  readonly name: string;
  readonly density: string;
  readonly limits: readonly [number, number];
  readonly givens: readonly Range[];
}

const CASES: readonly Case[] = [
  { name: 'warm-up', density: 'EXP(-0.5*((x-m)/s)^2)', limits: [0, 12], givens: [constants] },
  {
    name: 'mean of 1,000 values, in one sum',
    density: 'EXP(-0.5*SUM(((obs-x)/s)^2))',
    limits: [0, 12],
    givens: [weights, constants],
  },
  {
    name: 'spread of 1,000 values',
    density: 'EXP(-0.5*SUM(((obs-m)/x)^2))/x^1000',
    limits: [0.1, 12],
    givens: [weights, constants],
  },
  {
    name: 'rate of 1,000 counts',
    density: 'EXP(SUM(k*LN(x)-x))',
    limits: [0.1, 30],
    givens: [counts],
  },
  {
    name: 'mean of 1,000 values with heavy tails, a product',
    density: 'PRODUCT((1+((obs-x)/s)^2)^-2)',
    limits: [0, 12],
    givens: [weights, constants],
  },
  {
    name: 'mean of 1,000 values, a product of EXPs',
    density: 'PRODUCT(EXP(-0.5*((obs-x)/s)^2)/s)',
    limits: [0, 12],
    givens: [weights, constants],
  },
  ...[10, 100, 1000].map((n) => ({
    name: `function table of ${n} points times EXP`,
    density: 'base(x)*EXP(-x/50)',
    limits: [0, 100] as const,
    givens: [table(n)],
  })),
  {
    name: 'function table of 1,000 points, shifted and stretched',
    density: 'base(x-10)*base(2*x)',
    limits: [0, 60],
    givens: [table(1000)],
  },
];

function timed<T>(work: () => T): [T, number] {
  const start = performance.now();
  const result = work();
  return [result, performance.now() - start];
}

for (const { name, density, limits, givens } of CASES) {
  try {
    const [shapes, reading] = timed(() =>
      readShapes([[density]], [[...limits]], givens, DRAW_PLACES),
    );
    const [{ envelope }, proving] = timed(() => prove(shapes.shapes[0]!));
    console.log(
      `${name}: read ${reading.toFixed(1)} ms, proved ${proving.toFixed(1)} ms, ${envelope.pieces.length} pieces, acceptance ${promisedAcceptance(envelope).toFixed(4)}`,
    );
  } catch (error) {
    console.log(`${name}: ${(error as Error).message}`);
  }
}

const list: Range = [
  ['label', 'density', 'from', 'to', 'm', 's'],
  ...Array.from({ length: 200 }, (_, i): Cell[] => [
    `press ${i + 1}`,
    'EXP(-0.5*((x-m)/s)^2)*(1+COS(x))',
    0,
    12 + i / 50,
    4 + i / 100,
    1 + i / 200,
  ]),
];
for (const time of ['first', 'again']) {
  const [spill, took] = timed(() => draw(list, null, [[1000]], [['plan-2027']], null, []));
  console.log(
    `shape list of 200 inputs, 1,000 rows, ${time}: ${took.toFixed(0)} ms for ${spill.length} × ${spill[0]!.length} cells`,
  );
}
