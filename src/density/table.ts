/**
 * A table of points: x and one or more columns of heights, straight lines between
 * points, a repeated x being a jump, nothing outside.
 */
import { InputError } from '../errors';
import type { Cell, Range } from './cells';
import { isBlankOrZero, isText, numberIn, quoted } from './cells';
import type { Limits } from './limits';
import { endCell } from './limits';

interface HeightColumn {
  /** The column's heading, empty without one. */
  readonly heading: string;
  readonly heights: readonly number[];
}

export interface PointTable {
  readonly x: readonly number[];
  readonly columns: readonly HeightColumn[];
  readonly notes: readonly string[];
}

/** True for a range that reads as a table of points: two columns or more, numbers in the first. */
export function isPointTable(range: Range): boolean {
  return range[0]!.length >= 2 && range.some((row) => typeof row[0] === 'number');
}

/**
 * Reads a table of points whose heights are those of a density.
 * @throws {InputError} as `readPoints`, and for negative heights or a column of heights that are all 0.
 */
export function readTable(range: Range, where: string): PointTable {
  // A blank may arrive as 0, so only a text above x tells a heading row from a point.
  const table = readPoints(range, where, isText(range[0]![0]!), height);
  for (const [j, { heights }] of table.columns.entries())
    checkSomeArea(table.x, heights, `${where}, column ${j + 2}`);
  return table;
}

/**
 * Reads x and columns of heights, each height by `readHeight`, below a heading row if there is one.
 * @throws {InputError} naming the row, for text among the numbers, x that falls or fewer than two points.
 */
export function readPoints(
  range: Range,
  where: string,
  hasHeading: boolean,
  readHeight: (cell: Cell, where: string) => number,
): PointTable {
  const firstRow = hasHeading ? 1 : 0;
  const headings = hasHeading ? range[0]!.map(headingIn) : range[0]!.map(() => '');
  const { rows, dropped } = withoutTrailingBlanks(range.slice(firstRow));
  const place = (i: number): string => `${where}, row ${i + firstRow + 1}`;
  if (rows.length < 2) {
    throw new InputError(
      where,
      `a table of ${rows.length} point${rows.length === 1 ? '' : 's'}`,
      'give two points or more, x and height',
    );
  }
  const x = rows.map((row, i) => numberIn(row[0]!, `${place(i)}, x`));
  const falls = x.findIndex((value, i) => i > 0 && value < x[i - 1]!);
  if (falls > 0) {
    throw new InputError(
      place(falls),
      `x falls from ${x[falls - 1]} to ${x[falls]}`,
      'order the points so that x never falls',
    );
  }
  const columns = headings.slice(1).map((heading, j) => ({
    heading,
    heights: rows.map((row, i) => readHeight(row[j + 1]!, `${place(i)}, column ${j + 2}`)),
  }));
  const notes =
    dropped > 0
      ? [
          `${dropped} blank or (0, 0) row${dropped === 1 ? '' : 's'} at the end of the table left out`,
        ]
      : [];
  return { x, columns, notes };
}

/** A year may head a column too. */
function headingIn(cell: Cell): string {
  if (typeof cell === 'number' && cell !== 0) return String(cell);
  return isText(cell) ? cell.trim() : '';
}

/** Blank rows at the end arrive as zeros, which would make x fall or repeat. */
function withoutTrailingBlanks(rows: Range): { rows: Range; dropped: number } {
  let n = rows.length;
  const isNothing = (row: readonly Cell[]): boolean => row.every(isBlankOrZero);
  while (n > 1 && isNothing(rows[n - 1]!) && numberOr0(rows[n - 2]![0]!) >= 0) n--;
  return { rows: rows.slice(0, n), dropped: rows.length - n };
}

function numberOr0(cell: Cell): number {
  return typeof cell === 'number' ? cell : 0;
}

function height(cell: Cell, where: string): number {
  const value = numberIn(cell, where);
  if (value >= 0) return value;
  throw new InputError(
    where,
    `the height ${quoted(cell)} is negative`,
    'give heights of 0 or more',
  );
}

function checkSomeArea(x: readonly number[], heights: readonly number[], where: string): void {
  const hasArea = x.some((to, i) => i > 0 && to > x[i - 1]! && heights[i - 1]! + heights[i]! > 0);
  if (!hasArea)
    throw new InputError(
      where,
      'there is no area under the points',
      'give some height above 0 over a stretch of x',
    );
}

/** One density of straight lines: the part of a column of heights that lies within the limits. */
export interface Polyline {
  readonly x: readonly number[];
  readonly heights: readonly number[];
}

/**
 * Cuts a column to the limits.
 * @throws {InputError} when nothing of the table's area lies within them.
 */
export function truncate(
  x: readonly number[],
  heights: readonly number[],
  limits: Limits,
  where: string,
): Polyline {
  const points: { x: number; height: number }[] = [];
  for (let i = 1; i < x.length; i++) {
    const [a, b] = [x[i - 1]!, x[i]!];
    const from = Math.max(a, limits.from);
    const to = Math.min(b, limits.to);
    if (!(from < to)) continue;
    const at = (p: number): number =>
      p === a
        ? heights[i - 1]!
        : p === b
          ? heights[i]!
          : heights[i - 1]! + (heights[i]! - heights[i - 1]!) * ((p - a) / (b - a));
    points.push({ x: from, height: at(from) }, { x: to, height: at(to) });
  }
  const cut = { x: points.map((p) => p.x), heights: points.map((p) => p.height) };
  if (!cut.heights.some((h) => h > 0)) {
    throw new InputError(
      where,
      `the table has no area between ${quoted(endCell(limits.from))} and ${quoted(endCell(limits.to))}`,
      `give limits that meet its points, which go from ${x[0]} to ${x.at(-1)}`,
    );
  }
  return cut;
}
