/**
 * The envelope of a table: its own straight lines, above and below. Nothing is left
 * to prove and every proposal is accepted.
 */
import type { Polyline } from '../density/table';
import { powerOfTwo } from '../numeric/float';
import type { Envelope } from './envelope';
import { totalAreas } from './envelope';
import { trapezoid } from './piece';

/** Heights between these give areas that doubles hold. */
const TALLEST = 1e140;
const SHORTEST = 1e-140;

/** The envelope of straight lines between points with some area. */
export function polylineEnvelope({ x, heights }: Polyline): Envelope {
  const exponent = exponentOf(heights.reduce((a, b) => Math.max(a, b)));
  const scaled = heights.map((height) => scaleBy(height, -exponent));
  const pieces = x
    .slice(1)
    .flatMap((to, i) => (to > x[i]! ? [trapezoid(x[i]!, to, scaled[i]!, scaled[i + 1]!)] : []));
  return {
    from: x[0]!,
    to: x.at(-1)!,
    pieces,
    hats: [],
    exponent,
    densityAt: null,
    heightAt: (at) => heightOn(x, scaled, at),
    ...totalAreas(pieces),
    notes: [],
  };
}

function exponentOf(tallest: number): number {
  if (tallest <= TALLEST && tallest >= SHORTEST) return 0;
  let exponent = 0;
  for (let height = tallest; height >= 2; height /= 2) exponent++;
  for (let height = tallest; height < 1; height *= 2) exponent--;
  return exponent;
}

/** height · 2^k in two steps, since 2^k itself may be no double. */
function scaleBy(height: number, k: number): number {
  const half = Math.trunc(k / 2);
  return height * powerOfTwo(half) * powerOfTwo(k - half);
}

/** The line's height at a point; at a jump the right-hand one. */
function heightOn(x: readonly number[], heights: readonly number[], at: number): number {
  if (!(at >= x[0]! && at <= x.at(-1)!)) return 0;
  let lo = 0;
  let hi = x.length - 1;
  while (hi - lo > 1) {
    const mid = (lo + hi) >> 1;
    if (x[mid]! <= at) lo = mid;
    else hi = mid;
  }
  const width = x[hi]! - x[lo]!;
  if (at >= x[hi]! || width === 0) return heights[hi]!;
  return heights[lo]! + (heights[hi]! - heights[lo]!) * ((at - x[lo]!) / width);
}
