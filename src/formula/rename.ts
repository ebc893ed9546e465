/**
 * Names in a formula's text: which there are, and other ones in their places, everything
 * else as it stands. For putting formulas together that use one name for different
 * things. Names bound by LET and LAMBDA are renamed along, which changes no meaning.
 */
import { tokenize } from '@borgar/fx';
import { nameKey } from './names';

const NAMES = new Set(['range_named', 'range', 'func', 'unknown']);

/** Every name in the text, functions too, as nameKey writes it. */
export function namesIn(text: string): readonly string[] {
  return tokenize(text).flatMap(({ type, value }) => (NAMES.has(type) ? [nameKey(value)] : []));
}

/** The text with every name found in `names` (by nameKey) replaced. */
export function renamed(text: string, names: ReadonlyMap<string, string>): string {
  if (names.size === 0) return text;
  return tokenize(text)
    .map(({ type, value }) => (NAMES.has(type) && names.get(nameKey(value))) || value)
    .join('');
}
