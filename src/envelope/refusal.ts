/** Why a density is not drawn: every refusal of the proof, in words that say what would help. */
import { InputError } from '../errors';
import type { Side } from '../formula/side';
import { shortNumber } from '../numeric/text';

const WHERE = 'Density';

/** A stretch of x, for messages. */
interface Stretch {
  readonly from: number;
  readonly to: number;
}

/** What would be right in place of a density that is nowhere above 0. */
export const NEVER_ABOVE =
  'heights must be 0 or more, and above 0 somewhere: turn the sign, or write MAX where MIN stands';

/** As negativeAt, for a density that is proved to be 0 or less everywhere. */
export function neverAbove(x: number, height?: number): InputError {
  const value = height === undefined ? '' : ` (${shortNumber(height)})`;
  return new InputError(
    WHERE,
    `it is never above 0 within the limits, and negative at x = ${shortNumber(x)}${value}`,
    NEVER_ABOVE,
  );
}

/** `height` is left out where it stands for a scaled density; `isFarOut` is true beyond any limit that was given. */
export function negativeAt(x: number, height?: number, isFarOut = false): InputError {
  const value = height === undefined ? '' : ` (${shortNumber(height)})`;
  return new InputError(
    WHERE,
    `it is negative at x = ${shortNumber(x)}${value}`,
    `heights must be 0 or more; ${isFarOut ? 'give limits, or ' : ''}use MAX(0, …) if that is meant`,
  );
}

export function unsettledSign(x: number): InputError {
  return new InputError(
    WHERE,
    `whether it is negative near x = ${shortNumber(x)} cannot be settled`,
    'write it so that it cannot be negative, for example as a square instead of its expanded powers, or with MAX(0, …)',
  );
}

export function zeroEverywhere({ from, to }: Stretch, except = ''): InputError {
  return new InputError(
    WHERE,
    `it is 0 everywhere from x = ${shortNumber(from)} to x = ${shortNumber(to)}${except}`,
    'some height within the limits must be above 0',
  );
}

export function nothingSeen(): InputError {
  return new InputError(
    WHERE,
    'no height above 0 is found between the limits',
    'give limits around the values that matter',
  );
}

/** `reason` says what the formula does there, e.g. `it divides by zero`. */
export function undefinedOn({ from, to }: Stretch, reason: string): InputError {
  return new InputError(
    WHERE,
    `it is undefined from x = ${shortNumber(from)} to x = ${shortNumber(to)}, where ${reason}`,
    'keep the limits where it is defined, or give it a height there with IF',
  );
}

export function undefinedSide(
  x: number,
  reason: string,
  { direction, isBeyond }: Side,
): InputError {
  const name = isBeyond === direction > 0 ? 'upper' : 'lower';
  return new InputError(
    WHERE,
    `it is undefined at x = ${shortNumber(x)}, where ${reason}`,
    isBeyond
      ? `give a number as the ${name} limit, so that it is defined everywhere within the limits`
      : `give another ${name} limit, so that it is defined everywhere within the limits`,
  );
}

/** As undefinedOn, for a counted quantity. */
export function undefinedAt(x: number, reason: string): InputError {
  return new InputError(
    WHERE,
    `it is undefined at x = ${shortNumber(x)}, where ${reason}`,
    'keep the limits where it is defined, or give it a height there with IF',
  );
}

/** A counted quantity without a limit that spreads over more points than are looked at. */
export function tooManyPoints(n: number, most: number): InputError {
  return new InputError(
    WHERE,
    `it is spread over about ${shortNumber(n)} points`,
    `use a larger step, or 0 for a continuous quantity: at most ${most} points can matter`,
  );
}

export function unboundedNear(x: number): InputError {
  return new InputError(
    WHERE,
    `it cannot be bounded near x = ${shortNumber(x)}`,
    'end or begin the limits there if it grows without limit, keep them away from there or, where the formula is only 0/0, give its height with IF, as in IF(ABS(x)<1E-9, 1, SIN(x)/x)',
  );
}

/** A side that no hat covers. */
export function unproved({ origin, direction, isBeyond }: Side, isInfinite: boolean): InputError {
  const limit = isBeyond === direction > 0 ? 'upper' : 'lower';
  if (isBeyond) {
    const towards = `towards ${direction > 0 ? 'larger' : 'smaller'} x`;
    const found = isInfinite
      ? `its area is infinite ${towards}: it does not fall fast enough`
      : `that its area is finite ${towards} cannot be proved`;
    return new InputError(WHERE, found, `give a number as the ${limit} limit instead of unbounded`);
  }
  const at = shortNumber(origin);
  const found = isInfinite
    ? `its area is infinite at x = ${at}`
    : `it cannot be bounded near x = ${at}`;
  return new InputError(
    WHERE,
    found,
    `${limit === 'lower' ? 'start the limits above' : 'end the limits below'} ${at}`,
  );
}

/** A side on which a hat lies over a density whose digits cancel. */
export function untold({ origin, direction, isBeyond }: Side): InputError {
  const limit = isBeyond === direction > 0 ? 'upper' : 'lower';
  if (isBeyond) {
    return new InputError(
      WHERE,
      `its digits cancel towards ${direction > 0 ? 'larger' : 'smaller'} x, so that heights there cannot be told`,
      `give a number as the ${limit} limit instead of unbounded, or write it so that nothing cancels there`,
    );
  }
  const at = shortNumber(origin);
  const distance =
    direction > 0 ? (origin < 0 ? `x+${shortNumber(-origin)}` : `x-${at}`) : `${at}-x`;
  return new InputError(
    WHERE,
    `its digits cancel near x = ${at}, where it grows without limit`,
    origin === 0
      ? 'write it so that nothing cancels there, or move the limit away from there'
      : `write the distance from there as (${distance}), or measure x from there`,
  );
}

export function acceptedTooRarely(promised: number, nPieces: number, worst: number): InputError {
  return new InputError(
    WHERE,
    `only ${shortNumber(promised)} of proposals are sure to be accepted after ${nPieces} pieces (worst near x = ${shortNumber(worst)})`,
    'narrow the limits to where the density matters, or simplify the formula there',
  );
}
