/**
 * A tape over an interval of its variable, or over a box of several: enclosures of f, f′
 * and f″, and of ln|f| with its derivatives where the formula's structure gives them. Over
 * a box the derivatives are those along one direction.
 *
 * Source: the rules of src/METHOD.md, "A piece". ln f is built structurally
 * (product → sum, EXP(u) → u) and meets the direct enclosure, which keeps products
 * of EXPs tight and lets a density that overflows doubles be scaled by 2^-exponent.
 * Not handled: unbounded intervals.
 * The file is long because the enclosures of a step depend on each other.
 */
import type { Interval } from '../numeric/interval';
import * as I from '../numeric/interval';
import type { Jet } from '../numeric/jet';
import * as J from '../numeric/jet';
import { looseProductUp, looseSumDown, looseSumUp, powerOfTwo, up } from '../numeric/float';
import { Defined, turningLevel } from './operation';
import type { Step, Tape } from './tape';
import { ADD } from './operations/arithmetic';
import { CHOOSE_BY } from './operations/choice';
import { EXP } from './operations/exponential';

/** ln 2, enclosed. */
const LN_2 = I.interval(0.6931471805599453, 0.6931471805599454);
/** Beyond this exponent 2^-exponent is no double, and ln f alone gives the scaled density. */
const MAX_DIRECT_EXPONENT = 1000;

/** Enclosures of every step at one point; what `over` needs at the ends of an interval. */
export interface PointValues {
  x: number;
  readonly values: readonly Interval[];
  readonly defined: Uint8Array;
  /** The scaled density at x; entire where it is undefined. */
  readonly density: Interval;
  /** ln of the unscaled density where it had to be asked; entire otherwise. */
  readonly logarithm: Interval;
}

/** A step of the tape that brings a kink, a jump or a domain's end where it passes a level. */
export interface Turn {
  readonly step: number;
  readonly level: number;
}

/** What is known of the scaled density over an interval. */
export interface Enclosure {
  readonly density: Jet;
  /** ln of the unscaled density. */
  readonly logarithm: Interval;
  /** The slope of that, and its second derivative. */
  readonly logarithmSlope: Interval;
  readonly logarithmBend: Interval;
  defined: Defined;
  /** A step that passes its level once inside; null: none is known. */
  turn: Turn | null;
}

const scratch = I.interval();
const scaled = J.jet();
const plainLog = J.jet();
const term = I.interval();

/** Sets out to the jet of ln|u| from the jet of u. */
function logarithmOf(out: Jet, u: Jet): void {
  I.absolute(scratch, u.v);
  if (scratch.hi === 0) I.set(out.v, -Infinity, -Number.MAX_VALUE);
  else I.logarithm(out.v, scratch);
  if (I.holds(u.v, 0)) {
    J.setJump(out);
    return;
  }
  I.divide(out.d, u.d, u.v);
  I.square(scratch, out.d);
  I.divide(out.h, u.h, u.v);
  I.subtract(out.h, out.h, scratch);
}

/** Tightens a jet known to be ≥ 0 by the jet of its logarithm. */
function meetExponential(out: Jet, log: Jet): void {
  I.exponential(scratch, log.v);
  I.meet(out.v, scratch);
  // Where the density touches 0 its logarithm has no slope, and 0 · ∞ says nothing.
  if (!(log.d.lo > -Infinity && log.d.hi < Infinity)) return;
  I.multiplyLoosely(scratch, out.v, log.d);
  I.meet(out.d, scratch);
  I.squareLoosely(scratch, log.d);
  I.addLoosely(scratch, scratch, log.h);
  I.multiplyLoosely(scratch, out.v, scratch);
  I.meet(out.h, scratch);
}

export class Encloser {
  private readonly jets: Jet[];
  /** Jets of ln|step| for the steps through which the root's is built. */
  private readonly logs: (Jet | null)[];
  private readonly hasOwnLog: boolean[];
  private readonly defined: Uint8Array;
  private readonly active: readonly (Step & { place: number })[];
  private readonly variables: readonly number[];
  private readonly shift = I.interval();
  private readonly atPoint: PointValues;
  private readonly result: Enclosure = {
    density: J.jet(),
    logarithm: I.interval(),
    logarithmSlope: I.interval(),
    logarithmBend: I.interval(),
    defined: Defined.Everywhere,
    turn: null,
  };

