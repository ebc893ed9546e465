/**
 * How a column lies beside a shape: exact percentiles and moments beside drawn ones with the
 * range that is allowed, then tests of the whole, each with its p-value.
 *
 * The level of one line is the level of them all over their number (Bonferroni's inequality), so
 * that a column that follows the shape shows any sign with at most that chance. What depends on
 * the shape, the number of rows and the level alone is worked out once for many columns. Sources
 * are in the files of the tests. Not handled: dependent rows; shapes fitted to the same rows.
 */
import betaQuantile from '@stdlib/stats-base-dists-beta-quantile';
import { sampleQuantile } from '../density/histogram';
import type { Lattice } from '../density/lattice';
import type { Distribution } from '../exact/distribution';
import { averageRanks, inOrder, orderOf } from '../numeric/ranks';
import { andersonDarlingDistance, andersonDarlingPValue } from './andersondarling';
import { cellsFor, chiSquareOf, chiSquarePValue, equalCells, pointCells } from './chisquare';
import { criticalValue } from './critical';
import { kolmogorovDistance, kolmogorovPValue } from './kolmogorov';
import type { Meeting } from './lumps';
import { meetingsIn, neighbourShares, spreadLumps } from './lumps';
import type { Statistic } from './momentfit';
import {
  allowedRange,
  meanStatistic,
  NOT_FINITE,
  statisticPValue,
  TOO_FEW,
  varianceStatistic,
} from './momentfit';
import { momentsOf } from './moments';
import { repeatsIn } from './repeats';
import { rowsOf } from './sample';
import { betaShape, FEWEST_FOR_SERIAL, ranksWithoutTies, serialOrder } from './serial';
import { allowedShares, sharePValue } from './shareplace';

/** A figure, a text that says why there is none, or nothing. */
type Figure = number | string | null;

export interface FitLine {
  readonly item: string;
  readonly exact: Figure;
  readonly drawn: Figure;
  readonly from: Figure;
  readonly to: Figure;
  /** Null for a line that is not compared. */
  readonly pValue: number | null;
}

/** A column as the lines look at it. */
interface Seen {
  readonly values: Float64Array;
  readonly sorted: Float64Array;
  readonly order: Int32Array;
  /** Exact shares below and above the sorted values. */
  readonly below: Float64Array;
  readonly above: Float64Array;
  /** Where rows of a continuous shape meet. */
  readonly meetings: readonly Meeting[];
}

type Lines = (seen: Seen) => readonly FitLine[];

/** Exact is what χ² is on average: the cells less one. */
const CELLS = 'χ² of cells with about equal shares';
const SHARES = [0.01, 0.05, 0.1, 0.25, 0.5, 0.75, 0.9, 0.95, 0.99];

/** The lines that are compared: percentiles, mean, deviation, cells, order, outside; of a continuous shape two distances and repeats too. */
export function comparisonsOf({ lattice }: Distribution): number {
  return SHARES.length + (lattice ? 5 : 8);
}

/** The lines of columns of n rows beside a shape, each at `level`. Domain: n ≥ 2, finite values. */
export function fitter(
  distribution: Distribution,
  n: number,
  level: number,
): (values: Float64Array) => readonly FitLine[] {
  const { lattice } = distribution;
  const parts: readonly Lines[] = [
    percentileLines(distribution, n, level),
    momentLines(distribution, n, level),
    ...(lattice ? [pointLine(distribution, n, level)] : distanceLines(n, level)),
    serialLine(n, level, lattice !== null),
    ...(lattice ? [] : [repeatLine(distribution, n, level)]),
    outsideLine(distribution),
  ];
  return (values) => {
    const order = orderOf(values);
    const sorted = inOrder(values, order);
    const shares = distribution.sharesOfRising(sorted);
    const meetings = lattice ? [] : meetingsIn(sorted, shares, distribution);
    spreadLumps(shares, meetings);
    const seen = { values, sorted, order, meetings, ...shares };
    return parts.flatMap((lines) => lines(seen));
  };
}

function percentileLines(distribution: Distribution, n: number, level: number): Lines {
  const frame = SHARES.map((share) => {
    const { lo, hi } = allowedShares(n, share, level);
    return {
      item: `P${Math.round(share * 100)}`,
      exact: distribution.quantile(share),
      from: distribution.quantile(lo),
      to: distribution.quantile(hi),
    };
  });
  return ({ sorted }) => {
    const drawn = SHARES.map((share) => sampleQuantile(sorted, share));
    const { below, above } = distribution.sharesOfRising(Float64Array.from(drawn));
    const around = distribution.lattice ? [] : neighbourShares(drawn, distribution);
    return frame.map(({ item, exact, from, to }, i) => {
      const lump = around[i]?.isLump ? around[i] : undefined;
      const pValue = sharePValue(n, SHARES[i]!, lump?.lo ?? below[i]!, lump?.hi ?? 1 - above[i]!);
      return { item, exact, drawn: drawn[i]!, from, to, pValue };
    });
  };
}

