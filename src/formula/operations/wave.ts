/** SIN, COS, TAN, ATAN and TANH: each slope is had from the value. */
import * as elementary from '../../numeric/elementary';
import type { Interval } from '../../numeric/interval';
import * as I from '../../numeric/interval';
import type { Operation } from '../operation';
import { smooth } from '../operation';

/** Scratch for one rule at a time; it holds nothing between calls. */
const t = I.interval();
const one = I.interval(1);

export const SIN: Operation = smooth({
  name: 'SIN',
  point: elementary.sin,
  enclose: I.sine,
  first: (out, u) => I.cosine(out, u),
  second: (out, _, v) => I.negate(out, v),
});

export const COS: Operation = smooth({
  name: 'COS',
  point: elementary.cos,
  enclose: I.cosine,
  first(out, u) {
    I.sine(out, u);
    I.negate(out, out);
  },
  second: (out, _, v) => I.negate(out, v),
});

/** 1 + v², the derivative of TAN. */
function onePlusSquare(out: Interval, v: Interval): void {
  I.square(out, v);
  I.add(out, out, one);
}

export const TAN: Operation = smooth({
  name: 'TAN',
  point: elementary.tan,
  enclose: I.tangent,
  first: (out, _, v) => onePlusSquare(out, v),
  second(out, _, v, d) {
    I.multiply(out, v, d);
    I.scale(out, out, 2);
  },
  isSmoothOver: (u) => !I.mayHoldTangentPole(u),
});

export const ATAN: Operation = smooth({
  name: 'ATAN',
  point: elementary.atan,
  enclose: I.arctangent,
  first(out, u) {
    onePlusSquare(out, u);
    I.reciprocal(out, out);
  },
  second(out, u, _, d) {
    I.square(t, d);
    I.multiply(out, u, t);
    I.scale(out, out, -2);
  },
});

export const TANH: Operation = smooth({
  name: 'TANH',
  point: elementary.tanh,
  enclose: I.hyperbolicTangent,
  // 1 − tanh² cancels where TANH is near ±1; (1 − v)(1 + v) loses less and stays ≥ 0.
  first(out, _, v) {
    I.add(t, one, v);
    I.subtract(out, one, v);
    I.multiply(out, out, t);
  },
  second(out, _, v, d) {
    I.multiply(out, v, d);
    I.scale(out, out, -2);
  },
});
