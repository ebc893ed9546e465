/**
 * Exact arithmetic on doubles for tests: a finite double is m · 2^e with whole m and e,
 * and sums, differences and products of such numbers are again such numbers.
 */

export interface Dyadic {
  readonly m: bigint;
  readonly e: number;
}

const view = new DataView(new ArrayBuffer(8));

/** The exact value of a finite double. */
export function dyadic(x: number): Dyadic {
  view.setFloat64(0, x);
  const bits = view.getBigUint64(0);
  const exponent = Number((bits >> 52n) & 0x7ffn);
  if (exponent === 0x7ff) throw new Error(`no finite number: ${x}`);
  const fraction = bits & 0xfffffffffffffn;
  const m = exponent === 0 ? fraction : fraction | 0x10000000000000n;
  return { m: bits >> 63n ? -m : m, e: Math.max(exponent, 1) - 1075 };
}

export function plus(a: Dyadic, b: Dyadic): Dyadic {
  if (a.m === 0n) return b;
  if (b.m === 0n) return a;
  const e = Math.min(a.e, b.e);
  return { m: (a.m << BigInt(a.e - e)) + (b.m << BigInt(b.e - e)), e };
}

export function minus(a: Dyadic): Dyadic {
  return { m: -a.m, e: a.e };
}

export function times(a: Dyadic, b: Dyadic): Dyadic {
  return { m: a.m * b.m, e: a.e + b.e };
}

/** The sign of a − b: −1, 0 or 1. */
export function compare(a: Dyadic, b: Dyadic): number {
  const { m } = plus(a, minus(b));
  return m > 0n ? 1 : m < 0n ? -1 : 0;
}

/** a ≤ x, where a is a double that may be infinite. */
export function isAtMost(a: number, x: Dyadic): boolean {
  return a === -Infinity || (a !== Infinity && compare(dyadic(a), x) <= 0);
}

/** x ≤ a, where a is a double that may be infinite. */
export function isAtLeast(a: number, x: Dyadic): boolean {
  return a === Infinity || (a !== -Infinity && compare(x, dyadic(a)) <= 0);
}

/** The sign of x − a/b for a double x that may be infinite and b ≠ 0. */
export function compareToQuotient(x: number, a: number, b: number): number {
  if (x === Infinity || x === -Infinity) return x > 0 ? 1 : -1;
  return compare(times(dyadic(x), dyadic(b)), dyadic(a)) * Math.sign(b);
}
