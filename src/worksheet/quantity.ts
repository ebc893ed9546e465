/** A formula of a drawn quantity, in the density's variable and its givens. */
import type { Range } from '../density/cells';
import { given, givenUnlessZero, isText, passErrors, quoted, singleCell } from '../density/cells';
import { Givens, readGivens } from '../density/givens';
import { DEFAULT_VARIABLE, readLimitCells } from '../density/limits';
import type { PlainShape } from '../density/kinds';
import { InputError } from '../errors';
import type { PointTape } from '../exact/expectPoints';
import type { Source } from '../formula/compile';
import { compile, compileSmooth } from '../formula/compile';
import type { GivenMap } from '../formula/given';
import { parse } from '../formula/parse';

/** Places of the arguments in messages, and what the formula itself is called there. */
interface QuantityPlaces {
  readonly limits: string;
  readonly givens: number;
  readonly quantity: string;
  readonly name: string;
}

/** The formula as a source. @throws {InputError} when it is missing or cannot be parsed. */
export function readSource(
  range: Range | null,
  places: Pick<QuantityPlaces, 'quantity' | 'name'>,
): Source {
  const own = given(range);
  const expected = 'give a formula as text, such as x or MAX(0,x-60)';
  if (own === null) throw new InputError(places.quantity, 'it is missing', expected);
  passErrors(own);
  const cell = singleCell(own, places.quantity);
  if (!isText(cell) && typeof cell !== 'number')
    throw new InputError(places.quantity, `${quoted(cell)} is not a formula`, expected);
  const text = String(cell);
  return { text, where: places.name, tree: parse(text, places.name) };
}

/** @throws {InputError} when it is missing or cannot be read. */
export function readQuantity(
  range: Range | null,
  shape: PlainShape,
  limits: Range | null,
  givens: readonly Range[],
  places: QuantityPlaces,
): PointTape {
  const source = readSource(range, places);
  const { variable, named } = namesOf(shape, givenUnlessZero(limits), givens, places);
  const tape = compile([source], [variable], named);
  const smooth = shape.lattice?.isWhole ? compileSmooth([source], [variable], named) : tape;
  return { tape, smooth };
}

/** The names that a quantity may use. */
function namesOf(
  shape: PlainShape,
  limits: Range | null,
  givens: readonly Range[],
  places: QuantityPlaces,
): { variable: string; named: GivenMap } {
  if (shape.kind === 'formula') return { variable: shape.variable, named: shape.givens };
  const [own] = limits ? readLimitCells(limits, places.limits) : [];
  const variable = own?.variable ?? DEFAULT_VARIABLE;
  const named = new Givens([variable]);
  for (const value of readGivens(givens, places.givens).values) named.add(value);
  return { variable, named: named.map };
}
