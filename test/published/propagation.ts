/**
 * Examples of JCGM 101:2008, "Supplement 1 to the Guide to the expression of uncertainty in
 * measurement", as inputs for our functions, with the exact 95 % intervals: of the additive model
 * in closed form (9.2), of the mass calibration recomputed (9.3).
 */
import type { CallLog } from '../../addin/page/calls';
import type { Range } from '../../src/index';
import { draw, summary } from '../../src/index';
import { gridOf } from '../addin/page/grid';

/** An input a line: label, density, from, to. */
type Input = readonly [label: string, density: string, from: number | string, to: number | string];

interface Example {
  readonly name: string;
  readonly inputs: readonly Input[];
  /** The model in worksheet arithmetic, a name in braces standing for its column. */
  readonly model: string;
  /** The same for numbers. */
  readonly result: (row: readonly number[]) => number;
  readonly mean: number;
  readonly deviation: number;
  readonly interval: readonly [lo: number, hi: number];
}

const normal = (label: string, mean: number, deviation: number): Input => [
  label,
  `NORM.DIST(x,${mean},${deviation},FALSE)`,
  'unbounded',
  'unbounded',
];
/** A text, since a cell with 1 alone holds a number. */
const rectangular = (label: string, from: number, to: number): Input => [label, '1+0*x', from, to];
const ROOT_3 = Math.sqrt(3);

const sum = {
  model: '{x1}+{x2}+{x3}+{x4}',
  result: (row: readonly number[]): number => row.reduce((a, b) => a + b, 0),
  mean: 0,
};
const additive = (input: (label: string) => Input, last: Input): readonly Input[] => [
  ...['x1', 'x2', 'x3'].map(input),
  last,
];
/** Of standard deviation 1 and mean 0. */
const even = (label: string): Input => rectangular(label, -ROOT_3, ROOT_3);

export const examples: readonly Example[] = [
  {
    ...sum,
    name: '9.2.2, four normal inputs',
    inputs: additive((label) => normal(label, 0, 1), normal('x4', 0, 1)),
    deviation: 2,
    // Published ±3.92: twice z(.975) = 1.9599639845400542, A&S 26.2.
    interval: [-3.9199279690801085, 3.9199279690801085],
  },
  {
    ...sum,
    name: '9.2.3, four rectangular inputs',
    inputs: additive(even, even('x4')),
    deviation: 2,
    // Published ±3.88: 2√3 (2 − (3/5)^(1/4)).
    interval: [-3.879406741347821, 3.879406741347821],
  },
  {
    ...sum,
    name: '9.2.4, one of the rectangular inputs ten times as wide',
    inputs: additive(even, rectangular('x4', -10 * ROOT_3, 10 * ROOT_3)),
    deviation: Math.sqrt(103),
    // Published ±17.0.
    interval: [-17.0158140998667, 17.0158140998667],
  },
  {
    // 9.3.1: milligrams and kg/m³; a reference weight of nominal 100 g and what air lifts of it.
    name: '9.3, mass calibration',
    inputs: [
      normal('weight', 100000, 0.05),
      normal('added', 1.234, 0.02),
      rectangular('air', 1.1, 1.3),
      rectangular('density', 7000, 9000),
      rectangular('reference', 7950, 8050),
    ],
    model: '({weight}+{added})*(1+({air}-1.2)*(1/{density}-1/{reference}))-100000',
    result: ([weight, added, air, density, reference]) =>
      (weight! + added!) * (1 + (air! - 1.2) * (1 / density! - 1 / reference!)) - 100000,
    mean: 1.234,
    deviation: 0.07547974,
    // Published by simulation: 1.2341, 0.0754, [1.0834, 1.3825] (from memory).
    interval: [1.0844332988, 1.3835667793],
  },
];

/** Confidence of the intervals that have to hold the exact figures: a false alarm in a million. */
const CONFIDENCE = 1 - 1e-6;
const SHARES = [[0.025], [0.975]];
const SEED = 'plan-2027';

type Figures = ReadonlyMap<string, readonly number[]>;

const figuresIn = (spill: Range): Figures =>
  new Map(spill.map(([item, ...cells]) => [item as string, cells as number[]]));

/** As a workbook: inputs from A1, draws from F2, the result from L2, its figures from N1 on. */
export function workbookFigures({ inputs, model }: Example, rows: number, log: CallLog): Figures {
  const columnOf = (_: string, label: string): string =>
    `CHOOSECOLS(F2#,${inputs.findIndex(([own]) => own === label) + 1})`;
  const cells: Record<string, string> = {
    L1: 'result',
    A1: 'label',
    B1: 'density',
    C1: 'from',
    D1: 'to',
    A10: String(rows),
    A11: SEED,
    A12: String(SHARES[0]![0]),
    A13: String(SHARES[1]![0]),
    A14: String(CONFIDENCE),
    F2: `=UNDERCURVE.DRAW(A1:D${inputs.length + 1},,A10,A11)`,
    L2: `=${model.replace(/\{(\w+)\}/g, columnOf)}`,
    N1: '=UNDERCURVE.SUMMARY(L2#,A12:A13,A14)',
  };
  inputs.forEach((input, i) =>
    input.forEach((cell, j) => (cells[`${'ABCD'[j]}${i + 2}`] = String(cell))),
  );
  const sheet = { id: 'model', name: 'model', colNumber: 20, rowNumber: rows + 10, cells };
  return figuresIn(gridOf({ sheets: [sheet] }, log).readSpill('model', 'N1'));
}

/** The same through the functions alone. */
export function engineFigures({ inputs, result }: Example, rows: number): Figures {
  const list: Range = [['label', 'density', 'from', 'to'], ...inputs];
  const drawn = draw(list, null, [[rows]], [[SEED]], null, []);
  const results = drawn.map((row) => [result(row as readonly number[])]);
  return figuresIn(summary(results, SHARES, [[CONFIDENCE]], null));
}

/** The figures whose interval does not hold the exact value, or is too wide to prove anything. */
export function breaches(example: Example, figures: Figures): string[] {
  const exact = {
    mean: example.mean,
    'standard deviation': example.deviation,
    'P2.5': example.interval[0],
    'P97.5': example.interval[1],
  };
  // The widest is that of P2.5 of a normal result: ±4.9 √(0.025 · 0.975 / rows) / 0.058 deviations,
  // half as much again for what the interval itself varies by.
  const rows = figures.get('rows')![0]!;
  const most = (1.5 * 2 * 4.9 * Math.sqrt(0.025 * 0.975)) / Math.sqrt(rows) / 0.058;
  return Object.entries(exact).flatMap(([item, value]) => {
    const [, lo, hi] = figures.get(item) as [number, number, number];
    const isWide = hi - lo > most * example.deviation;
    return value < lo || value > hi || isWide ? [`${item}: ${lo} … ${hi}, exact ${value}`] : [];
  });
}
