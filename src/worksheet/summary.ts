/** SUMMARY: columns of draws as figures with their intervals. */
import type { Cell, Range } from '../density/cells';
import { givenUnlessZero } from '../density/cells';
import { InputError } from '../errors';
import type { Moments } from '../evidence/moments';
import { deviationInterval, isTooSkewed, meanInterval, momentsOf } from '../evidence/moments';
import { percentile, percentileInterval } from '../evidence/percentile';
import type { Sample } from '../evidence/sample';
import { sampleOf } from '../evidence/sample';
import type { Ends } from '../evidence/student';
import { Student } from '../evidence/student';
import { highestMean, lowestMean } from '../evidence/tail';
import type { Column } from './columns';
import { nameOf, numberColumns, zerosNote } from './columns';
import { endCells, intervalName, percent, readConfidence, requireShare } from './confidence';
import { numberLine } from './numbers';
import { sharesForRows } from './weighted';

const VALUES = 'values (argument 1)';
const SHARES = 'shares (argument 2)';
const CONFIDENCE = 'confidence (argument 3)';
const WEIGHTS = 'weights (argument 4)';
const ENDS = 'give fractions such as 0.1, 0.5, 0.9; for the ends use MIN and MAX';
const USUAL_SHARES: readonly number[] = [0.05, 0.1, 0.25, 0.5, 0.75, 0.9, 0.95];

/** A figure and the ends of its interval; a figure without one has blanks there. */
type Figure = readonly [item: string, value: Cell, lo: Cell, hi: Cell];

/**
 * Mean, standard deviation, percentiles and means of tails of each column, with intervals.
 * Shapes: a heading row `item`, then for each column its name and the two ends; a row a figure.
 * Units: those of the values. An end that the rows are too few to tell is `unbounded`.
 * Guarantee: percentiles without weights are covered with at least the confidence, whatever the shape;
 * the other intervals near it for independent rows.
 * @throws {InputError} as numberColumns and sharesForRows, for shares not between 0 and 1, and for less than two rows' worth.
 * @throws {CellErrorPassed} when a cell holds an error value.
 */
export function summary(
  values: Range | null,
  shares: Range | null,
  confidence: Range | null,
  weights: Range | null,
): Range {
  const { columns, nRows } = numberColumns(values, VALUES, 2);
  const wanted = readShares(shares);
  const student = new Student(readConfidence(confidence, CONFIDENCE));
  const rowShares = sharesForRows(weights, WEIGHTS, nRows);
  const interval = intervalName(student.confidence);
  const heading = columns.flatMap((column, j) => {
    const name = nameOf(column, j, columns.length);
    const stem = columns.length === 1 && column.heading === '' ? interval : `${name}, ${interval}`;
    return [name, `${stem} from`, `${stem} to`];
  });
  const figures = columns.map((column) =>
    figuresOf(column, sampleOf(column.values, rowShares), wanted, student),
  );
  const lines = figures[0]!.map(([item], i) => [item, ...figures.flatMap((of) => of[i]!.slice(1))]);
  return [['item', ...heading], ...lines];
}

function readShares(range: Range | null): readonly number[] {
  const own = givenUnlessZero(range);
  if (own === null) return USUAL_SHARES;
  const { numbers, placeOf } = numberLine(own, SHARES, 'give fractions such as 0.1, 0.5, 0.9');
  numbers.forEach((share, i) => requireShare(share, placeOf(i), ENDS));
  return numbers;
}

function figuresOf(
  { values, zerosAtEnd }: Column,
  sample: Sample,
  shares: readonly number[],
  student: Student,
): readonly Figure[] {
  if (sample.rowsWorth < 2) {
    throw new InputError(
      WEIGHTS,
      `the rows are worth ${sample.rowsWorth.toPrecision(3)} rows of equal weight`,
      'give weights that spread over more rows',
    );
  }
  const moments = momentsOf(sample);
  const figure = (item: string, value: number, ends: Ends): Figure => [
    item,
    value,
    ...endCells(ends),
  ];
  const tail = (item: string, share: number, of: typeof lowestMean): Figure => {
    const { mean, interval } = of(sample, share, student);
    return figure(`mean of the ${item} ${percent(share)} %`, mean, interval);
  };
  const lower = shares.filter((share) => share <= 0.5);
  const upper = shares.filter((share) => share >= 0.5);
  return [
    ['rows', values.length, null, null],
    ["rows' worth", sample.rowsWorth, null, null],
    ['zeros at the end', zerosAtEnd, null, null],
    figure('mean', moments.mean, meanInterval(moments, student)),
    figure('standard deviation', moments.standardDeviation, deviationInterval(moments, student)),
    ...shares.map((share) =>
      figure(
        `P${percent(share)}`,
        percentile(sample, share),
        percentileInterval(sample, share, student.confidence),
      ),
    ),
    ...lower.map((share) => tail('lowest', share, lowestMean)),
    ...upper.map((share) => tail('highest', rest(share), highestMean)),
    ['note', noteOn(moments, zerosAtEnd), null, null],
  ];
}

/** 1 − share, without the digits that rounding adds. */
function rest(share: number): number {
  return Number((1 - share).toPrecision(14));
}

function noteOn(moments: Moments, zerosAtEnd: number): string {
  const notes: string[] = [];
  if (zerosAtEnd > 0) notes.push(zerosNote(zerosAtEnd));
  if (moments.standardDeviation === 0)
    notes.push('all rows are alike: the intervals cannot tell what other rows would show');
  else if (isTooSkewed(moments))
    notes.push(
      `so skewed (skewness ${moments.skewness.toPrecision(2)}) or unevenly weighted that the interval of the mean may be too narrow`,
    );
  return notes.length === 0 ? 'none' : notes.join('; ');
}
