/**
 * Where a step of the formula that is monotone over [a, b] passes a level: two
 * neighbouring doubles, as near as its rounding lets tell, with proved sides.
 *
 *      a ───────── lo │ hi ───────── b
 *      side proved    ?    side proved
 */
import type { Encloser, PointValues, Turn } from '../formula/enclose';
import { middle, ulp } from '../numeric/float';

interface Crossing {
  readonly lo: number;
  readonly hi: number;
}

const MAX_STEPS = 200;
/** Doublings of the distance from the crossing before the search gives up. */
const MAX_DOUBLINGS = 30;

/** Where a value stands against the level: below (−1), above (1), or not settled (0). */
type Side = -1 | 0 | 1;

/** The crossing of a turning step inside [a, b]; null when it cannot be told from the ends. */
export function findCrossing(
  encloser: Encloser,
  { step, level }: Turn,
  a: number,
  b: number,
  room: PointValues,
): Crossing | null {
  /** The last value looked at, less the level, for chords. */
  let rise = NaN;
  const sideAt = (x: number): Side => {
    encloser.at(x, room);
    const { lo, hi } = room.values[step]!;
    rise = lo / 2 + hi / 2 - level;
    return lo > level ? 1 : hi < level ? -1 : 0;
  };
  const sideA = sideAt(a);
  let riseLo = rise;
  const sideB = sideAt(b);
  let riseHi = rise;
  if (sideA === 0 || sideB === 0) return crossingAtEnd(sideAt, a, b, sideA, sideB);
  if (sideA === sideB) return null;
  let lo = a;
  let hi = b;
  for (let i = 0; i < MAX_STEPS; i++) {
    // A chord first (exact for straight steps), halves in between so that it always ends.
    const chord = lo + (hi - lo) * (riseLo / (riseLo - riseHi));
    const x = i % 2 === 0 && chord > lo && chord < hi ? chord : middle(lo, hi);
    if (x === lo) break;
    const side = sideAt(x);
    if (side === 0) return { lo: outward(sideAt, x, lo), hi: outward(sideAt, x, hi) };
    if (side === sideA) {
      lo = x;
      riseLo = rise;
    } else {
      hi = x;
      riseHi = rise;
    }
  }
  return { lo, hi };
}

/** The nearest tried point from x towards `end` whose side is settled. */
function outward(sideAt: (x: number) => Side, x: number, end: number): number {
  const unit = ulp(Math.max(Math.abs(x), Math.abs(end) * 1e-16)) * (end < x ? -1 : 1);
  for (let i = 0, distance = unit; i < MAX_DOUBLINGS; i++, distance *= 2) {
    const y = x + distance;
    if (end < x ? y <= end : y >= end) return end;
    if (sideAt(y) !== 0) return y;
  }
  return end;
}

/** The step touches its level at an end: only a sliver there is unsettled. */
function crossingAtEnd(
  sideAt: (x: number) => Side,
  a: number,
  b: number,
  sideA: Side,
  sideB: Side,
): Crossing | null {
  if (sideA === 0 && sideB === 0) return null;
  return sideA === 0 ? { lo: a, hi: outward(sideAt, a, b) } : { lo: outward(sideAt, b, a), hi: b };
}