  /** `exponent`: the density is taken × 2^-exponent. */
  constructor(
    private readonly tape: Tape,
    readonly exponent = 0,
  ) {
    const { steps, root } = tape;
    this.variables = tape.variables;
    this.jets = steps.map((step) => {
      const u = J.jet();
      if (step.enclosure) {
        I.copy(u.v, step.enclosure);
        J.setConstantSlopes(u);
      }
      return u;
    });
    this.defined = new Uint8Array(steps.length);
    this.active = steps.flatMap((step, place) => (step.nOperands > 0 ? [{ ...step, place }] : []));
    const wanted = wantedLogs(steps, root);
    this.logs = steps.map((_, i) => (wanted[i] ? J.jet() : null));
    this.hasOwnLog = steps.map((step, i) => wanted[i]! && step.operation.logarithm !== undefined);
    this.logs.forEach((log, i) => {
      if (log && steps[i]!.enclosure) logarithmOf(log, this.jets[i]!);
    });
    I.scale(this.shift, LN_2, exponent);
    this.atPoint = this.pointValues();
  }

  /** Steps that are worked at every look. */
  get nSteps(): number {
    return this.active.length;
  }

  /** Room for `at`. */
  pointValues(): PointValues {
    return {
      x: NaN,
      values: this.tape.steps.map(({ enclosure }) =>
        enclosure ? I.interval(enclosure.lo, enclosure.hi) : I.interval(),
      ),
      defined: new Uint8Array(this.tape.steps.length),
      density: I.interval(),
      logarithm: I.interval(),
    };
  }

  /** Encloses every step at the double x. */
  at(x: number, out: PointValues): void {
    out.x = x;
    const place = this.variables[0]!;
    if (place >= 0) I.set(out.values[place]!, x, x);
    this.valuesAt(out);
    this.finishPoint(out);
  }

  /** Encloses the scaled density at a point, one coordinate a variable; tells how far it is defined there. */
  densityAtPoint(point: ArrayLike<number>, out: Interval): Defined {
    const at = this.atPoint;
    this.variables.forEach((place, i) => {
      if (place >= 0) I.set(at.values[place]!, point[i]!, point[i]!);
    });
    this.valuesAt(at);
    const { root } = this.tape;
    const state = at.defined[root]! as Defined;
    const value = at.values[root]!;
    if (state !== Defined.Everywhere) I.setEntire(out);
    else if (this.isTold(value)) I.copy(out, value);
    else I.copy(out, this.overBox(point, point, []).density.v);
    return state;
  }

  /** True where the direct value neither overflows nor is lost to underflow; else the logarithm may still know it. */
  private isTold({ lo, hi }: Interval): boolean {
    return this.exponent === 0 && hi < Infinity && (lo !== 0 || hi === 0);
  }

  /** Encloses every step at the point that the variables' values stand at. */
  private valuesAt({ values, defined }: PointValues): void {
    for (const { operation, a, b, c, place } of this.active) {
      const u = values[a]!;
      const v = values[b]!;
      const state = definedState(
        operation,
        u,
        v,
        values[c]!,
        defined[a]!,
        defined[b]!,
        defined[c]!,
      );
      defined[place] = state;
      if (state === Defined.Nowhere) I.setEntire(values[place]!);
      else operation.enclose(values[place]!, u, v, values[c]!);
    }
  }

  private finishPoint(out: PointValues): void {
    const { root } = this.tape;
    const { density } = out;
    I.setEntire(out.logarithm);
    if (out.defined[root] !== Defined.Everywhere) {
      I.setEntire(density);
      return;
    }
    I.copy(density, out.values[root]!);
    if (!this.isTold(density)) {
      const there = this.over(out.x, out.x, null, null);
      I.copy(density, there.density.v);
      I.copy(out.logarithm, there.logarithm);
    }
  }

  /** Encloses the scaled density at the double x. */
  densityAt(x: number, out: Interval): void {
    this.at(x, this.atPoint);
    I.copy(out, this.atPoint.density);
  }

  /**
   * Encloses everything over [a, b]. Given the steps at both ends, a step that is
   * monotone between them is bounded by its end values. The result is valid until
   * the next call.
   */
  over(a: number, b: number, atA: PointValues | null, atB: PointValues | null): Enclosure {
    this.setVariable(0, a, b, 1);
    const mayTurn = this.stepsOver(atA, atB);
    const log = this.logs[this.tape.root]!;
    if (atA && atB && this.defined[this.tape.root] === Defined.Everywhere)
      tightenByEnds(log, atA.logarithm, atB.logarithm, b - a);
    return this.finish(mayTurn);
  }

