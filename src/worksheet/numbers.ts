/** Arguments that are numbers: one, or a row or column of them with or without a heading. */
import type { Range } from '../density/cells';
import { given, isText, lineOfCells, numberIn, passErrors, singleCell } from '../density/cells';
import { InputError } from '../errors';

export interface Line {
  readonly numbers: readonly number[];
  /** The place of the i-th number, for messages: `shares (argument 2), row 3`. */
  readonly placeOf: (i: number) => string;
}

/** @throws {InputError} for a missing argument, another shape, or text among the numbers. */
export function numberLine(range: Range | null, where: string, expected: string): Line {
  const own = given(range);
  if (own === null) throw new InputError(where, 'it is missing', expected);
  passErrors(own);
  const cells = lineOfCells(own, where);
  const first = cells.length > 1 && isText(cells[0]!) ? 1 : 0;
  const unit = own.length === 1 ? 'column' : 'row';
  const placeOf = (i: number): string =>
    cells.length === 1 ? where : `${where}, ${unit} ${i + first + 1}`;
  const numbers = new Array<number>(cells.length - first);
  for (let i = first; i < cells.length; i++) {
    const cell = cells[i]!;
    // A place is a new text: for long lines it is made only where it is needed. −0 + 0 is 0.
    numbers[i - first] = typeof cell === 'number' ? cell + 0 : numberIn(cell, placeOf(i - first));
  }
  return { numbers, placeOf };
}

/** One number; null when the argument is left out. */
export function optionalNumber(range: Range | null, where: string): number | null {
  const own = given(range);
  if (own === null) return null;
  passErrors(own);
  return numberIn(singleCell(own, where), where);
}

/** @throws {InputError} at the first number that is not above the one before it. */
export function requireRising({ numbers, placeOf }: Line, expected: string): void {
  const i = numbers.findIndex((number, k) => k > 0 && !(number > numbers[k - 1]!));
  if (i > 0) {
    throw new InputError(placeOf(i), `${numbers[i]} follows ${numbers[i - 1]}`, expected);
  }
}
