/**
 * A formula's value at a point, worked straight from its parsed tree: an oracle for the
 * tests that shares nothing with the compiler, the vocabulary or the intervals.
 *
 * Twice: in doubles with the engine's own Math (fast, for screening many points) and in
 * 60 decimal digits (it decides). NaN stands for "undefined". Written for the formulas
 * that tests make: names, arities and array sizes are taken to be right.
 * Not handled: everything the compiler refuses.
 */
import { Decimal } from 'decimal.js';
import { parse } from '../../src/formula/parse';
import type { Tree } from '../../src/formula/tree';

/** What a number system must offer. */
interface Arithmetic<T> {
  readonly of: (x: number) => T;
  readonly pi: T;
  readonly add: (a: T, b: T) => T;
  readonly subtract: (a: T, b: T) => T;
  readonly multiply: (a: T, b: T) => T;
  readonly divide: (a: T, b: T) => T;
  readonly power: (a: T, b: T) => T;
  readonly exp: (a: T) => T;
  readonly ln: (a: T) => T;
  readonly sqrt: (a: T) => T;
  readonly sin: (a: T) => T;
  readonly cos: (a: T) => T;
  readonly tan: (a: T) => T;
  readonly atan: (a: T) => T;
  readonly tanh: (a: T) => T;
  /** −1, 0, 1 or NaN. */
  readonly sign: (a: T) => number;
}

const doubles: Arithmetic<number> = {
  of: (x) => x,
  pi: Math.PI,
  add: (a, b) => a + b,
  subtract: (a, b) => a - b,
  multiply: (a, b) => a * b,
  divide: (a, b) => (b === 0 ? NaN : a / b),
  power: (a, b) => (a === 0 && b <= 0 ? NaN : Math.pow(a, b)),
  exp: Math.exp,
  ln: (a) => (a === 0 ? NaN : Math.log(a)),
  sqrt: Math.sqrt,
  sin: Math.sin,
  cos: Math.cos,
  tan: Math.tan,
  atan: Math.atan,
  tanh: Math.tanh,
  sign: Math.sign,
};

/** Decimals of 60 digits, and of 680 where 60 may have cancelled: enough for 1 + 5E-324, squared. */
export const Precise = Decimal.clone({ precision: 60, minE: -9e15, maxE: 9e15 });
const VeryPrecise = Decimal.clone({ precision: 680, minE: -9e15, maxE: 9e15 });

/** Beyond this decimals have no exponent for EXP, and take for ever over waves: both count as unknown. */
const FAR = 1e14;

function decimals(Kind: typeof Decimal): Arithmetic<Decimal> {
  const undefinedValue = new Kind(NaN);
  const nearOnly = (f: (a: Decimal) => Decimal) => (a: Decimal) =>
    a.abs().lt(FAR) ? f(a) : undefinedValue;
  const ln10 = new Kind(10).ln();
  /** e^a with the powers of ten taken out first, which is what makes it quick far from 0. */
  const exponential = (a: Decimal): Decimal => {
    const k = a.div(ln10).round();
    return a
      .minus(k.times(ln10))
      .exp()
      .times(new Kind(`1e${k.toFixed()}`));
  };
  return {
    of: (x) => exactly(x, Kind),
    pi: Kind.acos(-1),
    add: (a, b) => a.plus(b),
    subtract: (a, b) => a.minus(b),
    multiply: (a, b) => a.times(b),
    divide: (a, b) => (b.isZero() ? undefinedValue : a.div(b)),
    power: (a, b) => (a.isZero() && !b.gt(0) ? undefinedValue : a.pow(b)),
    exp: nearOnly(exponential),
    ln: (a) => (a.gt(0) ? a.ln() : undefinedValue),
    sqrt: (a) => (a.lt(0) ? undefinedValue : a.sqrt()),
    sin: nearOnly((a) => a.sin()),
    cos: nearOnly((a) => a.cos()),
    tan: nearOnly((a) => a.tan()),
    atan: (a) => a.atan(),
    tanh: (a) => (a.abs().lt(1000) ? a.tanh() : new Kind(Math.sign(a.toNumber()))),
    sign: (a) => (a.isNaN() ? NaN : a.isZero() ? 0 : a.isNegative() ? -1 : 1),
  };
}

/** The double itself, to more digits than it has beside its neighbours, not its shortest decimal name. */
function exactly(x: number, Kind: typeof Decimal): Decimal {
  return new Kind(Number.isSafeInteger(x) || !Number.isFinite(x) ? x : x.toPrecision(100));
}

/** A double as a decimal. */
export function preciseOf(x: number): Decimal {
  return exactly(x, Precise);
}

type Code<T> = (x: T) => T;
type Meaning<T> =
  | { readonly kind: 'code'; readonly code: Code<T> }
  | { readonly kind: 'array'; readonly rows: readonly (readonly Code<T>[])[] }
  | { readonly kind: 'lambda'; readonly call: (args: readonly Meaning<T>[]) => Meaning<T> };
