import type { Cell, Range } from '../../src/index';
import { draw, rowsNeeded, summary } from '../../src/index';
import { columnOf } from './shapes';

const at = (spill: Range, item: string): Cell => {
  const row = spill.find(([name]) => name === item);
  if (row === undefined) throw new Error(`no ${item}`);
  return row[1]!;
};
const harvest = (rows: number, label: string): Range =>
  draw([['x^2*EXP(-x/10)']], [[0, 200]], [[rows]], [['plan-2027']], [[label]], []);
/** Half the width of the interval of a figure of SUMMARY. */
const halfwidth = (values: Range, share: number, item: string): number => {
  const row = summary(values, [[share]], null, null).find(([name]) => name === item)!;
  return ((row[3] as number) - (row[2] as number)) / 2;
};

describe('rowsNeeded', () => {
  const first = harvest(2000, 'first');

  // z(.975) s / h squared is 1536.6 for s/h = 20, A&S 26.2; t adds two rows: t(1537) = 1.96150, and
  // (1.96150 · 20)² = 1539.0.
  it('rowsNeeded(s = 1, halfwidth 0.05) is 1540, the least with t s / √n ≤ 0.05 [law]', () => {
    const values = columnOf([-1, 1].map((value) => value * Math.SQRT1_2));
    expect(at(rowsNeeded(values, null, [[0.05]], null), 'rows needed')).toBe(1540);
  });

  it('for the mean is what makes the interval of SUMMARY as narrow [law]', () => {
    const rows = at(rowsNeeded(first, null, [[0.5]], null), 'rows needed') as number;
    // Four standard errors of a deviation of about 17 from that many rows, and from 2,000: 6 %.
    const half = halfwidth(harvest(rows, 'second'), 0.5, 'mean');
    expect(half / 0.5).toBeGreaterThan(0.94);
    expect(half / 0.5).toBeLessThan(1.06);
  });

  it.each([0.1, 0.5, 0.95])('for P%d is about what makes its interval as narrow [law]', (share) => {
    const spill = rowsNeeded(first, [[share]], [[2]], null);
    const rows = at(spill, 'rows needed') as number;
    expect(at(spill, 'rows needed, 95 % interval from')).toBeLessThan(rows);
    expect(at(spill, 'rows needed, 95 % interval to')).toBeGreaterThan(rows);
    const item = at(spill, 'of') as string;
    const halves = Array.from({ length: 20 }, (_, i) =>
      halfwidth(harvest(rows, `again ${i}`), share, item),
    );
    const mean = halves.reduce((a, b) => a + b) / 20;
    // Judged by 30 rows or more, which leaves a fifth of the half-width; the side on which rows lie
    // less dense decides, so both sides together may be a third narrower.
    expect(mean / 2).toBeGreaterThan(0.5);
    expect(mean / 2).toBeLessThan(1.25);
  });

  it('falls with the square of the halfwidth [law]', () => {
    for (const share of [null, [[0.9]]]) {
      const rows = [2, 1, 0.5].map((half) =>
        at(rowsNeeded(first, share, [[half]], null), 'rows needed'),
      );
      const [a, b, c] = rows as number[];
      expect(b! / a!).toBeGreaterThan(3);
      expect(b! / a!).toBeLessThan(5);
      expect(c! / b!).toBeGreaterThan(3);
      expect(c! / b!).toBeLessThan(5);
    }
  });

  it('is never below the rows that an interval takes at all, 6 for the median [law]', () => {
    expect(at(rowsNeeded(first, [[0.5]], [[1e6]], null), 'rows needed')).toBe(6);
  });

  it('says when it has to look farther than the halfwidth, or has nothing to go by [law]', () => {
    const spill = rowsNeeded(first, [[0.99]], [[1]], null);
    expect(at(spill, 'note')).toMatch(
      /^fewer than 30 rows lie within the halfwidth on one side: judged by \d+ within [\d.]+$/,
    );
    expect(at(spill, 'rows needed')).toBeGreaterThan(10_000);
    const bottom = rowsNeeded(columnOf([5, 5, 5, 9]), [[0.1]], [[1]], null);
    expect(at(bottom, 'rows needed')).toBe('unbounded');
  });

  it('says when a column cannot hold so many [law]', () => {
    const spill = rowsNeeded(first, null, [[0.001]], null);
    expect(at(spill, 'note')).toBe('a column holds 1048575 rows');
  });

  it('tells what is, too [law]', () => {
    const spill = rowsNeeded([['harvest'], ...first, [0]], null, [[0.5]], [[0.9]]);
    expect(spill.map(([item]) => item)).toEqual([
      ...['of', 'value now', 'rows now', 'zeros at the end', 'halfwidth now', 'halfwidth wanted'],
      ...[
        'rows needed',
        'rows needed, 90 % interval from',
        'rows needed, 90 % interval to',
        'note',
      ],
    ]);
    expect([at(spill, 'of'), at(spill, 'rows now'), at(spill, 'zeros at the end')]).toEqual([
      'mean',
      2001,
      1,
    ]);
    expect(at(rowsNeeded(first, null, [[0.5]], null), 'halfwidth now')).toBeCloseTo(
      halfwidth(first, 0.5, 'mean'),
      12,
    );
  });
});
