/**
 * A compiled formula: a list of steps in which each refers to earlier ones only,
 * equal steps written once. Made by compile.ts; run at a point by evaluate.ts and
 * over an interval by enclose.ts.
 */
import type { Interval } from '../numeric/interval';
import type { Operation } from './operation';

export interface Step {
  readonly operation: Operation;
  /** Places of the three operands; missing ones repeat the first (a number's point at itself). */
  readonly a: number;
  readonly b: number;
  readonly c: number;
  /** How many of the operands count. */
  readonly nOperands: number;
  /** True if the step does not depend on a variable. */
  readonly isConstant: boolean;
  /** For numbers: their double and an enclosure of what they stand for. */
  readonly value: number;
  readonly enclosure: Interval | null;
}

export interface Tape {
  readonly steps: readonly Step[];
  readonly root: number;
  /** The place of each variable, −1 where the formula does not use it. */
  readonly variables: readonly number[];
}