type Names<T> = ReadonlyMap<string, Meaning<T>>;

const key = (name: string): string => name.toUpperCase().replace(/\$/g, '');

class Reader<T> {
  private readonly one: T;
  private readonly zero: T;
  private readonly none: T;

  constructor(private readonly math: Arithmetic<T>) {
    this.one = math.of(1);
    this.zero = math.of(0);
    this.none = math.of(NaN);
  }

  read(tree: Tree, names: Names<T>): Meaning<T> {
    const { math } = this;
    switch (tree.kind) {
      case 'number': {
        const value = math.of(tree.value);
        return this.code(() => value);
      }
      case 'truth':
        return this.code(() => (tree.value ? this.one : this.zero));
      case 'text':
        throw new Error(`text "${tree.value}"`);
      case 'name':
        return names.get(key(tree.name))!;
      case 'array':
        return {
          kind: 'array',
          rows: tree.rows.map((row) => row.map((element) => this.codeOf(element, names))),
        };
      case 'let': {
        const inner = new Map(names);
        for (const { name, value } of tree.bindings) inner.set(key(name), this.read(value, inner));
        return this.read(tree.body, inner);
      }
      case 'lambda':
        return {
          kind: 'lambda',
          call: (args) =>
            this.read(
              tree.body,
              new Map([...names, ...tree.params.map((p, i) => [key(p), args[i]!] as const)]),
            ),
        };
      case 'operator':
        return this.each(
          tree.args.length === 1 ? `unary ${tree.operator}` : tree.operator,
          tree.args.map((arg) => this.read(arg, names)),
        );
      case 'call':
        return this.call(tree, names);
    }
  }

  codeOf(tree: Tree, names: Names<T>): Code<T> {
    const meaning = this.read(tree, names);
    if (meaning.kind !== 'code') throw new Error(`${meaning.kind} where a number belongs`);
    return meaning.code;
  }

  private code(code: Code<T>): Meaning<T> {
    return { kind: 'code', code };
  }

  private call(tree: Extract<Tree, { kind: 'call' }>, names: Names<T>): Meaning<T> {
    const args = tree.args.map((arg) => this.read(arg!, names));
    const own =
      typeof tree.callee === 'string' ? names.get(key(tree.callee)) : this.read(tree.callee, names);
    if (own?.kind === 'lambda') return own.call(args);
    const name = key(tree.callee as string);
    const many = this.ofMany(name);
    if (many) return this.code(many(args.flatMap(elements)));
    return this.each(name, args);
  }

  /** Functions of any number of numbers. */
  private ofMany(name: string): ((args: readonly Code<T>[]) => Code<T>) | undefined {
    const { math } = this;
    const fold = (f: (a: T, b: T) => T) => (args: readonly Code<T>[]) => (x: T) =>
      args.slice(1).reduce((sum, arg) => f(sum, arg(x)), args[0]!(x));
    const pick = (wanted: 1 | -1) =>
      fold((a, b) => {
        const sign = math.sign(math.subtract(a, b));
        return sign !== sign ? this.none : sign === wanted ? a : b;
      });
    const gate = (isAnd: boolean) => (args: readonly Code<T>[]) => (x: T) => {
      const truths = args.map((arg) => math.sign(arg(x)));
      if (truths.some((t) => t !== t)) return this.none;
      return (isAnd ? truths.every((t) => t !== 0) : truths.some((t) => t !== 0))
        ? this.one
        : this.zero;
    };
    switch (name) {
      case 'SUM':
        return fold(math.add);
      case 'PRODUCT':
        return fold(math.multiply);
      case 'AVERAGE':
        return (args) => (x) => math.divide(fold(math.add)(args)(x), math.of(args.length));
      case 'MIN':
        return pick(-1);
      case 'MAX':
        return pick(1);
      case 'AND':
        return gate(true);
      case 'OR':
        return gate(false);
      default:
        return undefined;
    }
  }

  /** Element by element over arrays; a single row or column is repeated. */
  private each(name: string, args: readonly Meaning<T>[]): Meaning<T> {
    const arrays = args.filter((arg) => arg.kind === 'array');
    const make = (codes: readonly Code<T>[]): Code<T> => this.apply(name, codes);
    if (arrays.length === 0) return this.code(make(args.map((arg) => elements(arg)[0]!)));
    const nRows = Math.max(...arrays.map(({ rows }) => rows.length));
    const nColumns = Math.max(...arrays.map(({ rows }) => rows[0]!.length));
    const at = (arg: Meaning<T>, i: number, j: number): Code<T> => {
      if (arg.kind !== 'array') return elements(arg)[0]!;
      const row = arg.rows[arg.rows.length === 1 ? 0 : i]!;
      return row[row.length === 1 ? 0 : j]!;
    };
    const rows = Array.from({ length: nRows }, (_, i) =>
      Array.from({ length: nColumns }, (__, j) => make(args.map((arg) => at(arg, i, j)))),
    );
    return { kind: 'array', rows };
  }

