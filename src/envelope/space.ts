/**
 * The space of several variables and the boxes it is cut into. Along a continuous axis a
 * box has two coordinates, along a counted one the first and last number of its values:
 * value n is from + n · step. The measure of a box is the product of its widths and counts.
 */
import type { Axis } from '../density/limits';
import { down, middle, mulDown, mulUp, up } from '../numeric/float';

/** Ends along every axis: coordinates, or numbers of values of a counted axis. */
export interface Box {
  readonly lo: readonly number[];
  readonly hi: readonly number[];
}

export class Space {
  readonly n: number;

  constructor(readonly axes: readonly Axis[]) {
    this.n = axes.length;
  }

  whole(): Box {
    return {
      lo: this.axes.map(({ from, step }) => (step > 0 ? 0 : from)),
      hi: this.axes.map(({ from, to, step }) => (step > 0 ? Math.round((to - from) / step) : to)),
    };
  }

  isCounted(i: number): boolean {
    return this.axes[i]!.step > 0;
  }

  /** The coordinate that an end of a box stands for. */
  coordinate(i: number, end: number): number {
    const { from, step } = this.axes[i]!;
    return step > 0 ? from + end * step : end;
  }

  /** The coordinates of a box's ends. */
  corners({ lo, hi }: Box): { readonly lo: readonly number[]; readonly hi: readonly number[] } {
    return {
      lo: lo.map((end, i) => this.coordinate(i, end)),
      hi: hi.map((end, i) => this.coordinate(i, end)),
    };
  }

  /** A point near the middle of a box; a value of every counted axis. */
  centre({ lo, hi }: Box): readonly number[] {
    return lo.map((end, i) =>
      this.coordinate(i, this.isCounted(i) ? Math.floor((end + hi[i]!) / 2) : middle(end, hi[i]!)),
    );
  }

  /** How wide a box is along an axis, as a share of the limits. */
  share({ lo, hi }: Box, i: number): number {
    const { from, to, step } = this.axes[i]!;
    return step > 0 ? (hi[i]! - lo[i]!) / ((to - from) / step) : (hi[i]! - lo[i]!) / (to - from);
  }

  /** True for a box that can be halved along an axis. */
  isDivisible({ lo, hi }: Box, i: number): boolean {
    if (this.isCounted(i)) return lo[i]! < hi[i]!;
    const m = middle(lo[i]!, hi[i]!);
    return m > lo[i]! && m < hi[i]!;
  }

  halves(box: Box, i: number): readonly [Box, Box] {
    const [lo, hi] = [box.lo[i]!, box.hi[i]!];
    const isCounted = this.isCounted(i);
    const m = isCounted ? Math.floor((lo + hi) / 2) : middle(lo, hi);
    return [
      { lo: box.lo, hi: replaced(box.hi, i, m) },
      { lo: replaced(box.lo, i, isCounted ? m + 1 : m), hi: box.hi },
    ];
  }

  /** Bounds of the measure of a box. */
  measure({ lo, hi }: Box): { readonly lo: number; readonly hi: number } {
    const size = { lo: 1, hi: 1 };
    for (let i = 0; i < this.n; i++) {
      const width = hi[i]! - lo[i]!;
      const isCounted = this.isCounted(i);
      size.lo = mulDown(size.lo, isCounted ? width + 1 : down(width));
      size.hi = mulUp(size.hi, isCounted ? width + 1 : up(width));
    }
    return size;
  }
}

function replaced(ends: readonly number[], i: number, end: number): readonly number[] {
  const copy = [...ends];
  copy[i] = end;
  return copy;
}
