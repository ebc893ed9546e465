import seedrandom from 'seedrandom';
import { Encloser } from '../../src/formula/enclose';
import { estimatorOf } from '../../src/formula/estimate';
import * as I from '../../src/numeric/interval';
import { tapeOf } from './formulas';

const tapeInXY = (text: string) => tapeOf(text, {}, ['x', 'y']);

/** Cancellation, underflow, roots near 0 and truths near where they change. */
const TEXTS = [
  'x^2+y^2',
  '(x+y)^2-x^2-2*x*y-y^2',
  'EXP(-0.5*(x^2-1.6*x*y+y^2)/0.36)',
  '1/(x-y)',
  'SQRT(x+y+6)*LN(7+x)',
  'x^7-y^3/3',
  'MAX(0,1-ABS(x)-ABS(y))',
  'IF(x<y,x*1E-200*1E-200,-y)',
  'EXP(100*x)/EXP(99*x)',
  '0.1+0.2-0.3+x*1E-17',
  'x*1E150*(y*1E150)/1E290',
];
const TRUTHS = ['x^2+y^2<=4', 'AND(x+y<=1,x*y>=-2)', 'OR(x<y,NOT(x>0))', 'x*3-y>=2.7'];

describe('Estimator.estimate', () => {
  test.each(TEXTS)('of %s bounds the real value, as its enclosure does [law]', (text) => {
    const tape = tapeInXY(text);
    const estimator = estimatorOf(tape)!;
    const encloser = new Encloser(tape);
    const random = seedrandom(text);
    const out = I.interval();
    let told = 0;
    for (let k = 0; k < 4000; k++) {
      const grid = random() < 0.3;
      const point = [0, 1].map(() => {
        const x = -3 + 6 * random();
        return grid ? Math.round(x * 4) / 4 : x;
      });
      estimator.estimate(point);
      encloser.densityAtPoint(point, out);
      const { value, error } = estimator;
      if (!(error < Infinity)) continue;
      told++;
      // Both hold the real value, so they must meet.
      expect(value - error <= out.hi && value + error >= out.lo).toBe(true);
    }
    expect(told).toBeGreaterThan(1500);
  });

  // 0.1 + 0.2 − 0.3 is 2^-54 in doubles' real values and 2^-54 · 2 in doubles' arithmetic.
  test('knows what rounding hides: a bound smaller than that error would fail [law]', () => {
    const estimator = estimatorOf(tapeInXY('0.1+x-0.3'))!;
    estimator.estimate([0.2, 0]);
    expect(estimator.value).toBe(2 ** -54);
    expect(estimator.error).toBeGreaterThan(2 ** -55);
    expect(estimator.error).toBeLessThan(1e-15);
  });

  test.each(TRUTHS)('settles %s as its enclosure does [law]', (text) => {
    const tape = tapeInXY(text);
    const estimator = estimatorOf(tape)!;
    const encloser = new Encloser(tape);
    const random = seedrandom(text);
    const out = I.interval();
    let settled = 0;
    for (let k = 0; k < 4000; k++) {
      const point = [-3 + 6 * random(), -3 + 6 * random()];
      estimator.estimate(point);
      if (!(estimator.value === estimator.value)) continue;
      settled++;
      encloser.densityAtPoint(point, out);
      expect(estimator.value >= out.lo && estimator.value <= out.hi).toBe(true);
    }
    expect(settled).toBeGreaterThan(3900);
  });

  test('leaves a truth open where doubles cannot tell it [law]', () => {
    const estimator = estimatorOf(tapeInXY('x*3<=y'))!;
    estimator.estimate([0.1, 0.30000000000000004]);
    expect(estimator.value).toBeNaN();
  });

  test('is not made for functions without a rule [law]', () => {
    expect(estimatorOf(tapeInXY('SIN(x)'))).toBeNull();
  });
});
