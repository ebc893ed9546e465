/**
 * The built local workbook in a real browser keeps what was edited: over a reload, in a saved
 * copy, and until it is told to start over.
 */
import { readFileSync } from 'node:fs';
import type { Page } from 'playwright-core';
import { sampleSheets } from '../addin/page/sampleSheets';
import { KEPT, openCopy, read, shown, spill, type, workbooks } from './workbook';

const workbook = workbooks();
const DRAWS = { kept: sampleSheets('Shapes', 'Draws') };

describe('what was edited', () => {
  const keptEdit = async (page: Page) => {
    await type(page, 'Shapes!E14', '6.5');
    await page.waitForFunction(() => localStorage.length > 0);
    expect(await page.evaluate(() => Object.keys(localStorage))).toEqual([KEPT]);
  };

  test('an edit survives a reload, and starting over brings the sample back [law]', async () => {
    const page = await workbook.open();
    const sample = await spill(page, 'Draws', 'C8');
    await keptEdit(page);
    const edited = await spill(page, 'Draws', 'C8');
    await page.reload();
    await shown(page);
    expect(await spill(page, 'Draws', 'C8')).toEqual(edited);
    await page.getByRole('button', { name: 'Start over' }).click();
    await page.getByRole('dialog').getByRole('button', { name: 'Start over' }).click();
    await page.waitForFunction(() => window.undercurveWorkbook.read('Shapes', 'E14') === 4);
    expect(await spill(page, 'Draws', 'C8')).toEqual(sample);
    await page.reload();
    await shown(page);
    expect(await read(page, 'Shapes', 'E14')).toBe(4);
  });

  test('an edit just before a reload is kept, one just before starting over is not [law]', async () => {
    const page = await workbook.open(DRAWS);
    await type(page, 'Shapes!E14', '6.5');
    await page.reload();
    await shown(page);
    expect(await read(page, 'Shapes', 'E14')).toBe(6.5);
    await type(page, 'Shapes!E14', '7');
    await page.getByRole('button', { name: 'Start over' }).click();
    await page.getByRole('dialog').getByRole('button', { name: 'Start over' }).click();
    await page.waitForFunction(() => window.undercurveWorkbook.read('Shapes', 'E14') === 4);
    await page.reload();
    await shown(page);
    expect(await read(page, 'Shapes', 'E14')).toBe(4);
  });

  test.each(['{"sheets":[', '{"sheets":[null]}'])(
    'kept edits that cannot be read (%s) give way to the sample [law]',
    async (kept) => {
      const page = await workbook.open({ kept });
      expect(await read(page, 'Shapes', 'E14')).toBe(4);
    },
  );

  test('a saved copy opens again with its edits; another file is refused by name [law]', async () => {
    const page = await workbook.open(DRAWS);
    await keptEdit(page);
    const [download] = await Promise.all([
      page.waitForEvent('download'),
      page.getByRole('button', { name: 'Save a copy' }).click(),
    ]);
    const copy = readFileSync(await download.path(), 'utf8');
    await type(page, 'Shapes!E14', '7');
    await openCopy(page, 'copy.json', copy);
    await page.waitForFunction(() => window.undercurveWorkbook.read('Shapes', 'E14') === 6.5);
    await openCopy(page, 'copy.json', '{}');
    await expect(page.getByRole('alert').innerText()).resolves.toBe(
      'File: "copy.json" is not a workbook saved here; choose one made with "Save a copy".',
    );
  });
});
