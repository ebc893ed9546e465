import seedrandom from 'seedrandom';
import { compile } from '../../src/formula/compile';
import { Encloser } from '../../src/formula/enclose';
import { evaluator } from '../../src/formula/evaluate';
import { guarded } from '../../src/formula/guard';
import { Defined } from '../../src/formula/operation';
import { parse } from '../../src/formula/parse';
import type { Tape } from '../../src/formula/tape';
import { randomGuarded } from '../envelope/randomGuarded';

const tapeOf = (text: string, names: readonly string[]): Tape =>
  compile([{ text, where: 'Formula', tree: parse(text, 'Formula') }], names, new Map());

function guardedOf(text: string, names: readonly string[] = ['x', 'y']): Tape {
  const made = guarded(tapeOf(text, names));
  if (made === null) throw new Error(`${text} is not guarded`);
  return made.tape;
}

const definedOver = (tape: Tape, lo: readonly number[], hi: readonly number[]): Defined =>
  new Encloser(tape).overBox(lo, hi, []).defined;

describe('guarded(tape)', () => {
  // 300 formulas at 100 points each; all are compared, so nothing is left to chance.
  test('has the value of the formula where the condition holds, and 0 elsewhere [law]', () => {
    let [inside, undefinedOutside] = [0, 0];
    for (let i = 0; i < 300; i++) {
      const random = seedrandom(`guard ${i}`);
      const { text, axes, margins, height } = randomGuarded(random);
      const names = axes.map(({ name }) => name);
      const made = guarded(tapeOf(text, names));
      expect(made?.isTold).toBe(true);
      const [at, plain] = [evaluator(made!.tape), evaluator(tapeOf(text, names))];
      for (let k = 0; k < 100; k++) {
        const x = axes.map(({ from, to }) => from + (to - from) * random());
        const holds = margins[0]!(x) > 1e-9;
        if (!holds && margins[0]!(x) > -1e-9) continue;
        const exact = holds ? height(x) : 0;
        expect(Math.abs(at(...x) - exact)).toBeLessThanOrEqual(1e-7 * Math.abs(exact) + 1e-12);
        if (holds) inside++;
        else if (!(plain(...x) === 0)) undefinedOutside++;
      }
    }
    expect(inside).toBeGreaterThan(5000);
    expect(undefinedOutside).toBeGreaterThan(2000);
  });

  test.each([
    ['(x>=y)*SQRT(x-y)'],
    ['IF(x>=y,SQRT(x-y),0)+1'],
    ['IF(x<y,1,SQRT(x-y))'],
    ['IF(NOT(AND(x>=y,y>=0)),0,SQRT(x-y)*SQRT(y))'],
    ['IF(OR(x<y,y<0),0,SQRT(x-y)*SQRT(y))'],
    ['AND(x^2+y^2<=1,x>-2)*SQRT(1-y*y-x*x)'],
    ['(3*x*y>=1)*SQRT(6*y*x-2)'],
    ['(x/4>=y/4)*SQRT(2*x-2*y)'],
    ['(x>=0)*(y>=0)*SQRT(x+y)'],
    ['(x+y<=2)*SQRT(LN(3-x-y))'],
    ['2*(x>=y)/(1+SQRT(x-y))'],
    ['(ABS(x-y)<=1)*SQRT(1-ABS(x-y))'],
    ['IF(x=y,SQRT(x-y),1)'],
    ['IF(x>=y,IF(y>=1,SQRT(y-1)*SQRT(x-y),2),3)'],
  ])('%s is defined all over a box on the boundary of its condition [law]', (text) => {
    const box = [
      [-3, -3],
      [3, 3],
    ] as const;
    expect(definedOver(tapeOf(text, ['x', 'y']), ...box)).not.toBe(Defined.Everywhere);
    expect(definedOver(guardedOf(text), ...box)).toBe(Defined.Everywhere);
  });

  test.each([
    ['(x>=y)*SQRT(x-y-0.001)'],
    ['(x>=y)*SQRT(y-x)'],
    ['(x>=y)*SQRT(x-2*y)'],
    ['(x>=y)*SQRT(x^2-y^2)'],
    ['IF(x>=y,0,SQRT(x-y))'],
    ['OR(x>=y,x>1)*SQRT(x-y)'],
    ['IF(x>=y,SQRT(x-y),0)+SQRT(x-y)'],
  ])('%s stays undefined where its condition does not rule that out [law]', (text) => {
    const made = guarded(tapeOf(text, ['x', 'y']))?.tape ?? tapeOf(text, ['x', 'y']);
    expect(definedOver(made, [-3, -3], [3, 3])).not.toBe(Defined.Everywhere);
  });

  test.each([['SQRT(x-y)'], ['x^2+y^2'], ['MAX(x-y,0)*EXP(x)']])(
    '%s has no condition and stays as it is [law]',
    (text) => {
      expect(guarded(tapeOf(text, ['x', 'y']))).toBeNull();
    },
  );

  test('takes long sums, and leaves very many conditions as they are [law]', () => {
    const long = Array.from({ length: 600 }, (_, i) => `SQRT(x+${i})`).join('+');
    expect(definedOver(guardedOf(`(x>=0)*(${long})`, ['x']), [-1], [1])).toBe(Defined.Everywhere);
    const many = Array.from({ length: 230 }, (_, i) => `(x>=${i})*SQRT(x-${i})`).join('+');
    expect(guarded(tapeOf(many, ['x']))).toBeNull();
  });
});
