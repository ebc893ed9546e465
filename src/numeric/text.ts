/** Numbers as people read them in messages; values in cells keep all their digits. */

/** Six significant digits at most, without trailing zeros. */
export function shortNumber(x: number): string {
  return String(Number(x.toPrecision(6)));
}