function momentLines({ moments, lattice }: Distribution, n: number, level: number): Lines {
  const { mean, deviation } = moments;
  const ofMean = momentLine('mean', mean, level, meanStatistic(n, moments, lattice), (x) => x);
  const ofDeviation = momentLine(
    'standard deviation',
    deviation,
    level,
    varianceStatistic(n, moments),
    (ratio) => (deviation ?? 0) * Math.sqrt(Math.max(0, ratio)),
  );
  return ({ values }) => {
    const drawn = momentsOf(rowsOf(values));
    const ratio = drawn.standardDeviation / (deviation ?? 1);
    return [ofMean(drawn.mean, drawn.mean), ofDeviation(drawn.standardDeviation, ratio * ratio)];
  };
}

/** A line from what is drawn and the statistic's value; `unit` turns values of the statistic into those of the line. */
function momentLine(
  item: string,
  exact: number | null,
  level: number,
  statistic: Statistic | string,
  unit: (x: number) => number,
): (drawn: number, at: number) => FitLine {
  const told = { item, exact: exact ?? NOT_FINITE };
  if (typeof statistic === 'string') {
    const from = exact === null ? null : statistic;
    return (drawn) => ({ ...told, drawn, from, to: null, pValue: null });
  }
  const { lo, hi } = allowedRange(statistic, level);
  const [from, to] = [unit(lo), unit(hi)];
  return (drawn, at) => ({ ...told, drawn, from, to, pValue: statisticPValue(statistic, at) });
}

/** Kolmogorov–Smirnov, Anderson–Darling, and cells of equal share. */
function distanceLines(n: number, level: number): readonly Lines[] {
  const ofKolmogorov = (d: number): number => kolmogorovPValue(n, d);
  const ofAnderson = (z: number): number => andersonDarlingPValue(n, z);
  const mostK = criticalValue(ofKolmogorov, level, 0.5 / n, 1 / Math.sqrt(n));
  const mostA = criticalValue(ofAnderson, level, 0, 4);
  const cells = cellsFor(n);
  const ofCells = cellLine(cells, level);
  return [
    ({ below }) => {
      const d = kolmogorovDistance(below);
      return [atMost('Kolmogorov–Smirnov distance', null, d, mostK, ofKolmogorov(d))];
    },
    ({ below, above }) => {
      const z = andersonDarlingDistance(below, above);
      return [atMost('Anderson–Darling distance', null, z, mostA, ofAnderson(z))];
    },
    ({ below }) => [ofCells(() => equalCells(below, cells))],
  ];
}

/** Cells of neighbouring points with about equal shares. */
function pointLine(distribution: Distribution, n: number, level: number): Lines {
  const { ends, shares } = pointCells(distribution, cellsFor(n));
  const expected = shares.map((share) => share * n);
  const ofCells = cellLine(shares.length, level);
  return ({ sorted }) => [
    ofCells(() => {
      const counts = new Float64Array(shares.length);
      let cell = 0;
      for (let i = 0; i < n; i++) {
        while (cell < ends.length && sorted[i]! > ends[cell]!) cell++;
        counts[cell]! += 1;
      }
      return chiSquareOf(counts, expected);
    }),
  ];
}

function cellLine(
  cells: number,
  level: number,
): (test: () => { readonly statistic: number; readonly pValue: number }) => FitLine {
  if (cells < 2) return () => untold(CELLS);
  const to = criticalValue((x) => chiSquarePValue(x, cells - 1), level, 0, cells);
  return (test) => {
    const { statistic, pValue } = test();
    return atMost(CELLS, cells - 1, statistic, to, pValue);
  };
}

function serialLine(n: number, level: number, hasTies: boolean): Lines {
  const item = "correlation of a row's rank with the next one's";
  if (n < FEWEST_FOR_SERIAL) return () => [untold(item)];
  const shape = betaShape(n);
  const to = 1 - 2 * betaQuantile(level / 2, shape, shape);
  return ({ values, sorted, order }) => {
    const ranks = hasTies ? ranksWithoutTies(sorted, order) : averageRanks(values, order);
    const { correlation, pValue } = serialOrder(ranks);
    return [{ item, exact: 0, drawn: correlation, from: -to, to, pValue }];
  };
}

function repeatLine(distribution: Distribution, n: number, level: number): Lines {
  const repeats = repeatsIn(distribution, n);
  const to = repeats.allowed(level);
  return ({ meetings }) => {
    const count = repeats.count(meetings);
    return [atMost('rows that repeat an earlier one', 0, count, to, repeats.pValue(count))];
  };
}

function outsideLine({ from, to, lattice }: Distribution): Lines {
  const item = lattice ? 'rows that are none of the values' : 'rows outside the limits';
  return ({ sorted }) => {
    let outside = 0;
    for (const x of sorted) if (x < from || x > to || (lattice && !isPoint(x, lattice))) outside++;
    return [atMost(item, 0, outside, 0, outside === 0 ? 1 : 0)];
  };
}

/** A value this near to a point, in steps, is that point, as in src/exact/points.ts. */
const SAME = 1e-9;

function isPoint(x: number, lattice: Lattice): boolean {
  const number = lattice.numberOf(x);
  return Math.abs(number - Math.round(number)) <= SAME * Math.max(1, Math.abs(number));
}

function atMost(item: string, exact: Figure, drawn: number, to: number, pValue: number): FitLine {
  return {
    item,
    exact,
    drawn: drawn < Infinity ? drawn : 'unbounded',
    from: exact === 0 ? 0 : null,
    to,
    pValue,
  };
}

function untold(item: string): FitLine {
  return { item, exact: null, drawn: TOO_FEW, from: null, to: null, pValue: null };
}
