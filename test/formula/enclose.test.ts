/**
 * Enclosures of whole formulas: random smooth compositions against differences at 44
 * digits, the logarithm that is built beside the value, scaling, and steps that turn.
 */
import { Encloser } from '../../src/formula/enclose';
import { Defined } from '../../src/formula/operation';
import type { Points } from '../numeric/points';
import { points } from '../numeric/points';
import { atan, big, Big, isBetween } from '../numeric/reference';
import { tapeOf } from './formulas';

/** A formula and the same in decimals. */
interface Composition {
  readonly text: string;
  readonly at: (x: Big) => Big;
}

type Build = (u: Composition, v: Composition) => Composition;

const ONE_ARGUMENT: readonly Build[] = [
  (u) => ({ text: `SIN(${u.text})`, at: (x) => u.at(x).sin() }),
  (u) => ({ text: `COS(${u.text})`, at: (x) => u.at(x).cos() }),
  (u) => ({ text: `ATAN(${u.text})`, at: (x) => atan(u.at(x)) }),
  (u) => ({ text: `TANH(${u.text})`, at: (x) => u.at(x).tanh() }),
  (u) => ({
    text: `EXP(-(${u.text})^2)`.replace('-(', '-1*('),
    at: (x) => u.at(x).pow(2).neg().exp(),
  }),
  (u) => ({ text: `LN(1+(${u.text})^2)`, at: (x) => u.at(x).pow(2).plus(1).ln() }),
  (u) => ({ text: `SQRT(1+(${u.text})^2)`, at: (x) => u.at(x).pow(2).plus(1).sqrt() }),
  (u) => ({ text: `(1+(${u.text})^2)^-1.5`, at: (x) => u.at(x).pow(2).plus(1).pow(-1.5) }),
  (u) => ({ text: `(${u.text})^3`, at: (x) => u.at(x).pow(3) }),
  (u) => ({ text: `(0-(${u.text}))`, at: (x) => u.at(x).neg() }),
];

const TWO_ARGUMENTS: readonly Build[] = [
  (u, v) => ({ text: `(${u.text}+${v.text})`, at: (x) => u.at(x).plus(v.at(x)) }),
  (u, v) => ({ text: `(${u.text}-${v.text})`, at: (x) => u.at(x).minus(v.at(x)) }),
  (u, v) => ({ text: `(${u.text})*(${v.text})`, at: (x) => u.at(x).times(v.at(x)) }),
  (u, v) => ({
    text: `(${u.text})/(1+(${v.text})^2)`,
    at: (x) => u.at(x).div(v.at(x).pow(2).plus(1)),
  }),
];

function composition(p: Points, depth: number): Composition {
  if (depth === 0) {
    const k = p.whole(-8, 8) / 4;
    return p.uniform() < 0.75
      ? { text: 'x', at: (x) => x }
      : { text: k < 0 ? `(${k})` : `${k}`, at: () => big(k) };
  }
  const build = p.uniform() < 0.55 ? p.pick(ONE_ARGUMENT) : p.pick(TWO_ARGUMENTS);
  return build(composition(p, depth - 1), composition(p, p.whole(0, depth - 1)));
}

/** Slope and curvature by differences: off by about 10^-24 and, from cancelling, 10^-18. */
function differences(f: (x: Big) => Big, x: number): readonly [Big, Big, Big] {
  const [at, h] = [big(x), new Big('1e-12')];
  const [below, here, above] = [f(at.minus(h)), f(at), f(at.plus(h))];
  return [
    here,
    above.minus(below).div(h.times(2)),
    above.plus(below).minus(here.times(2)).div(h.times(h)),
  ];
}

/** Within 10^-13 of an interval, where ten nested functions still leave the differences exact enough. */
function isNearly({ lo, hi }: { lo: number; hi: number }, t: Big): boolean {
  const value = t.toNumber();
  const slack = 1e-13 * (1 + Math.abs(value));
  return lo - slack <= value && value <= hi + slack;
}

