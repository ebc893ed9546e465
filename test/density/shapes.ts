/** Shapes read from cells, for tests. */
import type { Cell, Range } from '../../src/density/cells';
import type { FormulaShape, TableShape } from '../../src/density/kinds';
import type { Shapes } from '../../src/density/shape';
import { readShapes } from '../../src/density/shape';

const PLACES = { density: 'density (argument 1)', limits: 'limits (argument 2)', givens: 3 };

export function read(
  density: Range | null,
  limits: Range | null = null,
  ...givens: readonly Range[]
): Shapes {
  return readShapes(density, limits, givens, PLACES);
}

export function formula(...args: Parameters<typeof read>): FormulaShape {
  const shape = read(...args).shapes[0]!;
  if (shape.kind !== 'formula') throw new Error('a formula was expected');
  return shape;
}

export function table(...args: Parameters<typeof read>): TableShape {
  const shape = read(...args).shapes[0]!;
  if (shape.kind !== 'table') throw new Error('a table was expected');
  return shape;
}

/** The names and constants of a formula's givens. */
export function givensOf(...args: Parameters<typeof read>): Record<string, unknown> {
  return Object.fromEntries(formula(...args).givens);
}

/** Every cell that a blank may arrive as, put in the place of null. */
export function blanksAs(range: Range, blank: Cell): Range {
  return range.map((row) => row.map((cell) => (cell === null ? blank : cell)));
}

/** What a blank cell may arrive as on one host or another. */
export const BLANKS: readonly Cell[] = [null, '', ' ', 0, -0];

/** Freezes a range deeply, so that whoever writes into it fails. */
export function frozen(range: Range): Range {
  return Object.freeze(range.map((row) => Object.freeze([...row])));
}
