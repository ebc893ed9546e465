/**
 * What can be seen wrong in a formula's characters before it is parsed: length,
 * bracket depth, brackets left open, separators, decimal commas, signs that look
 * like operators but are none. Checked first so that the parser never recurses
 * deeply and each slip gets its own message.
 * Not handled: anything that needs the grammar (parse.ts, compile.ts).
 */
import { InputError } from '../errors';

export const MAX_CHARACTERS = 8192;
export const MAX_DEPTH = 64;

const LOOKALIKES = new Map([
  ['≤', '<='],
  ['≥', '>='],
  ['≠', '<>'],
  ['−', '-'],
  ['–', '-'],
  ['×', '*'],
  ['·', '*'],
  ['÷', '/'],
  ['“', '"'],
  ['”', '"'],
]);

/** A place in a formula, for messages: `Formula, character 7`. */
export function place(where: string, at: number): string {
  return `${where}, character ${at}`;
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
  const open: { bracket: string; at: number }[] = [];
  const commas: number[] = [];
  const semicolons: number[] = [];
  let quote: { mark: string; at: number } | undefined;
  for (let i = 0; i < text.length; i++) {
    const c = text.charAt(i);
    if (quote) {
      if (c === quote.mark) quote = undefined;
      continue;
    }
    if (c === '"' || c === "'") quote = { mark: c, at: i + 1 };
    else if (c === '(' || c === '{') {
      open.push({ bracket: c, at: i + 1 });
      if (open.length > MAX_DEPTH) {
        throw new InputError(
          place(where, i + 1),
          `brackets ${open.length} deep`,
          `use at most ${MAX_DEPTH} levels, or name parts with LET`,
        );
      }
    } else if (c === ')' || c === '}') close(open, c, i + 1, where);
    else if (open.at(-1)?.bracket !== '{') {
      if (c === ',') commas.push(i);
      if (c === ';') semicolons.push(i);
      const meant = LOOKALIKES.get(c);
      if (meant !== undefined) {
        throw new InputError(
          place(where, i + 1),
          `"${c}" is not a worksheet operator`,
          `write ${meant}`,
        );
      }
    }
  }
  if (quote) {
    throw new InputError(
      place(where, quote.at),
      `${quote.mark} is never closed`,
      `add ${quote.mark}`,
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
  if (semicolons.length === 0) return text;
  return withCommas(text, commas, semicolons, where);
}

function close(
  open: { bracket: string; at: number }[],
  c: string,
  at: number,
  where: string,
): void {
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

/** True if the comma at index i stands between two digits, as a decimal comma does. */
export function isDecimalComma(text: string, i: number): boolean {
  return /\d/.test(text.charAt(i - 1)) && /\d/.test(text.charAt(i + 1));
}

/** The refusal of a decimal comma at index i of the text. */
export function decimalComma(text: string, i: number, where: string): InputError {
  const before = /[\d.]*$/.exec(text.slice(0, i))![0];
  const after = /^[\d]*/.exec(text.slice(i + 1))![0];
  return new InputError(
    place(where, i + 1 - before.length),
    `"${before},${after}" has a decimal comma`,
    `write ${before}.${after}`,
  );
}
