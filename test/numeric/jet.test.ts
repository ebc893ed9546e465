import fc from 'fast-check';
import type { Interval } from '../../src/numeric/interval';
import * as I from '../../src/numeric/interval';
import type { Jet } from '../../src/numeric/jet';
import * as J from '../../src/numeric/jet';
import type { Dyadic } from './dyadic';
import { dyadic, isAtLeast, isAtMost, minus, plus, times } from './dyadic';
import type { Big } from './reference';
import { big, isBetween } from './reference';

const RUNS = { seed: 303, numRuns: 2000 };
const moderate = fc.double({ min: -1e6, max: 1e6, noNaN: true });

/** An enclosure and a number in it. */
const held = fc
  .tuple(moderate, fc.double({ min: 0, max: 10, noNaN: true }), fc.boolean())
  .map(([x, w, isPoint]): readonly [Interval, number] => [
    isPoint ? I.interval(x) : I.interval(x - w, x + w / 3),
    x,
  ]);

/** A jet that holds the value, slope and curvature of some function at one point. */
interface Held {
  readonly jet: Jet;
  readonly f: number;
  readonly d: number;
  readonly h: number;
}

const heldJet = fc.tuple(held, held, held).map(([[v, f], [d, slope], [h, curvature]]): Held => ({
  jet: { v, d, h },
  f,
  d: slope,
  h: curvature,
}));

const isIn = ({ lo, hi }: Interval, exact: Dyadic): boolean =>
  isAtMost(lo, exact) && isAtLeast(hi, exact);

const twice = (a: Dyadic): Dyadic => ({ m: a.m, e: a.e + 1 });

type Exact = readonly [Dyadic, Dyadic, Dyadic];
const exactOf = ({ f, d, h }: Held): Exact => [dyadic(f), dyadic(d), dyadic(h)];

const RULES: readonly [
  string,
  (out: Jet, a: Jet, b: Jet) => void,
  (a: Exact, b: Exact) => Exact,
][] = [
  ['addJet', J.addJet, ([f, d, h], [g, e, k]) => [plus(f, g), plus(d, e), plus(h, k)]],
  [
    'subtractJet',
    J.subtractJet,
    ([f, d, h], [g, e, k]) => [plus(f, minus(g)), plus(d, minus(e)), plus(h, minus(k))],
  ],
  [
    'multiplyJet',
    J.multiplyJet,
    // (fg)′ = f′g + fg′, (fg)″ = f″g + 2f′g′ + fg″.
    ([f, d, h], [g, e, k]) => [
      times(f, g),
      plus(times(d, g), times(f, e)),
      plus(plus(times(h, g), twice(times(d, e))), times(f, k)),
    ],
  ],
];

describe('rules for two jets', () => {
  it.each(RULES)('%s(out, a, b) holds value, slope and curvature [law]', (_, rule, exactly) => {
    const out = J.jet();
    fc.assert(
      fc.property(heldJet, heldJet, (a, b) => {
        rule(out, a.jet, b.jet);
        const [f, d, h] = exactly(exactOf(a), exactOf(b));
        return isIn(out.v, f) && isIn(out.d, d) && isIn(out.h, h);
      }),
      RUNS,
    );
  });

  it('divideJet(out, a, b) holds value, slope and curvature where b is not 0 [law]', () => {
    const out = J.jet();
    const away = heldJet.filter(({ jet }) => !I.holds(jet.v, 0));
    fc.assert(
      fc.property(heldJet, away, (a, b) => {
        J.divideJet(out, a.jet, b.jet);
        const [f, d, h, g, e, k] = [a.f, a.d, a.h, b.f, b.d, b.h].map(big) as Six;
        // From f = q g: f′ = q′g + qg′, f″ = q″g + 2q′g′ + qg″, solved for q, q′, q″.
        const q = f.div(g);
        const slope = d.minus(q.times(e)).div(g);
        const curvature = h.minus(slope.times(e).times(2)).minus(q.times(k)).div(g);
        return holdsAll(out, q, slope, curvature);
      }),
      RUNS,
    );
  });

  it('divideJet knows no slope where b may be 0 [law]', () => {
    const out = J.jet();
    const across = { v: I.interval(-1, 1), d: I.interval(1), h: I.interval(0) };
    J.divideJet(out, { v: I.interval(1), d: I.interval(0), h: I.interval(0) }, across);
    expect([out.d.lo, out.d.hi, out.h.lo, out.h.hi]).toEqual([
      -Infinity,
      Infinity,
      -Infinity,
      Infinity,
    ]);
  });
});

