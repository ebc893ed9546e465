/** PICK: whole rows of a table, picked with given weights. */
import type { Cell, Range } from '../density/cells';
import { givenUnlessZero, passErrors } from '../density/cells';
import { Picker } from '../draw/pick';
import { readKey } from './keys';
import { readRows } from './rows';
import { readWeighted } from './weighted';

const ROWS = 'rows (argument 3)';
const PLACES = { seed: 'seed (argument 4)', label: 'label (argument 5)' };

/**
 * Rows of a table, each picked by itself with the chance weight over sum of weights.
 * Shapes: the table's heading row if it has one, then rows × the table's columns, text as it stands.
 * Guarantee: chances within 2^-51; row i depends on table, weights, seed, label and i alone.
 * @throws {InputError} as readWeighted, and for rows, seed and label as DRAW does.
 * @throws {CellErrorPassed} when a cell holds an error value.
 */
export function pick(
  table: Range | null,
  weights: Range | null,
  rows: Range | null,
  seed: Range | null,
  label: Range | null,
): Range {
  const { heading, rows: from, weights: own } = readWeighted(table, weights);
  const wanted = givenUnlessZero(rows);
  if (wanted !== null) passErrors(wanted);
  const { firstRow, nRows } = readRows({ range: wanted, where: ROWS });
  const picks = new Picker(own).picks(readKey(seed, label, PLACES), firstRow, nRows);
  const nHeadings = heading === null ? 0 : 1;
  const spilled = new Array<readonly Cell[]>(nHeadings + nRows);
  if (heading !== null) spilled[0] = heading;
  for (let k = 0; k < nRows; k++) spilled[nHeadings + k] = from[picks[k]!]!;
  return spilled;
}
