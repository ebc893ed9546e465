/**
 * The givens: what the names in a formula stand for. Each range is told by its
 * content: constants (name | value), a function table (a heading row, then numbers in
 * the first column) or a list (one column, a heading and numbers). Names live in a Map,
 * so `constructor` is a name like any other.
 */
import { InputError } from '../errors';
import { nameKey } from '../formula/names';
import type { Given, List, PointFunction } from '../formula/given';
import { VOCABULARY } from '../formula/vocabulary';
import type { Cell, Range } from './cells';
import { isBlankOrZero, isText, numberIn, passErrors, quoted, word } from './cells';
import { isFunctionTable, readFunctions } from './functiontable';
import { readList } from './list';

/** The reserved name by which an older method of drawing is asked for. */
const METHOD = 'method';
/** The method number of this version: 0 while the project is young. */
export const CURRENT_METHOD = 0;

/** A name with what stands beside or below it. */
export interface NamedValue {
  readonly name: string;
  readonly value: Cell | List | PointFunction;
  /** The place of the range or line it comes from, for messages. */
  readonly where: string;
}

/** Givens by name, as written; compared without case and `$`. */
export class Givens {
  readonly map = new Map<string, Given>();
  private readonly keys = new Map<string, string>();

  constructor(private readonly variables: readonly string[]) {}

  /** Adds a constant, a list or a function. @throws {InputError} when the name is taken or the value is not a number. */
  add({ name: cell, value, where }: NamedValue): void {
    const name = cell.trim();
    const at = `${where}, ${quoted(name)}`;
    const isNamed = typeof value === 'object' && value !== null && 'kind' in value;
    if (word(name) === METHOD) {
      if (isNamed)
        throw new InputError(at, 'the name stands for the method of drawing', 'rename the given');
      checkMethod(value, at);
      return;
    }
    this.claim(name, at);
    this.map.set(name, isNamed ? value : numberIn(value, at));
  }

  /** As `add`, but in place of a constant of that name if there is one. */
  replace(named: NamedValue): void {
    const name = named.name.trim();
    const written = this.keys.get(nameKey(name));
    if (written === undefined) return this.add(named);
    const at = `${named.where}, ${quoted(name)}`;
    const old = this.map.get(written)!;
    const { value } = named;
    if (typeof old !== 'number' || (typeof value === 'object' && value !== null)) {
      throw new InputError(
        at,
        'it is the name of a list or a function',
        'give other values to constants only',
      );
    }
    this.map.set(written, numberIn(value, at));
  }

  private claim(name: string, at: string): void {
    const key = nameKey(name);
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
      const found =
        other === name ? 'it is given twice' : `it is the same name as ${quoted(other)}`;
      throw new InputError(at, found, 'keep one of the two');
    }
    this.keys.set(key, name);
  }

  /** A given by its name in any case. */
  find(name: string): Given | undefined {
    const written = this.keys.get(nameKey(name.trim()));
    return written === undefined ? undefined : this.map.get(written);
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

/** What ranges of givens hold, and what was left out of them. */
export interface GivenRanges {
  readonly values: readonly NamedValue[];
  readonly notes: readonly string[];
}

/**
 * Reads every range of givens. `firstArgument` is the place of the first among the
 * function's arguments, for messages.
 * @throws {InputError} for a range of none of the three kinds, and as its kind's reading does.
 */
export function readGivens(ranges: readonly Range[], firstArgument: number): GivenRanges {
  const values: NamedValue[] = [];
  const notes: string[] = [];
  ranges.forEach((range, i) => {
    passErrors(range);
    const where = `givens (argument ${firstArgument + i})`;
    if (range.every((row) => row.every(isBlankOrZero))) return;
    if (range[0]!.length === 1) {
      const { name, list } = readList(range, where);
      values.push({ name, value: list, where });
    } else if (isFunctionTable(range)) {
      const table = readFunctions(range, where);
      values.push(...table.functions.map(({ name, given }) => ({ name, value: given, where })));
      notes.push(...table.notes);
    } else for (const constant of readConstants(range, where)) values.push(constant);
  });
  return { values, notes };
}

const KINDS =
  'give two columns name and value, a table with headings (x, then a named column of heights), or one column with a heading';

function readConstants(range: Range, where: string): readonly NamedValue[] {
  const named = range.filter((row) => !row.every(isBlankOrZero));
  return named.flatMap((row, i) => {
    if (row.length !== 2) throw new InputError(where, `${row.length} columns`, KINDS);
    const [name, value] = [row[0]!, row[1]!];
    if (isBlankOrZero(name)) return [];
    if (!isText(name))
      throw new InputError(`${where}, row ${i + 1}`, `${quoted(name)} is not a name`, KINDS);
    const isHeading = i === 0 && isText(value);
    return isHeading ? [] : [{ name, value, where }];
  });
}
