/**
 * How far a stretch on which the density is undefined goes: the proof halves the limits
 * and meets a piece of it first, and a message that names the piece alone would send its
 * reader from one half to the next.
 */
import type { Encloser } from '../formula/enclose';
import { Defined } from '../formula/operation';
import { middle, powerOfTwo } from '../numeric/float';

interface Stretch {
  readonly from: number;
  readonly to: number;
}

/** Halvings of the search: an end is found to within 2^-50 of the limits. */
const MAX_STEPS = 50;

/** The widest stretch around `known`, within `limits`, that is proved undefined. */
export function undefinedStretch(encloser: Encloser, known: Stretch, limits: Stretch): Stretch {
  const isUndefined = (a: number, b: number): boolean =>
    encloser.over(a, b, null, null).defined === Defined.Nowhere;
  const to = furthest(known.to, limits.to, (b) => isUndefined(known.from, b));
  const from = furthest(known.from, limits.from, (a) => isUndefined(a, to));
  const negligible = (limits.to - limits.from) * powerOfTwo(-MAX_STEPS);
  // An end at 0 is found as a number next to it, which nobody would recognise.
  const tidy = (end: number): number => (Math.abs(end) <= negligible ? 0 : end);
  return { from: tidy(from), to: tidy(to) };
}

/** The point nearest to `end` that can be reached from `start`. */
function furthest(start: number, end: number, isReached: (x: number) => boolean): number {
  if (start === end || isReached(end)) return end;
  let [reached, beyond] = [start, end];
  for (let i = 0; i < MAX_STEPS; i++) {
    const x = middle(Math.min(reached, beyond), Math.max(reached, beyond));
    if (isReached(x)) reached = x;
    else beyond = x;
  }
  return reached;
}
