/**
 * What a name among the givens stands for in a formula: a number, a list of numbers
 * (an array of one column) or a function by its points.
 */
import type { Operation } from './operation';

export interface List {
  readonly kind: 'list';
  readonly values: readonly number[];
  /** A digest of the values: equal lists have equal ones. */
  readonly fingerprint: string;
}

export interface PointFunction {
  readonly kind: 'function';
  readonly operation: Operation;
  readonly nPoints: number;
  /** A digest of the points: equal functions have equal ones. */
  readonly fingerprint: string;
}

export type Given = number | List | PointFunction;

/** Givens by name as written. */
export type GivenMap = ReadonlyMap<string, Given>;
