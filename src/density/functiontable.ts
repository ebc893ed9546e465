/**
 * A function table among the givens: a heading row, then x in the first column; every
 * further column is a function of its heading's name, straight between the points,
 * jumping where x repeats, 0 outside. Heights may have any sign.
 */
import { InputError } from '../errors';
import type { PointFunction } from '../formula/given';
import { pointFunction } from '../formula/operations/points';
import type { Cell, Range } from './cells';
import { isBlankOrZero, isText, numberIn } from './cells';
import { digest } from './digest';
import { readPoints } from './table';

/** Beyond this the slope of a line could not be told in doubles. */
const MAX_SIZE = 1e150;

interface FunctionTable {
  readonly functions: readonly { readonly name: string; readonly given: PointFunction }[];
  readonly notes: readonly string[];
}

/** True for a heading row of texts above numbers in the first column. */
export function isFunctionTable(range: Range): boolean {
  const [heading, ...rows] = range;
  if (!heading!.some(isText) || !heading!.every((cell) => isBlankOrZero(cell) || isText(cell)))
    return false;
  const firsts = rows.filter((row) => !row.every(isBlankOrZero)).map((row) => row[0]!);
  // A blank arrives as 0: a blank name among constants must not look like a number.
  const isNumber = (cell: Cell): boolean => typeof cell === 'number';
  return firsts.some((cell) => isNumber(cell) && cell !== 0)
    ? isNumber(firsts[0]!)
    : firsts.length > 0 && firsts.every(isNumber);
}

/** @throws {InputError} naming the row, for a column without a heading, text among the numbers, x that falls, or points at one x only. */
export function readFunctions(range: Range, where: string): FunctionTable {
  const { x, columns, notes } = readPoints(range, where, true, height);
  const far = x.findIndex((value) => Math.abs(value) > MAX_SIZE);
  if (far >= 0) throw tooFar(x[far]!, `${where}, row ${far + 2}, x`);
  if (x[0] === x.at(-1)) {
    throw new InputError(
      where,
      `all points stand at x = ${x[0]}`,
      'give points with two different x or more',
    );
  }
  const functions = columns.map(({ heading, heights }, j) => {
    if (heading === '') {
      throw new InputError(
        `${where}, column ${j + 2}`,
        'it has no heading',
        "write the function's name above its heights",
      );
    }
    const given: PointFunction = {
      kind: 'function',
      operation: pointFunction(heading, x, heights),
      nPoints: x.length,
      fingerprint: digest(x, heights),
    };
    return { name: heading, given };
  });
  return { functions, notes };
}

function height(cell: Cell, where: string): number {
  const value = numberIn(cell, where);
  if (Math.abs(value) <= MAX_SIZE) return value;
  throw tooFar(value, where);
}

function tooFar(value: number, where: string): InputError {
  return new InputError(
    where,
    `${value} is too large`,
    `give numbers between -${MAX_SIZE} and ${MAX_SIZE}`,
  );
}
