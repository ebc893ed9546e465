/**
 * ERF and ERFC, the integral of the Gaussian curve. ERFC keeps its digits in the far
 * tail, and its logarithm goes on where it underflows.
 *
 * Source: DLMF 7.2, 7.10. The hazard −(ln ERFC)′ rises, and so does its slope, from
 * 0 to 2 (Sampford 1953, "Some inequalities on Mill's ratio and related functions").
 */
import { lowerAt, setFalling, setRising, upperAt } from '../../numeric/bounded';
import type { Interval } from '../../numeric/interval';
import * as I from '../../numeric/interval';
import * as special from '../../numeric/special';
import type { Operation } from '../operation';
import { smooth } from '../operation';

/** 2/√π, enclosed. */
const PEAK = I.interval(1.1283791670955123, 1.1283791670955128);
/** Room for the rounding of the hazard, relative to its square. */
const HAZARD_ROOM = 1e-10;

/** Scratch for one rule at a time; it holds nothing between calls. */
const t = I.interval();

/** 2/√π · EXP(−u²). */
function bell(out: Interval, u: Interval): void {
  I.square(out, u);
  I.negate(out, out);
  I.exponential(out, out);
  I.multiply(out, out, PEAK);
}

export const ERF: Operation = smooth({
  name: 'ERF',
  point: special.erf.at,
  enclose: (out, u) => setRising(out, special.erf, u),
  first: (out, u) => bell(out, u),
  second(out, u, _, d) {
    I.multiply(out, u, d);
    I.scale(out, out, -2);
  },
});

/** The slope of the hazard h is h(h − 2u). */
function hazardSlope(x: number, side: -1 | 1): number {
  if (x === Infinity) return 2;
  if (x === -Infinity) return 0;
  const h = special.erfcHazard.at(x);
  const room = HAZARD_ROOM * h * (h + 2 * Math.abs(x));
  return Math.min(2, Math.max(0, h * (h - 2 * x) + side * room));
}

export const ERFC: Operation = smooth({
  name: 'ERFC',
  point: special.erfc.at,
  enclose: (out, u) => setFalling(out, special.erfc, u),
  first(out, u) {
    bell(out, u);
    I.negate(out, out);
  },
  second(out, u, _, d) {
    I.multiply(out, u, d);
    I.scale(out, out, -2);
  },
  log: {
    value: (out, u) => setFalling(out, special.lnerfc, u),
    first(out, u) {
      I.set(t, lowerAt(special.erfcHazard, u.lo), upperAt(special.erfcHazard, u.hi));
      I.negate(out, t);
    },
    second(out, u) {
      I.set(out, -hazardSlope(u.hi, 1), 0 - hazardSlope(u.lo, -1));
    },
  },
});
