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
import { checkText, decimalComma, isDecimalComma, place } from './check';
import type { Tree } from './tree';

/** The library's types leave out that a LAMBDA may be called where it stands, and arguments left blank. */
type Expression = AstExpression | Identifier;

/**
 * The tree of one formula. `where` names its place in messages, e.g. `Formula, line 2`.
 * @throws {InputError} when the text is not a formula.
 */
export function parse(text: string, where: string): Tree {
  const checked = checkText(text, where);
  if (/^\s*=?\s*$/.test(checked)) {
    throw new InputError(where, 'it is blank', 'give a formula such as EXP(-x)');
  }
  return new Reader(checked, where).read(parseText(checked, where));
}

function parseText(text: string, where: string): Expression {
  try {
    const tokens = tokenize(text, { withLocation: true });
    for (const token of tokens) {
      // The library takes a lone c or r for a piece of a row-and-column reference.
      if (token.type === 'unknown' && /^[A-Za-z_]\w*$/.test(token.value))
        token.type = 'range_named';
    }
    return parseTokens(tokens);
  } catch (error) {
    const comma = text.split('').findIndex((c, i) => c === ',' && isDecimalComma(text, i));
    if (comma >= 0) throw decimalComma(text, comma, where);
    const end = (error as { sourceOffset?: number }).sourceOffset ?? text.length;
    throw new InputError(
      place(where, Math.max(1, Math.min(end, text.length))),
      `cannot be read up to here ("${text.slice(Math.max(0, end - 12), end)}")`,
      'look for a missing operator, number, comma or bracket',
    );
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
        return { kind: 'name', name: node.value, isCell: node.kind !== 'name', at };
      case 'Identifier':
        return { kind: 'name', name: node.name, isCell: false, at };
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
          callee: callee.type === 'Identifier' ? callee.name : this.read(callee),
          args: node.arguments.map(
            (argument: Expression | null) => argument && this.read(argument),
          ),
          at,
        };
      }
      case 'LambdaExpression':
        return {
          kind: 'lambda',
          params: node.params.map((p) => p.name),
          body: this.read(node.body!),
          at,
        };
      case 'LetExpression':
        return {
          kind: 'let',
          bindings: node.declarations.map((d) => ({
            name: d.id.name,
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
      throw this.error(at, `the number ${raw} is too large`, 'use numbers up to 1.79E308');
    }
    return { kind: 'number', value: value === 0 ? 0 : value, at };
  }

  private operator(node: UnaryExpression | BinaryExpression, at: number): Tree {
    const operands = node.arguments;
    if (node.operator === '^') this.refuseBareMinus(operands[0]!);
    if (node.operator === ' ' || node.operator === ':') {
      throw this.error(
        span(operands[0]!)[1] + 1,
        'two parts with no operator between them',
        'add * or another operator',
      );
    }
    if (node.operator === ',') {
      const comma = this.text.indexOf(',', span(operands[0]!)[1]);
      if (isDecimalComma(this.text, comma)) throw decimalComma(this.text, comma, this.where);
    }
    return {
      kind: 'operator',
      operator: node.operator,
      args: operands.map((o) => this.read(o)),
      at,
    };
  }

  /** In a worksheet -x^2 is (-x)^2. A negative number, as in -2^2, says plainly what it is. */
  private refuseBareMinus(base: Expression): void {
    if (base.type !== 'UnaryExpression' || base.operator !== '-') return;
    const [start, end] = span(base);
    if (!/^\s*\^/.test(this.text.slice(end))) return;
    const operand = this.text.slice(start + 1, end).trim();
    const power = /^\s*\^\s*(\([^()]*\)|[^\s+\-*/^,()=<>&%]*)/.exec(this.text.slice(end))![1]!;
    throw this.error(
      start + 1,
      `-${operand}^${power} means (-${operand})^${power} in a worksheet`,
      `write -(${operand}^${power}), or (-${operand})^${power} if that is meant`,
    );
  }

  private error(at: number, found: string, expected: string): InputError {
    return new InputError(place(this.where, at), found, expected);
  }
}