  private apply(name: string, args: readonly Code<T>[]): Code<T> {
    const { math } = this;
    const [a, b, c] = args;
    const one =
      (f: (u: T) => T): Code<T> =>
      (x) =>
        f(a!(x));
    const two =
      (f: (u: T, v: T) => T): Code<T> =>
      (x) =>
        f(a!(x), b!(x));
    const compare = (holds: (sign: number) => boolean): Code<T> =>
      two((u, v) => {
        const sign = math.sign(math.subtract(u, v));
        return sign !== sign ? this.none : holds(sign) ? this.one : this.zero;
      });
    const negative = (u: T): T => math.subtract(this.zero, u);
    switch (name) {
      case '+':
        return two(math.add);
      case '-':
        return two(math.subtract);
      case '*':
        return two(math.multiply);
      case '/':
        return two(math.divide);
      case '^':
      case 'POWER':
        return two(math.power);
      case 'unary -':
        return one(negative);
      case 'unary +':
        return a!;
      case 'unary %':
        return one((u) => math.divide(u, math.of(100)));
      case '<':
        return compare((sign) => sign < 0);
      case '>':
        return compare((sign) => sign > 0);
      case '<=':
        return compare((sign) => sign <= 0);
      case '>=':
        return compare((sign) => sign >= 0);
      case '=':
        return compare((sign) => sign === 0);
      case '<>':
        return compare((sign) => sign !== 0);
      case 'PI':
        return () => math.pi;
      case 'TRUE':
        return () => this.one;
      case 'FALSE':
        return () => this.zero;
      case 'ABS':
        return one((u) => (math.sign(u) < 0 ? negative(u) : u));
      case 'SIGN':
        return one((u) => math.of(math.sign(u)));
      case 'SQRT':
        return one(math.sqrt);
      case 'EXP':
        return one(math.exp);
      case 'LN':
        return one(math.ln);
      case 'LOG10':
        return one((u) => math.divide(math.ln(u), math.ln(math.of(10))));
      case 'LOG':
        return b
          ? two((u, v) => math.divide(math.ln(u), math.ln(v)))
          : one((u) => math.divide(math.ln(u), math.ln(math.of(10))));
      case 'SIN':
        return one(math.sin);
      case 'COS':
        return one(math.cos);
      case 'TAN':
        return one(math.tan);
      case 'ATAN':
        return one(math.atan);
      case 'TANH':
        return one(math.tanh);
      case 'NOT':
        return one((u) => {
          const sign = math.sign(u);
          return sign !== sign ? this.none : sign === 0 ? this.one : this.zero;
        });
      case 'IF':
        return (x) => {
          const sign = math.sign(a!(x));
          return sign !== sign ? this.none : sign !== 0 ? b!(x) : c ? c(x) : this.zero;
        };
      default:
        throw new Error(`the oracle does not know "${name}"`);
    }
  }
}

function elements<T>(meaning: Meaning<T>): readonly Code<T>[] {
  if (meaning.kind === 'code') return [meaning.code];
  if (meaning.kind === 'array') return meaning.rows.flat();
  throw new Error('a LAMBDA where a number belongs');
}

/** The function of x that a formula states, in one arithmetic. */
function functionOf<T>(
  text: string,
  math: Arithmetic<T>,
  constants: ReadonlyMap<string, number>,
): (x: number) => T {
  const reader = new Reader(math);
  const named: Names<T> = new Map([
    ...[...constants].map(([name, value]) => {
      const fixed = math.of(value);
      return [key(name), { kind: 'code', code: () => fixed }] as const;
    }),
    ['X', { kind: 'code', code: (x: T) => x }] as const,
  ]);
  const code = reader.codeOf(parse(text, 'Formula'), named);
  return (x) => code(math.of(x));
}

/** NaN where the decimals' own constants do not reach far enough; that leaves their precision changed. */
function orUnknown(f: (x: number) => Decimal, Kind: typeof Decimal): (x: number) => Decimal {
  const { precision } = Kind;
  return (x) => {
    try {
      return f(x);
    } catch (error) {
      if (!/Precision limit/.test(String(error))) throw error;
      Kind.set({ precision });
      new Kind(2).ln();
      return new Kind(NaN);
    }
  };
}

export interface Reference {
  /** In doubles. */
  readonly plain: (x: number) => number;
  /** In 60 digits. */
  readonly precise: (x: number) => Decimal;
  /** In 680 digits, for a second look. */
  readonly veryPrecise: (x: number) => Decimal;
}

/** The density that a formula in x states. */
export function referenceOf(
  text: string,
  constants: ReadonlyMap<string, number> = new Map(),
): Reference {
  return {
    plain: functionOf(text, doubles, constants),
    precise: orUnknown(functionOf(text, decimals(Precise), constants), Precise),
    veryPrecise: orUnknown(functionOf(text, decimals(VeryPrecise), constants), VeryPrecise),
  };
}
