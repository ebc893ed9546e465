/**
 * A list among the givens: one column, a heading and numbers below it. In a formula
 * its name is an array of one column.
 * A blank below the heading counts as 0, as everywhere: some hosts hand it over as 0.
 */
import { InputError } from '../errors';
import type { List } from '../formula/given';
import type { Range } from './cells';
import { isText, numberIn, quoted } from './cells';
import { digest } from './digest';

const MAX_VALUES = 20_000;

/** @throws {InputError} without a heading, without values, with too many, or with one that is not a number. */
export function readList(range: Range, where: string): { name: string; list: List } {
  const heading = range[0]![0]!;
  if (!isText(heading)) {
    throw new InputError(
      where,
      `a column that begins with ${quoted(heading)}`,
      "write the list's name above its values",
    );
  }
  const name = heading.trim();
  const n = range.length - 1;
  const at = `${where}, "${name}"`;
  if (n === 0) throw new InputError(at, 'a list without values', 'give numbers below the heading');
  if (n > MAX_VALUES)
    throw new InputError(at, `a list of ${n} values`, `give at most ${MAX_VALUES}`);
  const values = range.slice(1).map((row, i) => numberIn(row[0]!, `${at}, row ${i + 2}`));
  return { name, list: { kind: 'list', values, fingerprint: digest(values) } };
}
