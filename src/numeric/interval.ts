/**
 * Interval arithmetic with outward rounding: every result encloses the true
 * value set of the real function over the operands.
 *
 * Source: IEEE 1788-2015 for the meaning of the operations (set-based, closed,
 * ends may be infinite, 0 · ∞ = 0). Results are written into `out`, which may be
 * an operand too, so that proving an envelope allocates nothing.
 * Not handled: empty intervals (an empty intersection is a fault and throws),
 * decorations (formula/enclose.ts keeps track of undefined stretches itself).
 * The file is long because all rounding of intervals is in one place.
 */
import { bug } from '../errors';
import * as elementary from './elementary';
import {
  addDown,
  addUp,
  divDown,
  divUp,
  looseProductDown,
  looseProductUp,
  looseSumDown,
  looseSumUp,
  mulDown,
  mulUp,
  sqrtDown,
  sqrtUp,
} from './float';

export interface Interval {
  lo: number;
  hi: number;
}

const PI_LO = 3.141592653589793;
const PI_HI = 3.1415926535897936;
/** Slack when counting half waves, in turns per turn: far above the rounding of one division. */
const TURN_SLACK = 4e-15;

/** A new interval; without ends, room for one. */
export function interval(lo = NaN, hi = lo): Interval {
  // Made with NaN first: engines then keep both ends as plain doubles, which is what makes them fast.
  const made: Interval = { lo: NaN, hi: NaN };
  made.lo = lo;
  made.hi = hi;
  return made;
}

export function set(out: Interval, lo: number, hi: number): void {
  out.lo = lo;
  out.hi = hi;
}

export function copy(out: Interval, a: Interval): void {
  out.lo = a.lo;
  out.hi = a.hi;
}

export function setEntire(out: Interval): void {
  out.lo = -Infinity;
  out.hi = Infinity;
}

export function setPi(out: Interval): void {
  out.lo = PI_LO;
  out.hi = PI_HI;
}

/** True if x lies in a. */
export function holds(a: Interval, x: number): boolean {
  return a.lo <= x && x <= a.hi;
}

/** out ∩= a. @throws {Error} when they do not meet, which means that an enclosure was wrong. */
export function meet(out: Interval, a: Interval): void {
  if (a.lo > out.lo) out.lo = a.lo;
  if (a.hi < out.hi) out.hi = a.hi;
  if (out.lo > out.hi) throw bug(`enclosures do not meet: [${out.lo}, ${out.hi}]`);
}

export function hull(out: Interval, a: Interval, b: Interval): void {
  set(out, Math.min(a.lo, b.lo), Math.max(a.hi, b.hi));
}

export function negate(out: Interval, a: Interval): void {
  // Subtracting from 0 keeps −0 out of every enclosure.
  set(out, 0 - a.hi, 0 - a.lo);
}

export function add(out: Interval, a: Interval, b: Interval): void {
  set(out, addDown(a.lo, b.lo), addUp(a.hi, b.hi));
}

export function subtract(out: Interval, a: Interval, b: Interval): void {
  set(out, addDown(a.lo, -b.hi), addUp(a.hi, -b.lo));
}

export function multiply(out: Interval, a: Interval, b: Interval): void {
  const { lo: p, hi: q } = a;
  const { lo: r, hi: s } = b;
  if (p >= 0) {
    if (r >= 0) set(out, mulDown(p, r), mulUp(q, s));
    else if (s <= 0) set(out, mulDown(q, r), mulUp(p, s));
    else set(out, mulDown(q, r), mulUp(q, s));
  } else if (q <= 0) {
    if (r >= 0) set(out, mulDown(p, s), mulUp(q, r));
    else if (s <= 0) set(out, mulDown(q, s), mulUp(p, r));
    else set(out, mulDown(p, s), mulUp(p, r));
  } else if (r >= 0) set(out, mulDown(p, s), mulUp(q, s));
  else if (s <= 0) set(out, mulDown(q, r), mulUp(p, r));
  else set(out, Math.min(mulDown(p, s), mulDown(q, r)), Math.max(mulUp(p, r), mulUp(q, s)));
}

/** As add, a little wider and cheaper: for slopes, whose last bits do not matter. */
export function addLoosely(out: Interval, a: Interval, b: Interval): void {
  set(out, looseSumDown(a.lo, b.lo), looseSumUp(a.hi, b.hi));
}

export function subtractLoosely(out: Interval, a: Interval, b: Interval): void {
  set(out, looseSumDown(a.lo, -b.hi), looseSumUp(a.hi, -b.lo));
}

/** As multiply, a little wider and cheaper: for slopes, whose last bits do not matter. */
export function multiplyLoosely(out: Interval, a: Interval, b: Interval): void {
  const { lo: p, hi: q } = a;
  const { lo: r, hi: s } = b;
  if (p >= 0) {
    set(out, looseProductDown(r >= 0 ? p : q, r), looseProductUp(s >= 0 ? q : p, s));
  } else if (q <= 0) {
    set(out, looseProductDown(s >= 0 ? p : q, s), looseProductUp(r >= 0 ? q : p, r));
  } else if (r >= 0) set(out, looseProductDown(p, s), looseProductUp(q, s));
  else if (s <= 0) set(out, looseProductDown(q, r), looseProductUp(p, r));
  else {
    set(
      out,
      Math.min(looseProductDown(p, s), looseProductDown(q, r)),
      Math.max(looseProductUp(p, r), looseProductUp(q, s)),
    );
  }
}

