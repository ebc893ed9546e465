/**
 * Every worksheet function with its help and the computation behind it, for all
 * faces: the workbook, the command line, the local workbook, the README reference.
 * Names and help come from functions.json, so each is written once, in functions.ts.
 */
import {
  above,
  acceptance,
  alignRanks,
  below,
  bestOf,
  blend,
  cases,
  check,
  draw,
  drivers,
  each,
  envelope,
  exceedance,
  expect,
  fromBins,
  fromData,
  fromPercentiles,
  InputError,
  linkedShares,
  pairedChange,
  pick,
  profile,
  proposals,
  quantile,
  ranks,
  rowsNeeded,
  stratified,
  summary,
  thin,
  total,
} from '../../src/index';
import type { Range } from '../../src/index';
import metadata from './functions.json';

interface CatalogueParameter {
  readonly name: string;
  readonly description: string;
  readonly optional: boolean;
  readonly repeating: boolean;
}

export interface CatalogueEntry {
  /** As in the worksheet, without the namespace: "DRAW". */
  readonly name: string;
  readonly description: string;
  readonly parameters: readonly CatalogueParameter[];
  /**
   * The function's answer. Arguments by position, null when omitted; those of the
   * repeating last parameter follow flat.
   * @throws {InputError} when there are more arguments than parameters, or as the function says
   */
  call(args: readonly (Range | null)[]): Range;
}

/** The word before the dot in a worksheet: UNDERCURVE.DRAW. */
export const namespace = 'UNDERCURVE';

type Argument = Range | null;

/** A missing argument is null, as an omitted one is. */
const computations: Record<string, (at: readonly Argument[], rest: readonly Range[]) => Range> = {
  DRAW: ([density = null, limits = null, rows = null, seed = null, label = null], givens) =>
    draw(density, limits, rows, seed, label, givens),
  ENVELOPE: ([density = null, limits = null], givens) => envelope(density, limits, givens),
  ACCEPTANCE: ([density = null, limits = null, rows = null, seed = null, label = null], givens) =>
    acceptance(density, limits, rows, seed, label, givens),
  PROFILE: ([density = null, limits = null, count = null], givens) =>
    profile(density, limits, count, givens),
  BELOW: ([density = null, limits = null, x = null], givens) => below(density, limits, x, givens),
  ABOVE: ([density = null, limits = null, x = null], givens) => above(density, limits, x, givens),
  QUANTILE: ([density = null, limits = null, share = null, side = null], givens) =>
    quantile(density, limits, share, side, givens),
  EXPECT: ([density = null, limits = null, quantity = null], givens) =>
    expect(density, limits, quantity, givens),
  PROPOSALS: ([density = null, limits = null, rows = null, seed = null, label = null], givens) =>
    proposals(density, limits, rows, seed, label, givens),
  FROMBINS: ([edges = null, shares = null]) => fromBins(edges, shares),
  FROMPERCENTILES: ([levels = null, values = null, lowest = null, highest = null]) =>
    fromPercentiles(levels, values, lowest, highest),
  FROMDATA: ([values = null, lowest = null, highest = null]) => fromData(values, lowest, highest),
  CASES: (
    [density = null, limits = null, rows = null, seed = null, label = null, table = null],
    givens,
  ) => cases(density, limits, rows, seed, label, table, givens),
  EACH: ([density = null, limits = null, seed = null, label = null, lines = null], givens) =>
    each(density, limits, seed, label, lines, givens),
  STRATIFIED: ([density = null, limits = null, rows = null, seed = null, label = null], givens) =>
    stratified(density, limits, rows, seed, label, givens),
  TOTAL: (
    [counts = null, density = null, limits = null, each = null, seed = null, label = null],
    givens,
  ) => total(counts, density, limits, each, seed, label, givens),
  PICK: ([table = null, weights = null, rows = null, seed = null, label = null]) =>
    pick(table, weights, rows, seed, label),
  THIN: ([table = null, weights = null, seed = null, label = null, bound = null]) =>
    thin(table, weights, seed, label, bound),
  LINKEDSHARES: ([correlations = null, rows = null, seed = null, label = null]) =>
    linkedShares(correlations, rows, seed, label),
  ALIGNRANKS: ([columns = null, correlations = null, seed = null, label = null]) =>
    alignRanks(columns, correlations, seed, label),
  RANKS: ([columns = null, confidence = null]) => ranks(columns, confidence),
  BLEND: ([shares = null], shapes) => blend(shares, shapes),
  SUMMARY: ([values = null, shares = null, confidence = null, weights = null]) =>
    summary(values, shares, confidence, weights),
  EXCEEDANCE: ([values = null, threshold = null, confidence = null, weights = null]) =>
    exceedance(values, threshold, confidence, weights),
  ROWSNEEDED: ([values = null, share = null, halfwidth = null, confidence = null]) =>
    rowsNeeded(values, share, halfwidth, confidence),
  PAIREDCHANGE: ([before = null, after = null, confidence = null]) =>
    pairedChange(before, after, confidence),
  DRIVERS: ([inputs = null, output = null]) => drivers(inputs, output),
  CHECK: ([values = null, density = null, limits = null], givens) =>
    check(values, density, limits, givens),
  BESTOF: ([table = null, largest = null, confidence = null]) => bestOf(table, largest, confidence),
};

interface FunctionMetadata {
  name: string;
  description: string;
  parameters: { name: string; description: string; optional?: boolean; repeating?: boolean }[];
}

function entryOf({ name, description, parameters: listed }: FunctionMetadata): CatalogueEntry {
  const compute = computations[name];
  if (compute === undefined) throw new Error(`bug: ${name} has help but no computation`);
  const parameters = listed.map(({ optional = false, repeating = false, ...rest }) => ({
    ...rest,
    optional,
    repeating,
  }));
  const repeats = parameters.at(-1)?.repeating ?? false;
  const nFixed = parameters.length - (repeats ? 1 : 0);
  const call = (args: readonly Argument[]): Range => {
    if (!repeats && args.length > nFixed) {
      throw new InputError(
        name,
        `${args.length} arguments are given`,
        `it takes at most ${nFixed}`,
      );
    }
    const givens = args.slice(nFixed).filter((arg) => arg !== null);
    return compute(args.slice(0, nFixed), givens);
  };
  return { name, description, parameters, call };
}

export const catalogue: readonly CatalogueEntry[] = metadata.functions.map(entryOf);
