/**
 * A shape block: two columns of labelled cells with a row `density`; any of the words
 * below say the rest, every other row is a given.
 */
import { InputError } from '../errors';
import type { Cell, Range } from './cells';
import { isBlankOrZero, isText, quoted, word } from './cells';

export const WORDS = ['density', 'from', 'to', 'step', 'rows', 'seed', 'label', 'method'] as const;
export type BlockWord = (typeof WORDS)[number];

export interface Block {
  /** The cells behind the block's words. */
  readonly words: ReadonlyMap<BlockWord, Cell>;
  /** The other rows, in order. */
  readonly givens: readonly { readonly name: string; readonly value: Cell }[];
}

/** True for a range of two columns with a cell `density` in the first. */
export function isBlock(range: Range): boolean {
  return (
    range[0]!.length === 2 &&
    range.some((row) => word(row[0]!) === 'density') &&
    !isListHeading(range[0]!)
  );
}

/** True for the heading row of a shape list, which names label and density side by side. */
export function isListHeading(row: readonly Cell[]): boolean {
  const words = row.map(word);
  return words.includes('label') && words.includes('density');
}

/** @throws {InputError} when a word stands twice or a name is not a text. */
export function readBlock(range: Range, where: string): Block {
  const words = new Map<BlockWord, Cell>();
  const givens: { name: string; value: Cell }[] = [];
  range.forEach(([name, value], i) => {
    if (isBlankOrZero(name!)) return;
    const place = `${where}, row ${i + 1}`;
    if (!isText(name!))
      throw new InputError(
        place,
        `${quoted(name!)} is not a name`,
        'give a word such as density or from, or the name of a given',
      );
    const known = WORDS.find((w) => w === word(name));
    if (known === undefined) givens.push({ name, value: value! });
    else if (words.has(known))
      throw new InputError(place, `"${known}" stands twice`, 'keep one of the two');
    else words.set(known, value!);
  });
  return { words, givens };
}
