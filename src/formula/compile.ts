/**
 * From a tree to a tape: names are looked up, LET and LAMBDA are written out,
 * arrays are worked element by element, equal steps are shared, constants folded.
 *
 * Not handled: recursion (a LAMBDA cannot see its own name), text.
 */
import { InputError } from '../errors';
import type { Interval } from '../numeric/interval';
import * as I from '../numeric/interval';
import { decimalComma, isDecimalComma, place } from './check';
import type { Operation } from './operation';
import { Defined } from './operation';
import type { Step, Tape } from './tape';
import type { Tree } from './tree';
import type { Maker, Row } from './vocabulary';
import { NUMBER, VARIABLE, VOCABULARY } from './vocabulary';

export const MAX_OPERATIONS = 10_000;

/** What a name can stand for: a step, an array of steps, or a function of the formula's own. */
type Value =
  | { readonly kind: 'step'; readonly step: number }
  | { readonly kind: 'array'; readonly rows: readonly (readonly number[])[] }
  | {
      readonly kind: 'function';
      readonly params: readonly string[];
      readonly body: Tree;
      readonly scope: Scope;
    };

/** Names are compared without case, cell addresses without `$`. */
export function nameKey(name: string): string {
  return name.toUpperCase().replace(/\$/g, '');
}

/** Names visible at a place, innermost first. */
class Scope {
  private readonly values = new Map<string, Value>();

  constructor(private readonly outer?: Scope) {}

  find(key: string): Value | undefined {
    return this.values.get(key) ?? this.outer?.find(key);
  }

  set(key: string, value: Value): void {
    this.values.set(key, value);
  }
}

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
  constants: ReadonlyMap<string, number>,
): Tape {
  return new Compiler(variables, constants).product(sources);
}

class Compiler {
  private readonly steps: Step[] = [];
  private readonly known = new Map<string, number>();
  private readonly truths = new Set<number>();
  private readonly outermost = new Scope();
  private readonly variablePlaces: number[];
  private work = 0;
  private source!: Source;

  constructor(
    private readonly variables: readonly string[],
    private readonly constants: ReadonlyMap<string, number>,
  ) {
    this.variablePlaces = variables.map((name, i) => {
      const step = this.push(VARIABLE, [], `variable ${i}`, false);
      this.outermost.set(nameKey(name), { kind: 'step', step });
      return step;
    });
    for (const [name, value] of constants) {
      this.outermost.set(nameKey(name), { kind: 'step', step: this.number(value) });
    }
  }

  product(sources: readonly Source[]): Tape {
    const factors = sources.map((source) => {
      this.source = source;
      return this.step(this.body(source.tree), this.outermost);
    });
    const multiply = VOCABULARY.get('*')!.operation!;
    const root = factors.reduce((a, b) => this.apply(multiply, [a, b]));
    return prune(this.steps, root, this.variablePlaces);
  }

