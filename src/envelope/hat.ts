/**
 * A hat over what lies beyond the pieces: towards ±∞ or into a pole at a limit. It
 * is proved from the growth of the density there and can be drawn from with roots
 * and squares alone, so that draws are the same bits everywhere.
 *
 * With t the distance from the origin, c where the hat begins and s a uniform number
 * in (0, 1]:
 *   power        (t/c)^-(1 + 2^k)    t = c · s^(-1/2^k)            beyond c
 *   exponential  (1 + λ(t − c)/9)^-9 t = c + 9(s^(-1/8) − 1)/λ     beyond c
 *   pole         (t/c)^(2^k − 1)     t = c · s^(1/2^k)             within c
 * times the height at c. Each lies on or above the bound that growth proves, since
 * the exponent is taken on the safe side and (1 + z/9)^9 ≤ e^z.
 * Source: src/METHOD.md, "Unbounded sides" and "Poles".
 */
import type { Factor, Side } from '../formula/side';
import type { Tape } from '../formula/tape';
import { mulUp, powerOfTwo } from '../numeric/float';

export interface Hat extends Side {
  readonly kind: 'power' | 'exponential' | 'pole' | 'nothing';
  /** Distance at which the hat begins. */
  readonly c: number;
  /** The hat's height at c, above the scaled density there. */
  readonly height: number;
  /** k for powers and poles, λ for exponentials. */
  readonly rate: number;
  readonly area: number;
  /** At a pole the density by the distance t, which x cannot tell; null beyond the pieces. */
  readonly near: Tape | null;
}

/** One place on a hat. */
interface HatPoint {
  x: number;
  /** Its distance from the origin. */
  t: number;
  height: number;
}

/** Covers the rounding of a place on a hat and of its height. */
const ROOM = 1e-12;
/** Steeper powers would lose more to rounding than ROOM covers; flatter ones reach past the largest double. */
const MAX_K = 6;
const MIN_K = -4;

/** What growth says of the density over a side: it can be capped, its area is infinite, or nothing can be told. */
type Verdict = { readonly hat: Hat } | 'infinite' | 'unknown';

/**
 * The hat of least area that the factors prove on a side beginning at c.
 * `atC` is an upper bound of the scaled density at c; `scale` the factor 2^-exponent.
 */
export function hatOver(
  side: Side,
  c: number,
  factors: readonly Factor[],
  atC: number,
  scale: number,
): Verdict {
  if (factors.some(({ growth, power }) => power === 1 && growth.v.lo === 0 && growth.v.hi === 0)) {
    return { hat: { ...side, kind: 'nothing', c, height: 0, rate: 0, area: 0, near: null } };
  }
  const whole = growthOf(factors);
  const hats = [
    hatFrom(side, c, whole, atC),
    // A wave in a factor hides how the rest falls: such factors are replaced by their largest value.
    ...(scale > 0 && scale < Infinity ? withoutWaves(side, factors) : []).map(({ kept, bound }) => {
      const rest = kept.reduce(
        (product, { atStart, power }) => mulUp(product, largest(atStart, power)),
        scale,
      );
      return hatFrom(side, c, growthOf(kept), mulUp(rest, bound));
    }),
  ].filter((hat) => hat !== null);
  if (hats.length > 0) return { hat: hats.reduce((a, b) => (b.area < a.area ? b : a)) };
  const isInfinite = side.isBeyond ? whole.eLo >= -1 : whole.eHi <= -1;
  return isInfinite ? 'infinite' : 'unknown';
}

interface Bounds {
  readonly eLo: number;
  readonly eHi: number;
  readonly dHi: number;
}

function growthOf(factors: readonly Factor[]): Bounds {
  const bounds = { eLo: 0, eHi: 0, dHi: 0 };
  for (const { growth, power } of factors) {
    const [e, d] = [growth.e, growth.d];
    bounds.eLo += power === 1 ? e.lo : -e.hi;
    bounds.eHi += power === 1 ? e.hi : -e.lo;
    bounds.dHi += power === 1 ? d.hi : -d.lo;
  }
  // The sums are rounded: a little room on the safe side.
  const room = (x: number): number => Math.abs(x) * 1e-14;
  return {
    eLo: bounds.eLo === -1 ? -1 : bounds.eLo - room(bounds.eLo),
    eHi: bounds.eHi === -1 ? -1 : bounds.eHi + room(bounds.eHi),
    dHi: bounds.dHi + room(bounds.dHi),
  };
}

