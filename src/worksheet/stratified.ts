/** STRATIFIED: draws as of DRAW whose rows are spread evenly. */
import type { Range } from '../density/cells';
import { drawStratified } from '../draw/stratified';
import { InputError } from '../errors';
import { prove } from './proved';
import { DRAW_PLACES, readDrawRequest } from './request';
import { sideBySide } from './spill';

/**
 * Draws whose rows are spread evenly over the density, so that averages have less noise.
 * Shapes: rows × columns of bare values, one column per label, column of heights or line of a list.
 * Guarantee: each row alone is exact in the sense of src/METHOD.md; rows together are not
 * independent, and another number of rows is another column.
 * @throws {InputError} as DRAW does, and for a first and a last row.
 * @throws {CellErrorPassed} when a cell holds an error value.
 */
export function stratified(
  density: Range | null,
  limits: Range | null,
  rows: Range | null,
  seed: Range | null,
  label: Range | null,
  givens: readonly Range[],
): Range {
  const request = readDrawRequest(density, limits, rows, seed, label, givens);
  const { columns, firstRow, nRows } = request;
  if (rows !== null && rows.flat().length > 1) {
    throw new InputError(
      DRAW_PLACES.rows,
      `rows ${firstRow} to ${firstRow + nRows - 1}`,
      'give one number of rows: a stratified column is made as a whole',
    );
  }
  const drawn = columns.map(
    ({ shape, key }) => drawStratified(prove(shape).drawer, key, nRows).values,
  );
  return sideBySide(drawn);
}
