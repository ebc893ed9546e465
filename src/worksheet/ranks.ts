/** RANKS: how columns move together, with intervals. */
import type { Cell, Range } from '../density/cells';
import { rankInterval } from '../evidence/rankinterval';
import { averageRanks, rankCorrelations } from '../numeric/ranks';
import { nameOf, numberColumns } from './columns';
import { endCells, intervalName, readConfidence } from './confidence';

const COLUMNS = 'columns (argument 1)';
const CONFIDENCE = 'confidence (argument 2)';
/** In the place of a correlation that a column without ranks does not have. */
const SAME = 'same in all rows';

/**
 * Spearman's rank correlation of every two columns, ties with the mean of their ranks.
 * Shapes: a heading row, then a row a column: its name, the correlations, their intervals' ends (two
 * for each column), and the columns that move with it exactly. An end that the rows are too few to
 * tell is `unbounded`.
 * Guarantee: correlations to 1e-12; intervals near the confidence for independent rows.
 * @throws {InputError} as numberColumns, and for a confidence outside 0 … 1.
 * @throws {CellErrorPassed} when a cell holds an error value.
 */
export function ranks(columns: Range | null, confidence: Range | null): Range {
  const own = numberColumns(columns, COLUMNS, 2);
  const level = readConfidence(confidence, CONFIDENCE);
  const names = own.columns.map((column, j) => nameOf(column, j, own.columns.length));
  const matrix = rankCorrelations(own.columns.map(({ values }) => averageRanks(values)));
  const interval = intervalName(level);
  const heading = [
    'rank correlation',
    ...names,
    ...names.flatMap((name) => [`${name}, ${interval} from`, `${name}, ${interval} to`]),
    'moves exactly with',
  ];
  const endsOf = (value: number | null, isSelf: boolean): readonly [Cell, Cell] => {
    if (value === null) return [SAME, SAME];
    return isSelf ? [1, 1] : endCells(rankInterval(value, own.nRows, level));
  };
  return [
    heading,
    ...matrix.map((row, i) => [
      names[i]!,
      ...row.map((value) => value ?? SAME),
      ...row.flatMap((value, j) => endsOf(value, i === j)),
      partnersOf(row, i, names),
    ]),
  ];
}

/** The columns whose ranks are the same as those of column i, or the other way round. */
function partnersOf(row: readonly (number | null)[], i: number, names: readonly string[]): string {
  const partners = row.flatMap((value, j) => {
    if (j === i || (value !== 1 && value !== -1)) return [];
    return [value === 1 ? `${names[j]} (same label?)` : `${names[j]}, the other way round`];
  });
  return partners.length === 0 ? 'none' : partners.join('; ');
}
