/**
 * From a tree to a tape: names are looked up, LET and LAMBDA are written out,
 * arrays are worked element by element, equal steps are shared, constants folded.
 *
 * Not handled: recursion (a LAMBDA cannot see its own name), text.
 * The file is long because it is one walk over the tree.
 */
import { InputError } from '../errors';
import * as I from '../numeric/interval';
import { cited, decimalComma, isDecimalComma, place } from './check';
import { collectSums } from './collect';
import type { Given, GivenMap } from './given';
import type { Value } from './names';
import { callsItself, nameKey, Scope } from './names';
import { Steps } from './steps';
import type { Tape } from './tape';
import type { Tree } from './tree';
import type { Maker, Row } from './row';
import { VOCABULARY } from './vocabulary';

/** Steps that depend on a variable, equal ones counted once: each is worked at every look at the density. */
export const MAX_OPERATIONS = 10_000;
/** Operations written out on the way there, those on numbers included: each is worked once. */
const MAX_WRITTEN_OUT = 200_000;
/** A LAMBDA may be handed to itself; this ends it before the host's own stack does. */
const MAX_CALLS_DEEP = 100;

/** The text and the meaning of the names around it. */
export interface Source {
  readonly text: string;
  /** Its place in messages, e.g. `Formula` or `Formula, line 2`. */
  readonly where: string;
  readonly tree: Tree;
}

/**
 * Compiles the product of one or more formulas.
 * @throws {InputError} for unknown names, wrong argument counts and the rest of the header.
 */
export function compile(
  sources: readonly Source[],
  variables: readonly string[],
  givens: GivenMap,
): Tape {
  return new Compiler(variables, givens, false).product(sources);
}

/**
 * As `compile`, for variables that take whole numbers only: the same values there, and curves
 * between them where FACT, COMBIN, POISSON.DIST and INT have steps.
 */
export function compileSmooth(
  sources: readonly Source[],
  variables: readonly string[],
  givens: GivenMap,
): Tape {
  return new Compiler(variables, givens, true).product(sources);
}

type OperatorTree = Extract<Tree, { kind: 'operator' }>;
type CallTree = Extract<Tree, { kind: 'call' }>;

class Compiler {
  private readonly steps: Steps;
  private readonly outermost = new Scope();
  private readonly variablePlaces: number[];
  private work = 0;
  /** How many LAMBDAs are being written out within one another. */
  private depth = 0;
  private source!: Source;

  constructor(
    private readonly variables: readonly string[],
    private readonly givens: GivenMap,
    private readonly isSmooth: boolean,
  ) {
    this.steps = new Steps(isSmooth);
    this.variablePlaces = variables.map((name, i) => {
      const step = this.steps.variable(i);
      this.outermost.set(nameKey(name), { kind: 'step', step });
      return step;
    });
    for (const [name, given] of givens) this.outermost.set(nameKey(name), this.given(name, given));
  }

  private given(name: string, given: Given): Value {
    if (typeof given === 'number') return { kind: 'step', step: this.steps.number(given) };
    if (given.kind === 'list')
      return { kind: 'array', rows: given.values.map((value) => [this.steps.number(value)]) };
    return { kind: 'row', row: { name, least: 1, most: 1, operation: given.operation } };
  }

  product(sources: readonly Source[]): Tape {
    const factors = sources.map((source) => {
      this.source = source;
      return this.step(this.body(source.tree), this.outermost);
    });
    const multiply = VOCABULARY.get('*')!.operation!;
    const root = collectSums(
      this.steps,
      factors.reduce((a, b) => this.steps.apply(multiply, [a, b])),
    );
    const tape = this.steps.tape(root, this.variablePlaces);
    this.checkLength(tape, sources);
    return tape;
  }

  private checkLength({ steps }: Tape, sources: readonly Source[]): void {
    const n = steps.filter((step) => step.nOperands > 0 && !step.isConstant).length;
    if (n <= MAX_OPERATIONS) return;
    throw new InputError(
      sources.length === 1 ? sources[0]!.where : 'Formula',
      `${n} operations on ${this.variables.join(', ')}, each element of a list counted`,
      `use at most ${MAX_OPERATIONS}: shorten the formula or the lists, or work out beforehand what does not depend on ${this.variables.join(', ')}`,
    );
  }

