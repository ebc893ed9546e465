/** What a row of the vocabulary is, and what its rewriting may ask for. */
import type { Operation } from './operation';

/** What a rewriting may ask for: nodes are the places of a tape. */
export interface Maker {
  number(value: number): number;
  pi(): number;
  apply(operation: Operation, ...args: number[]): number;
  call(name: string, ...args: number[]): number;
  /** The value of a node that does not depend on the variables and is exactly known. */
  exactValue(node: number): number | undefined;
  isConstant(node: number): boolean;
  isTruth(node: number): boolean;
  /** Refuses the call with a message at its place. */
  refuse(found: string, expected: string): Error;
}

export interface Row {
  readonly name: string;
  readonly least: number;
  readonly most: number;
  readonly operation?: Operation;
  readonly rewrite?: (make: Maker, args: readonly number[]) => number;
}

/** For the most arguments of a function that takes any number of them. */
export const ANY = Infinity;
