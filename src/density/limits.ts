/**
 * The limits of one variable: two cells from | to in either direction, or one row
 * name | from | to [| step] with an optional heading. An end is a number, the name of
 * a given, or `unbounded` (held as −∞ or ∞).
 * Not handled yet: steps, several variables (each is refused).
 */
import { InputError } from '../errors';
import type { Cell, Range } from './cells';
import { isBlankOrZero, isText, numberIn, passErrors, quoted, sizeOf, word } from './cells';
import type { Givens } from './givens';

/** Ends beyond this are refused: their areas could not be told in doubles. */
const MAX_END = 1e150;
export const DEFAULT_VARIABLE = 'x';
const UNBOUNDED = 'unbounded';

/** The limits as their cells stand, before names are looked up. */
export interface LimitCells {
  readonly variable: string;
  readonly from: Cell;
  readonly to: Cell;
  readonly where: string;
  /** The places of ends that do not come from the limits themselves. */
  readonly fromWhere?: string;
  readonly toWhere?: string;
}

/** Ends from elsewhere, each with its place. */
export interface OtherEnds {
  readonly from?: { readonly cell: Cell; readonly where: string };
  readonly to?: { readonly cell: Cell; readonly where: string };
}

/** The limits with other ends; what has no limits is unbounded where none is given. */
export function withEnds(
  cells: LimitCells | null,
  { from, to }: OtherEnds,
  where: string,
): LimitCells | null {
  if (from === undefined && to === undefined) return cells;
  const own = cells ?? { variable: DEFAULT_VARIABLE, from: UNBOUNDED, to: UNBOUNDED, where };
  return {
    ...own,
    ...(from && { from: from.cell, fromWhere: from.where }),
    ...(to && { to: to.cell, toWhere: to.where }),
  };
}

export interface Limits {
  readonly from: number;
  readonly to: number;
}

/** Finds the cells of the ends. @throws {InputError} for a range of another form. */
export function readLimitCells(range: Range, where: string): LimitCells {
  passErrors(range);
  const cells = range.flat();
  if (cells.length === 2)
    return { variable: DEFAULT_VARIABLE, from: cells[0]!, to: cells[1]!, where };
  const rows = range.filter((row) => !row.every(isBlankOrZero));
  const body = word(rows[0]?.[1] ?? null) === 'from' ? rows.slice(1) : rows;
  const width = range[0]!.length;
  if (body.length === 0 || width < 3 || width > 4) {
    throw new InputError(
      where,
      sizeOf(range),
      'give two cells, from and to, or a row name, from, to',
    );
  }
  if (body.length > 1) {
    throw new InputError(
      where,
      `${body.length} variables`,
      'give one row: only shapes of one variable can be drawn so far',
    );
  }
  const [name, from, to, step = null] = body[0]!;
  if (!isText(name!))
    throw new InputError(
      where,
      `${quoted(name!)} is not a variable's name`,
      'give a row name, from, to',
    );
  checkStep(step, where);
  return { variable: name.trim(), from: from!, to: to!, where };
}

/** @throws {InputError} for a step other than 0. */
export function checkStep(step: Cell, where: string): void {
  if (numberIn(step, `${where}, step`) !== 0) {
    throw new InputError(
      `${where}, step`,
      `${quoted(step)} asks for counted values`,
      'give 0: only continuous quantities can be drawn so far',
    );
  }
}

/**
 * The ends as numbers.
 * @throws {InputError} when an end is no number and no given, when from ≥ to, or when an end is too far out.
 */
export function readEnds(cells: LimitCells, givens: Givens): Limits {
  const { from, to, where, fromWhere = `${where}, from`, toWhere = `${where}, to` } = cells;
  const limits = {
    from: readEnd(from, fromWhere, givens, -Infinity),
    to: readEnd(to, toWhere, givens, Infinity),
  };
  if (!(limits.from < limits.to)) {
    throw new InputError(
      where,
      `from (${limits.from}) is not below to (${limits.to})`,
      'give from first and a larger to',
    );
  }
  return limits;
}

function readEnd(cell: Cell, where: string, givens: Givens, unbounded: number): number {
  if (word(cell) === UNBOUNDED) return unbounded;
  if (isText(cell)) {
    const value = givens.find(cell);
    if (typeof value === 'number') return inReach(value, where);
    if (value !== undefined) {
      throw new InputError(
        where,
        `${quoted(cell)} is the name of ${value.kind === 'list' ? 'a list' : 'a function'}`,
        'give a number or the name of a constant',
      );
    }
    throw new InputError(
      where,
      `${quoted(cell)} is neither a number nor the name of a given`,
      `give a number, or the word ${UNBOUNDED}`,
    );
  }
  return inReach(numberIn(cell, where), where);
}

/** An end as cells show it. */
export function endCell(end: number): Cell {
  return Number.isFinite(end) ? end : UNBOUNDED;
}

function inReach(end: number, where: string): number {
  if (Math.abs(end) <= MAX_END) return end;
  throw new InputError(
    where,
    `${end} is too far out`,
    `give a number between -${MAX_END} and ${MAX_END}`,
  );
}
