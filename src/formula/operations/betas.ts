/**
 * The beta family: BETA.DIST, F.DIST, T.DIST. Densities are products of powers; with
 * large powers they are written around their peak.
 *
 * Source: OpenFormula 1.2 §6.18, ECMA-376 part 1 §18.17.7. Not handled: x outside the
 * range of the variable, where some spreadsheet programs give 0 and others an error.
 */
import * as I from '../../numeric/interval';
import type { Maker, Row } from '../row';
import { ADD, DIVIDE, MULTIPLY, SUBTRACT } from './arithmetic';
import { betaShareAt, tShareAt } from './cumulative';
import { EXP } from './exponential';
import { GAMMALN, STIRLING_RATIO } from './gamma';
import { checkShape, degrees, isCumulative } from './parameter';
import { raise, SQRT, square } from './power';
import { BOTH, NOT_NEGATIVE } from './truth';
import { where } from './undefined';

/** Above this sum of powers a product of powers is written around its peak. */
const LARGE_SUM = 900;
/** Above this power x^k is not taken alone. */
const LARGE_POWER = 20;

/** a·b, left out where a is 1. */
function times(make: Maker, a: number, b: number): number {
  return make.exactValue(a) === 1 ? b : make.apply(MULTIPLY, a, b);
}

/** 1/B(a, b) for constants. */
function inverseBeta(make: Maker, a: number, b: number): number {
  const below = make.apply(ADD, make.apply(GAMMALN, a), make.apply(GAMMALN, b));
  const above = make.apply(GAMMALN, make.apply(ADD, a, b));
  return make.apply(EXP, make.apply(SUBTRACT, above, below));
}

/**
 * z^a (1 − z)^b / B(a + 1, b + 1) for constant powers; `rest` is the node of 1 − z.
 * With large powers: (N + 1) R(a) R(b)/R(N) · ((z/z₀)^(a/m) ((1 − z)/(1 − z₀))^(b/m))^m,
 * where N = a + b, z₀ = a/N is the peak, m the larger power and R the Stirling ratio.
 * Neither factor exceeds e and the bracket is 1 at the peak.
 */
export function betaDensity(make: Maker, z: number, rest: number, a: number, b: number): number {
  const [ofA, ofB] = [make.enclosure(a)!, make.enclosure(b)!];
  const one = make.number(1);
  const isLarge = ofA.lo > 0 && ofB.lo > 0 && ofA.hi + ofB.hi > LARGE_SUM;
  if (!isLarge) {
    const size = inverseBeta(make, make.apply(ADD, a, one), make.apply(ADD, b, one));
    const product = times(make, raise(make, [z, a]), raise(make, [rest, b]));
    return make.exactValue(product) === 1 ? size : make.apply(MULTIPLY, size, product);
  }
  const sum = make.apply(ADD, a, b);
  const most = ofA.hi > ofB.hi ? a : b;
  const factor = (u: number, power: number): number => {
    const relative = make.apply(DIVIDE, make.apply(MULTIPLY, u, sum), power);
    return power === most ? relative : raise(make, [relative, make.apply(DIVIDE, power, most)]);
  };
  const hump = raise(make, [make.apply(MULTIPLY, factor(z, a), factor(rest, b)), most]);
  return make.apply(MULTIPLY, betaPeak(make, a, b, sum), hump);
}

/** The height at the peak: (N + 1) R(a) R(b) / R(N). */
function betaPeak(make: Maker, a: number, b: number, sum: number): number {
  const ratio = (k: number): number => make.apply(STIRLING_RATIO, k);
  const both = make.apply(MULTIPLY, ratio(a), ratio(b));
  const size = make.apply(ADD, sum, make.number(1));
  return make.apply(MULTIPLY, size, make.apply(DIVIDE, both, ratio(sum)));
}

/** True where z and 1 − z are both ≥ 0. */
export function isShare(make: Maker, z: number, rest: number): number {
  return make.apply(BOTH, make.apply(NOT_NEGATIVE, z), make.apply(NOT_NEGATIVE, rest));
}

