/** PROFILE: evenly spaced points of a density and its envelope, for charts. */
import type { Range } from '../density/cells';
import { givenUnlessZero, numberIn, passErrors, singleCell } from '../density/cells';
import type { Envelope } from '../envelope/envelope';
import { heightOn } from '../envelope/hat';
import { InputError } from '../errors';
import { heightOf } from '../exact/height';
import { onlyShape } from './envelope';
import type { ProvedCurve, ProvedPoints } from './proved';
import { prove } from './proved';

const PLACES = { density: 'density (argument 1)', limits: 'limits (argument 2)', givens: 4 };
const COUNT = 'count (argument 3)';
const DEFAULT_COUNT = 201;
const MAX_COUNT = 100_000;
/** An unbounded side is shown up to where this share of the area is left. */
const LEFT_OUT = 0.00005;

/**
 * Points from limit to limit: the density scaled to area 1 with its upper and lower line,
 * and the share of the area below each. Where the limits are unbounded, the central 0.9999
 * of the area; at a pole, from where the pieces begin.
 * Of a counted quantity a row for each point, at most count of them evenly chosen: density is the
 * point's share, and share below leaves the point itself out.
 * Shapes: a heading row, then count × 5. Units: x as in the density; heights as share per
 * unit of x; share below as a fraction of 1.
 * Guarantee: none for the density's last digits (it is for looking at); the lines are the
 * proved ones, the shares those of BELOW.
 * @throws {InputError} @throws {CellErrorPassed} as DRAW does.
 */
export function profile(
  density: Range | null,
  limits: Range | null,
  count: Range | null,
  givens: readonly Range[],
): Range {
  const proved = prove(onlyShape(density, limits, givens, PLACES));
  const n = readCount(givenUnlessZero(count));
  return [
    ['x', 'density', 'upper', 'lower', 'share below'],
    ...(proved.kind === 'points' ? pointRows(proved, n) : curveRows(proved, n)),
  ];
}

function curveRows(proved: ProvedCurve, n: number): Range {
  const { envelope, area, shares } = proved;
  const [from, to] = shownEnds(proved);
  const height = heightOf(envelope);
  return Array.from({ length: n }, (_, i) => {
    const x = i === n - 1 ? to : from + (to - from) * (i / (n - 1));
    const { upper, lower } = linesAt(envelope, x);
    return [x, height(x) / area, upper / area, lower / area, shares.below(x)];
  });
}

/** One row a point; where they are more than n, n of them, evenly chosen. */
function pointRows({ envelope, area, shares }: ProvedPoints, n: number): Range {
  const { lattice, heights, first: begin } = envelope;
  const numberAt = (side: 'below' | 'above'): number =>
    Math.round(lattice.numberOf(shares.quantile(LEFT_OUT, side)));
  const first = Number.isFinite(lattice.first) ? lattice.first : numberAt('below');
  const last = Number.isFinite(lattice.last) ? lattice.last : numberAt('above');
  const nRows = Math.min(n, last - first + 1);
  return Array.from({ length: nRows }, (_, i) => {
    const number = first + (nRows > 1 ? Math.round((i / (nRows - 1)) * (last - first)) : 0);
    const x = lattice.at(number);
    const [least, most] = [heights.least[number - begin], heights.most[number - begin]];
    const height = least === undefined ? envelope.heightAt(x) : least / 2 + most! / 2;
    const share = height / area;
    return [x, share, (most ?? height) / area, (least ?? 0) / area, shares.below(x)];
  });
}

function shownEnds({ envelope, shares }: ProvedCurve): readonly [from: number, to: number] {
  const { from, to, pieces } = envelope;
  return [
    from === -Infinity ? shares.quantile(LEFT_OUT, 'below') : pieces[0]!.from,
    to === Infinity ? shares.quantile(LEFT_OUT, 'above') : pieces.at(-1)!.to,
  ];
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

function linesAt({ pieces, hats }: Envelope, x: number): { upper: number; lower: number } {
  const isBeyond = x < pieces[0]!.from || x > pieces.at(-1)!.to;
  if (isBeyond) {
    const hat = hats.find(({ origin, direction, c }) => {
      const inner = origin + direction * c;
      return x < pieces[0]!.from ? inner <= pieces[0]!.from : inner >= pieces.at(-1)!.to;
    });
    return { upper: hat ? heightOn(hat, x) : 0, lower: 0 };
  }
  let lo = 0;
  let hi = pieces.length - 1;
  while (lo < hi) {
    const mid = (lo + hi + 1) >> 1;
    if (pieces[mid]!.from <= x) lo = mid;
    else hi = mid - 1;
  }
  const p = pieces[lo]!;
  const q = pieces[lo + 1];
  if (x > p.to && q) {
    // Between two pieces, at a jump or a kink: the lines of both sides.
    return {
      upper: Math.max(p.upperRight, q.upperLeft),
      lower: Math.min(p.lowerRight, q.lowerLeft),
    };
  }
  const width = p.to - p.from;
  // From the nearer end, so that a line keeps the digits of its lower end there.
  const on = (left: number, right: number): number =>
    x - p.from <= p.to - x
      ? left + (right - left) * ((x - p.from) / width)
      : right - (right - left) * ((p.to - x) / width);
  return { upper: on(p.upperLeft, p.upperRight), lower: on(p.lowerLeft, p.lowerRight) };
}
