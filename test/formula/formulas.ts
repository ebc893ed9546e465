/** Formulas by their text, for tests. */
import { compile } from '../../src/formula/compile';
import { evaluator } from '../../src/formula/evaluate';
import type { Given } from '../../src/formula/given';
import { parse } from '../../src/formula/parse';
import type { Tape } from '../../src/formula/tape';

export type Givens = Readonly<Record<string, Given>>;

/** The tape of a formula in x. */
export function tapeOf(text: string, givens: Givens = {}): Tape {
  const tree = parse(text, 'Formula');
  const map = new Map(Object.entries(givens));
  return compile([{ text, where: 'Formula', tree }], ['x'], map);
}

/** The value of a formula at x, in doubles. */
export function valueOf(text: string, x = NaN, givens: Givens = {}): number {
  return evaluator(tapeOf(text, givens))(x);
}

/** The message of what a call throws. */
export function messageOf(call: () => unknown): string {
  try {
    call();
  } catch (error) {
    return (error as Error).message;
  }
  return 'nothing was thrown';
}

/** The message with which a formula is refused. */
export function refusalOf(text: string, givens: Givens = {}): string {
  return messageOf(() => tapeOf(text, givens));
}
