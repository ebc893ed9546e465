/** THIN: the rows of a table that survive thinning by weights. */
import type { Range } from '../density/cells';
import { givenUnlessZero } from '../density/cells';
import { survivors } from '../draw/thin';
import { InputError } from '../errors';
import { readKey } from './keys';
import { optionalNumber } from './numbers';
import { readWeighted, WEIGHTS } from './weighted';

const PLACES = { seed: 'seed (argument 3)', label: 'label (argument 4)' };
const BOUND = 'bound (argument 5)';

/**
 * The rows that survive, each by itself with the chance weight over bound.
 * Shapes: a heading row (`row`, then the table's own or `column 1` …), then survivors × (1 + columns):
 * the row's number in the table, its heading not counted, then the row.
 * Guarantee: chances within 2^-53; whether row i survives depends on its weight, the bound, seed, label
 * and i alone. Without a bound it is the largest weight, and so depends on the other rows.
 * @throws {InputError} as readWeighted; for a bound that is not above 0 or a weight above it; when no row survives.
 * @throws {CellErrorPassed} when a cell holds an error value.
 */
export function thin(
  table: Range | null,
  weights: Range | null,
  seed: Range | null,
  label: Range | null,
  bound: Range | null,
): Range {
  const { heading, rows, weights: own, placeOf } = readWeighted(table, weights);
  const most = readBound(bound, own, placeOf);
  const kept = survivors(own, most, readKey(seed, label, PLACES));
  if (kept.length === 0) {
    throw new InputError(
      WEIGHTS,
      `none of the ${rows.length} rows survives`,
      `give more rows, or a bound nearer to the largest weight (${largestOf(own)})`,
    );
  }
  const names = heading ?? rows[0]!.map((_, j) => `column ${j + 1}`);
  return [['row', ...names], ...kept.map((i) => [i + 1, ...rows[i]!])];
}

function readBound(
  range: Range | null,
  weights: readonly number[],
  placeOf: (i: number) => string,
): number {
  const bound = optionalNumber(givenUnlessZero(range), BOUND);
  if (bound === null) return largestOf(weights);
  if (!(bound > 0)) {
    throw new InputError(
      BOUND,
      `${bound} is not above 0`,
      'give a number that no weight exceeds, or leave it out for the largest weight',
    );
  }
  const above = weights.findIndex((weight) => weight > bound);
  if (above < 0) return bound;
  throw new InputError(
    placeOf(above),
    `${weights[above]} is above the bound (${bound})`,
    `give a bound of at least ${largestOf(weights)}`,
  );
}

function largestOf(weights: readonly number[]): number {
  return weights.reduce((a, b) => Math.max(a, b));
}
