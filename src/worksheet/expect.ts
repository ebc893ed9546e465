/** EXPECT: the exact mean of a quantity under a density, with proved bounds. */
import type { Range } from '../density/cells';
import { expectation } from '../exact/expect';
import { pointExpectation } from '../exact/expectPoints';
import { onlyShape } from './envelope';
import { prove } from './proved';
import { readQuantity } from './quantity';

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
  const measured = readQuantity(quantity, shape, limits, givens, {
    ...PLACES,
    quantity: QUANTITY,
    name: 'Quantity',
  });
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
