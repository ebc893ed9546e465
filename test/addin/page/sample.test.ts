/**
 * The sample workbook evaluated without a page: no cell fails, what it shows is what
 * the functions give, and an edit recalculates only what depends on it.
 */
import type { Range } from '../../../src/index';
import { catalogue } from '../../../addin/functions/catalogue';
import { prepareLibrary } from '../../../addin/page/library';
import { problemsIn, sheetAddressOf } from '../../../addin/page/message';
import { sampleWorkbook } from '../../../addin/page/sample/workbook';
import { type Grid, gridOf } from './grid';

const log = prepareLibrary();
const sample = (): Grid => gridOf(sampleWorkbook(), log);

const APPLES = ['Acceptance!A20', 'Acceptance!G19', 'Acceptance!Y19', 'Draws!B8'];
const DOWNTIME = ['Acceptance!AH19', 'Acceptance!D20', 'Acceptance!P19', 'Draws!C8'];

const column = (grid: Grid, sheet: string, address: string) =>
  grid.readSpill(sheet, address).map(([cell]) => Number(cell));

/** Calls a function of the catalogue directly. */
function call(name: string, ...args: (Range | null)[]): Range {
  const entry = catalogue.find((each) => each.name === name);
  if (entry === undefined) throw new Error(`no ${name}`);
  return entry.call(args);
}

/** The cells of a rectangle on sheet "Shapes", as a range. */
function shape(grid: Grid, columns: readonly string[], first: number, last: number): Range {
  return Array.from({ length: last - first + 1 }, (_, i) =>
    columns.map((each) => grid.read('Shapes', `${each}${first + i}`)),
  );
}
const apples = (grid: Grid) => shape(grid, ['A', 'B'], 8, 21);
const downtime = (grid: Grid) => shape(grid, ['D', 'E'], 8, 15);
const one = (value: string | number): Range => [[value]];

describe('sampleWorkbook()', () => {
  const grid = sample();

  test('sampleWorkbook() has no cell that fails [law]', () => {
    const { getters } = grid.model;
    expect(problemsIn(grid.model).map((each) => sheetAddressOf(getters, each))).toEqual([]);
  });

  test('sampleWorkbook() calls each of our functions once for each of its cells [law]', () => {
    expect(grid.calls()).toEqual(
      Object.fromEntries([...APPLES, ...DOWNTIME].map((cell) => [cell, 1])),
    );
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

describe('an edit of the sample', () => {
  const shared = sample();
  test.each([
    ['a point', 'Shapes', 'B17', '3', APPLES],
    ['a constant', 'Shapes', 'E14', '5', DOWNTIME],
    ['the formula', 'Shapes', 'E8', 'EXP(-ABS(x-m)/s)', DOWNTIME],
    ['the label of the apples', 'Draws', 'B6', 'fruit', ['Acceptance!A20', 'Draws!B8']],
    // The block holds seed and rows, so all of its functions read them; a table's bounds do not.
    ['the seed', 'Draws', 'B3', 'other', ['Acceptance!A20', ...DOWNTIME, 'Draws!B8']],
    ['the rows', 'Draws', 'B4', '500', ['Acceptance!A20', ...DOWNTIME, 'Draws!B8']],
    ['an unused cell', 'Shapes', 'J30', '1', []],
    ['the edge of a bin', 'Acceptance', 'AE30', '25', []],
  ])('editing %s recalculates what depends on it and nothing else [law]', (...edit) => {
    const [, sheet, address, text, expected] = edit;
    const before = shared.read(sheet, address);
    shared.recentCalls();
    shared.write(sheet, address, text);
    expect(shared.recentCalls()).toEqual([...expected].sort());
    shared.write(sheet, address, String(before ?? ''));
  });

  test('editing a point changes its draws and evidence and leaves the other column [law]', () => {
    const grid = sample();
    const before = {
      apples: column(grid, 'Draws', 'B8'),
      downtime: column(grid, 'Draws', 'C8'),
      acceptance: grid.readSpill('Acceptance', 'A20'),
    };
    grid.write('Shapes', 'B17', '3');
    expect(column(grid, 'Draws', 'B8')).not.toEqual(before.apples);
    expect(grid.readSpill('Acceptance', 'A20')).not.toEqual(before.acceptance);
    expect(column(grid, 'Draws', 'C8')).toEqual(before.downtime);
    const drawing = [apples(grid), null, one(2000), one('plan-2027'), one('apples')];
    expect(grid.readSpill('Acceptance', 'A20')).toEqual(call('ACCEPTANCE', ...drawing));
  });

  test('editing the number of rows keeps the rows that stay [law]', () => {
    const grid = sample();
    const before = column(grid, 'Draws', 'B8');
    grid.write('Draws', 'B4', '3000');
    expect(column(grid, 'Draws', 'B8').slice(0, 2000)).toEqual(before);
    expect(column(grid, 'Draws', 'B8')).toHaveLength(3000);
    grid.write('Draws', 'B4', '1');
    expect(column(grid, 'Draws', 'B8')).toEqual(before.slice(0, 1));
    expect(grid.read('Draws', 'F8')).toBe(before[0]);
    expect(grid.read('Draws', 'B9')).toBeNull();
  });

  test('editing the seed and back gives the same draws again [law]', () => {
    const grid = sample();
    const before = column(grid, 'Draws', 'B8');
    grid.write('Draws', 'B3', 'other');
    expect(column(grid, 'Draws', 'B8')).not.toEqual(before);
    grid.write('Draws', 'B3', 'plan-2027');
    expect(column(grid, 'Draws', 'B8')).toEqual(before);
  });

  test('undoing an edit brings the draws back [law]', () => {
    const grid = sample();
    const before = column(grid, 'Draws', 'B8');
    grid.write('Shapes', 'B17', '3');
    grid.model.dispatch('REQUEST_UNDO');
    expect(column(grid, 'Draws', 'B8')).toEqual(before);
  });
});

describe('a mistake in the sample', () => {
  test('a formula with an open bracket shows the whole message where it is used [law]', () => {
    const grid = sample();
    grid.write('Shapes', 'E8', 'EXP(-0.5*((x-m)/s)^2');
    const message = '#VALUE! Formula, character 4: "(" is never closed; add ")".';
    expect(grid.read('Draws', 'C8')).toBe('#VALUE!');
    for (const [sheet, address] of [
      ['Draws', 'C8'],
      ['Acceptance', 'D20'],
      ['Acceptance', 'P19'],
      ['Acceptance', 'AH19'],
    ] as const) {
      expect(grid.message(sheet, address)).toContain(message);
    }
    expect(grid.message('Draws', 'G8')).toBe(`${grid.message('Draws', 'C8')} (from Draws!C8)`);
    expect(grid.read('Draws', 'B8')).toEqual(expect.any(Number));
  });

  test('an error cell in the block comes back as that error, its origin named [law]', () => {
    const grid = sample();
    grid.write('Shapes', 'E14', '=1/0');
    expect(grid.message('Draws', 'C8')).toBe(
      '#DIV/0! The divisor must be different from zero. (from Shapes!E14)',
    );
  });

  test('more rows than the sheet has say so instead of a part of the draws [law]', () => {
    const grid = sample();
    grid.write('Draws', 'B4', '10001');
    expect(grid.message('Draws', 'B8')).toBe(
      '#SPILL! Result: it does not fit below or beside this cell; ask for fewer rows, or add rows to the sheet.',
    );
  });

  test('a value in the way of the draws says so [law]', () => {
    const grid = sample();
    grid.write('Draws', 'B20', '1');
    expect(grid.message('Draws', 'B8')).toContain('a cell in its way is not empty');
  });
});
