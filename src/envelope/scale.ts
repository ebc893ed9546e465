/**
 * How far the density must be scaled so that neither its heights nor its areas
 * overflow or underflow: an exponent e of two, from proved bounds of ln f alone.
 * A height that a few sampled points suggest would miss a lone spike.
 */
import FlatQueue from 'flatqueue';
import type { Encloser } from '../formula/enclose';
import * as elementary from '../numeric/elementary';
import { looseProductUp, looseSumUp, middle, up } from '../numeric/float';

/** While ln f and ln(f · width) at the peak stay within ± this, doubles serve as they are. */
const PLAIN = 500;
/** The peak of ln f is found to within this. */
const NEAR = 20;
const MAX_STEPS = 2000;
const LN_2 = 0.6931471805599453;

interface Stretch {
  readonly a: number;
  readonly b: number;
}

/** The exponent e by which an unscaled density on [from, to] is to be scaled (× 2^-e); 0 in the usual case. */
export function findExponent(encloser: Encloser, from: number, to: number): number {
  const peak = enclosePeak(encloser, from, to);
  const widest = Math.max(0, elementary.ln(to / 2 - from / 2) + LN_2);
  if (peak === null || (peak - NEAR >= -PLAIN && peak + widest <= PLAIN)) return 0;
  return Math.round(peak / LN_2);
}

/** An upper bound of ln f that is within NEAR of its maximum; null if f is zero everywhere or has no bound. */
function enclosePeak(encloser: Encloser, from: number, to: number): number | null {
  const queue = new FlatQueue<Stretch>();
  let reached = -Infinity;
  const reach = (x: number): number => {
    const { lo, hi } = encloser.over(x, x, null, null).logarithm;
    reached = Math.max(reached, lo);
    return hi;
  };
  const consider = (a: number, b: number): void => {
    const m = middle(a, b);
    queue.push({ a, b }, -boundLogarithm(encloser, a, m, b, reach(m)));
  };
  reach(from);
  reach(to);
  consider(from, to);
  for (let i = 0; i < MAX_STEPS; i++) {
    const top = -queue.peekValue()!;
    if (top === -Infinity) return null;
    if (top - reached <= NEAR) return top;
    const { a, b } = queue.pop()!;
    const m = middle(a, b);
    if (m === a) break;
    consider(a, m);
    consider(m, b);
  }
  return reached === -Infinity ? null : reached;
}

/** An upper bound of ln f over [a, b]: its enclosure, or a bound at the point m inside and its slope. */
function boundLogarithm(encloser: Encloser, a: number, m: number, b: number, atM: number): number {
  const { logarithm, logarithmSlope } = encloser.over(a, b, null, null);
  const steepest = Math.max(Math.abs(logarithmSlope.lo), Math.abs(logarithmSlope.hi));
  if (!(steepest < Infinity)) return logarithm.hi;
  const farthest = up(Math.max(m - a, b - m));
  return Math.min(logarithm.hi, looseSumUp(atM, looseProductUp(steepest, farthest)));
}
