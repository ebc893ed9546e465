/** ROWSNEEDED: how many rows a wanted precision takes. */
import type { Cell, Range } from '../density/cells';
import { givenUnlessZero } from '../density/cells';
import { InputError } from '../errors';
import { deviationInterval, meanInterval, momentsOf } from '../evidence/moments';
import { percentile, percentileInterval } from '../evidence/percentile';
import { ENOUGH, rowsForMean, rowsForPercentile } from '../evidence/rowsneeded';
import { rowsOf, sampleOf } from '../evidence/sample';
import type { Ends } from '../evidence/student';
import { Student } from '../evidence/student';
import { numberColumn, zerosNote } from './columns';
import {
  endCell,
  endCells,
  intervalName,
  percent,
  readConfidence,
  requireShare,
} from './confidence';
import { optionalNumber } from './numbers';
import { MAX_ROWS } from './rows';

const VALUES = 'values (argument 1)';
const SHARE = 'share (argument 2)';
const HALFWIDTH = 'halfwidth (argument 3)';
const CONFIDENCE = 'confidence (argument 4)';

interface Answer {
  readonly of: string;
  readonly value: number;
  readonly now: Ends;
  readonly rows: number | null;
  readonly interval: Ends;
  readonly notes: readonly string[];
}

/**
 * Rows for a precision, judged by the rows there are.
 * Shapes: lines of item | value. Units: halfwidth and values in the unit of the values.
 * Guarantee: none beyond the interval, which is the first column's own noise.
 * @throws {InputError} as numberColumn, for rows that are all alike, a share not between 0 and 1, and a halfwidth that is missing or not above 0.
 * @throws {CellErrorPassed} when a cell holds an error value.
 */
export function rowsNeeded(
  values: Range | null,
  share: Range | null,
  halfwidth: Range | null,
  confidence: Range | null,
): Range {
  const column = numberColumn(values, VALUES, 2);
  const wantedShare = optionalNumber(givenUnlessZero(share), SHARE);
  const reach = readHalfwidth(halfwidth);
  const student = new Student(readConfidence(confidence, CONFIDENCE));
  if (wantedShare !== null)
    requireShare(wantedShare, SHARE, 'give a fraction such as 0.9, or leave it out for the mean');
  const first = column.values[0]!;
  if (column.values.every((value) => value === first)) {
    throw new InputError(
      VALUES,
      `all ${column.values.length} rows are ${first}`,
      'give rows that vary',
    );
  }
  const answer =
    wantedShare === null
      ? forMean(column.values, reach, student)
      : forPercentile(column.values, wantedShare, reach, student.confidence);
  const notes = [
    ...(column.zerosAtEnd > 0 ? [zerosNote(column.zerosAtEnd)] : []),
    ...answer.notes,
    ...((answer.rows ?? 0) > MAX_ROWS ? [`a column holds ${MAX_ROWS} rows`] : []),
  ];
  const interval = `rows needed, ${intervalName(student.confidence)}`;
  const [from, to] = endCells(answer.interval);
  const lines: readonly (readonly [string, Cell])[] = [
    ['of', answer.of],
    ['value now', answer.value],
    ['rows now', column.values.length],
    ['zeros at the end', column.zerosAtEnd],
    ['halfwidth now', endCell(widerSide(answer.value, answer.now))],
    ['halfwidth wanted', reach],
    ['rows needed', endCell(answer.rows)],
    [`${interval} from`, from],
    [`${interval} to`, to],
    ['note', notes.length === 0 ? 'none' : notes.join('; ')],
  ];
  return lines;
}

function forMean(values: Float64Array, halfwidth: number, student: Student): Answer {
  const moments = momentsOf(rowsOf(values));
  const deviation = deviationInterval(moments, student);
  const rowsAt = (end: number | null): number | null =>
    end === null ? null : rowsForMean(end, halfwidth, student);
  return {
    of: 'mean',
    value: moments.mean,
    now: meanInterval(moments, student),
    rows: rowsAt(moments.standardDeviation),
    interval: { lo: rowsAt(deviation.lo), hi: rowsAt(deviation.hi) },
    notes: [],
  };
}

function forPercentile(
  values: Float64Array,
  share: number,
  halfwidth: number,
  confidence: number,
): Answer {
  const sample = sampleOf(values, null);
  const { rows, interval, window, within } = rowsForPercentile(
    sample,
    share,
    halfwidth,
    confidence,
  );
  const wider = `fewer than ${ENOUGH} rows lie within the halfwidth on one side: judged by ${within} within ${window}`;
  return {
    of: `P${percent(share)}`,
    value: percentile(sample, share),
    now: percentileInterval(sample, share, confidence),
    rows,
    interval,
    notes: window > halfwidth || within < ENOUGH ? [wider] : [],
  };
}

function widerSide(value: number, { lo, hi }: Ends): number | null {
  return lo === null || hi === null ? null : Math.max(value - lo, hi - value);
}

function readHalfwidth(range: Range | null): number {
  const halfwidth = optionalNumber(givenUnlessZero(range), HALFWIDTH);
  const expected = 'give how far off the value may be, in its unit';
  if (halfwidth === null) throw new InputError(HALFWIDTH, 'it is missing', expected);
  if (halfwidth > 0) return halfwidth;
  throw new InputError(HALFWIDTH, `${halfwidth} is not above 0`, expected);
}