  /** A formula may be written as LAMBDA(x, …): its parameters are then the variables. */
  private body(tree: Tree): Tree {
    if (tree.kind !== 'lambda') return tree;
    if (tree.params.length !== this.variables.length) {
      throw this.error(
        tree.at,
        `LAMBDA has ${counted(tree.params.length, 'name')}`,
        `give it ${this.variables.length}, one for each variable (${this.variables.join(', ')})`,
      );
    }
    tree.params.forEach((name, i) => {
      this.outermost.set(nameKey(name), { kind: 'step', step: this.variablePlaces[i]! });
    });
    return tree.body;
  }

  private error(at: number, found: string, expected: string): InputError {
    return new InputError(place(this.source.where, at), found, expected);
  }

  /** The value of a part that must be a single number or truth. */
  private step(tree: Tree, scope: Scope): number {
    const value = this.value(tree, scope);
    if (value.kind === 'step') return value.step;
    if (value.kind === 'array') {
      throw this.error(
        tree.at,
        'an array where a single number belongs',
        'put it inside SUM, PRODUCT or another function that takes many numbers',
      );
    }
    throw this.functionAsNumber(tree.at);
  }

  private functionAsNumber(at: number): InputError {
    return this.error(at, 'a LAMBDA where a number belongs', 'give it its arguments in brackets');
  }

  private value(tree: Tree, scope: Scope): Value {
    switch (tree.kind) {
      case 'number':
        return { kind: 'step', step: this.steps.number(tree.value) };
      case 'truth':
        return { kind: 'step', step: this.call(tree.value ? 'TRUE' : 'FALSE', [], tree.at) };
      case 'text':
        throw this.error(
          tree.at,
          `the text "${cited(tree.value)}" where a number belongs`,
          'write a number or a name from the givens',
        );
      case 'name':
        return this.named(tree.name, tree.isCell, tree.at, scope);
      case 'array': {
        const rows = tree.rows.map((row) => row.map((element) => this.step(element, scope)));
        return { kind: 'array', rows };
      }
      case 'let':
        return this.let(tree, scope);
      case 'lambda':
        return { kind: 'function', params: tree.params, body: tree.body, scope };
      case 'operator':
        return this.operator(tree, scope);
      case 'call':
        return this.callTree(tree, scope);
    }
  }

  private named(name: string, isCell: boolean, at: number, scope: Scope): Value {
    const value = scope.find(nameKey(name));
    if (value?.kind === 'row') throw this.withoutBrackets(name, at);
    if (value) return value;
    if (isCell) {
      const expected = name.includes(':')
        ? `add a column with the heading ${name} to the givens, or write its values as an array such as {1,2,3}`
        : `add a row ${name} | value to the givens, or write the value itself`;
      throw this.error(at, `"${name}" is a cell address with no given`, expected);
    }
    if (VOCABULARY.has(name.toUpperCase())) throw this.withoutBrackets(name.toUpperCase(), at);
    const known = [...this.variables, ...this.givens.keys()].join(', ');
    throw this.error(
      at,
      `"${cited(name)}" is not a known name`,
      `add it to the givens, or use one of: ${known}`,
    );
  }

  private withoutBrackets(name: string, at: number): InputError {
    const args = VOCABULARY.get(name)?.most === 0 ? '' : '…';
    return this.error(at, `"${name}" is a function without its brackets`, `write ${name}(${args})`);
  }

  private let(tree: Extract<Tree, { kind: 'let' }>, scope: Scope): Value {
    let inner = scope;
    for (const { name, value, at } of tree.bindings) {
      if (value.kind === 'lambda' && !inner.find(nameKey(name)) && callsItself(name, value.body)) {
        throw this.error(
          at,
          `${name} calls itself`,
          'recursion is not part of the formula language; write the steps out',
        );
      }
      // A scope for every name: a LAMBDA sees what stood before it, not itself.
      const next = new Scope(inner);
      next.set(nameKey(name), this.value(value, inner));
      inner = next;
    }
    return this.value(tree.body, inner);
  }

  /** The chain of first operands is followed without recursion, however long it is. */
  private operator(tree: OperatorTree, scope: Scope): Value {
    const chain: { readonly link: OperatorTree; readonly row: Row | null }[] = [];
    let first: Tree = tree;
    for (; first.kind === 'operator'; first = first.args[0]!)
      chain.push({ link: first, row: this.rowOf(first) });
    let value = this.value(first, scope);
    for (const { link, row } of chain.reverse()) {
      const rest = link.args.slice(1).map((arg) => this.value(arg, scope));
      if (row) value = this.elementwise(row, [value, ...rest], link.operatorAt);
    }
    return value;
  }

