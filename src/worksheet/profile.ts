/** PROFILE: evenly spaced points of a density and its envelope, for charts. */
import type { Range } from '../density/cells';
import { given, numberIn, passErrors, singleCell } from '../density/cells';
import type { Envelope } from '../envelope/envelope';
import { InputError } from '../errors';
import { next, prev } from '../numeric/float';
import { onlyShape } from './envelope';
import { prove } from './proved';

const PLACES = { density: 'density (argument 1)', limits: 'limits (argument 2)', givens: 4 };
const COUNT = 'count (argument 3)';
const DEFAULT_COUNT = 201;
const MAX_COUNT = 100_000;

/**
 * Points from limit to limit (on an unbounded side: to where the pieces end): the density scaled to area 1 with its upper and lower line.
 * Shapes: a heading row, then count × 4. Units: x as in the density; the others share per unit of x.
 * Guarantee: none for the density's last digits (it is for looking at); the lines are the proved ones.
 * @throws {InputError} @throws {CellErrorPassed} as DRAW does.
 */
export function profile(
  density: Range | null,
  limits: Range | null,
  count: Range | null,
  givens: readonly Range[],
): Range {
  const { envelope, area } = prove(onlyShape(density, limits, givens, PLACES));
  const n = readCount(given(count));
  const { pieces } = envelope;
  const [from, to] = [pieces[0]!.from, pieces.at(-1)!.to];
  const rows = Array.from({ length: n }, (_, i) => {
    const x = i === n - 1 ? to : from + (to - from) * (i / (n - 1));
    const { upper, lower } = linesAt(envelope, x);
    return [x, heightNear(envelope, x) / area, upper / area, lower / area];
  });
  return [['x', 'density', 'upper', 'lower'], ...rows];
}

function readCount(range: Range | null): number {
  if (range === null) return DEFAULT_COUNT;
  passErrors(range);
  const n = numberIn(singleCell(range, COUNT), COUNT);
  if (Math.floor(n) === n && n >= 2 && n <= MAX_COUNT) return n;
  throw new InputError(
    COUNT,
    `${n} is not a whole number from 2 to ${MAX_COUNT}`,
    'give how many points the chart needs, such as 201',
  );
}

/** The density's height; where a single point is undefined (0^0 at an end), that of its neighbour. */
function heightNear({ heightAt, from, to }: Envelope, x: number): number {
  const candidates = [x, x < to ? next(x) : prev(x), x > from ? prev(x) : next(x)].map(heightAt);
  return Math.max(0, candidates.find((height) => Number.isFinite(height)) ?? 0);
}

function linesAt({ pieces }: Envelope, x: number): { upper: number; lower: number } {
  let lo = 0;
  let hi = pieces.length - 1;
  while (lo < hi) {
    const mid = (lo + hi + 1) >> 1;
    if (pieces[mid]!.from <= x) lo = mid;
    else hi = mid - 1;
  }
  const p = pieces[lo]!;
  const t = Math.min(1, (x - p.from) / (p.to - p.from));
  const on = (left: number, right: number): number => left + (right - left) * t;
  return { upper: on(p.upperLeft, p.upperRight), lower: on(p.lowerLeft, p.lowerRight) };
}