  /** A formula may be written as LAMBDA(x, …): its parameters are then the variables. */
  private body(tree: Tree): Tree {
    if (tree.kind !== 'lambda') return tree;
    if (tree.params.length !== this.variables.length) {
      throw this.error(
        tree.at,
        `LAMBDA has ${tree.params.length} parameters`,
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
    throw this.error(
      tree.at,
      'a LAMBDA where a number belongs',
      'give it its arguments in brackets',
    );
  }

  private value(tree: Tree, scope: Scope): Value {
    switch (tree.kind) {
      case 'number':
        return { kind: 'step', step: this.number(tree.value) };
      case 'truth':
        return { kind: 'step', step: this.call(tree.value ? 'TRUE' : 'FALSE', [], tree.at) };
      case 'text':
        throw this.error(
          tree.at,
          `the text "${tree.value}" where a number belongs`,
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
    if (value) return value;
    if (isCell) {
      const expected = name.includes(':')
        ? 'write its values as an array such as {1,2,3}'
        : `add a row ${name} | value to the givens, or write the value itself`;
      throw this.error(at, `"${name}" is a cell address with no given`, expected);
    }
    if (VOCABULARY.has(name.toUpperCase())) {
      throw this.error(
        at,
        `"${name}" is a function without its brackets`,
        `write ${name.toUpperCase()}(…)`,
      );
    }
    const known = [...this.variables, ...this.constants.keys()].join(', ');
    throw this.error(
      at,
      `"${name}" is not a known name`,
      `add it to the givens, or use one of: ${known}`,
    );
  }

  private let(tree: Extract<Tree, { kind: 'let' }>, scope: Scope): Value {
    const inner = new Scope(scope);
    for (const { name, value, at } of tree.bindings) {
      if (value.kind === 'lambda' && !scope.find(nameKey(name)) && callsItself(name, value.body)) {
        throw this.error(
          at,
          `${name} calls itself`,
          'recursion is not part of the formula language; write the steps out',
        );
      }
      inner.set(nameKey(name), this.value(value, inner));
    }
    return this.value(tree.body, inner);
  }

  private operator(tree: Extract<Tree, { kind: 'operator' }>, scope: Scope): Value {
    const { operator, at } = tree;
    if (tree.args.length === 1 && operator === '+') return this.value(tree.args[0]!, scope);
    const name = tree.args.length === 1 && operator === '-' ? 'negative' : operator;
    const row = VOCABULARY.get(name);
    if (!row || tree.args.length < row.least) {
      const why = operator === '&' ? 'joins text' : 'is not part of the formula language';
      throw this.error(
        at,
        `the operator "${operator}" ${why}`,
        'use + - * / ^ %, comparisons, AND and OR',
      );
    }
    return this.elementwise(
      row,
      tree.args.map((arg) => this.value(arg, scope)),
      at,
    );
  }

  private callTree(tree: Extract<Tree, { kind: 'call' }>, scope: Scope): Value {
    const { callee, at } = tree;
    const own =
      typeof callee === 'string' ? scope.find(nameKey(callee)) : this.value(callee, scope);
    if (own?.kind === 'function') return this.applyLambda(own, tree, scope);
    if (typeof callee !== 'string' || own) {
      throw this.error(
        at,
        'brackets after something that is not a function',
        'put * before the bracket to multiply',
      );
    }
    const row = VOCABULARY.get(callee.toUpperCase());
    if (!row || !/^[A-Z]/i.test(callee)) {
      throw this.error(
        at,
        `"${callee}" is not a known function`,
        `use one of: ${functionNames().join(', ')}`,
      );
    }
    this.checkCount(row, tree);
    const args = tree.args.map((arg): Value =>
      arg ? this.value(arg, scope) : { kind: 'step', step: this.number(0) },
    );
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
    throw this.error(at, 'a LAMBDA where a number belongs', 'give it its arguments in brackets');
  }

  private checkCount(row: Row, tree: Extract<Tree, { kind: 'call' }>): void {
    const n = tree.args.length;
    if (n >= row.least && n <= row.most) return;
    const { text, where } = this.source;
    const comma = text
      .split('')
      .findIndex((c, i) => i >= tree.at && c === ',' && isDecimalComma(text, i));
    if (comma >= 0) throw decimalComma(text, comma, where);
    const wanted =
      row.least === row.most
        ? `${row.least}`
        : row.most === Infinity
          ? `${row.least} or more`
          : `${row.least} to ${row.most}`;
    throw this.error(tree.at, `${row.name} has ${n} arguments`, `give it ${wanted}`);
  }

  private applyLambda(
    own: Extract<Value, { kind: 'function' }>,
    tree: Extract<Tree, { kind: 'call' }>,
    scope: Scope,
  ): Value {
    if (own.params.length !== tree.args.length) {
      throw this.error(
        tree.at,
        `a LAMBDA of ${own.params.length} parameters has ${tree.args.length} arguments`,
        `give it ${own.params.length}`,
      );
    }
    this.count(tree.at);
    const inner = new Scope(own.scope);
    own.params.forEach((name, i) => {
      const arg = tree.args[i];
      inner.set(
        nameKey(name),
        arg ? this.value(arg, scope) : { kind: 'step', step: this.number(0) },
      );
    });
    return this.value(own.body, inner);
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
    if (row.operation) return this.apply(row.operation, args);
    return row.rewrite!(this.maker(at), args);
  }

  private call(name: string, args: readonly number[], at: number): number {
    return this.applyRow(VOCABULARY.get(name)!, args, at);
  }

  private count(at: number): void {
    this.work++;
    if (this.work > MAX_OPERATIONS || this.steps.length > MAX_OPERATIONS) {
      throw this.error(
        at,
        `more than ${MAX_OPERATIONS} operations once LET and LAMBDA are written out`,
        'shorten the formula',
      );
    }
  }

  private maker(at: number): Maker {
    return {
      number: (value) => this.number(value),
      pi: () => {
        const pi = I.interval();
        I.setPi(pi);
        return this.constant(Math.PI, pi);
      },
      apply: (operation, ...args) => this.apply(operation, args),
      call: (name, ...args) => this.call(name, args, at),
      exactValue: (node) => {
        const { enclosure, value } = this.steps[node]!;
        return enclosure && enclosure.lo === enclosure.hi ? value : undefined;
      },
      isConstant: (node) => this.steps[node]!.isConstant,
      isTruth: (node) => this.truths.has(node),
      refuse: (found, expected) => this.error(at, found, expected),
    };
  }

  private number(value: number): number {
    return this.constant(value, I.interval(value));
  }

  private constant(value: number, enclosure: Interval): number {
    const key = `${value} ${enclosure.lo} ${enclosure.hi}`;
    return this.known.get(key) ?? this.push(NUMBER, [], key, true, value, enclosure);
  }

  private apply(operation: Operation, args: readonly number[]): number {
    const [a = 0, b = a, c = a] = args;
    if (operation === VOCABULARY.get('-')!.operation && a === b) return this.number(0);
    const key = `${operation.name}(${args.join()})`;
    const known = this.known.get(key);
    if (known !== undefined) return known;
    const isConstant = args.every((arg) => this.steps[arg]!.isConstant);
    const step =
      (isConstant ? this.fold(operation, a, b, c) : undefined) ??
      this.push(operation, args, key, isConstant);
    if (operation.isTruth) this.truths.add(step);
    return step;
  }

  /** The number that a step on numbers comes to; nothing where it is undefined or infinite. */
  private fold(operation: Operation, a: number, b: number, c: number): number | undefined {
    const [u, v, w] = [this.steps[a]!, this.steps[b]!, this.steps[c]!];
    if (!u.enclosure || !v.enclosure || !w.enclosure || operation.isTruth) return undefined;
    if (operation.defined && operation.defined(u.enclosure, v.enclosure) !== Defined.Everywhere)
      return undefined;
    const out = I.interval();
    operation.enclose(out, u.enclosure, v.enclosure, w.enclosure);
    if (!Number.isFinite(out.lo) || !Number.isFinite(out.hi)) return undefined;
    const value = out.lo === out.hi ? out.lo : operation.point(u.value, v.value, w.value);
    return this.constant(value, out);
  }

  private push(
    operation: Operation,
    args: readonly number[],
    key: string,
    isConstant: boolean,
    value = NaN,
    enclosure: Interval | null = null,
  ): number {
    const place = this.steps.length;
    const [a = place, b = a, c = a] = args;
    this.steps.push({ operation, a, b, c, nOperands: args.length, isConstant, value, enclosure });
    this.known.set(key, place);
    return place;
  }
}

function callsItself(name: string, tree: Tree): boolean {
  const key = nameKey(name);
  const within = (part: Tree | null): boolean => {
    if (part === null) return false;
    switch (part.kind) {
      case 'name':
        return nameKey(part.name) === key;
      case 'call':
        return (
          (typeof part.callee === 'string' ? nameKey(part.callee) === key : within(part.callee)) ||
          part.args.some(within)
        );
      case 'operator':
        return part.args.some(within);
      case 'array':
        return part.rows.some((row) => row.some(within));
      case 'let':
        return part.bindings.some((b) => within(b.value)) || within(part.body);
      case 'lambda':
        return within(part.body);
      default:
        return false;
    }
  };
  return within(tree);
}

/** Names of the functions of the vocabulary, operators left out. */
export function functionNames(): readonly string[] {
  return [...VOCABULARY.keys()].filter((name) => /^[A-Z]/.test(name));
}

/** Keeps the steps that the root needs. */
function prune(steps: readonly Step[], root: number, variables: readonly number[]): Tape {
  const isNeeded = new Uint8Array(steps.length);
  isNeeded[root] = 1;
  for (let i = root; i >= 0; i--) {
    const step = steps[i]!;
    if (isNeeded[i] && step.nOperands > 0)
      isNeeded[step.a] = isNeeded[step.b] = isNeeded[step.c] = 1;
  }
  const moved = new Int32Array(steps.length).fill(-1);
  const kept: Step[] = [];
  steps.forEach((step, i) => {
    if (!isNeeded[i]) return;
    moved[i] = kept.length;
    const place = (operand: number): number => (step.nOperands > 0 ? moved[operand]! : kept.length);
    kept.push({ ...step, a: place(step.a), b: place(step.b), c: place(step.c) });
  });
  return { steps: kept, root: moved[root]!, variables: variables.map((v) => moved[v]!) };
}
