/**
 * Shares of a counted quantity below and above a value, and the value at a share: sums of
 * heights, cumulated from both ends so that small shares keep their digits.
 *
 * Beyond the points with heights of their own, under a hat, terms are added until they no
 * longer count; where they fall too slowly for that, the sum of the rest is the integral of the
 * curve through the points and its first corrections (Euler and Maclaurin, about midpoints):
 *
 *     Σ f(i), i ≥ m  =  ∫ f from m − ½ on  +  Δ/24 − 17 Δ³/5760,   Δ the differences about m − ½
 *
 * Source: DLMF 2.10(i), the Euler–Maclaurin formula; its form for midpoints follows from
 * B_2(½) = −1/12 and B_4(½) = 7/240. Not handled: proofs of the last digits there.
 */
import type { Hat } from '../envelope/hat';
import { placeOn } from '../envelope/hat';
import type { PointEnvelope } from '../envelope/points';
import { endpointIntegral } from './quadrature';
import type { ExactShares, Side } from './shares';
import { firstIndex, runningSums } from './shares';
import { shareBeyond } from './side';

/** A value this near to a point, in steps, is that point. */
const SAME = 1e-9;
/** Shares are told to this, relative to themselves. */
const TOLD = 1e-13;
const PRECISE = 1e-15;
/** Terms that are added one by one. */
const MOST_TERMS = 1024;
/** What is left may be this small a share of the sum. */
const NOTHING = 1e-18;

type Weight = (x: number) => number;
const ONE: Weight = () => 1;

/** Sums over the points of an envelope: those with heights of their own, and those under hats. */
export class PointSums {
  private readonly middles: Float64Array;

  constructor(readonly envelope: PointEnvelope) {
    const { least, most } = envelope.heights;
    this.middles = least.map((low, i) => low / 2 + most[i]! / 2);
  }

  get first(): number {
    return this.envelope.first;
  }

  get last(): number {
    return this.envelope.first + this.middles.length - 1;
  }

  /** The heights of the points first … last. */
  get heights(): Float64Array {
    return this.middles;
  }

  /** The sum of weight · height over all points. */
  sum(weight: Weight): number {
    const { lattice, hats, first } = this.envelope;
    let sum = 0;
    let carry = 0;
    this.middles.forEach((height, i) => {
      if (height === 0) return;
      const term = height * weight(lattice.at(first + i));
      const next = sum + term;
      carry += Math.abs(sum) >= Math.abs(term) ? sum - next + term : term - next + sum;
      sum = next;
    });
    return hats.reduce((total, hat) => total + this.beyond(hat, 1, weight), sum + carry);
  }

  /** The sum over the points of a hat from the j-th on, j ≥ 1. */
  beyond(hat: Hat, j: number, weight: Weight = ONE): number {
    const { direction } = hat;
    const { lattice, heightAt } = this.envelope;
    const begin = direction > 0 ? this.last : this.first;
    const term = (i: number): number => {
      const x = lattice.at(begin + direction * i);
      const height = Math.abs(x) < Infinity ? heightAt(x) : 0;
      return height > 0 ? height * weight(x) : 0;
    };
    let sum = 0;
    let before = NaN;
    for (let i = j; i < j + MOST_TERMS; i++) {
      const next = term(i);
      sum += next;
      const ratio = next / before;
      if (next === 0 || (ratio < 1 && next * ratio <= NOTHING * (1 - ratio) * sum)) return sum;
      before = next;
    }
    return sum + this.rest(hat, j + MOST_TERMS, weight, term);
  }

  private rest(hat: Hat, m: number, weight: Weight, term: (i: number) => number): number {
    const { lattice, curveAt } = this.envelope;
    const { step } = lattice;
    const at = { x: 0, t: 0, height: 0 };
    const slope = (s: number): number => {
      placeOn(hat, s, at);
      if (!(at.t < Infinity && at.height > 0)) return 0;
      const x = lattice.at(0) + step * at.x;
      return hat.area * Math.min(1, curveAt!(x) / at.height) * weight(x);
    };
    // The hat begins half a point beyond the last point, the integral half a point before the m-th.
    const integral = endpointIntegral(slope, 0, shareBeyond(hat, hat.c + m - 1), PRECISE).value;
    const [a, b, c, d] = [term(m - 2), term(m - 1), term(m), term(m + 1)];
    return integral + (c - b) / 24 - (17 * (d - 3 * c + 3 * b - a)) / 5760;
  }
}

/** The answers of a counted quantity. */
export class PointShares implements ExactShares {
  readonly area: number;
  readonly sums: PointSums;
  private readonly total: number;
  /** Sums before each point, and from each point on; those under hats included. */
  private readonly before: Float64Array;
  private readonly from: Float64Array;
  private readonly lower: Hat | undefined;
  private readonly upper: Hat | undefined;

