/** Numbers as people read them in messages; values in cells keep all their digits. */

/** From here on zeros up to the decimal point say less than an exponent. */
const LARGE = 1e12;

/** Six significant digits at most, without trailing zeros. */
export function shortNumber(x: number): string {
  const rounded = Number(x.toPrecision(6));
  const isLarge = Math.abs(rounded) >= LARGE && Math.abs(rounded) < Infinity;
  return isLarge ? rounded.toExponential() : String(rounded);
}
