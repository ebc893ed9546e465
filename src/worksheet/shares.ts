/** BELOW, ABOVE and QUANTILE: exact shares of a density's area, and the points at given shares. */
import type { Cell, Range } from '../density/cells';
import { given, numberIn, passErrors, quoted, singleCell, word } from '../density/cells';
import { InputError } from '../errors';
import type { Side } from '../exact/shares';
import { isTooFaint } from '../exact/side';
import { onlyShape } from './envelope';
import type { Proved } from './proved';
import { prove } from './proved';

const DENSITY = 'density (argument 1)';
const LIMITS = 'limits (argument 2)';
const X = 'x (argument 3)';
const SHARE = 'share (argument 3)';
const SIDE = 'side (argument 4)';

/**
 * The share of the area below each x.
 * Shapes: as `x`. Units: x as in the density; shares as fractions of 1.
 * Guarantee: 12 digits where the density is smooth, small shares too; 1 − ABOVE.
 * @throws {InputError} @throws {CellErrorPassed} as DRAW does, for an x that is not a number, and for
 * one so far out under a power that the density is too small for a double.
 */
export function below(
  density: Range | null,
  limits: Range | null,
  x: Range | null,
  givens: readonly Range[],
): Range {
  return sharesAt(density, limits, x, givens, 'below');
}

/** The share of the area above each x: as `below`, with all digits of small shares. */
export function above(
  density: Range | null,
  limits: Range | null,
  x: Range | null,
  givens: readonly Range[],
): Range {
  return sharesAt(density, limits, x, givens, 'above');
}

function sharesAt(
  density: Range | null,
  limits: Range | null,
  x: Range | null,
  givens: readonly Range[],
  side: Side,
): Range {
  const shape = onlyShape(density, limits, givens, { density: DENSITY, limits: LIMITS, givens: 4 });
  const points = numbersIn(x, X, 'give a number or a range of numbers');
  const proved = prove(shape);
  return points.map((row, i) =>
    row.map((at, j) => {
      if (!isTold(proved, at, side)) {
        throw new InputError(
          placeOf(points, X, i, j),
          `the density at ${at} is too small for a number, and the share beyond it with it`,
          'give an x nearer to the middle',
        );
      }
      return proved.shares[side](at);
    }),
  );
}

/** False where the digits of the share on that side of x are lost. */
function isTold(proved: Proved, x: number, side: Side): boolean {
  return proved.kind !== 'curve' || !isTooFaint(proved.envelope, x, side === 'below' ? -1 : 1);
}

/**
 * The x with each share of the area on its side; shares 0 and 1 give the limits,
 * if these are finite.
 * Shapes: as `share`. Units: share as a fraction of 1; x as in the density.
 * Guarantee: undoes BELOW (or ABOVE) to 1e-10 of the limits' width where the density is
 * at least 1e-6 of its peak.
 * @throws {InputError} @throws {CellErrorPassed} as DRAW does, and for a share outside 0 … 1.
 */
export function quantile(
  density: Range | null,
  limits: Range | null,
  share: Range | null,
  side: Range | null,
  givens: readonly Range[],
): Range {
  const shape = onlyShape(density, limits, givens, { density: DENSITY, limits: LIMITS, givens: 5 });
  const wanted = numbersIn(share, SHARE, 'give a fraction from 0 to 1, or a range of them');
  const from = readSide(given(side));
  wanted.forEach((row, i) => {
    row.forEach((value, j) => {
      if (!(value >= 0 && value <= 1)) {
        throw new InputError(
          placeOf(wanted, SHARE, i, j),
          `${value} is not a share`,
          value > 1 && value <= 100
            ? `give a fraction from 0 to 1: ${value / 100} or ${value}%`
            : 'give a fraction from 0 to 1',
        );
      }
    });
  });
  const proved = prove(shape);
  return wanted.map((row, i) =>
    row.map((value, j) => {
      const x = proved.shares.quantile(value, from);
      const beyond: Side = value <= 0.5 ? from : from === 'below' ? 'above' : 'below';
      if (x - x === 0 && !isTold(proved, x, beyond)) {
        throw new InputError(
          placeOf(wanted, SHARE, i, j),
          `the density at the x of share ${value} is too small for a number, and x cannot be told`,
          'give a share further from 0 and 1',
        );
      }
      if (x - x === 0) return x;
      throw new InputError(
        placeOf(wanted, SHARE, i, j),
        `the x of share ${value} lies beyond all numbers`,
        'give a share further from 0 and 1, or finite limits',
      );
    }),
  );
}

function readSide(range: Range | null): Side {
  if (range === null) return 'below';
  passErrors(range);
  const cell = singleCell(range, SIDE);
  const side = word(cell);
  if (side === 'below' || side === 'above') return side;
  // A blank cell arrives as 0 on some hosts.
  if (cell === 0) return 'below';
  throw new InputError(SIDE, `${quoted(cell)} is not a side`, 'write below or above');
}

/** The numbers of a range of any shape. */
function numbersIn(range: Range | null, where: string, expected: string): number[][] {
  if (range === null || range.length === 0) throw new InputError(where, 'it is missing', expected);
  passErrors(range);
  return range.map((row, i) =>
    row.map((cell: Cell, j) => numberIn(cell, placeOf(range, where, i, j))),
  );
}

/** A cell of a range in messages: `x (argument 3), row 2, column 1`, or the argument alone if it is one cell. */
function placeOf(
  range: readonly (readonly unknown[])[],
  where: string,
  row: number,
  column: number,
): string {
  if (range.length === 1 && range[0]!.length === 1) return where;
  return range[0]!.length === 1
    ? `${where}, row ${row + 1}`
    : `${where}, row ${row + 1}, column ${column + 1}`;
}
