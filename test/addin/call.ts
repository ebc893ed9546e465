/** The worksheet functions called by name, as the faces call them. */
import type { Arguments } from '../../addin/functions/reply';
import { cellsOf, replyOf } from '../../addin/functions/reply';
import type { Range } from '../../src/index';

/** The cells of a function. @throws as the function does. */
export function call(name: string, ...args: Arguments): Range {
  return cellsOf(replyOf(name, args));
}
