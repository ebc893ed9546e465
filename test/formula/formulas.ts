/** Formulas by their text, for tests. */
import { compile } from '../../src/formula/compile';
import type { Source } from '../../src/formula/compile';
import { evaluator } from '../../src/formula/evaluate';
import type { Given } from '../../src/formula/given';
import { parse } from '../../src/formula/parse';
import type { Tape } from '../../src/formula/tape';
import { messageOf } from '../message';

export type Givens = Readonly<Record<string, Given>>;

/** A formula as it is read from a cell. */
export function sourceOf(text: string): Source {
  return { text, where: 'Formula', tree: parse(text, 'Formula') };
}

/** The tape of a formula in x, or in other variables. */
export function tapeOf(text: string, givens: Givens = {}, names: readonly string[] = ['x']): Tape {
  return compile([sourceOf(text)], names, new Map(Object.entries(givens)));
}

/** The value of a formula at x, in doubles. */
export function valueOf(text: string, x = NaN, givens: Givens = {}): number {
  return evaluator(tapeOf(text, givens))(x);
}

/** The message with which a formula is refused. */
export function refusalOf(text: string, givens: Givens = {}): string {
  return messageOf(() => tapeOf(text, givens));
}