function beta(make: Maker, args: readonly number[]): number {
  const [x, a, b, flag] = args as readonly [number, number, number, number];
  const [, , , , from, to] = args;
  const one = make.number(1);
  const [shapeA, shapeB] = [checkShape(make, 'shape', a), checkShape(make, 'shape', b)];
  const least = from ?? make.number(0);
  const width = make.apply(SUBTRACT, to ?? one, least);
  const known = make.enclosure(width);
  if (!known || known.lo <= 0) {
    throw make.refuse(
      known ? 'an end B that is not above A' : 'ends that are not constants',
      'give constants A < B',
    );
  }
  const isUnit = make.exactValue(least) === 0 && make.exactValue(width) === 1;
  const z = isUnit ? x : make.apply(DIVIDE, make.apply(SUBTRACT, x, least), width);
  const rest = make.apply(SUBTRACT, one, z);
  const less1 = (shape: number): number => make.apply(SUBTRACT, shape, one);
  const density = betaDensity(make, z, rest, less1(a), less1(b));
  const value = isCumulative(make, flag)
    ? betaShareAt(make, false, shapeA, shapeB, z, density)
    : isUnit
      ? density
      : make.apply(DIVIDE, density, width);
  const outside = 'BETA.DIST takes a number outside A to B, on which spreadsheet programs disagree';
  return where(make, isShare(make, z, rest), value, outside);
}

/**
 * With r = n/m and k = n/2 − 1:
 * √r^n / B(n/2, m/2) · x^k (1 + r x)^(−(n + m)/2), the last two around their peak where k is large.
 * The share below is that of a beta variable (n/2, m/2) at rx/(1 + rx).
 */
function f(make: Maker, [x, first, second, flag]: readonly number[]): number {
  const [n, m] = [degrees(make, first!), degrees(make, second!)];
  const one = make.number(1);
  const number = (value: number): number => make.number(value);
  const r = make.apply(DIVIDE, number(n), number(m));
  const rx = make.apply(MULTIPLY, r, x!);
  const y = make.apply(DIVIDE, rx, make.apply(ADD, one, rx));
  const rest = make.apply(DIVIDE, one, make.apply(ADD, one, rx));
  let value: number;
  if (isCumulative(make, flag!)) {
    const density = betaDensity(make, y, rest, number(n / 2 - 1), number(m / 2 - 1));
    value = betaShareAt(make, false, I.interval(n / 2), I.interval(m / 2), y, density);
  } else value = fDensity(make, x!, rx, n, m);
  const outside = 'F.DIST takes a number below 0, on which spreadsheet programs disagree';
  return where(make, make.apply(NOT_NEGATIVE, x!), value, outside);
}

function fDensity(make: Maker, x: number, rx: number, n: number, m: number): number {
  const one = make.number(1);
  const r = make.apply(DIVIDE, make.number(n), make.number(m));
  const k = n / 2 - 1;
  const power = -(n + m) / 2;
  const base = make.apply(ADD, one, rx);
  if (k <= LARGE_POWER && m / 2 <= LARGE_POWER) {
    const size = make.apply(
      MULTIPLY,
      raise(make, [r, make.number(n / 2)]),
      inverseBeta(make, make.number(n / 2), make.number(m / 2)),
    );
    const fall = raise(make, [base, make.number(power)]);
    return make.apply(MULTIPLY, size, times(make, raise(make, [x, make.number(k)]), fall));
  }
  // With y = rx/(1 + rx), a = n/2, b = m/2 the same is r y^(a − 1) (1 − y)^(b + 1) / B(a, b), and
  // B(a, b + 2)/B(a, b) = b (b + 1)/((a + b)(a + b + 1)).
  const y = make.apply(DIVIDE, rx, base);
  const rest = make.apply(DIVIDE, one, base);
  const [a, b] = [n / 2, m / 2];
  const hump = betaDensity(make, y, rest, make.number(k), make.number(b + 1));
  const up = make.apply(MULTIPLY, make.number(b), make.number(b + 1));
  const down = make.apply(MULTIPLY, make.number(a + b), make.number(a + b + 1));
  const size = make.apply(MULTIPLY, r, make.apply(DIVIDE, up, down));
  return make.apply(MULTIPLY, size, hump);
}

/** (1 + x²/n)^(−(n + 1)/2) / (√n B(n/2, 1/2)). */
function student(make: Maker, [x, freedom, flag]: readonly number[]): number {
  const n = degrees(make, freedom!);
  const one = make.number(1);
  const ratio = make.apply(DIVIDE, square(make, x!), make.number(n));
  const hump = raise(make, [make.apply(ADD, one, ratio), make.number(-(n + 1) / 2)]);
  const root = make.apply(SQRT, make.number(n));
  const size = inverseBeta(make, make.number(n / 2), make.number(0.5));
  const density = make.apply(MULTIPLY, make.apply(DIVIDE, size, root), hump);
  return isCumulative(make, flag!) ? tShareAt(make, n, x!, density) : density;
}

export const BETA_ROWS: readonly Row[] = [
  { name: 'BETA.DIST', least: 4, most: 6, rewrite: beta },
  { name: 'F.DIST', least: 4, most: 4, rewrite: f },
  { name: 'T.DIST', least: 3, most: 3, rewrite: student },
];
