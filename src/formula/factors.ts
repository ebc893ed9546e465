/**
 * A density taken apart into the conditions that it holds under and the rest: the arguments
 * of AND, comparisons that stand as a factor or on a line of their own, OR and NOT. What the
 * rest is where a condition fails then does not matter, only that it is defined.
 * Not handled: conditions inside IF, LET and LAMBDA; they stay part of the rest.
 */
import type { Source } from './compile';
import { parse } from './parse';
import { splitText, withoutBrackets } from './split';

interface Factors {
  readonly conditions: readonly Source[];
  /** Their product is the density where all conditions hold; none stands for 1. */
  readonly others: readonly Source[];
}

/** The two sides of a condition that is an equation; null for any other. */
export function sidesOf({ tree, text }: Source): readonly [left: string, right: string] | null {
  if (tree.kind !== 'operator' || tree.operator !== '=') return null;
  const [left = '', right = ''] = splitText(withoutBrackets(text), ({ value }) => value === '=');
  return [left, right];
}

const COMPARISONS = new Set(['=', '<>', '<', '>', '<=', '>=']);

/** The conditions and the rest of a product of formulas. Same values in real numbers. */
export function factorsOf(sources: readonly Source[]): Factors {
  const parts = sources.flatMap(partsOf);
  return {
    conditions: parts.filter(isCondition),
    others: parts.filter((part) => !isCondition(part)),
  };
}

function partsOf(source: Source): readonly Source[] {
  const { tree, where } = source;
  const text = withoutBrackets(source.text.trim().replace(/^=/, ''));
  const texts =
    // In a chain of * and / every * may come last: a*b/c is a times b/c.
    tree.kind === 'operator' && (tree.operator === '*' || tree.operator === '/')
      ? splitText(text, ({ value }) => value === '*')
      : tree.kind === 'call' && isCalled(tree.callee, 'AND')
        ? argumentsOf(text)
        : [];
  if (texts.length < 2) return [{ ...source, text }];
  const parts = texts.map((each) => ({ text: each, where, tree: parse(each, where) }));
  // AND takes any number for a truth; a factor that is one is none.
  if (tree.kind === 'call' && !parts.every(isCondition)) return [{ ...source, text }];
  return parts.flatMap(partsOf);
}

/** The arguments between the outermost brackets of a call. */
function argumentsOf(text: string): string[] {
  const inner = text.slice(text.indexOf('(') + 1, text.lastIndexOf(')'));
  return splitText(inner, ({ value }) => value === ',' || value === ';');
}

function isCondition({ tree }: Source): boolean {
  return (
    (tree.kind === 'operator' && COMPARISONS.has(tree.operator)) ||
    (tree.kind === 'call' && ['AND', 'OR', 'NOT'].some((name) => isCalled(tree.callee, name)))
  );
}

function isCalled(callee: unknown, name: string): boolean {
  return typeof callee === 'string' && callee.toUpperCase() === name;
}
