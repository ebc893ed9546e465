/**
 * What lies under a hat, beyond the pieces, as one cell: areas by the double
 * exponential rule in the hat's own uniform number s, in which density over hat is
 * smooth but for its end at s = 0 (±∞ or the pole).
 *
 *      x = ±∞ or the pole        where the pieces begin
 *      s = 0 ─────────────────── s = 1
 *
 * Areas from the outer end on keep their digits however small.
 * Near a pole the density is taken by its distance, which x cannot tell.
 */
import type { Envelope } from '../envelope/envelope';
import type { Hat } from '../envelope/hat';
import { placeOn } from '../envelope/hat';
import { Encloser } from '../formula/enclose';
import { evaluator } from '../formula/evaluate';
import type { Tape } from '../formula/tape';
import * as elementary from '../numeric/elementary';
import { powerOfTwo } from '../numeric/float';
import type { Cell } from './cells';
import { heightOf, SAFE } from './height';
import { endpointIntegral } from './quadrature';

const PRECISE = 1e-15;

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
  const at = { x: 0, t: 0, height: 0 };
  const perUniform = areaPerUniform(hat, envelope.exponent, height);
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

/**
 * True where a double cannot hold the heights that the share beyond x is made of: under a power,
 * whose area reaches many times farther than x. Under an exponential it ends soon after x.
 * Measured: 12 digits of a share are told down to heights of SAFE, none where heights are 0.
 */
export function isTooFaint(envelope: Envelope, x: number, direction: -1 | 1): boolean {
  return envelope.hats.some(
    (hat) =>
      hat.kind === 'power' &&
      hat.direction === direction &&
      (x - hat.origin) * direction > hat.c &&
      heightOf(envelope)(x) < SAFE,
  );
}

/** The integral of weight · density over what lies under a hat. */
export function hatIntegral(
  hat: Hat,
  { exponent }: Pick<Envelope, 'exponent'>,
  height: (x: number) => number,
  weight: (x: number) => number,
): number {
  const perUniform = areaPerUniform(hat, exponent, height);
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
  exponent: number,
  height: (x: number) => number,
): (s: number) => { readonly distance: number; readonly area: number } {
  const { origin, direction, near, c } = hat;
  const density = near
    ? nearPole(near, exponent, c)
    : (t: number): number => height(origin + direction * t);
  const at = { x: 0, t: 0, height: 0 };
  return (s) => {
    placeOn(hat, s, at);
    const isTold = at.t < Infinity && at.height > 0;
    const share = isTold ? density(at.t) / at.height : 0;
    return { distance: at.t, area: share > 0 ? hat.area * Math.min(1, share) : 0 };
  };
}

/** The s of a distance t: the hat's area beyond it as a share of all. */
export function shareBeyond({ kind, c, rate }: Hat, t: number): number {
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
function nearPole(near: Tape, exponent: number, c: number): (t: number) => number {
  const encloser = new Encloser(near, exponent);
  return heightOf({
    // Not a number sends who asks to the enclosure.
    heightAt: exponent === 0 ? evaluator(near) : () => NaN,
    densityAt: (t, out) => encloser.densityAt(t, out),
    from: 0,
    to: c,
  });
}