  /** The row of an operator; nothing for a plus sign before a part, which changes nothing. */
  private rowOf({ operator, operatorAt: at, args }: OperatorTree): Row | null {
    if (args.length === 1 && operator === '+') return null;
    const row = VOCABULARY.get(args.length === 1 && operator === '-' ? 'negative' : operator);
    if (row && args.length >= row.least) return row;
    const why = operator === '&' ? 'joins text' : 'is not part of the formula language';
    throw this.error(
      at,
      `the operator "${operator}" ${why}`,
      'use + - * / ^ %, comparisons, AND and OR',
    );
  }

  private callTree(tree: CallTree, scope: Scope): Value {
    const { callee, at } = tree;
    const own =
      typeof callee === 'string' ? scope.find(nameKey(callee)) : this.value(callee, scope);
    if (own?.kind === 'function') return this.applyLambda(own, tree, scope);
    if (own?.kind === 'row') return this.applyNamed(own.row, tree, scope);
    if (typeof callee !== 'string' || own) {
      throw this.error(
        at,
        'brackets after something that is not a function',
        'put * before the bracket to multiply',
      );
    }
    const row = VOCABULARY.get(callee.toUpperCase());
    if (!row || !/^[A-Z]/i.test(callee)) {
      throw this.error(at, `"${cited(callee)}" is not a known function`, suggestions(callee));
    }
    return this.applyNamed(row, tree, scope);
  }

  private applyNamed(row: Row, tree: CallTree, scope: Scope): Value {
    const { at } = tree;
    this.checkCount(row, tree);
    const args = tree.args.map((arg): Value =>
      arg ? this.value(arg, scope) : { kind: 'step', step: this.steps.number(0) },
    );
    if (row.rewriteArrays) {
      this.count(at);
      const arrays = args.map((arg) =>
        arg.kind === 'array' ? arg.rows : [this.elements(arg, at)],
      );
      return { kind: 'step', step: row.rewriteArrays(this.maker(at), arrays) };
    }
    // Functions of many numbers take an array as its numbers; the others work on it element by element.
    if (row.most !== Infinity) return this.elementwise(row, args, at);
    return {
      kind: 'step',
      step: this.applyRow(
        row,
        args.flatMap((arg) => this.elements(arg, at)),
        at,
      ),
    };
  }

  private elements(value: Value, at: number): readonly number[] {
    if (value.kind === 'step') return [value.step];
    if (value.kind === 'array') return value.rows.flat();
    throw this.functionAsNumber(at);
  }

  private checkCount(row: Row, tree: CallTree): void {
    const n = tree.args.length;
    if (n >= row.least && n <= row.most) return;
    const { text, where } = this.source;
    const decimal = commasOf(text, tree.at - 1).filter((i) => isDecimalComma(text, i));
    if (decimal.length === 1 && n - 1 >= row.least && n - 1 <= row.most)
      throw decimalComma(text, decimal[0]!, where);
    const wanted =
      row.least === row.most
        ? `${row.least}`
        : row.most === Infinity
          ? `${row.least} or more`
          : `${row.least} to ${row.most}`;
    throw this.error(
      tree.at,
      `${row.name} has ${counted(n, 'argument')}`,
      row.most === 0 ? `write ${row.name}()` : `give it ${wanted}`,
    );
  }

  private applyLambda(
    own: Extract<Value, { kind: 'function' }>,
    tree: CallTree,
    scope: Scope,
  ): Value {
    if (own.params.length !== tree.args.length) {
      throw this.error(
        tree.at,
        `a LAMBDA of ${counted(own.params.length, 'name')} has ${counted(tree.args.length, 'argument')}`,
        `give it ${own.params.length}`,
      );
    }
    this.count(tree.at);
    if (this.depth >= MAX_CALLS_DEEP) {
      throw this.error(
        tree.at,
        `LAMBDAs that use one another more than ${MAX_CALLS_DEEP} deep`,
        'recursion is not part of the formula language; write the steps out',
      );
    }
    const inner = new Scope(own.scope);
    own.params.forEach((name, i) => {
      const arg = tree.args[i];
      inner.set(
        nameKey(name),
        arg ? this.value(arg, scope) : { kind: 'step', step: this.steps.number(0) },
      );
    });
    this.depth++;
    const value = this.value(own.body, inner);
    this.depth--;
    return value;
  }

