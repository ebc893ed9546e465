/**
 * What the arguments of DRAW and its companions ask for: shapes, rows, seed and one
 * label a column. Arguments given outright win over a block's words.
 */
import type { BlockWord } from '../density/block';
import type { Cell, Range } from '../density/cells';
import { given, isBlank, lineOfCells, passErrors, quoted, singleCell } from '../density/cells';
import type { Shape, Shapes } from '../density/shape';
import type { ListLine } from '../density/shapelist';
import { readShapes } from '../density/shape';
import { InputError } from '../errors';
import type { Key, KeyPart } from '../random/key';
import { keyOf, keyText } from '../random/key';

export const MAX_ROWS = 1_048_575;

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
    argumentOr(rows, shapes, 'rows') ?? rowsOfLines(shapes.lines),
    DRAW_PLACES.rows,
  );
  const seedCells = argumentOr(seed, shapes, 'seed');
  const labels = readLabels(argumentOr(label, shapes, 'label'));
  const columns = shapes.lines
    ? lineColumns(shapes, shapes.lines, seedCells, labels)
    : plainColumns(shapes.shapes, readSeed(seedCells ?? [[null]], DRAW_PLACES.seed), labels);
  refuseEqualLabels(columns, shapes.lines);
  return { columns, firstRow, nRows, notes: shapes.notes };
}

/** The argument, else the block's word. */
function argumentOr(argument: Range | null, { block }: Shapes, name: BlockWord): Range | null {
  const own = given(argument);
  if (own !== null) {
    passErrors(own);
    return own;
  }
  const cell = block?.words.get(name);
  return cell === undefined ? null : [[cell]];
}

function plainColumns(
  shapes: readonly Shape[],
  seed: KeyPart,
  labels: readonly KeyPart[],
): readonly ColumnRequest[] {
  return assignLabels(shapes, labels).map(({ shape, label }) =>
    columnOf(shape, seed, label, DRAW_PLACES),
  );
}

function readSeed(range: Range, where: string): KeyPart {
  return keyPart(singleCell(range, where), where);
}

function columnOf(
  shape: Shape,
  seed: KeyPart,
  label: KeyPart,
  where: { readonly seed: string; readonly label: string },
): ColumnRequest {
  return {
    shape,
    seed: String(seed).trim(),
    label: String(label).trim(),
    key: placed(where.label, 'label', () => placed(where.seed, 'seed', () => keyOf(seed, label))),
  };
}

/** One column per line of a list: its own label, after the argument's if there is one, and its own seed unless one is given. */
function lineColumns(
  { shapes }: Shapes,
  lines: readonly ListLine[],
  seedCells: Range | null,
  labels: readonly KeyPart[],
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
    if (isBlank(part))
      throw new InputError(where, 'it has no label', 'give every line a label of its own');
    const label = labels.length === 0 ? part : `${String(labels[0])} ${String(part)}`;
    const own = block.words.get('seed');
    const isOwn = seedCells === null && own !== undefined;
    const seedPlace = isOwn ? `${where}, seed` : DRAW_PLACES.seed;
    const seed = readSeed(isOwn ? [[own]] : (seedCells ?? [[null]]), seedPlace);
    return columnOf(shapes[i]!, seed, label, { seed: seedPlace, label: `${where}, label` });
  });
}

/** The rows that the lines of a list name; the columns of one spill are all as long. */
function rowsOfLines(lines: readonly ListLine[] | null): Range | null {
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
  return [[rows]];
}

function readRows(range: Range | null, where: string): { firstRow: number; nRows: number } {
  const expected = `give a whole number from 1 to ${MAX_ROWS}`;
  if (range === null) throw new InputError(where, 'they are missing', expected);
  const cells = lineOfCells(range, where).map((cell) => wholeRow(cell, where, expected));
  if (cells.length === 1) return { firstRow: 1, nRows: cells[0]! };
  const [first, last] = cells;
  if (cells.length !== 2 || !(first! <= last!)) {
    throw new InputError(
      where,
      `${cells.join(', ')}`,
      'give one number of rows, or the first and the last row',
    );
  }
  return { firstRow: first!, nRows: last! - first! + 1 };
}

function wholeRow(cell: Cell, where: string, expected: string): number {
  if (typeof cell !== 'number') {
    throw new InputError(where, `${quoted(cell)} is not a number`, expected);
  }
  if (Math.floor(cell) !== cell) throw new InputError(where, `${cell} is not whole`, expected);
  if (cell < 1) throw new InputError(where, `${cell} is below 1`, expected);
  if (cell > MAX_ROWS) throw new InputError(where, `${cell} is above ${MAX_ROWS}`, expected);
  return cell;
}

function keyPart(cell: Cell, where: string): KeyPart {
  if (cell === null) return '';
  if (typeof cell === 'object')
    throw new InputError(where, quoted(cell), 'give a text or a number');
  return cell;
}

function readLabels(range: Range | null): readonly KeyPart[] {
  if (range === null) return [];
  return lineOfCells(range, DRAW_PLACES.label).map((cell) => keyPart(cell, DRAW_PLACES.label));
}

/**
 * One column per label for one shape; one per column of heights otherwise, named by
 * its heading with the label before it.
 */
function assignLabels(
  shapes: readonly Shape[],
  labels: readonly KeyPart[],
): readonly { shape: Shape; label: KeyPart }[] {
  if (shapes.length === 1) {
    const shape = shapes[0]!;
    const own = shape.kind === 'table' ? shape.heading : '';
    return (labels.length > 0 ? labels : [own]).map((label) => ({ shape, label }));
  }
  if (labels.length > 1) {
    throw new InputError(
      DRAW_PLACES.label,
      `${labels.length} labels for ${shapes.length} columns of heights`,
      'give one label or none: the headings of the columns tell them apart',
    );
  }
  return shapes.map((shape, i) => {
    const heading = shape.kind === 'table' ? shape.heading : '';
    if (isBlank(heading)) {
      throw new InputError(
        DRAW_PLACES.density,
        `column ${i + 2} has no heading`,
        'give every column of heights a heading; it is the label of its draws',
      );
    }
    return { shape, label: labels.length === 0 ? heading : `${String(labels[0])} ${heading}` };
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
    if (error instanceof InputError && error.where === what)
      throw new InputError(where, error.found, error.expected);
    throw error;
  }
}
