/**
 * A formula whose outermost operation is + taken apart into its terms, each a formula
 * of its own with its text. Not handled: sums within brackets, SUM.
 */
import type { Source } from './compile';
import { parse } from './parse';
import { splitText } from './split';

/** The terms of a sum in order; none when the formula is something else. */
export function termsOf({ tree, text, where }: Source): readonly Source[] {
  const isSum =
    tree.kind === 'operator' &&
    tree.args.length === 2 &&
    (tree.operator === '+' || tree.operator === '-');
  if (!isSum) return [];
  const texts = splitText(text, ({ value, isAfterOperand }) => value === '+' && isAfterOperand);
  if (texts.length < 2) return [];
  return texts.map((each) => ({ text: each, where, tree: parse(each, where) }));
}
