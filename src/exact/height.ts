/**
 * The scaled density at a point, for integrals: in doubles where they serve, from its
 * enclosure where they overflow, underflow or are undefined.
 */
import type { Envelope } from '../envelope/envelope';
import { next, prev } from '../numeric/float';
import * as I from '../numeric/interval';

/** Below this a product of doubles may have lost digits on the way. */
export const SAFE = 1e-290;

/** A function of x that is finite and ≥ 0 within the limits; a single undefined point has its neighbour's height. */
export function heightOf(
  envelope: Pick<Envelope, 'heightAt' | 'densityAt' | 'from' | 'to'>,
): (x: number) => number {
  const { heightAt, densityAt, from, to } = envelope;
  const enclosure = I.interval();
  const enclosed = (x: number): number => {
    if (densityAt === null) return heightAt(x);
    densityAt(x, enclosure);
    const { lo, hi } = enclosure;
    // What may be 0 and is next to nothing must not be taken for half of that.
    if (lo <= 0 && hi < SAFE) return 0;
    return hi < Infinity ? Math.max(0, lo) / 2 + Math.max(0, hi) / 2 : NaN;
  };
  return (x) => {
    const height = heightAt(x);
    if (height > SAFE && height < Infinity) return height;
    for (const y of [x, x < to ? next(x) : prev(x), x > from ? prev(x) : next(x)]) {
      const other = enclosed(y);
      if (other < Infinity) return Math.max(0, other);
    }
    return 0;
  };
}
