/** Formulas in x as tests use them: compiled, at a point, over an interval. */
import { compile } from '../../src/formula/compile';
import { evaluator } from '../../src/formula/evaluate';
import { parse } from '../../src/formula/parse';
import type { Tape } from '../../src/formula/tape';

export function tapeOf(text: string): Tape {
  const source = { text, where: 'Formula', tree: parse(text, 'Formula') };
  return compile([source], ['x'], new Map());
}

export function valueOf(text: string): (x: number) => number {
  return evaluator(tapeOf(text));
}