  /** Applies a row to numbers, or to arrays of one shape (a single row or column is repeated). */
  private elementwise(row: Row, args: readonly Value[], at: number): Value {
    const arrays = args.filter((arg) => arg.kind === 'array');
    if (arrays.length === 0) {
      return {
        kind: 'step',
        step: this.applyRow(
          row,
          args.map((arg) => this.elements(arg, at)[0]!),
          at,
        ),
      };
    }
    const nRows = Math.max(...arrays.map((a) => a.rows.length));
    const nColumns = Math.max(...arrays.map((a) => a.rows[0]!.length));
    for (const { rows } of arrays) {
      const fits =
        (rows.length === 1 || rows.length === nRows) &&
        (rows[0]!.length === 1 || rows[0]!.length === nColumns);
      if (!fits)
        throw this.error(
          at,
          'arrays of different sizes',
          'use arrays with the same number of elements',
        );
    }
    const pick = (arg: Value, i: number, j: number): number => {
      if (arg.kind !== 'array') return this.elements(arg, at)[0]!;
      const line = arg.rows[arg.rows.length === 1 ? 0 : i]!;
      return line[line.length === 1 ? 0 : j]!;
    };
    const rows = Array.from({ length: nRows }, (_, i) =>
      Array.from({ length: nColumns }, (__, j) =>
        this.applyRow(
          row,
          args.map((arg) => pick(arg, i, j)),
          at,
        ),
      ),
    );
    return { kind: 'array', rows };
  }

  private applyRow(row: Row, args: readonly number[], at: number): number {
    this.count(at);
    if (row.operation) return this.steps.apply(row.operation, args);
    return row.rewrite!(this.maker(at), args);
  }

  private call(name: string, args: readonly number[], at: number): number {
    return this.applyRow(VOCABULARY.get(name)!, args, at);
  }

  private count(at: number): void {
    this.work++;
    if (this.work > MAX_WRITTEN_OUT) {
      throw this.error(
        at,
        `more than ${MAX_WRITTEN_OUT} operations once LET, LAMBDA and lists are written out`,
        'shorten the formula or the lists',
      );
    }
  }

  private maker(at: number): Maker {
    return {
      number: (value) => this.steps.number(value),
      pi: () => {
        const pi = I.interval();
        I.setPi(pi);
        return this.steps.constant(Math.PI, pi);
      },
      apply: (operation, ...args) => this.steps.apply(operation, args),
      call: (name, ...args) => this.call(name, args, at),
      exactValue: (node) => {
        const { enclosure, value } = this.steps.at(node);
        return enclosure && enclosure.lo === enclosure.hi ? value : undefined;
      },
      isConstant: (node) => this.steps.at(node).isConstant,
      isCount: (node) =>
        this.isSmooth && !this.steps.at(node).isConstant && this.steps.isWhole(node),
      enclosure: (node) => this.steps.enclosure(node),
      isTruth: (node) => this.steps.isTruth(node),
      refuse: (found, expected) => this.error(at, found, expected),
    };
  }
}

/** Names of the functions of the vocabulary, operators left out. */
export function functionNames(): readonly string[] {
  return [...VOCABULARY.keys()].filter((name) => /^[A-Z]/.test(name));
}

/** The functions that begin as the unknown one does, or all where none does. */
function suggestions(unknown: string): string {
  const initial = unknown.charAt(0).toUpperCase();
  const alike = functionNames().filter((name) => name.startsWith(initial));
  return alike.length === 0
    ? `use one of: ${functionNames().join(', ')}`
    : `use a known one (${alike.join(', ')} begin${alike.length === 1 ? 's' : ''} with ${initial})`;
}

function counted(n: number, noun: string): string {
  return `${n} ${noun}${n === 1 ? '' : 's'}`;
}

/** Where the commas between the arguments of the call that starts at index `start` stand. */
function commasOf(text: string, start: number): readonly number[] {
  const commas: number[] = [];
  const open = text.indexOf('(', start);
  for (let i = open, depth = 0; i >= 0 && i < text.length; i++) {
    const c = text.charAt(i);
    if (c === '(' || c === '{') depth++;
    if (c === ')' || c === '}') depth--;
    if (depth === 0) break;
    if (c === ',' && depth === 1) commas.push(i);
  }
  return commas;
}
