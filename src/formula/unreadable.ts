/**
 * The parsing library says that it cannot go on and where; this says it in the terms of
 * the person who wrote the formula. The library's version is pinned, so are its messages.
 */
import { InputError } from '../errors';
import { cited, decimalComma, isDecimalComma, place } from './check';

const WORD = /^[^\s,;(){}+\-*/^&=<>%]*/;
const BREAK = /[\s,;(){}+\-*/^&=<>%]/;

/** What a message of the library means for the person who wrote the formula. */
export function unreadable(
  text: string,
  where: string,
  { message, sourceOffset = text.length }: Error & { sourceOffset?: number },
): InputError {
  const end = Math.max(1, Math.min(sourceOffset, text.length));
  let start = end;
  while (start > 0 && !BREAK.test(text.charAt(start - 1))) start--;
  const token = WORD.exec(text.slice(start))![0] || text.charAt(end - 1);
  const at = place(where, start === end ? end : start + 1);
  const isOfNames = /argument/i.test(message);
  const comma = text.split('').findIndex((c, i) => c === ',' && isDecimalComma(text, i));
  if (isOfNames && comma >= 0) return decimalComma(text, comma, where);
  if (/Unexpected end of arguments/.test(message)) {
    return new InputError(
      place(where, end),
      'LET or LAMBDA ends too early',
      'write pairs of name and value and then the result, as in LET(a,2,a*x)',
    );
  }
  if (/Unexpected argument following/.test(message)) {
    return new InputError(
      place(where, end),
      'LET or LAMBDA goes on after its result',
      'write pairs of name and value and then the result, as in LET(a,2,a*x)',
    );
  }
  if (/not a name/.test(message)) return noName(text.slice(0, end), where);
  const twice = /Duplicate name: (.*)/.exec(message)?.[1];
  if (twice !== undefined) {
    return new InputError(
      place(where, text.lastIndexOf(twice, end - 1) + 1),
      `the name "${cited(twice)}" stands twice in one LET or LAMBDA`,
      'give each name once',
    );
  }
  if (/array/.test(message) || /Expected }/.test(message)) {
    return new InputError(
      at,
      `"${cited(token)}" is not a number`,
      'write only numbers inside { }, as in {1,2,3}',
    );
  }
  if (/Unexpected call/.test(message)) {
    return new InputError(
      place(where, end),
      'brackets after something that is not a function',
      'put * before the bracket to multiply',
    );
  }
  if (/context/.test(message)) {
    return new InputError(
      at,
      `"${cited(token)}" names a sheet without a cell`,
      'write the cell after it, as in Sheet1!B2',
    );
  }
  if (/^\d/.test(token) && /unknown token/.test(message)) {
    return new InputError(
      at,
      `"${cited(token)}" is neither a number nor a name`,
      'put * or another operator between a number and what follows it',
    );
  }
  if (/[\p{L}\p{N}_.)%"']\s*$/u.test(text.slice(0, start)) && /[\p{L}\p{N}_.("']/u.test(token)) {
    return new InputError(
      at,
      'two parts with no operator between them',
      'add * or another operator',
    );
  }
  return new InputError(
    at,
    `"${cited(token)}" does not fit what stands before it`,
    'look for a missing operator, number, comma or bracket',
  );
}

/** LET or LAMBDA without a name where the read part ends. */
function noName(read: string, where: string): InputError {
  const part = read.replace(/[\s,]+$/, '');
  let start = part.length;
  while (start > 0 && !BREAK.test(part.charAt(start - 1))) start--;
  const at = place(where, start + 1);
  if (start === part.length) {
    return new InputError(at, 'LET or LAMBDA lacks a name here', 'write one, such as a or mu');
  }
  return new InputError(
    at,
    `"${cited(part.slice(start))}" cannot be a name in LET or LAMBDA`,
    'use letters that are not a cell address, such as a or mu',
  );
}
