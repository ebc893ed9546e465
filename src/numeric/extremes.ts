/**
 * The least and the greatest of any run of a fixed sequence in two look-ups.
 *
 * Source: Bender, Farach-Colton (2000), "The LCA problem revisited", section 3 (the
 * sparse table): level k holds the extremes of all runs of length 2^k, and any run is
 * covered by two of them.
 */
import type { Interval } from './interval';
import { set } from './interval';

export class Extremes {
  private readonly least: readonly Float64Array[];
  private readonly most: readonly Float64Array[];

  /** `lo[i]` and `hi[i]` are the ends of what stands at place i. */
  constructor(lo: ArrayLike<number>, hi: ArrayLike<number>) {
    this.least = levels(lo, Math.min);
    this.most = levels(hi, Math.max);
  }

  /** Sets out to the hull of the places first … last, first ≤ last. */
  over(out: Interval, first: number, last: number): void {
    const n = last - first + 1;
    const level = 31 - Math.clz32(n);
    const second = last + 1 - (1 << level);
    const [least, most] = [this.least[level]!, this.most[level]!];
    set(out, Math.min(least[first]!, least[second]!), Math.max(most[first]!, most[second]!));
  }
}

function levels(
  values: ArrayLike<number>,
  pick: (a: number, b: number) => number,
): readonly Float64Array[] {
  const made = [Float64Array.from(values)];
  for (let run = 1; 2 * run <= values.length; run *= 2) {
    const below = made.at(-1)!;
    made.push(
      Float64Array.from({ length: values.length - 2 * run + 1 }, (_, i) =>
        pick(below[i]!, below[i + run]!),
      ),
    );
  }
  return made;
}
