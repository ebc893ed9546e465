/** What the parameters of distribution functions must be, and the refusals when they are not. */
import type { Maker } from '../row';
import { setTruth, truth } from '../operation';
import { where } from './undefined';

/** True for TRUE or a number other than 0: the cumulative share is asked for. */
export function isCumulative(make: Maker, flag: number): boolean {
  const known = make.enclosure(flag);
  if (known && (known.lo > 0 || known.hi < 0)) return true;
  if (known && known.lo === 0 && known.hi === 0) return false;
  throw make.refuse(
    'a last argument that is not TRUE or FALSE',
    'give TRUE for the share below x, FALSE for the density',
  );
}

/** As with a logarithm, the end 0 of a stretch of numbers above it does not count. */
const IN_DOMAIN = truth({
  name: 'is above 0',
  point: (a) => (a > 0 ? 1 : a <= 0 ? 0 : NaN),
  enclose: (out, a) => setTruth(out, a.lo >= 0 && a.hi > 0, a.hi <= 0),
  turnsOn: 0,
});

/** The value where a parameter is above 0: refused if it is a constant that is not. */
export function whereAbove0(make: Maker, name: string, parameter: number, value: number): number {
  const known = make.enclosure(parameter);
  if (known && known.lo <= 0) {
    throw make.refuse(`a ${name} that is not above 0`, `give a ${name} above 0`);
  }
  return where(make, make.apply(IN_DOMAIN, parameter), value, `a ${name} is not above 0`);
}

/** A constant above 0, refused otherwise. */
export function checkShape(
  make: Maker,
  name: string,
  parameter: number,
): { lo: number; hi: number } {
  const known = make.enclosure(parameter);
  if (known && known.lo > 0 && known.hi < Infinity) return known;
  throw make.refuse(
    known ? `a ${name} that is not above 0` : `a ${name} that is not a constant`,
    `give a constant ${name} above 0`,
  );
}

/** A whole constant from `least` on; worksheets cut the digits after the point off. */
export function wholeConstant(make: Maker, name: string, node: number, least: number): number {
  const value = make.exactValue(node);
  const whole = value === undefined ? NaN : Math.floor(value);
  if (whole >= least && whole <= Number.MAX_SAFE_INTEGER) return whole;
  throw make.refuse(
    value === undefined ? `a ${name} that is not a constant` : `${value} as the ${name}`,
    `give a constant from ${least} on`,
  );
}

/** Degrees of freedom: whole, because worksheets cut them to whole numbers. */
export function degrees(make: Maker, node: number): number {
  const value = make.exactValue(node);
  if (value !== undefined && value >= 1 && Math.floor(value) === value) return value;
  throw make.refuse(
    value === undefined
      ? 'degrees of freedom that are not a constant'
      : `${value} degrees of freedom`,
    'give a whole constant from 1 on, as worksheets cut the rest off',
  );
}
