/**
 * Random formulas of today's vocabulary with random limits, for fuzzing the proof: deep
 * compositions, kinks, jumps, poles, overflow and underflow, narrow spikes, cancellation.
 * Most are meant to be ≥ 0; some are not, so that refusals are fuzzed too.
 */
export interface RandomShape {
  readonly text: string;
  readonly from: number;
  readonly to: number;
}

type Random = () => number;
type Make = () => string;

/** The next random shape on finite limits; `random` gives numbers in [0, 1). */
export function randomShape(random: Random): RandomShape {
  const [from, to] = randomLimits(random);
  return { text: new Maker(random, from, to).density(), from, to };
}

/** The next random shape with an unbounded side, or with powers that have a pole at a limit. */
export function randomOpenShape(random: Random): RandomShape {
  const { text, from, to } = randomShape(random);
  const falls = ['EXP(-ABS(x))', '1/(1+x^2)', 'EXP(-(x^2))', '1', '(1+ABS(x))^-2.5', 'x^-0.3'];
  const shape = random() < 0.7 ? `(${text})*${falls[Math.floor(random() * falls.length)]!}` : text;
  const side = random();
  if (side < 0.3) return { text: shape, from: -Infinity, to: Infinity };
  if (side < 0.6) return { text: shape, from, to: Infinity };
  if (side < 0.75) return { text: shape, from: -Infinity, to };
  const pole = `(${from < 0 ? `x+${literal(-from)}` : `x-${literal(from)}`})`;
  const power = ['0.5', '0.9', '0.1', '0.25'][Math.floor(random() * 4)]!;
  return { text: `${pole}^(-${power})*(${text})`, from, to };
}

const SCALES = [1, 1, 1, 10, 10, 100, 1e3, 1e-2, 1e-6, 1e6, 1e12, 1e-12, 1e60, 1e-60];

function randomLimits(random: Random): [number, number] {
  const pick = <T>(from: readonly T[]): T => from[Math.floor(random() * from.length)]!;
  const kind = random();
  if (kind < 0.25)
    return pick([[0, 1] as const, [0, 6], [-3, 3], [0, 10], [-1, 1], [1, 4]]).slice() as [
      number,
      number,
    ];
  const scale = pick(SCALES);
  if (kind < 0.5) return [0, scale * (0.1 + random())];
  const a = scale * (2 * random() - 1);
  if (kind < 0.6) {
    // A short stretch far from 0, down to a few doubles.
    const width = Math.abs(a) * Math.pow(10, -1 - 14.9 * random());
    if (a + width > a) return [a, a + width];
  }
  const b = kind < 0.9 ? scale * (2 * random() - 1) : pick(SCALES) * (2 * random() - 1);
  return a < b ? [a, b] : b < a ? [b, a] : [a, a + 1 + Math.abs(a)];
}

class Maker {
  private depth = 0;
  private readonly names: string[] = [];

  constructor(
    private readonly random: Random,
    private readonly from: number,
    private readonly to: number,
  ) {}

  density(): string {
    const { positive, real } = this;
    return this.oneOf([
      [10, positive],
      [3, () => `${positive()}*${positive()}`],
      [3, () => `${positive()}+${positive()}`],
      [2, () => `MAX(0,${real()})`],
      [1, real],
      [2, () => this.spikes()],
      [2, () => this.cancelling()],
      [2, () => this.named()],
      [1, () => `LAMBDA(t,${positive().replace(/\bx\b/g, 't')})(x)`],
      [1, () => `IF(${this.inside()}>x,${positive()},${positive()})`],
    ]);
  }

  private oneOf(options: readonly (readonly [weight: number, make: Make])[]): string {
    const total = options.reduce((sum, [weight]) => sum + weight, 0);
    let at = this.random() * total;
    for (const [weight, make] of options) {
      at -= weight;
      if (at < 0) return make();
    }
    return options[0]![1]();
  }

  private pick<T>(from: readonly T[]): T {
    return from[Math.floor(this.random() * from.length)]!;
  }

  /** A point within the limits, sometimes an end or a hair off one. */
  private inside(): string {
    const { from, to, random } = this;
    const share = this.pick([random(), random(), random(), 0.5, 0, 1, 1e-9, 1 - 1e-9]);
    return literal(from + (to - from) * share);
  }