describe('Encloser', () => {
  it('over(a, b) holds value, slope and curvature of 400 random compositions [law]', () => {
    const p = points(51);
    for (let i = 0; i < 400; i++) {
      const f = composition(p, p.whole(1, 4));
      const encloser = new Encloser(tapeOf(f.text));
      const [atA, atB] = [encloser.pointValues(), encloser.pointValues()];
      for (let k = 0; k < 3; k++) {
        const x = p.between(-3, 3);
        const width = k === 0 ? 0 : p.sized(1e-9, 1);
        const [a, b] = [x - width * p.uniform(), x + width * p.uniform()];
        encloser.at(a, atA);
        encloser.at(b, atB);
        const { density, defined } = encloser.over(
          a,
          b,
          k === 1 ? atA : null,
          k === 1 ? atB : null,
        );
        const [value, slope, curvature] = differences(f.at, x);
        const isHeld =
          defined === Defined.Everywhere &&
          isBetween(density.v.lo, value, density.v.hi) &&
          isNearly(density.d, slope) &&
          isNearly(density.h, curvature);
        if (!isHeld)
          throw new Error(
            `${f.text} at ${x} in [${a}, ${b}]: ${[value, slope, curvature].join(' ')} ${JSON.stringify(density)}`,
          );
      }
    }
  });

  it('over(a, b) fails the same check when the slope is off by 10^-6 [law]', () => {
    const { density } = new Encloser(tapeOf('SIN(x)')).over(1, 1, null, null);
    const [, slope] = differences((x) => x.sin(), 1);
    expect(isNearly(density.d, slope)).toBe(true);
    expect(isNearly(density.d, slope.times(1.000001))).toBe(false);
  });

  it('over(a, b).logarithm holds ln f, also where f itself overflows or underflows [law]', () => {
    const p = points(52);
    const exponent = (x: Big): Big => x.minus(2).pow(2).times(-5).plus(900);
    for (const [text, ln] of [
      ['EXP(900-5*(x-2)^2)', exponent],
      ['EXP(-900-x)*x^2', (x: Big) => x.neg().minus(900).plus(x.ln().times(2))],
      ['SQRT(EXP(-2000*x))/x', (x: Big) => x.times(-1000).minus(x.ln())],
      ['(3*x)^40*EXP(-x)', (x: Big) => x.times(3).ln().times(40).minus(x)],
      [
        'EXP(800*x)+EXP(800*x-1)',
        (x: Big) => x.times(800).plus(new Big(1).plus(new Big(-1).exp()).ln()),
      ],
    ] as const) {
      const encloser = new Encloser(tapeOf(text));
      for (let i = 0; i < 60; i++) {
        const a = p.between(0.5, 4);
        const b = a + (i % 3 === 0 ? 0 : p.sized(1e-6, 1));
        const x = Math.min(b, p.between(a, b));
        const { logarithm } = encloser.over(a, b, null, null);
        if (!isBetween(logarithm.lo, ln(big(x)), logarithm.hi))
          throw new Error(`${text} at ${x}: ${JSON.stringify(logarithm)}`);
        if (a === b) expect(logarithm.hi - logarithm.lo).toBeLessThan(1e-10);
      }
    }
  });

  it('an Encloser with an exponent e holds f × 2^-e with its slopes [law]', () => {
    const p = points(53);
    for (const [text, f, e] of [
      ['EXP(900-5*(x-2)^2)', (x: Big) => x.minus(2).pow(2).times(-5).plus(900).exp(), 1298],
      ['EXP(-900-x)', (x: Big) => x.neg().minus(900).exp(), -1300],
      ['1E200*(2+COS(7*x))', (x: Big) => x.times(7).cos().plus(2).times(big(1e200)), 660],
    ] as const) {
      const encloser = new Encloser(tapeOf(text), e);
      const scaled = (x: Big): Big => f(x).div(new Big(2).pow(e));
      for (let i = 0; i < 40; i++) {
        const a = p.between(1, 3);
        const b = a + (i % 2 === 0 ? 0 : p.sized(1e-6, 0.5));
        const x = Math.min(b, p.between(a, b));
        const [value, slope, curvature] = differences(scaled, x);
        const { density } = encloser.over(a, b, null, null);
        expect(isBetween(density.v.lo, value, density.v.hi)).toBe(true);
        expect(isNearly(density.d, slope) && isNearly(density.h, curvature)).toBe(true);
      }
    }
  });

  it('densityAt(x) holds 2^-e f(x) within 10^-12 of it where f overflows or underflows [law]', () => {
    const out = { lo: NaN, hi: NaN };
    new Encloser(tapeOf('EXP(900-x)'), 1298).densityAt(1, out);
    const value = new Big(899).exp().div(new Big(2).pow(1298));
    expect(isBetween(out.lo, value, out.hi)).toBe(true);
    expect((out.hi - out.lo) / out.hi).toBeLessThan(1e-12);
  });

  it.each([
    ['ABS(x-1)', true],
    ['MAX(x,1)', true],
    ['IF(x<1,2,3)', true],
    ['SQRT(x-1)', true],
    ['1/(x-1)', true],
    ['x+0*ABS(x+5)', false],
    ['IF(x<9,x,ABS(x-1))', false],
    ['x^2', false],
  ])('over(0, 2) of %s turns: %p [law]', (text, turns) => {
    const { turn } = new Encloser(tapeOf(text)).over(0, 2, null, null);
    expect(turn !== null).toBe(turns);
  });

  it('x^FALSE is 1, whose truth is known only to the enclosures [law]', () => {
    const { density } = new Encloser(tapeOf('x^(0.5<>0.5)')).over(0, 1, null, null);
    expect(density.v).toEqual({ lo: 1, hi: 1 });
  });

  it('a binomial coefficient of huge numbers is bounded at once [law]', () => {
    const encloser = new Encloser(tapeOf('COMBIN(x,x/2)'));
    const start = performance.now();
    const { density } = encloser.over(1e15, 1e15, null, null);
    expect(density.v.lo).toBeGreaterThan(1e290);
    expect(density.v.hi).toBe(Infinity);
    // A few thousand factors at most; one by one up to x/2 they would take years.
    expect(performance.now() - start).toBeLessThan(1000);
  });

  it('undefinedReason() names the innermost step that is undefined [law]', () => {
    const encloser = new Encloser(tapeOf('1+EXP(2*LN(x-5))'));
    encloser.over(0, 1, null, null);
    expect(encloser.undefinedReason()).toBe('LN takes a number that is not above 0');
  });
});
