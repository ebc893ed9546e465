/**
 * How far the pieces reach and what covers the rest: for every unbounded side, and
 * for a limit at which the density has a pole, the nearest place from which a proved
 * hat holds no more than a small share of the area.
 * Source: src/METHOD.md, "Unbounded sides" and "Poles".
 */
import type { Encloser } from '../formula/enclose';
import { Defined } from '../formula/operation';
import type { Side } from '../formula/side';
import { SideEncloser } from '../formula/side';
import type { Tape } from '../formula/tape';
import * as elementary from '../numeric/elementary';
import { powerOfTwo, ulp } from '../numeric/float';
import { hatOver } from './hat';
import { negativeAt, undefinedSide, unproved } from './refusal';
import type { Survey } from './survey';
import { survey } from './survey';

/** A hat should hold no more than this share of the area seen. */
const WANTED_SHARE = 4e-4;
/** Distances tried: from the width of the density by factors of 1.5 and 4/3, up to this many doublings. */
const MAX_DOUBLINGS = 120;

/** Nearer to a pole than this many units of its last place x tells the distance too badly for pieces; 2^28. */
const UNITS_TOLD = 268435456;

/** A side that needs a hat, and the distance from its origin at which the hat begins. */
export interface Reach {
  readonly side: Side;
  readonly c: number;
}

export interface Reaches {
  /** Where the pieces begin and end. */
  readonly from: number;
  readonly to: number;
  readonly sides: readonly Reach[];
}

/**
 * Finds the reach on limits that may be infinite. Finite limits without a pole come
 * back as they are; null where no height above 0 is seen.
 * @throws {InputError} for a side whose area is infinite or cannot be proved finite.
 */
export function findReaches(
  tape: Tape,
  encloser: Encloser,
  from: number,
  to: number,
): Reaches | null {
  const poles = [
    { at: from, direction: 1 as const },
    { at: to, direction: -1 as const },
  ].filter(({ at, direction }) => Number.isFinite(at) && isPole(encloser, at, direction, from, to));
  const isBounded = Number.isFinite(from) && Number.isFinite(to);
  if (isBounded && poles.length === 0) return { from, to, sides: [] };
  const seen = survey(encloser, from, to, poles[0]?.at ?? null);
  if (seen === null) return null;
  const finder = new Finder(tape, encloser, seen, from, to);
  const sides: Reach[] = [];
  const lower = poles.find(({ direction }) => direction === 1);
  const upper = poles.find(({ direction }) => direction === -1);
  if (from === -Infinity) sides.push(finder.beyond(-1));
  if (lower) sides.push(finder.pole(from, 1));
  if (to === Infinity) sides.push(finder.beyond(1));
  if (upper) sides.push(finder.pole(to, -1));
  const starts = sides.map(({ side, c }) => ({
    x: side.origin + side.direction * c,
    isLower: side.isBeyond === side.direction < 0,
  }));
  return {
    from: starts.find(({ isLower }) => isLower)?.x ?? from,
    to: starts.find(({ isLower }) => !isLower)?.x ?? to,
    sides,
  };
}

/** A limit at which no bound is found however near: a pole, or a 0/0 that the steps cannot see through. */
function isPole(
  encloser: Encloser,
  at: number,
  direction: 1 | -1,
  from: number,
  to: number,
): boolean {
  const scale =
    Number.isFinite(from) && Number.isFinite(to) ? to - from : Math.max(1, Math.abs(at));
  const near = at + direction * scale * powerOfTwo(-40);
  const [a, b] = direction > 0 ? [at, near] : [near, at];
  const { density, defined, logarithm } = encloser.over(a, b, null, null);
  return defined === Defined.Everywhere && density.v.hi === Infinity && logarithm.hi === Infinity;
}

class Finder {
  constructor(
    private readonly tape: Tape,
    private readonly encloser: Encloser,
    private readonly seen: Survey,
    private readonly from: number,
    private readonly to: number,
  ) {}

  beyond(direction: 1 | -1): Reach {
    const side: Side = { origin: 0, direction, isBeyond: true };
    const peak = this.seen.peak * direction;
    const end = direction > 0 ? this.from * direction : this.to * direction;
    // x = direction · t with t > 0, inside the limits.
    const least = Math.max(0, Number.isFinite(end) ? end : 0);
    const candidates: number[] = [];
    for (let k = 0; k < 2 * MAX_DOUBLINGS; k++) {
      const distance = this.seen.width * powerOfTwo(Math.floor(k / 2)) * (k % 2 === 0 ? 1 : 1.5);
      const c = peak + distance;
      if (c > least) candidates.push(c);
    }
    return this.choose(side, candidates);
  }

  pole(origin: number, direction: 1 | -1): Reach {
    const side: Side = { origin, direction, isBeyond: false };
    const room = Math.min(1, this.to - this.from) / 4;
    const least = origin === 0 ? 0 : UNITS_TOLD * ulp(origin);
    const candidates = Array.from(
      { length: MAX_DOUBLINGS },
      (_, k) => room * powerOfTwo(-k),
    ).filter((c, k) => k === 0 || c >= least);
    return this.choose(side, candidates);
  }

  /** The first candidate whose hat is small enough, else the one with the smallest hat. */
  private choose(side: Side, candidates: readonly number[]): Reach {
    const steps = new SideEncloser(this.tape, this.encloser, side);
    let best: { c: number; area: number } | null = null;
    let isInfinite = false;
    for (const candidate of candidates) {
      const x = steps.pointAt(candidate);
      if (x === side.origin || !Number.isFinite(x)) continue;
      // Near a pole x is rounded: the distance that counts is the one at which the hat's height is found.
      const c = (x - side.origin) * side.direction;
      const verdict = this.verdict(steps, side, c, x);
      if (verdict === 'infinite') isInfinite = true;
      if (typeof verdict === 'string') continue;
      if (best === null || verdict.area < best.area) best = { c, area: verdict.area };
      if (verdict.area <= WANTED_SHARE) break;
    }
    if (best !== null) return { side, c: best.c };
    for (const c of candidates) this.refusePoint(steps.pointAt(c), side);
    throw unproved(side, isInfinite);
  }

  /** A side that no hat covers may be negative or undefined: then that is what to say. */
  private refusePoint(x: number, side: Side): void {
    // At the pole itself nothing is defined: its area says what is wrong.
    if (!Number.isFinite(x) || (!side.isBeyond && x === side.origin)) return;
    const { density, defined } = this.encloser.over(x, x, null, null);
    if (defined === Defined.Everywhere && density.v.hi < 0) {
      throw negativeAt(x, density.v.hi, side.isBeyond);
    }
    if (defined === Defined.Nowhere) {
      throw undefinedSide(x, this.encloser.undefinedReason(), side);
    }
  }

  /** The hat's area as a share of the area seen. */
  private verdict(
    steps: SideEncloser,
    side: Side,
    c: number,
    x: number,
  ): { area: number } | 'infinite' | 'unknown' {
    const factors = steps.factors(c);
    if (factors === null) return 'unknown';
    const { logarithm } = this.encloser.over(x, x, null, null);
    if (logarithm.hi === Infinity) return 'unknown';
    const relative = elementary.exp(Math.min(700, logarithm.hi - this.seen.area));
    const scale = elementary.exp(Math.max(-700, Math.min(700, -this.seen.area)));
    const verdict = hatOver(side, c, factors, relative, scale);
    return typeof verdict === 'string' ? verdict : { area: verdict.hat.area };
  }
}
