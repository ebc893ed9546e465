/** EXPECT: the exact mean of a quantity under a density, with proved bounds. */
import type { Range } from '../density/cells';
import { given, givenUnlessZero, isText, passErrors, quoted, singleCell } from '../density/cells';
import { Givens, readGivens } from '../density/givens';
import { DEFAULT_VARIABLE, readLimitCells } from '../density/limits';
import type { PlainShape } from '../density/shape';
import { InputError } from '../errors';
import { expectation } from '../exact/expect';
import type { PointTape } from '../exact/expectPoints';
import { pointExpectation } from '../exact/expectPoints';
import { compile, compileSmooth } from '../formula/compile';
import { parse } from '../formula/parse';
import type { GivenMap } from '../formula/given';
import { onlyShape } from './envelope';
import { prove } from './proved';

const PLACES = { density: 'density (argument 1)', limits: 'limits (argument 2)', givens: 4 };
const QUANTITY = 'quantity (argument 3)';

/**
 * The mean of a formula in the density's variable, weighted by the density.
 * Shapes: a heading row value | at least | at most, then one row. Units: those of the quantity.
 * Guarantee: the true mean lies between the two bounds; the value has 12 digits where
 * density and quantity are smooth.
 * @throws {InputError} as DRAW does, and when the quantity cannot be read, is undefined or
 * has no bound where the density is above 0.
 * @throws {CellErrorPassed} when a cell holds an error value.
 */
export function expect(
  density: Range | null,
  limits: Range | null,
  quantity: Range | null,
  givens: readonly Range[],
): Range {
  const shape = onlyShape(density, limits, givens, PLACES);
  const measured = readQuantity(given(quantity), shape, limits, givens);
  const proved = prove(shape);
  const { value, atLeast, atMost } =
    proved.kind === 'points'
      ? pointExpectation(proved.shares, proved.smooth, measured, QUANTITY)
      : expectation(proved.envelope, proved.tape, measured.tape, QUANTITY);
  return [
    ['value', 'at least', 'at most'],
    [value, atLeast, atMost],
  ];
}

function readQuantity(
  range: Range | null,
  shape: PlainShape,
  limits: Range | null,
  givens: readonly Range[],
): PointTape {
  const expected = 'give a formula as text, such as x or MAX(0,x-60)';
  if (range === null) throw new InputError(QUANTITY, 'it is missing', expected);
  passErrors(range);
  const cell = singleCell(range, QUANTITY);
  if (!isText(cell) && typeof cell !== 'number')
    throw new InputError(QUANTITY, `${quoted(cell)} is not a formula`, expected);
  const text = String(cell);
  const source = { text, where: 'Quantity', tree: parse(text, 'Quantity') };
  const { variable, named } = namesOf(shape, givenUnlessZero(limits), givens);
  const tape = compile([source], [variable], named);
  const smooth = shape.lattice?.isWhole ? compileSmooth([source], [variable], named) : tape;
  return { tape, smooth };
}

/** The names that a quantity may use. */
function namesOf(
  shape: PlainShape,
  limits: Range | null,
  givens: readonly Range[],
): { variable: string; named: GivenMap } {
  if (shape.kind === 'formula') return { variable: shape.variable, named: shape.givens };
  const [own] = limits ? readLimitCells(limits, PLACES.limits) : [];
  const variable = own?.variable ?? DEFAULT_VARIABLE;
  const named = new Givens([variable]);
  for (const value of readGivens(givens, PLACES.givens).values) named.add(value);
  return { variable, named: named.map };
}
