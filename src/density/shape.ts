/**
 * A shape: what the arguments `density`, `limits` and `givens…` come to. Either a
 * formula with its limits and givens, in one variable or several, or a table's straight
 * lines; one per column of heights or line of a list.
 */
import { InputError } from '../errors';
import type { Source } from '../formula/compile';
import { nameKey } from '../formula/names';
import type { GivenMap } from '../formula/given';
import { namesIn } from '../formula/rename';
import type { Block } from './block';
import { isBlock, readBlock } from './block';
import type { Range } from './cells';
import { given, givenUnlessZero, isBlankOrZero, isText, passErrors } from './cells';
import { readFormula, readLines } from './formulas';
import type { GivenRanges, NamedValue } from './givens';
import { checkMethod, Givens, readGivens } from './givens';
import type { Lattice } from './lattice';
import { latticeOf, within } from './lattice';
import type { Axis, LimitCells, Limits, LineLimits, OtherEnds } from './limits';
import {
  DEFAULT_VARIABLE,
  readAxes,
  readLimits,
  readLimitCells,
  UNBOUNDED,
  withEnds,
} from './limits';
import type { ListLine } from './shapelist';
import { isShapeList, readShapeList } from './shapelist';
import type { Polyline, PointTable } from './table';
import { isPointTable, readTable, truncate } from './table';

/** A formula without limits is drawn over the whole line. */
const UNBOUNDED_LIMITS: LineLimits = { limits: { from: -Infinity, to: Infinity }, lattice: null };

export interface FormulaShape {
  readonly kind: 'formula';
  /** The lines whose product is the density. */
  readonly sources: readonly Source[];
  readonly variable: string;
  readonly limits: Limits;
  /** The points of a counted quantity; null for a continuous one. */
  readonly lattice: Lattice | null;
  readonly givens: GivenMap;
  /** The place of the line of a list it stands in, for messages. */
  readonly line?: string;
}

export interface TableShape {
  readonly kind: 'table';
  readonly heading: string;
  readonly polyline: Polyline;
  readonly limits: Limits;
  readonly lattice: Lattice | null;
}

/** A formula in two variables or more. */
export interface SeveralShape {
  readonly kind: 'several';
  readonly sources: readonly Source[];
  readonly axes: readonly Axis[];
  readonly givens: GivenMap;
}

/** A shape of one variable. */
export type PlainShape = FormulaShape | TableShape;
export type Shape = PlainShape | SeveralShape;

