/** The rows that a draw is asked for: a number of them, or the first and the last. */
import type { Cell, Range } from '../density/cells';
import { lineOfCells, quoted } from '../density/cells';
import { InputError } from '../errors';

/** As many rows as a sheet has below a heading. */
export const MAX_ROWS = 1_048_575;

/** Cells and the place they were read from, for messages. */
export interface Placed<T> {
  readonly range: T;
  readonly where: string;
}

/** @throws {InputError} for anything but one or two whole numbers from 1 to MAX_ROWS in order. */
export function readRows({ range, where }: Placed<Range | null>): {
  firstRow: number;
  nRows: number;
} {
  const expected = `give a whole number from 1 to ${MAX_ROWS}`;
  if (range === null) throw new InputError(where, 'they are missing', expected);
  const cells = lineOfCells(range, where).map((cell) => wholeRow(cell, where, expected));
  if (cells.length === 1) return { firstRow: 1, nRows: cells[0]! };
  const [first, last] = cells;
  const wanted = 'give one number of rows, or the first and the last row';
  if (cells.length !== 2) throw new InputError(where, `${cells.length} cells`, wanted);
  if (first! > last!) {
    throw new InputError(where, `the last row (${last}) is before the first (${first})`, wanted);
  }
  return { firstRow: first!, nRows: last! - first! + 1 };
}

function wholeRow(cell: Cell, where: string, expected: string): number {
  if (typeof cell !== 'number') {
    throw new InputError(where, `${quoted(cell)} is not a number`, expected);
  }
  if (Math.floor(cell) !== cell) throw new InputError(where, `${cell} is not whole`, expected);
  if (cell < 1) throw new InputError(where, `${cell} is below 1`, expected);
  if (cell > MAX_ROWS) throw new InputError(where, `${cell} is above ${MAX_ROWS}`, expected);
  return cell;
}
