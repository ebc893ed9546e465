/** A formula's text taken apart at its outermost operators or separators. */
import { tokenize } from '@borgar/fx';

/** A token that stands outside all brackets. */
interface OuterToken {
  readonly type: string;
  readonly value: string;
  /** True where an operator would join two operands rather than be a sign. */
  readonly isAfterOperand: boolean;
}

/** The texts between the tokens outside all brackets that `isBreak` names. */
export function splitText(text: string, isBreak: (token: OuterToken) => boolean): string[] {
  const texts = [''];
  let depth = 0;
  let isAfterOperand = false;
  for (const { type, value } of tokenize(text.trim().replace(/^=/, ''))) {
    if (depth === 0 && isBreak({ type, value, isAfterOperand })) texts.push('');
    else texts[texts.length - 1] += value;
    if (value === '(' || value === '{') depth++;
    if (value === ')' || value === '}') depth--;
    if (type !== 'whitespace') {
      isAfterOperand = type !== 'operator' || value === ')' || value === '}' || value === '%';
    }
  }
  return texts.map((each) => each.trim());
}

/** The text without brackets that hold all of it. */
export function withoutBrackets(text: string): string {
  let inner = text.trim();
  while (inner.startsWith('(') && inner.endsWith(')')) {
    let depth = 0;
    const last = inner.length - 1;
    // The first bracket must not be closed before the end.
    const isWhole = [...inner].every((character, i) => {
      if (character === '(') depth++;
      if (character === ')') depth--;
      return depth > 0 || i === last;
    });
    if (!isWhole) break;
    inner = inner.slice(1, -1).trim();
  }
  return inner;
}
