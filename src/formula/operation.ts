/**
 * What one step of a tape can do: its value at a point, its value over an
 * interval, its slopes over an interval, and where the density's logarithm can be
 * had structurally, that too. The steps themselves are rows of vocabulary.ts.
 */
import type { Interval } from '../numeric/interval';
import * as I from '../numeric/interval';
import type { Jet } from '../numeric/jet';
import * as J from '../numeric/jet';

/** How much of an operand lies where the operation is defined. */
export const enum Defined {
  Everywhere,
  InPart,
  Nowhere,
}

/** Operands are passed as up to three arguments; a missing one repeats the first. */
export interface Operation {
  readonly name: string;
  /** The value at a point, in doubles. */
  readonly point: (a: number, b: number, c: number) => number;
  /** Encloses the values over intervals; only the defined part of each operand counts. */
  readonly enclose: (out: Interval, a: Interval, b: Interval, c: Interval) => void;
  /** Sets out.d and out.h from operand jets; out.v is already set. */
  readonly slopes: (out: Jet, a: Jet, b: Jet, c: Jet) => void;
  /** Sets out to the jet of ln|result| from the jets of ln|operand|; absent: LN of the enclosure. */
  readonly logarithm?: (out: Jet, logs: Operands, values: Operands) => void;
  /** For functions g of one argument: encloses (ln|g|)′ over u, which may be unbounded. */
  readonly logSlope?: (out: Interval, u: Interval) => void;
  /** How much of the operands lies in the domain; absent: everywhere. */
  readonly defined?: (a: Interval, b: Interval) => Defined;
  /** The operand whose passage through 0 (or through a level) brings a kink, a jump or the end of the domain. */
  readonly turnsOn?: 0 | 1 | 2;
  /** A level inside the operand's enclosure at which it turns, NaN for none; absent: 0 if it lies inside. */
  readonly level?: (u: Interval) => number;
  /** Completes "…, where {outside}" in messages about undefined stretches. */
  readonly outside?: string;
  /** True for results that are TRUE or FALSE (1 or 0). */
  readonly isTruth?: boolean;
  readonly growth?: Growing;
}

/**
 * How growth passes through an operation, where more is known than its slope tells:
 * relative growth adds up in products, is multiplied by a power, weighed in a sum.
 */
type Growing =
  | { readonly kind: 'product' | 'quotient' | 'same' | 'exponential' | 'logarithm' | 'choice' }
  | { readonly kind: 'sum' | 'extreme'; readonly sign: 1 | -1 }
  /** Without a power of its own the second operand is the power. */
  | { readonly kind: 'power'; readonly power?: Interval };

type Operands = readonly [Jet, Jet, Jet];

const slope = I.interval();
const curvature = I.interval();

/** Encloses ln g, (ln g)′ and (ln g)″ over u, which may be unbounded. */
interface LogRule {
  readonly value: (out: Interval, u: Interval) => void;
  readonly first: (out: Interval, u: Interval) => void;
  readonly second: (out: Interval, u: Interval) => void;
  /** True where g > 0 and the rules hold; absent: everywhere. */
  readonly holdsOver?: (u: Interval) => boolean;
}

interface Smooth {
  readonly name: string;
  readonly point: (x: number) => number;
  readonly enclose: (out: Interval, u: Interval) => void;
  /** Encloses g′ over u, where v encloses g(u). */
  readonly first: (out: Interval, u: Interval, v: Interval) => void;
  /** Encloses g″ over u, where v encloses g(u) and d encloses g′(u). */
  readonly second: (out: Interval, u: Interval, v: Interval, d: Interval) => void;
  /** True where g′ and g″ exist all over u; absent: everywhere. */
  readonly isSmoothOver?: (u: Interval) => boolean;
  /** For a g ≥ 0 whose logarithm is known better than through its value. */
  readonly log?: LogRule;
  readonly logarithm?: Operation['logarithm'];
  readonly defined?: Operation['defined'];
  readonly turnsOn?: 0;
  readonly level?: Operation['level'];
  readonly outside?: string;
  readonly growth?: Growing;
}

/** An operation of one argument from its derivatives, by the chain rule. */
export function smooth(row: Smooth): Operation {
  const { first, second, isSmoothOver, log, ...rest } = row;
  return {
    ...rest,
    ...(log && { logarithm: logarithmBy(log), logSlope: log.first }),
    slopes(out, a) {
      if (isSmoothOver && !isSmoothOver(a.v)) {
        J.setJump(out);
        return;
      }
      first(slope, a.v, out.v);
      second(curvature, a.v, out.v, slope);
      J.chain(out, a, slope, curvature);
    },
  };
}

function logarithmBy({ value, first, second, holdsOver }: LogRule): Operation['logarithm'] {
  return (out, _, [u]) => {
    if (holdsOver && !holdsOver(u.v)) {
      J.setUnknown(out);
      return;
    }
    value(out.v, u.v);
    first(slope, u.v);
    second(curvature, u.v);
    J.chain(out, u, slope, curvature);
  };
}

/** An operation whose result is TRUE or FALSE: flat where it is settled, a jump elsewhere. */
export function truth(row: Pick<Operation, 'name' | 'point' | 'enclose' | 'turnsOn'>): Operation {
  return {
    ...row,
    isTruth: true,
    slopes(out) {
      if (out.v.lo === out.v.hi) J.setConstantSlopes(out);
      else J.setJump(out);
    },
  };
}

/** Encloses a truth that is settled one way, the other, or not at all. */
export function setTruth(out: Interval, surely: boolean, surelyNot: boolean): void {
  I.set(out, surely ? 1 : 0, surelyNot ? 0 : 1);
}

/** The level at which an operation turns inside the enclosure u of its turning operand; NaN for none. */
export function turningLevel(operation: Operation, u: Interval): number {
  const level = operation.level ? operation.level(u) : 0;
  return u.lo < level && u.hi > level ? level : NaN;
}
