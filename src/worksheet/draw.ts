/** DRAW: exact draws, one column a label, or one a variable of several. */
import type { Range } from '../density/cells';
import { drawColumn, prove } from './proved';
import { readAnyDrawRequest } from './request';
import { drawRows, proveSeveral } from './several';
import { sideBySide } from './spill';

/**
 * Draws that follow the density exactly.
 * Shapes: rows × columns of bare values, one column per label, column of heights or variable.
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
  const request = readAnyDrawRequest(density, limits, rows, seed, label, givens);
  const { firstRow, nRows } = request.several ?? request.plain;
  const drawn = request.several
    ? request.several.columns.flatMap(
        ({ shape, key }) => drawRows(proveSeveral(shape), key, firstRow, nRows).columns,
      )
    : request.plain.columns.map(
        ({ shape, key }) => drawColumn(prove(shape), key, firstRow, nRows).values,
      );
  return sideBySide(drawn);
}
