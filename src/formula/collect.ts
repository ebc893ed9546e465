/**
 * Long sums of like terms collected into few: Σ (a_i·u + b_i)² over 1,000 values of a
 * list becomes A·(u − k)² + C. In real arithmetic the two are the same, and the
 * coefficients are enclosed like any constant, so a proof about one is a proof about the
 * other; but a thousand times fewer operations are worked at every look at the density,
 * and u stands once instead of 1,000 times, which makes enclosures tight.
 *
 * Every term that is a polynomial of degree ≤ 2 in some step u (a base: x, LN(x), 1/x …)
 * with constant coefficients is collected. Squares are expanded around a point near
 * their sum's minimum, where nothing cancels.
 * Derived here. Not handled: sums of fewer than 8 terms, cross terms of two bases,
 * higher powers; they stay as written.
 */
import type { Interval } from '../numeric/interval';
import * as I from '../numeric/interval';
import { ADD, DIVIDE, MULTIPLY, NEGATE, SUBTRACT } from './operations/arithmetic';
import { wholePower } from './operations/power';
import type { Steps } from './steps';

/** Shorter sums are left as they are written. */
const LONG = 8;
/** A sum is rewritten if it has at least this many terms for each base. */
const TERMS_PER_BASE = 4;
/** A term with more bases than this is a base of its own. */
const MAX_BASES = 4;

const SQUARE = wholePower(2);
const ZERO = I.interval(0);

/** square·u² + slope·u for the base u (a place among the steps). */
interface Part {
  readonly base: number;
  readonly square: Interval;
  readonly slope: Interval;
}

/** A sum of parts of different bases, and a constant. */
interface Form {
  readonly parts: readonly Part[];
  readonly rest: Interval;
}

interface Term {
  readonly step: number;
  readonly sign: 1 | -1;
}

/** Rewrites the long sums that the root needs; returns the new root. */
export function collectSums(steps: Steps, root: number): number {
  return new Collector(steps, root).collect();
}

class Collector {
  private readonly isNeeded: Uint8Array;
  /** How many needed steps use a step, and whether one of them is no sum. */
  private readonly nUsers: Int32Array;
  private readonly isSummand: Uint8Array;
  private readonly moved: Int32Array;
  /** The forms found so far for one choice of centres. */
  private forms = new Map<number, Form>();
  /** Where bases are expanded: u stands for u − centre. */
  private centres = new Map<number, number>();

  constructor(
    private readonly steps: Steps,
    private readonly root: number,
  ) {
    this.isNeeded = steps.needed(root);
    this.nUsers = new Int32Array(root + 1);
    this.isSummand = new Uint8Array(root + 1).fill(1);
    this.moved = Int32Array.from({ length: root + 1 }, (_, i) => i);
  }

  collect(): number {
    const { steps, root, moved } = this;
    for (let i = 0; i <= root; i++) if (this.isNeeded[i]) this.countUsers(i);
    this.isSummand[root] = 0;
    for (let i = 0; i <= root; i++) {
      const { operation, nOperands, a, b, c } = steps.at(i);
      if (!this.isNeeded[i] || nOperands === 0 || this.isInner(i)) continue;
      const collected = this.isSum(i) ? this.collected(i) : undefined;
      const args = [a, b, c].slice(0, nOperands);
      if (collected !== undefined) moved[i] = collected;
      else if (this.isSum(i) || args.some((arg) => moved[arg] !== arg)) moved[i] = this.rebuilt(i);
      else moved[i] = steps.apply(operation, args);
    }
    return moved[root]!;
  }

  private countUsers(i: number): void {
    const { a, b, c, nOperands } = this.steps.at(i);
    // Both sides of a + a count: a sum that is used twice is not taken apart twice.
    for (const operand of [a, b, c].slice(0, nOperands)) {
      this.nUsers[operand]!++;
      if (!this.isSum(i)) this.isSummand[operand] = 0;
    }
  }

  private isSum(i: number): boolean {
    const { operation, isConstant } = this.steps.at(i);
    return !isConstant && (operation === ADD || operation === SUBTRACT);
  }

  /** True for a sum that is only a part of one other sum: it is taken apart with it. */
  private isInner(i: number): boolean {
    return this.isSum(i) && this.nUsers[i] === 1 && this.isSummand[i] === 1;
  }

  /** A step on its operands as they now stand, the sums inside it first. */
  private rebuilt(i: number): number {
    for (const inner of this.taken(i).inner.sort((a, b) => a - b)) this.rebuild(inner);
    return this.rebuild(i);
  }

  private rebuild(i: number): number {
    const { operation, a, b, c, nOperands } = this.steps.at(i);
    const args = [a, b, c].slice(0, nOperands);
    return (this.moved[i] = this.steps.apply(
      operation,
      args.map((arg) => this.moved[arg]!),
    ));
  }

