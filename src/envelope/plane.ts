/**
 * A tangent plane of ln f over a box, with a proved remainder: for x = c + ξ in the box
 *
 *      ln f(c) + g·ξ + R⁻  ≤  ln f(x)  ≤  ln f(c) + g·ξ + R⁺
 *
 * where ½ ξᵀHξ, H the second derivatives over the box, is bounded by the eigenvalues of H
 * in units of the box: with ξ_i = r_i z_i, |z_i| ≤ 1, it is at most ½ μ Σ z_i² if
 * μ·1 − (r_i H_ij r_j) is positive definite for every H, which Cholesky's method in
 * intervals proves. A counted axis has no plane but its whole slope in the remainder.
 * Source: src/METHOD.md, "Boxes". Derivatives along two axes at once by polarization,
 * 2 H_ij = D²(e_i + e_j) − H_ii − H_jj.
 */
import type { Encloser } from '../formula/enclose';
import { Defined } from '../formula/operation';
import * as elementary from '../numeric/elementary';
import * as I from '../numeric/interval';
import { expm1 } from '../numeric/special';
import { addDown, addUp, mulDown, mulUp, ulp } from '../numeric/float';
import type { Box, Space } from './space';

export interface Plane {
  readonly centre: readonly number[];
  /** Along each axis; 0 along counted ones. */
  readonly slopes: readonly number[];
  /** ln f at the centre. */
  readonly at: I.Interval;
  /** Bounds of ln f less the plane's rise from the centre, over the box. */
  readonly logLo: number;
  readonly logHi: number;
  /** A lower bound of the mean of that under the plane's own exponential. */
  readonly meanLo: number;
  /** What the bounds owe to the axes, for choosing where to halve. */
  readonly owed: readonly number[];
}

const LN_2 = 0.6931471805599453;
/** Covers the rounding of sums, exponentials and products behind a mass. */
const ROOM = 1e-12;

/** The mean of e^(a·t) over −½ ≤ t ≤ ½: sinh(a/2)/(a/2). */
function tiltedMean(a: number): number {
  const half = Math.abs(a) / 2;
  // e^half (1 − e^-2half) / (2 half)
  return half < 1e-8 ? 1 : (elementary.exp(half) * -expm1.at(-2 * half)) / (2 * half);
}

/** What a plane says of the density × 2^-exponent over a box. */
export interface PlaneMasses {
  /** The height of the upper bound at the centre. */
  readonly upper: number;
  readonly upperMass: number;
  /** Of the density itself; where conditions may fail it says nothing. */
  readonly lowerMass: number;
  /** What rounding may move the logarithms by. */
  readonly room: number;
}

/** Bounds of the integral of the density over a box by its tangent plane. */
export function planeMasses(
  space: Space,
  box: Box,
  { centre, slopes, logHi, meanLo }: Plane,
  exponent: number,
): PlaneMasses {
  const measure = space.measure(box);
  const shift = exponent * LN_2;
  // Of e^(slope · ξ) over the box, as a share of its measure.
  const mean = slopes.reduce((product, slope, i) => {
    if (slope === 0) return product;
    return product * tiltedMean(slope * (box.hi[i]! - box.lo[i]!));
  }, 1);
  const rise = slopes.reduce((sum, slope, i) => {
    if (slope === 0) return sum;
    const ends = [box.lo[i]!, box.hi[i]!].map((end) => slope * (end - centre[i]!));
    return sum + Math.abs(ends[0]! + ends[1]!) / 2;
  }, 0);
  // The box's middle is a double beside its centre; what that moves is within the room.
  const room = ROOM * (1 + Math.abs(logHi) + Math.abs(shift)) + rise;
  const upper = elementary.exp(logHi - shift + room);
  const least = elementary.exp(meanLo - shift - room);
  // Over a box that is far too steep for doubles a plane tells nothing.
  const isTold = mean < Infinity;
  return {
    upper,
    // The room in `upper` covers the rounding here; more would favour this box over others.
    upperMass: isTold ? mulUp(upper * mean, measure.hi) : Infinity,
    lowerMass: isTold ? Math.max(0, mulDown(least * mean * (1 - ROOM), measure.lo)) : 0,
    room,
  };
}

/** Halvings of the bound between the least and the largest eigenvalue that is known. */
const EIGEN_STEPS = 6;

/** The tangent plane over a box on which ln f is smooth; null where its derivatives have no bound. */
export function planeOver(space: Space, box: Box, encloser: Encloser): Plane | null {
  const { n } = space;
  const { lo, hi } = space.corners(box);
  const slopes = lo.map(() => I.interval());
  const bends: I.Interval[][] = lo.map(() => lo.map(() => I.interval()));
  for (let i = 0; i < n; i++) {
    const { logarithmSlope, logarithmBend, defined } = encloser.overBox(lo, hi, [i]);
    if (defined !== Defined.Everywhere || !isBounded(logarithmSlope) || !isBounded(logarithmBend))
      return null;
    I.copy(slopes[i]!, logarithmSlope);
    I.copy(bends[i]![i]!, logarithmBend);
  }
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < i; j++) {
      const both = bends[i]![j]!;
      I.copy(both, encloser.overBox(lo, hi, [i, j]).logarithmBend);
      if (!isBounded(both)) return null;
      I.subtract(both, both, bends[i]![i]!);
      I.subtract(both, both, bends[j]![j]!);
      I.scale(both, both, 0.5);
      I.copy(bends[j]![i]!, both);
    }
  }
  const centre = space.centre(box);
  const radii = centre.map((c, i) => Math.max(addUp(c, -lo[i]!), addUp(hi[i]!, -c)));
  // In units of the box.
  const scaled = bends.map((row, i) =>
    row.map((bend, j) => {
      const out = I.interval();
      I.scale(out, bend, radii[i]!);
      I.scale(out, out, radii[j]!);
      return out;
    }),
  );
  return tangent(space, encloser, centre, radii, slopes, scaled);
}

