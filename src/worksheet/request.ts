/**
 * What the arguments of DRAW and its companions ask for: shapes, rows, seed and one
 * label a column. Arguments given outright win over a block's words.
 */
import type { Range } from '../density/cells';
import { given, isBlank, quoted } from '../density/cells';
import type { PlainShape, SeveralShape, Shape } from '../density/kinds';
import type { Shapes } from '../density/shape';
import type { ListLine } from '../density/shapelist';
import { readAnyShapes, readShapes } from '../density/shape';
import { InputError } from '../errors';
import type { Key } from '../random/key';
import { keyText } from '../random/key';
import type { Part } from './keys';
import { argumentOr, keyFrom, keyPart, readLabels, readSeed, textOf } from './keys';
import type { Placed } from './rows';
import { readRows } from './rows';

/** One column that is asked for; one a variable for a shape of several. */
export interface ColumnRequest<S extends Shape = PlainShape> {
  readonly shape: S;
  readonly seed: string;
  readonly label: string;
  readonly key: Key;
}

export interface DrawRequest<S extends Shape = PlainShape> {
  readonly columns: readonly ColumnRequest<S>[];
  readonly firstRow: number;
  readonly nRows: number;
  readonly notes: readonly string[];
}

export const DRAW_PLACES = {
  density: 'density (argument 1)',
  limits: 'limits (argument 2)',
  rows: 'rows (argument 3)',
  seed: 'seed (argument 4)',
  label: 'label (argument 5)',
  givens: 6,
};

/** @throws {InputError} with the argument's place, for anything that cannot be read. */
export function readDrawRequest(
  density: Range | null,
  limits: Range | null,
  rows: Range | null,
  seed: Range | null,
  label: Range | null,
  givens: readonly Range[],
): DrawRequest {
  return requestOf(readShapes(density, limits, givens, DRAW_PLACES), rows, seed, label);
}

/** A request for columns, or for the rows of one shape of several variables. */
export type AnyDrawRequest =
  | { readonly several: null; readonly plain: DrawRequest }
  | { readonly several: DrawRequest<SeveralShape>; readonly plain: null };

/** As `readDrawRequest`, for functions that take several variables too. */
export function readAnyDrawRequest(
  density: Range | null,
  limits: Range | null,
  rows: Range | null,
  seed: Range | null,
  label: Range | null,
  givens: readonly Range[],
): AnyDrawRequest {
  const shapes = readAnyShapes(density, limits, givens, DRAW_PLACES);
  const several = shapes.shapes.filter((shape) => shape.kind === 'several');
  const plain = shapes.shapes.filter((shape) => shape.kind !== 'several');
  if (several.length === 0)
    return { several: null, plain: requestOf({ ...shapes, shapes: plain }, rows, seed, label) };
  const request = requestOf({ ...shapes, shapes: several }, rows, seed, label);
  if (request.columns.length > 1) {
    throw new InputError(
      DRAW_PLACES.label,
      `${request.columns.length} labels for a shape of ${several[0]!.axes.length} variables`,
      'give one label; the columns are the variables',
    );
  }
  return { several: request, plain: null };
}

function requestOf<S extends Shape>(
  shapes: Shapes<S>,
  rows: Range | null,
  seed: Range | null,
  label: Range | null,
): DrawRequest<S> {
  const { firstRow, nRows } = readRows(
    argumentOr(rows, shapes, 'rows', DRAW_PLACES) ??
      rowsOfLines(shapes.lines) ?? { range: given(rows), where: DRAW_PLACES.rows },
  );
  const seedCells = argumentOr(seed, shapes, 'seed', DRAW_PLACES);
  const labels = readLabels(argumentOr(label, shapes, 'label', DRAW_PLACES));
  const columns = shapes.lines
    ? lineColumns(shapes, shapes.lines, seedCells, labels)
    : plainColumns(shapes.shapes, readSeed(seedCells, DRAW_PLACES), labels);
  refuseEqualLabels(columns, shapes.lines);
  return { columns, firstRow, nRows, notes: shapes.notes };
}

