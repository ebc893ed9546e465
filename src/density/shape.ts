/**
 * A shape: what the arguments `density`, `limits` and `givens…` come to. Either a
 * formula with its limits and givens, in one variable or several, or a table's straight
 * lines; one per column of heights or line of a list.
 * Not handled: what a kind of shape is made of (formulashape.ts, tableshape.ts, blockshape.ts).
 */
import { InputError } from '../errors';
import type { Source } from '../formula/compile';
import { nameKey } from '../formula/names';
import { namesIn } from '../formula/rename';
import type { Block } from './block';
import { isBlock, readBlock } from './block';
import { blockMember, blockValues } from './blockshape';
import type { Range } from './cells';
import { given, givenUnlessZero, isBlankOrZero, isText, passErrors } from './cells';
import { ended, formulaShape, namedGivens } from './formulashape';
import { readLines } from './formulas';
import type { GivenRanges } from './givens';
import { readGivens } from './givens';
import type { Overrides, Places, PlainShape, Shape } from './kinds';
import type { LimitCells } from './limits';
import { readLimitCells } from './limits';
import { once } from './once';
import type { ListLine } from './shapelist';
import { inLine, isShapeList, readShapeList } from './shapelist';
import { isPointTable, readTable } from './table';
import { tableShapes } from './tableshape';

const AS_GIVEN: Overrides = { values: [], ends: {} };

/** What the arguments say: one shape, or one per column of heights or line of a list. */
export interface Shapes<S extends Shape = PlainShape> {
  readonly shapes: readonly S[];
  /** The block they came from, for its rows, seed and label. */
  readonly block: Block | null;
  /** The lines of a list they came from, one a shape. */
  readonly lines: readonly ListLine[] | null;
  readonly notes: readonly string[];
}

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
  const read: Read = { range, variables, shared: readGivens(givens, places.givens), places };
  refuseSeveralUnlessFormula(read);
  if (isShapeList(range)) return listFamily(read);
  if (isBlock(range)) return blockFamily(read);
  if (isPointTable(range)) return tableFamily(read);
  return formulaFamily(read);
}

/** The arguments of a shape as far as all kinds are read alike. */
interface Read {
  readonly range: Range;
  readonly variables: readonly LimitCells[];
  readonly shared: GivenRanges;
  readonly places: Places;
}

function refuseSeveralUnlessFormula({ range, variables, places }: Read): void {
  const isList = isShapeList(range);
  if (variables.length < 2 || !(isList || (isPointTable(range) && !isBlock(range)))) return;
  throw new InputError(
    places.limits,
    `${variables.length} variables for a ${isList ? 'list of inputs' : 'table of points'}`,
    isList
      ? 'give one variable, or one density alone'
      : 'give the table among the givens, and a formula that uses it, such as base(early)*base(late)',
  );
}

/** What a family is where its kind says nothing else; `own` are names of its own givens. */
function common(
  { variables, shared }: Read,
  own: readonly string[] = [],
  sources: () => readonly Source[] = () => [],
): Omit<Family<Shape>, 'shapes'> {
  const givens = [...own, ...shared.values.map(({ name }) => name)];
  return {
    block: null,
    lines: null,
    headings: [],
    notes: shared.notes,
    givens,
    names: () => namesOf(givens, variables, sources()),
  };
}

function listFamily(read: Read): Family<Shape> {
  const { range, variables, shared, places } = read;
  const lines = readShapeList(range, places.density);
  const members = lines.map(({ block, where }) => ({
    where,
    member: blockMember(block, where, variables, shared, true),
  }));
  return {
    ...common(read),
    lines,
    shapes: (overrides) =>
      members.map(({ where, member }) =>
        inLine(where, () => ({ ...member.shape(overrides), line: where })),
      ),
  };
}

function blockFamily(read: Read): Family<Shape> {
  const { range, variables, shared, places } = read;
  const block = readBlock(range, places.density);
  const { shape, sources } = blockMember(block, places.density, variables, shared);
  const names = block.givens.map(({ name }) => name);
  namedGivens(variables, blockValues(block, places.density), shared, AS_GIVEN);
  return {
    ...common(read, names, sources),
    block,
    shapes: (overrides) => [shape(overrides)],
  };
}

function tableFamily(read: Read): Family<Shape> {
  const { range, variables, shared, places } = read;
  namedGivens(variables, [], shared, AS_GIVEN);
  const table = readTable(range, places.density);
  return {
    ...common(read),
    headings: table.columns.map(({ heading }) => heading),
    notes: [...table.notes, ...shared.notes],
    shapes: (overrides) => {
      const cells = ended(variables, overrides, places.limits);
      return tableShapes(table, cells, namedGivens(cells, [], shared, overrides), places);
    },
  };
}

function formulaFamily(read: Read): Family<Shape> {
  const { range, variables, shared, places } = read;
  namedGivens(variables, [], shared, AS_GIVEN);
  const sources = once(() => readLines(range, places.density));
  return {
    ...common(read, [], sources),
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
