/**
 * A shape: what the arguments `density`, `limits` and `givens…` come to. Either a
 * formula with its limits and constants, or a table's straight lines.
 * Not handled yet: shape lists, several variables.
 */
import { InputError } from '../errors';
import type { Source } from '../formula/compile';
import { parse } from '../formula/parse';
import type { Block } from './block';
import { isBlock, readBlock } from './block';
import type { Cell, Range } from './cells';
import { given, isBlankOrZero, isText, passErrors, quoted } from './cells';
import { checkMethod, Givens, readGivens } from './givens';
import type { Limits } from './limits';
import { checkStep, DEFAULT_VARIABLE, readEnds, readLimitCells } from './limits';
import type { LimitCells } from './limits';
import type { Polyline, PointTable } from './table';
import { isPointTable, readTable, truncate } from './table';

/** A formula without limits is drawn over the whole line. */
const UNBOUNDED_LIMITS: Limits = { from: -Infinity, to: Infinity };

export interface FormulaShape {
  readonly kind: 'formula';
  /** The lines whose product is the density. */
  readonly sources: readonly Source[];
  readonly variable: string;
  readonly limits: Limits;
  readonly constants: ReadonlyMap<string, number>;
}

export interface TableShape {
  readonly kind: 'table';
  readonly heading: string;
  readonly polyline: Polyline;
  readonly limits: Limits;
}

export type Shape = FormulaShape | TableShape;

/** What the arguments say: one shape, or one per column of heights. */
export interface Shapes {
  readonly shapes: readonly Shape[];
  /** The block they came from, for its rows, seed and label. */
  readonly block: Block | null;
  readonly notes: readonly string[];
}

/** Places of the arguments in messages; functions have them in different positions. */
export interface Places {
  readonly density: string;
  readonly limits: string;
  /** Position of the first range of givens among the arguments, from 1. */
  readonly givens: number;
}

/**
 * Reads the three arguments of a shape.
 * @throws {InputError} with the place, for everything that cannot be read.
 * @throws {CellErrorPassed} when a cell holds an error value.
 */
export function readShapes(
  density: Range | null,
  limits: Range | null,
  givens: readonly Range[],
  places: Places,
): Shapes {
  const range = given(density);
  if (range === null) {
    throw new InputError(
      places.density,
      'it is blank',
      'give a formula such as EXP(-x), a table of points, or a block with a row density',
    );
  }
  passErrors(range);
  const limitsRange = given(limits);
  const block = isBlock(range) ? readBlock(range, places.density) : null;
  const cells = limitsRange
    ? readLimitCells(limitsRange, places.limits)
    : block
      ? blockLimits(block, places.density)
      : null;
  const variable = cells?.variable ?? DEFAULT_VARIABLE;
  const named = new Givens([variable]);
  for (const { name, value } of block?.givens ?? []) named.add(name, value, places.density);
  const method = block?.words.get('method');
  if (method !== undefined) checkMethod(method, `${places.density}, method`);
  readGivens(givens, named, places.givens);
  if (!block && isPointTable(range))
    return tableShapes(readTable(range, places.density), cells, named, places);
  const sources = block ? [blockFormula(block, places.density)] : readLines(range, places.density);
  const shape: FormulaShape = {
    kind: 'formula',
    sources,
    variable,
    limits: cells ? readEnds(cells, named) : UNBOUNDED_LIMITS,
    constants: named.constants,
  };
  return { shapes: [shape], block, notes: [] };
}

function tableShapes(
  table: PointTable,
  cells: LimitCells | null,
  named: Givens,
  places: Places,
): Shapes {
  const { x, columns, notes } = table;
  const own = { from: x[0]!, to: x.at(-1)! };
  const wanted = cells ? readEnds(cells, named) : own;
  const limits = { from: Math.max(wanted.from, own.from), to: Math.min(wanted.to, own.to) };
  const shapes = columns.map(({ heading, heights }): TableShape => {
    const polyline = truncate(x, heights, wanted, places.limits);
    return { kind: 'table', heading, polyline, limits };
  });
  return { shapes, block: null, notes };
}

function blockLimits({ words }: Block, where: string): LimitCells | null {
  const step = words.get('step');
  if (step !== undefined) checkStep(step, where);
  const [from, to] = [words.get('from'), words.get('to')];
  if (from === undefined && to === undefined) return null;
  for (const [name, cell] of [
    ['from', from],
    ['to', to],
  ] as const) {
    if (cell === undefined)
      throw new InputError(
        where,
        `the block has no row "${name}"`,
        `add a row ${name} and its value`,
      );
  }
  return { variable: DEFAULT_VARIABLE, from: from!, to: to!, where };
}

function blockFormula({ words }: Block, where: string): Source {
  return source(words.get('density')!, 'Formula', `${where}, density`);
}

/** A single formula, or a column of them whose product is meant. */
function readLines(range: Range, where: string): readonly Source[] {
  if (range[0]!.length !== 1) {
    throw new InputError(
      where,
      `${range.length} rows and ${range[0]!.length} columns that begin with ${quoted(range[0]![0]!)}`,
      'give a formula, a column of formulas, a table of points (x and height), or a block with a row density',
    );
  }
  const lines = range
    .map((row, i) => ({ cell: row[0]!, line: i + 1 }))
    .filter(({ cell }) => !isBlankOrZero(cell));
  if (lines.length === 0)
    throw new InputError(where, 'it is blank', 'give a formula such as EXP(-x)');
  const isOne = range.length === 1;
  return lines.map(({ cell, line }) =>
    source(
      cell,
      isOne ? 'Formula' : `Formula, line ${line}`,
      isOne ? where : `${where}, row ${line}`,
    ),
  );
}

function source(cell: Cell, where: string, place: string): Source {
  if (!isText(cell)) {
    throw new InputError(
      place,
      `${quoted(cell)} is not a formula`,
      'give a formula as text, such as EXP(-x)',
    );
  }
  return { text: cell, where, tree: parse(cell, where) };
}
