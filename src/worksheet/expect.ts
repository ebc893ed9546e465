/** EXPECT: the exact mean of a quantity under a density, with proved bounds. */
import type { Range } from '../density/cells';
import type { PlainShape, SeveralShape } from '../density/kinds';
import { readAnyShapes } from '../density/shape';
import { boxExpectation } from '../exact/boxexpect';
import type { Expectation } from '../exact/expect';
import { expectation } from '../exact/expect';
import { pointExpectation } from '../exact/expectPoints';
import { compile } from '../formula/compile';
import { factorsOf } from '../formula/factors';
import { onlyShape } from './envelope';
import { prove } from './proved';
import { readQuantity, readSource } from './quantity';
import { heightOf, proveSeveral } from './several';

const PLACES = { density: 'density (argument 1)', limits: 'limits (argument 2)', givens: 4 };
const QUANTITY = 'quantity (argument 3)';
const QUANTITY_PLACES = { quantity: QUANTITY, name: 'Quantity' };

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
  const [any] = readAnyShapes(density, limits, givens, PLACES).shapes;
  const { value, atLeast, atMost } =
    any?.kind === 'several'
      ? severalMean(any, quantity)
      : plainMean(onlyShape(density, limits, givens, PLACES), quantity, limits, givens);
  return [
    ['value', 'at least', 'at most'],
    [value, atLeast, atMost],
  ];
}

function plainMean(
  shape: PlainShape,
  quantity: Range | null,
  limits: Range | null,
  givens: readonly Range[],
): Expectation {
  const measured = readQuantity(quantity, shape, limits, givens, {
    ...PLACES,
    ...QUANTITY_PLACES,
  });
  const proved = prove(shape);
  return proved.kind === 'points'
    ? pointExpectation(proved.shares, proved.smooth, measured, QUANTITY)
    : expectation(proved.envelope, proved.tape, measured.tape, QUANTITY);
}

function severalMean(shape: SeveralShape, quantity: Range | null): Expectation {
  const source = readSource(quantity, QUANTITY_PLACES);
  const names = shape.axes.map(({ name }) => name);
  const measured = compile([source], names, shape.givens);
  const { others } = factorsOf(shape.sources);
  const weighted = heightOf(shape, [source, ...others]);
  return boxExpectation(proveSeveral(shape).envelope, measured, weighted, QUANTITY);
}
