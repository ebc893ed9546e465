import { evaluator } from '../../src/formula/evaluate';
import { tapeOf } from './formulas';

describe('evaluator(tape)', () => {
  test.each([
    ['MAX(0,x-1)', -2, 0],
    ['MAX(0,x-1)', 3, 2],
    ['MIN(0,x-1)', 3, 0],
    ['MIN(5,x)', 3, 3],
    ['MAX(1,x,2)', -4, 2],
  ])('%s at %d is %d: the operands alone count [law]', (text, x, wanted) => {
    expect(evaluator(tapeOf(text))(x)).toBe(wanted);
  });
});
