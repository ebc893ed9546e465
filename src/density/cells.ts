/**
 * Cells as the worksheet hands them over, and the readings that all arguments share.
 * A blank inside a range counts as 0 and −0 as 0, on every host: some hosts hand over
 * blanks as 0, so nothing may depend on the difference.
 */
import { CellErrorPassed, InputError } from '../errors';

export interface ErrorCell {
  readonly error: string;
}

/** A number, a text, TRUE or FALSE, a blank (null) or an error value. */
export type Cell = number | string | boolean | null | ErrorCell;

/** Rows of cells, all of one length. */
export type Range = readonly (readonly Cell[])[];

/** The name of an argument and its place, as messages give them: `limits (argument 2)`. */
type Where = string;

/** @throws {CellErrorPassed} for the first error value in the range. */
export function passErrors(range: Range): void {
  // Plain loops: with iterators this is a good part of the time that a long column takes.
  for (let i = 0; i < range.length; i++) {
    const row = range[i]!;
    for (let j = 0; j < row.length; j++) {
      const cell = row[j]!;
      if (typeof cell === 'object' && cell !== null) throw new CellErrorPassed(cell.error);
    }
  }
}

/** True for a blank cell, also one that arrives as empty text. */
export function isBlank(cell: Cell): boolean {
  return cell === null || (typeof cell === 'string' && cell.trim() === '');
}

/** True for a cell that may be a blank as some hosts hand it over. */
export function isBlankOrZero(cell: Cell): boolean {
  return isBlank(cell) || cell === 0;
}

/** An omitted argument and a single blank cell are the same; both read as null. */
export function given(range: Range | null): Range | null {
  if (range === null || range.length === 0) return null;
  return isSingle(range) && isBlank(range[0]![0]!) ? null : range;
}

/** As `given`, for arguments that 0 is no answer to: a blank cell that arrives as 0 counts as omitted too. */
export function givenUnlessZero(range: Range | null): Range | null {
  const own = given(range);
  return own !== null && isSingle(own) && isBlankOrZero(own[0]![0]!) ? null : own;
}

function isSingle(range: Range): boolean {
  return range.length === 1 && range[0]!.length === 1;
}

export function isText(cell: Cell): cell is string {
  return typeof cell === 'string' && cell.trim() !== '';
}

/** A text without the white space around it and in small letters, for comparing words. */
export function word(cell: Cell): string {
  return typeof cell === 'string' ? cell.trim().toLowerCase() : '';
}

/** As much of a long text as a message should quote. */
const QUOTED_CHARACTERS = 40;

/** A cell as messages quote it. */
export function quoted(cell: Cell): string {
  if (cell === null || isBlank(cell)) return 'a blank';
  if (typeof cell === 'string') {
    const isShort = cell.length <= QUOTED_CHARACTERS;
    return isShort ? `"${cell}"` : `"${cell.slice(0, QUOTED_CHARACTERS)}…"`;
  }
  if (typeof cell === 'boolean') return cell ? 'TRUE' : 'FALSE';
  return typeof cell === 'number' ? String(cell) : cell.error;
}

/** A number where one belongs; a blank is 0. @throws {InputError} for text, TRUE and FALSE. */
export function numberIn(cell: Cell, where: Where): number {
  if (isBlank(cell)) return 0;
  if (typeof cell === 'number') return cell === 0 ? 0 : cell;
  throw new InputError(where, `${quoted(cell)} is not a number`, 'give a number');
}

/** The only cell of an argument that takes one. @throws {InputError} for a larger range. */
export function singleCell(range: Range, where: Where): Cell {
  if (isSingle(range)) return range[0]![0]!;
  throw new InputError(where, sizeOf(range), 'give one cell');
}

/** All cells of a range that is one row or one column. @throws {InputError} for another shape. */
export function lineOfCells(range: Range, where: Where): readonly Cell[] {
  if (range.length === 1) return range[0]!;
  if (range[0]!.length === 1) return range.map((row) => row[0]!);
  throw new InputError(where, sizeOf(range), 'give one row or one column');
}

/** How large a range is, for messages: `1 row and 3 columns`. */
export function sizeOf(range: Range): string {
  return `${counted(range.length, 'row')} and ${counted(range[0]!.length, 'column')}`;
}

/** `1 row`, `2 rows`. */
export function counted(n: number, noun: string): string {
  return `${n} ${noun}${n === 1 ? '' : 's'}`;
}
