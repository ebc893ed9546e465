/**
 * Worksheet formula text to a tree.
 *
 * The grammar and its precedence (unary minus, %, ^, * /, + -, &, comparisons, all
 * left-associative; OpenFormula 1.2 §5.5, ECMA-376 part 1 §18.17) are @borgar/fx's;
 * what stands here is its translation and the refusals that need the grammar.
 * Not handled: what names mean and how many arguments a function takes (compile.ts).
 */
import type { AstExpression, BinaryExpression, Identifier, UnaryExpression } from '@borgar/fx';
import { parse as parseTokens, tokenize } from '@borgar/fx';
import { InputError } from '../errors';
import { checkText, cited, place } from './check';
import type { Tree } from './tree';
import { unreadable } from './unreadable';
import { VOCABULARY } from './vocabulary';

/** The library's types leave out that a LAMBDA may be called where it stands, and arguments left blank. */
type Expression = AstExpression | Identifier;

/**
 * The tree of one formula. `where` names its place in messages, e.g. `Formula, line 2`.
 * @throws {InputError} when the text is not a formula.
 */
export function parse(text: string, where: string): Tree {
  // The sign that makes a cell a formula says nothing here, wherever spaces put it.
  const checked = checkText(text, where).replace(/^\s*=/, (start) => ' '.repeat(start.length));
  if (checked.trim() === '') {
    throw new InputError(where, 'it is blank', 'give a formula such as EXP(-x)');
  }
  return new Reader(checked, where).read(parseText(checked, where));
}

/**
 * The library takes the names that every JavaScript object has for names that stand
 * twice. This character, which no checked text holds, makes them others; it is taken off again.
 */
const MARK = '\u200b';

function parseText(text: string, where: string): Expression {
  try {
    const tokens = tokenize(text, { withLocation: true });
    for (const token of tokens) {
      // The library takes a lone c or r for a piece of a row-and-column reference.
      if (token.type === 'unknown' && /^[A-Za-z_]\w*$/.test(token.value))
        token.type = 'range_named';
      if (/^(constructor|__proto__)$/i.test(token.value)) token.value += MARK;
    }
    return parseTokens(tokens);
  } catch (error) {
    throw unreadable(text, where, error as Error & { sourceOffset?: number });
  }
}

/** Where a node starts and ends in the text; there since the tokens carry their locations. */
function span(node: { loc?: number[] }): readonly [number, number] {
  const [start, end] = node.loc!;
  return [start!, end!];
}

class Reader {
  constructor(
    private readonly text: string,
    private readonly where: string,
  ) {}

  read(node: Expression): Tree {
    const at = span(node)[0] + 1;
    switch (node.type) {
      case 'Literal':
        return this.literal(node.value, node.raw, at);
      case 'ErrorLiteral':
        throw this.error(at, `the error value ${node.raw}`, 'write a formula without error values');
      case 'ReferenceIdentifier':
        return { kind: 'name', name: nameOf(node.value), isCell: node.kind !== 'name', at };
      case 'Identifier':
        return { kind: 'name', name: nameOf(node.name), isCell: false, at };
      case 'ArrayExpression':
        return {
          kind: 'array',
          rows: node.elements.map((row) => row.map((element) => this.read(element))),
          at,
        };
      case 'UnaryExpression':
      case 'BinaryExpression':
        return this.operator(node, at);
      case 'CallExpression': {
        const callee: Expression = node.callee;
        return {
          kind: 'call',
          callee: callee.type === 'Identifier' ? nameOf(callee.name) : this.read(callee),
          args: node.arguments.map(
            (argument: Expression | null) => argument && this.read(argument),
          ),
          at,
        };
      }
      case 'LambdaExpression':
        if (!node.body) {
          throw this.error(at, 'LAMBDA is empty', 'write its names and then its result');
        }
        return {
          kind: 'lambda',
          params: node.params.map((p) => nameOf(p.name)),
          body: this.read(node.body),
          at,
        };
      case 'LetExpression':
        return {
          kind: 'let',
          bindings: node.declarations.map((d) => ({
            name: nameOf(d.id.name),
            value: this.read(d.init!),
            at: span(d)[0] + 1,
          })),
          body: this.read(node.body!),
          at,
        };
    }
  }

