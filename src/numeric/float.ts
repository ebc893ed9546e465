/**
 * Doubles and their neighbours: every directed rounding of the project is here.
 *
 * JavaScript rounds to nearest only. `up` and `down` step outward by a little
 * more than half a unit in the last place, which is enough to pass the true
 * result of one rounded operation (Rump, Zimmermann, Boldo, Melquiond 2009,
 * "Computing predecessor and successor in rounding to nearest"). Sums and
 * products first ask for their exact rounding error (Knuth's two-sum, Dekker's
 * product) and step only if there is one, so exact results stay exact.
 */

/** A little more than half an ulp, relative: 2^-53 (1 + 2^-39). */
const HALF_ULP = 1.1102230246251568e-16;
const SMALLEST = 5e-324;
/** Dekker's splitting constant 2^27 + 1. */
const SPLIT = 134217729;
/** Between these a product's rounding error is itself a double. */
const PRODUCT_MIN = 1e-290;
const PRODUCT_MAX = 1e290;

/** The least double known to be ≥ every real that rounds to x. */
export function up(x: number): number {
  if (x === -Infinity) return -Number.MAX_VALUE;
  return x + (Math.abs(x) * HALF_ULP + SMALLEST);
}

/** The greatest double known to be ≤ every real that rounds to x. */
export function down(x: number): number {
  if (x === Infinity) return Number.MAX_VALUE;
  return x - (Math.abs(x) * HALF_ULP + SMALLEST);
}

/** a + b rounded upward; exact sums are kept. Operands may be infinite, not opposite infinities. */
export function addUp(a: number, b: number): number {
  const s = a + b;
  const t = s - a;
  const e = a - (s - t) + (b - t);
  if (e <= 0) return s;
  return e > 0 ? up(s) : addInfinite(s, a, b, 1);
}

/** a + b rounded downward; exact sums are kept. */
export function addDown(a: number, b: number): number {
  const s = a + b;
  const t = s - a;
  const e = a - (s - t) + (b - t);
  if (e >= 0) return s;
  return e < 0 ? down(s) : addInfinite(s, a, b, -1);
}

/** The error term was NaN: an operand or the sum is infinite. */
function addInfinite(s: number, a: number, b: number, direction: 1 | -1): number {
  if (s !== s) return direction * Infinity;
  const exact = a === s || b === s;
  if (exact) return s;
  return direction > 0 ? up(s) : down(s);
}

/** a · b rounded upward; exact products are kept and 0 · ∞ is 0. */
export function mulUp(a: number, b: number): number {
  const p = a * b;
  if (a === 0 || b === 0) return 0;
  const size = Math.abs(p);
  if (size > PRODUCT_MIN && size < PRODUCT_MAX) {
    return productError(a, b, p) <= 0 ? p : up(p);
  }
  if (p === 0) return isUnderflowPositive(a, b) ? SMALLEST : 0;
  return isInfinite(a) || isInfinite(b) ? p : up(p);
}

/** a · b rounded downward; exact products are kept and 0 · ∞ is 0. */
export function mulDown(a: number, b: number): number {
  const p = a * b;
  if (a === 0 || b === 0) return 0;
  const size = Math.abs(p);
  if (size > PRODUCT_MIN && size < PRODUCT_MAX) {
    return productError(a, b, p) >= 0 ? p : down(p);
  }
  if (p === 0) return isUnderflowPositive(a, b) ? 0 : -SMALLEST;
  return isInfinite(a) || isInfinite(b) ? p : down(p);
}

/** The sign of a product or quotient that underflows to 0 is still known. */
function isUnderflowPositive(a: number, b: number): boolean {
  return a > 0 === b > 0;
}

/** a · b − p to the sign; Infinity stands for "cannot tell", which makes both directions step. */
function productError(a: number, b: number, p: number): number {
  if (Math.abs(a) > PRODUCT_MAX || Math.abs(b) > PRODUCT_MAX) return NaN;
  const ta = SPLIT * a;
  const ah = ta - (ta - a);
  const al = a - ah;
  const tb = SPLIT * b;
  const bh = tb - (tb - b);
  const bl = b - bh;
  return al * bl - (p - ah * bh - al * bh - ah * bl);
}

