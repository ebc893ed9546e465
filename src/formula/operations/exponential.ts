/** EXP and LN. ln(EXP(u)) is u itself, which is what keeps products of EXPs tight. */
import * as elementary from '../../numeric/elementary';
import * as I from '../../numeric/interval';
import * as J from '../../numeric/jet';
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
