/**
 * Sheets Season and Decision of the sample, evaluated without a page: every column is what the
 * functions give for its cells, and the scenarios' arithmetic is right row by row.
 */
import type { Range } from '../../../src/index';
import { prepareLibrary } from '../../../addin/page/library';
import { sampleWorkbook } from '../../../addin/page/sample/workbook';
import { call } from '../call';
import { gridOf, one, rectangle } from './grid';

const grid = gridOf(sampleWorkbook(), prepareLibrary());
const seed: Range = [['plan-2027']];
const N = 500;

const of = (columns: string[], first: number, last: number) =>
  rectangle(grid, 'Season', columns, first, last);
const numbers = (sheet: string, column: string): number[] =>
  rectangle(grid, sheet, [column], 9, 8 + N).map(([cell]) => Number(cell));

/** Rows as columns. */
const turned = (rows: Range): Range => rows[0]!.map((_, j) => rows.map((row) => row[j]!));

const farthest = (a: readonly number[], b: readonly number[]): number =>
  Math.max(...a.map((x, i) => Math.abs(x - b[i]!)));

describe('the sample, from links to a decision', () => {
  test('sampleWorkbook() links harvest and price where they are born [law]', () => {
    const shares = call('LINKEDSHARES', of(['A', 'B', 'C'], 9, 11), one(N), seed, one('link'));
    expect(grid.readSpill('Season', 'J9')).toEqual(shares);
    for (const [address, columns, j] of [
      ['L9', ['A', 'B'], 0],
      ['M9', ['D', 'E'], 1],
    ] as const) {
      const own = shares.map((row) => [row[j]!]);
      expect(grid.readSpill('Season', address)).toEqual(
        call('QUANTILE', of([...columns], 14, 18), null, own),
      );
    }
    // Six standard errors of about (1 − 0.36)/√500.
    const reached = call('RANKS', rectangle(grid, 'Season', ['L', 'M'], 9, 8 + N));
    expect(Math.abs(Number(reached[1]?.[2]) + 0.6)).toBeLessThan(0.18);
  });

  test('sampleWorkbook() draws the days in the cold store given the harvest of the row [law]', () => {
    const steps = numbers('Season', 'L').map((x) => [20 * Math.round(x / 20)]);
    const lines = [['harvest'], ...steps];
    expect(grid.readSpill('Season', 'N9')).toEqual(
      call('EACH', of(['A', 'B'], 22, 25), null, seed, one('days'), lines),
    );
  });

  test('sampleWorkbook() sums what events of spoilage take [law]', () => {
    const counts = call('DRAW', of(['A', 'B'], 41, 45), null, one(N), seed, one('events'));
    expect(grid.readSpill('Season', 'R9')).toEqual(counts);
    expect(grid.readSpill('Season', 'S8')).toEqual(
      call('TOTAL', counts, of(['D', 'E'], 41, 44), null, null, seed, one('spoilt')),
    );
  });

  test('sampleWorkbook() computes bottles and margin of each number of presses row by row [law]', () => {
    const spoilt = numbers('Season', 'S');
    const delivered = numbers('Season', 'L').map((harvest, i) => Math.max(0, harvest - spoilt[i]!));
    const [price, days] = [numbers('Season', 'M'), numbers('Season', 'N')];
    for (const [presses, taken, bottled, margin] of [
      [2, 'O', 'P', 'V'],
      [3, 'P', 'Q', 'W'],
      [4, 'Q', 'R', 'X'],
    ] as const) {
      const bottles = numbers('Season', taken).map(
        (most, i) => 0.87 * Math.min(most, delivered[i]!),
      );
      const margins = bottles.map((own, i) => {
        const costs = 0.15 * Math.max(0, own - 760) + 28 * presses + 0.4 * days[i]!;
        return own * (price[i]! - 0.32) - costs;
      });
      // Both compute the same sums of numbers below 2,000 in another order.
      expect(farthest(numbers('Decision', bottled), bottles)).toBeLessThan(1e-9);
      expect(farthest(numbers('Decision', margin), margins)).toBeLessThan(1e-9);
    }
  });

  test('sampleWorkbook() tells the chance of too many bottles and the case to choose [law]', () => {
    const names = ['2 presses', '3 presses', '4 presses'];
    const columns = (letters: string[]): Range => [
      names,
      ...rectangle(grid, 'Decision', letters, 9, 8 + N),
    ];
    expect(grid.readSpill('Decision', 'A36')).toEqual(
      call('EXCEEDANCE', columns(['P', 'Q', 'R']), one(760)),
    );
    const best = call('BESTOF', columns(['V', 'W', 'X']), [[true]]);
    const shown = grid.readSpill('Decision', 'A21');
    expect(shown).toEqual(turned(best));
    const figure = (item: string, table: Range = best): number =>
      Number(table[2]![table[0]!.indexOf(item)]);
    const [mean, from, to] = ['mean', 'mean, 95 % interval from', 'mean, 95 % interval to'].map(
      (item) => figure(item).toFixed(1),
    );
    const percent = (share: number): string => `${Math.round(100 * share)}%`;
    expect(grid.read('Decision', 'A6')).toBe(
      `3 presses: the largest mean margin, ${mean} thousand euros (95 % interval ${from} to ${to}), ` +
        `the best in ${percent(figure('chance to be best'))} of the scenarios`,
    );
    const chances = turned(grid.readSpill('Decision', 'A36'));
    const [above, least, most] = ['', ', 95 % interval from', ', 95 % interval to'].map((end) =>
      percent(figure(`chance above${end}`, chances)),
    );
    expect(grid.read('Decision', 'A7')).toBe(
      `3 presses: more bottles than the store holds with a chance of ${above} (95 % interval ${least} to ${most})`,
    );
    // Two presses leave apples behind, four cost more than they bring.
    expect(shown.find(([item]) => item === 'place')).toEqual(['place', 3, 1, 2]);
  });

  test('sampleWorkbook() ranks what moves the margin of three presses [law]', () => {
    const letters = ['L', 'M', 'N', 'P', 'S'];
    const inputs = [
      ['harvest', 'price', 'days stored', 'presses take', 'spoilt'],
      ...rectangle(grid, 'Season', letters, 9, 8 + N),
    ];
    const margin = rectangle(grid, 'Decision', ['W'], 9, 8 + N);
    const drivers = call('DRIVERS', inputs, margin);
    // A blank of ours spills as an empty text.
    expect(grid.readSpill('Decision', 'F21')).toEqual(
      turned(drivers.map((row) => row.map((cell) => cell ?? ''))),
    );
    const share = Number(drivers[1]?.[drivers[0]!.indexOf('share of variance')]);
    expect(grid.read('Decision', 'A8')).toBe(
      `3 presses: what moves the margin most is price, ${Math.round(100 * share)}% of its variance`,
    );
  });

  test('sampleWorkbook() finds no sign against the linked harvest [law]', () => {
    expect(grid.read('Decision', 'F32')).toMatch(/^no sign against the shape/);
    expect(grid.read('Decision', 'A9')).toBe(
      `the harvest as drawn: ${grid.read('Decision', 'F32')}`,
    );
  });
});
