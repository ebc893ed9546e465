/**
 * A tape in which conditions guard what they are multiplied with, as IF guards its branches:
 * where a condition fails nothing else is asked, and where it holds what it says is known.
 *
 *      (d ≥ 0) · g  =  IF(d ≥ 0, g′, 0),   g′: every u = a·d + b in g, a > 0, is MAX(u, b)
 *
 * (MIN for a < 0 and for d ≤ 0.) Where the condition holds g′ = g in real numbers, and
 * elsewhere it does not count: the values are the same, but SQRT(x−y) beside x>=y is defined
 * and its enclosure over a box on the boundary is that of the part that counts.
 * Source: src/METHOD.md, "Conditions". Not handled: conditions that imply a domain in any
 * other way than by a multiple of their own difference (multiples.ts).
 */
import type { Operation } from './operation';
import { Multiples } from './multiples';
import { DIVIDE, MULTIPLY, SUBTRACT } from './operations/arithmetic';
import { CHOOSE_BY, MAX, MIN } from './operations/choice';
import { BOTH, EITHER, NOT, NOT_NEGATIVE, NOT_ZERO, POSITIVE } from './operations/truth';
import { Steps } from './steps';
import type { Tape } from './tape';

/** Conditions that stand in one another, each with its own copy of what it guards. */
const MOST_ASSUMPTIONS = 200;
const MOST_STEPS = 20_000;

/** The step at `place` is known to be at least 0, or at most 0 for a sign of −1. */
interface Sided {
  readonly place: number;
  readonly sign: 1 | -1;
}

/** What holds around a part of the formula, and its steps as they were written there. */
class Assumptions {
  readonly written = new Map<number, number>();
  private readonly inner = new Map<string, Assumptions>();

  constructor(
    readonly truths: ReadonlyMap<number, boolean>,
    readonly sides: readonly Sided[],
  ) {}

  /** These, and that the truths at some places hold or fail. */
  and(places: readonly number[], holds: boolean, tape: Tape): Assumptions {
    const name = `${places.join()} ${holds}`;
    const known = this.inner.get(name);
    if (known) return known;
    const made = new Assumptions(
      new Map([...this.truths, ...places.map((place) => [place, holds] as const)]),
      [...this.sides, ...places.flatMap((place) => sidesOf(tape, place, holds))],
    );
    this.inner.set(name, made);
    return made;
  }
}

interface Guarded {
  readonly tape: Tape;
  /** True if a condition told something of what it guards, not only where that is asked. */
  readonly isTold: boolean;
}

/** The guarded tape; null where it would be the same, or too long. */
export function guarded(tape: Tape): Guarded | null {
  return new Guard(tape).guarded();
}

class Guard {
  private readonly steps = new Steps();
  private readonly variables: readonly number[];
  private readonly multiples: Multiples;
  private isGuarded = false;
  private isTold = false;
  private nAssumptions = 0;

  constructor(private readonly old: Tape) {
    this.multiples = new Multiples(old);
    this.variables = old.variables.map((_, i) => this.steps.variable(i));
  }

  guarded(): Guarded | null {
    const root = this.write(this.old.root, new Assumptions(new Map(), []));
    const { isGuarded, isTold } = this;
    if (!(isGuarded || isTold) || root === TOO_LONG) return null;
    return { tape: this.steps.tape(root, this.variables), isTold };
  }

  /** Writes a step and all it needs; operands first, so that long sums need no deep recursion. */
  private write(root: number, under: Assumptions): number {
    const needed = new Set([root]);
    const open = [root];
    for (let place = open.pop(); place !== undefined; place = open.pop()) {
      const { a, b, c, nOperands } = this.old.steps[place]!;
      if (nOperands === 0 || this.splits(place, under)) continue;
      for (const operand of [a, b, c]) {
        if (needed.has(operand)) continue;
        needed.add(operand);
        open.push(operand);
      }
    }
    for (const place of [...needed].sort((p, q) => p - q)) {
      if (this.steps.length > MOST_STEPS || this.nAssumptions > MOST_ASSUMPTIONS) return TOO_LONG;
      if (!under.written.has(place))
        under.written.set(place, this.bounded(place, this.step(place, under), under));
    }
    return under.written.get(root)!;
  }

  /** True where what lies below is written under further assumptions. */
  private splits(place: number, under: Assumptions): boolean {
    return (
      under.truths.has(place) ||
      this.old.steps[place]!.operation.name === CHOOSE_BY.name ||
      this.newTruths(place, under).length > 0
    );
  }

  private newTruths(place: number, under: Assumptions): readonly number[] {
    const { operation } = this.old.steps[place]!;
    if (operation.name !== MULTIPLY.name && operation.name !== DIVIDE.name) return [];
    return truthsIn(this.old, place).filter((truth) => !under.truths.has(truth));
  }

