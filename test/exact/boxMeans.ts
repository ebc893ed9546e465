/** Means of random polynomials over counted and continuous variables, against exact ones. */
import seedrandom from 'seedrandom';
import type { Range } from '../../src/index';
import { expect as mean } from '../../src/index';

export interface MeanFuzzReport {
  /** Formulas whose exact mean lies outside its proved bounds. */
  readonly faults: readonly string[];
  /** The largest distance of two bounds, as a share of 1 + |mean|. */
  readonly widest: number;
}

/**
 * Density of degree 2, quantity of degree 3 in each variable: three places of Gauss are exact
 * (Davis & Rabinowitz 1984, 2.7), and counted variables are added up.
 */
export function meanFuzz(seed: string, shapes: number): MeanFuzzReport {
  const random = seedrandom(seed);
  const digit = (): number => Math.round(20 * random() - 10) / 10;
  const faults: string[] = [];
  let widest = 0;
  for (let k = 0; k < shapes; k++) {
    const names = [...'abp'].slice(0, 2 + (k % 2));
    const limits = names.map((name) => {
      const from = Math.floor(3 * random()) - 2;
      const step = random() < 0.4 ? 0.5 : 0;
      return [name, from, from + 1 + Math.floor(2 * random()), step] as const;
    });
    const [u, v] = [names.map(digit), names.map(digit)];
    const line = (c: readonly number[]): string =>
      names.map((name, i) => `(${c[i]!})*${name}`).join('+');
    const dot = (c: readonly number[], x: readonly number[]): number =>
      c.reduce((sum, each, i) => sum + each * x[i]!, 0);
    let [moment, mass] = [0, 0];
    for (const [x, weight] of nodesOf(limits)) {
      const f = (1 + dot(u, x) ** 2) * weight;
      moment += dot(v, x) ** 3 * f;
      mass += f;
    }
    const exact = moment / mass;
    const rows: Range = limits.map((row) => [...row]);
    const [density, quantity] = [`1+(${line(u)})^2`, `(${line(v)})^3`];
    const [, row] = mean([[density]], rows, [[quantity]], []);
    const [, atLeast, atMost] = row as [number, number, number];
    const room = 1e-12 * (1 + Math.abs(exact));
    if (!(atLeast <= exact + room && atMost >= exact - room))
      faults.push(`${quantity} under ${density}: ${exact} is not in ${atLeast} … ${atMost}`);
    widest = Math.max(widest, (atMost - atLeast) / (1 + Math.abs(exact)));
  }
  return { faults, widest };
}

/** Places and weights that integrate and add up polynomials of degree 5 exactly. */
function nodesOf(
  limits: readonly (readonly [string, number, number, number])[],
): readonly (readonly [readonly number[], number])[] {
  let nodes: (readonly [readonly number[], number])[] = [[[], 1]];
  for (const [, from, to, step] of limits) {
    const [middle, half] = [(from + to) / 2, (to - from) / 2];
    const own: (readonly [number, number])[] =
      step > 0
        ? Array.from({ length: Math.round((to - from) / step) + 1 }, (_, i) => [from + i * step, 1])
        : [-1, 0, 1].map((i) => [middle + i * half * Math.sqrt(0.6), half * (i === 0 ? 8 : 5)]);
    nodes = nodes.flatMap(([x, weight]) =>
      own.map(([at, part]) => [[...x, at], weight * part] as const),
    );
  }
  return nodes;
}
