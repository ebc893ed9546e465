/**
 * GAMMA and its logarithm for arguments above 0, factorials and binomial
 * coefficients of whole numbers.
 *
 * Source: DLMF 5.2 (Γ, ψ), 26.3 (binomial coefficients).
 * Not handled: GAMMA at negative arguments.
 */
import { lowerAt, setFalling, setRising, upperAt } from '../../numeric/bounded';
import type { Bounded } from '../../numeric/bounded';
import { divDown, divUp, mulDown, mulUp } from '../../numeric/float';
import type { Interval } from '../../numeric/interval';
import * as I from '../../numeric/interval';
import * as J from '../../numeric/jet';
import * as special from '../../numeric/special';
import { boundedRatio, stirlingRatio } from '../../numeric/stirling';
import type { Operation } from '../operation';
import { Defined, smooth } from '../operation';
import { nonNegative, positive } from './domain';

/** Scratch for one rule at a time; it holds nothing between calls. */
const t = I.interval();
const part = I.interval();

/** Encloses Γ or ln Γ over the part of u above 0: both fall, turn, and rise. */
function enclose(out: Interval, f: Bounded, u: Interval): void {
  const { lo: turnLo, hi: turnHi } = special.GAMMA_TURN;
  I.set(part, Math.max(0, u.lo), u.hi);
  if (part.lo >= turnHi) setRising(out, f, part);
  else if (part.hi <= turnLo) setFalling(out, f, part);
  else I.set(out, f.least, Math.max(upperAt(f, part.lo), upperAt(f, part.hi)));
}

function slopeOfLog(out: Interval, u: Interval): void {
  setRising(out, special.digamma, u);
}

function curvatureOfLog(out: Interval, u: Interval): void {
  setFalling(out, special.trigamma, u);
}

export const GAMMALN: Operation = smooth({
  name: 'GAMMALN',
  point: (x) => (x > 0 ? special.gammaln.at(x) : NaN),
  enclose: (out, u) => enclose(out, special.gammaln, u),
  first: (out, u) => slopeOfLog(out, u),
  second: (out, u) => curvatureOfLog(out, u),
  isSmoothOver: (u) => u.lo > 0,
  defined: positive,
  turnsOn: 0,
  outside: 'GAMMALN takes a number that is not above 0',
});

export const GAMMA: Operation = smooth({
  name: 'GAMMA',
  point: (x) => (x > 0 ? special.gamma.at(x) : NaN),
  enclose: (out, u) => enclose(out, special.gamma, u),
  first(out, u, v) {
    slopeOfLog(out, u);
    I.multiply(out, out, v);
  },
  second(out, u, v) {
    slopeOfLog(out, u);
    I.square(out, out);
    curvatureOfLog(t, u);
    I.add(out, out, t);
    I.multiply(out, out, v);
  },
  isSmoothOver: (u) => u.lo > 0,
  log: {
    value: (out, u) => enclose(out, special.gammaln, u),
    first: slopeOfLog,
    second: curvatureOfLog,
    holdsOver: (u) => u.lo > 0,
  },
  defined: positive,
  turnsOn: 0,
  outside: 'GAMMA takes a number that is not above 0',
});

/** k^k EXP(−k) / Γ(k + 1) for a constant k ≥ 0: what is left of a factorial once its size is taken out. */
export const STIRLING_RATIO: Operation = {
  name: 'Stirling ratio',
  point: (k) => (k >= 0 ? stirlingRatio(k) : NaN),
  enclose: (out, k) => setFalling(out, boundedRatio, k),
  slopes: (out) => J.setJump(out),
  defined: nonNegative,
  outside: 'a factorial of a negative number is taken',
};

/** Encloses n! for a whole n ≥ 0. */
function factorial(n: number, bound: typeof lowerAt): number {
  return bound(special.gamma, n + 1);
}

/** n! where the operand is a whole number already. */
export const FACTORIAL: Operation = {
  name: 'FACT',
  point: (n) => (n >= 0 ? special.gamma.at(n + 1) : NaN),
  enclose(out, n) {
    I.set(out, factorial(Math.max(0, n.lo), lowerAt), factorial(Math.max(0, n.hi), upperAt));
  },
  slopes: stepSlopes,
  defined: nonNegative,
  outside: 'FACT takes a negative number',
};

/** A function of steps is flat where they are settled. */
function stepSlopes(out: J.Jet, a: J.Jet): void {
  if (a.v.lo === a.v.hi) J.setConstantSlopes(out);
  else J.setJump(out);
}

type Rounding = (a: number, b: number) => number;

/** n! / (k! (n − k)!) by its factors, rounded toward one side. */
function choose(n: number, k: number, times: Rounding, by: Rounding): number {
  const least = Math.min(k, n - k);
  let result = 1;
  for (let i = 1; i <= least; i++) {
    const product = times(result, n - least + i);
    result = by(product, i);
    // Every further factor is above 1, so what has overflowed is a bound already.
    if (product >= Number.MAX_VALUE) break;
  }
  return result;
}

const chooseUp = (n: number, k: number): number => choose(n, k, mulUp, divUp);
const chooseDown = (n: number, k: number): number => choose(n, k, mulDown, divDown);

/** Binomial coefficients of whole numbers 0 ≤ k ≤ n: they rise with n, and with k up to n/2. */
export const COMBINATIONS: Operation = {
  name: 'COMBIN',
  point: (n, k) =>
    n >= k && k >= 0
      ? choose(
          n,
          k,
          (a, b) => a * b,
          (a, b) => a / b,
        )
      : NaN,
  enclose(out, n, k) {
    const [low, high] = [Math.max(0, k.lo), Math.min(k.hi, n.hi)];
    const middle = Math.min(high, Math.max(low, Math.floor(n.hi / 2)));
    const most = n.hi < Infinity ? chooseUp(n.hi, middle) : Infinity;
    const fewest = Math.max(n.lo, high);
    const least = Math.min(chooseDown(fewest, low), chooseDown(fewest, high));
    I.set(out, fewest <= Number.MAX_SAFE_INTEGER ? least : 1, most);
  },
  slopes(out, n, k) {
    if (n.v.lo === n.v.hi) stepSlopes(out, k);
    else J.setJump(out);
  },
  defined(n, k) {
    if (k.lo >= 0 && n.lo >= k.hi) return Defined.Everywhere;
    return k.hi >= 0 && n.hi >= k.lo ? Defined.InPart : Defined.Nowhere;
  },
  outside: 'COMBIN takes numbers out of order (0 <= chosen <= number is needed)',
};
