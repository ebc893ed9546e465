/**
 * A shape list: a heading row with `label` and `density` and any of a block's other
 * words and names of givens, then one input a line. Each line reads as a shape block.
 * A blank counts as 0, as everywhere; a line without `from` and `to` has no limits of
 * its own.
 */
import { InputError } from '../errors';
import type { Block, BlockWord } from './block';
import { isListHeading, WORDS } from './block';
import type { Cell, Range } from './cells';
import { isBlankOrZero, isText, quoted, word } from './cells';

/** One input of a list. */
export interface ListLine {
  readonly block: Block;
  /** Its place in messages: `density (argument 1), line 7 "presses"`. */
  readonly where: string;
}

/** True for a range whose first row names label and density side by side. */
export function isShapeList(range: Range): boolean {
  return isListHeading(range[0]!);
}

interface Column {
  readonly name: string;
  readonly word: BlockWord | undefined;
}

/** @throws {InputError} for headings that stand twice or are no texts, and without any line. */
export function readShapeList(range: Range, where: string): readonly ListLine[] {
  const columns = readHeadings(range[0]!, where);
  const lines = range.slice(1).flatMap((row, i) => {
    if (row.every(isBlankOrZero)) return [];
    return [readLine(row, columns, `${where}, line ${i + 1}`)];
  });
  if (lines.length === 0) {
    throw new InputError(
      where,
      'a list without lines',
      'give one line or more below label and density',
    );
  }
  return lines;
}

function readHeadings(row: readonly Cell[], where: string): readonly (Column | null)[] {
  const seen = new Set<string>();
  return row.map((cell, j) => {
    if (isBlankOrZero(cell)) return null;
    const place = `${where}, column ${j + 1}`;
    if (!isText(cell)) {
      throw new InputError(
        place,
        `${quoted(cell)} is not a heading`,
        'give a word such as density or from, or the name of a given',
      );
    }
    const known = WORDS.find((w) => w === word(cell));
    if (known !== undefined && seen.has(known))
      throw new InputError(place, `"${known}" stands twice`, 'keep one of the two');
    seen.add(word(cell));
    return { name: cell, word: known };
  });
}

function readLine(
  row: readonly Cell[],
  columns: readonly (Column | null)[],
  place: string,
): ListLine {
  const words = new Map<BlockWord, Cell>();
  const givens: { name: string; value: Cell }[] = [];
  columns.forEach((column, j) => {
    if (column === null) return;
    const cell = row[j]!;
    if (column.word === undefined) givens.push({ name: column.name, value: cell });
    else if (isEnd(column.word) || !isBlankOrZero(cell)) words.set(column.word, cell);
  });
  const label = words.get('label') ?? null;
  const where = label === null ? place : `${place} ${quoted(label)}`;
  const hasLimits = [...words].some(([name, cell]) => isEnd(name) && !isBlankOrZero(cell));
  // With one end's column alone the other is missing, even where the one says 0.
  if (!hasLimits && words.has('from') && words.has('to')) {
    words.delete('from');
    words.delete('to');
  }
  return { block: { words, givens }, where };
}

/** An end of the limits may be 0, so a blank is one too unless both are. */
function isEnd(name: BlockWord): boolean {
  return name === 'from' || name === 'to';
}

/** Names the line of a list in a complaint that does not name it yet. */
export function inLine<T>(line: string | undefined, work: () => T): T {
  try {
    return work();
  } catch (error) {
    if (line !== undefined && error instanceof InputError && !error.where.startsWith(line))
      throw error.within(line);
    throw error;
  }
}
