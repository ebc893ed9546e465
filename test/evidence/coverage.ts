/**
 * How often intervals cover what they are for: columns with known figures are drawn over and over
 * and summed up by the worksheet functions. A small number of times in npm test, many in
 * npm run check:long.
 */
import normalQuantile from '@stdlib/stats-base-dists-normal-quantile';
import { exceedance, pairedChange, type Range, summary } from '../../src/index';
import { keyOf } from '../../src/random/key';
import { RowStream } from '../../src/random/stream';
import { Z_FALSE_ALARM } from '../draw/statistics';

/** A law by its quantile function, with its figures in closed form. */
interface Law {
  readonly name: string;
  readonly at: (share: number) => number;
  readonly mean: number;
  readonly deviation: number;
  /** The mean of the lowest share, for shares up to 0.1. */
  readonly lowest: (share: number) => number;
  readonly highest: (share: number) => number;
}

const normal = (share: number): number => normalQuantile(share, 0, 1);
const bell = (z: number): number => Math.exp((-z * z) / 2) / Math.sqrt(2 * Math.PI);
/** A triangle over from … from + 2 w. */
const triangle = (share: number, from: number, w: number): number =>
  share < 0.5 ? from + w * Math.sqrt(2 * share) : from + 2 * w - w * Math.sqrt(2 * (1 - share));

export const laws: readonly Law[] = [
  {
    name: 'normal',
    at: normal,
    mean: 0,
    deviation: 1,
    lowest: (share) => -bell(normal(share)) / share,
    highest: (share) => bell(normal(share)) / share,
  },
  {
    name: 'skewed (exponential)',
    at: (share) => -Math.log1p(-share),
    mean: 1,
    deviation: 1,
    lowest: (share) => (1 - (1 - share) * (1 - Math.log1p(-share))) / share,
    highest: (share) => 1 - Math.log(share),
  },
  {
    // Triangles over 0 … 4 and 6 … 8 with shares 0.6 and 0.4: variances 4/6 and 1/6 within, 6 between.
    name: 'two-humped',
    at: (share) =>
      share < 0.6 ? triangle(share / 0.6, 0, 2) : triangle((share - 0.6) / 0.4, 6, 1),
    mean: 4,
    deviation: Math.sqrt(0.6 * (4 / 6) + 0.4 * (1 / 6) + 6),
    lowest: (share) => (4 / 3) * Math.sqrt((2 * share) / 0.6),
    highest: (share) => 8 - (2 / 3) * Math.sqrt((2 * share) / 0.4),
  },
];

/** A fresh column of each repetition. */
function* columns(law: Law, rows: number, repetitions: number, label: string): Generator<Range> {
  const shares = new Float64Array(rows);
  const stream = new RowStream(keyOf('plan-2027', `${label} of ${law.name}`));
  for (let k = 0; k < repetitions; k++) {
    stream.fillFirst(1 + k * rows, shares, rows);
    yield Array.from(shares, (share) => [law.at(share)]);
  }
}

/** Counts for each figure how often its interval holds the true value. */
export class Tally {
  private readonly held = new Map<string, number>();
  private readonly given = new Map<string, number>();

  add(item: string, truth: number, [from, to]: readonly unknown[]): void {
    // No end on either side is no interval.
    if (from === 'unbounded' && to === 'unbounded') return;
    const holds =
      (from === 'unbounded' || (from as number) <= truth) &&
      (to === 'unbounded' || truth <= (to as number));
    this.given.set(item, (this.given.get(item) ?? 0) + 1);
    if (holds) this.held.set(item, (this.held.get(item) ?? 0) + 1);
  }

  /** The share of intervals that held. */
  shares(): ReadonlyMap<string, number> {
    return new Map([...this.given].map(([item, n]) => [item, (this.held.get(item) ?? 0) / n]));
  }
}

const SHARES = [0.05, 0.1, 0.5, 0.9, 0.95];

function figuresOf(law: Law): ReadonlyMap<string, number> {
  return new Map([
    ['mean', law.mean],
    ['standard deviation', law.deviation],
    ...SHARES.map((share) => [`P${share * 100}`, law.at(share)] as const),
    ['mean of the lowest 5 %', law.lowest(0.05)],
    ['mean of the lowest 10 %', law.lowest(0.1)],
    ['mean of the highest 10 %', law.highest(0.1)],
    ['mean of the highest 5 %', law.highest(0.05)],
  ]);
}

