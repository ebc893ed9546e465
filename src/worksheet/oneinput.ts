/**
 * One shape under one seed and one label, still open to other values: what CASES, EACH
 * and TOTAL draw from.
 */
import type { Range } from '../density/cells';
import type { Places } from '../density/kinds';
import type { Family } from '../density/shape';
import { readFamily } from '../density/shape';
import { functionNames } from '../formula/compile';
import { nameKey } from '../formula/names';
import { InputError } from '../errors';
import type { Key } from '../random/key';
import { argumentOr, keyFrom, keyPart, readLabels, readSeed } from './keys';

interface OneInput {
  readonly family: Family;
  readonly key: Key;
}

/** Places of the arguments in messages. */
interface OneInputPlaces extends Places {
  readonly seed: string;
  readonly label: string;
}

/**
 * Reads a shape with its seed and label; a block's words stand in for what is left out.
 * @throws {InputError} as DRAW does, and for several labels, columns of heights or lines of a list.
 */
export function readOneInput(
  density: Range | null,
  limits: Range | null,
  seed: Range | null,
  label: Range | null,
  givens: readonly Range[],
  places: OneInputPlaces,
): OneInput {
  const family = readFamily(density, limits, givens, places);
  if (family.lines !== null) {
    throw new InputError(
      places.density,
      `a list of ${family.lines.length} input${family.lines.length === 1 ? '' : 's'}`,
      'give one formula, table or block',
    );
  }
  if (family.headings.length > 1) {
    throw new InputError(
      places.density,
      `${family.headings.length} columns of heights`,
      'give x and one column of heights',
    );
  }
  const labels = readLabels(argumentOr(label, family, 'label', places));
  if (labels.length > 1)
    throw new InputError(places.label, `${labels.length} labels`, 'give one label');
  const own = labels[0] ?? keyPart(family.headings[0] ?? null, places.label);
  return { family, key: keyFrom(readSeed(argumentOr(seed, family, 'seed', places), places), own) };
}

/** The end of the limits that a name stands for; null for the name of a given. */
export function endNamed(name: string): 'from' | 'to' | null {
  const key = name.trim().toLowerCase();
  return key === 'from' || key === 'to' ? key : null;
}

/** The givens as written, then what else stands in formulas and limits except the functions, x and `unbounded`. */
function namesToGive(family: Family): readonly string[] {
  const givens = family.givens.map((given) => given.trim());
  const known = new Set([...givens, ...functionNames(), 'x', 'unbounded'].map(nameKey));
  return [
    ...givens,
    ...[...family.names()].filter((name) => !known.has(name)).map((name) => name.toLowerCase()),
  ];
}

/**
 * Makes sure that a name can take other values: a given, a name that the formula or the limits use,
 * or an end of the limits.
 * @throws {InputError} at `where` for any other name.
 */
export function checkName(name: string, family: Family, where: string): void {
  const key = nameKey(name.trim());
  const isKnown = family.names().has(key);
  if (endNamed(name) === null) {
    if (isKnown) return;
    const known = [...namesToGive(family), 'from', 'to'].join(', ');
    throw new InputError(
      where,
      `"${name.trim()}" is no given and no end of the limits`,
      `use one of: ${known}`,
    );
  }
  if (isKnown) {
    throw new InputError(
      where,
      `"${name.trim()}" is an end of the limits and the name of a given`,
      'rename the given',
    );
  }
}
