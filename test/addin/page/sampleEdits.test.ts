/**
 * The sample workbook edited without a page: an edit recalculates what depends on it and
 * nothing else, and a mistake is told where it is used.
 */
import { prepareLibrary } from '../../../addin/page/library';
import { sampleWorkbook } from '../../../addin/page/sample/workbook';
import { call } from '../call';
import { column, gridOf, one } from './grid';
import type { Grid } from './grid';
import {
  apples,
  APPLES,
  APPLE_DRAWS,
  COLD,
  COLD_DAYS,
  COLD_DRAWS,
  DELIVERIES,
  DOWNTIME,
  EVENTS,
  EVENT_SIZE,
  INPUTS,
  JUDGED_DRAWS,
  LINKED_PRICE,
  LINKS,
  MARGINS,
  OVERFLOWS,
  PLANS,
  PRESSES,
  PRICE,
  SCENARIOS,
  SEASON,
  SUGAR,
  WAITING,
  WAITING_DRAWS,
} from './sampleCells';
import { sampleSheets } from './sampleSheets';

const log = prepareLibrary();
/** Sheets that need none of the others: soon made afresh. */
const firstSheets = (): Grid => gridOf(sampleSheets('Shapes', 'Draws', 'Acceptance'), log);

describe('an edit of the sample', () => {
  const shared = gridOf(sampleWorkbook(), log);
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
    ['what the store holds', 'Decision', 'B13', '650', [...MARGINS, ...OVERFLOWS]],
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
      '#DIV/0! Formula: it divides by 0; give a divisor other than 0. (from Shapes!E14)',
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
