/**
 * Whether heights drawn under a hat can be told from the density. Far out and near a
 * pole a formula may cancel so badly that its enclosure decides nothing; a draw would
 * then be a guess.
 * Source: src/METHOD.md, "Under a hat". Not handled: pieces, whose near-ties are counted
 * as they come.
 */
import { Encloser } from '../formula/enclose';
import * as I from '../numeric/interval';
import { powerOfTwo } from '../numeric/float';
import type { Hat } from './hat';
import { placeOn } from './hat';

/** s is looked at from 1 down to this power of two; what lies beyond counts as untold. */
const HALVINGS = 54;

/** A bound, as checked at every halving of s, of the area in which the density's enclosure decides nothing. */
export function untoldArea(
  hat: Hat,
  exponent: number,
  densityAt: (x: number, out: I.Interval) => void,
): number {
  const near = hat.near && new Encloser(hat.near, exponent);
  const at = { x: 0, t: 0, height: 0 };
  const density = I.interval();
  let untold = hat.area * powerOfTwo(-HALVINGS);
  for (let j = 1; j <= HALVINGS; j++) {
    placeOn(hat, powerOfTwo(-j), at);
    if (near) near.densityAt(at.t, density);
    else densityAt(at.x, density);
    const open = (density.hi - Math.max(0, density.lo)) / at.height;
    untold += hat.area * powerOfTwo(-j) * (open < 1 ? open : 1);
  }
  return untold;
}