type Six = [Big, Big, Big, Big, Big, Big];

function holdsAll({ v, d, h }: Jet, f: Big, slope: Big, curvature: Big): boolean {
  return (
    isBetween(v.lo, f, v.hi) && isBetween(d.lo, slope, d.hi) && isBetween(h.lo, curvature, h.hi)
  );
}

describe('rules for one jet', () => {
  it('negateJet and scaleJet hold value, slope and curvature [law]', () => {
    const out = J.jet();
    fc.assert(
      fc.property(heldJet, held, (a, [k, factor]) => {
        J.negateJet(out, a.jet);
        const [f, d, h] = exactOf(a);
        if (!(isIn(out.v, minus(f)) && isIn(out.d, minus(d)) && isIn(out.h, minus(h))))
          return false;
        J.scaleJet(out, a.jet, k);
        const by = dyadic(factor);
        return isIn(out.v, times(f, by)) && isIn(out.d, times(d, by)) && isIn(out.h, times(h, by));
      }),
      RUNS,
    );
  });

  it('chain(out, u, g′, g″) holds g′u′ and g″u′² + g′u″ [law]', () => {
    const out = J.jet();
    fc.assert(
      fc.property(heldJet, held, held, (u, [slope, g1], [curvature, g2]) => {
        // Both may be overwritten, so copies go in.
        J.chain(out, u.jet, I.interval(slope.lo, slope.hi), I.interval(curvature.lo, curvature.hi));
        const [, d, h] = exactOf(u);
        const [first, second] = [dyadic(g1), dyadic(g2)];
        return (
          isIn(out.d, times(first, d)) &&
          isIn(out.h, plus(times(second, times(d, d)), times(first, h)))
        );
      }),
      RUNS,
    );
  });

  it('hullJet holds both jets and meetJet what both hold [law]', () => {
    const out = J.jet();
    fc.assert(
      fc.property(heldJet, heldJet, (a, b) => {
        J.hullJet(out, a.jet, b.jet);
        const parts = [
          [out.v, a.f, b.f],
          [out.d, a.d, b.d],
          [out.h, a.h, b.h],
        ] as const;
        if (!parts.every(([hull, p, q]) => I.holds(hull, p) && I.holds(hull, q))) return false;
        J.meetJet(out, a.jet);
        return out.v.lo === a.jet.v.lo && out.d.hi === a.jet.d.hi && out.h.lo === a.jet.h.lo;
      }),
      RUNS,
    );
  });

  it('setConstantSlopes, setJump and setUnknown say what they are named for [law]', () => {
    const out = J.jet();
    I.set(out.v, 1, 2);
    J.setConstantSlopes(out);
    expect(out).toEqual({ v: { lo: 1, hi: 2 }, d: { lo: 0, hi: 0 }, h: { lo: 0, hi: 0 } });
    J.setJump(out);
    const everything = { lo: -Infinity, hi: Infinity };
    expect(out).toEqual({ v: { lo: 1, hi: 2 }, d: everything, h: everything });
    J.setUnknown(out);
    expect(out).toEqual({ v: everything, d: everything, h: everything });
  });
});

describe('known jets', () => {
  // x³/(1 + x²) over the single point 2: value 8/5, slope (3x²+x⁴)/(1+x²)² = 28/25,
  // curvature (6x − 2x³)/(1+x²)³ = −4/125. Its terms are at most 12, stepped outward by an ulp of
  // 1.8e-15 in at most 25 operations on either side and divided by 5: below 2e-14.
  it('the jet of x³/(1 + x²) at 2 is 1.6, 1.12, −0.032 to 2·10^-14 [law]', () => {
    const x: Jet = { v: I.interval(2), d: I.interval(1), h: I.interval(0) };
    const one: Jet = { v: I.interval(1), d: I.interval(0), h: I.interval(0) };
    const [square, cube, below, out] = [J.jet(), J.jet(), J.jet(), J.jet()];
    J.multiplyJet(square, x, x);
    J.multiplyJet(cube, square, x);
    J.addJet(below, one, square);
    J.divideJet(out, cube, below);
    for (const [part, value] of [
      [out.v, 1.6],
      [out.d, 1.12],
      [out.h, -0.032],
    ] as const) {
      expect(I.holds(part, value)).toBe(true);
      expect(part.hi - part.lo).toBeLessThan(2e-14);
    }
  });
});
