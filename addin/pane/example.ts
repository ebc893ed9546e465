/**
 * The example on the start page: a shape block and the formula that draws from it.
 * Whole numbers and a formula of one argument, because a pasted decimal point or
 * comma would be read by the rules of the sheet's own language.
 */
export const exampleCells: readonly (readonly (string | number)[])[] = [
  ['density', 'EXP(-0.5*((x-m)/s)^2)'],
  ['from', 0],
  ['to', 720],
  ['rows', 2000],
  ['seed', 'plan-2027'],
  ['label', 'downtime'],
  ['m', 240],
  ['s', 78],
  ['', ''],
  ['=UNDERCURVE.DRAW(A1:B8)'],
];

/** The cells as text that a worksheet takes apart again when it is pasted. */
export function exampleAsText(): string {
  return exampleCells.map((row) => row.join('\t')).join('\n');
}