  /** A sum taken apart: its terms with their signs, and the sums inside it. Without recursion. */
  private taken(sum: number): { terms: Term[]; inner: number[] } {
    const terms: Term[] = [];
    const inner: number[] = [];
    const waiting: Term[] = [{ step: sum, sign: 1 }];
    for (let next = waiting.pop(); next; next = waiting.pop()) {
      const { step, sign } = next;
      if (step !== sum && !this.isInner(step)) {
        terms.push(next);
        continue;
      }
      if (step !== sum) inner.push(step);
      const { operation, a, b } = this.steps.at(step);
      waiting.push({ step: b, sign: operation === ADD ? sign : sign === 1 ? -1 : 1 });
      waiting.push({ step: a, sign });
    }
    return { terms, inner };
  }

  private collected(i: number): number | undefined {
    const { terms } = this.taken(i);
    if (terms.length < LONG) return undefined;
    this.restart(new Map());
    const first = this.added(terms);
    if (first.length * TERMS_PER_BASE > terms.length) return undefined;
    this.restart(new Map(first.flatMap(({ base, square, slope }) => centre(base, square, slope))));
    return this.built(this.added(terms));
  }

  private restart(centres: Map<number, number>): void {
    this.centres = centres;
    this.forms = new Map();
  }

  private readonly rests: Interval[] = [];

  /** The sum of all terms' parts, one a base; the constants go to `rests`. */
  private added(terms: readonly Term[]): Part[] {
    const byBase = new Map<number, { squares: Interval[]; slopes: Interval[] }>();
    this.rests.length = 0;
    this.findForms(terms);
    for (const { step, sign } of terms) {
      const { parts, rest } = times(this.form(step), I.interval(sign));
      this.rests.push(rest);
      for (const { base, square, slope } of parts) {
        const sums = byBase.get(base) ?? { squares: [], slopes: [] };
        byBase.set(base, sums);
        sums.squares.push(square);
        sums.slopes.push(slope);
      }
    }
    return [...byBase].map(([base, { squares, slopes }]) => ({
      base,
      square: total(squares),
      slope: total(slopes),
    }));
  }

  /** Steps for the parts and the constant; nothing where a square's sign is not settled. */
  private built(parts: readonly Part[]): number | undefined {
    const { steps } = this;
    const rests = [...this.rests];
    const terms: number[] = [];
    for (const { base, square, slope } of parts) {
      const at = I.interval(this.centres.get(base) ?? 0);
      if (isZero(square)) {
        // A base without squares has no centre.
        if (!isZero(slope)) terms.push(steps.apply(MULTIPLY, [this.constant(slope), base]));
        continue;
      }
      if (I.holds(square, 0)) return undefined;
      // A·v² + B·v = A·(v + B/2A)² − B²/4A with v = u − centre.
      const half = I.interval();
      I.divide(half, slope, square);
      I.scale(half, half, 0.5);
      const drop = I.interval();
      I.square(drop, half);
      I.multiply(drop, drop, square);
      I.negate(drop, drop);
      rests.push(drop);
      I.subtract(at, at, half);
      const shifted = isZero(at) ? base : steps.apply(SUBTRACT, [base, this.constant(at)]);
      terms.push(steps.apply(MULTIPLY, [this.constant(square), steps.apply(SQUARE, [shifted])]));
    }
    const rest = total(rests);
    const isFinite = [rest.lo, rest.hi].every(Number.isFinite);
    if (!isFinite) return undefined;
    if (!isZero(rest) || terms.length === 0) terms.push(this.constant(rest));
    return terms.reduce((a, b) => steps.apply(ADD, [a, b]));
  }

  private constant(enclosure: Interval): number {
    const { lo, hi } = enclosure;
    return this.steps.constant(lo === hi ? lo : lo / 2 + hi / 2, enclosure);
  }

  /** Finds the forms of terms and of what they are made of, the innermost first. */
  private findForms(terms: readonly Term[]): void {
    const last = terms.reduce((most, { step }) => Math.max(most, step), 0);
    const isPart = new Uint8Array(last + 1);
    for (const { step } of terms) isPart[step] = 1;
    for (let i = last; i >= 0; i--) {
      const { a, b, c, nOperands } = this.steps.at(i);
      if (isPart[i]) for (const operand of [a, b, c].slice(0, nOperands)) isPart[operand] = 1;
    }
    for (let i = 0; i <= last; i++)
      if (isPart[i] && !this.forms.has(i))
        this.forms.set(i, this.findForm(i) ?? this.itself(this.moved[i]!));
  }

  private form(i: number): Form {
    return this.forms.get(i)!;
  }