  private step(place: number, under: Assumptions): number {
    const { steps, old } = this;
    const { operation, a, b, c, nOperands, value, enclosure } = old.steps[place]!;
    const known = under.truths.get(place);
    if (known !== undefined) return steps.number(known ? 1 : 0);
    if (enclosure) return steps.constant(value, enclosure);
    if (nOperands === 0) return this.variables[old.variables.indexOf(place)]!;
    if (operation.name === CHOOSE_BY.name) {
      const settled = under.truths.get(c);
      if (settled !== undefined) return this.write(settled ? a : b, under);
      return this.choose(a, b, [c], under);
    }
    const truths = this.newTruths(place, under);
    if (truths.length > 0) return this.choose(place, null, truths, under);
    const args = [a, b, c].slice(0, nOperands).map((operand) => under.written.get(operand)!);
    if (operation.name === MULTIPLY.name) {
      const left = args.filter((arg) => !this.isOne(arg));
      if (left.length < 2) return left[0] ?? args[0]!;
    }
    return steps.apply(operation, args);
  }

  /** IF of all these truths: `yes` under them, `no` (or 0) without. */
  private choose(
    yes: number,
    no: number | null,
    truths: readonly number[],
    under: Assumptions,
  ): number {
    const { steps, old } = this;
    this.nAssumptions++;
    if (no === null) this.isGuarded = true;
    const condition = truths
      .map((truth) => this.write(truth, under))
      .reduce((p, q) => steps.apply(BOTH, [p, q]));
    const where = this.write(yes, under.and(truths, true, old));
    const elsewhere = no === null ? steps.number(0) : this.write(no, under.and(truths, false, old));
    return [condition, where, elsewhere].includes(TOO_LONG)
      ? TOO_LONG
      : steps.apply(CHOOSE_BY, [where, elsewhere, condition]);
  }

  private isOne(place: number): boolean {
    const { enclosure } = this.steps.at(place);
    return enclosure !== null && enclosure.lo === 1 && enclosure.hi === 1;
  }

  /** The step within what the assumptions say of it. */
  private bounded(place: number, written: number, under: Assumptions): number {
    const { operation, isConstant } = this.old.steps[place]!;
    if (isConstant || operation.isTruth || written === TOO_LONG) return written;
    let [least, most] = [-Infinity, Infinity];
    for (const { place: base, sign } of under.sides) {
      const multiple = this.multiples.of(place, base);
      if (multiple === null) continue;
      const { factor, shift, room } = multiple;
      if (factor * sign > 0) least = Math.max(least, shift - room);
      else most = Math.min(most, shift + room);
    }
    if (least > most) return written;
    let out = written;
    if (least > -Infinity) out = this.limited(MAX, out, least);
    if (most < Infinity) out = this.limited(MIN, out, most);
    if (out !== written) this.isTold = true;
    return out;
  }

  private limited(extreme: Operation, place: number, end: number): number {
    const { steps } = this;
    const limit = steps.number(end);
    const difference = end === 0 ? place : steps.apply(SUBTRACT, [place, limit]);
    return steps.apply(extreme, [place, limit, difference]);
  }
}

const TOO_LONG = -1;

/** The truths that a product is 0 without. */
function truthsIn({ steps }: Tape, root: number): readonly number[] {
  const found = new Set<number>();
  const open = [root];
  for (let place = open.pop(); place !== undefined; place = open.pop()) {
    const { operation, a, b, c, isConstant } = steps[place]!;
    if (isConstant) continue;
    if (operation.isTruth) found.add(place);
    else if (operation.name === MULTIPLY.name) open.push(a, b);
    else if (operation.name === DIVIDE.name) open.push(a);
    else if (operation.name === CHOOSE_BY.name && steps[b]!.value === 0) found.add(c);
  }
  return [...found].sort((p, q) => p - q);
}

/** What is known of differences where a truth holds, or where it fails. */
function sidesOf({ steps }: Tape, root: number, holds: boolean): readonly Sided[] {
  const sides: Sided[] = [];
  const open: [number, boolean][] = [[root, holds]];
  for (let next = open.pop(); next !== undefined; next = open.pop()) {
    const [place, isSo] = next;
    const { operation, a, b } = steps[place]!;
    if (operation.name === NOT.name) open.push([a, !isSo]);
    else if (operation.name === (isSo ? BOTH : EITHER).name) open.push([a, isSo], [b, isSo]);
    else if (operation.name === POSITIVE.name || operation.name === NOT_NEGATIVE.name)
      sides.push({ place: a, sign: isSo ? 1 : -1 });
    else if (operation.name === NOT_ZERO.name && !isSo)
      sides.push({ place: a, sign: 1 }, { place: a, sign: -1 });
  }
  return sides;
}
