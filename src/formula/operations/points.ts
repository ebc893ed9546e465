/**
 * A function by its points: straight lines between them, a jump where x repeats,
 * 0 outside. At a jump it takes the right-hand value, at the last point the last height.
 *
 *        right ●──────● left      at[k]: the points' x, each once
 *              │       \          left, right: the heights just before and after it
 *     ─────────┘        ○──       (0 before the first and after the last)
 *            at[0]     at[1]
 *
 * Everything over an interval takes a time that grows with log n: two binary searches
 * and the extremes of the run between. Not handled: no points, x or heights beyond 1e150.
 */
import { Extremes } from '../../numeric/extremes';
import { addDown, addUp, divDown, divUp } from '../../numeric/float';
import type { Interval } from '../../numeric/interval';
import * as I from '../../numeric/interval';
import * as J from '../../numeric/jet';
import type { Operation } from '../operation';

/** Scratch for one rule at a time; it holds nothing between calls. */
const share = I.interval();
const rise = I.interval();
const end = I.interval();
const run = I.interval();
const slope = I.interval();
const curvature = I.interval();

/** The operation of a function through points with two different x or more; x never falls. */
export function pointFunction(
  name: string,
  x: readonly number[],
  heights: readonly number[],
): Operation {
  const points = new Points(x, heights);
  return {
    name: `points of ${name}`,
    point: (u) => points.value(u),
    enclose: (out, u) => points.enclose(out, u),
    slopes(out, a) {
      const line = points.setSlopes(slope, a.v);
      if (line === 'jump') J.setJump(out);
      else {
        if (line === 'straight') I.set(curvature, 0, 0);
        else I.setEntire(curvature);
        J.chain(out, a, slope, curvature);
      }
    },
    turnsOn: 0,
    level: (u) => points.turnInside(u),
  };
}

class Points {
  private readonly at: number[] = [];
  private readonly left: number[] = [];
  private readonly right: number[] = [];
  private readonly last: number;
  /** Hulls of the heights on both sides of each point; nothing of the outside at the last. */
  private readonly heights: Extremes;
  private readonly slopes: Extremes;
  private readonly slopeLo: number[] = [];
  private readonly slopeHi: number[] = [];
  /** Where it jumps, and where it bends or jumps. */
  private readonly jumps: readonly number[];
  private readonly turns: readonly number[];

  constructor(x: readonly number[], heights: readonly number[]) {
    const { at, left, right } = this;
    x.forEach((value, i) => {
      if (at.length > 0 && value === at.at(-1)) right[right.length - 1] = heights[i]!;
      else {
        at.push(value);
        left.push(at.length === 1 ? 0 : heights[i]!);
        right.push(heights[i]!);
      }
    });
    this.last = at.length - 1;
    right[this.last] = 0;
    const inner = (k: number): number => (k === this.last ? left[k]! : right[k]!);
    this.heights = new Extremes(
      left.map((height, k) => Math.min(height, inner(k))),
      left.map((height, k) => Math.max(height, inner(k))),
    );
    for (let k = 0; k < this.last; k++) {
      I.set(rise, addDown(left[k + 1]!, -right[k]!), addUp(left[k + 1]!, -right[k]!));
      I.set(share, addDown(at[k + 1]!, -at[k]!), addUp(at[k + 1]!, -at[k]!));
      I.divide(rise, rise, share);
      this.slopeLo.push(rise.lo);
      this.slopeHi.push(rise.hi);
    }
    this.slopes = new Extremes(this.slopeLo, this.slopeHi);
    this.jumps = at.filter((_, k) => left[k] !== right[k]);
    this.turns = at.filter((_, k) => left[k] !== right[k] || this.bends(k));
  }

  /** True unless the slopes before and after point k are surely the same. */
  private bends(k: number): boolean {
    const slopeAt = (i: number): readonly [number, number] =>
      i < 0 || i >= this.last ? [0, 0] : [this.slopeLo[i]!, this.slopeHi[i]!];
    const [[a, b], [c, d]] = [slopeAt(k - 1), slopeAt(k)];
    return !(a === b && c === d && a === c);
  }

  value(u: number): number {
    if (!(u >= this.at[0]! && u <= this.at[this.last]!)) return u === u ? 0 : NaN;
    const k = this.lineAt(u);
    const [x0, x1, y0, y1] = [this.at[k]!, this.at[k + 1]!, this.right[k]!, this.left[k + 1]!];
    // From the nearer end, so that a line which comes down to 0 keeps its digits there.
    return u - x0 <= x1 - u
      ? y0 + (y1 - y0) * ((u - x0) / (x1 - x0))
      : y1 - (y1 - y0) * ((x1 - u) / (x1 - x0));
  }

