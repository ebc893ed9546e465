/**
 * One piece of an envelope: an upper and a lower straight line over [from, to],
 * both proved by the bounds on f″ (src/envelope/METHOD.md, "A piece").
 */
import { addDown, addUp, down, mulDown, mulUp, up } from '../numeric/float';
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
}

/** Lines are evaluated in doubles when drawing: their ends leave room for that rounding. */
const LINE_ROOM = 4e-16;

/** A trapezoid's area, rounded up. */
function areaUp(left: number, right: number, width: number): number {
  return mulUp(addUp(left / 2, right / 2), width);
}

function areaDown(left: number, right: number, width: number): number {
  return mulDown(addDown(left / 2, right / 2), width);
}

/**
 * The piece that the bounds prove: `f` over [from, to], `atFrom` and `atTo` at its
 * ends (entire where the density is undefined). Negative parts of f count as 0.
 */
export function provePiece(from: number, to: number, f: Jet, atFrom: Interval, atTo: Interval): Piece {
  const width = up(to - from);
  const widthLo = down(to - from);
  const top = Math.max(0, Math.min(f.v.hi, roof(f.d, atFrom.hi, atTo.hi, width)));
  const floor = Math.max(f.v.lo, -roof({ lo: -f.d.hi, hi: -f.d.lo }, -atFrom.lo, -atTo.lo, width));
  const bottom = Math.max(0, floor);
  const rise = mulUp(Math.max(0, -f.h.lo), mulUp(width, width) / 8);
  const sag = mulUp(Math.max(0, f.h.hi), mulUp(width, width) / 8);
  const upper = betterUpper(Math.max(0, addUp(atFrom.hi, rise)), Math.max(0, addUp(atTo.hi, rise)), top);
  const lower = betterLower(addDown(atFrom.lo, -sag), addDown(atTo.lo, -sag), bottom);
  const upperArea = areaUp(upper[0], upper[1], width);
  const lowerArea = areaDown(lower[0], lower[1], widthLo);
  const cube = mulUp(mulUp(width, width), width) / 12;
  const cubeLo = mulDown(mulDown(widthLo, widthLo), widthLo) / 12;
  const areaHi = addUp(areaUp(atFrom.hi, atTo.hi, width), -mulDown(f.h.lo, f.h.lo > 0 ? cubeLo : cube));
  const areaLo = addDown(areaDown(atFrom.lo, atTo.lo, widthLo), -mulUp(f.h.hi, f.h.hi > 0 ? cube : cubeLo));
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
  };
}

/**
 * The highest that a function can rise between two heights when its slope stays in d.
 *
 *      /\        the steepest rise from the left meets
 *     /  \       the steepest fall to the right
 *    l    r
 */
function roof(d: Interval, left: number, right: number, width: number): number {
  if (!(d.hi < Infinity && d.lo > -Infinity && left < Infinity && right < Infinity)) return Infinity;
  if (d.hi <= 0) return left;
  if (d.lo >= 0) return right;
  const run = d.hi - d.lo;
  const terms = [(right * d.hi) / run, (left * -d.lo) / run, d.hi * (-d.lo / run) * width];
  const size = terms.reduce((sum, term) => sum + Math.abs(term), 0);
  const height = terms.reduce((sum, term) => sum + term, 0) + size * 2e-15;
  return height === height ? height : Infinity;
}

function betterUpper(left: number, right: number, top: number): readonly [number, number] {
  const isLine = left + right < top + top;
  const room = (height: number): number => up(height * (1 + LINE_ROOM));
  return isLine ? [room(left), room(right)] : top === 0 ? [0, 0] : [room(top), room(top)];
}

function betterLower(left: number, right: number, bottom: number): readonly [number, number] {
  const isLine = left >= 0 && right >= 0 && left + right > bottom + bottom;
  const room = (height: number): number => Math.max(0, down(height * (1 - LINE_ROOM)));
  return isLine ? [room(left), room(right)] : [room(bottom), room(bottom)];
}
