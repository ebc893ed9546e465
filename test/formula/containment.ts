/**
 * The containment law: over random intervals the enclosures of f, f′ and f″ hold the
 * reference values at every reference point inside. Used with few intervals in the
 * ordinary tests and with many in test/long.
 */
import { Encloser } from '../../src/formula/enclose';
import { Defined } from '../../src/formula/operation';
import type { Tape } from '../../src/formula/tape';
import type { Case } from './references';
import { isWithin } from './references';

/** A small generator of numbers from 0 to 1, the same everywhere (mulberry32; common practice). */
export function chances(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

interface Containment {
  readonly nIntervals: number;
  readonly nPoints: number;
  readonly breaches: readonly string[];
}

/** Checks n random intervals, each around a reference point, widths from 1e-12 to the whole range. */
export function checkContainment(
  { formula, references }: Case,
  tape: Tape,
  n: number,
): Containment {
  const encloser = new Encloser(tape);
  const [left, right] = [encloser.pointValues(), encloser.pointValues()];
  const chance = chances(n);
  const xs = references.map(({ x }) => x);
  const [least, largest] = [Math.min(...xs), Math.max(...xs)];
  const breaches: string[] = [];
  let nPoints = 0;
  for (let i = 0; i < n; i++) {
    const { x } = references[i % references.length]!;
    const width = (largest - least) * 10 ** (-12 * chance());
    const from = Math.max(least, x - width * chance());
    const to = Math.min(largest, Math.max(x, from + width));
    encloser.at(from, left);
    encloser.at(to, right);
    const { density, defined } = encloser.over(
      from,
      to,
      i % 2 === 0 ? left : null,
      i % 2 === 0 ? right : null,
    );
    if (defined !== Defined.Everywhere)
      breaches.push(`${formula} is undefined in [${from}, ${to}]`);
    const enclosures = [density.v, density.d, density.h];
    for (const reference of references) {
      if (reference.x < from || reference.x > to) continue;
      nPoints++;
      reference.digits.forEach((digits, order) => {
        const { lo, hi } = enclosures[order]!;
        if (!isWithin(lo, hi, digits)) {
          breaches.push(
            `${formula}, derivative ${order} at ${reference.x} in [${from}, ${to}]: ${digits.toString()} is outside [${lo}, ${hi}]`,
          );
        }
      });
    }
  }
  return { nIntervals: n, nPoints, breaches };
}
