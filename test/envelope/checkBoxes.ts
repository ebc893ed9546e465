/**
 * A checker of proofs in boxes that shares no code with the prover: points in the boxes must
 * lie between the bounds, points outside all boxes must have no height, and the boxes must
 * hold as much as they say.
 */
import type { BoxEnvelope, ProvedBox } from '../../src/envelope/boxes';
import type { RandomRegion } from './randomRegion';

/** Nearer than this to where a condition changes, doubles do not tell whether it holds. */
const UNTOLD = 1e-9;
/** Room for the rounding of the check's own heights. */
const ROUNDING = 1e-9;

interface BoxReport {
  readonly points: number;
  readonly faults: readonly string[];
}

interface Options {
  readonly inBoxes: number;
  readonly anywhere: number;
  readonly random: () => number;
}

/** The upper bound of a box at a point. */
function upperAt({ upper, plane }: ProvedBox, x: readonly number[]): number {
  if (plane === null) return upper;
  return (
    upper *
    Math.exp(x.reduce((sum, each, i) => sum + plane.slopes[i]! * (each - plane.centre[i]!), 0))
  );
}

export function checkBoxes(
  envelope: BoxEnvelope,
  { margins, height }: Pick<RandomRegion, 'margins' | 'height'>,
  { inBoxes, anywhere, random }: Options,
): BoxReport {
  const { axes, boxes, exponent } = envelope;
  const faults: string[] = [];
  let points = 0;
  const scale = 2 ** -exponent;
  /** 0 outside, NaN where doubles do not tell. */
  const densityAt = (x: readonly number[]): number => {
    const told = margins.map((margin) => margin(x));
    if (told.some((margin) => Math.abs(margin) < UNTOLD)) return NaN;
    return told.some((margin) => margin < 0) ? 0 : height(x) * scale;
  };
  const placeIn = (i: number, lo: number, hi: number): number => {
    const { from, step } = axes[i]!;
    if (step > 0) return from + (lo + Math.floor(random() * (hi - lo + 1))) * step;
    // Ends and corners are where bounds are tight.
    const u = random();
    return u < 0.05 ? lo : u > 0.95 ? hi : lo + (hi - lo) * random();
  };
  const fault = (what: string, x: readonly number[]): void => {
    if (faults.length < 5) faults.push(`${what} at ${x.join(', ')}`);
  };
  for (let k = 0; k < inBoxes; k++) {
    const box = boxes[Math.floor(random() * boxes.length)]!;
    const x = axes.map((_, i) => placeIn(i, box.lo[i]!, box.hi[i]!));
    const f = densityAt(x);
    points++;
    if (!(f === f)) continue;
    const upper = upperAt(box, x);
    if (f > upper * (1 + ROUNDING)) fault(`${f} above ${upper}`, x);
    if (f < upper * box.sure * (1 - ROUNDING)) fault(`${f} below ${upper * box.sure}`, x);
    // Conditions inside IF are the density's own business.
    margins.slice(0, envelope.conditions.length).forEach((margin, j) => {
      const isOpen = (box.open & (1 << j)) !== 0;
      if (!isOpen && margin(x) < -UNTOLD) fault(`condition ${j} fails`, x);
    });
  }
  const numberOf = (i: number, x: number): number => {
    const { from, step } = axes[i]!;
    return step > 0 ? Math.round((x - from) / step) : x;
  };
  for (let k = 0; k < anywhere; k++) {
    const x = axes.map(({ from, to, step }, i) =>
      step > 0 ? placeIn(i, 0, Math.round((to - from) / step)) : from + (to - from) * random(),
    );
    points++;
    if (!(densityAt(x) > 0)) continue;
    const isInside = boxes.some(({ lo, hi }) =>
      x.every((each, i) => numberOf(i, each) >= lo[i]! && numberOf(i, each) <= hi[i]!),
    );
    if (!isInside) fault('a height outside all boxes', x);
  }
  return { points, faults };
}
