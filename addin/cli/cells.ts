/**
 * Cells as JSON, both ways: a range is an array of rows, a blank cell null, an error
 * cell {"error":"#N/A"}. What is read may also be a single cell for a range of one.
 */
import type { Cell, Range } from '../../src/index';
import { UsageError } from './usage';

/**
 * The arguments in a JSON array, null where one is left out.
 * @throws {UsageError} when the text is not JSON or not of this form
 */
export function rangesFromJson(text: string): (Range | null)[] {
  const list = parseJson(text);
  if (!Array.isArray(list)) {
    throw new UsageError(`Arguments: ${quote(list)} is no JSON array; put them in [ ].`);
  }
  return list.map((argument: unknown, i) => rangeFromJson(argument, `Argument ${i + 1}`));
}

/** One row a line, so that an answer can be read, compared and cut by line. */
export function cellsToJson(range: Range): string {
  return `[\n${range.map((row) => JSON.stringify(row)).join(',\n')}\n]\n`;
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch (failure) {
    const reason = failure instanceof Error ? failure.message : String(failure);
    throw new UsageError(`Arguments: not JSON (${reason}); write texts in double quotes.`);
  }
}

function rangeFromJson(argument: unknown, where: string): Range | null {
  if (argument === null) return null;
  if (!Array.isArray(argument)) return [[cellFromJson(argument, where)]];
  if (argument.length === 0) {
    throw new UsageError(`${where}: [] has no rows; give null to leave the argument out.`);
  }
  const rows = argument.map((row: unknown, i) => rowFromJson(row, `${where}, row ${i + 1}`));
  const width = rows[0]?.length ?? 0;
  rows.forEach((row, i) => {
    if (row.length !== width || width === 0) {
      throw new UsageError(
        `${where}, row ${i + 1}: has ${row.length} cells; give every row the same number, at least 1.`,
      );
    }
  });
  return rows;
}

function rowFromJson(row: unknown, where: string): Cell[] {
  if (!Array.isArray(row)) {
    throw new UsageError(`${where}: ${quote(row)} is no row; write a range as [[1, 2], [3, 4]].`);
  }
  return row.map((cell: unknown, i) => cellFromJson(cell, `${where}, cell ${i + 1}`));
}

function cellFromJson(cell: unknown, where: string): Cell {
  if (cell === null || typeof cell === 'string' || typeof cell === 'boolean') return cell;
  if (typeof cell === 'number') {
    if (Number.isFinite(cell)) return cell;
    throw new UsageError(`${where}: the number is too large; give one below 1.8e308.`);
  }
  if (typeof cell === 'object' && 'error' in cell && typeof cell.error === 'string') {
    return { error: cell.error };
  }
  throw new UsageError(
    `${where}: ${quote(cell)} is no cell; give a number, a text, true, false, null or {"error":"#N/A"}.`,
  );
}

function quote(value: unknown): string {
  const text = JSON.stringify(value);
  return text.length > 60 ? `${text.slice(0, 57)}...` : text;
}
