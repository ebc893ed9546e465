/**
 * What the arguments of DRAW and its companions ask for: shapes, rows, seed and one
 * label a column. Arguments given outright win over a block's words.
 */
import type { BlockWord } from '../density/block';
import type { Cell, Range } from '../density/cells';
import { given, isBlank, lineOfCells, passErrors, quoted, singleCell } from '../density/cells';
import type { Shape, Shapes } from '../density/shape';
import { readShapes } from '../density/shape';
import { InputError } from '../errors';
import type { Key, KeyPart } from '../random/key';
import { keyOf, keyText } from '../random/key';

export const MAX_ROWS = 1_048_575;

/** One column that is asked for. */
export interface ColumnRequest {
  readonly shape: Shape;
  readonly label: string;
  readonly key: Key;
}

export interface DrawRequest {
  readonly columns: readonly ColumnRequest[];
  readonly seed: string;
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
  const { firstRow, nRows } = readRows(argumentOr(rows, shapes, 'rows'), DRAW_PLACES.rows);
  const seedCell = keyPart(
    singleCell(argumentOr(seed, shapes, 'seed') ?? [[null]], DRAW_PLACES.seed),
    DRAW_PLACES.seed,
  );
  const labels = readLabels(argumentOr(label, shapes, 'label'));
  const columns = assignLabels(shapes.shapes, labels).map(({ shape, label: part }) => ({
    shape,
    label: String(part).trim(),
    key: placed(DRAW_PLACES.label, 'label', () =>
      placed(DRAW_PLACES.seed, 'seed', () => keyOf(seedCell, part)),
    ),
  }));
  refuseEqualLabels(columns);
  return { columns, seed: String(seedCell).trim(), firstRow, nRows, notes: shapes.notes };
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

function refuseEqualLabels(columns: readonly ColumnRequest[]): void {
  const seen = new Set<string>();
  for (const { label } of columns) {
    const text = keyText(label, 'label');
    if (seen.has(text)) {
      throw new InputError(
        DRAW_PLACES.label,
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
