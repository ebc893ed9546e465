import type { Cell, Range } from '../../src/index';
import { exceedance } from '../../src/index';
import { chanceOf } from '../../src/evidence/chance';
import { chanceInterval, clopperPearson, wilson } from '../../src/evidence/proportion';
import { rowsWorth, sharesOf } from '../../src/evidence/weights';
import { jackknife, skewed, uniform } from '../evidence/samples';
import { columnOf } from './shapes';

const at = (spill: Range, item: string, column = 1): Cell => {
  const row = spill.find(([name]) => name === item);
  if (row === undefined) throw new Error(`no ${item}`);
  return row[column]!;
};

describe('exceedance', () => {
  const HARVEST: Range = [['harvest'], [31], [28], [40], [35], [30]];

  it('lists above, equal and below with their intervals [law]', () => {
    const spill = exceedance(HARVEST, [[35]], null, null);
    expect(spill.map(([item]) => item)).toEqual([
      ...['column', 'rows', "rows' worth", 'zeros at the end', 'threshold'],
      ...['chance above', 'chance above, 95 % interval from', 'chance above, 95 % interval to'],
      ...['chance equal', 'chance equal, 95 % interval from', 'chance equal, 95 % interval to'],
      ...['chance below', 'chance below, 95 % interval from', 'chance below, 95 % interval to'],
      'note',
    ]);
    expect([at(spill, 'column'), at(spill, 'threshold'), at(spill, 'rows')]).toEqual([
      'harvest',
      35,
      5,
    ]);
    expect(['above', 'equal', 'below'].map((side) => at(spill, `chance ${side}`))).toEqual([
      0.2, 0.2, 0.6,
    ]);
  });

  it('has exact intervals for few rows and Wilson’s for many [law]', () => {
    const values = columnOf(Array.from({ length: 1000 }, (_, i) => i));
    for (const [above, interval] of [
      [29, clopperPearson],
      [30, wilson],
      [500, wilson],
      [971, clopperPearson],
    ] as const) {
      const spill = exceedance(values, [[999.5 - above]], [[0.9]], null);
      const { lo, hi } = interval(above, 1000, 0.9);
      expect(at(spill, 'chance above')).toBe(above / 1000);
      expect(at(spill, 'chance above, 90 % interval from')).toBe(lo);
      expect(at(spill, 'chance above, 90 % interval to')).toBe(hi);
    }
  });

  it('without threshold is the chance of TRUE, a blank for FALSE [law]', () => {
    const overrun: Range = [['overrun'], [true], [false], [null], [true], [false]];
    const spill = exceedance(overrun, null, null, null);
    expect(at(spill, 'chance of TRUE')).toBe(0.4);
    expect(at(spill, 'column')).toBe('overrun');
    // FALSE at the end is an answer; blanks there are counted.
    expect(at(spill, 'zeros at the end')).toBe(0);
    const more = exceedance([...overrun, [null], [0]], null, null, null);
    expect(at(more, 'zeros at the end')).toBe(2);
    expect(at(more, 'rows')).toBe(7);
    expect(at(more, 'note')).toMatch(/^the last 2 rows are 0 or blank/);
    // A blank threshold arrives as 0 on some hosts.
    expect(exceedance(overrun, [[0]], null, null)).toEqual(spill);
    expect(exceedance(overrun, [[null]], null, null)).toEqual(spill);
  });

  it('gives each column what it gives alone [law]', () => {
    const [a, b] = [skewed(300, 'a'), uniform(300, 'b')];
    const both = exceedance(
      [['a', 'b'], ...Array.from(a, (x, i) => [x, b[i]!])],
      [[0.5]],
      null,
      null,
    );
    [a, b].forEach((own, j) => {
      const alone = exceedance(columnOf(own), [[0.5]], null, null);
      alone
        .slice(1)
        .forEach(([item, value]) => expect(at(both, item as string, j + 1)).toBe(value));
    });
    expect(both[0]).toEqual(['column', 'a', 'b']);
  });

  it('takes a single value [law]', () => {
    const spill = exceedance([[5]], [[3]], null, null);
    expect(at(spill, 'chance above')).toBe(1);
    expect(at(spill, 'chance above, 95 % interval from')).toBeCloseTo(0.025, 12);
  });

  it('has weighted chances that add up to 1 [law]', () => {
    const values = uniform(500, 'sum').map((u) => Math.floor(5 * u));
    const weights = columnOf(skewed(500, 'sum weights'));
    const spill = exceedance(columnOf(values), [[2]], null, weights);
    const chances = ['above', 'equal', 'below'].map(
      (side) => at(spill, `chance ${side}`) as number,
    );
    expect(chances.reduce((a, b) => a + b)).toBeCloseTo(1, 14);
  });
});

describe('chanceOf', () => {
  const n = 300;
  const values = skewed(n, 'chance');
  const isTrue = (i: number): boolean => values[i]! > 1;

  it('has as many effective rows as give the error of the jackknife [law]', () => {
    const weights = values.map((value) => 0.2 + value);
    const shares = sharesOf(weights);
    const { chance, interval } = chanceOf(isTrue, n, shares, 0.95);
    const error = jackknife(values, weights, (own, w) => {
      const [counted, all] = [own.map((v, i) => (v > 1 ? w![i]! : 0)), w!];
      const sum = (of: Float64Array): number => of.reduce((a, b) => a + b, 0);
      return sum(counted) / sum(all);
    });
    const worth = (chance * (1 - chance)) / error ** 2;
    const by = chanceInterval(chance * worth, worth, 0.95);
    // The jackknife's own error has the factor (n − 1)/n, and replicates vary about their own mean.
    expect(Math.abs((interval.hi - interval.lo) / (by.hi - by.lo) - 1)).toBeLessThan(2 / n);
  });

  it('with none or all TRUE has as many as Kish (1965) [law]', () => {
    const shares = sharesOf(values)!;
    const worth = rowsWorth(shares, n);
    expect(chanceOf(() => false, n, shares, 0.95)).toEqual({
      chance: 0,
      interval: clopperPearson(0, worth, 0.95),
    });
    expect(chanceOf(() => true, n, shares, 0.95)).toEqual({
      chance: 1,
      interval: clopperPearson(worth, worth, 0.95),
    });
  });

  it('never has more than the rows that count [law]', () => {
    // Rows that are TRUE are over-represented a hundredfold and weigh the less.
    const weights = values.map((_, i) => (isTrue(i) ? 0.01 : 1));
    const { chance, interval } = chanceOf(isTrue, n, sharesOf(weights), 0.95);
    expect(interval).toEqual(chanceInterval(chance * n, n, 0.95));
  });
});
