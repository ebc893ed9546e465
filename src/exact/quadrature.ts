/**
 * Integrals of a function over a finite stretch, with an estimate of their error.
 *
 * Smooth stretches: the pair of Gauss and Kronrod rules with 10 and 21 points, and
 * the error estimate that its authors give. Source: Piessens, de Doncker-Kapenga,
 * Überhuber, Kahaner (1983), QUADPACK, rule qk21; nodes and weights recomputed to 20
 * digits. Stretches with a root or a pole at an end: the double exponential rule.
 * Source: Takahasi and Mori (1974), "Double exponential formulas for numerical
 * integration". Portable operations only.
 * Not handled: proofs (the caller holds every result within proved bounds).
 */
import * as elementary from '../numeric/elementary';
import { middle } from '../numeric/float';

export interface Estimate {
  readonly value: number;
  /** About how far off the value is. */
  readonly error: number;
}

/** The nodes of both rules and those that the longer one adds, on (0, 1); 0 is one more of these. */
const SHARED_NODES = [
  0.14887433898163122, 0.4333953941292472, 0.6794095682990244, 0.8650633666889845,
  0.9739065285171717,
];
const GAUSS_WEIGHTS = [
  0.29552422471475287, 0.26926671930999635, 0.21908636251598204, 0.1494513491505806,
  0.06667134430868814,
];
const SHARED_WEIGHTS = [
  0.14773910490133849, 0.13470921731147334, 0.10938715880229764, 0.07503967481091996,
  0.032558162307964725,
];
const ADDED_NODES = [
  0.2943928627014602, 0.5627571346686047, 0.7808177265864169, 0.9301574913557082,
  0.9956571630258081,
];
const ADDED_WEIGHTS = [
  0.14277593857706009, 0.12349197626206584, 0.0931254545836976, 0.054755896574351995,
  0.011694638867371874,
];
const CENTRE_WEIGHT = 0.1494455540029169;

const values = new Float64Array(21);

/** The integral of f over [a, b] where f is smooth. */
export function smoothIntegral(f: (x: number) => number, a: number, b: number): Estimate {
  const half = b / 2 - a / 2;
  const centre = a + half;
  const atCentre = f(centre);
  let long = CENTRE_WEIGHT * atCentre;
  let short = 0;
  for (let i = 0; i < 5; i++) {
    const left = f(centre - half * SHARED_NODES[i]!);
    const right = f(centre + half * SHARED_NODES[i]!);
    const outerLeft = f(centre - half * ADDED_NODES[i]!);
    const outerRight = f(centre + half * ADDED_NODES[i]!);
    long += SHARED_WEIGHTS[i]! * (left + right) + ADDED_WEIGHTS[i]! * (outerLeft + outerRight);
    short += GAUSS_WEIGHTS[i]! * (left + right);
    values[4 * i] = left;
    values[4 * i + 1] = right;
    values[4 * i + 2] = outerLeft;
    values[4 * i + 3] = outerRight;
  }
  const mean = long / 2;
  let spread = CENTRE_WEIGHT * Math.abs(atCentre - mean);
  for (let i = 0; i < 5; i++) {
    spread +=
      SHARED_WEIGHTS[i]! * (Math.abs(values[4 * i]! - mean) + Math.abs(values[4 * i + 1]! - mean)) +
      ADDED_WEIGHTS[i]! *
        (Math.abs(values[4 * i + 2]! - mean) + Math.abs(values[4 * i + 3]! - mean));
  }
  const difference = Math.abs(long - short);
  const ratio = (200 * difference) / spread;
  const error = ratio < 1 ? spread * ratio * Math.sqrt(ratio) : spread > 0 ? spread : difference;
  return { value: long * half, error: Math.abs(error * half) };
}

/** Beyond this the rule's nodes are nearer to the ends than doubles can tell. */
const REACH = 6;
const FIRST_STEP = 0.5;
const MOST_HALVINGS = 6;
const HALF_PI = 1.5707963267948966;

/** The integral of f over [a, b] where f may have a root or an integrable pole at either end. */
export function endpointIntegral(
  f: (x: number) => number,
  a: number,
  b: number,
  wanted: number,
): Estimate {
  const width = b - a;
  /** The integrand at t: x = a + width / (1 + e^(-π sinh t)). */
  const at = (t: number): number => {
    const grown = elementary.exp(Math.abs(t));
    const decay = elementary.exp(-HALF_PI * (grown - 1 / grown));
    // The distance from the nearer end keeps its digits.
    const off = width * (decay / (1 + decay));
    const x = t < 0 ? a + off : b - off;
    const slope = (HALF_PI * (grown + 1 / grown) * decay) / ((1 + decay) * (1 + decay));
    if (slope === 0 || off === 0) return 0;
    const y = f(x) * slope;
    return y === y && Math.abs(y) < Infinity ? y : 0;
  };
  let step = FIRST_STEP;
  let sum = at(0);
  for (let t = step; t <= REACH; t += step) sum += at(t) + at(-t);
  let value = sum * step * width;
  let error = Infinity;
  for (let i = 0; i < MOST_HALVINGS; i++) {
    for (let t = step / 2; t <= REACH; t += step) sum += at(t) + at(-t);
    step /= 2;
    const finer = sum * step * width;
    const change = Math.abs(finer - value);
    // Digits double with each halving once the rule has caught on.
    const previous = error;
    error = previous < Infinity && change < previous ? change * (change / previous) : change;
    value = finer;
    if (error <= wanted * Math.abs(value)) break;
  }
  return { value, error };
}

/** Error left to a stretch, as a share of the integral of |f|. */
const PRECISE = 1e-15;
const MOST_STRETCHES = 4000;

interface Stretch {
  readonly a: number;
  readonly b: number;
  readonly value: number;
  readonly error: number;
}

/** The integral of f over neighbouring stretches [bounds[i], bounds[i + 1]], halved where f is not smooth. */
export function refinedIntegral(
  f: (x: number) => number,
  stretches: readonly (readonly [from: number, to: number])[],
): number {
  const stretch = (a: number, b: number): Stretch => ({ a, b, ...smoothIntegral(f, a, b) });
  let all = stretches.map(([a, b]) => stretch(a, b));
  for (;;) {
    const size = all.reduce((sum, { value }) => sum + Math.abs(value), 0);
    const finer: Stretch[] = [];
    all.forEach((s, i) => {
      const m = middle(s.a, s.b);
      const room = MOST_STRETCHES - finer.length - (all.length - i);
      if (s.error <= PRECISE * size || m === s.a || room <= 0) finer.push(s);
      else finer.push(stretch(s.a, m), stretch(m, s.b));
    });
    if (finer.length === all.length) break;
    all = finer;
  }
  return all.reduce((sum, { value }) => sum + value, 0);
}