  /** A length like that of the limits, or much shorter. */
  private length(): string {
    const { from, to, random } = this;
    const length =
      (to - from) * this.pick([1, 0.3, 0.1, 0.03, 1e-3, 1e-6, 1e-9]) * (0.3 + random());
    return literal(length > 0 ? length : 1);
  }

  private number(): string {
    const { random } = this;
    return this.oneOf([
      [6, () => this.pick(['1', '2', '3', '0.5', '4', '10', '0.1', '7', '1.5', '0'])],
      [4, () => literal(Math.round(random() * 1000) / 100)],
      [2, () => `(-${literal(Math.round(random() * 1000) / 100)})`],
      [1, () => literal(Math.pow(10, 12 * random() - 6))],
      [0.4, () => this.pick(['1E100', '1E-100', '1E300', '1E-300', '1E15', '1E-15', 'PI()', '5%'])],
    ]);
  }

  /** x itself, or brought near 1. */
  private variable(): string {
    return this.oneOf([
      [4, () => 'x'],
      [5, () => `((x-${this.inside()})/${this.length()})`],
      [1, () => `(${this.number()}*x)`],
      [1, () => `(x-${this.inside()})`],
      [this.names.length, () => this.pick(this.names)],
    ]);
  }

  private deeper(make: Make, leaf: Make): string {
    this.depth++;
    const text = this.depth > 5 || this.random() < 0.12 * this.depth ? leaf() : make();
    this.depth--;
    return text;
  }

  private readonly real = (): string => {
    const { real, positive } = this;
    const leaf = (): string => (this.random() < 0.25 ? this.number() : this.variable());
    return this.deeper(
      () =>
        this.oneOf([
          [4, leaf],
          [3, () => `(${real()}+${real()})`],
          [3, () => `(${real()}-${real()})`],
          [3, () => `(${real()}*${real()})`],
          [1, () => `(${real()}/${positive()})`],
          [0.7, () => `(${real()}/${real()})`],
          [1.5, () => `(-(${real()}))`],
          [1, () => `SIN(${real()})`],
          [1, () => `COS(${real()})`],
          [0.4, () => `TAN(${real()})`],
          [1, () => `ATAN(${real()})`],
          [1, () => `TANH(${real()})`],
          [1, () => `LN(${positive()})`],
          [0.4, () => `LOG10(${positive()})`],
          [0.4, () => `LOG(${positive()},${this.pick(['2', '3', '0.5', '10'])})`],
          [
            1,
            () => `(${real()})^${this.pick(['2', '3', '4', '5', '7', '1', '0', '(-1)', '(-2)'])}`,
          ],
          [0.3, () => `POWER(${positive()},${real()})`],
          [1, () => `MIN(${real()},${real()})`],
          [1, () => `MAX(${real()},${real()})`],
          [1, () => `IF(${this.condition()},${real()},${real()})`],
          [0.5, () => `SIGN(${real()})`],
          [1, () => `ABS(${real()})`],
          [0.3, () => `AVERAGE(${real()},${real()},${real()})`],
          [1, positive],
        ]),
      leaf,
    );
  };

  private readonly positive = (): string => {
    const { real, positive } = this;
    const leaf = (): string =>
      this.oneOf([
        [2, () => `ABS(${this.variable()})`],
        [2, () => `${this.variable()}^2`],
        [3, () => `EXP(-(${this.variable()}^2))`],
        [2, () => `EXP(${this.variable()})`],
        [1, () => this.pick(['1', '2', '0.5', '0.001', '1E3'])],
        [1, () => `(${this.variable()}>${this.number()})`],
        [1, () => `SQRT(ABS(${this.variable()}))`],
      ]);
    return this.deeper(
      () =>
        this.oneOf([
          [4, leaf],
          [3, () => `EXP(${real()})`],
          [2, () => `EXP(-ABS(${real()}))`],
          [2, () => `(${real()})^2`],
          [0.7, () => `(${real()})^${this.pick(['4', '6', '(-2)', '(-4)'])}`],
          [2, () => `ABS(${real()})`],
          [1.5, () => `SQRT(${positive()})`],
          [3, () => `(${positive()}+${positive()})`],
          [3, () => `(${positive()}*${positive()})`],
          [2, () => `(${positive()}/(1+${positive()}))`],
          [0.7, () => `(${positive()}/${positive()})`],
          [1, () => `1/(1+(${real()})^2)`],
          [1, () => `1/(1+EXP(${real()}))`],
          [1, () => `(1+SIN(${real()}))`],
          [1, () => `(1-COS(${real()}))`],
          [1, () => `(1+TANH(${real()}))`],
          [1, () => `(2+ATAN(${real()}))`],
          [1, () => `LN(1+${positive()})`],
          [
            2,
            () =>
              `${positive()}^${this.pick(['0.5', '1.5', '2.5', '0.3', '3', '0.01', '(-0.5)', '17'])}`,
          ],
          [1, () => `MIN(${positive()},${positive()})`],
          [1, () => `MAX(${positive()},${positive()})`],
          [1, () => `MAX(0,${real()})`],
          [2, () => `IF(${this.condition()},${positive()},${positive()})`],
          [1.5, () => `${this.condition()}*${positive()}`],
          [1, () => `SUM({1,2,0.5}*EXP(-(((${real()})-{1,2,3})^2)))`],
          [0.5, () => `PRODUCT(1/(1+EXP(-(${this.variable()}-{1,2,3}))))`],
        ]),
      leaf,
    );
  };

