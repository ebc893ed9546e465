/**
 * Seeds and labels in arguments, and the keys that they come to. What a block says
 * stands in for an argument that is left out.
 */
import type { Block } from '../density/block';
import type { Cell, Range } from '../density/cells';
import { givenUnlessZero, lineOfCells, passErrors, quoted, singleCell } from '../density/cells';
import { InputError } from '../errors';
import type { Key, KeyPart } from '../random/key';
import { keyOf } from '../random/key';
import type { Placed } from './rows';

/** The argument, else the block's word. */
export function argumentOr<W extends 'rows' | 'seed' | 'label'>(
  argument: Range | null,
  { block }: { readonly block: Block | null },
  name: W,
  places: Readonly<Record<'density' | W, string>>,
): Placed<Range> | null {
  const own = givenUnlessZero(argument);
  if (own !== null) {
    passErrors(own);
    return { range: own, where: places[name] };
  }
  const cell = block?.words.get(name);
  return cell === undefined ? null : { range: [[cell]], where: `${places.density}, ${name}` };
}

/** What a cell says of a seed or label, and where it stands. */
export interface Part {
  readonly value: KeyPart;
  readonly where: string;
}

export function readSeed(cells: Placed<Range> | null, places: { readonly seed: string }): Part {
  const { range, where } = cells ?? { range: [[null]], where: places.seed };
  return keyPart(singleCell(range, where), where);
}

/** The key of an input. @throws {InputError} at the seed or the label that is blank. */
export function keyFrom(seed: Part, label: Part): Key {
  return placed(label.where, 'label', () =>
    placed(seed.where, 'seed', () => keyOf(seed.value, label.value)),
  );
}

/**
 * The key of a function that takes one seed and one label and no shape.
 * @throws {InputError} when one of the two is blank.
 */
export function readKey(
  seed: Range | null,
  label: Range | null,
  places: { readonly seed: string; readonly label: string },
): Key {
  return keyFrom(onlyPart(seed, places.seed), onlyPart(label, places.label));
}

function onlyPart(range: Range | null, where: string): Part {
  const own = givenUnlessZero(range) ?? [[null]];
  passErrors(own);
  return keyPart(singleCell(own, where), where);
}

/** A seed or label as answers show it. */
export function textOf({ value }: Part): string {
  return String(value).trim();
}

export function keyPart(cell: Cell, where: string): Part {
  if (cell !== null && typeof cell === 'object')
    throw new InputError(where, quoted(cell), 'give a text or a number');
  return { value: cell ?? '', where };
}

/** Every label of a row or a column; none when there is no argument. */
export function readLabels(cells: Placed<Range> | null): readonly Part[] {
  if (cells === null) return [];
  const { range, where } = cells;
  const line = lineOfCells(range, where);
  return line.map((cell, i) =>
    keyPart(cell, line.length === 1 ? where : `${where}, cell ${i + 1}`),
  );
}

/** Names the argument in a complaint about the seed or the label. */
function placed<T>(where: string, what: string, read: () => T): T {
  try {
    return read();
  } catch (error) {
    if (error instanceof InputError && error.where === what) {
      const found = /^"\s*" counts/.test(error.found) ? 'it is blank' : error.found;
      throw new InputError(where, found, error.expected);
    }
    throw error;
  }
}
