/**
 * The sample workbook evaluated without a page: no cell fails, what it shows is what
 * the functions give, and an edit recalculates only what depends on it.
 */
import type { Range } from '../../../src/index';
import { prepareLibrary } from '../../../addin/page/library';
import { problemsIn, sheetAddressOf } from '../../../addin/page/message';
import { sampleWorkbook } from '../../../addin/page/sample/workbook';
import { call } from '../call';
import { type Grid, gridOf } from './grid';

const log = prepareLibrary();
const sample = (): Grid => gridOf(sampleWorkbook(), log);
/** Shapes, Draws and Acceptance, which need none of the other sheets: soon made afresh. */
const firstSheets = (): Grid => {
  const whole = sampleWorkbook() as { readonly sheets: readonly object[] };
  return gridOf({ ...whole, sheets: whole.sheets.slice(0, 3) }, log);
};

/** The cells that call our functions, by what they depend on. */
const cells = (sheet: string, ...addresses: string[]) =>
  addresses.map((each) => `${sheet}!${each}`);
const APPLE_DRAWS = ['Acceptance!A20', 'Draws!B8'];
const APPLES = [
  ...APPLE_DRAWS,
  ...cells('Acceptance', 'G19', 'Y19'),
  ...cells('Answers', 'B24', 'B25', 'B27', 'B30'),
];
const DOWNTIME = [
  'Draws!C8',
  ...cells('Acceptance', 'AH19', 'D20', 'P19'),
  ...cells('Answers', 'A42', 'C24', 'C25', 'C27', 'C30'),
];
const COLD_DRAWS = ['Answers!J21'];
const COLD = [...COLD_DRAWS, ...cells('Answers', 'D24', 'D25', 'D27', 'D30')];
const WAITING_DRAWS = ['Answers!K21'];
const WAITING = [...WAITING_DRAWS, ...cells('Answers', 'B36', 'E24', 'E25', 'E27', 'E30')];
const PRICE = cells('Judgement', 'A27', 'P20', 'U19');
const DELIVERIES = cells('Judgement', 'D28', 'Q20', 'AA19');
const SUGAR = cells('Judgement', 'H19', 'R20', 'AG19');
const SEASON = cells('Judgement', 'K37', 'S20', 'AM19');
const JUDGED_DRAWS = cells('Judgement', 'P20', 'Q20', 'R20', 'S20');
const INPUTS = ['Inputs!L9'];
const PLANS = cells('Plans', 'A28', 'D28', 'K6', 'N28');
const MARGINS = cells('Decision', 'A14', 'F40');
const OVERFLOWS = ['Decision!A28'];
const HARVEST_CHECK = ['Decision!F15'];
const LINKED_PRICE = ['Season!M9', ...MARGINS];
const COLD_DAYS = ['Season!N9', ...MARGINS];
const PRESSES = ['Season!O8', ...MARGINS, ...OVERFLOWS];
const EVENT_SIZE = ['Season!S8', ...MARGINS, ...OVERFLOWS];
const EVENTS = ['Season!R9', ...EVENT_SIZE];
const LINKS = [
  ...cells('Season', 'J9', 'L9', 'M9', 'N9'),
  ...[MARGINS, OVERFLOWS, HARVEST_CHECK].flat(),
];
const SCENARIOS = [...new Set([...LINKS, ...PRESSES, ...EVENTS])];
const ALL = [
  ...[APPLES, DOWNTIME, COLD, WAITING, PRICE, DELIVERIES, SUGAR, SEASON, INPUTS, PLANS].flat(),
  ...SCENARIOS,
];

const column = (grid: Grid, sheet: string, address: string) =>
  grid.readSpill(sheet, address).map(([cell]) => Number(cell));

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

/** A rectangle of any sheet, blanks as the functions get them. */
const block = (
  grid: Grid,
  sheet: string,
  columns: readonly string[],
  first: number,
  last: number,
) =>
  Array.from({ length: last - first + 1 }, (_, i) =>
    columns.map((each) => grid.read(sheet, `${each}${first + i}`)),
  );

