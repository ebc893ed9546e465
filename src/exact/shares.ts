/**
 * Shares of the area below and above a point, and the point at a share.
 *
 * Areas are cumulated from both ends. A share is taken from the end it is nearer to,
 * so a share of 1e-300 in either tail keeps its digits, and the two shares of a point
 * add up to 1. The point at a share is found by Newton's method on the same areas,
 * held between bounds that it narrows, so it undoes the share.
 * Not handled: proofs of the last digits (cells.ts says what they rest on).
 */
import type { Envelope } from '../envelope/envelope';
import { middle } from '../numeric/float';
import type { Cell } from './cells';
import { cellsOf } from './cells';
import type { SharesOfValues } from './distribution';
import { areasUpTo } from './primitive';
import { endpointIntegral, smoothIntegral } from './quadrature';

export type Side = 'below' | 'above';

const MOST_STEPS = 120;
/** Parts of a cell below this share of it have their area taken by itself, for its digits. */
const TINY = 1e-6;
/** A cell whose area the rule for smooth stretches gives to this is one. */
const SMOOTH = 1e-12;
const PRECISE = 1e-15;

/** The exact answers of one density. */
export interface ExactShares {
  /** The area under the scaled density, or the sum of its heights. Guarantee: within its proved bounds. */
  readonly area: number;
  /** The share of the area below x: 0 up to the limits, 1 beyond them. */
  below(x: number): number;
  /** The share of the area above x, with all its digits however small. */
  above(x: number): number;
  /**
   * The least x with the share on its side: shares 0 and 1 give the limits.
   * Domain: 0 ≤ share ≤ 1.
   */
  quantile(share: number, side: Side): number;
}

/** The answers of a continuous density. */
export class Shares implements ExactShares {
  readonly area: number;
  private readonly cells: readonly Cell[];
  /** Area before each cell, and after it. */
  private readonly before: Float64Array;
  private readonly after: Float64Array;

  constructor(private readonly envelope: Envelope) {
    this.cells = cellsOf(envelope);
    const areas = this.cells.map(({ area }) => area);
    this.before = runningSums(areas);
    this.after = runningSums(areas.reverse()).reverse();
    const sum = this.before.at(-1)!;
    this.area = Math.min(envelope.areaHi, Math.max(envelope.areaLo, sum));
  }

  below(x: number): number {
    return this.share(x, 'below');
  }

  above(x: number): number {
    return this.share(x, 'above');
  }

  private share(x: number, side: Side): number {
    const { cells, before, after } = this;
    const isBelow = side === 'below';
    if (!(x > this.envelope.from)) return isBelow ? 0 : 1;
    if (x >= this.envelope.to) return isBelow ? 1 : 0;
    const total = before[cells.length]!;
    // The first cell that does not lie wholly below x.
    const i = firstIndex(cells.length, (k) => cells[k]!.to > x);
    const cell = cells[i];
    const isInside = cell !== undefined && cell.from < x;
    const u = isInside ? cell.parameterOf(x) : 0;
    const lower = before[i]! + (isInside ? cell.areaOver(cell.start, u) : 0);
    if (lower <= total / 2) return isBelow ? lower / total : 1 - lower / total;
    const upper = isInside ? after[i + 1]! + cell.areaOver(u, cell.end) : after[i]!;
    return isBelow ? 1 - upper / total : upper / total;
  }

  quantile(share: number, side: Side): number {
    const { from, to } = this.envelope;
    if (share <= 0) return side === 'below' ? from : to;
    if (share >= 1) return side === 'below' ? to : from;
    const total = this.before[this.cells.length]!;
    // 1 − share is exact from one half on.
    return share <= 0.5
      ? this.pointAt(share * total, side)
      : this.pointAt((1 - share) * total, side === 'below' ? 'above' : 'below');
  }

  /** The shares on both sides of rising values: as `below` and `above`, but for many at a time. */
  ofRising(values: Float64Array): SharesOfValues {
    const { cells, before, after } = this;
    const { from, to } = this.envelope;
    const n = values.length;
    const total = before[cells.length]!;
    const below = new Float64Array(n);
    const above = new Float64Array(n);
    const places = new Float64Array(n);
    const areas = new Float64Array(n);
    let k = 0;
    for (; k < n && !(values[k]! > from); k++) above[k] = 1;
    for (let i = 0; i <= cells.length && k < n; i++) {
      const cell = cells[i];
      const start = cell?.from ?? to;
      const end = cell?.to ?? Infinity;
      for (; k < n && values[k]! <= start && values[k]! < to; k++) {
        below[k] = before[i]! / total;
        above[k] = after[i]! / total;
      }
      if (cell === undefined) break;
      const first = k;
      for (; k < n && values[k]! < end; k++) places[k] = cell.parameterOf(values[k]!);
      areasUpTo(cell, places, first, k, areas);
      for (let j = first; j < k; j++) {
        const area = Math.min(cell.area, areas[j]!);
        const isTiny = Math.min(area, cell.area - area) < TINY * cell.area;
        if (isTiny) {
          below[j] = this.below(values[j]!);
          above[j] = this.above(values[j]!);
          continue;
        }
        below[j] = (before[i]! + area) / total;
        above[j] = (after[i + 1]! + (cell.area - area)) / total;
      }
    }
    for (; k < n; k++) below[k] = 1;
    return { below, above };
  }