  /**
   * Encloses everything over the box [lo, hi], with derivatives along the sum of some axes.
   * The result is valid until the next call; it tells no turns.
   */
  overBox(lo: ArrayLike<number>, hi: ArrayLike<number>, axes: readonly number[]): Enclosure {
    for (let i = 0; i < this.variables.length; i++)
      this.setVariable(i, lo[i]!, hi[i]!, axes.includes(i) ? 1 : 0);
    this.stepsOver(null, null);
    return this.finish(false);
  }

  private setVariable(i: number, lo: number, hi: number, slope: number): void {
    const place = this.variables[i]!;
    if (place < 0) return;
    const x = this.jets[place]!;
    I.set(x.v, lo, hi);
    I.set(x.d, slope, slope);
    I.set(x.h, 0, 0);
    const log = this.logs[place];
    if (log) logarithmOf(log, x);
  }

  /** Encloses every step; true if one of them may turn. */
  private stepsOver(atA: PointValues | null, atB: PointValues | null): boolean {
    const { jets, defined } = this;
    let mayTurn = false;
    for (const { operation, a: p, b: q, c: r, place } of this.active) {
      const out = jets[place]!;
      const u = jets[p]!;
      const v = jets[q]!;
      const w = jets[r]!;
      const state = definedState(operation, u.v, v.v, w.v, defined[p]!, defined[q]!, defined[r]!);
      defined[place] = state;
      if (state === Defined.Nowhere) J.setUnknown(out);
      else {
        operation.enclose(out.v, u.v, v.v, w.v);
        if (state === Defined.Everywhere) operation.slopes(out, u, v, w);
        else J.setJump(out);
      }
      if (operation.turnsOn !== undefined && !mayTurn) {
        const turning = jets[operation.turnsOn === 0 ? p : operation.turnsOn === 1 ? q : r]!.v;
        mayTurn = turningLevel(operation, turning) === turningLevel(operation, turning);
      }
      this.logOf(place, operation.logarithm, p, q, r);
      if (atA && atB && state === Defined.Everywhere) tightenMonotone(out, place, atA, atB);
    }
    return mayTurn;
  }

  private logOf(
    place: number,
    structural: Step['operation']['logarithm'],
    p: number,
    q: number,
    r: number,
  ): void {
    const { jets, logs } = this;
    const log = logs[place];
    if (!log) return;
    const out = jets[place]!;
    if (!this.hasOwnLog[place] || this.defined[place] !== Defined.Everywhere) {
      logarithmOf(log, out);
      return;
    }
    const fallback = log;
    structural!(
      log,
      [logs[p] ?? fallback, logs[q] ?? fallback, logs[r] ?? fallback],
      [jets[p]!, jets[q]!, jets[r]!],
    );
    if (structural === ADD.logarithm && !I.holds(out.v, 0)) {
      // 1 + t² is smooth where the logarithm of t² is steep; and a sum with a negative term has no structure to use.
      logarithmOf(plainLog, out);
      J.meetJet(log, plainLog);
    } else if (log.v.hi === Infinity) {
      logarithmOf(log, out);
      return;
    }
    if (out.v.lo >= 0 && structural !== EXP.logarithm) meetExponential(out, log);
  }

  private finish(mayTurn: boolean): Enclosure {
    const { result } = this;
    const { root } = this.tape;
    const log = this.logs[root]!;
    result.defined = this.defined[root]!;
    if (this.exponent === 0) J.copyJet(result.density, this.jets[root]!);
    else this.scaleRoot(result.density, this.jets[root]!, log);
    I.copy(result.logarithm, log.v);
    I.copy(result.logarithmSlope, log.d);
    I.copy(result.logarithmBend, log.h);
    result.turn = mayTurn ? this.findTurn() : null;
    return result;
  }

  private scaleRoot(out: Jet, direct: Jet, log: Jet): void {
    const isDirect = Math.abs(this.exponent) <= MAX_DIRECT_EXPONENT;
    if (isDirect) {
      const k = powerOfTwo(-this.exponent);
      I.set(term, k, k);
      J.scaleJet(out, direct, term);
    } else if (direct.v.lo === 0 && direct.v.hi === 0) J.copyJet(out, direct);
    else J.setUnknown(out);
    if (direct.v.lo >= 0) {
      if (out.v.lo < 0) I.set(out.v, 0, Infinity);
      J.copyJet(scaled, log);
      I.subtract(scaled.v, log.v, this.shift);
      meetExponential(out, scaled);
    }
  }

