/** DRIVERS: which input columns move an output. */
import type { Cell, Range } from '../density/cells';
import { InputError } from '../errors';
import { firstOrder } from '../evidence/firstorder';
import { rankInterval } from '../evidence/rankinterval';
import { Student } from '../evidence/student';
import { averageRanks, correlationOfRanks, orderOf } from '../numeric/ranks';
import type { Column } from './columns';
import { nameOf, numberColumn, numberColumns, unusualZeros, zerosNote } from './columns';
import { endCells, intervalName } from './confidence';

const INPUTS = 'inputs (argument 1)';
const OUTPUT = 'output (argument 2)';
const CONFIDENCE = 0.95;
/** Fewer rows tell nothing of shares. */
const FEWEST = 20;
const UNTOLD = 'too few rows to tell';

interface Driver {
  readonly row: readonly Cell[];
  readonly share: number;
  /** The share's standard error. */
  readonly error: number;
}

/**
 * The rank correlation of each input with the output and its first-order share of the output's
 * variance, both with 95 % intervals.
 * Shapes: a heading row, then a row an input, the largest share first, then `together`: the sum of the shares.
 * Units: fractions of 1. Guarantee: none beyond the intervals, for independent rows.
 * @throws {InputError} as numberColumns, for columns of different length, fewer than FEWEST rows and an output that is the same in all rows.
 * @throws {CellErrorPassed} when a cell holds an error value.
 */
export function drivers(inputs: Range | null, output: Range | null): Range {
  const { columns, nRows } = numberColumns(inputs, INPUTS, FEWEST);
  const moved = numberColumn(output, OUTPUT, FEWEST);
  if (moved.values.length !== nRows) {
    throw new InputError(
      OUTPUT,
      `${moved.values.length} rows for ${nRows} rows of inputs`,
      'give as many, in the same order',
    );
  }
  const y = scaled(moved.values);
  if (y === null) {
    throw new InputError(
      OUTPUT,
      `all rows are ${moved.values[0]}`,
      'give an output that is not the same in all rows',
    );
  }
  const ranksOfOutput = averageRanks(y);
  const student = new Student(CONFIDENCE);
  const names = columns.map((column, j) => nameOf(column, j, columns.length));
  const partners = equalColumns(columns, names);
  const all = columns.map((column, j) =>
    driverOf(column, names[j]!, partners[j]!, y, ranksOfOutput, student),
  );
  const interval = intervalName(CONFIDENCE);
  return [
    [
      'input',
      'rank correlation',
      `rank correlation, ${interval} from`,
      `rank correlation, ${interval} to`,
      'share of variance',
      `share of variance, ${interval} from`,
      `share of variance, ${interval} to`,
      'note',
    ],
    // Equal shares stay in the order of the inputs.
    ...[...all].sort((a, b) => b.share - a.share).map(({ row }) => row),
    together(all, moved),
  ];
}

function driverOf(
  column: Column,
  name: string,
  partners: readonly string[],
  y: Float64Array,
  ranksOfOutput: Float64Array,
  student: Student,
): Driver {
  const { values } = column;
  const n = values.length;
  const order = orderOf(values);
  const zeros = unusualZeros(column);
  const notes = [
    ...(partners.length > 0 ? [`the same in all rows as ${partners.join(', ')}`] : []),
    ...(zeros > 0 ? [zerosNote(zeros)] : []),
  ];
  const rank = correlationOfRanks(averageRanks(values, order), ranksOfOutput);
  if (rank === null) {
    const note = [`${values[0]} in all rows: it moves nothing here`, ...notes].join('; ');
    return { row: [name, 0, 0, 0, 0, 0, 0, note], share: 0, error: 0 };
  }
  const ranks = [rank, ...endCells(rankInterval(rank, n, CONFIDENCE))];
  const found = firstOrder(values, order, y);
  const note = (more: readonly string[]): string => [...notes, ...more].join('; ') || 'none';
  if (found === null) {
    const row = [name, ...ranks, UNTOLD, null, null, note(['nearly all rows are alike'])];
    return { row, share: -Infinity, error: 0 };
  }
  const { lo, hi } = student.interval(found.share, found.error, n - 1);
  const row = [name, ...ranks, ...[found.share, lo!, hi!].map(inUnit), note([])];
  return { row, share: found.share, error: found.error };
}

function inUnit(share: number): number {
  return Math.max(0, Math.min(1, share));
}

/** The sum of the shares and what it leaves. */
function together(all: readonly Driver[], output: Column): readonly Cell[] {
  const told = all.filter(({ share }) => share > -Infinity);
  const sum = told.reduce((total, { share }) => total + share, 0);
  const noise = 2 * told.reduce((total, { error }) => total + error, 0);
  const zeros = unusualZeros(output);
  const notes = [
    sum > 1 + noise
      ? 'more than 1: inputs move together, and their shares overlap'
      : sum > 1 - noise
        ? 'what is left may be noise'
        : 'what is left is what inputs do jointly, or what is not among them',
    ...(zeros > 0 ? [`output: ${zerosNote(zeros)}`] : []),
  ];
  return ['together', null, null, null, Math.max(0, sum), null, null, notes.join('; ')];
}

/** The names of the other columns that equal each one in all rows. */
function equalColumns(
  columns: readonly Column[],
  names: readonly string[],
): readonly (readonly string[])[] {
  const isEqual = (a: Float64Array, b: Float64Array): boolean => a.every((x, i) => x === b[i]);
  return columns.map(({ values }, j) =>
    names.filter((_, k) => k !== j && isEqual(values, columns[k]!.values)),
  );
}

/** The output less its first value, in the unit of its largest step from there; null without any. */
function scaled(values: Float64Array): Float64Array | null {
  const [first] = values;
  let most = 0;
  for (let i = 0; i < values.length; i++) most = Math.max(most, Math.abs(values[i]! - first!));
  if (most === 0) return null;
  const out = new Float64Array(values.length);
  for (let i = 0; i < out.length; i++) out[i] = (values[i]! - first!) / most;
  return out;
}
