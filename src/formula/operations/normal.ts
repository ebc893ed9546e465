/**
 * The normal family: PHI, NORM.S.DIST, NORM.DIST, LOGNORM.DIST. Densities are EXPs,
 * shares are ERFCs, so slopes and logarithms are theirs.
 *
 * Source: OpenFormula 1.2 §6.18, ECMA-376 part 1 §18.17.7.
 */
import type { Maker, Row } from '../row';
import { DIVIDE, MULTIPLY, NEGATE, SUBTRACT } from './arithmetic';
import { ERFC } from './error';
import { EXP, LN } from './exponential';
import { isCumulative, whereAbove0 } from './parameter';
import { SQRT, square } from './power';

/** 1/√(2π) · EXP(−z²/2). */
function bell(make: Maker, z: number): number {
  const twoPi = make.apply(MULTIPLY, make.number(2), make.pi());
  const peak = make.apply(DIVIDE, make.number(1), make.apply(SQRT, twoPi));
  const power = make.apply(MULTIPLY, make.number(-0.5), square(make, z));
  return make.apply(MULTIPLY, peak, make.apply(EXP, power));
}

/** The share below z. */
function below(make: Maker, z: number): number {
  const scaled = make.apply(DIVIDE, z, make.apply(SQRT, make.number(2)));
  const twice = make.apply(ERFC, make.apply(NEGATE, scaled));
  return make.apply(MULTIPLY, make.number(0.5), twice);
}

function standardized(make: Maker, x: number, mean: number, deviation: number): number {
  const off = make.exactValue(mean) === 0 ? x : make.apply(SUBTRACT, x, mean);
  return make.exactValue(deviation) === 1 ? off : make.apply(DIVIDE, off, deviation);
}

function normal(make: Maker, [x, mean, deviation, flag]: readonly number[]): number {
  const z = standardized(make, x!, mean!, deviation!);
  const value = isCumulative(make, flag!)
    ? below(make, z)
    : make.apply(DIVIDE, bell(make, z), deviation!);
  return whereAbove0(make, 'standard deviation', deviation!, value);
}

function lognormal(make: Maker, [x, mean, deviation, flag]: readonly number[]): number {
  const z = standardized(make, make.apply(LN, x!), mean!, deviation!);
  const value = isCumulative(make, flag!)
    ? below(make, z)
    : make.apply(DIVIDE, bell(make, z), make.apply(MULTIPLY, x!, deviation!));
  return whereAbove0(make, 'standard deviation', deviation!, value);
}

export const NORMAL_ROWS: readonly Row[] = [
  { name: 'PHI', least: 1, most: 1, rewrite: (make, [z]) => bell(make, z!) },
  {
    name: 'NORM.S.DIST',
    least: 2,
    most: 2,
    rewrite: (make, [z, flag]) => (isCumulative(make, flag!) ? below(make, z!) : bell(make, z!)),
  },
  { name: 'NORM.DIST', least: 4, most: 4, rewrite: normal },
  { name: 'LOGNORM.DIST', least: 4, most: 4, rewrite: lognormal },
];
