/**
 * One piece of an envelope: an upper and a lower straight line over [from, to],
 * both proved by the bounds on f″ (src/METHOD.md, "A piece").
 */
import {
  addDown,
  addUp,
  divDown,
  divUp,
  down,
  middle,
  mulDown,
  mulUp,
  ulp,
  up,
} from '../numeric/float';
import type { Interval } from '../numeric/interval';
import type { Jet } from '../numeric/jet';

export interface Piece {
  readonly from: number;
  readonly to: number;
  /** Heights of the upper line at the ends; Infinity when there is no bound yet. */
  readonly upperLeft: number;
  readonly upperRight: number;
  /** Heights of the lower line at the ends, ≥ 0. */
  readonly lowerLeft: number;
  readonly lowerRight: number;
  /** Areas under the two lines, rounded outward. */
  readonly upperArea: number;
  readonly lowerArea: number;
  /** An enclosure of the area under the density. */
  readonly areaLo: number;
  readonly areaHi: number;
  /** A lower bound of the density itself, which may be negative. */
  readonly least: number;
  /** What is known beyond the lines; null where the density is its lines. */
  readonly inside: Inside | null;
}

/**
 * What bounds the density more closely than its lines: the middle, then lower and upper bounds of
 * the density at from, middle and to, and of f″ between them. An array, since every examined piece
 * makes one.
 */
export type Inside = readonly number[];
export const N_INSIDE = 9;

/** Lines are evaluated in doubles when drawing: their ends leave room for that rounding. */
const LINE_ROOM = 4e-16;

/** The middle of a piece only a few doubles wide tells nothing. */
const MAX_OFF = 1e-3;

/** A trapezoid's area, rounded up; the width is halved, since half a height may be no double. */
function areaUp(left: number, right: number, width: number): number {
  return mulUp(addUp(left, right), width / 2);
}

function areaDown(left: number, right: number, width: number): number {
  return mulDown(addDown(left, right), width / 2);
}

/** What three underflowing products can lose. */
const UNDERFLOW = 1.5e-323;

/** Enclosures of the density at the ends and at the double `x` between them; entire where it is undefined. */
interface PieceEnds {
  readonly atFrom: Interval;
  readonly atTo: Interval;
  readonly atMiddle: Interval;
}

/**
 * How far a function can rise above its chord, when −f″ ≤ bend and it lies `lift`
 * above the chord at the middle: on each half it stays below a parabola through the
 * known points.
 *
 *          ___
 *       .'  |  '.      half = half the width
 *      /    | lift     on the left half, s from the end:
 *     a-----+------b   rise ≤ lift·s/half + bend·s(half − s)/2
 */
function rise(bend: number, lift: number, half: number): number {
  if (!(bend > 0)) return 0;
  const whole = mulUp(mulUp(bend, half), half) / 2;
  if (!(whole < Infinity && lift > -Infinity && lift < whole)) return whole;
  const at = half / 2 + lift / (bend * half);
  return at <= 0 ? 0 : Math.min(whole, ((bend * at * at) / 2) * (1 + 1e-14));
}

/**
 * The piece that the bounds prove: `f` over [from, to] and the density at three
 * points. Negative parts of f count as 0.
 */
