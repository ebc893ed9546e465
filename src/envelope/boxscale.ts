/**
 * The exponent of two by which a density of several variables is scaled, from proved bounds
 * of ln f alone, as scale.ts does it for one variable.
 */
import FlatQueue from 'flatqueue';
import type { Encloser } from '../formula/enclose';
import * as elementary from '../numeric/elementary';
import type { Box, Space } from './space';

/** While ln f and ln(f · measure) at the peak stay within ± this, doubles serve as they are. */
const PLAIN = 500;
/** The peak of ln f is found to within this. */
const NEAR = 20;
const MAX_STEPS = 2000;
const LN_2 = 0.6931471805599453;

/** The exponent e by which a density is to be scaled (× 2^-e); 0 in the usual case. */
export function findBoxExponent(space: Space, encloser: Encloser): number {
  const queue = new FlatQueue<Box>();
  let reached = -Infinity;
  const consider = (box: Box): void => {
    const centre = space.centre(box);
    reached = Math.max(reached, encloser.overBox(centre, centre, []).logarithm.lo);
    const { lo, hi } = space.corners(box);
    queue.push(box, -encloser.overBox(lo, hi, []).logarithm.hi);
  };
  consider(space.whole());
  let peak = -queue.peekValue()!;
  for (let i = 0; i < MAX_STEPS && peak - reached > NEAR; i++) {
    const box = queue.pop()!;
    const axis = widest(space, box);
    if (axis < 0) break;
    for (const half of space.halves(box, axis)) consider(half);
    peak = -queue.peekValue()!;
  }
  if (peak - reached > NEAR) peak = reached;
  if (peak === -Infinity || peak === Infinity) return 0;
  const widestMeasure = elementary.ln(Math.max(1, space.measure(space.whole()).hi));
  if (peak - NEAR >= -PLAIN && peak + widestMeasure <= PLAIN) return 0;
  return Math.round(peak / LN_2);
}

/** The axis along which a box is widest as a share of the limits, of those that can be halved; −1 for none. */
export function widest(space: Space, box: Box): number {
  let best = -1;
  for (let i = 0; i < space.n; i++) {
    if (!space.isDivisible(box, i)) continue;
    if (best < 0 || space.share(box, i) > space.share(box, best)) best = i;
  }
  return best;
}
