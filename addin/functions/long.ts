/**
 * Which calls may take so long that they belong in a Worker: proofs in several
 * variables or over many counted points, formulas as long as a page, totals over
 * millions of draws, thousands of exact shares, a proof for each of many lines. All others
 * are done before a Worker would have read its task.
 */
import type { Range } from '../../src/index';
import { catalogue } from './catalogue';
import type { Arguments } from './reply';

/** Characters of a formula beyond which its proof may take longer than a tenth of a second. */
const LONG_FORMULA = 500;

/** Counted points beyond which a proof, and draws beyond which a total, may take longer than that. */
const MANY_POINTS = 50_000;
const MANY_DRAWS = 1_000_000;
/** The same for exact shares, worked out one by one, and for lines that each need a proof. */
const MANY_SHARES = 2000;
const MANY_LINES = 200;
/** Which argument holds what is worked out one by one. */
const ONE_BY_ONE: Readonly<Record<string, string | undefined>> = {
  BELOW: 'x',
  ABOVE: 'x',
  QUANTILE: 'share',
};

/** Whether a call is worth a Worker. Guarantee: none; the answer is the same either way. */
export function takesLong(name: string, args: Arguments): boolean {
  const parameters = catalogue.find((entry) => entry.name === name)?.parameters ?? [];
  const at = (parameter: string): Range | null =>
    args[parameters.findIndex((each) => each.name === parameter)] ?? null;
  const each = ONE_BY_ONE[name];
  return (
    hasSeveralVariables(at('limits')) ||
    hasManyPoints(at('limits')) ||
    hasLongFormula(at('density')) ||
    (name === 'TOTAL' && sumOf(at('counts')) > MANY_DRAWS) ||
    (name === 'EACH' && hasManyLines(at('lines'))) ||
    (each !== undefined && sizeOf(at(each)) > MANY_SHARES)
  );
}

/** Rows name | from | to, below a heading or not. */
function hasSeveralVariables(limits: Range | null): boolean {
  const named = (limits ?? []).filter(
    (row) => row.length >= 3 && typeof row[0] === 'string' && row[1] !== null,
  );
  const isHeading = typeof named[0]?.[1] === 'string' && typeof named[0][2] === 'string';
  return named.length - (isHeading ? 1 : 0) > 1;
}

/** A row name | from | to | step with numbers; where an end is open the points are few or the proof refuses. */
function hasManyPoints(limits: Range | null): boolean {
  return (limits ?? []).some(([, from, to, step]) => {
    if (typeof from !== 'number' || typeof to !== 'number' || typeof step !== 'number')
      return false;
    return step > 0 && (to - from) / step > MANY_POINTS;
  });
}

function sumOf(counts: Range | null): number {
  return (counts ?? [])
    .flat()
    .reduce<number>((sum, count) => sum + (typeof count === 'number' ? count : 0), 0);
}

function sizeOf(range: Range | null): number {
  return range === null ? 0 : range.length * (range[0]?.length ?? 0);
}

/** Different ones. */
function hasManyLines(lines: Range | null): boolean {
  const different = new Set<string>();
  for (const line of lines ?? []) {
    if (different.add(JSON.stringify(line)).size > MANY_LINES) return true;
  }
  return false;
}

function hasLongFormula(density: Range | null): boolean {
  return (density ?? []).some((row) =>
    row.some((cell) => typeof cell === 'string' && cell.length > LONG_FORMULA),
  );
}
