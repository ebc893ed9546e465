/**
 * FACT, COMBIN, POISSON.DIST and BINOM.DIST. With the count given the last two are densities
 * of the rate or the chance, as a posterior needs; with the count as the variable they are
 * steps. Where only whole numbers count, a curve through the values there serves as well and
 * tells how they fall far out.
 *
 * Source: OpenFormula 1.2 §6.18, ECMA-376 part 1 §18.17.7; masses are written around
 * their peak (Loader 2000, "Fast and accurate computation of binomial probabilities").
 * Not handled: count and parameter both depending on the variable.
 */
import { lowerAt, upperAt } from '../../numeric/bounded';
import { betaShare, gammaShare, MOST_PARAMETER } from '../../numeric/incomplete';
import type { Interval } from '../../numeric/interval';
import * as I from '../../numeric/interval';
import * as J from '../../numeric/jet';
import { boundedRatio } from '../../numeric/stirling';
import type { Operation } from '../operation';
import { Defined } from '../operation';
import type { Maker, Row } from '../row';
import { ADD, DIVIDE, MULTIPLY, SUBTRACT } from './arithmetic';
import { betaDensity, isShare } from './betas';
import { betaShareAt, gammaShareAt } from './cumulative';
import { EXP } from './exponential';
import { COMBINATIONS, FACTORIAL, GAMMA, GAMMALN } from './gamma';
import { gammaDensity, whereNotNegative } from './gammas';
import { checkShape, isCumulative, wholeConstant } from './parameter';
import { raise } from './power';
import { INT } from './rounding';
import { where } from './undefined';

/** Up to this many factors COMBIN is written as their product. */
const MOST_FACTORS = 64;
/** Up to this many trials a binomial mass is written as it stands. */
const FEW_TRIALS = 900;

const s = I.interval();
const t = I.interval();
const log = I.interval();

/** Adds k·ln(expected/k), the log of one factor of a mass around its peak. */
function addFactor(out: Interval, k: number, expected: Interval): void {
  if (k === 0) return;
  I.set(s, k, k);
  I.divide(t, expected, s);
  I.logarithm(t, t);
  I.multiply(t, t, s);
  I.add(out, out, t);
}

function timesRatio(out: Interval, k: number): void {
  I.set(s, lowerAt(boundedRatio, k), upperAt(boundedRatio, k));
  I.multiply(out, out, s);
}

/** mean^k EXP(−mean) / k! as R(k) · EXP(k ln(mean/k) + k − mean). */
function poissonMass(out: Interval, k: number, mean: Interval): void {
  I.set(log, k, k);
  I.subtract(log, log, mean);
  addFactor(log, k, mean);
  I.exponential(out, log);
  timesRatio(out, k);
}

/** As poissonMass: R(k) R(n − k)/R(n) · EXP(k ln(np/k) + (n − k) ln(n(1 − p)/(n − k))). */
function binomialMass(out: Interval, k: number, n: number, p: Interval): void {
  const expected = I.interval();
  const rest = I.interval();
  I.scale(expected, p, n);
  I.set(rest, n, n);
  I.subtract(rest, rest, expected);
  I.set(log, 0, 0);
  addFactor(log, k, expected);
  addFactor(log, n - k, rest);
  I.exponential(out, log);
  timesRatio(out, k);
  timesRatio(out, n - k);
  I.set(s, lowerAt(boundedRatio, n), upperAt(boundedRatio, n));
  I.divide(out, out, s);
}

interface Steps {
  readonly name: string;
  /** Encloses the value at a whole number. */
  readonly at: (out: Interval, k: number) => void;
  /** Values rise up to here and fall after it. */
  readonly peak: number;
  readonly last: number;
  readonly outside: string;
}

const low = I.interval();
const high = I.interval();

