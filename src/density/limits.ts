/**
 * The limits: two cells from | to in either direction, or a row name | from | to [| step]
 * for each variable, with an optional heading. An end is a number, the name of a given, or
 * `unbounded` (held as −∞ or ∞). A step makes a counted quantity: from, from + step, …;
 * 0 or none means continuous.
 */
import { InputError } from '../errors';
import type { Cell, Range } from './cells';
import { isBlankOrZero, isText, numberIn, passErrors, quoted, sizeOf, word } from './cells';
import { nameKey } from '../formula/names';
import type { Givens } from './givens';
import type { Lattice } from './lattice';
import { latticeOf } from './lattice';

/** Ends beyond this are refused: their areas could not be told in doubles. */
const MAX_END = 1e150;
export const DEFAULT_VARIABLE = 'x';
export const UNBOUNDED = 'unbounded';

/** The limits as their cells stand, before names are looked up. */
export interface LimitCells {
  readonly variable: string;
  readonly from: Cell;
  readonly to: Cell;
  /** Blank for a continuous variable. */
  readonly step: Cell;
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
  const own = cells ?? {
    variable: DEFAULT_VARIABLE,
    from: UNBOUNDED,
    to: UNBOUNDED,
    step: null,
    where,
  };
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

/** Most variables of one shape: the work of a proof grows with every one. */
const MOST_VARIABLES = 6;

/** The cells of the ends, one entry a variable. @throws {InputError} for a range of another form. */
export function readLimitCells(range: Range, where: string): readonly LimitCells[] {
  passErrors(range);
  const cells = range.flat();
  if (cells.length === 2)
    return [{ variable: DEFAULT_VARIABLE, from: cells[0]!, to: cells[1]!, step: null, where }];
  const rows = range.filter((row) => !row.every(isBlankOrZero));
  const body = word(rows[0]?.[1] ?? null) === 'from' ? rows.slice(1) : rows;
  const width = range[0]!.length;
  if (body.length === 0 || width < 3 || width > 4) {
    throw new InputError(
      where,
      sizeOf(range),
      body.length > 1 && width === 2
        ? 'give several variables a row name, from, to each'
        : 'give two cells, from and to, or a row name, from, to',
    );
  }
  if (body.length > MOST_VARIABLES) {
    throw new InputError(
      where,
      `${body.length} variables`,
      `give at most ${MOST_VARIABLES}, or draw some of them apart`,
    );
  }
  const variables = body.map((row) => readRow(row, where, body.length > 1));
  variables.forEach(({ variable }, i) => {
    if (variables.findIndex((other) => nameKey(other.variable) === nameKey(variable)) < i) {
      throw new InputError(where, `"${variable}" stands twice`, 'give each variable its own name');
    }
  });
  return variables;
}

function readRow(
  [name, from, to, step = null]: readonly Cell[],
  where: string,
  isOneOfMany: boolean,
): LimitCells {
  if (!isText(name!)) {
    throw new InputError(
      where,
      `${quoted(name!)} is not a variable's name`,
      'give a row name, from, to',
    );
  }
  const variable = name.trim();
  return {
    variable,
    from: from!,
    to: to!,
    step,
    where: isOneOfMany ? `${where}, ${variable}` : where,
  };
}

/**
 * The ends as numbers.
 * @throws {InputError} when an end is no number and no given, when from ≥ to (from > to if counted), or when an end is too far out.
 */
function readEnds(cells: LimitCells, givens: Givens, isCounted = false): Limits {
  const { from, to, where, fromWhere = `${where}, from`, toWhere = `${where}, to` } = cells;
  const limits = {
    from: readEnd(from, fromWhere, givens, -Infinity),
    to: readEnd(to, toWhere, givens, Infinity),
  };
  if (!(limits.from < limits.to || (isCounted && limits.from === limits.to))) {
    throw new InputError(
      where,
      `from (${limits.from}) is not below to (${limits.to})`,
      'give from first and a larger to',
    );
  }
  return limits;
}

/** The limits of one variable, and the points between them if it is counted. */
export interface LineLimits {
  readonly limits: Limits;
  readonly lattice: Lattice | null;
}

/** @throws {InputError} as readEnds and latticeOf. */
export function readLimits(cells: LimitCells, givens: Givens): LineLimits {
  const { where } = cells;
  const step = numberIn(cells.step, `${where}, step`);
  if (step === 0) return { limits: readEnds(cells, givens), lattice: null };
  const limits = readEnds(cells, givens, true);
  return { limits, lattice: latticeOf(limits.from, limits.to, step, where) };
}

/** One of several variables, continuous for a step of 0, else counted: from, from + step, … to. */
export interface Axis {
  readonly name: string;
  readonly from: number;
  readonly to: number;
  readonly step: number;
}

/** Most values of one counted variable. */
const MOST_VALUES = 2147483647;

/**
 * The variables of a shape of several. A step that does not lead to `to` ends at the last value before it.
 * @throws {InputError} as readEnds, for limits that are unbounded and for a step below 0.
 */
export function readAxes(variables: readonly LimitCells[], givens: Givens): readonly Axis[] {
  return variables.map((cells) => {
    const { variable: name, where } = cells;
    const at = `${where}, step`;
    const step = numberIn(cells.step, at);
    if (!(step >= 0 && step < Infinity))
      throw new InputError(at, `${step} is below 0`, 'give 0 for a continuous variable, or 1');
    const { from, to } = readEnds(cells, givens, step > 0);
    if (from === -Infinity || to === Infinity) {
      throw new InputError(
        where,
        'a limit is unbounded',
        'give numbers as limits to each of several variables',
      );
    }
    if (step === 0) return { name, from, to, step };
    const nSteps = wholeSteps(from, to, step);
    if (nSteps > MOST_VALUES) {
      throw new InputError(
        at,
        `${step} makes more than ${MOST_VALUES} values`,
        'give a larger step, or 0 for a continuous variable',
      );
    }
    return { name, from, to: from + nSteps * step, step };
  });
}

/** How many steps lead from `from` to the last value that is not beyond `to` but for rounding. */
function wholeSteps(from: number, to: number, step: number): number {
  const steps = (to - from) / step;
  const nearest = Math.round(steps);
  return Math.abs(steps - nearest) <= 1e-9 * Math.max(1, nearest) ? nearest : Math.floor(steps);
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