  constructor(envelope: PointEnvelope) {
    this.sums = new PointSums(envelope);
    this.lower = envelope.hats.find(({ direction }) => direction < 0);
    this.upper = envelope.hats.find(({ direction }) => direction > 0);
    const [below, above] = [this.lower, this.upper].map((hat) =>
      hat ? this.sums.beyond(hat, 1) : 0,
    );
    const heights = Array.from(this.sums.heights);
    this.before = runningSums([below!, ...heights]).slice(1);
    this.from = runningSums([above!, ...heights.reverse()])
      .slice(1)
      .reverse();
    this.total = this.before.at(-1)! + above!;
    this.area = Math.min(envelope.areaHi, Math.max(envelope.areaLo, this.total));
  }

  /** The share of points before x; x itself is neither below nor above. */
  below(x: number): number {
    const { lattice } = this.sums.envelope;
    return this.upTo(Math.ceil(lattice.numberOf(x) - SAME) - 1, 'below');
  }

  /** The share of points after x. */
  above(x: number): number {
    const { lattice } = this.sums.envelope;
    return this.upTo(Math.floor(lattice.numberOf(x) + SAME), 'above');
  }

  /** The share of the points up to number k, or of those after it. */
  private upTo(k: number, side: Side): number {
    const atMost = this.sumTo(k);
    const isLow = atMost <= this.total / 2;
    const small = Math.min(1, (isLow ? atMost : this.sumFrom(k + 1)) / this.total);
    return isLow === (side === 'below') ? small : 1 - small;
  }

  /** The sum of the points up to number k. */
  private sumTo(k: number): number {
    const { first, last } = this.sums;
    if (k >= first)
      return k <= last ? this.before[k - first + 1]! : this.total - this.sumFrom(k + 1);
    return this.lower ? this.sums.beyond(this.lower, first - k) : 0;
  }

  /** The sum of the points from number k on. */
  private sumFrom(k: number): number {
    const { first, last } = this.sums;
    if (k <= last) return k >= first ? this.from[k - first]! : this.total - this.sumTo(k - 1);
    return this.upper ? this.sums.beyond(this.upper, k - last) : 0;
  }

  /**
   * From below the least point that has, with all before it, the share; from above the greatest
   * that has it with all after it. Shares 0 and 1 give the limits.
   */
  quantile(share: number, side: Side): number {
    const { lattice } = this.sums.envelope;
    const isBelow = side === 'below';
    const [near, far] = isBelow ? [lattice.first, lattice.last] : [lattice.last, lattice.first];
    if (share <= 0 || share >= 1) return this.limit(share <= 0 ? near : far);
    const wanted = share * this.total * (1 - TOLD);
    const rest = (1 - share) * this.total * (1 + TOLD);
    // Each condition holds from some point on, seen from that side.
    const isReached = isBelow
      ? (k: number) => (share <= 0.5 ? this.sumTo(k) >= wanted : this.sumFrom(k + 1) <= rest)
      : (k: number) => (share <= 0.5 ? this.sumFrom(k) >= wanted : this.sumTo(k - 1) <= rest);
    const k = this.firstFrom(isBelow ? 1 : -1, isReached);
    return Number.isFinite(k) ? lattice.at(k) : k;
  }

  private limit(number: number): number {
    return Number.isFinite(number) ? this.sums.envelope.lattice.at(number) : number;
  }

  /** The first number, counted in a direction, for which a condition, once true, stays true. */
  private firstFrom(direction: 1 | -1, isReached: (k: number) => boolean): number {
    const { first, last } = this.sums;
    const [begin, end] = direction > 0 ? [first, last] : [last, first];
    const at = (i: number): number => begin + direction * i;
    const n = last - first + 1;
    if (isReached(begin) && (direction > 0 ? this.lower : this.upper)) {
      // Back into the hat behind: the last place, outward, where it still holds.
      const i = lastOutward((j) => isReached(begin - direction * j));
      return begin - direction * i;
    }
    const i = firstIndex(n, (j) => isReached(at(j)));
    if (i < n) return at(i);
    const hat = direction > 0 ? this.upper : this.lower;
    if (!hat) return end;
    return end + direction * (1 + lastOutward((j) => !isReached(end + direction * j)));
  }
}

/** The largest j ≥ 0 for which a condition holds that holds at 0 and, once false, stays false. */
function lastOutward(holds: (j: number) => boolean): number {
  let lo = 0;
  let hi = 1;
  while (holds(hi)) {
    lo = hi;
    hi *= 2;
    if (hi === Infinity) return Infinity;
  }
  while (hi - lo > 1) {
    const middle = Math.floor(lo + (hi - lo) / 2);
    if (middle === lo || middle === hi) break;
    if (holds(middle)) lo = middle;
    else hi = middle;
  }
  return lo;
}
