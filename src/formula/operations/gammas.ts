/**
 * The gamma family: EXPON.DIST, GAMMA.DIST, CHISQ.DIST, WEIBULL.DIST. Densities are
 * products of a power and an EXP; with a large power they are written around their
 * peak, (t EXP(1 − t))^k with t = 1 there, so that neither factor overflows.
 *
 * Source: OpenFormula 1.2 §6.18, ECMA-376 part 1 §18.17.7. Not handled: x below 0,
 * where some spreadsheet programs give 0 and others an error.
 */
import { exactFactorial } from '../../numeric/special';
import type { Maker, Row } from '../row';
import { ADD, DIVIDE, MULTIPLY, NEGATE, SUBTRACT } from './arithmetic';
import { gammaShareAt } from './cumulative';
import { EXP, EXP_LESS_1 } from './exponential';
import { GAMMALN, STIRLING_RATIO } from './gamma';
import { checkShape, degrees, isCumulative, whereAbove0 } from './parameter';
import { raise } from './power';
import { NOT_NEGATIVE } from './truth';
import { where } from './undefined';

/** Above this power a density is written around its peak. */
const LARGE_POWER = 20;

export function whereNotNegative(make: Maker, name: string, x: number, value: number): number {
  const outside = `${name} takes a number below 0, on which spreadsheet programs disagree`;
  return where(make, make.apply(NOT_NEGATIVE, x), value, outside);
}

/** u^k EXP(−u) / Γ(k + 1), the density at u of a gamma variable with shape k + 1 and scale 1. */
export function gammaDensity(make: Maker, u: number, k: number): number {
  const one = make.number(1);
  const power = make.enclosure(k)!;
  if (power.lo > LARGE_POWER) {
    const t = make.apply(DIVIDE, u, k);
    const hump = make.apply(MULTIPLY, t, make.apply(EXP, make.apply(SUBTRACT, one, t)));
    return make.apply(MULTIPLY, make.apply(STIRLING_RATIO, k), raise(make, [hump, k]));
  }
  const fall = make.apply(EXP, make.apply(NEGATE, u));
  if (make.exactValue(k) === 0) return fall;
  const size = inverseFactorial(make, k);
  return make.apply(MULTIPLY, size, make.apply(MULTIPLY, raise(make, [u, k]), fall));
}

/** 1/Γ(k + 1) for a constant k. */
function inverseFactorial(make: Maker, k: number): number {
  const one = make.number(1);
  const factorial = exactFactorial(make.exactValue(k) ?? NaN);
  if (factorial !== undefined) return make.apply(DIVIDE, one, make.number(factorial));
  const log = make.apply(GAMMALN, make.apply(ADD, k, one));
  return make.apply(EXP, make.apply(NEGATE, log));
}

/** GAMMA.DIST by its standard form at u = x/scale. */
function gamma(make: Maker, name: string, args: readonly number[], isBelow: boolean): number {
  const [x, shape, scale] = args as readonly [number, number, number];
  const known = checkShape(make, 'shape', shape);
  const u = make.exactValue(scale) === 1 ? x : make.apply(DIVIDE, x, scale);
  const density = gammaDensity(make, u, make.apply(SUBTRACT, shape, make.number(1)));
  const value = isBelow
    ? gammaShareAt(make, false, known, u, density)
    : make.exactValue(scale) === 1
      ? density
      : make.apply(DIVIDE, density, scale);
  return whereAbove0(make, 'scale', scale, whereNotNegative(make, name, x, value));
}

function exponential(make: Maker, [x, rate, flag]: readonly number[]): number {
  const power = make.apply(NEGATE, make.apply(MULTIPLY, rate!, x!));
  const value = isCumulative(make, flag!)
    ? make.apply(NEGATE, make.apply(EXP_LESS_1, power))
    : make.apply(MULTIPLY, rate!, make.apply(EXP, power));
  return whereAbove0(make, 'rate', rate!, whereNotNegative(make, 'EXPON.DIST', x!, value));
}

/** (shape/scale)(x/scale)^(shape − 1) EXP(−(x/scale)^shape). */
function weibull(make: Maker, [x, shape, scale, flag]: readonly number[]): number {
  checkShape(make, 'shape', shape!);
  const t = make.exactValue(scale!) === 1 ? x! : make.apply(DIVIDE, x!, scale!);
  const power = make.apply(NEGATE, raise(make, [t, shape!]));
  let value: number;
  if (isCumulative(make, flag!)) value = make.apply(NEGATE, make.apply(EXP_LESS_1, power));
  else {
    const less1 = make.apply(SUBTRACT, shape!, make.number(1));
    const size = make.apply(DIVIDE, shape!, scale!);
    const rise =
      make.exactValue(less1) === 0 ? size : make.apply(MULTIPLY, size, raise(make, [t, less1]));
    value = make.apply(MULTIPLY, rise, make.apply(EXP, power));
  }
  return whereAbove0(make, 'scale', scale!, whereNotNegative(make, 'WEIBULL.DIST', x!, value));
}

export const GAMMA_ROWS: readonly Row[] = [
  { name: 'EXPON.DIST', least: 3, most: 3, rewrite: exponential },
  {
    name: 'GAMMA.DIST',
    least: 4,
    most: 4,
    rewrite: (make, [x, shape, scale, flag]) =>
      gamma(make, 'GAMMA.DIST', [x!, shape!, scale!], isCumulative(make, flag!)),
  },
  {
    name: 'CHISQ.DIST',
    least: 3,
    most: 3,
    rewrite(make, [x, freedom, flag]) {
      const shape = make.number(degrees(make, freedom!) / 2);
      const isBelow = isCumulative(make, flag!);
      return gamma(make, 'CHISQ.DIST', [x!, shape, make.number(2)], isBelow);
    },
  },
  { name: 'WEIBULL.DIST', least: 4, most: 4, rewrite: weibull },
];