describe('the sample, from judgement to answers', () => {
  const grid = sample();
  const seed = one('plan-2027');

  test('sampleWorkbook() shows the shapes that FROMPERCENTILES, FROMBINS, FROMDATA and BLEND make of its cells [law]', () => {
    const of = (columns: string[], first: number, last: number) =>
      block(grid, 'Judgement', columns, first, last);
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
    const list = block(grid, 'Inputs', ['A', 'B', 'C', 'D', 'E', 'F'], 8, 20);
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
      block(grid, 'Plans', columns, first, last);
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

describe('an edit of the sample', () => {
  const shared = sample();
  test.each([
    ['a point', 'Shapes', 'B17', '3', APPLES],
    ['a constant', 'Shapes', 'E14', '5', DOWNTIME],
    ['the formula', 'Shapes', 'E8', 'EXP(-ABS(x-m)/s)', DOWNTIME],
    ['the label of the apples', 'Draws', 'B6', 'fruit', APPLE_DRAWS],
    // The block holds seed and rows, so all of its functions read them; a table's bounds do not.
    [
      'the seed',
      'Draws',
      'B3',
      'other',
      [
        ...[APPLE_DRAWS, DOWNTIME, COLD_DRAWS, WAITING_DRAWS, JUDGED_DRAWS, INPUTS, PLANS].flat(),
        ...SCENARIOS,
      ],
    ],
    [
      'the rows',
      'Draws',
      'B4',
      '500',
      [...APPLE_DRAWS, ...DOWNTIME, ...COLD_DRAWS, ...WAITING_DRAWS],
    ],
    ['a percentile', 'Judgement', 'B21', '1.2', PRICE],
    ['the days of a bin', 'Judgement', 'E22', '40', DELIVERIES],
    ['a measured value', 'Judgement', 'G30', '101', SUGAR],
    ["an expert's constant", 'Judgement', 'L30', '70', SEASON],
    ['the belief in an expert', 'Judgement', 'L34', '0.8', SEASON],
    ['the end of one shape', 'Answers', 'E12', '4.5', COLD],
    ['the waiting', 'Answers', 'H11', '25', WAITING],
    ['a threshold', 'Answers', 'E23', '90', ['Answers!E24', 'Answers!E25']],
    ['what a wait costs', 'Answers', 'B35', 'x', ['Answers!B36']],
    ['a line of the inputs', 'Inputs', 'E9', '950', INPUTS],
    ['a link', 'Season', 'C10', '-0.3', LINKS],
    ['the shape of the price', 'Season', 'E17', '0.7', LINKED_PRICE],
    ['the days in the cold store', 'Season', 'B25', '30', COLD_DAYS],
    ['a number of presses', 'Season', 'D30', '5', PRESSES],
    ['how often something spoils', 'Season', 'B45', '3', EVENTS],
    ['how much spoils', 'Season', 'E44', '8', EVENT_SIZE],
    ['the rows of the season', 'Season', 'B5', '300', SCENARIOS],
    ['what the store holds', 'Decision', 'B7', '650', [...MARGINS, ...OVERFLOWS]],
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
    const grid = firstSheets();
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
    const grid = firstSheets();
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
    const grid = firstSheets();
    const before = column(grid, 'Draws', 'B8');
    grid.write('Draws', 'B3', 'other');
    expect(column(grid, 'Draws', 'B8')).not.toEqual(before);
    grid.write('Draws', 'B3', 'plan-2027');
    expect(column(grid, 'Draws', 'B8')).toEqual(before);
  });

  test('undoing an edit brings the draws back [law]', () => {
    const grid = firstSheets();
    const before = column(grid, 'Draws', 'B8');
    grid.write('Shapes', 'B17', '3');
    grid.model.dispatch('REQUEST_UNDO');
    expect(column(grid, 'Draws', 'B8')).toEqual(before);
  });
});

describe('a mistake in the sample', () => {
  test('a formula with an open bracket shows the whole message where it is used [law]', () => {
    const grid = firstSheets();
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
    const grid = firstSheets();
    grid.write('Shapes', 'E14', '=1/0');
    expect(grid.message('Draws', 'C8')).toBe(
      '#DIV/0! The divisor must be different from zero. (from Shapes!E14)',
    );
  });

  test('more rows than the sheet has say so instead of a part of the draws [law]', () => {
    const grid = firstSheets();
    grid.write('Draws', 'B4', '10001');
    expect(grid.message('Draws', 'B8')).toBe(
      '#SPILL! Result: it does not fit below or beside this cell; ask for fewer rows, or add rows to the sheet.',
    );
  });

  test('a value in the way of the draws says so [law]', () => {
    const grid = firstSheets();
    grid.write('Draws', 'B20', '1');
    expect(grid.message('Draws', 'B8')).toContain('a cell in its way is not empty');
  });
});
