/** How much of an enclosure lies where roots, powers and logarithms are defined. */
import type { Interval } from '../../numeric/interval';
import { Defined } from '../operation';

export function nonNegative(u: Interval): Defined {
  return u.lo >= 0 ? Defined.Everywhere : u.hi >= 0 ? Defined.InPart : Defined.Nowhere;
}

export function positive(u: Interval): Defined {
  return u.lo >= 0 && u.hi > 0 ? Defined.Everywhere : u.hi > 0 ? Defined.InPart : Defined.Nowhere;
}
