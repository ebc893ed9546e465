/** LINKEDSHARES: shares that belong together, for QUANTILE to turn into linked inputs. */
import type { Range } from '../density/cells';
import { givenUnlessZero, passErrors } from '../density/cells';
import { linkedShares as drawShares } from '../draw/linked';
import { readKey } from './keys';
import { readRankCorrelations } from './rankmatrix';
import { readRows } from './rows';
import { sideBySide } from './spill';

const CORRELATIONS = 'rankcorrelations (argument 1)';
const ROWS = 'rows (argument 2)';
const PLACES = { seed: 'seed (argument 3)', label: 'label (argument 4)' };

/**
 * Shares within (0, 1), one column for each row of the matrix, whose rank correlations are those
 * of the matrix but for chance.
 * Shapes: rows × columns of the matrix.
 * Guarantee: each share is uniform as src/METHOD.md says; row i depends on matrix, seed, label and i alone.
 * @throws {InputError} as readRankCorrelations, and for rows, seed and label as DRAW does.
 * @throws {CellErrorPassed} when a cell holds an error value.
 */
export function linkedShares(
  rankCorrelations: Range | null,
  rows: Range | null,
  seed: Range | null,
  label: Range | null,
): Range {
  const { factor } = readRankCorrelations(rankCorrelations, CORRELATIONS);
  const wanted = givenUnlessZero(rows);
  if (wanted !== null) passErrors(wanted);
  const { firstRow, nRows } = readRows({ range: wanted, where: ROWS });
  return sideBySide(drawShares(factor, readKey(seed, label, PLACES), firstRow, nRows));
}