  private literal(value: unknown, raw: string, at: number): Tree {
    if (typeof value === 'boolean') return { kind: 'truth', value, at };
    if (typeof value === 'string') return { kind: 'text', value, at };
    if (typeof value !== 'number' || !Number.isFinite(value)) {
      throw this.error(at, `the number ${cited(raw)} is too large`, 'use numbers up to 1.79E308');
    }
    return { kind: 'number', value: value === 0 ? 0 : value, at };
  }

  /** Operators are left-associative: the chain of first operands is followed without recursion, however long it is. */
  private operator(node: UnaryExpression | BinaryExpression, at: number): Tree {
    const chain: (UnaryExpression | BinaryExpression)[] = [];
    let first: Expression = node;
    while (first.type === 'UnaryExpression' || first.type === 'BinaryExpression') {
      chain.push(first);
      first = first.arguments[0]!;
    }
    let tree = this.read(first);
    for (const link of chain.reverse()) {
      const operatorAt = this.checkOperator(link);
      const rest = link.arguments.slice(1).map((operand) => this.read(operand));
      const start = link === node ? at : span(link)[0] + 1;
      const args = [tree, ...rest];
      tree = { kind: 'operator', operator: link.operator, args, at: start, operatorAt };
    }
    return tree;
  }

  /** Refuses what an operator cannot stand for, and tells where it stands. */
  private checkOperator(node: UnaryExpression | BinaryExpression): number {
    const { operator } = node;
    const [start] = span(node);
    const [first, second] = [node.arguments[0]!, node.arguments[1]];
    const end = span(first)[1];
    if (operator === ' ' && first.type === 'ReferenceIdentifier' && isFunction(first.value)) {
      throw this.error(
        end + 1,
        `a space between ${first.value} and its bracket`,
        'remove the space',
      );
    }
    if (operator === ' ' || operator === ':') {
      throw this.error(
        span(second!)[0] + 1,
        'two parts with no operator between them',
        'add * or another operator',
      );
    }
    const isPrefix = second === undefined && span(first)[0] > start;
    const index = isPrefix ? start : this.text.indexOf(operator, end);
    if (operator === '^') this.refuseBareMinus(first, second!);
    return index + 1;
  }

  /** In a worksheet -x^2 is (-x)^2. A negative number, as in -2^2, says plainly what it is. */
  private refuseBareMinus(base: Expression, power: Expression): void {
    let inner = base;
    while (inner.type === 'UnaryExpression' && inner.operator === '%') inner = inner.arguments[0]!;
    if (inner.type !== 'UnaryExpression' || inner.operator !== '-') return;
    const [start] = span(inner);
    const after = this.text.slice(start + 1);
    // What stands in brackets ends, by its span, before them.
    const end = start + 1 + balanced(after, span(base)[1] - start - 1).length;
    const caret = /^[\s%]*\^/.exec(this.text.slice(end));
    if (!caret) return;
    const operand = this.text.slice(start + 1, end + caret[0].length - 1).trim();
    const from = end + caret[0].length;
    const raised = balanced(this.text.slice(from), span(power)[1] - from).trim();
    throw this.error(
      start + 1,
      `-${operand}^${raised} means (-${operand})^${raised} in a worksheet`,
      `write -(${operand}^${raised}), or (-${operand})^${raised} if that is meant`,
    );
  }

  private error(at: number, found: string, expected: string): InputError {
    return new InputError(place(this.where, at), found, expected);
  }
}

function nameOf(value: string): string {
  return value.replace(MARK, '');
}

function isFunction(name: string): boolean {
  return VOCABULARY.has(name.toUpperCase());
}

/** The text up to `end`, and on to the brackets that close what it opens. */
function balanced(text: string, end: number): string {
  let i = 0;
  for (let depth = 0; i < text.length && (i < end || depth > 0); i++) {
    if (text.charAt(i) === '(') depth++;
    if (text.charAt(i) === ')' && --depth < 0) break;
  }
  return text.slice(0, i);
}