  /** u is itself one part: u = (u − centre) + centre. */
  private itself(base: number): Form {
    return {
      parts: [{ base, square: ZERO, slope: I.interval(1) }],
      rest: I.interval(this.centres.get(base) ?? 0),
    };
  }

  private findForm(i: number): Form | undefined {
    const { operation, a, b, enclosure } = this.steps.at(i);
    if (enclosure) return { parts: [], rest: enclosure };
    switch (operation.name) {
      case ADD.name:
        return plus(this.form(a), this.form(b));
      case SUBTRACT.name:
        return plus(this.form(a), times(this.form(b), I.interval(-1)));
      case NEGATE.name:
        return times(this.form(a), I.interval(-1));
      case MULTIPLY.name:
        return product(this.form(a), this.form(b));
      case SQUARE.name:
        return product(this.form(a), this.form(a));
      case DIVIDE.name:
        return this.quotient(a, b);
      default:
        return undefined;
    }
  }

  private quotient(a: number, b: number): Form | undefined {
    const [above, below] = [this.steps.at(a).enclosure, this.steps.at(b).enclosure];
    const factor = I.interval();
    if (below) {
      if (I.holds(below, 0)) return undefined;
      I.reciprocal(factor, below);
      // A quotient is rounded once where the product with a reciprocal is rounded twice.
      return below.lo === below.hi ? divided(this.form(a), below) : times(this.form(a), factor);
    }
    if (!above || isZero(above)) return undefined;
    const base = this.steps.apply(DIVIDE, [this.steps.number(1), this.moved[b]!]);
    return times(this.itself(base), above);
  }
}

function isZero({ lo, hi }: Interval): boolean {
  return lo === 0 && hi === 0;
}

/** The double nearest to where square·u² + slope·u has no slope; nothing without a square. */
function centre(base: number, square: Interval, slope: Interval): [number, number][] {
  const at = -(slope.lo + slope.hi) / (2 * (square.lo + square.hi));
  return isZero(square) || !Number.isFinite(at) || at === 0 ? [] : [[base, at]];
}

function added(a: Interval, b: Interval): Interval {
  if (isZero(a)) return b;
  if (isZero(b)) return a;
  const out = I.interval();
  I.add(out, a, b);
  return out;
}

function multiplied(a: Interval, b: Interval): Interval {
  const out = I.interval();
  I.multiply(out, a, b);
  return out;
}

/** The sum as a balanced tree: its rounding grows with log n. */
function total(terms: readonly Interval[], from = 0, to = terms.length): Interval {
  if (to - from === 0) return ZERO;
  if (to - from === 1) return terms[from]!;
  const half = (from + to) >> 1;
  return added(total(terms, from, half), total(terms, half, to));
}

function plus(a: Form, b: Form): Form | undefined {
  const parts = [...a.parts];
  for (const part of b.parts) {
    const i = parts.findIndex(({ base }) => base === part.base);
    if (i < 0) parts.push(part);
    else {
      const { base, square, slope } = parts[i]!;
      parts[i] = { base, square: added(square, part.square), slope: added(slope, part.slope) };
    }
  }
  return parts.length > MAX_BASES ? undefined : { parts, rest: added(a.rest, b.rest) };
}

function times({ parts, rest }: Form, factor: Interval): Form {
  return {
    parts: parts.map(({ base, square, slope }) => ({
      base,
      square: multiplied(square, factor),
      slope: multiplied(slope, factor),
    })),
    rest: multiplied(rest, factor),
  };
}

function divided({ parts, rest }: Form, divisor: Interval): Form {
  const quotient = (a: Interval): Interval => {
    const out = I.interval();
    I.divide(out, a, divisor);
    return out;
  };
  return {
    parts: parts.map(({ base, square, slope }) => ({
      base,
      square: quotient(square),
      slope: quotient(slope),
    })),
    rest: quotient(rest),
  };
}

/** A product that stays a polynomial of degree 2 in one base, or has a constant factor. */
function product(a: Form, b: Form): Form | undefined {
  if (a.parts.length === 0) return times(b, a.rest);
  if (b.parts.length === 0) return times(a, b.rest);
  const [u, v] = [a.parts[0]!, b.parts[0]!];
  if (a.parts.length > 1 || b.parts.length > 1 || u.base !== v.base) return undefined;
  if (!isZero(u.square) || !isZero(v.square)) return undefined;
  const rest = a === b ? I.interval() : multiplied(a.rest, b.rest);
  const square = a === b ? I.interval() : multiplied(u.slope, v.slope);
  if (a === b) {
    I.square(rest, a.rest);
    I.square(square, u.slope);
  }
  const slope = added(multiplied(u.slope, b.rest), multiplied(v.slope, a.rest));
  return { parts: [{ base: u.base, square, slope }], rest };
}
