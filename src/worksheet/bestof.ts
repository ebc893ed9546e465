/** BESTOF: which of several cases to choose. */
import type { Cell, Range } from '../density/cells';
import { given, passErrors, quoted, singleCell } from '../density/cells';
import { InputError } from '../errors';
import { meanInterval, momentsOf } from '../evidence/moments';
import { chanceInterval } from '../evidence/proportion';
import { rowsOf } from '../evidence/sample';
import { Student } from '../evidence/student';
import { nameOf, numberColumns } from './columns';
import { endCells, intervalName, readConfidence } from './confidence';

const TABLE = 'table (argument 1)';
const LARGEST = 'largest (argument 2)';
const CONFIDENCE = 'confidence (argument 3)';

/**
 * Every case beside the others: how good on average, how often the best, what choosing it costs.
 * Shapes: a heading row, then one row a case, in the table's order; place 1 is the best mean.
 * Units: means and regrets in the unit of the values, chances as fractions of 1.
 * A row in which several cases are best counts for each in equal parts. Regret is how far a case
 * is from the best of the same row.
 * Guarantee: none beyond the intervals, for independent rows; of each case alone, not of the choice.
 * @throws {InputError} as numberColumns, for a table of one column, and a second argument other than TRUE or FALSE.
 * @throws {CellErrorPassed} when a cell holds an error value.
 */
export function bestOf(
  table: Range | null,
  largest: Range | null,
  confidence: Range | null,
): Range {
  const { columns, nRows } = numberColumns(table, TABLE, 2);
  if (columns.length < 2)
    throw new InputError(TABLE, 'one column', 'give one column for each case, at least two');
  const sign = readLargest(largest) ? 1 : -1;
  const student = new Student(readConfidence(confidence, CONFIDENCE));
  const interval = intervalName(student.confidence);

  const values = columns.map((column) => column.values);
  const { timesBest, regrets } = compare(values, nRows, sign);
  const means = values.map((own) => momentsOf(rowsOf(own)));
  const placeOf = (mean: number): number =>
    1 + means.filter((other) => sign * other.mean > sign * mean).length;
  const rows = columns.map((column, j): readonly Cell[] => {
    const chances = chanceInterval(timesBest[j]!, nRows, student.confidence);
    const regret = momentsOf(rowsOf(regrets[j]!));
    const mean = means[j]!;
    return [
      nameOf(column, j, columns.length),
      placeOf(mean.mean),
      ...[mean.mean, ...endCells(meanInterval(mean, student))],
      ...[timesBest[j]! / nRows, chances.lo, chances.hi],
      ...[regret.mean, ...endCells(meanInterval(regret, student))],
      column.zerosAtEnd,
    ];
  });
  const withEnds = (name: string): readonly string[] => [
    name,
    `${name}, ${interval} from`,
    `${name}, ${interval} to`,
  ];
  const heading = [
    'case',
    'place',
    ...['mean', 'chance to be best', 'average regret'].flatMap(withEnds),
    'zeros at the end',
  ];
  return [heading, ...rows];
}

/** In how many rows each case is the best, ties in equal parts, and how far it is from the best in each. */
function compare(
  values: readonly Float64Array[],
  nRows: number,
  sign: number,
): { timesBest: Float64Array; regrets: readonly Float64Array[] } {
  const timesBest = new Float64Array(values.length);
  const regrets = values.map(() => new Float64Array(nRows));
  for (let i = 0; i < nRows; i++) {
    let best = -Infinity;
    let nBest = 0;
    for (const own of values) {
      const value = sign * own[i]!;
      if (value > best) [best, nBest] = [value, 1];
      else if (value === best) nBest++;
    }
    for (let j = 0; j < values.length; j++) {
      const regret = best - sign * values[j]![i]!;
      regrets[j]![i] = regret;
      if (regret === 0) timesBest[j]! += 1 / nBest;
    }
  }
  return { timesBest, regrets };
}

/** A blank is refused: some hosts hand it over as 0, and either answer would be a guess. */
function readLargest(range: Range | null): boolean {
  const expected = 'give TRUE if the largest value is the best, FALSE if the smallest is';
  const own = given(range);
  if (own === null) throw new InputError(LARGEST, 'it is missing', expected);
  passErrors(own);
  const cell = singleCell(own, LARGEST);
  if (typeof cell === 'boolean') return cell;
  throw new InputError(LARGEST, `${quoted(cell)} is neither TRUE nor FALSE`, expected);
}
