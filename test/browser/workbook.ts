/**
 * What the tests of the local workbook share: the built page opened with the sample, a part
 * of it or a workbook of the test's own, and cells read, typed and waited for. No test passes
 * while the page writes a warning or error or asks another machine for anything.
 */
import type { Browser, BrowserContextOptions, Page } from 'playwright-core';
import type { WorkbookHook } from '../../addin/page/hook';
import type { Server } from './chromium';
import { launchBrowser, serve } from './chromium';

declare global {
  interface Window {
    undercurveWorkbook: WorkbookHook;
  }
}

/** The name under which the page keeps edits, as kept.test.ts asserts. */
export const KEPT = 'undercurve.workbook.2';

interface Setting extends BrowserContextOptions {
  /** What the browser has kept from an earlier visit: a workbook or any text; else nothing. */
  kept?: object | string;
}

interface Workbooks {
  open(setting?: Setting): Promise<Page>;
  /** Ends in a slash. */
  url(): string;
}

/** Starts server and browser for a test file; every test closes what it opened. */
export function workbooks(): Workbooks {
  let browser: Browser;
  let server: Server;
  const complaints: string[] = [];
  jest.setTimeout(90_000);
  beforeAll(async () => {
    server = await serve({ '/': '.build/page', '/pane/': '.build/pane' });
    browser = await launchBrowser();
  });
  afterAll(async () => {
    await browser.close();
    server.close();
  });
  afterEach(async () => {
    await Promise.all(browser.contexts().map((context) => context.close()));
    expect(complaints.splice(0)).toEqual([]);
  });
  return {
    url: () => server.url,
    async open({ kept, ...options } = {}) {
      const context = await browser.newContext({
        viewport: { width: 1280, height: 800 },
        ...(kept !== undefined && { storageState: storageWith(server.url, kept) }),
        ...options,
      });
      const page = await context.newPage();
      page.on('console', (message) => {
        if (['error', 'warning'].includes(message.type())) complaints.push(message.text());
      });
      page.on('pageerror', (fault) => complaints.push(fault.message));
      page.on('request', (request) => {
        const inside = [server.url, 'data:', `blob:${server.url}`];
        if (!inside.some((start) => request.url().startsWith(start)))
          complaints.push(request.url());
      });
      await page.goto(server.url);
      await shown(page);
      return page;
    },
  };
}

function storageWith(url: string, kept: object | string) {
  const value = typeof kept === 'string' ? kept : JSON.stringify(kept);
  const { origin } = new URL(url);
  return { cookies: [], origins: [{ origin, localStorage: [{ name: KEPT, value }] }] };
}

/** The cells of the sample that a Worker answers, all on this sheet. */
const LONG_SHEET = 'Plans';
const LONG_CELLS = ['A28', 'D28', 'K6', 'N28'];

/** Waits until the grid stands and no answer is under way. */
export async function shown(page: Page): Promise<void> {
  await page.waitForFunction(() => document.querySelector('.o-grid canvas') !== null);
  const sheets = await page.getByRole('navigation').getByRole('button').allInnerTexts();
  if (sheets.includes(LONG_SHEET)) {
    await page.waitForFunction(
      ([sheet, cells]) =>
        cells.every((cell) => window.undercurveWorkbook.read(sheet, cell) !== '#WORKING!'),
      [LONG_SHEET, LONG_CELLS] as const,
    );
  }
  await settled(page);
}

/** Two frames: what was asked for has been drawn. */
export async function settled(page: Page): Promise<void> {
  await page.evaluate(
    () => new Promise((done) => requestAnimationFrame(() => requestAnimationFrame(done))),
  );
}

export const read = (page: Page, sheet: string, address: string) =>
  page.evaluate(([s, a]) => window.undercurveWorkbook.read(s, a), [sheet, address] as const);
export const spill = (page: Page, sheet: string, address: string) =>
  page.evaluate(([s, a]) => window.undercurveWorkbook.readSpill(s, a), [sheet, address] as const);
export const message = (page: Page) => page.getByRole('status').innerText();

/** Selects a cell by its address, or tries to. */
export async function goTo(page: Page, address: string): Promise<void> {
  await page.getByLabel('Cell address').fill(address);
  await page.keyboard.press('Enter');
}

/** Types into a cell with real key presses. */
export async function type(page: Page, address: string, text: string): Promise<void> {
  await goTo(page, address);
  await page.keyboard.type(text);
  await page.keyboard.press('Enter');
  await settled(page);
}

/** Opens a workbook file through the page's own dialog. */
export async function openCopy(page: Page, name: string, content: string): Promise<void> {
  const file = { name, mimeType: 'application/json', buffer: Buffer.from(content) };
  await page.locator('#copy-file').setInputFiles(file);
}
