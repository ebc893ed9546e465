/** The kinds of shapes, and what may stand in place of their own values. */
import type { Source } from '../formula/compile';
import type { GivenMap } from '../formula/given';
import type { NamedValue } from './givens';
import type { Lattice } from './lattice';
import type { Axis, Limits, OtherEnds } from './limits';
import type { Polyline } from './table';

export interface FormulaShape {
  readonly kind: 'formula';
  /** The lines whose product is the density. */
  readonly sources: readonly Source[];
  readonly variable: string;
  readonly limits: Limits;
  /** The points of a counted quantity; null for a continuous one. */
  readonly lattice: Lattice | null;
  readonly givens: GivenMap;
  /** The place of the line of a list it stands in, for messages. */
  readonly line?: string;
}

export interface TableShape {
  readonly kind: 'table';
  readonly heading: string;
  readonly polyline: Polyline;
  readonly limits: Limits;
  readonly lattice: Lattice | null;
}

/** A formula in two variables or more. */
export interface SeveralShape {
  readonly kind: 'several';
  readonly sources: readonly Source[];
  readonly axes: readonly Axis[];
  readonly givens: GivenMap;
}

/** A shape of one variable. */
export type PlainShape = FormulaShape | TableShape;
export type Shape = PlainShape | SeveralShape;

/** Places of the arguments in messages; functions have them in different positions. */
export interface Places {
  readonly density: string;
  readonly limits: string;
  /** Position of the first range of givens among the arguments, from 1. */
  readonly givens: number;
}

/** Values in place of a shape's own: of its constants, and of the ends of its limits. */
export interface Overrides {
  readonly values: readonly NamedValue[];
  readonly ends: OtherEnds;
}