/** A function of whole numbers 0, 1, … that rises, then falls. */
function stepsOf({ name, at, peak, last, outside }: Steps): Operation {
  return {
    name,
    point(k) {
      if (!(k >= 0 && k <= last)) return NaN;
      at(low, k);
      return low.lo / 2 + low.hi / 2;
    },
    enclose(out, u) {
      const from = Math.max(0, u.lo);
      const to = Math.min(last, u.hi);
      if (to === Infinity) {
        I.set(out, 0, 1);
        return;
      }
      at(low, from);
      at(high, to);
      const least = Math.min(low.lo, high.lo);
      at(high, Math.min(to, Math.max(from, Math.floor(peak))));
      const most = Math.max(low.hi, high.hi);
      // The last whole number below a peak and the one above it are close rivals.
      at(high, Math.min(to, Math.max(from, Math.floor(peak) + 1)));
      I.set(out, least, Math.max(most, high.hi));
    },
    slopes(out, u) {
      if (u.v.lo === u.v.hi) J.setConstantSlopes(out);
      else J.setJump(out);
    },
    defined(u) {
      if (u.lo >= 0 && u.hi <= last) return Defined.Everywhere;
      return u.hi >= 0 && u.lo <= last ? Defined.InPart : Defined.Nowhere;
    },
    outside,
  };
}

const POISSON_OUTSIDE =
  'POISSON.DIST takes a count below 0, on which spreadsheet programs disagree';
const BINOM_OUTSIDE =
  'BINOM.DIST takes a count outside 0 to the number of trials, on which spreadsheet programs disagree';

function checkCount(make: Maker, most: number): void {
  if (most < MOST_PARAMETER) return;
  throw make.refuse(
    `a count of ${most} in a cumulative share`,
    `use counts below ${MOST_PARAMETER}, for which the error is known`,
  );
}

function poissonSteps(make: Maker, count: number, mean: number, isBelow: boolean): number {
  const known = checkShape(make, 'mean', mean);
  if (isBelow) checkCount(make, known.hi);
  const operation = stepsOf({
    name: `Poisson ${isBelow ? 'share' : 'mass'} ${known.lo} ${known.hi}`,
    at: isBelow
      ? (out, k) => {
          if (k >= MOST_PARAMETER) I.set(out, 0, 1);
          else {
            const share = gammaShare(k + 1, true);
            I.set(out, lowerAt(share, known.hi), upperAt(share, known.lo));
          }
        }
      : (out, k) => poissonMass(out, k, known),
    peak: isBelow ? Infinity : known.hi,
    last: Infinity,
    outside: POISSON_OUTSIDE,
  });
  return make.apply(operation, make.apply(INT, count));
}

/** EXP(k ln(mean) − mean − ln Γ(k + 1)). */
function poissonCurve(make: Maker, count: number, mean: number): number {
  checkShape(make, 'mean', mean);
  const log = make.apply(MULTIPLY, count, make.call('LN', mean));
  const factorial = make.apply(GAMMALN, make.apply(ADD, count, make.number(1)));
  return make.apply(EXP, make.apply(SUBTRACT, make.apply(SUBTRACT, log, mean), factorial));
}

function poisson(make: Maker, [count, mean, flag]: readonly number[]): number {
  const isBelow = isCumulative(make, flag!);
  if (make.isCount(count!) && !isBelow) return poissonCurve(make, count!, mean!);
  if (!make.isConstant(count!)) return poissonSteps(make, count!, mean!, isBelow);
  const k = wholeConstant(make, 'count', count!, 0);
  const density = gammaDensity(make, mean!, make.number(k));
  const value = isBelow ? gammaShareAt(make, true, I.interval(k + 1), mean!, density) : density;
  return whereNotNegative(make, 'POISSON.DIST', mean!, value);
}

