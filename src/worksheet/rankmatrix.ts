/** The matrix of wished rank correlations that LINKEDSHARES and ALIGNRANKS take. */
import type { Cell, Range } from '../density/cells';
import {
  given,
  isBlank,
  isText,
  numberIn,
  passErrors,
  quoted,
  sizeOf,
  word,
} from '../density/cells';
import { nearestRankCorrelations, scoreCorrelations } from '../draw/rankcorrelation';
import { InputError } from '../errors';
import type { Matrix } from '../numeric/matrix';
import { correlationFactor, matrixOf } from '../numeric/matrix';

const MAX_COLUMNS = 50;
const SQUARE =
  'give a square of rank correlations, one row and one column for each input, 1 on the diagonal';

interface Wished {
  readonly ranks: Matrix;
  /** The factor of the correlations of normal scores. */
  readonly factor: Matrix;
}

/**
 * Reads the matrix; a row and a column of names before it must agree where both stand.
 * @throws {InputError} for text, another shape than a square, names of rows and columns that differ, a diagonal other than 1, numbers
 * outside −1 … 1, two sides that differ, and correlations that no columns have together; the last
 * names the nearest ones that are possible.
 */
export function readRankCorrelations(range: Range | null, where: string): Wished {
  const own = given(range);
  if (own === null) throw new InputError(where, 'it is missing', SQUARE);
  passErrors(own);
  const { cells, placeOf } = withoutNames(own, where);
  const n = cells.length;
  if (cells[0]!.length !== n) throw new InputError(where, sizeOf(cells), SQUARE);
  if (n > MAX_COLUMNS) {
    throw new InputError(where, `${n} rows and columns`, `give at most ${MAX_COLUMNS}`);
  }
  const ranks = matrixOf(n, (i, j) => numberIn(cells[i]![j]!, placeOf(i, j)));
  requireCorrelations(ranks, placeOf);
  const factor = correlationFactor(scoreCorrelations(ranks));
  if (factor !== null) return { ranks, factor };
  const nearest = nearestRankCorrelations(ranks);
  throw new InputError(
    where,
    'no columns can have all of these together',
    `the nearest possible ones are ${constantOf(nearest)}`,
  );
}

interface Named {
  readonly cells: Range;
  readonly placeOf: (i: number, j: number) => string;
}

function withoutNames(range: Range, where: string): Named {
  const isName = (cell: Cell): boolean => isText(cell) || isBlank(cell);
  const top = range.length > 1 && range[0]!.some(isText) && range[0]!.every(isName) ? 1 : 0;
  const below = range.slice(top);
  const first = below.map((row) => row[0]!);
  const left = range[0]!.length > 1 && first.some(isText) && first.every(isName) ? 1 : 0;
  if (top === 1 && left === 1) requireSameNames(range[0]!.slice(1), first, where);
  return {
    cells: below.map((row) => row.slice(left)),
    placeOf: (i, j) =>
      range.length === 1 ? where : `${where}, row ${i + top + 1}, column ${j + left + 1}`,
  };
}

/** The matrix reads the same by rows and by columns only if their names do. */
function requireSameNames(columns: readonly Cell[], rows: readonly Cell[], where: string): void {
  columns.forEach((column, i) => {
    const row = rows[i];
    if (!isText(column) || row === undefined || !isText(row)) return;
    if (word(row) === word(column)) return;
    throw new InputError(
      `${where}, row ${i + 2}`,
      `its name is ${quoted(row)}, that of column ${i + 2} is ${quoted(column)}`,
      'give rows and columns the same names in the same order',
    );
  });
}

function requireCorrelations(ranks: Matrix, placeOf: Named['placeOf']): void {
  ranks.forEach((row, i) => {
    row.forEach((value, j) => {
      const complain = (found: string, expected: string): InputError =>
        new InputError(placeOf(i, j), found, expected);
      if (i === j && value !== 1) {
        throw complain(`${value} is on the diagonal`, 'give 1: a column moves with itself');
      }
      if (!(value >= -1 && value <= 1)) {
        throw complain(
          `${value} is not between -1 and 1`,
          // Just above 1 is hardly meant as a percentage.
          Math.abs(value) >= 2 && Math.abs(value) <= 100
            ? `write ${value / 100} or ${value}%`
            : 'give a number from -1 to 1',
        );
      }
      const mirrored = ranks[j]![i]!;
      if (j < i && mirrored !== value) {
        throw complain(
          `${value} differs from ${mirrored} on the other side of the diagonal`,
          'give the same number on both sides',
        );
      }
    });
  });
}

/** As an array constant, to be pasted in the place of the argument. */
function constantOf(matrix: Matrix): string {
  return `{${matrix.map((row) => Array.from(row, String).join(',')).join(';')}}`;
}
