/** PAIREDCHANGE: what changes from one column to another, row by row. */
import type { Cell, Range } from '../density/cells';
import { InputError } from '../errors';
import { chanceOf } from '../evidence/chance';
import { meanInterval, momentsOf } from '../evidence/moments';
import { rowsOf } from '../evidence/sample';
import { Student } from '../evidence/student';
import { numberColumn, zerosNote } from './columns';
import { endCells, intervalName, readConfidence } from './confidence';

const BEFORE = 'before (argument 1)';
const AFTER = 'after (argument 2)';
const CONFIDENCE = 'confidence (argument 3)';

type Line = readonly [item: string, value: Cell];

/**
 * after − before, paired row by row.
 * Shapes: lines of item | value. Units: those of the values; shares as fractions of 1.
 * Guarantee: none beyond the intervals, for rows that are independent of one another.
 * @throws {InputError} as numberColumn, and for columns of different length.
 * @throws {CellErrorPassed} when a cell holds an error value.
 */
export function pairedChange(
  before: Range | null,
  after: Range | null,
  confidence: Range | null,
): Range {
  const [was, is] = [numberColumn(before, BEFORE, 2), numberColumn(after, AFTER, 2)];
  const n = was.values.length;
  if (is.values.length !== n) {
    throw new InputError(
      AFTER,
      `${is.values.length} rows for ${n} rows before`,
      'give as many, in the same order',
    );
  }
  const student = new Student(readConfidence(confidence, CONFIDENCE));
  const interval = intervalName(student.confidence);
  const changes = is.values.map((value, i) => value - was.values[i]!);
  const [first, second, change] = [was.values, is.values, changes].map((values) =>
    momentsOf(rowsOf(values)),
  );
  const [from, to] = endCells(meanInterval(change!, student));

  const share = (name: string, isTrue: (i: number) => boolean): readonly Line[] => {
    const { chance, interval: ends } = chanceOf(isTrue, n, null, student.confidence);
    return [
      [`share of rows that ${name}`, chance],
      [`share of rows that ${name}, ${interval} from`, ends.lo],
      [`share of rows that ${name}, ${interval} to`, ends.hi],
    ];
  };
  // Scaled by the error of the change, so that no square overflows.
  const times = (error: number): number => (error / change!.error) * (error / change!.error);
  const saved = change!.error === 0 ? null : times(first!.error) + times(second!.error);
  const zerosAtEnd = Math.min(was.zerosAtEnd, is.zerosAtEnd);
  const notes = [
    ...(zerosAtEnd > 0 ? [zerosNote(zerosAtEnd)] : []),
    ...(saved === null
      ? ['all rows change alike: the interval cannot tell what others would']
      : []),
  ];
  const lines: readonly Line[] = [
    ['before', was.heading || 'before'],
    ['after', is.heading || 'after'],
    ['rows', n],
    ['zeros at the end', zerosAtEnd],
    ['mean before', first!.mean],
    ['mean after', second!.mean],
    ['mean change', change!.mean],
    [`mean change, ${interval} from`, from],
    [`mean change, ${interval} to`, to],
    ['standard deviation of the change', change!.standardDeviation],
    ...share('rise', (i) => changes[i]! > 0),
    ...share('fall', (i) => changes[i]! < 0),
    ['variance without pairing, times that with pairing', saved ?? 'unbounded'],
    ['rows that an unpaired comparison would need', saved === null ? 'unbounded' : saved * n],
    ['note', notes.length === 0 ? 'none' : notes.join('; ')],
  ];
  return lines;
}
