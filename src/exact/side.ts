/**
 * What lies under a hat, beyond the pieces, as one cell: areas by the double
 * exponential rule in the hat's own uniform number s, in which density over hat is
 * smooth but for its end at s = 0 (±∞ or the pole).
 *
 *      x = ±∞ or the pole        where the pieces begin
 *      s = 0 ─────────────────── s = 1
 *
 * Areas from the outer end on keep their digits however small.
 * Near a pole at another place than 0 doubles stand too wide apart to tell the distance
 * from it: there the density goes on with the power of the distance that it has a
 * little further off.
 */
import type { Envelope } from '../envelope/envelope';
import type { Hat } from '../envelope/hat';
import { placeOn } from '../envelope/hat';
import * as elementary from '../numeric/elementary';
import { powerOfTwo, ulp } from '../numeric/float';
import type { Cell } from './cells';
import { endpointIntegral } from './quadrature';

const PRECISE = 1e-15;
/** Distances from a pole below this many units in its last place are not told by doubles. */
const UNITS_TOLD = 4096;

/** True for a hat below the pieces. */
export function isLowerHat({ origin, direction, c }: Hat, { pieces }: Envelope): boolean {
  return origin + direction * c <= pieces[0]!.from;
}

/** The cell under a hat; its parameter is s below the pieces and −s above them. */
export function hatCell(hat: Hat, envelope: Envelope, height: (x: number) => number): Cell {
  const isLower = isLowerHat(hat, envelope);
  const sign = isLower ? 1 : -1;
  const { origin, direction, c } = hat;
  const inner = origin + direction * c;
  const outer = hat.isBeyond ? direction * Infinity : origin;
  const at = { x: 0, height: 0 };
  const perUniform = areaPerUniform(hat, height);
  const slope = (s: number): number => perUniform(s).area;
  const areaOver = (a: number, b: number): number => {
    const [from, to] = isLower ? [a, b] : [-b, -a];
    return endpointIntegral(slope, from, to, PRECISE).value;
  };
  const [start, end] = isLower ? [0, 1] : [-1, 0];
  const [from, to] = isLower ? [outer, inner] : [inner, outer];
  return {
    from,
    to,
    start,
    end,
    area: areaOver(start, end),
    areaOver,
    slopeAt: (u) => slope(u * sign),
    placeAt: (u) => {
      if (u === 0) return outer;
      placeOn(hat, Math.abs(u), at);
      return at.x;
    },
    parameterOf: (x) => sign * Math.min(1, shareBeyond(hat, (x - origin) * direction)),
  };
}

/** The integral of weight · density over what lies under a hat. */
export function hatIntegral(
  hat: Hat,
  height: (x: number) => number,
  weight: (x: number) => number,
): number {
  const perUniform = areaPerUniform(hat, height);
  const { origin, direction } = hat;
  const slope = (s: number): number => {
    const { distance, area } = perUniform(s);
    return area === 0 ? 0 : area * weight(origin + direction * distance);
  };
  return endpointIntegral(slope, 0, 1, PRECISE).value;
}

/** The area for one unit of s, which is density over hat times the hat's area, and the distance at which it lies. */
function areaPerUniform(
  hat: Hat,
  height: (x: number) => number,
): (s: number) => { readonly distance: number; readonly area: number } {
  const { origin, direction } = hat;
  const density = hat.isBeyond
    ? (t: number): number => height(origin + direction * t)
    : nearPole(hat, height);
  const distances: Hat = { ...hat, origin: 0, direction: 1 };
  const at = { x: 0, height: 0 };
  return (s) => {
    placeOn(distances, s, at);
    const isTold = at.x < Infinity && at.height > 0;
    const share = isTold ? density(at.x) / at.height : 0;
    return { distance: at.x, area: share > 0 ? hat.area * Math.min(1, share) : 0 };
  };
}

/** The s of a distance t: the hat's area beyond it as a share of all. */
function shareBeyond({ kind, c, rate }: Hat, t: number): number {
  if (kind === 'exponential') {
    const z = 1 + (rate * (t - c)) / 9;
    const square = z * z;
    const fourth = square * square;
    return 1 / (fourth * fourth);
  }
  const ratio = kind === 'pole' ? t / c : c / t;
  return elementary.pow(ratio, powerOfTwo(rate));
}

/** The density by its distance from a pole. */
function nearPole(
  { origin, direction, c }: Hat,
  height: (x: number) => number,
): (t: number) => number {
  if (origin === 0) return (t) => height(direction * t);
  const told = Math.min(c / 4, UNITS_TOLD * ulp(origin));
  const at = (t: number): number => origin + direction * t;
  const distance = (x: number): number => (x - origin) * direction;
  const [near, far] = [at(told), at(2 * told)];
  const [atNear, atFar] = [height(near), height(far)];
  const power =
    (elementary.ln(atFar) - elementary.ln(atNear)) /
    (elementary.ln(distance(far)) - elementary.ln(distance(near)));
  return (t) => {
    const isTold = t >= told;
    const x = isTold ? at(t) : near;
    return (isTold ? height(x) : atNear) * elementary.pow(t / distance(x), power);
  };
}