function isInfinite(x: number): boolean {
  return x === Infinity || x === -Infinity;
}

/** An upper bound of a + b, cheaper than addUp: only 0 is kept exact. */
export function looseSumUp(a: number, b: number): number {
  const s = a + b;
  if (s === 0) return 0;
  return s > -Infinity
    ? s + (Math.abs(s) * HALF_ULP + SMALLEST)
    : s === s
      ? -Number.MAX_VALUE
      : Infinity;
}

/** A lower bound of a + b, cheaper than addDown: only 0 is kept exact. */
export function looseSumDown(a: number, b: number): number {
  return -looseSumUp(-a, -b);
}

/** An upper bound of a · b, cheaper than mulUp: only 0 is kept exact. */
export function looseProductUp(a: number, b: number): number {
  if (a === 0 || b === 0) return 0;
  const p = a * b;
  if (p === 0) return isUnderflowPositive(a, b) ? SMALLEST : 0;
  return p > -Infinity ? p + (Math.abs(p) * HALF_ULP + SMALLEST) : -Number.MAX_VALUE;
}

/** A lower bound of a · b, cheaper than mulDown: only 0 is kept exact. */
export function looseProductDown(a: number, b: number): number {
  return -looseProductUp(-a, b);
}

/** a / b rounded upward; b ≠ 0. 0 / b is 0 and a / ∞ reaches 0. */
export function divUp(a: number, b: number): number {
  if (a === 0) return 0;
  const q = a / b;
  if (isInfinite(b)) return isInfinite(a) && a === b ? Infinity : 0;
  if (isInfinite(a)) return q;
  if (q === 0) return isUnderflowPositive(a, b) ? SMALLEST : 0;
  return quotientIsExact(q, a, b) ? q : up(q);
}

/** a / b rounded downward; b ≠ 0. */
export function divDown(a: number, b: number): number {
  if (a === 0) return 0;
  const q = a / b;
  if (isInfinite(b)) return isInfinite(a) && a !== b ? -Infinity : 0;
  if (isInfinite(a)) return q;
  if (q === 0) return isUnderflowPositive(a, b) ? 0 : -SMALLEST;
  return quotientIsExact(q, a, b) ? q : down(q);
}

function quotientIsExact(q: number, a: number, b: number): boolean {
  const size = Math.abs(a);
  if (!(size > PRODUCT_MIN && size < PRODUCT_MAX)) return a === 0;
  return q * b === a && productError(q, b, a) === 0;
}

const float = new Float64Array(1);
const bits = new BigInt64Array(float.buffer);

/** The next double above x. next(Infinity) = Infinity. */
export function next(x: number): number {
  if (x !== x || x === Infinity) return x;
  if (x === 0) return SMALLEST;
  float[0] = x;
  bits[0]! += x > 0 ? 1n : -1n;
  return float[0];
}

/** The next double below x. */
export function prev(x: number): number {
  return -next(-x);
}

/** How far apart doubles are near x. */
export function ulp(x: number): number {
  const size = Math.abs(x);
  return next(size) - size;
}

/** A double in the open interval (a, b), or a itself when there is none. */
export function middle(a: number, b: number): number {
  const m = a / 2 + b / 2;
  if (m > a && m < b) return m;
  const n = next(a);
  return n < b ? n : a;
}

/** 2^k as a double, for −1074 ≤ k ≤ 1023. */
export function powerOfTwo(k: number): number {
  if (k < -1022) return SMALLEST * powerOfTwo(k + 1074);
  bits[0] = BigInt(k + 1023) << 52n;
  return float[0]!;
}

/** √x rounded upward; exact roots are kept. */
export function sqrtUp(x: number): number {
  const s = Math.sqrt(x);
  return quotientIsExact(s, x, s) ? s : up(s);
}

/** √x rounded downward, never below 0; exact roots are kept. */
export function sqrtDown(x: number): number {
  const s = Math.sqrt(x);
  return quotientIsExact(s, x, s) ? s : Math.max(0, down(s));
}