function binomialSteps(
  make: Maker,
  count: number,
  n: number,
  chance: number,
  isBelow: boolean,
): number {
  const p = checkShape(make, 'chance', chance);
  if (p.hi >= 1) throw make.refuse('a chance that is not below 1', 'give a chance between 0 and 1');
  if (isBelow) checkCount(make, n);
  const operation = stepsOf({
    name: `binomial ${isBelow ? 'share' : 'mass'} ${n} ${p.lo} ${p.hi}`,
    at: isBelow
      ? (out, k) => {
          if (k >= n) I.set(out, 1, 1);
          else {
            const share = betaShare(k + 1, n - k, true);
            I.set(out, lowerAt(share, p.hi), upperAt(share, p.lo));
          }
        }
      : (out, k) => binomialMass(out, k, n, p),
    peak: isBelow ? n : (n + 1) * p.hi,
    last: n,
    outside: BINOM_OUTSIDE,
  });
  return make.apply(operation, make.apply(INT, count));
}

/** n!/(k! (n − k)!) p^k (1 − p)^(n − k). */
function binomialDensity(make: Maker, k: number, n: number, p: number, rest: number): number {
  const [powerK, powerRest] = [make.number(k), make.number(n - k)];
  if (n > FEW_TRIALS) {
    const density = betaDensity(make, p, rest, powerK, powerRest);
    return make.apply(DIVIDE, density, make.number(n + 1));
  }
  const ways = make.apply(COMBINATIONS, make.number(n), make.number(k));
  const product = make.apply(MULTIPLY, raise(make, [p, powerK]), raise(make, [rest, powerRest]));
  return make.apply(MULTIPLY, ways, product);
}

function binomial(make: Maker, args: readonly number[]): number {
  const [count, trials, chance, flag] = args as readonly [number, number, number, number];
  const isBelow = isCumulative(make, flag);
  const n = wholeConstant(make, 'number of trials', trials, 0);
  if (!make.isConstant(count)) return binomialSteps(make, count, n, chance, isBelow);
  const k = wholeConstant(make, 'count', count, 0);
  if (k > n) throw make.refuse(`${k} successes in ${n} trials`, `give a count from 0 to ${n}`);
  const rest = make.apply(SUBTRACT, make.number(1), chance);
  const outside = 'BINOM.DIST takes a chance outside 0 to 1';
  let value: number;
  if (!isBelow) value = binomialDensity(make, k, n, chance, rest);
  else if (k === n) value = make.number(1);
  else {
    const density = betaDensity(make, chance, rest, make.number(k), make.number(n - k - 1));
    value = betaShareAt(make, true, I.interval(k + 1), I.interval(n - k), chance, density);
  }
  return where(make, isShare(make, chance, rest), value, outside);
}

function factorial(make: Maker, [n]: readonly number[]): number {
  return make.isCount(n!)
    ? make.apply(GAMMA, make.apply(ADD, n!, make.number(1)))
    : make.apply(FACTORIAL, make.apply(INT, n!));
}

function combinations(make: Maker, [n, k]: readonly number[]): number {
  const chosen = make.exactValue(k!);
  const isFew = chosen !== undefined && chosen >= 0 && chosen <= MOST_FACTORS;
  if (!make.isCount(n!) || !isFew)
    return make.apply(COMBINATIONS, make.apply(INT, n!), make.apply(INT, k!));
  // n(n − 1) … (n − k + 1) / k!
  let product = make.number(1);
  for (let i = 0; i < Math.floor(chosen); i++) {
    const factor = make.apply(SUBTRACT, n!, make.number(i));
    product = make.apply(MULTIPLY, product, make.apply(DIVIDE, factor, make.number(i + 1)));
  }
  return product;
}

export const COUNT_ROWS: readonly Row[] = [
  { name: 'FACT', least: 1, most: 1, rewrite: factorial },
  { name: 'COMBIN', least: 2, most: 2, rewrite: combinations },
  { name: 'POISSON.DIST', least: 3, most: 3, rewrite: poisson },
  { name: 'BINOM.DIST', least: 4, most: 4, rewrite: binomial },
];
