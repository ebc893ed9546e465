/**
 * A formula whose outermost operation is + taken apart into its terms, each a formula
 * of its own with its text. Not handled: sums within brackets, SUM.
 */
import { tokenize } from '@borgar/fx';
import type { Source } from './compile';
import { parse } from './parse';

/** The terms of a sum in order; none when the formula is something else. */
export function termsOf({ tree, text, where }: Source): readonly Source[] {
  const isSum =
    tree.kind === 'operator' &&
    tree.args.length === 2 &&
    (tree.operator === '+' || tree.operator === '-');
  if (!isSum) return [];
  const texts = [''];
  let depth = 0;
  let isAfterOperand = false;
  for (const { type, value } of tokenize(text.trim().replace(/^=/, ''))) {
    if (depth === 0 && value === '+' && isAfterOperand) texts.push('');
    else texts[texts.length - 1] += value;
    if (value === '(' || value === '{') depth++;
    if (value === ')' || value === '}') depth--;
    if (type !== 'whitespace') {
      isAfterOperand = type !== 'operator' || value === ')' || value === '}' || value === '%';
    }
  }
  if (texts.length < 2) return [];
  return texts.map((each) => ({ text: each.trim(), where, tree: parse(each, where) }));
}
