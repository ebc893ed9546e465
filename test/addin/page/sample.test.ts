/**
 * The sample workbook evaluated without a page: no cell fails, and what it shows is what
 * the functions give. Nothing here edits it.
 */
import { prepareLibrary } from '../../../addin/page/library';
import { problemsIn, sheetAddressOf } from '../../../addin/page/message';
import { sampleWorkbook } from '../../../addin/page/sample/workbook';
import { call } from '../call';
import { column, gridOf, one, rectangle } from './grid';
import { ALL, apples, downtime } from './sampleCells';

const log = prepareLibrary();
const grid = gridOf(sampleWorkbook(), log);

describe('sampleWorkbook()', () => {
  test('sampleWorkbook() has no cell that fails [law]', () => {
    const { getters } = grid.model;
    expect(problemsIn(grid.model).map((each) => sheetAddressOf(getters, each))).toEqual([]);
  });

  test('sampleWorkbook() calls each of our functions once for each of its cells [law]', () => {
    expect(grid.calls()).toEqual(Object.fromEntries(ALL.map((cell) => [cell, 1])));
  });

  test('sampleWorkbook() shows 2,000 draws of each quantity, inside its limits [law]', () => {
    for (const [address, from, to] of [
      ['B8', 4, 48],
      ['C8', 0, 12],
    ] as const) {
      const draws = column(grid, 'Draws', address);
      expect(draws).toHaveLength(2000);
      expect(draws.every((x) => from <= x && x <= to)).toBe(true);
    }
  });

  test('sampleWorkbook() shows the draws that DRAW gives for its cells, bit for bit [law]', () => {
    const rows = one(2000);
    const seed = one('plan-2027');
    expect(grid.readSpill('Draws', 'B8')).toEqual(
      call('DRAW', apples(grid), null, rows, seed, one('apples')),
    );
    expect(grid.readSpill('Draws', 'C8')).toEqual(call('DRAW', downtime(grid)));
  });

  test('sampleWorkbook() shows the evidence that the functions give for its cells [law]', () => {
    const drawing = [apples(grid), null, one(2000), one('plan-2027'), one('apples')];
    for (const [address, expected] of [
      ['A20', call('ACCEPTANCE', ...drawing)],
      ['D20', call('ACCEPTANCE', downtime(grid))],
      ['G19', call('ENVELOPE', apples(grid))],
      ['P19', call('ENVELOPE', downtime(grid))],
      ['Y19', call('PROFILE', apples(grid), null, one(121))],
      ['AH19', call('PROFILE', downtime(grid), null, one(121))],
    ] as const) {
      expect(grid.readSpill('Acceptance', address)).toEqual(expected);
    }
  });

  test.each([
    ['apples', 'B8', 'AF20', (i: number) => 4 + 2 * i, 22],
    ['downtime', 'C8', 'AO20', (i: number) => i / 2, 24],
  ])('sampleWorkbook() counts every draw of %s in its bin [law]', (_, draws, counts, edge, n) => {
    const expected = Array.from({ length: n + 2 }, () => 0);
    for (const x of column(grid, 'Draws', draws)) {
      // The first edge that x does not pass; beyond the last edge, the last count.
      let bin = 0;
      while (bin <= n && x > edge(bin)) bin++;
      expected[bin] = (expected[bin] ?? 0) + 1;
    }
    expect(column(grid, 'Acceptance', counts)).toEqual(expected);
  });

  test('sampleWorkbook() survives being exported and opened again [law]', () => {
    const again = gridOf(grid.model.exportData(), log);
    expect(again.readSpill('Draws', 'B8')).toEqual(grid.readSpill('Draws', 'B8'));
    expect(again.read('Acceptance', 'A20')).toBe(grid.read('Acceptance', 'A20'));
  });
});

