/** How much of an enclosure lies where roots, logarithms and inverse functions are defined. */
import type { Interval } from '../../numeric/interval';
import { Defined } from '../operation';

export function nonNegative(u: Interval): Defined {
  return u.lo >= 0 ? Defined.Everywhere : u.hi >= 0 ? Defined.InPart : Defined.Nowhere;
}

export function positive(u: Interval): Defined {
  return u.lo >= 0 && u.hi > 0 ? Defined.Everywhere : u.hi > 0 ? Defined.InPart : Defined.Nowhere;
}

/** For functions of −1 ≤ u ≤ 1. */
export function withinUnit(u: Interval): Defined {
  if (u.lo >= -1 && u.hi <= 1) return Defined.Everywhere;
  return u.lo <= 1 && u.hi >= -1 ? Defined.InPart : Defined.Nowhere;
}

/** −1 or 1, whichever lies inside u. */
export function endOfUnit(u: Interval): number {
  return u.lo < 1 && u.hi > 1 ? 1 : -1;
}
