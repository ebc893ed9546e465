/**
 * What can be seen wrong in a formula's characters before it is parsed: length,
 * bracket depth, brackets left open, separators, decimal commas, characters that
 * look like operators but are none or cannot be seen. Checked first so that the
 * parser never recurses deeply and each slip gets its own message.
 * Not handled: operators in a row (signs.ts), what needs the grammar (parse.ts, compile.ts).
 */
import { InputError } from '../errors';
import { checkSigns } from './signs';

export const MAX_CHARACTERS = 8192;
const MAX_DEPTH = 64;

const LOOKALIKES = new Map([
  ['≤', '<='],
  ['≥', '>='],
  ['≠', '<>'],
  ['−', '-'],
  ['–', '-'],
  ['—', '-'],
  ['‑', '-'],
  ['×', '*'],
  ['·', '*'],
  ['∗', '*'],
  ['÷', '/'],
  ['∕', '/'],
  ['“', '"'],
  ['”', '"'],
  ['‘', "'"],
  ['’', "'"],
  // The wide forms of East Asian keyboards.
  ['＋', '+'],
  ['－', '-'],
  ['＊', '*'],
  ['／', '/'],
  ['＾', '^'],
  ['％', '%'],
  ['＝', '='],
  ['＜', '<'],
  ['＞', '>'],
  ['（', '('],
  ['）', ')'],
  ['，', ','],
  ['；', ';'],
]);

/** Control and format characters, such as spaces of no width: pasted without being seen. */
const INVISIBLE = /[\p{Cc}\p{Cf}\u2028\u2029]/u;
const WHITE = new Set('\t\n\r');

/** As much of a long text as a message should quote. */
export function cited(text: string): string {
  return text.length <= 40 ? text : `${text.slice(0, 40)}…`;
}

/** A place in a formula, for messages: `Formula, character 7`. */
export function place(where: string, at: number): string {
  return `${where}, character ${at}`;
}

/** A bracket that is not closed yet. */
interface Open {
  readonly bracket: string;
  readonly at: number;
  /** Of a function, whose arguments it holds. */
  readonly isCall: boolean;
}

/**
 * Checks the text and returns it with `,` as its only argument separator, every
 * character still at its place.
 * @throws {InputError} for each slip named in the header.
 */
export function checkText(text: string, where: string): string {
  if (text.length > MAX_CHARACTERS) {
    throw new InputError(
      where,
      `${text.length} characters`,
      `use at most ${MAX_CHARACTERS}, or split the formula with givens`,
    );
  }
  const open: Open[] = [];
  const commas: number[] = [];
  const semicolons: number[] = [];
  let quote: { mark: string; at: number } | undefined;
  let plain = '';
  for (let i = 0; i < text.length; i++) {
    const c = text.charAt(i);
    if (quote) {
      plain += 'q';
      if (c === quote.mark) quote = undefined;
      continue;
    }
    checkCharacter(c, i, where);
    plain += c === '"' || c === "'" ? 'q' : c;
    if (c === '"' || c === "'") quote = { mark: c, at: i + 1 };
    else if (c === '(' || c === '{') {
      open.push({ bracket: c, at: i + 1, isCall: c === '(' && isAfterName(text, i) });
      if (open.length > MAX_DEPTH) {
        throw new InputError(
          place(where, i + 1),
          `brackets ${open.length} deep`,
          `use at most ${MAX_DEPTH} levels, or name parts with LET`,
        );
      }
    } else if (c === ')' || c === '}') close(open, c, i + 1, where);
    else if ((c === ',' || c === ';') && open.at(-1)?.bracket !== '{') {
      if (!open.at(-1)?.isCall) throw strayComma(text, i, where);
      (c === ',' ? commas : semicolons).push(i);
    }
  }
  if (quote) {
    throw new InputError(
      place(where, quote.at),
      `the quotation mark ${quote.mark} is never closed`,
      `add another ${quote.mark}`,
    );
  }
  const left = open.at(-1);
  if (left) {
    throw new InputError(
      place(where, left.at),
      `"${left.bracket}" is never closed`,
      `add "${left.bracket === '(' ? ')' : '}'}"`,
    );
  }
  const withoutReferences = plain.replace(/\[[^[\]]*\]/g, (part) => 'q'.repeat(part.length));
  checkSigns(withoutReferences, (at) => place(where, at));
  if (semicolons.length === 0) return text;
  return withCommas(text, commas, semicolons, where);
}

function checkCharacter(c: string, i: number, where: string): void {
  const meant = LOOKALIKES.get(c);
  if (meant !== undefined) {
    throw new InputError(
      place(where, i + 1),
      `"${c}" is not the sign that worksheet formulas use`,
      `write ${meant}`,
    );
  }
  if (INVISIBLE.test(c) && !WHITE.has(c)) {
    const code = c.charCodeAt(0).toString(16).toUpperCase().padStart(4, '0');
    throw new InputError(
      place(where, i + 1),
      `a character that cannot be seen (U+${code})`,
      'delete it',
    );
  }
}

/** True if the bracket at index i follows a name or a bracket, as that of a call does. */
function isAfterName(text: string, i: number): boolean {
  return /[\p{L}\p{N}_.)]$/u.test(text.slice(0, i));
}

function strayComma(text: string, i: number, where: string): InputError {
  if (isDecimalComma(text, i)) return decimalComma(text, i, where);
  return new InputError(
    place(where, i + 1),
    `"${text.charAt(i)}" stands outside the brackets of a function`,
    'remove it, or write a decimal point',
  );
}

function close(open: Open[], c: string, at: number, where: string): void {
  const last = open.pop();
  const wanted = c === ')' ? '(' : '{';
  if (!last)
    throw new InputError(
      place(where, at),
      `"${c}" was never opened`,
      `remove it or add "${wanted}"`,
    );
  if (last.bracket !== wanted) {
    throw new InputError(
      place(where, at),
      `"${c}" closes the "${last.bracket}" of character ${last.at}`,
      'close brackets in the order they were opened',
    );
  }
}

function withCommas(
  text: string,
  commas: readonly number[],
  semicolons: readonly number[],
  where: string,
): string {
  const first = commas[0];
  if (first !== undefined) {
    const decimal = commas.find((i) => isDecimalComma(text, i));
    if (decimal !== undefined) throw decimalComma(text, decimal, where);
    throw new InputError(
      place(where, Math.max(first, semicolons[0]!) + 1),
      'both "," and ";" separate arguments',
      'use one of them throughout',
    );
  }
  const characters = text.split('');
  for (const i of semicolons) characters[i] = ',';
  return characters.join('');
}

/**
 * True if the comma at index i stands between two whole numbers, as a decimal comma
 * does: not after a name such as x1, nor beside a number that has a decimal point.
 */
export function isDecimalComma(text: string, i: number): boolean {
  return (
    text.charAt(i) === ',' &&
    /(?:^|[^\p{L}\p{N}_.$!])\d+$/u.test(text.slice(0, i)) &&
    /^\d+(?![\d.(!$:])/.test(text.slice(i + 1))
  );
}

/** The refusal of a decimal comma at index i of the text. */
export function decimalComma(text: string, i: number, where: string): InputError {
  const before = /\d*$/.exec(text.slice(0, i))![0];
  const after = /^\d*/.exec(text.slice(i + 1))![0];
  return new InputError(
    place(where, i + 1 - before.length),
    `"${before},${after}" has a decimal comma`,
    `write ${before}.${after}`,
  );
}
