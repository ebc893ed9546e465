import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { functionNames } from '../../src/formula/compile';
import { Encloser } from '../../src/formula/enclose';
import { evaluator } from '../../src/formula/evaluate';
import { Defined } from '../../src/formula/operation';
import { VOCABULARY } from '../../src/formula/vocabulary';
import { points } from '../numeric/points';
import { big, Big, errorInUlps, isBetween } from '../numeric/reference';
import { refusalOf, tapeOf } from './formulas';
import type { Use } from './uses';
import { USES } from './uses';

const N_POINTS = 60;
const N_INTERVALS = 1000;
const N_SLOPES = 200;

const uses = Object.entries(USES).flatMap(([name, list]) =>
  list.map((use): readonly [string, string, Use] => [use.text, name, use]),
);

/** Intervals inside the domain of a use: single points, slivers, wide ones, all of it; with a point inside. */
function* intervalsOf(
  { from, to, breaks }: Use,
  n: number,
): Generator<readonly [number, number, number]> {
  const p = points(41);
  yield [from, to, from];
  for (let i = 1; i < n; i++) {
    const isNearBreak = breaks.length > 0 && i % 5 === 0;
    const a = isNearBreak ? p.pick(breaks) - p.sized(1e-15, 0.1) : p.between(from, to);
    const width = i % 7 === 0 ? 0 : p.sized(1e-12, to - from);
    const [lo, hi] = [Math.max(from, a), Math.min(to, Math.max(from, a) + width)];
    const x = i % 3 === 0 ? p.pick([lo, hi]) : p.between(lo, hi);
    yield [lo, hi, Math.min(hi, Math.max(lo, x))];
  }
}

describe('VOCABULARY', () => {
  it('every row is tried in uses.ts, rules.ts, steps.test.ts or vectors/values.txt [law]', () => {
    const texts = ['rules.ts', 'steps.test.ts', 'vectors/values.txt'].map((file) =>
      readFileSync(join(__dirname, file), 'utf8'),
    );
    const isTried = (name: string): boolean =>
      name in USES || texts.some((text) => text.includes(`${name}(`));
    expect([...VOCABULARY.keys()].filter((name) => !isTried(name))).toEqual([]);
    expect(isTried('NO.SUCH.ROW')).toBe(false);
  });

  it.each(uses)('%s has the value of the reference [law]', (text, _, use) => {
    const valueAt = evaluator(tapeOf(text));
    const p = points(42);
    for (let i = 0; i < N_POINTS; i++) {
      const x = p.between(use.from, use.to);
      expect(errorInUlps(valueAt(x), use.reference(big(x)))).toBeLessThanOrEqual(use.ulps);
    }
  });

  it.each(uses)(
    '%s over an interval holds its value at every point of it [law]',
    (text, _, use) => {
      const encloser = new Encloser(tapeOf(text));
      const [atA, atB] = [encloser.pointValues(), encloser.pointValues()];
      for (const [a, b, x] of intervalsOf(use, N_INTERVALS)) {
        encloser.at(a, atA);
        encloser.at(b, atB);
        const { density, defined } = encloser.over(a, b, atA, atB);
        const t = use.reference(big(x));
        const isHeld = isBetween(density.v.lo, t, density.v.hi);
        if (defined !== Defined.Everywhere || !isHeld)
          throw new Error(
            `${text} at ${x}: ${t.toString()} not in ${JSON.stringify([a, b, density.v])}`,
          );
      }
    },
  );

  it.each(uses)('%s over an interval holds its slope and curvature [law]', (text, _, use) => {
    const encloser = new Encloser(tapeOf(text));
    for (const [a, b, x] of intervalsOf(use, N_SLOPES)) {
      // Inside the interval and clear of the breaks, so that differences do not reach over them.
      const step = Math.max(Math.abs(x) * 1e-10, 1e-14);
      if (use.breaks.some((at) => Math.abs(x - at) <= step)) continue;
      const { density } = encloser.over(a, b, null, null);
      const [slope, curvature] = differences(use.reference, x, step);
      const found = JSON.stringify([x, a, b, density.d, density.h]);
      if (!isNearlyBetween(density.d, slope)) throw new Error(`slope ${slope.toString()} ${found}`);
      if (!isNearlyBetween(density.h, curvature))
        throw new Error(`curvature ${curvature.toString()} ${found}`);
    }
  });

  it('the density over a point is at most a few ulps wide [law]', () => {
    for (const [text, , use] of uses) {
      const encloser = new Encloser(tapeOf(text));
      const p = points(43);
      for (let i = 0; i < 20; i++) {
        const x = p.between(use.from, use.to);
        const values = encloser.pointValues();
        encloser.at(x, values);
        const { lo, hi } = values.density;
        const size = Math.max(Math.abs(lo), Math.abs(hi));
        // Twice what the value may be off, in ulps, and the room of the enclosure on top.
        expect((hi - lo) / (size || 1)).toBeLessThan((6 * use.ulps + 12) * 2 ** -52);
      }
    }
  });
});

/**
 * Slope and curvature by differences at 44 digits: off by about step² of the next
 * derivatives, and by 10^-44 over step and step².
 */
function differences(f: (x: Big) => Big, x: number, step: number): readonly [Big, Big] {
  const [at, h] = [big(x), big(step)];
  const [below, here, above] = [f(at.minus(h)), f(at), f(at.plus(h))];
  return [
    above.minus(below).div(h.times(2)),
    above.plus(below).minus(here.times(2)).div(h.times(h)),
  ];
}

