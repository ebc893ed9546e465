/**
 * The frame of the built local workbook in a real browser: by keyboard, narrow, dark and in
 * forced colours; and what the built page is made of.
 */
import { readFileSync } from 'node:fs';
import { textContrasts } from './contrast';
import { sampleSheets } from '../addin/page/sampleSheets';
import { settled, type, workbooks } from './workbook';

const workbook = workbooks();
const DRAWS = { kept: sampleSheets('Shapes', 'Draws') };

describe('the frame', () => {
  const FRAME = ['.masthead', '.frame-top', '.frame-bottom'].map((part) => `${part} *`).join();

  test('F6 moves between the parts of the page, all of which have a name [law]', async () => {
    const page = await workbook.open(DRAWS);
    const places: string[] = [];
    for (let i = 0; i < 4; i++) {
      await page.keyboard.press('F6');
      places.push(
        await page.evaluate(() => {
          const { activeElement: at } = document;
          return at?.getAttribute('aria-label') ?? at?.textContent ?? '';
        }),
      );
    }
    expect(places).toEqual([
      'Start over',
      'Shapes',
      'Cell address: type one and press Enter',
      'Grid: arrow keys move, typing edits, F6 leaves',
    ]);
  });

  test('the frame fits windows from 320 pixels wide on [law]', async () => {
    const page = await workbook.open();
    for (const width of [320, 400, 1280]) {
      await page.setViewportSize({ width, height: 640 });
      await settled(page);
      expect((await page.locator('.o-grid').boundingBox())?.height).toBeGreaterThan(200);
      expect(
        await page.evaluate(() => document.documentElement.scrollWidth <= window.innerWidth),
      ).toBe(true);
    }
  });

  test('the text of the frame has a contrast of at least 4.5 in light, dark and forced colours [law]', async () => {
    const page = await workbook.open();
    await type(page, 'Shapes!E8', 'EXP(');
    for (const [colorScheme, forcedColors] of [
      ['light', 'none'],
      ['dark', 'none'],
      ['light', 'active'],
    ] as const) {
      await page.emulateMedia({ colorScheme, forcedColors });
      await settled(page);
      const texts = await textContrasts(page, FRAME);
      expect(texts.filter(({ ratio }) => ratio < 4.5)).toEqual([]);
      // The negative control: no text reaches 22, the contrast of black on white is 21.
      expect(texts.filter(({ ratio }) => ratio < 22).length).toBeGreaterThan(8);
    }
  });
});

describe('the built page', () => {
  test('the link Functions leads to the start page of the functions [law]', async () => {
    const page = await workbook.open(DRAWS);
    await page.getByRole('link', { name: 'Functions' }).click();
    await page.waitForURL(`${workbook.url()}pane/`);
    expect(await page.getByRole('heading').first().innerText()).toContain('Undercurve');
  });

  test('the built page keeps the grid library in a bundle of its own, with its licence [law]', async () => {
    const licence = await fetch(`${workbook.url()}licenses/o-spreadsheet.txt`);
    expect(await licence.text()).toContain('GNU LESSER GENERAL PUBLIC LICENSE');
    const own = readFileSync('.build/page/page.js', 'utf8');
    const grid = readFileSync('.build/page/grid.js', 'utf8');
    expect(grid.includes('o-spreadsheet-GridOverlay')).toBe(true);
    expect(own.includes('o-spreadsheet-GridOverlay')).toBe(false);
  });
});
