/** Formulas from cells: one text, or a column of texts whose product is meant. */
import { InputError } from '../errors';
import type { Source } from '../formula/compile';
import { parse } from '../formula/parse';
import type { Cell, Range } from './cells';
import { isBlankOrZero, isText, quoted, sizeOf, word } from './cells';

/** A single formula, or a column of them. @throws {InputError} when one is no text or cannot be parsed. */
export function readLines(range: Range, where: string): readonly Source[] {
  if (range[0]!.length !== 1) {
    if (range.some((row) => word(row[0]!) === 'density')) {
      throw new InputError(
        where,
        `a block of ${range[0]!.length} columns`,
        'give its two columns, words and values',
      );
    }
    throw new InputError(
      where,
      `${sizeOf(range)} that begin with ${quoted(range[0]![0]!)}`,
      'give a formula, a column of formulas, a table of points (x and height), or a block with a row density',
    );
  }
  const lines = range
    .map((row, i) => ({ cell: row[0]!, line: i + 1 }))
    .filter(({ cell }) => !isBlankOrZero(cell));
  const isOne = range.length === 1;
  return lines.map(({ cell, line }) =>
    readFormula(
      cell,
      isOne ? 'Formula' : `Formula, line ${line}`,
      isOne ? where : `${where}, row ${line}`,
    ),
  );
}

/** `where` names the formula in messages about its text, `place` the cell. */
export function readFormula(cell: Cell, where: string, place: string): Source {
  if (!isText(cell)) {
    throw new InputError(
      place,
      `${quoted(cell)} is not a formula`,
      'give a formula as text, such as EXP(-x)',
    );
  }
  return { text: cell, where, tree: parse(cell, where) };
}
