/** ALIGNRANKS: columns reordered so that their rank correlations come near wished ones. */
import type { Range } from '../density/cells';
import { counted } from '../density/cells';
import type { Aligned } from '../draw/align';
import { alignRanks as align } from '../draw/align';
import { InputError } from '../errors';
import type { Matrix } from '../numeric/matrix';
import { matrixOf } from '../numeric/matrix';
import { averageRanks, correlationOfRanks } from '../numeric/ranks';
import { numberColumns } from './columns';
import { readKey } from './keys';
import { readRankCorrelations } from './rankmatrix';
import { sideBySide } from './spill';

const COLUMNS = 'columns (argument 1)';
const CORRELATIONS = 'rankcorrelations (argument 2)';
const PLACES = { seed: 'seed (argument 3)', label: 'label (argument 4)' };
const MOST_MISS = 0.05;
const MORE_ROWS = 'give more rows';

/**
 * The same columns, each a reordering of itself, the first as it stands.
 * Shapes: as `columns`, without their heading row.
 * Guarantee: every rank correlation within 0.05 of the wished one.
 * @throws {InputError} for text, a matrix that does not fit or that is impossible (readRankCorrelations),
 * a wish for a column that is the same in all rows, and a miss above 0.05, with what was reached.
 * @throws {CellErrorPassed} when a cell holds an error value.
 */
export function alignRanks(
  columns: Range | null,
  rankCorrelations: Range | null,
  seed: Range | null,
  label: Range | null,
): Range {
  const own = numberColumns(columns, COLUMNS, 2).columns.map(({ values }) => values);
  const { ranks } = readRankCorrelations(rankCorrelations, CORRELATIONS);
  if (ranks.length !== own.length) {
    throw new InputError(
      CORRELATIONS,
      `${counted(ranks.length, 'row')} for ${counted(own.length, 'column')} of values`,
      'give one row and one column for each column of values',
    );
  }
  const key = readKey(seed, label, PLACES);
  const moving = own.flatMap((values, j) => (values.some((v) => v !== values[0]) ? [j] : []));
  requireNoWishForOthers(ranks, moving);
  const placed = [...own];
  if (moving.length > 1) {
    const wished = matrixOf(moving.length, (i, j) => ranks[moving[i]!]![moving[j]!]!);
    const sources = moving.map((j) => own[j]!);
    const aligned = align(sources, wished, key);
    if (aligned === null) {
      throw new InputError(COLUMNS, `${own[0]!.length} rows are too few to reorder`, MORE_ROWS);
    }
    requireNear(aligned, sources, wished, moving);
    aligned.columns.forEach((values, i) => (placed[moving[i]!] = values));
  }
  return sideBySide(placed);
}

/** A column that is the same in all rows has no ranks to align. */
function requireNoWishForOthers(wished: Matrix, moving: readonly number[]): void {
  wished.forEach((row, j) => {
    if (moving.includes(j)) return;
    const other = row.findIndex((value, k) => k !== j && value !== 0);
    if (other < 0) return;
    throw new InputError(
      COLUMNS,
      `column ${j + 1} is the same in all rows, so it has no rank correlation with column ${other + 1}`,
      `give 0 instead of ${row[other]}, or leave the column out`,
    );
  });
}

/** @throws {InputError} at the largest miss, with what is reached and what ties allow at most. */
function requireNear(
  { ranks }: Aligned,
  columns: readonly Float64Array[],
  wished: Matrix,
  moving: readonly number[],
): void {
  let most = 0;
  let at: readonly [number, number] = [0, 0];
  ranks.forEach((row, i) => {
    row.forEach((value, j) => {
      const miss = Math.abs(value - wished[i]![j]!);
      if (miss > most) [most, at] = [miss, [i, j]];
    });
  });
  if (most <= MOST_MISS) return;
  const [i, j] = at;
  const wish = wished[i]![j]!;
  const end = furthest(columns[i]!, columns[j]!, wish < 0);
  const isBeyond = Math.abs(wish) > Math.abs(end);
  throw new InputError(
    CORRELATIONS,
    `columns ${moving[i]! + 1} and ${moving[j]! + 1} reach ${rounded(ranks[i]![j]!)} instead of ${rounded(wish)}`,
    isBeyond
      ? `ties let them reach ${rounded(end)} at most; give no more than that`
      : `give ${rounded(ranks[i]![j]!)}, more rows, or another label`,
  );
}

/** The rank correlation of two columns when both are sorted, or one of them the other way round. */
function furthest(a: Float64Array, b: Float64Array, isFalling: boolean): number {
  const ranksOf = (values: Float64Array): Float64Array => averageRanks(values.slice().sort());
  const second = ranksOf(b);
  return correlationOfRanks(ranksOf(a), isFalling ? second.reverse() : second) ?? 0;
}

function rounded(value: number): string {
  return String(Math.round(value * 1000) / 1000);
}
