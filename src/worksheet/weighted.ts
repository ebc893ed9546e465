/** Weights of rows, and a table whose rows have weights, which PICK and THIN take. */
import type { Cell, Range } from '../density/cells';
import { counted, given, passErrors } from '../density/cells';
import { InputError } from '../errors';
import { type Shares, sharesOf } from '../evidence/weights';
import { numberColumn } from './columns';
import { numberLine } from './numbers';

const TABLE = 'table (argument 1)';
export const WEIGHTS = 'weights (argument 2)';

interface WeightedTable {
  /** The row above the rows with weights; null without one. */
  readonly heading: readonly Cell[] | null;
  readonly rows: Range;
  readonly weights: readonly number[];
  /** The place of the i-th weight, for messages. */
  readonly placeOf: (i: number) => string;
}

/**
 * Reads the two; the table has a heading row if it has one row more than there are weights.
 * @throws {InputError} when they do not fit, for text or a negative number among the weights, and
 * when all are 0.
 */
export function readWeighted(table: Range | null, weights: Range | null): WeightedTable {
  const own = given(table);
  if (own === null) throw new InputError(TABLE, 'it is missing', 'give a range of rows');
  passErrors(own);
  const { numbers, placeOf } = numberLine(weights, WEIGHTS, 'give one weight for each row');
  requireWeights(numbers, placeOf, WEIGHTS);
  const nHeadings = own.length - numbers.length;
  if (nHeadings !== 0 && nHeadings !== 1) {
    throw new InputError(
      WEIGHTS,
      `${counted(numbers.length, 'weight')} for a table of ${counted(own.length, 'row')}`,
      'give one weight for each row, or for each row below its heading',
    );
  }
  return {
    heading: nHeadings === 1 ? own[0]! : null,
    rows: own.slice(nHeadings).map(withoutBlanks),
    weights: numbers,
    placeOf,
  };
}

/** @throws {InputError} for a negative number among the weights, and when all are 0. */
function requireWeights(
  weights: ArrayLike<number>,
  placeOf: (i: number) => string,
  where: string,
): void {
  let some = false;
  for (let i = 0; i < weights.length; i++) {
    const weight = weights[i]!;
    if (weight < 0)
      throw new InputError(placeOf(i), `${weight} is negative`, 'give weights of 0 or more');
    some ||= weight > 0;
  }
  if (!some) throw new InputError(where, 'all of them are 0', 'give at least one weight above 0');
}

/**
 * Each row's part of the whole; null without weights or with weights that are all alike.
 * @throws {InputError} as numberColumn, for a negative weight, when all are 0, and when there is not one for each row.
 */
export function sharesForRows(range: Range | null, where: string, nRows: number): Shares | null {
  if (given(range) === null) return null;
  const { values, placeOf } = numberColumn(range, where, 1);
  requireWeights(values, placeOf, where);
  if (values.length === nRows) return sharesOf(values);
  throw new InputError(
    where,
    `${counted(values.length, 'weight')} for ${counted(nRows, 'row')} of values`,
    'give one weight for each row',
  );
}

/** A blank is 0, as everywhere: some hosts hand it over as 0. */
function withoutBlanks(row: readonly Cell[]): readonly Cell[] {
  return row.includes(null) || row.includes('')
    ? row.map((cell) => (cell === null || cell === '' ? 0 : cell))
    : row;
}