function plainColumns<S extends Shape>(
  shapes: readonly S[],
  seed: Part,
  labels: readonly Part[],
): readonly ColumnRequest<S>[] {
  return assignLabels(shapes, labels).map(({ shape, label }) => columnOf(shape, seed, label));
}

function columnOf<S extends Shape>(shape: S, seed: Part, label: Part): ColumnRequest<S> {
  return { shape, seed: textOf(seed), label: textOf(label), key: keyFrom(seed, label) };
}

/** One column per line of a list: its own label, after the argument's if there is one, and its own seed unless one is given. */
function lineColumns<S extends Shape>(
  { shapes }: Shapes<S>,
  lines: readonly ListLine[],
  seedCells: Placed<Range> | null,
  labels: readonly Part[],
): readonly ColumnRequest<S>[] {
  if (labels.length > 1) {
    throw new InputError(
      DRAW_PLACES.label,
      `${labels.length} labels for a list of ${lines.length} inputs`,
      'give one label or none: the lines of the list have their own',
    );
  }
  return lines.map(({ block, where }, i) => {
    const part = keyPart(block.words.get('label') ?? null, `${where}, label`);
    if (isBlank(part.value))
      throw new InputError(where, 'it has no label', 'give every line a label of its own');
    const own = block.words.get('seed');
    const ownSeed = own === undefined ? null : { range: [[own]], where: `${where}, seed` };
    return columnOf(shapes[i]!, readSeed(seedCells ?? ownSeed, DRAW_PLACES), behind(labels, part));
  });
}

/** A label of the arguments goes before the own one, with a space. */
function behind(labels: readonly Part[], own: Part): Part {
  const first = labels[0];
  return first ? { value: `${textOf(first)} ${textOf(own)}`, where: first.where } : own;
}

/** The rows that the lines of a list name; the columns of one spill are all as long. */
function rowsOfLines(lines: readonly ListLine[] | null): Placed<Range> | null {
  const named = (lines ?? []).filter(({ block }) => block.words.has('rows'));
  const [first, ...others] = named;
  if (first === undefined) return null;
  const rows = first.block.words.get('rows')!;
  const other = others.find(({ block }) => block.words.get('rows') !== rows);
  if (other !== undefined) {
    throw new InputError(
      `${other.where}, rows`,
      `${quoted(other.block.words.get('rows')!)} where an earlier line says ${quoted(rows)}`,
      'give all lines the same number of rows, or give rows as an argument',
    );
  }
  return { range: [[rows]], where: `${first.where}, rows` };
}

/**
 * One column per label for one shape; one per column of heights otherwise, named by
 * its heading with the label before it.
 */
function assignLabels<S extends Shape>(
  shapes: readonly S[],
  labels: readonly Part[],
): readonly { shape: S; label: Part }[] {
  const headingOf = (shape: S): Part => ({
    value: shape.kind === 'table' ? shape.heading : '',
    where: DRAW_PLACES.label,
  });
  if (shapes.length === 1) {
    const shape = shapes[0]!;
    return (labels.length > 0 ? labels : [headingOf(shape)]).map((label) => ({ shape, label }));
  }
  if (labels.length > 1) {
    throw new InputError(
      DRAW_PLACES.label,
      `${labels.length} labels for ${shapes.length} columns of heights`,
      'give one label or none: the headings of the columns tell them apart',
    );
  }
  return shapes.map((shape, i) => {
    const heading = headingOf(shape);
    if (isBlank(heading.value)) {
      throw new InputError(
        DRAW_PLACES.density,
        `column ${i + 2} has no heading`,
        'give every column of heights a heading; it is the label of its draws',
      );
    }
    return { shape, label: behind(labels, heading) };
  });
}

function refuseEqualLabels(
  columns: readonly ColumnRequest<Shape>[],
  lines: readonly ListLine[] | null,
): void {
  const seen = new Set<string>();
  for (const [i, { label }] of columns.entries()) {
    const text = keyText(label, 'label');
    if (seen.has(text)) {
      throw new InputError(
        lines ? `${lines[i]!.where}, label` : DRAW_PLACES.label,
        `"${label}" stands twice`,
        'give each column its own label; equal labels draw equal numbers',
      );
    }
    seen.add(text);
  }
}
