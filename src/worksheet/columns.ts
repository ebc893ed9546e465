/**
 * Columns of rows as the evidence functions take them: with or without a heading row, numbers
 * or TRUE and FALSE. A blank counts as 0, and zeros at the end are counted, because that is
 * what selecting more rows than were spilled looks like.
 */
import type { Cell, Range } from '../density/cells';
import { counted, given, isBlank, isText, passErrors, quoted } from '../density/cells';
import { InputError } from '../errors';

export interface Column {
  /** The text above the rows; empty without one. */
  readonly heading: string;
  readonly values: Float64Array;
  /** How many of the last rows are 0 or blank. */
  readonly zerosAtEnd: number;
  /** The place of the i-th row, for messages: `values (argument 1), row 3`. */
  readonly placeOf: (i: number) => string;
}

interface Columns {
  readonly columns: readonly Column[];
  readonly nRows: number;
  /** TRUE and FALSE, as 1 and 0, instead of numbers. */
  readonly areTruths: boolean;
}

/** Values beyond this cannot be added up. */
const MOST = 1e300;

/**
 * Reads numbers, column by column; a single row is one column.
 * @throws {InputError} for a missing range, text, TRUE or FALSE among the rows, values beyond MOST, or fewer than `fewest` rows.
 */
export function numberColumns(range: Range | null, where: string, fewest: number): Columns {
  const columns = readColumns(range, where);
  if (columns.areTruths) {
    throw new InputError(
      where,
      'TRUE and FALSE are not numbers',
      'give numbers, or ask EXCEEDANCE for the share of TRUE',
    );
  }
  return withRows(columns, where, fewest);
}

/** One column of numbers. @throws {InputError} as numberColumns, and for several columns. */
export function numberColumn(range: Range | null, where: string, fewest: number): Column {
  const { columns } = numberColumns(range, where, fewest);
  if (columns.length === 1) return columns[0]!;
  throw new InputError(where, `${columns.length} columns`, 'give one column');
}

/** Numbers, or TRUE and FALSE with blanks for FALSE. @throws {InputError} as numberColumns. */
export function columnsOfEither(range: Range | null, where: string): Columns {
  return withRows(readColumns(range, where), where, 1);
}

/** What a column is called in results. */
export function nameOf({ heading }: Column, j: number, nColumns: number): string {
  return heading || (nColumns === 1 ? 'value' : `column ${j + 1}`);
}

/** What zeros at the end of a column may mean. */
export function zerosNote(n: number): string {
  return n === 1
    ? 'the last row is 0 or blank and counts as 0: perhaps one row too many was selected'
    : `the last ${n} rows are 0 or blank and count as 0: perhaps more rows were selected than there are`;
}

function withRows(columns: Columns, where: string, fewest: number): Columns {
  const { nRows } = columns;
  if (nRows >= fewest) return columns;
  throw new InputError(where, `${counted(nRows, 'row')} of values`, `give at least ${fewest}`);
}

function readColumns(range: Range | null, where: string): Columns {
  const own = given(range);
  if (own === null) throw new InputError(where, 'it is missing', 'give a column of values');
  const isRow = own.length === 1 && own[0]!.length > 1;
  const rows = isRow ? own[0]!.map((cell) => [cell]) : own;
  const first = rows.length > 1 && isHeading(rows[0]!) ? 1 : 0;
  const placeOf = (i: number, j: number): string => {
    if (rows.length === 1 && rows[0]!.length === 1) return where;
    const place = `${where}, ${isRow ? 'column' : 'row'} ${i + 1}`;
    return rows[0]!.length === 1 ? place : `${place}, column ${j + 1}`;
  };
  const reader = new Reader(own, placeOf);
  const nRows = rows.length - first;
  const columns = rows[0]!.map((cell, j): Column => {
    const values = new Float64Array(nRows);
    for (let i = 0; i < nRows; i++) {
      const value = rows[i + first]![j]!;
      if (typeof value === 'number' && value >= -MOST && value <= MOST) values[i] = value + 0;
      else values[i] = reader.read(value, i + first, j);
    }
    let end = nRows;
    // FALSE at the end is an answer like any other.
    while (end > 0 && values[end - 1] === 0 && rows[end - 1 + first]![j] !== false) end--;
    return {
      heading: first === 1 && isText(cell) ? cell : '',
      values,
      zerosAtEnd: nRows - end,
      placeOf: (i) => placeOf(i + first, j),
    };
  });
  return { columns, nRows, areTruths: reader.areTruths(rows, first) };
}

/** All texts and blanks, some text. */
function isHeading(row: readonly Cell[]): boolean {
  return row.some(isText) && row.every((cell) => isText(cell) || isBlank(cell));
}

/** Reads the cells that are no plain numbers, of which there are few in most columns. */
class Reader {
  private hasTruths = false;

  constructor(
    private readonly range: Range,
    private readonly placeOf: (i: number, j: number) => string,
  ) {}

  read(cell: Cell, i: number, j: number): number {
    if (isBlank(cell)) return 0;
    if (typeof cell === 'boolean') {
      this.hasTruths = true;
      return cell ? 1 : 0;
    }
    // An error anywhere comes back as itself, before any complaint.
    passErrors(this.range);
    if (typeof cell === 'number')
      throw new InputError(this.placeOf(i, j), `${cell} is beyond 1e300`, 'give a larger unit');
    throw new InputError(this.placeOf(i, j), `${quoted(cell)} is not a number`, 'give a number');
  }

  /** @throws {InputError} for a number other than 0 among TRUE and FALSE. */
  areTruths(rows: Range, first: number): boolean {
    if (!this.hasTruths) return false;
    for (let i = first; i < rows.length; i++) {
      const j = rows[i]!.findIndex((cell) => typeof cell === 'number' && cell !== 0);
      if (j < 0) continue;
      throw new InputError(
        this.placeOf(i, j),
        `${quoted(rows[i]![j]!)} stands among TRUE and FALSE`,
        'give numbers, or TRUE and FALSE',
      );
    }
    return true;
  }
}

/** A run of zeros as long as this is no chance if it has less than this one. */
const UNUSUAL = 0.001;

/** The zeros at the end, 0 where the column has so many others that they may be rows like any. */
export function unusualZeros({ values, zerosAtEnd }: Column): number {
  const before = values.length - zerosAtEnd;
  let others = 0;
  for (let i = 0; i < before; i++) if (values[i] === 0) others++;
  if (others === 0) return zerosAtEnd;
  const share = others / before;
  let chance = 1;
  for (let k = 0; k < zerosAtEnd && chance >= UNUSUAL; k++) chance *= share;
  return chance < UNUSUAL ? zerosAtEnd : 0;
}
