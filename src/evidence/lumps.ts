/**
 * Values on which many rows meet because doubles tell no nearer ones apart, as next to a strong
 * pole at a limit other than 0. A continuous shape has no share there, its rounded draws have.
 *
 * Rows of a lump get shares between those of the neighbouring doubles, as near as these allow to
 * where their places put them: what rounding did is never taken for a sign. Source: derived here.
 */
import type { Distribution, SharesOfValues } from '../exact/distribution';
import { next, prev } from '../numeric/float';

/** A double with more than this share between its neighbours is a lump. */
export const LEAST_LUMP = 1e-12;

/** Rows first … end − 1 of a sorted column that lie on one double. */
export interface Meeting {
  readonly first: number;
  readonly end: number;
  /** The shares below the double before it and below the one after it. */
  readonly lo: number;
  readonly hi: number;
  readonly isLump: boolean;
}

/** Where rows of a sorted column meet, or lie where there is no share on one side. Domain: a continuous shape. */
export function meetingsIn(
  sorted: Float64Array,
  { below, above }: SharesOfValues,
  distribution: Distribution,
): readonly Meeting[] {
  const n = sorted.length;
  const groups: { readonly first: number; readonly end: number }[] = [];
  for (let first = 0; first < n;) {
    let end = first + 1;
    while (end < n && sorted[end] === sorted[first]) end++;
    if (end - first > 1 || below[first] === 0 || above[first] === 0) groups.push({ first, end });
    first = end;
  }
  const around = neighbourShares(
    groups.map(({ first }) => sorted[first]!),
    distribution,
  );
  return groups.map((group, i) => ({ ...group, ...around[i]! }));
}

/** The shares below the neighbours of rising values. */
export function neighbourShares(
  values: readonly number[],
  distribution: Distribution,
): readonly Pick<Meeting, 'lo' | 'hi' | 'isLump'>[] {
  if (values.length === 0) return [];
  const { from, to } = distribution;
  const neighbours = Float64Array.from(values.flatMap((value) => [prev(value), next(value)]));
  const { below } = distribution.sharesOfRising(neighbours.sort());
  const places = new Map(Array.from(neighbours, (x, i) => [x, i]));
  return values.map((value) => {
    const [lo, hi] = [prev(value), next(value)].map((x) => below[places.get(x)!]!);
    return { lo: lo!, hi: hi!, isLump: value >= from && value <= to && hi! - lo! > LEAST_LUMP };
  });
}

/** The shares with those of lumps put where they tell nothing. Changes what it is given. */
export function spreadLumps({ below, above }: SharesOfValues, meetings: readonly Meeting[]): void {
  const n = below.length;
  for (const { first, end, lo, hi, isLump } of meetings) {
    if (!isLump) continue;
    for (let i = first; i < end; i++) {
      below[i] = Math.min(hi, Math.max(lo, (i + 0.5) / n));
      above[i] = 1 - below[i]!;
    }
  }
}
