/** PROPOSALS: every proposal behind the draws of DRAW with the same arguments. */
import type { Range } from '../density/cells';
import { InputError } from '../errors';
import { heightOf } from '../exact/height';
import { prove } from './proved';
import type { AnyDrawRequest } from './request';
import { DRAW_PLACES, readAnyDrawRequest } from './request';
import { proveSeveral } from './several';

const headings = (places: readonly string[]): readonly string[] => [
  'row',
  'attempt',
  ...places,
  'height drawn',
  'density there',
  'kept',
];
/** What stands for a height where none is drawn, since the density surely lies above it. */
const NO_HEIGHT = 'under the lower line';
/** Lines of the answer: a worksheet's rows less the heading. */
const MOST_LINES = 1_048_574;
const MOST_ROWS = 100_000;

/**
 * The proposals in the order in which they were made; a row's last one is kept and is its
 * draw.
 * Shapes: a heading row, then proposals × 6, or one column more for every further variable.
 * Units: value as x; heights × 2^-exponent
 * (ACCEPTANCE tells it). Under the lower line every height would be kept, so none is
 * drawn and `height drawn` says so; kept is TRUE or FALSE.
 * @throws {InputError} @throws {CellErrorPassed} as DRAW does, for more than one column, and for more
 * rows or proposals than a sheet could show.
 */
export function proposals(
  density: Range | null,
  limits: Range | null,
  rows: Range | null,
  seed: Range | null,
  label: Range | null,
  givens: readonly Range[],
): Range {
  const request = readAnyDrawRequest(density, limits, rows, seed, label, givens);
  const { columns, nRows } = request.several ?? request.plain;
  if (columns.length > 1) {
    throw new InputError(
      DRAW_PLACES.label,
      `${columns.length} columns are asked for`,
      'give one shape and one label',
    );
  }
  if (nRows > MOST_ROWS) {
    throw new InputError(
      DRAW_PLACES.rows,
      `${nRows} rows of draws`,
      `give at most ${MOST_ROWS}, or two cells: first row and last row`,
    );
  }
  const made = request.several ? severalLines(request.several) : plainLines(request.plain);
  if (made === null) {
    throw new InputError(
      DRAW_PLACES.rows,
      `${nRows} rows take more than ${MOST_LINES} proposals`,
      'give fewer rows, or two cells: first row and last row',
    );
  }
  return made;
}

function plainLines({
  columns,
  firstRow,
  nRows,
}: NonNullable<AnyDrawRequest['plain']>): Range | null {
  const { shape, key } = columns[0]!;
  const proved = prove(shape);
  const made = proved.drawer.proposals(key, firstRow, nRows, MOST_LINES);
  const height = proved.kind === 'points' ? proved.envelope.heightAt : heightOf(proved.envelope);
  return (
    made && [
      headings(['value']),
      ...made.map(({ row, attempt, x, height: drawn, isKept }) => [
        row,
        attempt + 1,
        x,
        drawn === drawn ? drawn : NO_HEIGHT,
        height(x),
        isKept,
      ]),
    ]
  );
}

function severalLines({
  columns,
  firstRow,
  nRows,
}: NonNullable<AnyDrawRequest['several']>): Range | null {
  const { shape, key } = columns[0]!;
  const { drawer } = proveSeveral(shape);
  const made = drawer.proposals(key, firstRow, nRows, MOST_LINES);
  return (
    made && [
      headings(shape.axes.map(({ name }) => name)),
      ...made.map(({ row, attempt, place, height: drawn, isKept }) => [
        row,
        attempt + 1,
        ...place,
        drawn === drawn ? drawn : NO_HEIGHT,
        drawer.densityAt(place),
        isKept,
      ]),
    ]
  );
}
