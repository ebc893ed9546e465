/**
 * What the arguments of DRAW and its companions ask for: shapes, rows, seed and one
 * label a column. Arguments given outright win over a block's words.
 */
import type { Cell, Range } from '../density/cells';
import {
  given,
  givenUnlessZero,
  isBlank,
  lineOfCells,
  passErrors,
  quoted,
  singleCell,
} from '../density/cells';
import type { Shape, Shapes } from '../density/shape';
import type { ListLine } from '../density/shapelist';
import { readShapes } from '../density/shape';
import { InputError } from '../errors';
import type { Key, KeyPart } from '../random/key';
import { keyOf, keyText } from '../random/key';
import type { Placed } from './rows';
import { readRows } from './rows';

/** One column that is asked for. */
export interface ColumnRequest {
  readonly shape: Shape;
  readonly seed: string;
  readonly label: string;
  readonly key: Key;
}

export interface DrawRequest {
  readonly columns: readonly ColumnRequest[];
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
  const shapes = readShapes(density, limits, givens, DRAW_PLACES);
  const { firstRow, nRows } = readRows(
    argumentOr(rows, shapes, 'rows') ??
      rowsOfLines(shapes.lines) ?? { range: given(rows), where: DRAW_PLACES.rows },
  );
  const seedCells = argumentOr(seed, shapes, 'seed');
  const labels = readLabels(argumentOr(label, shapes, 'label'));
  const columns = shapes.lines
    ? lineColumns(shapes, shapes.lines, seedCells, labels)
    : plainColumns(shapes.shapes, readSeed(seedCells), labels);
  refuseEqualLabels(columns, shapes.lines);
  return { columns, firstRow, nRows, notes: shapes.notes };
}

/** The argument, else the block's word. */
function argumentOr(
  argument: Range | null,
  { block }: Shapes,
  name: 'rows' | 'seed' | 'label',
): Placed<Range> | null {
  const own = givenUnlessZero(argument);
  if (own !== null) {
    passErrors(own);
    return { range: own, where: DRAW_PLACES[name] };
  }
  const cell = block?.words.get(name);
  return cell === undefined ? null : { range: [[cell]], where: `${DRAW_PLACES.density}, ${name}` };
}

function plainColumns(
  shapes: readonly Shape[],
  seed: Part,
  labels: readonly Part[],
): readonly ColumnRequest[] {
  return assignLabels(shapes, labels).map(({ shape, label }) => columnOf(shape, seed, label));
}

/** What a cell says of a seed or label, and where it stands. */
interface Part {
  readonly value: KeyPart;
  readonly where: string;
}

function readSeed(cells: Placed<Range> | null): Part {
  const { range, where } = cells ?? { range: [[null]], where: DRAW_PLACES.seed };
  return keyPart(singleCell(range, where), where);
}

function columnOf(shape: Shape, seed: Part, label: Part): ColumnRequest {
  const key = placed(label.where, 'label', () =>
    placed(seed.where, 'seed', () => keyOf(seed.value, label.value)),
  );
  return { shape, seed: textOf(seed), label: textOf(label), key };
}

function textOf({ value }: Part): string {
  return String(value).trim();
}

/** One column per line of a list: its own label, after the argument's if there is one, and its own seed unless one is given. */
function lineColumns(
  { shapes }: Shapes,
  lines: readonly ListLine[],
  seedCells: Placed<Range> | null,
  labels: readonly Part[],
): readonly ColumnRequest[] {
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
    return columnOf(shapes[i]!, readSeed(seedCells ?? ownSeed), behind(labels, part));
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

function keyPart(cell: Cell, where: string): Part {
  if (cell !== null && typeof cell === 'object')
    throw new InputError(where, quoted(cell), 'give a text or a number');
  return { value: cell ?? '', where };
}

function readLabels(cells: Placed<Range> | null): readonly Part[] {
  if (cells === null) return [];
  const { range, where } = cells;
  const line = lineOfCells(range, where);
  return line.map((cell, i) =>
    keyPart(cell, line.length === 1 ? where : `${where}, cell ${i + 1}`),
  );
}

/**
 * One column per label for one shape; one per column of heights otherwise, named by
 * its heading with the label before it.
 */
function assignLabels(
  shapes: readonly Shape[],
  labels: readonly Part[],
): readonly { shape: Shape; label: Part }[] {
  const headingOf = (shape: Shape): Part => ({
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
  columns: readonly ColumnRequest[],
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

/** Names the argument in a complaint about the seed or the label. */
function placed<T>(where: string, what: string, read: () => T): T {
  try {
    return read();
  } catch (error) {
    if (error instanceof InputError && error.where === what) {
      const found = /^"\s*" counts/.test(error.found) ? 'it is blank' : error.found;
      throw new InputError(where, found, error.expected);
    }
    throw error;
  }
}
