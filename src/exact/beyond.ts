/**
 * A bound of what a mean may owe to what lies beyond a place, towards ±∞ or into a pole: the
 * growths of density and quantity add up to that of their product, which proves a hat over it.
 */
import { hatOver } from '../envelope/hat';
import { InputError } from '../errors';
import type { Encloser } from '../formula/enclose';
import type { Side } from '../formula/side';
import { SideEncloser } from '../formula/side';
import type { Tape } from '../formula/tape';
import { addUp, mulUp, powerOfTwo } from '../numeric/float';
import * as I from '../numeric/interval';
import { shortNumber } from '../numeric/text';

/** What lies beyond should be no more than this, as a share of the mean distance of the quantity from its mean. */
export const WANTED_BEYOND = 2e-8;

/** A tape and what encloses it. */
interface Enclosed {
  readonly tape: Tape;
  readonly encloser: Encloser;
}

/** One side of a density f and a quantity g. */
export class Beyond {
  private readonly ofDensity: SideEncloser;
  private readonly ofQuantity: SideEncloser;
  private readonly room = I.interval();

  constructor(
    private readonly side: Side,
    private readonly density: Enclosed,
    private readonly quantity: Enclosed,
  ) {
    this.ofDensity = new SideEncloser(density.tape, density.encloser, side);
    this.ofQuantity = new SideEncloser(quantity.tape, quantity.encloser, side);
  }

  /** A bound of the integral of |g − centre|·f from a distance on, which is at x. */
  most(distance: number, x: number, centre: number): number | 'infinite' | 'unknown' {
    const { side, room } = this;
    const f = this.ofDensity.factors(distance);
    const g = this.ofQuantity.factors(distance);
    if (f === null || g === null) return 'unknown';
    // Beyond the doubles no factor is left out, which needs no scale.
    const { exponent } = this.density.encloser;
    const scale = Math.abs(exponent) <= 1000 ? powerOfTwo(-exponent) : 0;
    this.density.encloser.densityAt(x, room);
    const atX = Math.max(0, room.hi);
    this.quantity.encloser.densityAt(x, room);
    const size = Math.max(Math.abs(room.lo), Math.abs(room.hi));
    const product = hatOver(side, distance, [...f, ...g], mulUp(atX, size), scale);
    const own = centre === 0 ? null : hatOver(side, distance, f, atX, scale);
    if (typeof product === 'string') return product;
    if (typeof own === 'string') return own;
    return addUp(product.hat.area, own ? mulUp(Math.abs(centre), own.hat.area) : 0);
  }
}

/** A side on which no bound of a mean is found. */
export function refusedBeyond(
  { origin, direction, isBeyond }: Side,
  isInfinite: boolean,
  where: string,
): InputError {
  const place = isBeyond
    ? `towards ${direction > 0 ? 'larger' : 'smaller'} x`
    : `near x = ${shortNumber(origin)}`;
  return new InputError(
    where,
    isInfinite
      ? `its mean is infinite, by what lies ${place}`
      : `its mean cannot be bounded ${place}`,
    'cap it with MIN or MAX, or give limits that leave the place out',
  );
}
