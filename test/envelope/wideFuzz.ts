/**
 * Fuzzing with the whole vocabulary, tables as functions and lists, on finite and unbounded
 * limits, read as the worksheet functions read them. The reference is the plain evaluation of
 * the formula in doubles: coarser than fuzz.ts, which works in decimals, but it knows every
 * function. Slack: 10^-9 of the tallest line for what doubles lose to cancellation.
 */
import seedrandom from 'seedrandom';
import type { Range } from '../../src/density/cells';
import { readShapes } from '../../src/density/shape';
import { Drawer } from '../../src/draw/column';
import type { Envelope } from '../../src/envelope/envelope';
import { placeOn } from '../../src/envelope/hat';
import { InputError } from '../../src/errors';
import { provedCurve } from './proved';

const SLACK = 1e-9;
const PLACES = { density: 'density', limits: 'limits', givens: 3 };

/** Pressing capacity by day: a jump at 2, zero outside. */
const TABLE: Range = [
  ['day', 'base', 'wave'],
  [-3, 0, 1],
  [-1, 2, -1],
  [2, 1, 0.5],
  [2, 3, 0.5],
  [5, 0.5, 2],
];
const LIST: Range = [['obs'], [1.2], [0.4], [2.2], [1.9], [0.7]];

type Random = () => number;

interface WideReport {
  readonly proved: number;
  readonly points: number;
  readonly faults: readonly string[];
}

/** Proves and checks `shapes` random shapes of a seed with about `points` points each. */
export function wideFuzz(seed: string, shapes: number, points: number): WideReport {
  const report = { proved: 0, points: 0, faults: [] as string[] };
  for (let i = 0; i < shapes; i++) {
    const random = seedrandom(`${seed} ${i}`);
    const text = densityText(random);
    const limits = pick(random, LIMITS);
    const fault = (what: string): void => {
      report.faults.push(`${seed} ${i}, ${text} on ${JSON.stringify(limits)}: ${what}`);
    };
    try {
      const shape = readShapes([[text]], [limits], [TABLE, LIST], PLACES).shapes[0]!;
      const envelope = provedCurve(shape);
      report.proved++;
      report.points += checkPoints(envelope, random, points, fault);
      new Drawer(envelope).column([i, 7], 1, 500);
    } catch (error) {
      if (!(error instanceof InputError) || /NaN|Infinity/.test(error.message))
        fault(String(error));
    }
  }
  return report;
}

/** Looks at random points of every piece and hat; returns how many. */
export function checkPoints(
  { pieces, hats, heightAt }: Envelope,
  random: Random,
  points: number,
  fault: (what: string) => void,
): number {
  const tallest = Math.max(...pieces.flatMap((p) => [p.upperLeft, p.upperRight]));
  const slack = SLACK * tallest;
  const each = Math.ceil(points / (pieces.length + hats.length));
  let looked = 0;
  for (const p of pieces) {
    for (let k = 0; k < each; k++) {
      const x = Math.min(p.to, p.from + (p.to - p.from) * random());
      const t = (x - p.from) / (p.to - p.from);
      const height = heightAt(x);
      if (!Number.isFinite(height)) continue;
      looked++;
      const upper = p.upperLeft + (p.upperRight - p.upperLeft) * t;
      const lower = p.lowerLeft + (p.lowerRight - p.lowerLeft) * t;
      if (height > upper + slack) fault(`${height} above the upper line ${upper} at ${x}`);
      if (height < lower - slack) fault(`${height} below the lower line ${lower} at ${x}`);
    }
  }
  const place = { x: 0, t: 0, height: 0 };
  for (const hat of hats) {
    for (let k = 0; k < each; k++) {
      placeOn(hat, k % 2 === 0 ? 1 - random() : Math.pow(2, -40 * random()), place);
      const height = heightAt(place.x);
      if (!Number.isFinite(height)) continue;
      looked++;
      if (height > place.height * (1 + SLACK) + slack)
        fault(`${height} above the hat at ${place.x}`);
    }
  }
  return looked;
}

function pick<T>(random: Random, from: readonly T[]): T {
  return from[Math.floor(random() * from.length)]!;
}

