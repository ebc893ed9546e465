/** Shapes of several variables that fall into cells of exactly known shares. */
import type { AxisText } from '../envelope/boxProof';

export interface CellTarget {
  readonly name: string;
  readonly text: string;
  readonly axes: readonly AxisText[];
  /** The exact share of every cell. */
  readonly shares: readonly number[];
  readonly cellOf: (x: readonly number[]) => number;
}

const SECTORS = 12;
const RINGS = 10;

/** The sectors and rings of a disc around (x, y) = (0, 0), all of one area. */
function discCell([x, y]: readonly number[]): number {
  const turn = (Math.atan2(y!, x!) / Math.PI + 1) / 2;
  const sector = Math.min(SECTORS - 1, Math.floor(turn * SECTORS));
  // The area within a radius grows with its square.
  const ring = Math.min(RINGS - 1, Math.floor((x! * x! + y! * y!) * RINGS));
  return sector * RINGS + ring;
}

/** The 24 orders of four parts of a whole, all equally likely. */
const ORDERS = [0, 1, 2, 3].flatMap((i) =>
  [0, 1, 2, 3].flatMap((j) =>
    [0, 1, 2, 3].flatMap((k) =>
      new Set([i, j, k]).size === 3 ? [[i, j, k, 6 - i - j - k].join('')] : [],
    ),
  ),
);

function simplexCell([a, b, c]: readonly number[]): number {
  const parts = [a!, b!, c!, 1 - a! - b! - c!];
  return ORDERS.indexOf([0, 1, 2, 3].sort((i, j) => parts[i]! - parts[j]!).join(''));
}

const CRATES = 12;

/** n! / (a! b! c!) with a + b + c = n: the numbers of ways to fill three stores. */
function ways(a: number, b: number, c: number): number {
  const factorial = (n: number): number => (n <= 1 ? 1 : n * factorial(n - 1));
  return factorial(a + b + c) / factorial(a) / factorial(b) / factorial(c);
}

const splits = Array.from({ length: CRATES + 1 }, (_, a) =>
  Array.from({ length: CRATES + 1 - a }, (__, b) => [a, b, CRATES - a - b] as const),
).flat();
/** Rare splits together, so that every cell expects draws. */
const RARE = 300;
const common = splits.filter((split) => ways(...split) >= RARE);
const total = 3 ** CRATES;

/** A normal pair with correlation 0.8, by quadrants: 1/4 + asin ρ/(2π) (Sheppard 1899, from memory). */
const QUADRANT = 0.25 + Math.asin(0.8) / (2 * Math.PI);

export const cellTargets: readonly CellTarget[] = [
  {
    name: 'a disc in sectors and rings',
    text: 'early^2+late^2<=1',
    axes: [
      ['early', -1, 1],
      ['late', -1, 1],
    ],
    shares: Array.from({ length: SECTORS * RINGS }, () => 1 / (SECTORS * RINGS)),
    cellOf: discCell,
  },
  {
    name: 'shares of three of four stores by their order',
    text: 'a+b+q<=1',
    axes: [
      ['a', 0, 1],
      ['b', 0, 1],
      ['q', 0, 1],
    ],
    shares: Array.from({ length: 24 }, () => 1 / 24),
    cellOf: simplexCell,
  },
  {
    name: 'crates in three stores, each crate anywhere',
    text: '(a+b+q=12)*FACT(12)/(FACT(a)*FACT(b)*FACT(q))',
    axes: [
      ['a', 0, CRATES, 1],
      ['b', 0, CRATES, 1],
      ['q', 0, CRATES, 1],
    ],
    shares: [
      ...common.map((split) => ways(...split) / total),
      splits.reduce((sum, split) => sum + (ways(...split) < RARE ? ways(...split) / total : 0), 0),
    ],
    cellOf: ([a, b, q]) => {
      const at = common.findIndex((split) => split[0] === a && split[1] === b && split[2] === q);
      return at < 0 ? common.length : at;
    },
  },
  {
    name: 'a normal pair by quadrants',
    text: 'EXP(-0.5*(early^2-1.6*early*late+late^2)/0.36)',
    axes: [
      ['early', -9, 9],
      ['late', -9, 9],
    ],
    shares: [QUADRANT, 0.5 - QUADRANT, 0.5 - QUADRANT, QUADRANT],
    cellOf: ([x, y]) => (x! > 0 ? 2 : 0) + (y! > 0 ? 1 : 0),
  },
];
