/**
 * Random regions and densities of one to four variables: a text for the engine, and the same
 * written in JavaScript for the check. Conditions tell how far they are from changing, so
 * that points too near for doubles can be left out.
 */
import type { Axis } from '../../src/density/limits';

type Random = () => number;
type Point = readonly number[];

export interface RandomRegion {
  readonly text: string;
  readonly axes: readonly Axis[];
  /** Each is above 0 where its condition holds and below 0 where it fails. */
  readonly margins: readonly ((x: Point) => number)[];
  /** The density where all conditions hold. */
  readonly height: (x: Point) => number;
}

const NAMES = ['early', 'late', 'press', 'store'];
/** Two decimals: what stands in the text is the number used. */
const round = (x: number): number => Math.round(x * 100) / 100;

export function randomRegion(random: Random): RandomRegion {
  const n = 1 + Math.floor(random() * 4);
  const axes = NAMES.slice(0, n).map((name) => randomAxis(name, random));
  const pick = <T>(items: readonly T[]): T => items[Math.floor(random() * items.length)]!;
  const number = (lo: number, hi: number): number => round(lo + (hi - lo) * random());
  const some = (): number => Math.floor(random() * n);
  const conditions = Array.from({ length: Math.floor(random() * 3) }, () =>
    pick(CONDITIONS)(axes, some, number),
  );
  const hasHeight = conditions.length === 0 || random() < 0.5;
  const height = hasHeight ? pick(HEIGHTS)(axes, some, number) : null;
  const texts = [...conditions.map(({ text }) => `(${text})`), ...(height ? [height.text] : [])];
  return {
    text: texts.join('*'),
    axes,
    margins: conditions.map(({ margin }) => margin),
    height: height ? height.at : () => 1,
  };
}

function randomAxis(name: string, random: Random): Axis {
  const from = -Math.ceil(random() * 3);
  const to = Math.ceil(random() * 4);
  const step = random() < 0.75 ? 0 : random() < 0.5 ? 1 : 0.5;
  return { name, from, to, step };
}

type Some = () => number;
type NumberIn = (lo: number, hi: number) => number;
type Maker<T> = (axes: readonly Axis[], some: Some, number: NumberIn) => T;

/** A number as a factor or term: negative ones in brackets. */
const shown = (x: number): string => (x < 0 ? `(${x})` : String(x));

const CONDITIONS: readonly Maker<{ text: string; margin: (x: Point) => number }>[] = [
  (axes, _, number) => {
    const weights = axes.map(() => number(-2, 2));
    const bound = number(-1, 3);
    return {
      text: `${axes.map(({ name }, i) => `${shown(weights[i]!)}*${name}`).join('+')}<=${bound}`,
      margin: (x) => bound - x.reduce((sum, each, i) => sum + weights[i]! * each, 0),
    };
  },
  (axes, _, number) => {
    const centre = axes.map(() => number(-1, 1));
    const radius = number(0.5, 4);
    return {
      text: `${axes.map(({ name }, i) => `(${name}-${shown(centre[i]!)})^2`).join('+')}<${radius}`,
      margin: (x) => radius - x.reduce((sum, each, i) => sum + (each - centre[i]!) ** 2, 0),
    };
  },
  (axes, some, number) => {
    const [i, j, bound] = [some(), some(), number(-1, 1)];
    return {
      text: `${axes[i]!.name}*${axes[j]!.name}>=${bound}`,
      margin: (x) => x[i]! * x[j]! - bound,
    };
  },
  (axes, some, number) => {
    const [i, j, bound] = [some(), some(), number(0.2, 2)];
    return {
      text: `ABS(${axes[i]!.name}-2*${axes[j]!.name})<${bound}`,
      margin: (x) => bound - Math.abs(x[i]! - 2 * x[j]!),
    };
  },
  (axes, some, number) => {
    const [i, j, bound] = [some(), some(), number(-0.5, 0.5)];
    return {
      text: `SIN(${axes[i]!.name}+2*${axes[j]!.name})>${bound}`,
      margin: (x) => Math.sin(x[i]! + 2 * x[j]!) - bound,
    };
  },
  (axes, some, number) => {
    const [i, j, bound] = [some(), some(), number(0, 2)];
    return {
      text: `MAX(${axes[i]!.name},${axes[j]!.name})<=${bound}`,
      margin: (x) => bound - Math.max(x[i]!, x[j]!),
    };
  },
];

const HEIGHTS: readonly Maker<{ text: string; at: (x: Point) => number }>[] = [
  (axes, some, number) => {
    const centre = axes.map(() => number(-1, 2));
    const [i, j, link] = [some(), some(), number(-0.4, 0.4)];
    const squares = axes.map(({ name }, k) => `(${name}-${shown(centre[k]!)})^2`).join('+');
    return {
      text: `EXP(-(${squares}+${shown(link)}*${axes[i]!.name}*${axes[j]!.name}))`,
      at: (x) =>
        Math.exp(
          -(x.reduce((sum, each, k) => sum + (each - centre[k]!) ** 2, 0) + link * x[i]! * x[j]!),
        ),
    };
  },
  (axes, some) => {
    const [i, j] = [some(), some()];
    return {
      text: `(1+${axes[i]!.name}^2*${axes[j]!.name}^2)`,
      at: (x) => 1 + x[i]! ** 2 * x[j]! ** 2,
    };
  },
  (axes, some, number) => {
    const [i, j, width] = [some(), some(), number(0.1, 1)];
    return {
      text: `1/(${width}+(${axes[i]!.name}-${axes[j]!.name})^2)`,
      at: (x) => 1 / (width + (x[i]! - x[j]!) ** 2),
    };
  },
  (axes, some) => {
    const [i, j] = [some(), some()];
    return {
      text: `MAX(0,2-ABS(${axes[i]!.name})-ABS(${axes[j]!.name}))`,
      at: (x) => Math.max(0, 2 - Math.abs(x[i]!) - Math.abs(x[j]!)),
    };
  },
  (axes, some, number) => {
    const [i, j, steep] = [some(), some(), number(-3, 3)];
    return {
      text: `EXP(${shown(steep)}*${axes[i]!.name}-${axes[j]!.name})`,
      at: (x) => Math.exp(steep * x[i]! - x[j]!),
    };
  },
  (axes, some) => {
    const [i, j] = [some(), some()];
    return {
      text: `SQRT(10+${axes[i]!.name}*${axes[j]!.name})`,
      at: (x) => Math.sqrt(10 + x[i]! * x[j]!),
    };
  },
  (axes, some) => {
    const [i, j] = [some(), some()];
    return {
      text: `SIN(${axes[i]!.name})^2*EXP(0-${axes[j]!.name})`,
      at: (x) => Math.sin(x[i]!) ** 2 * Math.exp(-x[j]!),
    };
  },
];