  enclose(out: Interval, u: Interval): void {
    const { at, last } = this;
    const [first, final] = [at[0]!, at[last]!];
    if (u.hi < first || u.lo > final) {
      I.set(out, 0, 0);
      return;
    }
    const [a, b] = [Math.max(u.lo, first), Math.min(u.hi, final)];
    const i = this.lineAt(a);
    this.encloseOn(end, i, a);
    I.copy(out, end);
    if (b > a) {
      this.encloseOn(end, this.lineAt(b), b);
      I.hull(out, out, end);
      const j = indexAtMost(at, b);
      if (j > i) {
        this.heights.over(run, i + 1, j);
        I.hull(out, out, run);
      }
    }
    if (u.lo < first || u.hi > final) I.set(out, Math.min(out.lo, 0), Math.max(out.hi, 0));
  }

  /** The height at the double t on line k, between its ends. */
  private encloseOn(out: Interval, k: number, t: number): void {
    const [x0, x1, y0, y1] = [this.at[k]!, this.at[k + 1]!, this.right[k]!, this.left[k + 1]!];
    if (t === x0 || t === x1 || y0 === y1) {
      const height = t === x1 ? y1 : y0;
      I.set(out, height, height);
      return;
    }
    const isNearFirst = t - x0 <= x1 - t;
    const [from, to] = isNearFirst ? [x0, t] : [t, x1];
    I.set(
      share,
      divDown(addDown(to, -from), addUp(x1, -x0)),
      divUp(addUp(to, -from), addDown(x1, -x0)),
    );
    I.set(rise, addDown(y1, -y0), addUp(y1, -y0));
    I.multiply(rise, rise, share);
    const y = isNearFirst ? y0 : y1;
    I.set(out, y, y);
    if (isNearFirst) I.add(out, out, rise);
    else I.subtract(out, out, rise);
    I.set(out, Math.max(out.lo, Math.min(y0, y1)), Math.min(out.hi, Math.max(y0, y1)));
  }

  /** Sets out to the slopes over u and says what kind of line it is there. */
  setSlopes(out: Interval, u: Interval): 'straight' | 'bent' | 'jump' {
    const { at, last } = this;
    I.set(out, 0, 0);
    if (u.hi < at[0]! || u.lo > at[last]!) return 'straight';
    if (this.jumpsOver(u)) return 'jump';
    const isInside = u.lo >= at[0]! && u.hi <= at[last]!;
    const i = Math.min(Math.max(0, indexAtMost(at, u.lo)), last - 1);
    const before = indexAtMost(at, u.hi);
    const j = Math.max(
      i,
      Math.min(before >= 0 && at[before] === u.hi ? before - 1 : before, last - 1),
    );
    this.slopes.over(out, i, j);
    if (isInside) return i === j ? 'straight' : 'bent';
    I.set(out, Math.min(out.lo, 0), Math.max(out.hi, 0));
    return 'bent';
  }

  /** True if it is not continuous over the closed interval u: the right-hand value belongs to a jump, the last height to the last point. */
  private jumpsOver({ lo, hi }: Interval): boolean {
    const final = this.at[this.last]!;
    const k = indexAtMost(this.jumps, hi);
    if (k < 0) return false;
    const jump = this.jumps[k]!;
    if (jump < final) return jump > lo;
    if (hi > final) return lo <= final;
    return k > 0 && this.jumps[k - 1]! > lo;
  }

  /** The middle one of the jumps strictly inside u, else of the bends; NaN if there is none. */
  turnInside(u: Interval): number {
    const jump = middleInside(this.jumps, u);
    return jump === jump ? jump : middleInside(this.turns, u);
  }

  /** The line on which the double u between the first and the last point lies. */
  private lineAt(u: number): number {
    return Math.min(indexAtMost(this.at, u), this.last - 1);
  }
}

/** The index of the last element ≤ u of a rising sequence; −1 if there is none. */
function indexAtMost(rising: readonly number[], u: number): number {
  let lo = -1;
  let hi = rising.length;
  while (hi - lo > 1) {
    const mid = (lo + hi) >> 1;
    if (rising[mid]! <= u) lo = mid;
    else hi = mid;
  }
  return lo;
}

function middleInside(rising: readonly number[], { lo, hi }: Interval): number {
  const first = indexAtMost(rising, lo) + 1;
  let last = indexAtMost(rising, hi);
  if (last >= 0 && rising[last] === hi) last--;
  return last < first ? NaN : rising[(first + last) >> 1]!;
}
