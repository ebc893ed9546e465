/** DRAW: exact draws, one column a label. */
import type { Range } from '../density/cells';
import { drawColumn, prove } from './proved';
import { readDrawRequest } from './request';

/**
 * Draws that follow the density exactly.
 * Shapes: rows × columns of bare values, one column per label or column of heights.
 * Guarantee: exact in the sense of src/METHOD.md; row i depends on shape, seed, label and i alone.
 * @throws {InputError} when an argument cannot be read or the density not be proved.
 * @throws {CellErrorPassed} when a cell holds an error value.
 */
export function draw(
  density: Range | null,
  limits: Range | null,
  rows: Range | null,
  seed: Range | null,
  label: Range | null,
  givens: readonly Range[],
): Range {
  const { columns, firstRow, nRows } = readDrawRequest(density, limits, rows, seed, label, givens);
  const drawn = columns.map(
    ({ shape, key }) => drawColumn(prove(shape), key, firstRow, nRows).values,
  );
  // One column is the common case, and takes a third of the time when made by itself.
  if (drawn.length === 1) return Array.from(drawn[0]!, (value) => [value]);
  return Array.from({ length: nRows }, (_, i) => drawn.map((values) => values[i]!));
}
