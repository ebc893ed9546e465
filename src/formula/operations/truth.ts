/** Comparisons and what joins them; TRUE is 1 and FALSE is 0. */
import * as I from '../../numeric/interval';
import type { Operation } from '../operation';
import { setTruth, truth } from '../operation';
import type { Maker, Row } from '../row';
import { ANY } from '../row';
import { SUBTRACT } from './arithmetic';

export const POSITIVE = truth({
  name: 'is positive',
  point: (a) => (a > 0 ? 1 : a <= 0 ? 0 : NaN),
  enclose: (out, a) => setTruth(out, a.lo > 0, a.hi <= 0),
  turnsOn: 0,
});

export const NOT_NEGATIVE = truth({
  name: 'is not negative',
  point: (a) => (a >= 0 ? 1 : a < 0 ? 0 : NaN),
  enclose: (out, a) => setTruth(out, a.lo >= 0, a.hi < 0),
  turnsOn: 0,
});

export const NOT_ZERO = truth({
  name: 'is not zero',
  point: (a) => (a === 0 ? 0 : a === a ? 1 : NaN),
  enclose: (out, a) => setTruth(out, a.lo > 0 || a.hi < 0, a.lo === 0 && a.hi === 0),
  turnsOn: 0,
});

export const BOTH = truth({
  name: 'AND',
  point: (a, b) => a * b,
  enclose: I.minimum,
});

export const EITHER = truth({
  name: 'OR',
  point: (a, b) => Math.max(a, b),
  enclose: I.maximum,
});

export const NOT = truth({
  name: 'NOT',
  point: (a) => 1 - a,
  enclose: (out, a) => I.set(out, 1 - a.hi, 1 - a.lo),
});

/* ---- rows ---------------------------------------------------------------- */
export function truthOf(make: Maker, node: number): number {
  return make.isTruth(node) ? node : make.apply(NOT_ZERO, node);
}

export function gate(name: string, operation: Operation): Row {
  return {
    name,
    least: 1,
    most: ANY,
    rewrite: (make, args) =>
      args.map((a) => truthOf(make, a)).reduce((a, b) => make.apply(operation, a, b)),
  };
}

/** A comparison by the sign of a difference; `swap` takes b − a. */
export function comparison(
  name: string,
  operation: Operation,
  swap: boolean,
  opposite = false,
): Row {
  return {
    name,
    least: 2,
    most: 2,
    rewrite(make, [a, b]) {
      if (make.isTruth(a!) !== make.isTruth(b!)) {
        throw make.refuse(
          'a TRUE or FALSE is compared with a number, on which spreadsheet programs disagree',
          'write IF(…, 1, 0) around the condition, or AND(…, …) for a chain such as 1<x<3',
        );
      }
      const difference = make.apply(SUBTRACT, swap ? b! : a!, swap ? a! : b!);
      const holds = make.apply(operation, difference);
      return opposite ? make.apply(NOT, holds) : holds;
    },
  };
}
