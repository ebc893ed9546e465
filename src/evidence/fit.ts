/**
 * How a column lies beside a shape: exact percentiles and moments beside drawn ones with the
 * range that is allowed, then tests of the whole, each with its p-value.
 *
 * The level of one line is the level of them all over their number (Bonferroni's inequality), so
 * that a column that follows the shape shows any sign with at most that chance. Sources are in
 * the files of the tests. Not handled: dependent rows; shapes fitted to the same rows.
 */
import betaQuantile from '@stdlib/stats-base-dists-beta-quantile';
import { sampleQuantile } from '../density/histogram';
import type { Distribution } from '../exact/distribution';
import { andersonDarlingDistance, andersonDarlingPValue } from './andersondarling';
import { cellsFor, chiSquarePValue, equalCells } from './chisquare';
import { criticalValue } from './critical';
import { kolmogorovDistance, kolmogorovPValue } from './kolmogorov';
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
import { inOrder, orderOf, ranksOf } from './order';
import { repeatsIn } from './repeats';
import { rowsOf } from './sample';
import { betaShape, FEWEST_FOR_SERIAL, serialOrder } from './serial';
import { allowedShares, sharePValue } from './shareplace';

/** A figure, a text that says why there is none, or nothing. */
export type Figure = number | string | null;

export interface FitLine {
  readonly item: string;
  readonly exact: Figure;
  readonly drawn: Figure;
  readonly from: Figure;
  readonly to: Figure;
  /** Null for a line that is not compared. */
  readonly pValue: number | null;
}

const SHARES = [0.01, 0.05, 0.1, 0.25, 0.5, 0.75, 0.9, 0.95, 0.99];
/** Lines that are compared: the percentiles, mean, deviation, four tests, repeats, values outside. */
export const COMPARISONS = SHARES.length + 8;

/** The lines of a column beside a continuous shape, each at `level`. Domain: at least two finite values. */
export function fitLines(
  values: Float64Array,
  distribution: Distribution,
  level: number,
): readonly FitLine[] {
  const order = orderOf(values);
  const sorted = inOrder(values, order);
  const { below, above } = distribution.sharesOfRising(sorted);
  const n = values.length;
  return [
    ...percentileLines(sorted, distribution, level),
    ...momentLines(values, distribution, level),
    distanceLine('Kolmogorov–Smirnov distance', kolmogorovDistance(below), level, {
      pValue: (d) => kolmogorovPValue(n, d),
      least: 0.5 / n,
      step: 1 / Math.sqrt(n),
    }),
    distanceLine('Anderson–Darling distance', andersonDarlingDistance(below, above), level, {
      pValue: (z) => andersonDarlingPValue(n, z),
      least: 0,
      step: 4,
    }),
    cellLine(below, level),
    serialLine(ranksOf(sorted, order), level),
    repeatLine(sorted, distribution, level),
    outsideLine(sorted, distribution),
  ];
}

function percentileLines(
  sorted: Float64Array,
  distribution: Distribution,
  level: number,
): readonly FitLine[] {
  const n = sorted.length;
  const drawn = SHARES.map((share) => sampleQuantile(sorted, share));
  const { below, above } = distribution.sharesOfRising(Float64Array.from(drawn));
  return SHARES.map((share, i) => {
    const { lo, hi } = allowedShares(n, share, level);
    return {
      item: `P${Math.round(share * 100)}`,
      exact: distribution.quantile(share),
      drawn: drawn[i]!,
      from: distribution.quantile(lo),
      to: distribution.quantile(hi),
      pValue: sharePValue(n, share, below[i]!, 1 - above[i]!),
    };
  });
}

function momentLines(
  values: Float64Array,
  { moments }: Distribution,
  level: number,
): readonly FitLine[] {
  const n = values.length;
  const { mean, standardDeviation } = momentsOf(rowsOf(values));
  const { mean: exactMean, deviation } = moments;
  const ratio = deviation === null ? NaN : standardDeviation / deviation;
  return [
    momentLine('mean', exactMean, mean, level, meanStatistic(n, moments), mean, (x) => x),
    momentLine(
      'standard deviation',
      deviation,
      standardDeviation,
      level,
      varianceStatistic(n, moments),
      ratio * ratio,
      (squared) => deviation! * Math.sqrt(Math.max(0, squared)),
    ),
  ];
}

/** `at` is where the statistic lies, `unit` turns its values into those of the line. */
function momentLine(
  item: string,
  exact: number | null,
  drawn: number,
  level: number,
  statistic: Statistic | string,
  at: number,
  unit: (x: number) => number,
): FitLine {
  const told = { item, exact: exact ?? NOT_FINITE, drawn };
  if (typeof statistic === 'string') {
    return { ...told, from: exact === null ? null : statistic, to: null, pValue: null };
  }
  const { lo, hi } = allowedRange(statistic, level);
  return { ...told, from: unit(lo), to: unit(hi), pValue: statisticPValue(statistic, at) };
}

function distanceLine(
  item: string,
  distance: number,
  level: number,
  of: { pValue: (x: number) => number; least: number; step: number },
): FitLine {
  const to = criticalValue(of.pValue, level, of.least, of.step);
  const drawn = distance < Infinity ? distance : 'unbounded';
  return { item, exact: null, drawn, from: null, to, pValue: of.pValue(distance) };
}

function cellLine(below: Float64Array, level: number): FitLine {
  const cells = cellsFor(below.length);
  const item = 'χ² of cells with equal shares';
  if (cells < 2) return untold(item);
  const { statistic, pValue } = equalCells(below, cells);
  const to = criticalValue((x) => chiSquarePValue(x, cells - 1), level, 0, cells);
  return {
    item: `χ² of ${cells} cells with equal shares`,
    exact: cells - 1,
    drawn: statistic,
    from: null,
    to,
    pValue,
  };
}

function serialLine(ranks: Float64Array, level: number): FitLine {
  const item = "correlation of a row's rank with the next one's";
  const n = ranks.length;
  if (n < FEWEST_FOR_SERIAL) return untold(item);
  const { correlation, pValue } = serialOrder(ranks);
  const shape = betaShape(n);
  const to = 1 - 2 * betaQuantile(level / 2, shape, shape);
  return { item, exact: 0, drawn: correlation, from: -to, to, pValue };
}

function repeatLine(sorted: Float64Array, distribution: Distribution, level: number): FitLine {
  const { count, pValue, allowed } = repeatsIn(sorted, distribution);
  const to = allowed(level);
  return { item: 'rows that repeat an earlier one', exact: 0, drawn: count, from: 0, to, pValue };
}

function outsideLine(sorted: Float64Array, { from, to }: Distribution): FitLine {
  let outside = 0;
  for (let i = 0; i < sorted.length; i++) if (sorted[i]! < from || sorted[i]! > to) outside++;
  const pValue = outside === 0 ? 1 : 0;
  return { item: 'rows outside the limits', exact: 0, drawn: outside, from: 0, to: 0, pValue };
}

function untold(item: string): FitLine {
  return { item, exact: null, drawn: TOO_FEW, from: null, to: null, pValue: null };
}
