/**
 * Numbers, variables and the four operations, with their logarithms: ln(ab) = ln a + ln b.
 * Not handled: powers (power.ts).
 */
import * as elementary from '../../numeric/elementary';
import * as I from '../../numeric/interval';
import * as J from '../../numeric/jet';
import type { Operation } from '../operation';
import { Defined } from '../operation';

export const NUMBER: Operation = {
  name: 'number',
  point: () => NaN,
  enclose: () => undefined,
  slopes: J.setConstantSlopes,
};

export const VARIABLE: Operation = {
  name: 'variable',
  point: () => NaN,
  enclose: () => undefined,
  slopes(out) {
    I.set(out.d, 1, 1);
    I.set(out.h, 0, 0);
  },
};

export const NEGATE: Operation = {
  name: 'negate',
  growth: { kind: 'same' },
  point: (a) => 0 - a,
  enclose: I.negate,
  slopes(out, a) {
    I.negate(out.d, a.d);
    I.negate(out.h, a.h);
  },
  logarithm: (out, [a]) => J.copyJet(out, a),
};

const logSpread = I.interval();
const logTerm = I.interval();

/** ln(e^a + e^b) with its derivatives: weights of a and b are between 0 and 1 and their product is at most 1/4. */
function logOfSum(out: J.Jet, a: J.Jet, b: J.Jet): void {
  const lo = addedLogs(a.v.lo, b.v.lo, -1);
  const hi = addedLogs(a.v.hi, b.v.hi, 1);
  I.subtract(logSpread, a.d, b.d);
  I.square(logSpread, logSpread);
  I.set(logTerm, 0, 0.25);
  I.multiply(logSpread, logSpread, logTerm);
  I.hull(out.d, a.d, b.d);
  I.hull(out.h, a.h, b.h);
  I.add(out.h, out.h, logSpread);
  I.set(out.v, lo, hi);
}

function addedLogs(a: number, b: number, direction: -1 | 1): number {
  const most = Math.max(a, b);
  const least = Math.min(a, b);
  if (most === -Infinity || most === Infinity || least === -Infinity) return most;
  const sum = most + elementary.ln(1 + elementary.exp(least - most));
  return sum + direction * (Math.abs(sum) + 1) * 1e-14;
}

export const ADD: Operation = {
  name: 'add',
  growth: { kind: 'sum', sign: 1 },
  point: (a, b) => a + b,
  enclose: I.add,
  slopes(out, a, b) {
    I.addLoosely(out.d, a.d, b.d);
    I.addLoosely(out.h, a.h, b.h);
  },
  logarithm(out, [a, b], [u, v]) {
    if (u.v.lo >= 0 && v.v.lo >= 0) logOfSum(out, a, b);
    else J.setUnknown(out);
  },
};

export const SUBTRACT: Operation = {
  name: 'subtract',
  growth: { kind: 'sum', sign: -1 },
  point: (a, b) => a - b,
  enclose: I.subtract,
  slopes(out, a, b) {
    I.subtractLoosely(out.d, a.d, b.d);
    I.subtractLoosely(out.h, a.h, b.h);
  },
};

const product = J.jet();

export const MULTIPLY: Operation = {
  name: 'multiply',
  growth: { kind: 'product' },
  point: (a, b) => a * b,
  enclose: I.multiply,
  slopes(out, a, b) {
    J.multiplyJet(product, a, b);
    I.copy(out.d, product.d);
    I.copy(out.h, product.h);
  },
  logarithm: (out, [a, b]) => J.addJet(out, a, b),
};

export const DIVIDE: Operation = {
  name: 'divide',
  growth: { kind: 'quotient' },
  point: (a, b) => a / b,
  enclose: I.divide,
  slopes(out, a, b) {
    J.divideJet(product, a, b);
    I.copy(out.d, product.d);
    I.copy(out.h, product.h);
  },
  logarithm: (out, [a, b]) => J.subtractJet(out, a, b),
  defined: (_, b) => (b.lo === 0 && b.hi === 0 ? Defined.Nowhere : Defined.Everywhere),
  turnsOn: 1,
  outside: 'it divides by zero',
};