  /**
   * The mean of a weight under the density, by quadrature.
   * Domain: a weight that is smooth but at the ends of pieces, and whose mean is finite.
   */
  meanOf(weight: (x: number) => number): number {
    const { cells, before } = this;
    const total = before[cells.length]!;
    return cells.reduce((sum, cell) => sum + moment(cell, weight) / total, 0);
  }

  private pointAt(area: number, side: Side): number {
    const { cells, before, after } = this;
    const last = cells.length - 1;
    if (side === 'below') {
      const i = Math.min(
        last,
        firstIndex(cells.length, (k) => before[k + 1]! >= area),
      );
      return this.pointIn(cells[i]!, area - before[i]!, side);
    }
    // From the top: the last cell at whose lower end the area above is reached.
    const i = Math.max(0, firstIndex(cells.length, (k) => after[k]! < area) - 1);
    return this.pointIn(cells[i]!, area - after[i + 1]!, side);
  }

  /** The point of a cell with `area` between it and the cell's end on that side. */
  private pointIn(cell: Cell, area: number, side: Side): number {
    const isBelow = side === 'below';
    if (!(area > 0)) return isBelow ? cell.from : cell.to;
    if (area >= cell.area) return isBelow ? cell.to : cell.from;
    return cell.placeAt(parameterAt(cell, area, isBelow));
  }
}

/** The integral of weight · density over a cell. */
function moment(
  { start, end, area, from, slopeAt, placeAt }: Cell,
  weight: (x: number) => number,
): number {
  const at = (u: number): number => {
    const slope = slopeAt(u);
    return slope === 0 ? 0 : slope * weight(placeAt(u));
  };
  const isSmooth =
    start === from && Math.abs(smoothIntegral(slopeAt, start, end).value - area) <= SMOOTH * area;
  return isSmooth
    ? smoothIntegral(at, start, end).value
    : endpointIntegral(at, start, end, PRECISE).value;
}

/** Newton's method for the parameter, within a bracket that narrows. */
function parameterAt(cell: Cell, area: number, isBelow: boolean): number {
  let [lo, hi] = [cell.start, cell.end];
  let u = firstGuess(cell, area, isBelow);
  let stride = Infinity;
  for (let i = 0; i < MOST_STEPS; i++) {
    if (!(u > lo && u < hi)) u = middle(lo, hi);
    const reached = isBelow ? cell.areaOver(cell.start, u) : cell.areaOver(u, cell.end);
    // Positive when u must grow.
    const missing = isBelow ? area - reached : reached - area;
    if (missing === 0) return u;
    if (missing > 0) lo = u;
    else hi = u;
    const step = missing / cell.slopeAt(u);
    const next = u + step;
    const isInside = next > lo && next < hi;
    if (next === u || Math.abs(step) <= 1e-16 * Math.abs(u)) return isInside ? next : u;
    if (middle(lo, hi) === lo) return u;
    // Newton's step if it stays inside and keeps shrinking, else half the bracket.
    const isGood = isInside && Math.abs(step) < stride / 2;
    stride = isGood ? Math.abs(step) : hi - lo;
    u = isGood ? next : between(lo, hi);
  }
  return u;
}

/** The middle of a bracket; by its logarithm where it spans many sizes on one side of 0. */
function between(lo: number, hi: number): number {
  const [a, b] = [Math.abs(lo), Math.abs(hi)];
  const isWide = lo * hi >= 0 && Math.max(a, b) > 16 * Math.min(a, b);
  if (!isWide) return middle(lo, hi);
  const small = Math.max(Math.min(a, b), Math.max(a, b) * 1e-300);
  const m = Math.sqrt(small) * Math.sqrt(Math.max(a, b)) * (lo < 0 || hi < 0 ? -1 : 1);
  return m > lo && m < hi ? m : middle(lo, hi);
}

/** Where a straight line between the slopes at the cell's ends has the share of area. */
function firstGuess(cell: Cell, area: number, isBelow: boolean): number {
  const { start, end } = cell;
  const ends = [cell.slopeAt(start), cell.slopeAt(end)];
  const [near, far] = isBelow ? ends : ends.reverse();
  const share = area / cell.area;
  const slant = (2 * near!) / (near! + far!);
  const square = slant * slant + (4 - 4 * slant) * share;
  const s = (2 * share) / (slant + Math.sqrt(Math.max(0, square)));
  const t = s === s ? Math.min(1, s) : share;
  return isBelow ? start + (end - start) * t : end - (end - start) * t;
}

/** The least index from 0 to n − 1 for which a condition, once true, stays true; n if none. */
export function firstIndex(n: number, isReached: (i: number) => boolean): number {
  let lo = 0;
  let hi = n;
  while (lo < hi) {
    const mid = (lo + hi) >> 1;
    if (isReached(mid)) hi = mid;
    else lo = mid + 1;
  }
  return lo;
}

/** Sums of the first 0, 1, … n numbers, with their rounding errors carried along (Neumaier 1974). */
export function runningSums(numbers: readonly number[]): Float64Array {
  const sums = new Float64Array(numbers.length + 1);
  let sum = 0;
  let carry = 0;
  numbers.forEach((number, i) => {
    const next = sum + number;
    carry += Math.abs(sum) >= Math.abs(number) ? sum - next + number : number - next + sum;
    sum = next;
    sums[i + 1] = sum + carry;
  });
  return sums;
}
