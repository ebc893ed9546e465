/** Why a density of several variables is not drawn, in words that say what would help. */
import type { Axis } from '../density/limits';
import { InputError } from '../errors';
import { shortNumber } from '../numeric/text';
import { NEVER_ABOVE } from './refusal';
import type { Box, Space } from './space';

const WHERE = 'Density';

/** A limit narrower than this share of the one given is worth a word. */
const LOOSE = 0.9;

/** "early = 3, late = 0.5" */
export function pointText(axes: readonly Axis[], point: readonly number[]): string {
  return axes.map(({ name }, i) => `${name} = ${shortNumber(point[i]!)}`).join(', ');
}

function boxText(axes: readonly Axis[], lo: readonly number[], hi: readonly number[]): string {
  return axes
    .map(({ name }, i) =>
      lo[i] === hi[i]
        ? `${name} = ${shortNumber(lo[i]!)}`
        : `${name} from ${shortNumber(lo[i]!)} to ${shortNumber(hi[i]!)}`,
    )
    .join(', ');
}

/** `height` is left out where it stands for a scaled density. */
export function negativeAt(
  axes: readonly Axis[],
  point: readonly number[],
  height?: number,
  isNeverAbove = false,
): InputError {
  const value = height === undefined ? '' : ` (${shortNumber(height)})`;
  const place = `${pointText(axes, point)}${value}`;
  return isNeverAbove
    ? new InputError(
        WHERE,
        `it is never above 0 within the limits, and negative at ${place}`,
        NEVER_ABOVE,
      )
    : new InputError(
        WHERE,
        `it is negative at ${place}`,
        'heights must be 0 or more; use MAX(0, …) if that is meant',
      );
}

export function unsettledSign(axes: readonly Axis[], point: readonly number[]): InputError {
  return new InputError(
    WHERE,
    `whether it is negative near ${pointText(axes, point)} cannot be settled`,
    'write it so that it cannot be negative, for example as a square instead of its expanded powers, or with MAX(0, …)',
  );
}

export function undefinedIn(
  axes: readonly Axis[],
  lo: readonly number[],
  hi: readonly number[],
  reason: string,
  also = '',
): InputError {
  return new InputError(
    WHERE,
    `it is undefined for ${boxText(axes, lo, hi)}, where ${reason}${also && `, though ${also}`}`,
    also === ''
      ? 'keep the limits where it is defined, or give it a height there with IF'
      : 'add a condition that leaves this out, keep the limits where it is defined, or give it a height there with IF',
  );
}

/** A domain that conditions may imply, but not in a way that is seen to. */
export function unsettledDomain(
  axes: readonly Axis[],
  point: readonly number[],
  reason: string,
): InputError {
  return new InputError(
    WHERE,
    `whether the conditions keep it defined cannot be settled near ${pointText(axes, point)}, where ${reason}`,
    'write the condition with the very expression that must not be negative, or keep that in its range yourself, as in SQRT(MAX(0, …)), which changes nothing where the conditions hold',
  );
}

export function unboundedIn(
  axes: readonly Axis[],
  lo: readonly number[],
  hi: readonly number[],
): InputError {
  return new InputError(
    WHERE,
    `it cannot be bounded for ${boxText(axes, lo, hi)}`,
    'leave it out by the limits or a condition, or cap the height, as in MIN(…, 1000), if that is meant: a pole is not drawn in several variables',
  );
}

export function emptyRegion(axes: readonly Axis[]): InputError {
  return new InputError(
    WHERE,
    `it is proved to be 0 for all ${axes.map(({ name }) => name).join(', ')} within the limits`,
    'no plan satisfies the conditions: loosen one, or widen the limits',
  );
}

/** An equation of continuous variables, by its two sides. */
export function holdsOnNoVolume(text: string, left: string, right: string): InputError {
  return new InputError(
    WHERE,
    `"${text}" holds on no volume, since its variables are continuous`,
    `leave one variable out and work it out from the others, or give room, as in ABS((${left})-(${right}))<=0.01`,
  );
}

/** `boxes` are where the density may be above 0. */
export function acceptedTooRarely(
  space: Space,
  boxes: readonly Box[],
  promised: number,
): InputError {
  const loose = space.axes.flatMap(({ name, from, to }, i) => {
    const lo = boxes.reduce((least, box) => Math.min(least, box.lo[i]!), Infinity);
    const hi = boxes.reduce((most, box) => Math.max(most, box.hi[i]!), -Infinity);
    const [a, b] = [space.coordinate(i, lo), space.coordinate(i, hi)];
    return b - a < LOOSE * (to - from)
      ? [`${name} from ${shortNumber(a)} to ${shortNumber(b)}`]
      : [];
  });
  return new InputError(
    WHERE,
    `only ${shortNumber(promised)} of proposals are sure to be accepted after ${boxes.length} boxes, and less than 0.01 is not drawn`,
    loose.length > 0
      ? `narrow the limits; nothing lies outside ${loose.join(', ')}`
      : 'narrow the limits to where the density matters, simplify the conditions, or take a thin set by its thickness: a variable gap with limits of its own in place of one that is another plus gap',
  );
}
