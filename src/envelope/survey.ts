/**
 * A first look at a density on limits that may be unbounded: where it is high, how
 * wide it is, roughly how much area it has. Nothing is proved here; what comes out
 * only decides where the pieces end and the hats begin, and any such choice is safe.
 */
import FlatQueue from 'flatqueue';
import type { Encloser } from '../formula/enclose';
import * as elementary from '../numeric/elementary';
import { middle, powerOfTwo } from '../numeric/float';
import * as I from '../numeric/interval';

/** The middle of the search when a limit is unbounded: ± this. */
const FAR = powerOfTwo(64);
const MAX_SEARCH = 400;
const LN_2 = 0.6931471805599453;
const FIRST_OCTAVE = -60;
const LAST_OCTAVE = 64;

export interface Survey {
  /** A point at which the density is high, or its pole. */
  readonly peak: number;
  /** A distance from the peak within which a good part of the area lies. */
  readonly width: number;
  /** ln of the area seen. */
  readonly area: number;
}

/** Looks over [from, to], ends possibly infinite, round `pole` where there is one; null where nothing above 0 is seen. */
export function survey(
  encloser: Encloser,
  from: number,
  to: number,
  pole: number | null,
): Survey | null {
  const density = I.interval();
  const logAt = (x: number): number => {
    encloser.densityAt(x, density);
    if (density.lo > 0 && density.hi < Infinity) return elementary.ln(density.hi);
    const { lo: least, hi: most } = encloser.over(x, x, null, null).logarithm;
    return least > -Infinity && most < Infinity ? least / 2 + most / 2 : -Infinity;
  };
  // An unbounded side is looked at well beyond the other limit, however far out that is.
  const reach = [from, to].reduce(
    (r, x) => (Number.isFinite(x) ? Math.max(r, 2 * x, -2 * x) : r),
    FAR,
  );
  const [lo, hi] = [Math.max(from, -reach), Math.min(to, reach)];
  const peak = pole ?? findPeak(encloser, logAt, lo, hi);
  if (peak === null) return null;
  /** Every second octave of distance on both sides: how far, and ln of the area each stands for. */
  const octaves: { distance: number; area: number }[] = [];
  for (const direction of [-1, 1]) {
    for (let k = FIRST_OCTAVE; k <= LAST_OCTAVE; k += 2) {
      const distance = powerOfTwo(k);
      const x: number = peak + direction * distance;
      if (x === peak) continue;
      if (!(x > lo && x < hi)) break;
      octaves.push({ distance, area: logAt(x) + k * LN_2 });
    }
  }
  const largest = Math.max(...octaves.map(({ area }) => area), -Infinity);
  if (largest === -Infinity) return null;
  const share = (area: number): number => elementary.exp(area - largest);
  const width = Math.max(
    ...octaves.map(({ distance, area }) => (share(area) > 0.25 ? distance : 0)),
  );
  const sum = octaves.reduce((total, { area }) => total + share(area), 0);
  return { peak, width, area: largest + elementary.ln(sum) };
}

/** Best-first search by upper bounds of ln f; the best point met in a bounded number of steps. */
function findPeak(
  encloser: Encloser,
  logAt: (x: number) => number,
  from: number,
  to: number,
): number | null {
  const queue = new FlatQueue<readonly [number, number]>();
  let best = -Infinity;
  let peak: number | null = null;
  const consider = (a: number, b: number): void => {
    const m = middle(a, b);
    const height = logAt(m);
    if (height > best) {
      best = height;
      peak = m;
    }
    queue.push([a, b], -encloser.over(a, b, null, null).logarithm.hi);
  };
  consider(from, to);
  for (let i = 0; i < MAX_SEARCH; i++) {
    const top = queue.peekValue();
    if (top === undefined || -top <= best + 0.5) break;
    const [a, b] = queue.pop()!;
    const m = middle(a, b);
    if (m === a) continue;
    consider(a, m);
    consider(m, b);
  }
  return peak;
}