describe('the sample, from judgement to answers', () => {
  const seed = one('plan-2027');

  test('sampleWorkbook() shows the shapes that FROMPERCENTILES, FROMBINS, FROMDATA and BLEND make of its cells [law]', () => {
    const of = (columns: string[], first: number, last: number) =>
      rectangle(grid, 'Judgement', columns, first, last);
    for (const [address, expected] of [
      ['A27', call('FROMPERCENTILES', of(['A'], 20, 22), of(['B'], 20, 22), one(0.7), one(2.1))],
      ['D28', call('FROMBINS', of(['D'], 20, 26), of(['E'], 20, 25))],
      ['H19', call('FROMDATA', of(['G'], 20, 49))],
      ['K37', call('BLEND', of(['L'], 34, 35), of(['K', 'L'], 20, 24), of(['K', 'L'], 27, 31))],
    ] as const) {
      expect(grid.readSpill('Judgement', address)).toEqual(expected);
    }
  });

  test.each([
    ['P20', 'A27', 'price'],
    ['Q20', 'D28', 'deliveries'],
    ['R20', 'H19', 'sugar'],
    ['S20', 'K37', 'season'],
  ])(
    'sampleWorkbook() draws %s from the shape that spills from %s [law]',
    (...[to, from, label]) => {
      const shapeSpilt = grid.readSpill('Judgement', from);
      expect(grid.readSpill('Judgement', to)).toEqual(
        call('DRAW', shapeSpilt, null, one(1000), seed, one(label)),
      );
    },
  );

  test('sampleWorkbook() gives each judged percentile its share of the shape [law]', () => {
    const made = grid.readSpill('Judgement', 'A27');
    // Shares of straight lines: a few roundings of numbers near 1.
    for (const [level, value] of [
      [0.1, 0.92],
      [0.5, 1.1],
      [0.9, 1.46],
    ] as const) {
      expect(Number(call('BELOW', made, null, one(value))[0]?.[0])).toBeCloseTo(level, 12);
    }
  });

  test('sampleWorkbook() draws a dozen inputs with one formula, and its margin row by row [law]', () => {
    const list = rectangle(grid, 'Inputs', ['A', 'B', 'C', 'D', 'E', 'F'], 8, 20);
    const drawn = grid.readSpill('Inputs', 'L9');
    expect(drawn).toEqual(call('DRAW', list, null, one(1000), seed));
    expect(drawn[0]).toHaveLength(12);
    const margin = column(grid, 'Inputs', 'J9');
    expect(margin).toHaveLength(1000);
    drawn.forEach((row, i) => {
      const [harvest = 0, frost = 0, litres = 0, broken = 0, picking = 0, pressing = 0] =
        row.map(Number);
      const [power = 0, tariff = 0, bottle = 0, weeks = 0, storage = 0, price = 0] = row
        .slice(6)
        .map(Number);
      const bottles = (harvest * (1 - frost) * litres * (1 - broken)) / 750;
      const income = bottles * (price - bottle - (weeks * storage) / 1000);
      const costs = (harvest * (picking + pressing + power * tariff)) / 1000;
      expect(margin[i]).toBeCloseTo(income - costs, 8);
    });
    const losses = margin.filter((each) => each < 0).length / 1000;
    expect(grid.read('Inputs', 'B28')).toBe(losses);
  });

  test('sampleWorkbook() answers from the shapes what is known of them [law]', () => {
    const read = (address: string) => Number(grid.read('Answers', address));
    // Waiting: EXP(-x/18), so the share above t is EXP(-t/18), the median 18 LN 2, the mean 18.
    expect(read('E25')).toBeCloseTo(Math.exp(-60 / 18), 12);
    expect(read('E28')).toBeCloseTo(18 * Math.LN2, 9);
    expect(read('E30')).toBeCloseTo(18, 9);
    // Half an hour is free, then 1.4 a minute: 1.4 × 18 EXP(-30/18), between its bounds.
    expect(read('B37')).toBeCloseTo(1.4 * 18 * Math.exp(-30 / 18), 9);
    expect(read('C37')).toBeLessThanOrEqual(read('B37'));
    expect(read('D37')).toBeGreaterThanOrEqual(read('B37'));
    // Cold store: straight lines, cut at 5.5 degrees: 19.5 below 5 and 1.4375 from there to the cut.
    expect(read('D24')).toBeCloseTo(19.5 / 20.9375, 12);
    for (const each of ['B', 'C', 'D', 'E']) {
      expect(read(`${each}24`) + read(`${each}25`)).toBeCloseTo(1, 12);
      // 2,000 draws against the exact share: 6 standard deviations, false alarm 2e-9 a column.
      const share = read(`${each}25`);
      const allowed = 6 * Math.sqrt((share * (1 - share)) / 2000);
      expect(Math.abs(read(`${each}26`) - share)).toBeLessThan(allowed);
    }
  });

  test('sampleWorkbook() shows plans that keep to their conditions, and whole crates [law]', () => {
    const of = (columns: string[], first: number, last: number) =>
      rectangle(grid, 'Plans', columns, first, last);
    const drawing = [of(['D', 'E', 'F'], 6, 7), one(300), seed];
    const [limits, rows, own] = drawing;
    const givens = of(['H', 'I'], 6, 9);
    const plans = grid.readSpill('Plans', 'A28');
    expect(plans).toEqual(
      call('DRAW', of(['A'], 6, 9), limits!, rows!, own!, one('plans'), givens),
    );
    expect(grid.readSpill('Plans', 'D28')).toEqual(
      call('DRAW', of(['A'], 6, 10), limits!, rows!, own!, one('weighted plans'), givens),
    );
    plans.forEach(([early, late], i) => {
      const store = Number(grid.read('Plans', `C${28 + i}`));
      expect(Number(early) + Number(late) + store).toBeCloseTo(80, 9);
      expect(store >= -1e-9 && store <= 35 + 1e-9).toBe(true);
    });
    for (const [red, green, yellow] of grid.readSpill('Plans', 'N28')) {
      expect(Number(red) + Number(green) + Number(yellow)).toBe(24);
      expect(Number(red)).toBeGreaterThanOrEqual(2 * Number(yellow));
    }
  });

  test('sampleWorkbook() lists the proposals behind the draws, the last of each row kept [law]', () => {
    const [head, ...lines] = grid.readSpill('Answers', 'A42');
    expect(head).toEqual(['row', 'attempt', 'value', 'height drawn', 'density there', 'kept']);
    const kept = lines.filter((line) => line[5] === true);
    const drawn = column(grid, 'Draws', 'C8');
    expect(kept.map((line) => line[2])).toEqual(drawn.slice(128, 135));
    expect(lines.length).toBeGreaterThan(kept.length);
  });
});