export function provePiece(
  from: number,
  to: number,
  f: Jet,
  { atFrom, atTo, atMiddle }: PieceEnds,
): Piece {
  const width = up(to - from);
  const widthLo = down(to - from);
  const top = Math.max(0, Math.min(f.v.hi, roof(f.d.lo, f.d.hi, atFrom.hi, atTo.hi, width)));
  const floor = Math.max(f.v.lo, -roof(-f.d.hi, -f.d.lo, -atFrom.lo, -atTo.lo, width));
  const bottom = Math.max(0, floor);
  // The middle is a double, off the centre by this share of the width at most.
  const off = ulp(Math.max(Math.abs(from), Math.abs(to))) / width;
  const half = up((width / 2) * (1 + 2 * off));
  const slack =
    off > MAX_OFF ? Infinity : mulUp(Math.max(atTo.hi - atFrom.lo, atFrom.hi - atTo.lo), off);
  const lift = addUp(addUp(atMiddle.hi, -addDown(atFrom.lo, atTo.lo) / 2), slack);
  const dip = addUp(addUp(addUp(atFrom.hi, atTo.hi) / 2, -atMiddle.lo), slack);
  const gain = rise(-f.h.lo, lift, half);
  const sag = rise(f.h.hi, dip, half);
  const upper = betterUpper(
    Math.max(0, addUp(atFrom.hi, gain)),
    Math.max(0, addUp(atTo.hi, gain)),
    top,
  );
  const dent = mulUp(Math.max(0, f.h.hi), mulUp(width, width)) / 2;
  const lower = bestLower(
    [addDown(atFrom.lo, -sag), addDown(atTo.lo, -sag)],
    [addDown(atFrom.lo, -dent), atTo.lo],
    [atFrom.lo, addDown(atTo.lo, -dent)],
    [bottom, bottom],
  );
  const upperArea = areaUp(upper[0], upper[1], width);
  const lowerArea = areaDown(lower[0], lower[1], widthLo);
  // Never 0, which would cancel an infinite f″.
  const cube = divUp(mulUp(mulUp(width, width), width), 12);
  const cubeLo = divDown(mulDown(mulDown(widthLo, widthLo), widthLo), 12);
  const areaHi = addUp(
    areaUp(atFrom.hi, atTo.hi, width),
    -mulDown(f.h.lo, f.h.lo > 0 ? cubeLo : cube),
  );
  const areaLo = addDown(
    areaDown(atFrom.lo, atTo.lo, widthLo),
    -mulUp(f.h.hi, f.h.hi > 0 ? cube : cubeLo),
  );
  return {
    from,
    to,
    upperLeft: upper[0],
    upperRight: upper[1],
    lowerLeft: lower[0],
    lowerRight: lower[1],
    upperArea,
    lowerArea,
    areaLo: areaLo > lowerArea ? areaLo : lowerArea,
    areaHi: areaHi < upperArea && areaHi >= 0 ? areaHi : upperArea,
    least: Math.max(floor, Math.min(addDown(atFrom.lo, -sag), addDown(atTo.lo, -sag))),
    inside: [
      middle(from, to),
      atFrom.lo,
      atFrom.hi,
      atMiddle.lo,
      atMiddle.hi,
      atTo.lo,
      atTo.hi,
      f.h.lo,
      f.h.hi,
    ],
  };
}

/**
 * The highest that a function can rise between two heights when its slope stays between fall and climb.
 *
 *      /\        the steepest rise from the left meets
 *     /  \       the steepest fall to the right
 *    l    r
 */
function roof(fall: number, climb: number, left: number, right: number, width: number): number {
  if (!(climb < Infinity && fall > -Infinity && left < Infinity && right < Infinity))
    return Infinity;
  if (climb <= 0) return left;
  if (fall >= 0) return right;
  const run = climb - fall;
  if (run === Infinity) return Infinity;
  // Shares of the run first: products of small slopes and heights could underflow to 0.
  const [rising, falling] = [climb / run, -fall / run];
  const terms = [right * rising, left * falling, climb * width * falling];
  const size = terms.reduce((sum, term) => sum + Math.abs(term), 0);
  const height = terms.reduce((sum, term) => sum + term, 0) + size * 2e-15 + UNDERFLOW;
  return height === height ? height : Infinity;
}

function betterUpper(left: number, right: number, top: number): readonly [number, number] {
  const isLine = left + right < top + top;
  const room = (height: number): number => up(height * (1 + LINE_ROOM));
  return isLine ? [room(left), room(right)] : top === 0 ? [0, 0] : [room(top), room(top)];
}

/**
 * The line of the largest area among those that stay ≥ 0. Besides the chord lowered
 * evenly there is the chord that keeps one end and lowers the other four times as
 * far (a tangent of the parabola f″w²τ(1 − τ)/2 at that end), for densities that
 * come down to 0.
 */
function bestLower(...lines: readonly (readonly [number, number])[]): readonly [number, number] {
  let best: readonly [number, number] = [0, 0];
  for (const line of lines) {
    if (line[0] >= 0 && line[1] >= 0 && line[0] + line[1] > best[0] + best[1]) best = line;
  }
  const room = (height: number): number => Math.max(0, down(height * (1 - LINE_ROOM)));
  return [room(best[0]), room(best[1])];
}

/** A piece whose density is the straight line itself. */
export function trapezoid(from: number, to: number, left: number, right: number): Piece {
  const width = to - from;
  const [areaLo, areaHi] = [areaDown(left, right, down(width)), areaUp(left, right, up(width))];
  return {
    from,
    to,
    upperLeft: left,
    upperRight: right,
    lowerLeft: left,
    lowerRight: right,
    upperArea: areaHi,
    lowerArea: areaLo,
    areaLo,
    areaHi,
    least: Math.min(left, right),
    inside: null,
  };
}