export function scale(out: Interval, a: Interval, k: number): void {
  if (k >= 0) set(out, mulDown(a.lo, k), mulUp(a.hi, k));
  else set(out, mulDown(a.hi, k), mulUp(a.lo, k));
}

/** 1 / a; the half-line when 0 is an end of a, everything when 0 lies inside. */
export function reciprocal(out: Interval, a: Interval): void {
  const { lo, hi } = a;
  if (lo > 0 || hi < 0) set(out, divDown(1, hi), divUp(1, lo));
  else if (lo === 0 && hi > 0) set(out, divDown(1, hi), Infinity);
  else if (hi === 0 && lo < 0) set(out, -Infinity, divUp(1, lo));
  else setEntire(out);
}

export function divide(out: Interval, a: Interval, b: Interval): void {
  const { lo: p, hi: q } = a;
  const { lo: r, hi: s } = b;
  if (r > 0) {
    set(out, divDown(p, p >= 0 ? s : r), divUp(q, q >= 0 ? r : s));
  } else if (s < 0) {
    set(out, divDown(q, q >= 0 ? s : r), divUp(p, p >= 0 ? r : s));
  } else if (r === 0 && s > 0 && p >= 0) set(out, divDown(p, s), Infinity);
  else if (r === 0 && s > 0 && q <= 0) set(out, -Infinity, divUp(q, s));
  else if (s === 0 && r < 0 && p >= 0) set(out, -Infinity, divUp(p, r));
  else if (s === 0 && r < 0 && q <= 0) set(out, divDown(q, r), Infinity);
  else setEntire(out);
}

export function square(out: Interval, a: Interval): void {
  const { lo, hi } = a;
  if (lo >= 0) set(out, mulDown(lo, lo), mulUp(hi, hi));
  else if (hi <= 0) set(out, mulDown(hi, hi), mulUp(lo, lo));
  else set(out, 0, Math.max(mulUp(lo, lo), mulUp(hi, hi)));
}

export function squareLoosely(out: Interval, a: Interval): void {
  const most = Math.max(Math.abs(a.lo), Math.abs(a.hi));
  const least = a.lo > 0 ? a.lo : a.hi < 0 ? a.hi : 0;
  set(out, looseProductDown(least, least), looseProductUp(most, most));
}

export function absolute(out: Interval, a: Interval): void {
  const { lo, hi } = a;
  if (lo >= 0) set(out, lo, hi);
  else if (hi <= 0) set(out, -hi, -lo);
  else set(out, 0, Math.max(-lo, hi));
}

export function minimum(out: Interval, a: Interval, b: Interval): void {
  set(out, Math.min(a.lo, b.lo), Math.min(a.hi, b.hi));
}

export function maximum(out: Interval, a: Interval, b: Interval): void {
  set(out, Math.max(a.lo, b.lo), Math.max(a.hi, b.hi));
}

/** √ of the part of a that is ≥ 0; the caller has seen to a.hi ≥ 0. */
export function squareRoot(out: Interval, a: Interval): void {
  set(out, sqrtDown(Math.max(0, a.lo)), sqrtUp(Math.max(0, a.hi)));
}

/** x^n for a whole n ≥ 1 by repeated products, each rounded toward the wanted side; x ≥ 0. */
function wholePower(x: number, n: number, product: (a: number, b: number) => number): number {
  let result = 1;
  let base = x;
  for (let k = n; ; base = product(base, base)) {
    if (k % 2 === 1) result = product(result, base);
    k = Math.floor(k / 2);
    if (k === 0) return result;
  }
}

/** a^n for a whole n ≥ 0; a^0 is 1. */
export function power(out: Interval, a: Interval, n: number): void {
  const { lo, hi } = a;
  if (n === 0) set(out, 1, 1);
  else if (n === 1) set(out, lo, hi);
  else if (n === 2) square(out, a);
  else if (lo >= 0) set(out, wholePower(lo, n, mulDown), wholePower(hi, n, mulUp));
  else if (n % 2 === 0) {
    absolute(out, a);
    power(out, out, n);
  } else if (hi <= 0) {
    set(out, -wholePower(-lo, n, mulUp), 0 - wholePower(-hi, n, mulDown));
  } else set(out, -wholePower(-lo, n, mulUp), wholePower(hi, n, mulUp));
}

/** Room for ERROR_ULPS and for the rounding of the step itself; absolute among subnormals. */
const STEP = (elementary.ERROR_ULPS + 1) * 2.220446049250313e-16;
const LARGE_POWER_STEP = (elementary.LARGE_POWER_ERROR_ULPS + 1) * 2.220446049250313e-16;
const STEP_AT_0 = 1e-323;

