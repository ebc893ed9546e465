/**
 * Worksheet values of the grid library to and from the ranges of the functions.
 *
 * The grid hands over one `{value}` object, or columns of them (column-major);
 * the functions take rows of plain cells. −0 becomes 0 in both directions, a blank comes
 * in as null and goes out as an empty text, as on every other host. Not handled here: what the cells mean.
 */
import type { Cell, ErrorCell, Range } from '../../src/index';

/** One cell as the grid hands it over; an error cell's value is its code. */
export interface GridCell {
  readonly value: number | string | boolean | null;
  readonly message?: string;
  /** How the grid shows a number, such as `0.00`. */
  readonly format?: string;
}
/** An argument as the grid hands it over: omitted, one cell, or columns of cells. */
export type GridArgument = undefined | GridCell | readonly (readonly GridCell[])[];

/** Tells an error code from a text. */
type IsErrorCode = (value: GridCell['value']) => boolean;

/**
 * The argument as rows of cells, null when omitted.
 * Guarantee: rectangular; blanks are null, −0 is 0, an error cell is `{error: code}`.
 */
export function toRange(argument: GridArgument, isErrorCode: IsErrorCode): Range | null {
  if (argument === undefined) return null;
  const columns = columnsOf(argument);
  const first = columns[0] ?? [];
  return first.map((_, row) => columns.map((column) => toCell(column[row], isErrorCode)));
}

/**
 * A result as columns of grid cells, numbers in a format if one is given.
 * @throws {Error} a bug of ours: a ragged result, or a cell the grid would show as 0 (NaN, infinity).
 */
export function toColumns(result: Range, format?: string): GridCell[][] {
  const width = result[0]?.length ?? 0;
  if (width === 0) throw new Error('bug: an empty result');
  const columns: GridCell[][] = Array.from({ length: width }, () => []);
  for (const row of result) {
    if (row.length !== width) throw new Error('bug: a ragged result');
    row.forEach((cell, i) => columns[i]?.push(toGridCell(cell, format)));
  }
  return columns;
}

/** The first error cell with this code in the arguments, so that its own message and origin go with it. */
export function findErrorCell(args: readonly GridArgument[], code: string): GridCell | undefined {
  for (const argument of args) {
    if (argument === undefined) continue;
    for (const column of columnsOf(argument)) {
      for (const cell of column) if (cell.value === code) return cell;
    }
  }
  return undefined;
}

function columnsOf(argument: Exclude<GridArgument, undefined>): readonly (readonly GridCell[])[] {
  return isColumns(argument) ? argument : [[argument]];
}

function isColumns(
  argument: Exclude<GridArgument, undefined>,
): argument is readonly (readonly GridCell[])[] {
  return Array.isArray(argument);
}

function toCell(cell: GridCell | undefined, isErrorCode: IsErrorCode): Cell {
  const value = cell?.value ?? null;
  if (typeof value === 'number') return value + 0;
  if (typeof value === 'string' && isErrorCode(value)) return { error: value };
  return value;
}

function toGridCell(cell: Cell, format: string | undefined): GridCell {
  if (typeof cell === 'number') {
    if (!Number.isFinite(cell)) throw new Error(`bug: a result of ${cell}`);
    return format === undefined ? { value: cell + 0 } : { value: cell + 0, format };
  }
  if (cell === null) return { value: '' };
  if (isErrorCell(cell)) return { value: cell.error, message: cell.error };
  return { value: cell };
}

function isErrorCell(cell: Exclude<Cell, null>): cell is ErrorCell {
  return typeof cell === 'object';
}
