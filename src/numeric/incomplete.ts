/**
 * The incomplete gamma and beta functions as shares below and above a value, with the
 * bounds of their errors for parameters up to MOST_PARAMETER.
 *
 * Source: DLMF 8.7.1 and 8.9.2 (series and continued fraction of the incomplete gamma
 * function), 8.17.22 (continued fraction of the incomplete beta function), evaluated by
 * Lentz's method (Press et al. 2007, §5.2). What stands before them is written around
 * its peak, so that large parameters lose no digits. The bounds are at least twice the
 * largest error measured against mpmath (test/numeric/vectors/make.py).
 * Not handled: parameters outside the measured range.
 */
import { bug } from '../errors';
import type { Bounded } from './bounded';
import { EPSILON } from './bounded';
import { exp, ln } from './elementary';
import { log1p } from './special';
import { stirlingRatio } from './stirling';

/** The errors were measured for parameters between these. */
export const LEAST_PARAMETER = 0.01;
export const MOST_PARAMETER = 10_000;

/** Shares below this may be lost to underflow. */
const ABSOLUTE = 1e-290;

const SMALL = 1e-300;
const CLOSE = 1.1e-16;
/** A rounded factor may stay one unit off 1 for ever. */
const SETTLED = 3e-16;
const MAX_TERMS = 100_000;

/** The value of b₀ + a₁/(b₁ + a₂/(b₂ + …)); `term` gives aₙ and bₙ. */
function continuedFraction(b0: number, term: (n: number) => readonly [number, number]): number {
  let value = b0 === 0 ? SMALL : b0;
  let c = value;
  let d = 0;
  for (let n = 1; n < MAX_TERMS; n++) {
    const [a, b] = term(n);
    d = b + a * d;
    c = b + a / c;
    if (d === 0) d = SMALL;
    if (c === 0) c = SMALL;
    d = 1 / d;
    const factor = c * d;
    value *= factor;
    if (Math.abs(factor - 1) <= SETTLED) return value;
  }
  throw bug('a continued fraction does not converge');
}

/** x^a EXP(−x) / Γ(a + 1). */
function gammaFront(a: number, x: number): number {
  const off = (x - a) / a;
  return stirlingRatio(a) * exp(a * (lnRatio(x, a, off) - off));
}

/** ln(x/a), from off = x/a − 1 where that keeps more digits. */
function lnRatio(x: number, a: number, off: number): number {
  return Math.abs(off) < 0.5 ? log1p(off) : ln(x / a);
}

function gammaSeries(a: number, x: number): number {
  let sum = 1;
  let term = 1;
  for (let n = 1; n < MAX_TERMS && term > sum * CLOSE; n++) {
    term *= x / (a + n);
    sum += term;
  }
  return gammaFront(a, x) * sum;
}

function gammaFraction(a: number, x: number): number {
  const below = continuedFraction(x + 1 - a, (n) => [-n * (n - a), x + 2 * n + 1 - a]);
  return (gammaFront(a, x) * a) / below;
}

/** From here on the continued fraction serves small shapes. */
const FRACTION_FROM = 0.3;

function gammaAt(a: number, x: number, isAbove: boolean): number {
  if (x <= 0) return isAbove ? 1 : 0;
  if (x === Infinity) return isAbove ? 0 : 1;
  // With a small shape nearly all lies below, and 1 less that would lose the share above.
  const isSeries = x < (a < 1 ? FRACTION_FROM : a + 1);
  const share = isSeries ? gammaSeries(a, x) : gammaFraction(a, x);
  return isSeries === isAbove ? 1 - share : share;
}

/** x^a (1 − x)^b / (a B(a, b)). */
function betaFront(a: number, b: number, x: number, y: number): number {
  const left = a / (a + b);
  const right = b / (a + b);
  const off = a < b ? x - left : right - y;
  const rise = a * lnRatio(x, left, off / left) + b * lnRatio(y, right, -off / right);
  const size = (stirlingRatio(a) * stirlingRatio(b)) / stirlingRatio(a + b);
  return size * right * exp(rise);
}

function betaFraction(a: number, b: number, x: number, y: number): number {
  const below = continuedFraction(1, (n) => {
    const m = Math.floor(n / 2);
    const numerator =
      n % 2 === 0
        ? (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m))
        : (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    return [numerator, 1];
  });
  return betaFront(a, b, x, y) / below;
}

function betaAt(a: number, b: number, x: number, isAbove: boolean): number {
  if (x <= 0) return isAbove ? 1 : 0;
  if (x >= 1) return isAbove ? 0 : 1;
  const y = 1 - x;
  const isLeft = x < (a + 1) / (a + b + 2);
  const share = isLeft ? betaFraction(a, b, x, y) : betaFraction(b, a, y, x);
  return isLeft === isAbove ? 1 - share : share;
}

/** The measured error grows with the larger parameter, as that of its logarithm does. */
function bounded(size: number, at: (x: number) => number): Bounded {
  return { at, relative: (1000 + 2 * size) * EPSILON, absolute: ABSOLUTE, least: 0, most: 1 };
}

/** The share of a gamma variable of that shape and scale 1 below (or above) x. */
export function gammaShare(shape: number, isAbove: boolean): Bounded {
  return bounded(shape, (x) => gammaAt(shape, x, isAbove));
}

/** The share of a beta variable with those shapes below (or above) x. */
export function betaShare(a: number, b: number, isAbove: boolean): Bounded {
  return bounded(Math.max(a, b), (x) => betaAt(a, b, x, isAbove));
}
