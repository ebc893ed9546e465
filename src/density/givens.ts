/**
 * The givens: constants by name, told apart from other ranges by their content
 * (every first cell is a text). Names live in a Map, so `constructor` is a name like
 * any other.
 * Not handled yet: function tables and lists.
 */
import { InputError } from '../errors';
import { nameKey } from '../formula/compile';
import { VOCABULARY } from '../formula/vocabulary';
import type { Cell, Range } from './cells';
import { isBlankOrZero, isText, numberIn, passErrors, quoted, word } from './cells';

/** The reserved name by which an older method of drawing is asked for. */
const METHOD = 'method';
/** The method number of this version: 0 while the project is young. */
export const CURRENT_METHOD = 0;

/** Constants by name, as written; compared without case and `$`. */
export class Givens {
  readonly constants = new Map<string, number>();
  private readonly keys = new Map<string, string>();

  constructor(private readonly variables: readonly string[]) {}

  /** @throws {InputError} when the name is taken or the value is not a number. */
  add(cell: string, value: Cell, where: string): void {
    const name = cell.trim();
    const at = `${where}, "${name}"`;
    const key = nameKey(name);
    if (word(name) === METHOD) {
      checkMethod(value, at);
      return;
    }
    if (this.variables.some((variable) => nameKey(variable) === key)) {
      throw new InputError(
        at,
        'it is the name of the variable',
        'rename the given, or the variable in limits',
      );
    }
    if (VOCABULARY.has(key)) {
      throw new InputError(at, 'it is the name of a formula function', 'rename the given');
    }
    const other = this.keys.get(key);
    if (other !== undefined) {
      const found = other === name ? 'it is given twice' : `it is the same name as "${other}"`;
      throw new InputError(at, found, 'keep one of the two');
    }
    this.keys.set(key, name);
    this.constants.set(name, numberIn(value, at));
  }

  /** The value of a given by its name in any case. */
  find(name: string): number | undefined {
    const written = this.keys.get(nameKey(name.trim()));
    return written === undefined ? undefined : this.constants.get(written);
  }
}

/** @throws {InputError} for a method number that this version does not have. */
export function checkMethod(value: Cell, where: string): void {
  const method = numberIn(value, where);
  if (method !== CURRENT_METHOD) {
    throw new InputError(
      where,
      `there is no method ${method}`,
      `use ${CURRENT_METHOD}, the only one so far`,
    );
  }
}

/**
 * Adds every range of givens. `firstArgument` is the place of the first among the
 * function's arguments, for messages.
 * @throws {InputError} for a range that is not two columns name | value, and as `add` does.
 */
export function readGivens(ranges: readonly Range[], givens: Givens, firstArgument: number): void {
  ranges.forEach((range, i) => {
    passErrors(range);
    readConstants(range, givens, `givens (argument ${firstArgument + i})`);
  });
}

function readConstants(range: Range, givens: Givens, where: string): void {
  const named = range.filter((row) => !row.every(isBlankOrZero));
  named.forEach((row, i) => {
    if (row.length !== 2) {
      throw new InputError(where, `${row.length} columns`, 'give two columns, name and value');
    }
    const [name, value] = [row[0]!, row[1]!];
    if (isBlankOrZero(name)) return;
    if (!isText(name)) {
      throw new InputError(
        `${where}, row ${i + 1}`,
        `${quoted(name)} is not a name`,
        'give two columns, name and value',
      );
    }
    const isHeading = i === 0 && isText(value);
    if (!isHeading) givens.add(name, value, where);
  });
}
