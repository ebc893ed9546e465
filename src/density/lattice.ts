/**
 * The points of a counted quantity: from, from + step, … up to the last that is not above `to`.
 *
 * Points are numbered; number 0 is `from`, or `to` where only that end is given, or 0 where none
 * is. A point is the double nearest to the decimal number that the cells show (0, 0.1, 0.2, 0.3),
 * as long as end and step have at most MOST_DIGITS decimals; else end + number · step in doubles.
 * Not handled: points so near to one another that doubles do not tell them apart (refused).
 */
import { InputError } from '../errors';

export interface Lattice {
  readonly step: number;
  /** Numbers of the first and the last point; infinite on a side without a limit. */
  readonly first: number;
  readonly last: number;
  /** True if every point is a whole number. */
  readonly isWhole: boolean;
  /** The point of a number. */
  readonly at: (number: number) => number;
  /** Where x stands among the numbers, not rounded to one. */
  readonly numberOf: (x: number) => number;
}

/** As many as a column has rows and one more, 2^20. */
export const MOST_POINTS = 1_048_576;
const MOST_DIGITS = 12;
/** A last point that misses `to` by this share of the step, as 0.1 · 3 does 0.3, still counts. */
const ROUNDING = 1e-9;

/**
 * The lattice of finite or infinite ends, from ≤ to.
 * @throws {InputError} at `where` for a step below 0, too many points and points that doubles do not tell apart.
 */
export function latticeOf(from: number, to: number, step: number, where: string): Lattice {
  const place = `${where}, step`;
  if (!(step > 0)) {
    throw new InputError(
      place,
      `${step} is negative`,
      'give the distance of neighbouring values, such as 1, or 0 for a continuous quantity',
    );
  }
  const [hasFrom, hasTo] = [from > -Infinity, to < Infinity];
  const anchor = hasFrom ? from : hasTo ? to : 0;
  const lattice: Lattice = {
    step,
    first: hasFrom ? 0 : -Infinity,
    last: hasFrom && hasTo ? Math.floor((to - from) / step + ROUNDING) : hasTo ? 0 : Infinity,
    ...pointsFrom(anchor, step),
    numberOf: (x) => (x - anchor) / step,
  };
  const n = lattice.last - lattice.first + 1;
  if (n > MOST_POINTS && n < Infinity) {
    throw new InputError(
      place,
      `from ${from} to ${to} there are ${n} points`,
      `use at most ${MOST_POINTS}: a larger step, or 0 for a continuous quantity`,
    );
  }
  const ends = [lattice.first, lattice.last].map((k) => (Number.isFinite(k) ? k : 0));
  for (const k of ends) {
    if (lattice.at(k + 1) - lattice.at(k) > step / 2) continue;
    throw new InputError(
      place,
      `numbers near ${lattice.at(k)} are further apart than ${step}`,
      'give a larger step, or measure the quantity from nearer by',
    );
  }
  return lattice;
}

/** The part of a lattice between two numbers of x. */
export function within(lattice: Lattice, from: number, to: number): Lattice {
  const { first, last, numberOf } = lattice;
  return {
    ...lattice,
    first: Math.max(first, Math.ceil(numberOf(from) - ROUNDING)),
    last: Math.min(last, Math.floor(numberOf(to) + ROUNDING)),
  };
}

function pointsFrom(anchor: number, step: number): Pick<Lattice, 'at' | 'isWhole'> {
  for (let digits = 0, unit = 1; digits <= MOST_DIGITS; digits++, unit *= 10) {
    const [start, stride] = [Math.round(anchor * unit), Math.round(step * unit)];
    if (
      start / unit === anchor &&
      stride / unit === step &&
      Math.abs(start) <= Number.MAX_SAFE_INTEGER
    )
      return { isWhole: digits === 0, at: (number) => (start + number * stride) / unit };
  }
  return { isWhole: false, at: (number) => anchor + number * step };
}