const U = 'unbounded';
const LIMITS: readonly (readonly (number | string)[])[] = [
  [0, 6],
  [-3, 3],
  [0.5, 9],
  [-2, 40],
  [0, U],
  [U, U],
  [1, U],
  [U, 4],
];

const NUMBERS = ['0.5', '2', '1.3', '3', '0.2', '7', '1', '12'];

/** Some term that is meant to be ≥ 0; `u` stands for its argument. */
const TERMS = [
  'NORM.DIST(u,#,#,FALSE)',
  'NORM.DIST(u,#,#,TRUE)',
  'NORM.S.DIST(u,TRUE)',
  'PHI(u)',
  'LOGNORM.DIST(0.1+ABS(u),1,#,FALSE)',
  'LOGNORM.DIST(0.1+ABS(u),1,#,TRUE)',
  'EXPON.DIST(ABS(u),#,FALSE)',
  'GAMMA.DIST(ABS(u),#,#,FALSE)',
  'GAMMA.DIST(ABS(u),#,#,TRUE)',
  'WEIBULL.DIST(ABS(u),#,#,FALSE)',
  'BETA.DIST(1/(1+u^2),#,#,TRUE)',
  'BETA.DIST(0.5+0.4*SIN(u),2,#,FALSE)',
  'T.DIST(u,4,FALSE)',
  'T.DIST(u,3,TRUE)',
  'CHISQ.DIST(ABS(u),3,FALSE)',
  'F.DIST(ABS(u),3,5,FALSE)',
  'POISSON.DIST(3,0.1+ABS(u),FALSE)',
  'POISSON.DIST(2,0.1+ABS(u),TRUE)',
  'BINOM.DIST(2,9,0.5+0.4*SIN(u),FALSE)',
  'BINOM.DIST(4,9,1/(1+u^2),TRUE)',
  'ERFC(u)',
  '(1+ERF(u))',
  'EXP(-GAMMALN(1+u^2))',
  'GAMMA(0.5+1/(1+u^2))',
  '1/COSH(u)',
  'EXP(-ABS(SINH(u/#)))',
  '(2+ASINH(u)/(1+ABS(u)))',
  'ACOSH(1+u^2)',
  '(1+ATANH(TANH(u)/2))',
  'ACOS(TANH(u))',
  '(2+ASIN(SIN(u)/2))',
  '(4+ATAN2(1,u))',
  'MOD(u,#)',
  'ABS(INT(u))',
  '(1+ABS(ROUND(u,1)))',
  'ABS(TRUNC(u))',
  'ABS(CEILING.MATH(u)-u)',
  'ABS(FLOOR.MATH(u)-u)',
  'SUMSQ(u,#)',
  'MEDIAN(0,u,#)',
  'IFS(u<#,1,u<12,2,TRUE,0.5)',
  'base(u)',
  'base(u-#)',
  '(1+wave(u))',
  'EXP(-0.5*SUM(((obs-u)/#)^2))',
  'EXP(-SUMPRODUCT(ABS(obs-u)))',
  '(u>#)',
  'EXP(-ABS(u))',
  '1/(1+u^2)',
  'ABS(u)',
];

/** Products and sums of terms in x, some of them nested one deep. */
function densityText(random: Random): string {
  const argument = (depth: number): string => {
    const kind = random();
    if (kind < 0.5 || depth > 1) return 'x';
    if (kind < 0.7) return `(x-${pick(random, NUMBERS)})`;
    if (kind < 0.85) return `(${pick(random, NUMBERS)}*x)`;
    return `(${term(depth + 1)})`;
  };
  const term = (depth = 0): string =>
    pick(random, TERMS)
      .replaceAll('#', () => pick(random, NUMBERS))
      .replace(/\bu\b/g, () => argument(depth));
  const kind = random();
  const falling = random() < 0.5 ? `*EXP(-${pick(random, NUMBERS)}*ABS(x))` : '';
  if (kind < 0.3) return term() + falling;
  if (kind < 0.7) return `${term()}*${term()}${falling}`;
  if (kind < 0.9) return `(${term()}+${term()})*${term()}${falling}`;
  return `MAX(0,${term()}-${term()})${falling}`;
}
