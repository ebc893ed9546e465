/** Stretches where a formula has no value, with the reason for the message. */
import * as I from '../../numeric/interval';
import * as J from '../../numeric/jet';
import type { Operation } from '../operation';
import { Defined } from '../operation';
import type { Maker } from '../row';
import { CHOOSE_BY } from './choice';

/** A node that is nowhere defined; `outside` completes "…, where {outside}". */
export function undefinedBecause(make: Maker, outside: string): number {
  const nothing: Operation = {
    name: `undefined: ${outside}`,
    point: () => NaN,
    enclose: (out) => I.setEntire(out),
    slopes: (out) => J.setUnknown(out),
    defined: () => Defined.Nowhere,
    outside,
  };
  return make.apply(nothing, make.number(0));
}

/** `value` where `condition` holds; elsewhere undefined. */
export function where(make: Maker, condition: number, value: number, outside: string): number {
  const known = make.enclosure(condition);
  if (known?.lo === 1) return value;
  return make.apply(CHOOSE_BY, value, undefinedBecause(make, outside), condition);
}