function tangent(
  space: Space,
  encloser: Encloser,
  centre: readonly number[],
  radii: readonly number[],
  slopes: readonly I.Interval[],
  scaled: readonly (readonly I.Interval[])[],
): Plane | null {
  const { n } = space;
  const own = slopes.map(() => 0);
  const at = I.interval();
  let [rest, restLo] = [0, 0];
  const owed = scaled.map((row) => row.reduce((sum, bend) => sum + size(bend), 0) / 2);
  for (let i = 0; i < n; i++) {
    const here = encloser.overBox(centre, centre, [i]);
    if (i === 0) I.copy(at, here.logarithm);
    const slope = here.logarithmSlope;
    if (space.isCounted(i)) {
      // The whole slope is left to the remainder.
      const most = mulUp(size(slopes[i]!), radii[i]!);
      rest = addUp(rest, most);
      owed[i]! += most;
      // An even count of values has its centre half a step off their mean.
      restLo = addUp(restLo, mulUp(size(slope), space.axes[i]!.step));
      continue;
    }
    own[i] = slope.lo / 2 + slope.hi / 2;
    // What the double leaves of the slope at the centre.
    const left = Math.max(addUp(slope.hi, -own[i]!), addUp(own[i]!, -slope.lo));
    const most = mulUp(left, radii[i]!);
    rest = addUp(rest, most);
    restLo = addUp(restLo, most);
  }
  if (!isBounded(at)) return null;
  const highest = largestEigenvalue(scaled, 1);
  const lowest = largestEigenvalue(scaled, -1);
  const half = n / 2;
  const rise = addUp(mulUp(half, highest), rest);
  const fall = addUp(mulUp(half, lowest), rest);
  // Σ z_i² has a mean below n under the plane's exponential: 1/3 + 2a²/45 along an axis.
  const means = own.map((slope, i) => {
    if (space.isCounted(i)) return 1;
    const a = slope * radii[i]!;
    // The centre is a double, off the middle by so much at most.
    return Math.min(1, 1 / 3 + 0.0445 * a * a + (4 * ulp(centre[i]!)) / radii[i]!);
  });
  const mean = means.reduce((sum, each) => sum + each, 0) * (1 + 1e-12);
  const sag = addUp(mulUp(mean / 2, lowest), restLo);
  return {
    centre,
    slopes: own,
    at,
    logLo: addDown(at.lo, -fall),
    logHi: addUp(at.hi, rise),
    meanLo: addDown(at.lo, -sag),
    owed,
  };
}

/**
 * A bound μ ≥ 0 of the eigenvalues of sign · H for all H between the enclosures: the least of a
 * few candidates for which μ·1 − sign · H is proved positive definite.
 */
function largestEigenvalue(h: readonly (readonly I.Interval[])[], sign: 1 | -1): number {
  if (isPositiveDefinite(h, 0, sign)) return 0;
  // Gershgorin: no eigenvalue is above the largest row sum.
  let most = 0;
  for (const [i, row] of h.entries()) {
    let sum = sign > 0 ? row[i]!.hi : -row[i]!.lo;
    for (const [j, entry] of row.entries()) if (j !== i) sum = addUp(sum, size(entry));
    most = Math.max(most, sum);
  }
  let least = 0;
  for (let k = 0; k < EIGEN_STEPS && most > 0; k++) {
    const candidate = least / 2 + most / 2;
    if (isPositiveDefinite(h, candidate, sign)) most = candidate;
    else least = candidate;
  }
  return most;
}

/** Whether μ·1 − sign · H is positive definite for every H between the enclosures, by Cholesky's method. */
function isPositiveDefinite(
  h: readonly (readonly I.Interval[])[],
  shift: number,
  sign: 1 | -1,
): boolean {
  const n = h.length;
  const rows = h.map((row, i) =>
    row.map((entry, j) => {
      const out = I.interval();
      I.scale(out, entry, -sign);
      if (i === j) I.add(out, out, I.interval(shift));
      return out;
    }),
  );
  const factor = I.interval();
  const product = I.interval();
  for (let k = 0; k < n; k++) {
    const pivot = rows[k]![k]!;
    if (!(pivot.lo > 0)) return false;
    for (let i = k + 1; i < n; i++) {
      I.divide(factor, rows[i]![k]!, pivot);
      for (let j = k + 1; j <= i; j++) {
        I.multiply(product, factor, rows[j]![k]!);
        I.subtract(rows[i]![j]!, rows[i]![j]!, product);
        I.copy(rows[j]![i]!, rows[i]![j]!);
      }
    }
  }
  return true;
}

function size({ lo, hi }: I.Interval): number {
  return Math.max(Math.abs(lo), Math.abs(hi));
}

function isBounded({ lo, hi }: I.Interval): boolean {
  return lo > -Infinity && hi < Infinity;
}