/** Coverage of SUMMARY's intervals, 95 % unless another confidence is asked for. */
export function summaryCoverage(
  law: Law,
  rows: number,
  repetitions: number,
  confidence = 0.95,
): Tally {
  const truths = figuresOf(law);
  const tally = new Tally();
  for (const column of columns(law, rows, repetitions, 'summary')) {
    for (const [item, , ...ends] of summary(column, [SHARES], [[confidence]], null)) {
      const truth = truths.get(item as string);
      if (truth !== undefined) tally.add(item as string, truth, ends);
    }
  }
  return tally;
}

/** The mean of a quantile function of √share over shares from … to, by the midpoint rule. */
function meanBetween(at: (root: number) => number, from: number, to: number): number {
  const steps = 100_000;
  const [a, b] = [Math.sqrt(from), Math.sqrt(to)];
  let sum = 0;
  for (let i = 0; i < steps; i++) {
    const root = a + ((b - a) * (i + 0.5)) / steps;
    sum += at(root) * 2 * root;
  }
  return (sum * (b - a)) / steps / (to - from);
}

/**
 * The same with weights: exponential rows weighted by 1 − exp(−x) are those of the larger of two
 * exponential numbers, with the cumulative share (1 − exp(−x))².
 */
export function weightedCoverage(rows: number, repetitions: number): Tally {
  const atRoot = (root: number): number => -Math.log1p(-root);
  const larger: Law = {
    name: 'larger of two',
    at: (share) => atRoot(Math.sqrt(share)),
    mean: 1.5,
    deviation: Math.sqrt(1.25),
    lowest: (share) => meanBetween(atRoot, 0, share),
    highest: (share) => meanBetween(atRoot, 1 - share, 1),
  };
  const truths = figuresOf(larger);
  const tally = new Tally();
  for (const column of columns(laws[1]!, rows, repetitions, 'weighted')) {
    const weights = column.map(([x]) => [-Math.expm1(-(x as number))]);
    for (const [item, , ...ends] of summary(column, [SHARES], null, weights)) {
      const truth = truths.get(item as string);
      if (truth !== undefined) tally.add(item as string, truth, ends);
    }
  }
  return tally;
}

/** Coverage of EXCEEDANCE's, at a threshold with that chance above it. */
export function exceedanceCoverage(
  law: Law,
  chance: number,
  rows: number,
  repetitions: number,
): Tally {
  const tally = new Tally();
  const threshold: Range = [[law.at(1 - chance)]];
  for (const column of columns(law, rows, repetitions, `exceedance ${chance}`)) {
    const spill = new Map(exceedance(column, threshold, null, null) as [string, unknown][]);
    const ends = ['from', 'to'].map((end) => spill.get(`chance above, 95 % interval ${end}`));
    tally.add(`chance ${chance}`, chance, ends);
  }
  return tally;
}

/** Coverage of PAIREDCHANGE's: the change is a tenth of the value and a normal part of its own. */
export function changeCoverage(law: Law, rows: number, repetitions: number): Tally {
  const tally = new Tally();
  const own = columns(laws[0]!, rows, repetitions, `change ${law.name}`);
  for (const before of columns(law, rows, repetitions, 'before')) {
    const noise = own.next().value as Range;
    const after = before.map(([x], i) => [1.1 * (x as number) + 0.2 * (noise[i]![0] as number)]);
    const spill = new Map(pairedChange(before, after, null) as [string, unknown][]);
    const ends = ['from', 'to'].map((end) => spill.get(`mean change, 95 % interval ${end}`));
    tally.add('mean change', 0.1 * law.mean, ends);
  }
  return tally;
}

/** How far the share of n intervals that hold may be from 0.95 with that false-alarm rate. */
function tolerance(repetitions: number): number {
  return Z_FALSE_ALARM * Math.sqrt((0.95 * 0.05) / repetitions);
}

/** Order statistics and Wilson's interval at small chances cover more than they promise. */
function isConservative(item: string): boolean {
  return item.startsWith('P') || item === 'chance 0.001' || item === 'chance 0.01';
}

/** The items whose intervals hold too seldom, or too often without being conservative by construction. */
export function breaches(tally: Tally, repetitions: number): string[] {
  const most = tolerance(repetitions);
  return [...tally.shares()].flatMap(([item, share]) => {
    const isWrong = share < 0.95 - most || (share > 0.95 + most && !isConservative(item));
    return isWrong ? [`${item}: ${share}`] : [];
  });
}
