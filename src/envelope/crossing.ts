/**
 * Where a step of the formula that is monotone over [a, b] changes its sign: two
 * neighbouring doubles, as near as its rounding lets tell, with proved signs.
 *
 *      a ───────── lo │ hi ───────── b
 *      sign proved    ?    sign proved
 */
import type { Encloser, PointValues } from '../formula/enclose';
import { middle, ulp } from '../numeric/float';
import type { Interval } from '../numeric/interval';

export interface Crossing {
  readonly lo: number;
  readonly hi: number;
}

const MAX_STEPS = 200;
/** Doublings of the distance from the crossing before the search gives up. */
const MAX_DOUBLINGS = 30;

function sign(u: Interval): number {
  return u.lo > 0 ? 1 : u.hi < 0 ? -1 : 0;
}

/** The crossing of `step` inside [a, b]; null when it cannot be told from the ends. */
export function findCrossing(
  encloser: Encloser,
  step: number,
  a: number,
  b: number,
  room: PointValues,
): Crossing | null {
  const valueAt = (x: number): Interval => {
    encloser.at(x, room);
    return room.values[step]!;
  };
  const centre = (u: Interval): number => u.lo / 2 + u.hi / 2;
  let lo = a;
  let hi = b;
  let u = valueAt(a);
  const signA = sign(u);
  let atLo = centre(u);
  u = valueAt(b);
  const signB = sign(u);
  let atHi = centre(u);
  if (signA === 0 || signB === 0) return crossingAtEnd(valueAt, a, b, signA, signB);
  if (signA === signB) return null;
  for (let i = 0; i < MAX_STEPS; i++) {
    // A chord first (exact for straight steps), halves in between so that it always ends.
    const chord = lo + (hi - lo) * (atLo / (atLo - atHi));
    const x = i % 2 === 0 && chord > lo && chord < hi ? chord : middle(lo, hi);
    if (x === lo) return { lo, hi };
    u = valueAt(x);
    if (sign(u) === 0) return around(valueAt, x, lo, hi);
    if (sign(u) === signA) {
      lo = x;
      atLo = centre(u);
    } else {
      hi = x;
      atHi = centre(u);
    }
  }
  return { lo, hi };
}

/** Nearest points on both sides of an unsettled x at which the sign is settled. */
function around(valueAt: (x: number) => Interval, x: number, lo: number, hi: number): Crossing {
  return { lo: outward(valueAt, x, lo), hi: outward(valueAt, x, hi) };
}

function outward(valueAt: (x: number) => Interval, x: number, end: number): number {
  const unit = ulp(Math.max(Math.abs(x), Math.abs(end) * 1e-16)) * (end < x ? -1 : 1);
  for (let i = 0, distance = unit; i < MAX_DOUBLINGS; i++, distance *= 2) {
    const y = x + distance;
    if (end < x ? y <= end : y >= end) return end;
    if (sign(valueAt(y)) !== 0) return y;
  }
  return end;
}

/** The step touches 0 at an end: only a sliver there is unsettled. */
function crossingAtEnd(
  valueAt: (x: number) => Interval,
  a: number,
  b: number,
  signA: number,
  signB: number,
): Crossing | null {
  if (signA === 0 && signB === 0) return null;
  return signA === 0
    ? { lo: a, hi: outward(valueAt, a, b) }
    : { lo: outward(valueAt, b, a), hi: b };
}
