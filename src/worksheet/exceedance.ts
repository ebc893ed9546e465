/** EXCEEDANCE: the chance above, at and below a threshold, or of TRUE. */
import type { Cell, Range } from '../density/cells';
import { InputError } from '../errors';
import { chanceOf } from '../evidence/chance';
import { rowsWorth } from '../evidence/weights';
import type { Column } from './columns';
import { columnsOfEither, nameOf, zerosNote } from './columns';
import { intervalName, readConfidence } from './confidence';
import { optionalNumber } from './numbers';
import { sharesForRows } from './weighted';

const VALUES = 'values (argument 1)';
const THRESHOLD = 'threshold (argument 2)';
const CONFIDENCE = 'confidence (argument 3)';
const WEIGHTS = 'weights (argument 4)';

type Line = readonly [item: string, value: Cell];

/**
 * Chances from rows, each with its interval.
 * Shapes: lines of item | value, one column of values for each column of rows.
 * Units: chances as fractions of 1.
 * Guarantee: exact intervals (Clopper and Pearson) where fewer than 30 rows count or fewer than 30
 * do not, else Wilson's; both for independent rows.
 * @throws {InputError} as columnsOfEither and sharesForRows; for numbers without a threshold, and TRUE and FALSE with one.
 * @throws {CellErrorPassed} when a cell holds an error value.
 */
export function exceedance(
  values: Range | null,
  threshold: Range | null,
  confidence: Range | null,
  weights: Range | null,
): Range {
  const { columns, nRows, areTruths } = columnsOfEither(values, VALUES);
  const limit = readThreshold(threshold, areTruths);
  const level = readConfidence(confidence, CONFIDENCE);
  const shares = sharesForRows(weights, WEIGHTS, nRows);
  const worth = rowsWorth(shares, nRows);

  const chance = (name: string, isTrue: (i: number) => boolean): readonly Line[] => {
    const { chance, interval } = chanceOf(isTrue, nRows, shares, level);
    return [
      [name, chance],
      [`${name}, ${intervalName(level)} from`, interval.lo],
      [`${name}, ${intervalName(level)} to`, interval.hi],
    ];
  };
  const chances = (of: Float64Array): readonly Line[] =>
    limit === null
      ? chance('chance of TRUE', (i) => of[i] === 1)
      : [
          ['threshold', limit],
          ...chance('chance above', (i) => of[i]! > limit),
          ...chance('chance equal', (i) => of[i] === limit),
          ...chance('chance below', (i) => of[i]! < limit),
        ];
  const linesOf = (column: Column, j: number): readonly Line[] => [
    ['column', nameOf(column, j, columns.length)],
    ['rows', nRows],
    ["rows' worth", worth],
    ['zeros at the end', column.zerosAtEnd],
    ...chances(column.values),
    ['note', column.zerosAtEnd > 0 ? zerosNote(column.zerosAtEnd) : 'none'],
  ];
  const all = columns.map(linesOf);
  return all[0]!.map(([item], i) => [item, ...all.map((lines) => lines[i]![1])]);
}

/** Null for TRUE and FALSE, which take no threshold; a blank cell arrives as 0 on some hosts. */
function readThreshold(range: Range | null, areTruths: boolean): number | null {
  const threshold = optionalNumber(range, THRESHOLD);
  if (areTruths) {
    if (threshold === null || threshold === 0) return null;
    throw new InputError(
      THRESHOLD,
      `${threshold} is given for TRUE and FALSE`,
      'leave it out for the share of TRUE, or give numbers',
    );
  }
  if (threshold !== null) return threshold;
  throw new InputError(
    THRESHOLD,
    'it is missing',
    'give a number in the unit of the values (only TRUE and FALSE need none)',
  );
}