  /** The first turning step that counts and passes its level once, steadily. */
  private findTurn(): Turn | null {
    let found: Turn | null = null;
    const { jets } = this;
    const isRelevant = new Uint8Array(jets.length);
    isRelevant[this.tape.root] = 1;
    for (let i = this.active.length - 1; i >= 0; i--) {
      const { operation, a, b, c, place } = this.active[i]!;
      if (!isRelevant[place]) continue;
      isRelevant[a] = isRelevant[b] = isRelevant[c] = 1;
      if (operation === CHOOSE_BY) {
        const condition = jets[c]!.v;
        if (condition.lo === 1 && a !== b) isRelevant[b] = 0;
        if (condition.hi === 0 && a !== b) isRelevant[a] = 0;
      }
      if (operation.turnsOn === undefined) continue;
      const turning = operation.turnsOn === 0 ? a : operation.turnsOn === 1 ? b : c;
      const { v, d } = jets[turning]!;
      const level = turningLevel(operation, v);
      if (level === level && (d.lo > 0 || d.hi < 0)) {
        found = { step: turning, level };
      }
    }
    return found;
  }

  /** Why the last enclosed density is undefined: what its innermost undefined step says. */
  undefinedReason(): string {
    let place = this.tape.root;
    for (;;) {
      const { operation, a, b, c, nOperands } = this.tape.steps[place]!;
      const bad =
        nOperands > 0
          ? [a, b, c].find((operand) => this.defined[operand] !== Defined.Everywhere)
          : undefined;
      if (bad === undefined) return operation.outside ?? 'a value is undefined';
      place = bad;
    }
  }
}

/** A step is as defined as its operands and its own domain allow; IF asks only the branch it takes. */
function definedState(
  operation: Step['operation'],
  u: Interval,
  v: Interval,
  w: Interval,
  ofA: Defined,
  ofB: Defined,
  ofC: Defined,
): Defined {
  let state: Defined;
  if (operation === CHOOSE_BY) {
    const ofBranches = w.lo === 1 ? ofA : w.hi === 0 ? ofB : ofA === ofB ? ofA : Defined.InPart;
    state = Math.max(ofC, ofBranches);
  } else state = Math.max(ofA, ofB, ofC);
  if (operation.defined && state !== Defined.Nowhere) {
    state = Math.max(state, operation.defined(u, v));
  }
  return state;
}

function tightenMonotone(out: Jet, place: number, atA: PointValues, atB: PointValues): void {
  const { lo, hi } = out.d;
  if (lo < 0 && hi > 0) return;
  if (atA.defined[place] !== Defined.Everywhere || atB.defined[place] !== Defined.Everywhere)
    return;
  const first = atA.values[place]!;
  const last = atB.values[place]!;
  if (lo >= 0) I.set(term, first.lo, last.hi);
  else I.set(term, last.lo, first.hi);
  I.meet(out.v, term);
}

/**
 * Tightens a logarithm of bounded slope by its values at both ends of a stretch: that of
 * a product of many factors is the sum of theirs, each taken at its own worst otherwise.
 */
function tightenByEnds(log: Jet, atA: Interval, atB: Interval, width: number): void {
  const { lo, hi } = log.d;
  if (!(lo > -Infinity && hi < Infinity)) return;
  const climb = looseProductUp(Math.max(0, hi), up(width));
  const fall = looseProductUp(Math.max(0, -lo), up(width));
  const most = Math.min(looseSumUp(atA.hi, climb), looseSumUp(atB.hi, fall));
  const least = Math.max(looseSumDown(atA.lo, -fall), looseSumDown(atB.lo, -climb));
  I.set(term, least, most);
  I.meet(log.v, term);
}

/** The steps whose logarithms the root's logarithm is built from. */
function wantedLogs(steps: readonly Step[], root: number): boolean[] {
  const wanted = steps.map(() => false);
  wanted[root] = true;
  for (let i = root; i >= 0; i--) {
    const { operation, a, b, nOperands } = steps[i]!;
    if (!wanted[i] || nOperands === 0 || !operation.logarithm || operation === EXP) continue;
    wanted[a] = wanted[b] = true;
  }
  return wanted;
}
