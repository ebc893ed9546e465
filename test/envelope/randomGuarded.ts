/**
 * Random densities of one to three variables that are defined, or not negative, only where
 * their condition holds: a text for the engine and the same in JavaScript for the check.
 * What stands in the density is the condition's own difference written in other ways.
 */
import type { Axis } from '../../src/density/limits';
import type { RandomRegion } from './randomRegion';

type Point = readonly number[];

const NAMES = ['early', 'late', 'press'];

/** left ≥ right, both in the names of the variables. */
interface Sides {
  readonly left: string;
  readonly right: string;
  readonly margin: (x: Point) => number;
}

export function randomGuarded(random: () => number): RandomRegion {
  const n = 1 + Math.floor(random() * 3);
  const pick = <T>(items: readonly T[]): T => items[Math.floor(random() * items.length)]!;
  const names = NAMES.slice(0, n);
  const axes = names.map((name): Axis => {
    const step = random() < 0.8 ? 0 : 0.5;
    return { name, from: -Math.ceil(random() * 2), to: Math.ceil(random() * 3), step };
  });
  const { left, right, margin } = sidesFor(names, pick, random);
  const shift = random() < 0.5 ? 0 : Math.round(random() * 100) / 100;
  const scale = pick([1, 2, 0.5]);
  const u = (x: Point): number => scale * margin(x) + shift;
  const written = pick([
    `(${scale}*(${left})-(${right})*${scale}+${shift})`,
    `(${shift}-${scale}*(${right})+(${left})*${scale})`,
    `(0-(${right}-(${left}))*${scale}+${shift})`,
    `(${scale}*(${left}-(${right}))+${shift})`,
  ]);
  const height = pick(HEIGHTS);
  const g = height.text(written, names[0]!);
  const condition = pick([
    `${left}>=${right}`,
    `${right}<=${left}`,
    `${left}-(${right})>0`,
    `NOT(${left}<${right})`,
  ]);
  const text = pick([
    `(${condition})*${g}`,
    `${g}*(${condition})`,
    `IF(${condition},${g},0)`,
    `2*${g}*AND(${condition},${names[0]}>-5)`,
    `(${condition})*(1+${names[0]}^2)*${g}`,
  ]);
  const factor = (x: Point): number =>
    text.startsWith('2*') ? 2 : text.includes(`(1+${names[0]}^2)`) ? 1 + x[0]! ** 2 : 1;
  return { text, axes, margins: [margin], height: (x) => factor(x) * height.at(u(x), x[0]!) };
}

function sidesFor(
  names: readonly string[],
  pick: <T>(items: readonly T[]) => T,
  random: () => number,
): Sides {
  const i = Math.floor(random() * names.length);
  const j = Math.floor(random() * names.length);
  const bound = Math.round(random() * 150) / 100;
  const [a, b] = [names[i]!, names[j]!];
  const sum = names.join('+');
  const squares = names.map((name) => `${name}^2`).join('+');
  return pick<Sides>([
    { left: a, right: `${bound}`, margin: (x) => x[i]! - bound },
    {
      left: `${a}+${bound}`,
      right: `2*${b}`,
      margin: (x) => x[i]! + bound - 2 * x[j]!,
    },
    { left: `${bound}`, right: sum, margin: (x) => bound - x.reduce((s, each) => s + each, 0) },
    {
      left: `${1 + bound}`,
      right: squares,
      margin: (x) => 1 + bound - x.reduce((s, each) => s + each * each, 0),
    },
    { left: `${a}*${b}`, right: `${bound / 4}`, margin: (x) => x[i]! * x[j]! - bound / 4 },
    { left: `${bound}`, right: `ABS(${a})`, margin: (x) => bound - Math.abs(x[i]!) },
  ]);
}

const HEIGHTS: readonly {
  readonly text: (u: string, name: string) => string;
  readonly at: (u: number, x: number) => number;
}[] = [
  { text: (u) => `SQRT${u}`, at: (u) => Math.sqrt(u) },
  { text: (u) => u, at: (u) => u },
  { text: (u) => `LN(1+${u})`, at: (u) => Math.log(1 + u) },
  { text: (u) => `${u}^1.5`, at: (u) => u ** 1.5 },
  { text: (u, name) => `SQRT${u}*EXP(0-${name})`, at: (u, x) => Math.sqrt(u) * Math.exp(-x) },
  { text: (u) => `(1/(0.1+SQRT${u}))`, at: (u) => 1 / (0.1 + Math.sqrt(u)) },
  { text: (u) => `IF(${u}>1,SQRT(${u}-1),0)`, at: (u) => (u > 1 ? Math.sqrt(u - 1) : 0) },
];
