/** What a row of the vocabulary is, and what its rewriting may ask for. */
import type { Interval } from '../numeric/interval';
import type { Operation } from './operation';

/** Rows of nodes. */
export type NodeArray = readonly (readonly number[])[];

/** What a rewriting may ask for: nodes are the places of a tape. */
export interface Maker {
  number(value: number): number;
  pi(): number;
  apply(operation: Operation, ...args: number[]): number;
  call(name: string, ...args: number[]): number;
  /** The value of a node that does not depend on the variables and is exactly known. */
  exactValue(node: number): number | undefined;
  isConstant(node: number): boolean;
  /** True for a whole number that depends on the variables, where a curve through whole numbers is wanted. */
  isCount(node: number): boolean;
  /** Encloses a node that does not depend on the variables, truths included; nothing where it is undefined. */
  enclosure(node: number): Interval | undefined;
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
  /** As rewrite, for functions that need the shape of their arrays; a number is an array of one. */
  readonly rewriteArrays?: (make: Maker, args: readonly NodeArray[]) => number;
}

/** For the most arguments of a function that takes any number of them. */
export const ANY = Infinity;
