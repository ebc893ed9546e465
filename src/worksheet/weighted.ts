/** Weights of rows, and a table whose rows have weights, which PICK and THIN take. */
import type { Cell, Range } from '../density/cells';
import { counted, given, passErrors } from '../density/cells';
import { InputError } from '../errors';
import { type Shares, sharesOf } from '../evidence/weights';
import type { Line } from './numbers';
import { numberLine } from './numbers';

export const TABLE = 'table (argument 1)';
export const WEIGHTS = 'weights (argument 2)';

export interface WeightedTable {
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
  const { numbers, placeOf } = readWeights(weights, WEIGHTS);
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

/** @throws {InputError} for text or a negative number among the weights, and when all are 0. */
export function readWeights(range: Range | null, where: string): Line {
  const weights = numberLine(range, where, 'give one weight for each row');
  const { numbers, placeOf } = weights;
  const negative = numbers.findIndex((weight) => weight < 0);
  if (negative >= 0) {
    throw new InputError(
      placeOf(negative),
      `${numbers[negative]} is negative`,
      'give weights of 0 or more',
    );
  }
  if (!numbers.some((weight) => weight > 0))
    throw new InputError(where, 'all of them are 0', 'give at least one weight above 0');
  return weights;
}

/**
 * Each row's part of the whole; null without weights or with weights that are all alike.
 * @throws {InputError} as readWeights, and when there is not one weight for each row.
 */
export function sharesForRows(range: Range | null, where: string, nRows: number): Shares | null {
  if (given(range) === null) return null;
  const { numbers } = readWeights(range, where);
  if (numbers.length === nRows) return sharesOf(numbers);
  throw new InputError(
    where,
    `${counted(numbers.length, 'weight')} for ${counted(nRows, 'row')} of values`,
    'give one weight for each row',
  );
}

/** A blank is 0, as everywhere: some hosts hand it over as 0. */
function withoutBlanks(row: readonly Cell[]): readonly Cell[] {
  return row.includes(null) || row.includes('')
    ? row.map((cell) => (cell === null || cell === '' ? 0 : cell))
    : row;
}
