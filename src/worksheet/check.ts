/** CHECK: whether columns of values look like independent draws of their shapes. */
import type { Cell, Range } from '../density/cells';
import { counted } from '../density/cells';
import { readShapes } from '../density/shape';
import { InputError } from '../errors';
import type { FitLine } from '../evidence/fit';
import { comparisonsOf, fitter } from '../evidence/fit';
import { shortNumber } from '../numeric/text';
import type { Column } from './columns';
import { nameOf, numberColumns, unusualZeros, zerosNote } from './columns';
import { joined } from './lines';
import { prove } from './proved';

const VALUES = 'values (argument 1)';
const PLACES = { density: 'density (argument 2)', limits: 'limits (argument 3)', givens: 4 };
/** The chance that columns which follow their shapes show any sign against them. */
const FALSE_ALARM = 0.01;
const HEADINGS = ['exact', 'drawn', 'allowed from', 'allowed to', 'p-value'];
/** So few rows show large differences only. */
const FEW = 20;

/**
 * Exact percentiles and moments of a shape beside those of a column, then tests of the whole.
 * Shapes: a heading row, the overall line, then a row an item; for several columns the columns
 * side by side, each against its own shape or all against one. Units: those of the values.
 * Guarantee: columns of independent rows that follow their shapes show any sign against them with a
 * chance of at most 0.01.
 * @throws {InputError} as numberColumns and QUANTILE, and when columns and shapes do not match.
 * @throws {CellErrorPassed} when a cell holds an error value.
 */
export function check(
  values: Range | null,
  density: Range | null,
  limits: Range | null,
  givens: readonly Range[],
): Range {
  const { columns, nRows } = numberColumns(values, VALUES, 2);
  const { shapes, notes } = readShapes(density, limits, givens, PLACES);
  if (shapes.length !== 1 && shapes.length !== columns.length) {
    throw new InputError(
      VALUES,
      `${counted(columns.length, 'column')} for ${shapes.length} shapes`,
      'give one column for each shape, or one shape',
    );
  }
  const fitters = shapes.map((shape) => {
    const { distribution } = prove(shape);
    const level = FALSE_ALARM / (comparisonsOf(distribution) * columns.length);
    return { fit: fitter(distribution, nRows, level), level };
  });
  const parts = columns.map((column, j) => {
    const { fit, level } = fitters[shapes.length === 1 ? 0 : j]!;
    return part(column, fit(column.values), level, notes);
  });
  const heading = columns.flatMap((column, j) =>
    columns.length === 1
      ? HEADINGS
      : HEADINGS.map((words) => `${nameOf(column, j, columns.length)}, ${words}`),
  );
  return [['item', ...heading], ...joined(parts)];
}

type Row = readonly [item: string, ...cells: Cell[]];

function part(
  column: Column,
  lines: readonly FitLine[],
  level: number,
  notes: readonly string[],
): readonly Row[] {
  const { values, zerosAtEnd } = column;
  const zeros = unusualZeros(column);
  const all = [...notes, ...(zeros > 0 ? [zerosNote(zeros)] : [])];
  return [
    [
      'overall',
      overall(lines, level, values.length) + (all.length > 0 ? '; see the note' : ''),
      null,
      null,
      null,
      null,
    ],
    ['rows', null, values.length, null, null, null],
    ['zeros at the end', null, zerosAtEnd, null, null, null],
    ...lines.map(({ item, exact, drawn, from, to, pValue }): Row => {
      return [item, exact, drawn, from, to, pValue];
    }),
    ['note', all.length === 0 ? 'none' : all.join('; '), null, null, null, null],
  ];
}

/** Three digits say enough of a p-value. */
const inShort = (pValue: number): string => shortNumber(Number(pValue.toPrecision(3)));

function overall(lines: readonly FitLine[], level: number, nRows: number): string {
  const compared = lines.filter(({ pValue }) => pValue !== null);
  const signs = compared.filter(({ pValue }) => pValue! < level);
  const few = nRows < FEW ? `; ${nRows} rows show large differences only` : '';
  if (signs.length > 0) {
    const items = signs.map(({ item }) => item).join(', ');
    return `signs against the shape in ${signs.length} of ${compared.length} comparisons: ${items}; at most 1 in 100 columns that follow their shape shows any${few}`;
  }
  const least = compared.reduce((a, b) => (b.pValue! < a.pValue! ? b : a));
  return `no sign against the shape in ${compared.length} comparisons: the least p-value is ${inShort(least.pValue!)} (${least.item}), below ${inShort(level)} it would be a sign${few}`;
}
