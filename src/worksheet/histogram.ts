/** FROMBINS, FROMPERCENTILES and FROMDATA: a table of points from shares, from judgement, from data. */
import type { Range } from '../density/cells';
import { counted } from '../density/cells';
import type { Point } from '../density/histogram';
import { binCount, countInBins, steps } from '../density/histogram';
import { InputError } from '../errors';
import { requireShare } from './confidence';
import type { Line } from './numbers';
import { numberLine, optionalNumber, requireRising } from './numbers';

/** More bins than this are no histogram a reader could check. */
const MOST_BINS = 1000;

/** The table as DRAW takes it. */
function table(points: readonly Point[]): Range {
  return [['x', 'height'], ...points];
}

/**
 * A histogram from the shares of its bins.
 * Shapes: a heading row x | height, then two points a bin. Units: x as the edges; area 1.
 * Shares are scaled to add up to 1, so counts or percentages do as well.
 * @throws {InputError} when edges do not rise, or the shares do not fit them or are negative or all 0.
 */
export function fromBins(edges: Range | null, shares: Range | null): Range {
  const bounds = numberLine(edges, 'edges (argument 1)', 'give the edges of the bins, rising');
  const parts = numberLine(shares, 'shares (argument 2)', 'give one share for each bin');
  const where = 'shares (argument 2)';
  requireRising(bounds, 'give edges that rise');
  if (parts.numbers.length !== bounds.numbers.length - 1) {
    throw new InputError(
      where,
      `${counted(parts.numbers.length, 'share')} for ${counted(bounds.numbers.length, 'edge')}`,
      'give one share for each bin, one less than there are edges',
    );
  }
  refuseNegative(parts);
  if (parts.numbers.every((share) => share === 0))
    throw new InputError(where, 'they are all 0', 'give some bin a share above 0');
  return table(steps(bounds.numbers, parts.numbers));
}

function refuseNegative({ numbers, placeOf }: Line): void {
  const i = numbers.findIndex((number) => number < 0);
  if (i >= 0)
    throw new InputError(placeOf(i), `${numbers[i]} is negative`, 'give shares of 0 or more');
}

/**
 * A density from percentiles somebody judged: evenly spread between neighbours.
 * Shapes: as fromBins. Units: levels as fractions of 1, the rest in the unit of x.
 * @throws {InputError} when levels or values do not rise, levels are not between 0 and 1, or an end does not lie beyond the values.
 */
export function fromPercentiles(
  levels: Range | null,
  values: Range | null,
  lowest: Range | null,
  highest: Range | null,
): Range {
  const shares = numberLine(levels, 'levels (argument 1)', 'give fractions such as 0.1, 0.5, 0.9');
  const places = numberLine(values, 'values (argument 2)', 'give the value at each level');
  const between = 'give levels between 0 and 1; the ends are lowest and highest';
  shares.numbers.forEach((level, i) => requireShare(level, shares.placeOf(i), between));
  requireRising(shares, 'give levels that rise');
  requireRising(places, 'give values that rise with the levels');
  const n = shares.numbers.length;
  if (places.numbers.length !== n) {
    throw new InputError(
      'values (argument 2)',
      `${places.numbers.length} values for ${n} levels`,
      'give one value for each level',
    );
  }
  const [first, last] = [places.numbers[0]!, places.numbers[n - 1]!];
  const from = requiredEnd(lowest, 'lowest (argument 3)', `a value below ${first}`);
  const to = requiredEnd(highest, 'highest (argument 4)', `a value above ${last}`);
  if (!(from < first))
    throw new InputError(
      'lowest (argument 3)',
      `${from} is not below the first value, ${first}`,
      'give the least that can happen',
    );
  if (!(to > last))
    throw new InputError(
      'highest (argument 4)',
      `${to} is not above the last value, ${last}`,
      'give the most that can happen',
    );
  const bounds = [0, ...shares.numbers, 1];
  const parts = bounds.slice(1).map((level, i) => level - bounds[i]!);
  return table(steps([from, ...places.numbers, to], parts));
}

function requiredEnd(range: Range | null, where: string, what: string): number {
  const end = optionalNumber(range, where);
  if (end === null) throw new InputError(where, 'it is missing', `give ${what}`);
  return end;
}

/**
 * A histogram of data, with bins of one width by Freedman and Diaconis (1981).
 * Shapes: as fromBins. Units: those of the values.
 * `lowest` and `highest`, left out, are the least and the largest value.
 * @throws {InputError} when a value lies outside the ends, all values are one and no ends are given, or the rule asks for more than MOST_BINS.
 */
export function fromData(values: Range | null, lowest: Range | null, highest: Range | null): Range {
  const where = 'values (argument 1)';
  const data = numberLine(values, where, 'give a column of numbers');
  const sorted = [...data.numbers].sort((a, b) => a - b);
  const [least, most] = [sorted[0]!, sorted.at(-1)!];
  const from = optionalNumber(lowest, 'lowest (argument 2)') ?? least;
  const to = optionalNumber(highest, 'highest (argument 3)') ?? most;
  if (!(from < to)) {
    throw least === most
      ? new InputError(
          where,
          `${sorted.length === 1 ? 'one value' : `all ${sorted.length} values are`} ${least}`,
          'give lowest and highest around it, or use the number itself',
        )
      : new InputError(
          'lowest (argument 2)',
          `${from} is not below ${to}`,
          'give lowest below highest',
        );
  }
  const outside = data.numbers.findIndex((value) => value < from || value > to);
  if (outside >= 0) {
    throw new InputError(
      data.placeOf(outside),
      `${data.numbers[outside]} lies outside ${from} … ${to}`,
      'give lowest and highest that hold all values, or leave them out',
    );
  }
  const bins = binCount(sorted, to - from);
  if (bins > MOST_BINS) {
    throw new InputError(
      where,
      `the rule asks for ${bins} bins, since most values lie close together`,
      `count them into bins of your own, at most ${MOST_BINS}, and give these to FROMBINS`,
    );
  }
  const edges = Array.from({ length: bins + 1 }, (_, k) =>
    k === bins ? to : from + (to - from) * (k / bins),
  );
  return table(steps(edges, countInBins(edges, sorted)));
}