  /** A truth in brackets. */
  private condition(): string {
    const { real } = this;
    return this.oneOf([
      [4, () => `(x${this.pick(['<', '>', '<=', '>='])}${this.inside()})`],
      [2, () => `(${real()}${this.pick(['<', '>', '<=', '>=', '<>', '='])}${real()})`],
      [1, () => `AND(x>${this.inside()},${real()}<${this.number()})`],
      [1, () => `OR(${real()}>${this.number()},x<${this.inside()})`],
      [0.5, () => `NOT(${real()}>${real()})`],
      [0.3, () => `AND(${real()},x>${this.inside()})`],
      [0.2, () => this.pick(['TRUE', 'FALSE', 'TRUE()'])],
    ]);
  }

  /** Lone spikes on a floor, or on none. */
  private spikes(): string {
    const { from, to, random } = this;
    const spike = (): string => {
      const width = (to - from) * Math.pow(10, -1 - 9 * random());
      const t = `((x-${this.inside()})/${literal(width > 0 ? width : 1)})`;
      const height = literal(Math.pow(10, 12 * random() - 6));
      return this.pick([
        `${height}*EXP(-(${t}^2))`,
        `${height}/(1+${t}^2)`,
        `${height}*MAX(0,1-ABS(${t}))`,
        `${height}*(ABS(${t})<1)`,
        `${height}*EXP(-ABS(${t}))`,
      ]);
    };
    const n = 1 + Math.floor(3 * random());
    const floor = this.pick(['', '', '1+', `${this.positive()}+`]);
    return floor + Array.from({ length: n }, spike).join('+');
  }

  /** Formulas whose large terms cancel. */
  private cancelling(): string {
    const a = this.pick(['1', '2', '0.5', '3', this.inside()]);
    const t = this.variable();
    return this.pick([
      `x^4-4*x^3+6*x^2-4*x+1`,
      `x^2-2*${a}*x+${a}^2`,
      `(1+${t})^2-1-2*${t}`,
      `EXP(${t})-1-${t}`,
      `1-COS(${t})`,
      `SQRT(1+${t}^2)-1`,
      `(${a}+${t}^2)-${a}`,
      `1-TANH(${t})^2`,
      `(EXP(${t})+EXP(-(${t})))/2-1`,
      `ABS(${t}-SIN(${t}))`,
      `(1E16+${t}^2)-1E16`,
      `MAX(0,SIN(${t})-${t}+${t}^3/6)`,
      `${t}-${t}+1`,
      `EXP(700+${t})/EXP(690)`,
      `EXP(800-${t}^2)`,
      `EXP(-900-ABS(${t}))`,
      `EXP(-(${t}^2)*1000)`,
    ]);
  }

  /** Parts named with LET. */
  private named(): string {
    const value = this.real();
    this.names.push('u');
    const body = this.positive();
    this.names.pop();
    return `LET(u,${value},${body})`;
  }
}

/** A number as a formula writes it, negative ones in brackets. */
function literal(x: number): string {
  const text = String(Math.abs(x)).replace('e+', 'E').replace('e-', 'E-');
  return x < 0 ? `(-${text})` : text;
}