/** A lower bound of the value that an elementary function rounded to y; these are 0 only where they are exact. */
function below(y: number, step = STEP): number {
  if (y === Infinity) return Number.MAX_VALUE;
  return y - (Math.abs(y) * step + STEP_AT_0);
}

/** An upper bound of the value that an elementary function rounded to y. */
function above(y: number, step = STEP): number {
  if (y === -Infinity) return -Number.MAX_VALUE;
  return y + (Math.abs(y) * step + STEP_AT_0);
}

export function exponential(out: Interval, a: Interval): void {
  const lo = a.lo === 0 ? 1 : a.lo === -Infinity ? 0 : Math.max(0, below(elementary.exp(a.lo)));
  const hi = a.hi === 0 ? 1 : a.hi === -Infinity ? 0 : above(elementary.exp(a.hi));
  set(out, lo, hi);
}

/** ln of the part of a that is > 0; the caller has seen to a.hi > 0. */
export function logarithm(out: Interval, a: Interval): void {
  const lo =
    a.lo <= 0
      ? -Infinity
      : a.lo === 1
        ? 0
        : a.lo === Infinity
          ? Number.MAX_VALUE
          : below(elementary.ln(a.lo));
  const hi = a.hi === 1 ? 0 : a.hi === Infinity ? Infinity : above(elementary.ln(a.hi));
  set(out, Math.min(lo, 710), hi);
}

/** 0^q as the limit from the right; 0^0 is 1, as x^0 is for every x above 0. */
function powerOfZero(q: number): number {
  return q > 0 ? 0 : q < 0 ? Infinity : 1;
}

/** a^p for real p in the enclosure p, over the part of a that is ≥ 0. */
export function realPower(out: Interval, a: Interval, p: Interval): void {
  const lo = Math.max(0, a.lo);
  const hi = Math.max(0, a.hi);
  let least = Infinity;
  let most = -Infinity;
  // x^p is monotone in x and in p on each side of x = 1, so its extremes are at corners.
  for (const x of [lo, hi]) {
    for (const q of [p.lo, p.hi]) {
      const exact = x === 1 || x === 0 || x === Infinity || q === 0;
      const y = x === 1 ? 1 : x === 0 ? powerOfZero(q) : elementary.pow(x, q);
      const step = Math.abs(q) > elementary.LARGE_POWER ? LARGE_POWER_STEP : STEP;
      least = Math.min(least, exact ? y : Math.max(0, below(y, step)));
      most = Math.max(most, exact ? y : above(y, step));
    }
  }
  set(out, least === Infinity ? Number.MAX_VALUE : least, most);
}

/** True unless a holds no point shift + k · turns (k whole): never false when it does. */
function mayHoldPhase(a: Interval, shift: number, period: number): boolean {
  const first = (a.lo - shift) / period;
  const last = (a.hi - shift) / period;
  const slack = TURN_SLACK * (1 + Math.max(Math.abs(first), Math.abs(last)));
  return Math.floor(last + slack) >= Math.ceil(first - slack);
}

function isWaveTrusted(a: Interval): boolean {
  return a.lo > -elementary.WAVE_LIMIT && a.hi < elementary.WAVE_LIMIT;
}

function wave(out: Interval, a: Interval, f: (x: number) => number, top: number): void {
  if (!isWaveTrusted(a)) {
    set(out, -1, 1);
    return;
  }
  const p = f(a.lo);
  const q = f(a.hi);
  const least = Math.min(p, q);
  const most = Math.max(p, q);
  // Sine and cosine of a double round to 0 only at 0, where they are exact.
  const hi = mayHoldPhase(a, top, 2 * PI_LO) ? 1 : most === 0 ? 0 : Math.min(1, above(most));
  const lo = mayHoldPhase(a, top + PI_LO, 2 * PI_LO)
    ? -1
    : least === 0
      ? 0
      : Math.max(-1, below(least));
  set(out, lo, hi);
}

export function sine(out: Interval, a: Interval): void {
  wave(out, a, elementary.sin, PI_LO / 2);
}

export function cosine(out: Interval, a: Interval): void {
  wave(out, a, elementary.cos, 0);
}

export function mayHoldTangentPole(a: Interval): boolean {
  return !isWaveTrusted(a) || mayHoldPhase(a, PI_LO / 2, PI_LO);
}

export function tangent(out: Interval, a: Interval): void {
  if (mayHoldTangentPole(a)) setEntire(out);
  else {
    const lo = a.lo === 0 ? 0 : below(elementary.tan(a.lo));
    const hi = a.hi === 0 ? 0 : above(elementary.tan(a.hi));
    set(out, lo, hi);
  }
}

export function arctangent(out: Interval, a: Interval): void {
  const lo = a.lo === 0 ? 0 : below(elementary.atan(a.lo));
  const hi = a.hi === 0 ? 0 : above(elementary.atan(a.hi));
  set(out, lo, hi);
}

export function hyperbolicTangent(out: Interval, a: Interval): void {
  const lo = a.lo === 0 ? 0 : Math.max(-1, below(elementary.tanh(a.lo)));
  const hi = a.hi === 0 ? 0 : Math.min(1, above(elementary.tanh(a.hi)));
  set(out, lo, hi);
}