/** What the arguments say: one shape, or one per column of heights or line of a list. */
export interface Shapes<S extends Shape = PlainShape> {
  readonly shapes: readonly S[];
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

/** Values in place of a shape's own: of its constants, and of the ends of its limits. */
export interface Overrides {
  readonly values: readonly NamedValue[];
  readonly ends: OtherEnds;
}

const AS_GIVEN: Overrides = { values: [], ends: {} };

/** What the three arguments of a shape say, open to other values of its constants and limits. */
export interface Family<S extends Shape = PlainShape> {
  readonly block: Block | null;
  readonly lines: readonly ListLine[] | null;
  readonly notes: readonly string[];
  /** The headings of a table's columns of heights. */
  readonly headings: readonly string[];
  /** Names that it uses: its givens, and what stands in formulas and limits. Compared by nameKey. */
  readonly names: () => ReadonlySet<string>;
  /** Its givens as written, for messages. */
  readonly givens: readonly string[];
  /** @throws {InputError} for values and ends that do not fit. */
  readonly shapes: (overrides: Overrides) => readonly S[];
}

/**
 * Reads the three arguments of a shape of one variable.
 * @throws {InputError} with the place, for everything that cannot be read, several variables included.
 * @throws {CellErrorPassed} when a cell holds an error value.
 */
export function readShapes(
  density: Range | null,
  limits: Range | null,
  givens: readonly Range[],
  places: Places,
): Shapes {
  return asGiven(readFamily(density, limits, givens, places));
}

/** As `readShapes`, for functions that take several variables too. */
export function readAnyShapes(
  density: Range | null,
  limits: Range | null,
  givens: readonly Range[],
  places: Places,
): Shapes<Shape> {
  return asGiven(readAnyFamily(density, limits, givens, places));
}

function asGiven<S extends Shape>({ block, lines, notes, shapes }: Family<S>): Shapes<S> {
  return { shapes: shapes(AS_GIVEN), block, lines, notes };
}

/**
 * Reads the three arguments of a shape once, for many shapes that differ in values.
 * @throws {InputError} with the place, for everything that cannot be read whatever the values.
 * @throws {CellErrorPassed} when a cell holds an error value.
 */
export function readFamily(
  density: Range | null,
  limits: Range | null,
  givens: readonly Range[],
  places: Places,
): Family {
  const nVariables = limitCellsOf(limits, places).length;
  if (nVariables > 1) {
    throw new InputError(
      places.limits,
      `${nVariables} variables`,
      'give one: only DRAW, ENVELOPE, ACCEPTANCE, PROPOSALS and EXPECT take several',
    );
  }
  return readAnyFamily(density, limits, givens, places) as Family;
}

function limitCellsOf(limits: Range | null, places: Places): readonly LimitCells[] {
  const range = givenUnlessZero(limits);
  return range ? readLimitCells(range, places.limits) : [];
}

function readAnyFamily(
  density: Range | null,
  limits: Range | null,
  givens: readonly Range[],
  places: Places,
): Family<Shape> {
  const range = given(density);
  if (range === null || range.every((row) => row.every(isBlankOrZero))) {
    throw new InputError(
      places.density,
      'it is blank',
      'give a formula such as EXP(-x), a table of points, or a block with a row density',
    );
  }
  passErrors(range);
  const variables = limitCellsOf(limits, places);
  const isSeveral = variables.length > 1;
  const shared = readGivens(givens, places.givens);
  const common = { block: null, lines: null, headings: [], notes: shared.notes };
  const sharedNames = shared.values.map(({ name }) => name);
  const known = (more: readonly string[], sources: () => readonly Source[]) => ({
    givens: [...more, ...sharedNames],
    names: () => namesOf([...more, ...sharedNames], variables, sources()),
  });
  if (isSeveral && (isShapeList(range) || (isPointTable(range) && !isBlock(range)))) {
    throw new InputError(
      places.limits,
      `${variables.length} variables for a ${isShapeList(range) ? 'list of inputs' : 'table of points'}`,
      isShapeList(range)
        ? 'give one variable, or one density alone'
        : 'give the table among the givens, and a formula that uses it, such as base(early)*base(late)',
    );
  }
  if (isShapeList(range)) {
    const lines = readShapeList(range, places.density);
    const members = lines.map(({ block, where }) => ({
      where,
      member: blockMember(block, where, variables, shared, true),
    }));
    return {
      ...common,
      ...known([], () => []),
      lines,
      shapes: (overrides) =>
        members.map(({ where, member }) =>
          inLine(where, () => ({ ...member.shape(overrides), line: where })),
        ),
    };
  }
  if (isBlock(range)) {
    const block = readBlock(range, places.density);
    const { shape, sources } = blockMember(block, places.density, variables, shared);
    const names = block.givens.map(({ name }) => name);
    namedGivens(variables, blockValues(block, places.density), shared, AS_GIVEN);
    return {
      ...common,
      ...known(names, sources),
      block,
      shapes: (overrides) => [shape(overrides)],
    };
  }
  if (isPointTable(range)) {
    namedGivens(variables, [], shared, AS_GIVEN);
    const table = readTable(range, places.density);
    return {
      ...common,
      ...known([], () => []),
      headings: table.columns.map(({ heading }) => heading),
      notes: [...table.notes, ...shared.notes],
      shapes: (overrides) => {
        const cells = ended(variables, overrides, places.limits);
        return tableShapes(table, cells, namedGivens(cells, [], shared, overrides), places);
      },
    };
  }
  namedGivens(variables, [], shared, AS_GIVEN);
  const sources = once(() => readLines(range, places.density));
  return {
    ...common,
    ...known([], sources),
    shapes: (overrides) => {
      const cells = ended(variables, overrides, places.limits);
      const named = namedGivens(cells, [], shared, overrides);
      return [formulaShape(sources(), cells, named)];
    },
  };
}

function namesOf(
  givens: readonly string[],
  variables: readonly LimitCells[],
  sources: readonly Source[],
): ReadonlySet<string> {
  const ends = variables.flatMap(({ from, to }) => [from, to].filter(isText));
  const written = [...givens, ...ends].map((name) => nameKey(name.trim()));
  return new Set([...written, ...sources.flatMap(({ text }) => namesIn(text))]);
}

function once<T extends object>(make: () => T): () => T {
  let made: T | undefined;
  return () => (made ??= make());
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

/** The limits of one variable with other ends; those of several stay as they are. */
function ended(
  variables: readonly LimitCells[],
  { ends }: Overrides,
  where: string,
): readonly LimitCells[] {
  if (variables.length > 1) return variables;
  const cells = withEnds(variables[0] ?? null, ends, where);
  return cells ? [cells] : [];
}

function namedGivens(
  cells: readonly LimitCells[],
  own: readonly NamedValue[],
  shared: GivenRanges,
  overrides: Overrides,
): Givens {
  const named = new Givens(
    cells.length > 0 ? cells.map(({ variable }) => variable) : [DEFAULT_VARIABLE],
  );
  for (const value of [...own, ...shared.values]) named.add(value);
  for (const value of overrides.values) named.replace(value);
  return named;
}

interface Member {
  readonly sources: () => readonly Source[];
  readonly shape: (overrides: Overrides) => FormulaShape | SeveralShape;
}

function blockValues({ givens }: Block, where: string): readonly NamedValue[] {
  return givens.map(({ name, value }) => ({ name, value, where }));
}

/** The shapes of a block, or of a line of a list, whose place is `where`. */
function blockMember(
  block: Block,
  where: string,
  limits: readonly LimitCells[],
  shared: GivenRanges,
  isLine = false,
): Member {
  const sources = once(() => {
    const formula = block.words.get('density') ?? null;
    return [readFormula(formula, 'Formula', `${where}, density`)];
  });
  const own = blockValues(block, where);
  const shape = (overrides: Overrides): FormulaShape | SeveralShape => {
    const cells = ended(
      limits.length > 0 ? limits : blockLimits(block, where, isLine),
      overrides,
      where,
    );
    const named = namedGivens(cells, own, shared, overrides);
    const method = block.words.get('method');
    if (method !== undefined) checkMethod(method, `${where}, method`);
    return formulaShape(sources(), cells, named);
  };
  return { sources, shape };
}

function formulaShape(
  sources: readonly Source[],
  cells: readonly LimitCells[],
  named: Givens,
): FormulaShape | SeveralShape {
  const givens = named.map;
  if (cells.length > 1) return { kind: 'several', sources, axes: readAxes(cells, named), givens };
  const [own] = cells;
  return {
    kind: 'formula',
    sources,
    variable: own?.variable ?? DEFAULT_VARIABLE,
    ...(own ? readLimits(own, named) : UNBOUNDED_LIMITS),
    givens,
  };
}

function tableShapes(
  table: PointTable,
  cells: readonly LimitCells[],
  named: Givens,
  places: Places,
): readonly TableShape[] {
  const { x, columns } = table;
  const own = { from: x[0]!, to: x.at(-1)! };
  const read = cells[0] ? readLimits(cells[0], named) : { limits: own, lattice: null };
  const wanted = read.limits;
  const lattice = read.lattice && cells[0] ? tableLattice(read.lattice, own, cells[0].where) : null;
  const limits = { from: Math.max(wanted.from, own.from), to: Math.min(wanted.to, own.to) };
  return columns.map(({ heading, heights }) => {
    const polyline = truncate(x, heights, wanted, places.limits);
    return { kind: 'table', heading, polyline, limits, lattice };
  });
}

/** The points of a table, counted from its own end on a side without a limit. */
function tableLattice(lattice: Lattice, { from, to }: Limits, where: string): Lattice {
  const { first, last, at, step } = lattice;
  if (Number.isFinite(first) || Number.isFinite(last)) {
    const inside = within(lattice, from, to);
    if (inside.first <= inside.last) return inside;
    throw new InputError(
      where,
      `no point with step ${step} lies between the ends of the table, ${from} and ${to}`,
      `start the limits elsewhere than at ${at(0)}, or give a smaller step`,
    );
  }
  return latticeOf(from, to, step, where);
}

function blockLimits({ words }: Block, where: string, isLine: boolean): readonly LimitCells[] {
  const step = words.get('step') ?? null;
  const [from, to] = [words.get('from'), words.get('to')];
  if (from === undefined && to === undefined) {
    if (isBlankOrZero(step)) return [];
    return [{ variable: DEFAULT_VARIABLE, from: UNBOUNDED, to: UNBOUNDED, step, where }];
  }
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
  return [{ variable: DEFAULT_VARIABLE, from: from!, to: to!, step, where }];
}
