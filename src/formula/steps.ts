/**
 * The steps of a tape while it is being written: equal steps are shared, steps on
 * numbers are worked out at once, and in the end only those that count are kept.
 */
import type { Interval } from '../numeric/interval';
import * as I from '../numeric/interval';
import type { Operation } from './operation';
import { Defined } from './operation';
import { ADD, MULTIPLY, NEGATE, NUMBER, SUBTRACT, VARIABLE } from './operations/arithmetic';
import { INT } from './operations/rounding';
import type { Step, Tape } from './tape';

/** Operations that give whole numbers from whole numbers. */
const WHOLE_FROM_WHOLE: ReadonlySet<Operation> = new Set([ADD, SUBTRACT, MULTIPLY, NEGATE]);

export class Steps {
  private readonly all: Step[] = [];
  private readonly known = new Map<string, number>();
  private readonly truths = new Set<number>();
  private readonly whole = new Map<number, boolean>();
  /** One operation a name: steps of the same rule then share its code, which is what makes them fast. */
  private readonly operations = new Map<string, Operation>();

  /** `areWhole`: the variables take whole numbers only. */
  constructor(private readonly areWhole = false) {}

  get length(): number {
    return this.all.length;
  }

  /** True for what is known to be a whole number when the variables are. */
  isWhole(place: number): boolean {
    const known = this.whole.get(place);
    if (known !== undefined) return known;
    const { operation, a, b, enclosure } = this.all[place]!;
    const isWhole =
      enclosure !== null
        ? enclosure.lo === enclosure.hi && Math.floor(enclosure.lo) === enclosure.lo
        : operation === VARIABLE
          ? this.areWhole
          : operation === INT ||
            (WHOLE_FROM_WHOLE.has(operation) && this.isWhole(a) && this.isWhole(b));
    this.whole.set(place, isWhole);
    return isWhole;
  }

  at(place: number): Step {
    return this.all[place]!;
  }

  isTruth(place: number): boolean {
    return this.truths.has(place);
  }

  variable(i: number): number {
    return this.push(VARIABLE, [], `variable ${i}`, false);
  }

  number(value: number): number {
    return this.constant(value, I.interval(value));
  }

  /** A number by its double and an enclosure of what it stands for. */
  constant(value: number, enclosure: Interval): number {
    const key = `${value} ${enclosure.lo} ${enclosure.hi}`;
    return this.known.get(key) ?? this.push(NUMBER, [], key, true, value, enclosure);
  }

  apply(wanted: Operation, args: readonly number[]): number {
    const [a = 0, b = a, c = a] = args;
    if (wanted === SUBTRACT && a === b) return this.number(0);
    if (wanted === INT && this.areWhole && this.isWhole(a)) return a;
    const key = `${wanted.name}(${args.join()})`;
    const known = this.known.get(key);
    if (known !== undefined) return known;
    const operation = this.operations.get(wanted.name) ?? wanted;
    this.operations.set(wanted.name, operation);
    const isConstant = args.every((arg) => this.all[arg]!.isConstant);
    const step =
      (isConstant ? this.fold(operation, a, b, c) : undefined) ??
      this.push(operation, args, key, isConstant);
    if (operation.isTruth) this.truths.add(step);
    return step;
  }

  /** The number that a step on numbers comes to; nothing where it is undefined, infinite or lost to underflow. */
  private fold(operation: Operation, a: number, b: number, c: number): number | undefined {
    const [u, v, w] = [this.all[a]!, this.all[b]!, this.all[c]!];
    if (!u.enclosure || !v.enclosure || !w.enclosure || operation.isTruth) return undefined;
    if (operation.defined && operation.defined(u.enclosure, v.enclosure) !== Defined.Everywhere)
      return undefined;
    const out = I.interval();
    operation.enclose(out, u.enclosure, v.enclosure, w.enclosure);
    if (!Number.isFinite(out.lo) || !Number.isFinite(out.hi)) return undefined;
    // A number lost to underflow keeps its logarithm as a step.
    if (out.lo !== out.hi && (out.lo === 0 || out.hi === 0)) return undefined;
    const value = out.lo === out.hi ? out.lo : operation.point(u.value, v.value, w.value);
    return this.constant(value, out);
  }

  /** Encloses a constant step; truths and steps that could not be folded are worked out here. */
  enclosure(place: number): Interval | undefined {
    const { operation, a, b, c, nOperands, isConstant, enclosure } = this.all[place]!;
    if (enclosure || !isConstant || nOperands === 0) return enclosure ?? undefined;
    const [u, v, w] = [this.enclosure(a), this.enclosure(b), this.enclosure(c)];
    if (!u || !v || !w) return undefined;
    if (operation.defined && operation.defined(u, v) !== Defined.Everywhere) return undefined;
    const out = I.interval();
    operation.enclose(out, u, v, w);
    return out;
  }

  private push(
    operation: Operation,
    args: readonly number[],
    key: string,
    isConstant: boolean,
    value = NaN,
    enclosure: Interval | null = null,
  ): number {
    const place = this.all.length;
    const [a = place, b = a, c = a] = args;
    this.all.push({ operation, a, b, c, nOperands: args.length, isConstant, value, enclosure });
    this.known.set(key, place);
    return place;
  }

  /** Which steps the root needs. */
  needed(root: number): Uint8Array {
    const isNeeded = new Uint8Array(this.all.length);
    isNeeded[root] = 1;
    for (let i = root; i >= 0; i--) {
      const step = this.all[i]!;
      if (isNeeded[i] && step.nOperands > 0)
        isNeeded[step.a] = isNeeded[step.b] = isNeeded[step.c] = 1;
    }
    return isNeeded;
  }

  /** The tape of the steps that the root needs. */
  tape(root: number, variables: readonly number[]): Tape {
    const isNeeded = this.needed(root);
    const moved = new Int32Array(this.all.length).fill(-1);
    const kept: Step[] = [];
    this.all.forEach((step, i) => {
      if (!isNeeded[i]) return;
      moved[i] = kept.length;
      const place = (operand: number): number =>
        step.nOperands > 0 ? moved[operand]! : kept.length;
      kept.push({ ...step, a: place(step.a), b: place(step.b), c: place(step.c) });
    });
    return { steps: kept, root: moved[root]!, variables: variables.map((v) => moved[v]!) };
  }
}
