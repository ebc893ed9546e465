/** Shares between 0 and 1, the confidence of intervals, and how results name them. */
import type { Cell, Range } from '../density/cells';
import { givenUnlessZero } from '../density/cells';
import { InputError } from '../errors';
import type { Ends } from '../evidence/student';
import { optionalNumber } from './numbers';

const USUAL = 0.95;

/** 0.95 when it is left out. @throws {InputError} outside 0 … 1. */
export function readConfidence(range: Range | null, where: string): number {
  const confidence = optionalNumber(givenUnlessZero(range), where) ?? USUAL;
  requireShare(confidence, where, 'give a fraction such as 0.95');
  return confidence;
}

/**
 * @throws {InputError} for a share that is not between 0 and 1: with the rewrite for a percentage,
 * with `otherwise` for the rest.
 */
export function requireShare(share: number, where: string, otherwise: string): void {
  if (share > 0 && share < 1) return;
  throw new InputError(
    where,
    `${share} is not between 0 and 1`,
    share > 1 && share < 100
      ? `write ${Number((share / 100).toPrecision(12))} or ${share}%`
      : otherwise,
  );
}

/** A share in percent, without the digits that rounding adds: `97.5`. */
export function percent(share: number): string {
  return String(Number((share * 100).toPrecision(12)));
}

/** `95 % interval`. */
export function intervalName(confidence: number): string {
  return `${percent(confidence)} % interval`;
}

/** An end as a cell: what the rows are too few to tell is a text, so that no formula takes it for 0. */
export function endCell(end: number | null): Cell {
  return end ?? 'unbounded';
}

/** Both ends as cells. */
export function endCells({ lo, hi }: Ends): readonly [Cell, Cell] {
  return [endCell(lo), endCell(hi)];
}