/** The largest |value| of a factor, or of one over it. */
function largest({ lo, hi }: { lo: number; hi: number }, power: 1 | -1): number {
  const size = Math.max(Math.abs(lo), Math.abs(hi));
  const least = lo > 0 ? lo : hi < 0 ? -hi : 0;
  return power === 1 ? size : (1 / least) * (1 + ROOM);
}

/** Ways to leave out factors that are bounded but whose growth is not. */
function withoutWaves(
  side: Side,
  factors: readonly Factor[],
): { kept: readonly Factor[]; bound: number }[] {
  const isWild = ({ growth, power }: Factor): boolean => {
    if (!side.isBeyond) return !(power === 1 ? growth.e.lo > -Infinity : growth.e.hi < Infinity);
    const isFalling =
      power === 1 ? growth.d.hi <= 0 || growth.e.hi <= 0 : growth.d.lo >= 0 || growth.e.lo >= 0;
    // What is replaced must not change its sign, or the density would.
    return !isFalling && growth.v.lo >= 0 && largest(growth.v, power) < Infinity;
  };
  const wild = factors.filter(isWild);
  const bound = wild.reduce(
    (product, { growth, power }) => mulUp(product, largest(growth.v, power)),
    1,
  );
  if (wild.length === 0 || !(bound < Infinity)) return [];
  return [{ kept: factors.filter((factor) => !isWild(factor)), bound }];
}

function hatFrom(side: Side, c: number, { eLo, eHi, dHi }: Bounds, atC: number): Hat | null {
  if (!(atC < Infinity)) return null;
  const height = atC * (1 + ROOM);
  const hats: Hat[] = [];
  const begin = { ...side, c, height, near: null };
  if (side.isBeyond) {
    const k = largestExponent(-eHi - 1);
    if (k !== null)
      hats.push({ ...begin, kind: 'power', rate: k, area: (height * c) / powerOfTwo(k) });
    if (dHi < 0 && dHi > -Infinity) {
      hats.push({
        ...begin,
        kind: 'exponential',
        rate: -dHi,
        area: (height * 9) / (8 * -dHi),
      });
    }
  } else {
    const k = largestExponent(eLo + 1);
    if (k !== null)
      hats.push({ ...begin, kind: 'pole', rate: k, area: (height * c) / powerOfTwo(k) });
  }
  return hats.length === 0 ? null : hats.reduce((a, b) => (b.area < a.area ? b : a));
}

/** The largest k between MIN_K and MAX_K with 2^k ≤ x. */
function largestExponent(x: number): number | null {
  for (let k = MAX_K; k >= MIN_K; k--) if (powerOfTwo(k) <= x) return k;
  return null;
}

/** s^(1/2^k): |k| roots or squares. */
function rootOf(s: number, k: number): number {
  let y = s;
  for (let i = 0; i < k; i++) y = Math.sqrt(y);
  for (let i = 0; i > k; i--) y *= y;
  return y;
}

/** The place on a hat for a uniform s in (0, 1], written into `out`. */
export function placeOn(hat: Hat, s: number, out: HatPoint): void {
  const { origin, direction, c, height, rate } = hat;
  let t: number;
  if (hat.kind === 'exponential') {
    const y = 1 / rootOf(s, 3);
    t = c + (9 * (y - 1)) / rate;
    out.height = (height * s) / y;
  } else {
    const root = rootOf(s, rate);
    const ratio = hat.kind === 'pole' ? root : 1 / root;
    t = c * ratio;
    out.height = (height * s) / ratio;
  }
  out.t = t;
  out.x = origin + direction * t;
}

/** The hat's height at x, for charts. */
export function heightOn(hat: Hat, x: number): number {
  const { origin, direction, c, height, rate } = hat;
  const t = (x - origin) * direction;
  if (hat.kind === 'nothing') return 0;
  if (hat.kind === 'exponential') {
    const z = 1 + (rate * (t - c)) / 9;
    const cube = z * z * z;
    return height / (cube * cube * cube);
  }
  // (t/c)^(2^k) by squares or roots, then one factor t/c more or less.
  const raised = rootOf(t / c, -rate);
  return hat.kind === 'pole' ? (height * raised * c) / t : (height * c) / (raised * t);
}
