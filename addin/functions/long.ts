/**
 * Which calls may take so long that they belong in a Worker: proofs in several
 * variables, and formulas as long as a page. All others are done before a Worker
 * would have read its task.
 */
import type { Range } from '../../src/index';
import { catalogue } from './catalogue';
import type { Arguments } from './reply';

/** Characters of a formula beyond which its proof may take longer than a tenth of a second. */
const LONG_FORMULA = 500;

/** Whether a call is worth a Worker. Guarantee: none; the answer is the same either way. */
export function takesLong(name: string, args: Arguments): boolean {
  const parameters = catalogue.find((entry) => entry.name === name)?.parameters ?? [];
  const at = (parameter: string): Range | null =>
    args[parameters.findIndex((each) => each.name === parameter)] ?? null;
  return hasSeveralVariables(at('limits')) || hasLongFormula(at('density'));
}

/** Rows name | from | to, below a heading or not. */
function hasSeveralVariables(limits: Range | null): boolean {
  const named = (limits ?? []).filter(
    (row) => row.length >= 3 && typeof row[0] === 'string' && row[1] !== null,
  );
  const isHeading = typeof named[0]?.[1] === 'string' && typeof named[0][2] === 'string';
  return named.length - (isHeading ? 1 : 0) > 1;
}

function hasLongFormula(density: Range | null): boolean {
  return (density ?? []).some((row) =>
    row.some((cell) => typeof cell === 'string' && cell.length > LONG_FORMULA),
  );
}
