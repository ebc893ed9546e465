/**
 * How every row of the vocabulary is tried: formulas in x with a reference that shares
 * no code with the engine. A new row needs a line here; vocabulary.test.ts sees to it.
 */
import { atan, big, Big } from '../numeric/reference';

/** A formula in x and what it must come to on [from, to]. */
export interface Use {
  readonly text: string;
  readonly reference: (x: Big) => Big;
  readonly from: number;
  readonly to: number;
  /** Where the slope or the curvature breaks: slopes are not asked across these. */
  readonly breaks: readonly number[];
  /** Units in the last place by which the value in doubles may be off. */
  readonly ulps: number;
}

/** One elementary function, or one rounding. */
const ONE = 4;
/** A few of them one after the other, none of which cancels. */
const SOME = 20;

function use(
  text: string,
  reference: (x: Big) => Big,
  [from, to]: readonly [number, number],
  { ulps = ONE, breaks = [] as readonly number[] } = {},
): Use {
  return { text, reference, from, to, breaks, ulps };
}

const truth = (holds: boolean): Big => new Big(holds ? 1 : 0);
const PI = new Big(-1).acos();
const TENTH = big(0.1);
const some = { ulps: SOME };

export const USES: Record<string, readonly Use[]> = {
  '+': [
    use('x+0.1', (x) => x.plus(TENTH), [0, 1e6]),
    use('x+x^2', (x) => x.plus(x.pow(2)), [0, 9], some),
  ],
  '-': [
    use('0.1-x', (x) => TENTH.minus(x), [1, 1e6]),
    use('x^2-x', (x) => x.pow(2).minus(x), [2, 9], some),
  ],
  '*': [
    use('x*0.1', (x) => x.times(TENTH), [-1e6, 1e6]),
    use('x*SIN(x)', (x) => x.times(x.sin()), [0.1, 3], some),
  ],
  '/': [
    use('x/0.1', (x) => x.div(TENTH), [-1e6, 1e6]),
    use('1/x', (x) => new Big(1).div(x), [1e-6, 1e6]),
    use('SIN(x)/x', (x) => x.sin().div(x), [0.01, 3], some),
  ],
  '^': [
    use('x^2', (x) => x.pow(2), [-100, 100]),
    use('x^3', (x) => x.pow(3), [-100, 100]),
    use('x^7', (x) => x.pow(7), [-100, 100]),
    use('x^-1', (x) => x.pow(-1), [0.01, 100]),
    use('x^-4', (x) => x.pow(-4), [-100, -0.01], some),
    use('x^0.5', (x) => x.sqrt(), [0.001, 100]),
    use('x^1.7', (x) => x.pow(big(1.7)), [0.001, 100]),
    use('x^-0.3', (x) => x.pow(big(-0.3)), [0.001, 100]),
    use('x^(1/3)', (x) => x.pow(big(1).div(3)), [0.001, 100], some),
    use('2^x', (x) => new Big(2).pow(x), [-30, 30], { ulps: 100 }),
    use('x^x', (x) => x.pow(x), [0.1, 6], { ulps: 100 }),
    use('x^1', (x) => x, [-5, 5]),
    use('x^0', () => new Big(1), [0.1, 5]),
  ],
  negative: [use('-x', (x) => x.neg(), [-1e6, 1e6])],
  '%': [use('x%', (x) => x.div(100), [-1e6, 1e6])],
  '<': [use('x<2', (x) => truth(x.lt(2)), [0, 4], { breaks: [2] })],
  '>': [use('x>2', (x) => truth(x.gt(2)), [0, 4], { breaks: [2] })],
  '<=': [use('x<=2', (x) => truth(x.lte(2)), [0, 4], { breaks: [2] })],
  '>=': [use('x>=2', (x) => truth(x.gte(2)), [0, 4], { breaks: [2] })],
  '<>': [use('x<>2', (x) => truth(!x.eq(2)), [0, 4], { breaks: [2] })],
  '=': [use('x=2', (x) => truth(x.eq(2)), [0, 4], { breaks: [2] })],
  PI: [use('PI()*x', (x) => PI.times(x), [-10, 10])],
  ABS: [use('ABS(x-1)', (x) => x.minus(1).abs(), [-5, 5], { breaks: [1] })],
  SIGN: [
    use('SIGN(x-1)', (x) => new Big(Math.sign(x.minus(1).toNumber())), [-5, 5], { breaks: [1] }),
  ],
  MIN: [
    use('MIN(x,2)', (x) => Big.min(x, 2), [0, 4], { breaks: [2] }),
    use('MIN(3,x,4-x)', (x) => Big.min(x, new Big(4).minus(x)), [1, 3], { breaks: [2] }),
  ],
  MAX: [
    use('MAX(x,2)', (x) => Big.max(x, 2), [0, 4], { breaks: [2] }),
    use('MAX(1,x,4-x)', (x) => Big.max(x, new Big(4).minus(x)), [1, 3], { breaks: [2] }),
  ],
  SUM: [
    use('SUM(x)', (x) => x, [-5, 5]),
    use('SUM(x,0.1,x*x)', (x) => x.plus(TENTH).plus(x.times(x)), [0, 10], some),
    use('SUM({1,2;3,4}*x)', (x) => x.times(10), [0, 10], some),
  ],
  PRODUCT: [
    use('PRODUCT(x,0.1,x+1)', (x) => x.times(TENTH).times(x.plus(1)), [0, 10], some),
    use('PRODUCT(x+{1,2})', (x) => x.plus(1).times(x.plus(2)), [0, 10], some),
  ],
  AVERAGE: [use('AVERAGE(x,1,4)', (x) => x.plus(5).div(3), [0, 10], some)],
  SQRT: [use('SQRT(x)', (x) => x.sqrt(), [1e-4, 1e6])],
  EXP: [
    use('EXP(x)', (x) => x.exp(), [-30, 30]),
    // Half an ulp of an argument of 50 is 2^-48 in the result, 32 ulps.
    use('EXP(-(x^2)/2)', (x) => x.pow(2).div(-2).exp(), [-10, 10], { ulps: 80 }),
  ],
  LN: [use('LN(x)', (x) => x.ln(), [1e-6, 1e6])],
  LOG: [
    use('LOG(x)', (x) => x.ln().div(new Big(10).ln()), [1.1, 1e6], some),
    use('LOG(x,2)', (x) => x.ln().div(new Big(2).ln()), [1.1, 1e6], some),
  ],
  LOG10: [use('LOG10(x)', (x) => x.ln().div(new Big(10).ln()), [1.1, 1e6], some)],
  POWER: [
    use('POWER(x,2.5)', (x) => x.pow(2.5), [0.001, 100]),
    use('POWER(x,3)', (x) => x.pow(3), [-9, 9]),
  ],
  SIN: [use('SIN(x)', (x) => x.sin(), [-50, 50])],
  COS: [use('COS(x)', (x) => x.cos(), [-50, 50])],
  TAN: [use('TAN(x)', (x) => x.tan(), [-1.5, 1.5])],
  ATAN: [use('ATAN(x)', atan, [-50, 50])],
  TANH: [use('TANH(x)', (x) => x.tanh(), [-9, 9])],
  IF: [
    use('IF(x<2,x,x^2)', (x) => (x.lt(2) ? x : x.pow(2)), [0, 4], { breaks: [2] }),
    use('IF(x>2,x)', (x) => (x.gt(2) ? x : new Big(0)), [0, 4], { breaks: [2] }),
    // A number counts as TRUE unless it is 0.
    use('IF(x-2,5,7)', (x) => new Big(x.eq(2) ? 7 : 5), [0, 4], { breaks: [2] }),
  ],
  AND: [
    use('AND(x>1,x<3)', (x) => truth(x.gt(1) && x.lt(3)), [0, 4], { breaks: [1, 3] }),
    use('AND(x>1,x<3,x-2)', (x) => truth(x.gt(1) && x.lt(3) && !x.eq(2)), [0, 4], {
      breaks: [1, 2, 3],
    }),
  ],
  OR: [use('OR(x<1,x>3)', (x) => truth(x.lt(1) || x.gt(3)), [0, 4], { breaks: [1, 3] })],
  NOT: [use('NOT(x<1)', (x) => truth(!x.lt(1)), [0, 4], { breaks: [1] })],
  TRUE: [use('TRUE()*x', (x) => x, [0, 4]), use('x*TRUE', (x) => x, [0, 4])],
  FALSE: [use('x+FALSE()', (x) => x, [0, 4]), use('x-FALSE', (x) => x, [0, 4])],
};
