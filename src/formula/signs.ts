/**
 * Slips in the operators of a formula that show without parsing it: two in a row, none
 * before or after, operators of other languages. Each gets a message of its own; the
 * parser would only say that it cannot go on.
 * Not handled: anything inside quotes or square brackets.
 */
import { InputError } from '../errors';

/** Prefix signs nest like brackets. */
const MAX_PREFIXES = 64;

const INFIX = new Set('*/^&=<>');
const SIGN = new Set('+-');
const TOGETHER = new Set(['<=', '>=', '<>']);
const FOREIGN = new Map([
  ['**', '^'],
  ['==', '='],
  ['=>', '>='],
  ['=<', '<='],
  ['><', '<>'],
  ['!=', '<>'],
  ['&&', 'AND(…, …)'],
  ['||', 'OR(…, …)'],
]);

/** One character that is not white space, and where it stands. */
interface Mark {
  readonly c: string;
  readonly i: number;
}

/**
 * `text` has quoted parts and square brackets replaced by letters, every character at its place.
 * @throws {InputError} naming the place.
 */
export function checkSigns(text: string, place: (at: number) => string): void {
  const start = /^\s*=?/.exec(text)![0].length;
  let before: Mark | null = null;
  let last: Mark | null = null;
  let nPrefixes = 0;
  for (let i = start; i < text.length; i++) {
    const c = text.charAt(i);
    if (/\s/.test(c)) continue;
    const mark = { c, i };
    nPrefixes = SIGN.has(c) || c === '@' ? nPrefixes + 1 : 0;
    if (nPrefixes > MAX_PREFIXES) {
      throw new InputError(place(i + 1), `${nPrefixes} signs in a row`, 'write one');
    }
    if (last !== null && isPairTogether(last, mark)) {
      before = last;
      last = { c, i };
      continue;
    }
    checkPair(before, last, mark, place);
    before = last;
    last = mark;
  }
  if (last !== null && (INFIX.has(last.c) || SIGN.has(last.c))) {
    throw new InputError(
      place(last.i + 1),
      `the formula ends with "${last.c}"`,
      'write what follows it, or remove it',
    );
  }
}

function isPairTogether(last: Mark, { c, i }: Mark): boolean {
  return TOGETHER.has(last.c + c) && i === last.i + 1;
}

function checkPair(
  before: Mark | null,
  last: Mark | null,
  { c, i }: Mark,
  place: (at: number) => string,
): void {
  const pair = last === null ? c : last.c + c;
  const at = place(i + 1);
  if (FOREIGN.has(pair) && last!.i === i - 1) {
    throw new InputError(
      place(i),
      `"${pair}" is not a worksheet operator`,
      `write ${FOREIGN.get(pair)}`,
    );
  }
  const isOperatorLast = last !== null && (INFIX.has(last.c) || SIGN.has(last.c));
  if (INFIX.has(c) || c === '%') {
    if (last === null) {
      throw new InputError(at, `the formula begins with "${c}"`, 'write what belongs before it');
    }
    if (isOperatorLast) {
      const expected = TOGETHER.has(pair)
        ? `write ${pair} without a space`
        : 'remove one, or write what belongs between them';
      throw new InputError(at, `"${last.c}" and "${c}" stand next to each other`, expected);
    }
    if ('({,;'.includes(last.c)) {
      throw new InputError(
        at,
        `nothing stands between "${last.c}" and "${c}"`,
        'write what belongs there',
      );
    }
  } else if (')},;'.includes(c)) {
    const isEmpty =
      (pair === '()' && !(before?.i === i - 2 && /[\p{L}\p{N}_.)\]]/u.test(before.c))) ||
      pair === '{}';
    if (isOperatorLast || isEmpty) {
      throw new InputError(
        at,
        `nothing stands between "${last!.c}" and "${c}"`,
        'write what belongs there',
      );
    }
  }
}
