/**
 * A shape: what the arguments `density`, `limits` and `givens…` come to. Either a
 * formula with its limits and givens, or a table's straight lines; one per column of
 * heights or line of a list.
 * Not handled yet: several variables.
 */
import { InputError } from '../errors';
import type { Source } from '../formula/compile';
import type { GivenMap } from '../formula/given';
import type { Block } from './block';
import { isBlock, readBlock } from './block';
import type { Range } from './cells';
import { given, givenUnlessZero, isBlankOrZero, passErrors } from './cells';
import { readFormula, readLines } from './formulas';
import type { GivenRanges, NamedValue } from './givens';
import { checkMethod, Givens, readGivens } from './givens';
import type { Limits } from './limits';
import { checkStep, DEFAULT_VARIABLE, readEnds, readLimitCells } from './limits';
import type { LimitCells } from './limits';
import type { ListLine } from './shapelist';
import { isShapeList, readShapeList } from './shapelist';
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
  readonly givens: GivenMap;
  /** The place of the line of a list it stands in, for messages. */
  readonly line?: string;
}

export interface TableShape {
  readonly kind: 'table';
  readonly heading: string;
  readonly polyline: Polyline;
  readonly limits: Limits;
}

export type Shape = FormulaShape | TableShape;

/** What the arguments say: one shape, or one per column of heights or line of a list. */
export interface Shapes {
  readonly shapes: readonly Shape[];
  /** The block they came from, for its rows, seed and label. */
  readonly block: Block | null;
  /** The lines of a list they came from, one a shape. */
  readonly lines: readonly ListLine[] | null;
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
  if (range === null || range.every((row) => row.every(isBlankOrZero))) {
    throw new InputError(
      places.density,
      'it is blank',
      'give a formula such as EXP(-x), a table of points, or a block with a row density',
    );
  }
  passErrors(range);
  const limitsRange = givenUnlessZero(limits);
  const own = limitsRange ? readLimitCells(limitsRange, places.limits) : null;
  const shared = readGivens(givens, places.givens);
  if (isShapeList(range)) {
    const lines = readShapeList(range, places.density);
    const shapes = lines.map(({ block, where }) =>
      inLine(where, () => ({ ...blockShape(block, where, own, shared, true), line: where })),
    );
    return { shapes, block: null, lines, notes: shared.notes };
  }
  if (isBlock(range)) {
    const block = readBlock(range, places.density);
    const shape = blockShape(block, places.density, own, shared);
    return { shapes: [shape], block, lines: null, notes: shared.notes };
  }
  const named = namedGivens(own, [], shared);
  if (isPointTable(range)) {
    const table = readTable(range, places.density);
    const shapes = tableShapes(table, own, named, places);
    return { shapes, block: null, lines: null, notes: [...table.notes, ...shared.notes] };
  }
  const shape = formulaShape(readLines(range, places.density), own, named);
  return { shapes: [shape], block: null, lines: null, notes: shared.notes };
}

/** Names the line of a list in a complaint that does not name it yet. */
export function inLine<T>(line: string | undefined, work: () => T): T {
  try {
    return work();
  } catch (error) {
    if (line !== undefined && error instanceof InputError && !error.where.startsWith(line))
      throw error.within(line);
    throw error;
  }
}

function namedGivens(
  cells: LimitCells | null,
  own: readonly NamedValue[],
  shared: GivenRanges,
): Givens {
  const named = new Givens([cells?.variable ?? DEFAULT_VARIABLE]);
  for (const value of [...own, ...shared.values]) named.add(value);
  return named;
}

/** The shape of a block, or of a line of a list, whose place is `where`. */
function blockShape(
  block: Block,
  where: string,
  limits: LimitCells | null,
  shared: GivenRanges,
  isLine = false,
): FormulaShape {
  const cells = limits ?? blockLimits(block, where, isLine);
  const named = namedGivens(
    cells,
    block.givens.map(({ name, value }) => ({ name, value, where })),
    shared,
  );
  const method = block.words.get('method');
  if (method !== undefined) checkMethod(method, `${where}, method`);
  const formula = block.words.get('density') ?? null;
  return formulaShape([readFormula(formula, 'Formula', `${where}, density`)], cells, named);
}

function formulaShape(
  sources: readonly Source[],
  cells: LimitCells | null,
  named: Givens,
): FormulaShape {
  return {
    kind: 'formula',
    sources,
    variable: cells?.variable ?? DEFAULT_VARIABLE,
    limits: cells ? readEnds(cells, named) : UNBOUNDED_LIMITS,
    givens: named.map,
  };
}

function tableShapes(
  table: PointTable,
  cells: LimitCells | null,
  named: Givens,
  places: Places,
): readonly TableShape[] {
  const { x, columns } = table;
  const own = { from: x[0]!, to: x.at(-1)! };
  const wanted = cells ? readEnds(cells, named) : own;
  const limits = { from: Math.max(wanted.from, own.from), to: Math.min(wanted.to, own.to) };
  return columns.map(({ heading, heights }) => {
    const polyline = truncate(x, heights, wanted, places.limits);
    return { kind: 'table', heading, polyline, limits };
  });
}

function blockLimits({ words }: Block, where: string, isLine: boolean): LimitCells | null {
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
        isLine ? `the list has no column "${name}"` : `the block has no row "${name}"`,
        `add a ${isLine ? 'column' : 'row'} ${name} and its value`,
      );
  }
  return { variable: DEFAULT_VARIABLE, from: from!, to: to!, where };
}
