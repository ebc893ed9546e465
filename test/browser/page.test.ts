/**
 * The built local workbook in a real browser: it draws, follows edits, and says what is wrong.
 */
import { readFileSync } from 'node:fs';
import type { Page } from 'playwright-core';
import { call } from '../addin/call';
import { sampleSheets } from '../addin/page/sampleSheets';
import { goTo, message, read, settled, shown, spill, type, workbooks } from './workbook';

const workbook = workbooks();
/** What is read and typed on these sheets alone needs no other. */
const DRAWS = { kept: sampleSheets('Shapes', 'Draws', 'Acceptance') };

const calls = (page: Page) => page.evaluate(() => window.undercurveWorkbook.calls());

/** The row of a table of items and values. */
const itemOf = (table: unknown[][], item: string) => table.find(([name]) => name === item)?.[1];

describe('the local workbook', () => {
  test('the local workbook opens with its sheets and a status that names the cell [law]', async () => {
    const page = await workbook.open();
    expect(await page.getByRole('navigation').getByRole('button').allInnerTexts()).toEqual([
      'Shapes',
      'Draws',
      'Acceptance',
      'Judgement',
      'Inputs',
      'Answers',
      'Plans',
      'Season',
      'Decision',
    ]);
    expect(await message(page)).toMatch(/^A1 Shapes: /);
  });

  test('the local workbook shows 2,000 draws a column: finite, in the limits, the same bits as in Node [law]', async () => {
    const page = await workbook.open(DRAWS);
    for (const [address, from, to] of [
      ['B8', 4, 48],
      ['C8', 0, 12],
    ] as const) {
      const draws = (await spill(page, 'Draws', address)).map(([x]) => Number(x));
      expect(draws).toHaveLength(2000);
      expect(draws.every((x) => Number.isFinite(x) && from <= x && x <= to)).toBe(true);
    }
    const block = await page.evaluate(() =>
      Array.from({ length: 8 }, (_, i) =>
        ['D', 'E'].map((column) => window.undercurveWorkbook.read('Shapes', `${column}${8 + i}`)),
      ),
    );
    expect(await spill(page, 'Draws', 'C8')).toEqual(call('DRAW', block));
  });

  test('typing a point changes its draws and evidence; the other column is not recalculated [law]', async () => {
    const page = await workbook.open();
    const before = {
      apples: await spill(page, 'Draws', 'B8'),
      downtime: await spill(page, 'Draws', 'C8'),
      acceptance: await spill(page, 'Acceptance', 'A20'),
      calls: await calls(page),
    };
    await type(page, 'Shapes!B17', '3');
    expect(await read(page, 'Shapes', 'B17')).toBe(3);
    expect(await spill(page, 'Draws', 'B8')).not.toEqual(before.apples);
    expect(await spill(page, 'Acceptance', 'A20')).not.toEqual(before.acceptance);
    expect(await spill(page, 'Draws', 'C8')).toEqual(before.downtime);
    const after = await calls(page);
    const called = Object.keys(after).filter((cell) => after[cell] !== before.calls[cell]);
    expect(called.sort()).toEqual([
      'Acceptance!A20',
      'Acceptance!G19',
      'Acceptance!Y19',
      'Answers!B24',
      'Answers!B25',
      'Answers!B27',
      'Answers!B30',
      'Draws!B8',
    ]);
    expect(await page.locator('.recalculated').innerText()).toMatch(/^8 formulas recalculated/);
  });

  test('typing another number of presses redraws its column, and the decision follows [law]', async () => {
    const page = await workbook.open();
    const before = {
      taken: await spill(page, 'Season', 'O8'),
      harvest: await spill(page, 'Season', 'L9'),
      best: await spill(page, 'Decision', 'A21'),
    };
    expect(before.taken[0]).toEqual(['2 presses', '3 presses', '4 presses']);
    await type(page, 'Season!D30', '5');
    const after = await spill(page, 'Season', 'O8');
    expect(after[0]).toEqual(['2 presses', '3 presses', '5 presses']);
    for (const [j, moves] of [false, false, true].entries()) {
      const rows = after.slice(1).filter((row, i) => row[j] !== before.taken[i + 1]?.[j]);
      expect(rows).toHaveLength(moves ? 500 : 0);
    }
    // The rows stay paired: a press more takes more in every scenario.
    const [four, five] = [before.taken, after].map((table) => table.map((row) => Number(row[2])));
    expect(four?.slice(1).filter((x, i) => !(x < (five?.[i + 1] ?? 0)))).toEqual([]);
    expect(await spill(page, 'Season', 'L9')).toEqual(before.harvest);
    const best = await spill(page, 'Decision', 'A21');
    expect(best[0]).toEqual(['case', '2 presses', '3 presses', '5 presses']);
    const means = [before.best, best].map((table) => itemOf(table, 'mean'));
    expect(means[1]).toBe(means[0]);
    expect(best[2]?.[3]).not.toBe(before.best[2]?.[3]);
  });

  test('typing another seed and number of rows redraws both columns with it [law]', async () => {
    const page = await workbook.open(DRAWS);
    const before = await spill(page, 'Draws', 'B8');
    await type(page, 'Draws!B4', '2500');
    const longer = await spill(page, 'Draws', 'B8');
    expect(longer).toHaveLength(2500);
    expect(longer.slice(0, 2000)).toEqual(before);
    expect(itemOf(await spill(page, 'Acceptance', 'D20'), 'rows')).toBe(2500);
    await type(page, 'Draws!B3', 'another plan');
    const others = await spill(page, 'Draws', 'B8');
    expect(others).toHaveLength(2500);
    expect(others.filter(([x], i) => x === longer[i]?.[0])).toEqual([]);
  });

  test('typing a broken formula shows the whole message and the way to the cell that fails [law]', async () => {
    const page = await workbook.open();
    await type(page, 'Shapes!E8', 'EXP(-0.5*((x-m)/s)^2');
    const text = 'Formula, character 4: "(" is never closed; add ")".';
    const shown = (await message(page)).replace(/\s+/g, ' ');
    expect(shown).toContain(`Draws!C8 #VALUE! ${text} (and 9 more)`);
    expect(readFileSync('README.md', 'utf8')).toContain(`Draws!C8 #VALUE! ${text} (and 9 more)`);
    await page.getByRole('status').getByRole('button').click();
    await settled(page);
    expect(await message(page)).toBe(`C8 #VALUE! ${text}`);
    expect(await page.locator('[aria-current]').innerText()).toBe('Draws');
  });

  test('asking for an address that is none says what would be right [law]', async () => {
    const page = await workbook.open(DRAWS);
    await goTo(page, 'here');
    await settled(page);
    expect(await message(page)).toBe(
      'Address: "here" is not a cell here; give one such as B8 or Draws!B8.',
    );
  });
});

describe('sheet Plans', () => {
  const PLANS = { kept: sampleSheets('Shapes', 'Draws', 'Plans') };

  test('fewer press hours leave the plans that need no more, drawn anew [law]', async () => {
    const page = await workbook.open(PLANS);
    const plans = async () => (await spill(page, 'Plans', 'A28')) as [number, number][];
    const hoursOf = ([early, late]: [number, number]) => 2 * early + 3 * late;
    const before = await plans();
    expect(before).toHaveLength(300);
    expect(before.some((plan) => hoursOf(plan) > 140)).toBe(true);
    await type(page, 'Plans!I8', '140');
    await shown(page);
    const after = await plans();
    expect(after).toHaveLength(300);
    expect(after.every((plan) => hoursOf(plan) <= 140)).toBe(true);
    expect(itemOf(await spill(page, 'Plans', 'K6'), 'given hours')).toBe(140);
  });

  test('conditions that no plan satisfies say so [law]', async () => {
    const page = await workbook.open(PLANS);
    await type(page, 'Plans!I8', '1');
    await shown(page);
    await goTo(page, 'Plans!A28');
    expect(await message(page)).toContain('no plan satisfies the conditions');
  });
});
