/** EXP, LN and their kin. ln(EXP(u)) is u itself, which is what keeps products of EXPs tight. */
import * as elementary from '../../numeric/elementary';
import * as I from '../../numeric/interval';
import * as J from '../../numeric/jet';
import { lowerAt, setRising, upperAt } from '../../numeric/bounded';
import * as special from '../../numeric/special';
import type { Operation } from '../operation';
import { smooth } from '../operation';
import { positive } from './domain';

export const EXP: Operation = smooth({
  name: 'EXP',
  growth: { kind: 'exponential' },
  point: elementary.exp,
  enclose: I.exponential,
  first: (out, _, v) => I.copy(out, v),
  second: (out, _, v) => I.copy(out, v),
  logarithm: (out, _, [u]) => J.copyJet(out, u),
});

export const LN: Operation = smooth({
  name: 'LN',
  growth: { kind: 'logarithm' },
  point: (x) => (x < 0 ? NaN : elementary.ln(x)),
  enclose: I.logarithm,
  first: (out, u) => I.reciprocal(out, u),
  second(out, u) {
    I.square(out, u);
    I.reciprocal(out, out);
    I.negate(out, out);
  },
  isSmoothOver: (u) => u.lo > 0,
  defined: positive,
  turnsOn: 0,
  outside: 'LN takes a number that is not above 0',
});

/** 1/ln 10, enclosed. */
const LOG_10_E = I.interval(0.4342944819032518, 0.43429448190325187);

/** Its own operation because worksheets give whole numbers at powers of ten. */
export const LOG10: Operation = smooth({
  name: 'LOG10',
  point: (x) => (x < 0 ? NaN : special.log10.at(x)),
  enclose(out, u) {
    const lo = u.lo <= 0 ? -Infinity : lowerAt(special.log10, u.lo);
    I.set(out, lo, upperAt(special.log10, u.hi));
  },
  first(out, u) {
    I.reciprocal(out, u);
    I.multiply(out, out, LOG_10_E);
  },
  second(out, u) {
    I.square(out, u);
    I.reciprocal(out, out);
    I.multiply(out, out, LOG_10_E);
    I.negate(out, out);
  },
  isSmoothOver: (u) => u.lo > 0,
  defined: positive,
  turnsOn: 0,
  outside: 'LOG10 takes a number that is not above 0',
});

/** EXP(u) − 1 without cancelling near 0. */
export const EXP_LESS_1: Operation = smooth({
  name: 'EXP less 1',
  point: special.expm1.at,
  enclose: (out, u) => setRising(out, special.expm1, u),
  first: (out, u) => I.exponential(out, u),
  second: (out, u) => I.exponential(out, u),
});
