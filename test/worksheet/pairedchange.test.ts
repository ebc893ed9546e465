import type { Cell, Range } from '../../src/index';
import { pairedChange, summary } from '../../src/index';
import { correlation } from '../draw/statistics';
import { skewed, uniform } from '../evidence/samples';
import { columnOf } from './shapes';

const at = (spill: Range, item: string): Cell => {
  const row = spill.find(([name]) => name === item);
  if (row === undefined) throw new Error(`no ${item}`);
  return row[1]!;
};

describe('pairedChange', () => {
  const n = 500;
  const before = skewed(n, 'before');
  const after = before.map((value, i) => value + 0.3 * uniform(n, 'change')[i]! - 0.1);
  const spill = pairedChange([['two presses'], ...columnOf(before)], columnOf(after), null);

  // Student (1908), "The probable error of a mean", Biometrika 6: hours of sleep gained by ten
  // patients with two drugs; t = 4.0621, 95 % interval 0.7001142 to 2.4598858 as R gives it (from memory).
  it('pairedChange(hours of sleep) has the published interval [published]', () => {
    const first = [0.7, -1.6, -0.2, -1.2, -0.1, 3.4, 3.7, 0.8, 0, 2];
    const second = [1.9, 0.8, 1.1, 0.1, -0.1, 4.4, 5.5, 1.6, 4.6, 3.4];
    const sleep = pairedChange(columnOf(first), columnOf(second), null);
    expect(at(sleep, 'mean change')).toBeCloseTo(1.58, 13);
    const from = at(sleep, 'mean change, 95 % interval from') as number;
    const to = at(sleep, 'mean change, 95 % interval to') as number;
    expect(Math.abs(from - 0.7001142)).toBeLessThanOrEqual(5e-8);
    expect(Math.abs(to - 2.4598858)).toBeLessThanOrEqual(5e-8);
    expect(at(sleep, 'share of rows that rise')).toBe(0.9);
    expect(at(sleep, 'share of rows that fall')).toBe(0);
  });

  it('is SUMMARY of the differences [law]', () => {
    const differences = columnOf(after.map((value, i) => value - before[i]!));
    const own = summary(differences, null, null, null).find(([item]) => item === 'mean')!;
    const items = [
      'mean change',
      'mean change, 95 % interval from',
      'mean change, 95 % interval to',
    ];
    items.forEach((item, i) => expect(at(spill, item)).toBeCloseTo(own[i + 1] as number, 12));
  });

  // Var(a − b) = Var a + Var b − 2 r √(Var a Var b): pairing saves the last term.
  it('tells what pairing saved by the correlation [law]', () => {
    const figure = (values: Float64Array): number =>
      summary(columnOf(values), null, null, null).find(
        ([item]) => item === 'standard deviation',
      )![1] as number;
    const [a, b] = [figure(after), figure(before)];
    const apart = a * a + b * b;
    const paired = apart - 2 * correlation(after, before) * a * b;
    const saved = at(spill, 'variance without pairing, times that with pairing') as number;
    expect(saved / (apart / paired)).toBeCloseTo(1, 10);
    expect(saved).toBeGreaterThan(100);
    expect(at(spill, 'rows that an unpaired comparison would need')).toBeCloseTo(saved * n, 8);
  });

  it('of columns that have nothing to do with each other saves nothing, but for chance [law]', () => {
    const apart = pairedChange(columnOf(before), columnOf(skewed(n, 'other')), null);
    // 1/(1 − r) with r within five of its standard errors 1/√500.
    const saved = at(apart, 'variance without pairing, times that with pairing') as number;
    expect(saved).toBeGreaterThan(0.8);
    expect(saved).toBeLessThan(1.3);
  });

  it('turned around changes signs, and rows that rise fall [law]', () => {
    const back = pairedChange(columnOf(after), columnOf(before), null);
    expect(at(back, 'mean change')).toBe(-(at(spill, 'mean change') as number));
    expect(at(back, 'share of rows that fall')).toBe(at(spill, 'share of rows that rise'));
    expect(at(back, 'share of rows that rise')).toBe(at(spill, 'share of rows that fall'));
  });

  it('of a change that is always the same has nothing to save [law]', () => {
    const same = pairedChange([[1], [2], [5]], [[3], [4], [7]], null);
    expect(at(same, 'mean change')).toBe(2);
    expect(at(same, 'variance without pairing, times that with pairing')).toBe('unbounded');
    expect(at(same, 'note')).toBe(
      'all rows change alike: the interval cannot tell what others would',
    );
  });

  it('carries headings and counts zeros at the end of both [law]', () => {
    const both = pairedChange(
      [['two'], [1], [2], [0], [0]],
      [['three'], [2], [5], [1], [null]],
      null,
    );
    expect([at(both, 'before'), at(both, 'after'), at(both, 'zeros at the end')]).toEqual([
      'two',
      'three',
      1,
    ]);
    expect(at(spill, 'before')).toBe('two presses');
    expect(at(spill, 'after')).toBe('after');
  });
});
