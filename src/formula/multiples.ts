/**
 * Which steps of a tape are a multiple of another one plus a constant, in real numbers:
 * 3 − x − y is 1 + (2 − (x + y)). Each step is taken as a sum of terms, a number times a
 * product of other steps, which are told apart by their places on the tape.
 * Not handled: brackets multiplied out, constants that are no doubles; such steps are terms.
 */
import { ADD, DIVIDE, MULTIPLY, NEGATE, SUBTRACT } from './operations/arithmetic';
import type { Tape } from './tape';

/** Room for the rounding of sums of constants, as a share of their sizes. */
const ROOM = 1e-15;
/** A shift that has so few digits but for rounding is taken for that number. */
const DIGITS = 12;
/** Most factors of a term that is taken apart. */
const MOST_FACTORS = 8;

/** constant + Σ coefficient · product, the products named by the places of their factors. */
interface Sum {
  readonly constant: number;
  /** Σ of the sizes of what went into the constant. */
  readonly size: number;
  readonly terms: ReadonlyMap<string, number>;
}

/** u = factor · d + shift, the shift with room for rounding. */
interface Multiple {
  readonly factor: number;
  readonly shift: number;
  readonly room: number;
}

export class Multiples {
  private readonly sums: Sum[] = [];

  constructor({ steps }: Tape) {
    for (const [place, step] of steps.entries()) {
      const { operation, a, b, enclosure } = step;
      const own: Sum = { constant: 0, size: 0, terms: new Map([[`${place}`, 1]]) };
      const [u, v] = [this.sums[a], this.sums[b]];
      if (enclosure) {
        const { lo, hi } = enclosure;
        this.sums.push(lo === hi ? { constant: lo, size: Math.abs(lo), terms: new Map() } : own);
      } else if (u === undefined || v === undefined) this.sums.push(own);
      else if (operation === NEGATE) this.sums.push(scaled(u, -1));
      else if (operation.name === ADD.name) this.sums.push(added(u, v, 1));
      else if (operation.name === SUBTRACT.name) this.sums.push(added(u, v, -1));
      else if (operation.name === MULTIPLY.name) this.sums.push(product([u, v]) ?? own);
      else if (operation.name === DIVIDE.name)
        this.sums.push(v.terms.size === 0 && v.constant !== 0 ? scaled(u, 1 / v.constant) : own);
      else this.sums.push(product(repeated(u, powerOf(operation.name))) ?? own);
    }
  }

  /** How the step at u is a multiple of the one at d; null where it is none. */
  of(u: number, d: number): Multiple | null {
    const [sum, base] = [this.sums[u]!, this.sums[d]!];
    if (sum.terms.size !== base.terms.size || sum.terms.size === 0) return null;
    let factor = NaN;
    for (const [name, coefficient] of base.terms) {
      const own = sum.terms.get(name);
      if (own === undefined) return null;
      if (factor !== factor) factor = own / coefficient;
      if (factor * coefficient !== own) return null;
    }
    const shift = sum.constant - factor * base.constant;
    const room = ROOM * (sum.size + Math.abs(factor) * base.size);
    if (!(Math.abs(factor) > 0 && Number.isFinite(factor) && Number.isFinite(shift))) return null;
    // 1 where it is 1 but for rounding: a domain may end right there.
    const short = Math.abs(shift) <= room ? 0 : Number(shift.toPrecision(DIGITS));
    return Math.abs(short - shift) <= room
      ? { factor, shift: short, room: 0 }
      : { factor, shift, room };
  }
}

function scaled({ constant, size, terms }: Sum, k: number): Sum {
  return {
    constant: constant * k,
    size: size * Math.abs(k),
    terms: new Map([...terms].map(([name, coefficient]) => [name, coefficient * k])),
  };
}

function added(u: Sum, v: Sum, sign: 1 | -1): Sum {
  const terms = new Map(u.terms);
  for (const [name, coefficient] of v.terms) {
    const sum = (terms.get(name) ?? 0) + sign * coefficient;
    if (sum === 0) terms.delete(name);
    else terms.set(name, sum);
  }
  return { constant: u.constant + sign * v.constant, size: u.size + v.size, terms };
}

/** The product of numbers and single terms; null for any other. */
function product(factors: readonly Sum[]): Sum | null {
  const constants = factors.filter(({ terms }) => terms.size === 0);
  const others = factors.filter(({ terms }) => terms.size > 0);
  const k = constants.reduce((all, { constant }) => all * constant, 1);
  if (others.length === 1) return scaled(others[0]!, k);
  const names: string[] = [];
  let coefficient = k;
  for (const { constant, terms } of others) {
    const [[name, own] = ['', NaN]] = terms;
    if (terms.size !== 1 || constant !== 0) return null;
    coefficient *= own;
    names.push(...name.split('*'));
  }
  if (names.length === 0 || names.length > MOST_FACTORS) return null;
  return { constant: 0, size: 0, terms: new Map([[names.sort().join('*'), coefficient]]) };
}

function repeated(u: Sum, n: number): readonly Sum[] {
  return Array.from({ length: n }, () => u);
}

/** The exponent of a small whole power; 0 for any other operation. */
function powerOf(name: string): number {
  const n = Number(/^power (\d+)$/.exec(name)?.[1] ?? 0);
  return n <= MOST_FACTORS ? n : 0;
}