/** Within 10^-14 of an interval: the differences reach 10^-10 of x to either side. */
function isNearlyBetween({ lo, hi }: { lo: number; hi: number }, t: Big): boolean {
  const slack = t.abs().plus(1).times(1e-14).toNumber();
  const value = t.toNumber();
  return lo <= value + slack && value - slack <= hi;
}

describe('arity', () => {
  const named = functionNames().map((name) => VOCABULARY.get(name)!);
  const call = (name: string, n: number): string =>
    `${name}(${Array.from({ length: n }, () => 'x').join(',')})`;
  const counted = (n: number): string => `${n} argument${n === 1 ? '' : 's'}`;

  it.each(named.map((row) => [row.name, row] as const))(
    '%s takes no fewer and no more arguments than its row says [law]',
    (name, { least, most }) => {
      const wanted =
        most === 0
          ? `write ${name}()`
          : least === most
            ? `give it ${least}`
            : most === Infinity
              ? `give it ${least} or more`
              : `give it ${least} to ${most}`;
      const wrong = [least - 1, most + 1].filter((n) => n >= 0 && n < Infinity);
      for (const n of wrong) {
        expect(refusalOf(call(name, n))).toBe(
          `Formula, character 1: ${name} has ${counted(n)}; ${wanted}.`,
        );
      }
      expect(wrong.length).toBeGreaterThan(0);
      // Some want constants where x stands here; none may complain about the count.
      for (let n = least; n <= Math.min(most, least + 3); n++)
        expect(refusalOf(call(name, n))).not.toContain(`${name} has`);
    },
  );

  it('names are found in any case and blank arguments are 0 [law]', () => {
    expect(tapeOf('sQrT(x)').steps).toEqual(tapeOf('SQRT(x)').steps);
    expect(tapeOf('IF(x>1,,2)').steps).toEqual(tapeOf('IF(x>1,0,2)').steps);
    expect(tapeOf('SUM(x,)').steps).toEqual(tapeOf('SUM(x,0)').steps);
  });
});

describe('domains', () => {
  const state = (text: string, a: number, b: number): readonly [Defined, string] => {
    const encloser = new Encloser(tapeOf(text));
    const { defined } = encloser.over(a, b, null, null);
    return [defined, defined === Defined.Everywhere ? '' : encloser.undefinedReason()];
  };
  const DIVIDES = 'it divides by zero';
  const LOG_OF = 'LN takes a number that is not above 0';
  const ROOT_OF = 'the square root of a negative number is taken';
  const POWER_OF = 'a negative number is raised to a power that is not whole';
  const VARYING = 'a number that is not above 0 is raised to a power that varies';

  const RATE = 'a rate is not above 0';

  it.each([
    ['LN(x)', -2, -1, Defined.Nowhere, LOG_OF],
    ['LN(x)', -1, 1, Defined.InPart, LOG_OF],
    ['LN(x)', 0, 0, Defined.Nowhere, LOG_OF],
    ['LN(x)', 0, 1, Defined.Everywhere, ''],
    ['LOG(x,2)', -1, -1, Defined.Nowhere, LOG_OF],
    ['LOG10(x)', -1, -1, Defined.Nowhere, 'LOG10 takes a number that is not above 0'],
    ['SQRT(x)', -2, -1, Defined.Nowhere, ROOT_OF],
    ['SQRT(x)', -1, 1, Defined.InPart, ROOT_OF],
    ['SQRT(x)', 0, 0, Defined.Everywhere, ''],
    ['1/x', 0, 0, Defined.Nowhere, DIVIDES],
    ['1/(x-x)', 1, 2, Defined.Nowhere, DIVIDES],
    ['x/0', 1, 2, Defined.Nowhere, DIVIDES],
    ['x^-1', 0, 0, Defined.Nowhere, '0 is raised to the power -1'],
    ['x^1.5', -2, -1, Defined.Nowhere, POWER_OF],
    ['x^1.5', -1, 1, Defined.InPart, POWER_OF],
    ['x^(1/3)', -8, -8, Defined.Nowhere, POWER_OF],
    ['x^x', -2, -1, Defined.Nowhere, VARYING],
    ['x^x', 0, 0, Defined.Nowhere, VARYING],
    ['0^x', 1, 2, Defined.Nowhere, VARYING],
    ['IF(x<0,1,SQRT(x))', -2, -1, Defined.Everywhere, ''],
    ['IF(x<0,SQRT(x),1)', -2, -1, Defined.Nowhere, ROOT_OF],
    ['0*LN(x)', -2, -1, Defined.Nowhere, LOG_OF],
    ['EXPON.DIST(3,x,FALSE)', 0, 1, Defined.Everywhere, ''],
    ['EXPON.DIST(3,x,FALSE)', 0, 0, Defined.Nowhere, RATE],
    ['EXPON.DIST(3,x,FALSE)', -2, -1, Defined.Nowhere, RATE],
    ['EXPON.DIST(3,x,FALSE)', -1, 1, Defined.InPart, RATE],
  ] as const)('%s from %d to %d is in state %d [law]', (text, a, b, defined, reason) => {
    expect(state(text, a, b)).toEqual([defined, reason]);
  });
});
