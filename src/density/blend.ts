/**
 * A linear pool of tables: at every x the heights of all, each table scaled to its
 * share of the area, exactly on the union of their points.
 */
import type { Point } from './histogram';
import type { Polyline } from './table';

/** A table and the share of the area it gets. */
interface Part {
  readonly polyline: Polyline;
  readonly share: number;
}

/** The pool's points; where some table jumps, x stands twice. */
export function poolOfTables(parts: readonly Part[]): readonly Point[] {
  const scaled = parts.map(({ polyline, share }) => ({
    polyline,
    factor: share / areaUnder(polyline),
  }));
  const all = [...new Set(parts.flatMap(({ polyline }) => polyline.x))].sort((a, b) => a - b);
  return all.flatMap((x, i): Point[] => {
    let [left, right] = [0, 0];
    for (const { polyline, factor } of scaled) {
      const [l, r] = sidesAt(polyline, x);
      left += factor * l;
      right += factor * r;
    }
    if (i === 0) return [[x, right]];
    if (i === all.length - 1 || left === right) return [[x, left]];
    return [
      [x, left],
      [x, right],
    ];
  });
}

/** The area under straight lines between points. */
export function areaUnder({ x, heights }: Polyline): number {
  return x.reduce(
    (sum, at, i) =>
      i === 0 ? 0 : sum + (heights[i - 1]! / 2 + heights[i]! / 2) * (at - x[i - 1]!),
    0,
  );
}

/** The heights just below and just above x; nothing outside the table. */
function sidesAt({ x, heights }: Polyline, at: number): readonly [left: number, right: number] {
  const last = x.length - 1;
  // The first point at or above, and the last one at or below.
  const above = x.findIndex((p) => p >= at);
  if (above < 0 || at < x[0]!) return [0, 0];
  if (x[above]! > at) {
    const [a, b] = [above - 1, above];
    const height = heights[a]! + (heights[b]! - heights[a]!) * ((at - x[a]!) / (x[b]! - x[a]!));
    return [height, height];
  }
  let below = above;
  while (below < last && x[below + 1] === at) below++;
  return [above === 0 ? 0 : heights[above]!, below === last ? 0 : heights[below]!];
}
