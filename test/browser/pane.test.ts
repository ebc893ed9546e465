/**
 * The built start page in a real browser: outside any host, with a stand-in for the
 * host, without a network; by keyboard; narrow; in light, dark and forced colours.
 */
import { resolve } from 'node:path';
import type { Browser, BrowserContextOptions, Page } from 'playwright-core';
import { exampleAsText } from '../../addin/pane/example';
import metadata from '../../addin/functions/functions.json';
import type { Server } from './chromium';
import { launchBrowser, serve } from './chromium';
import { textContrasts } from './contrast';

const OFFICE = 'https://appsforoffice.microsoft.com';
const officePackage = resolve(__dirname, '../../node_modules/@microsoft/office-js/dist');
const names = metadata.functions.map(({ name }) => name);

let browser: Browser;
let server: Server;
const faults: string[] = [];

beforeAll(async () => {
  server = await serve({ '/': '.build/addin', '/pane/': '.build/pane' });
  browser = await launchBrowser();
}, 30_000);
afterAll(async () => {
  await browser.close();
  server.close();
});
afterEach(async () => {
  faults.splice(0);
  await Promise.all(browser.contexts().map((context) => context.close()));
});

interface Setting extends BrowserContextOptions {
  /** What the host's script address answers: the vendor's script, nothing, or a stand-in. */
  office?: 'vendor' | 'unreachable' | { script: string };
  path?: string;
  /** Runs before the page's own scripts. */
  before?: () => void;
  /** The page's time stands still until the test moves it. */
  clock?: boolean;
}

async function opened(setting: Setting = {}): Promise<Page> {
  const { office = 'vendor', path = 'pane.html', before, clock, ...options } = setting;
  const context = await browser.newContext(options);
  const page = await context.newPage();
  page.on('pageerror', (error) => faults.push(error.message));
  await page.route(`${OFFICE}/**`, (route) => {
    if (office === 'unreachable') return route.abort();
    if (office !== 'vendor')
      return route.fulfill({ body: office.script, contentType: 'text/javascript' });
    return route.fulfill({ path: `${officePackage}/${route.request().url().split('/').at(-1)}` });
  });
  if (before) await page.addInitScript(before);
  if (clock) {
    await page.clock.install({ time: 0 });
    await page.clock.pauseAt(1);
  }
  await page.goto(server.url + path);
  return page;
}

const OUTSIDE = 'This page is open outside of a workbook, so no functions can be entered here.';

describe('the start page outside of a host', () => {
  test.each([
    ['with the vendor’s script', 'vendor'],
    ['without a network', 'unreachable'],
  ] as const)('%s says so and offers the local workbook [law]', async (_, office) => {
    const page = await opened({ office });
    await page.getByText(OUTSIDE).waitFor();
    expect(await page.getByRole('heading', { name: 'Try it without Excel' }).isVisible()).toBe(
      true,
    );
    expect(await page.locator('#outside').innerText()).toContain('npm start');
    expect(await page.locator('dt').allInnerTexts()).toEqual(
      names.map((name) => `UNDERCURVE.${name}`),
    );
    expect(await page.locator('main').innerText()).toContain('they do not make the shape right');
    expect(faults).toEqual([]);
  });

  test('beside the local workbook links to it and asks no other machine for anything [law]', async () => {
    const context = await browser.newContext();
    const page = await context.newPage();
    const asked: string[] = [];
    page.on('request', (request) => asked.push(request.url()));
    await page.goto(`${server.url}pane/`);
    await page.getByText(OUTSIDE).waitFor();
    const link = page.getByRole('link', { name: 'local workbook' });
    expect(await link.evaluate((anchor: HTMLAnchorElement) => anchor.href)).toBe(server.url);
    expect(asked.filter((url) => !url.startsWith(server.url))).toEqual([]);
  });

  test('leads to support and privacy, and back [law]', async () => {
    const page = await opened();
    await page.getByRole('link', { name: 'Support and privacy' }).click();
    expect(await page.locator('main').innerText()).toContain('sends no cell');
    await page.getByRole('link', { name: 'Back to the start page' }).click();
    await page.getByRole('heading', { name: 'Undercurve' }).waitFor();
  });
});

describe('the start page in a workbook host', () => {
  const standIn = `
    globalThis.associated = [];
    globalThis.CustomFunctions = { associate: (id) => associated.push(id) };
    globalThis.Office = { HostType: { Excel: 'Excel' }, onReady: (tell) => Promise.resolve().then(() => tell({ host: 'Excel' })) };`;

  test('registers every function and says that they are ready [law]', async () => {
    const page = await opened({ office: { script: standIn } });
    await page.getByText('The functions are ready: type =UNDERCURVE. in a cell.').waitFor();
    expect(await page.locator('#outside').isHidden()).toBe(true);
    expect(await page.evaluate('associated')).toEqual(names);
    expect(faults).toEqual([]);
  });

  test('gives up after five seconds on a host that never answers, and says so [law]', async () => {
    const page = await opened({
      office: { script: 'globalThis.Office = { onReady: () => {} };' },
      clock: true,
    });
    await page.clock.fastForward(4999);
    expect(await page.locator('#host').innerText()).toBe('Looking for a workbook …');
    await page.clock.fastForward(1);
    await page.getByText(OUTSIDE).waitFor();
  });
});

describe('the example on the start page', () => {
  test('is copied by keyboard alone, and the page says so [law]', async () => {
    const page = await opened({ permissions: ['clipboard-read', 'clipboard-write'] });
    await page.getByText(OUTSIDE).waitFor();
    await page.keyboard.press('Tab');
    expect(await page.evaluate(() => document.activeElement?.id)).toBe('copy');
    await page.keyboard.press('Enter');
    await page.getByText('Copied. Select cell A1 of an empty sheet and paste.').waitFor();
    expect(await page.evaluate(() => navigator.clipboard.readText())).toBe(exampleAsText());
  });

  test('is selected for copying by hand where the host keeps the clipboard [law]', async () => {
    const page = await opened({
      before: () => {
        navigator.clipboard.writeText = () => Promise.reject(new Error('denied'));
      },
    });
    await page.getByRole('button', { name: 'Copy the example' }).click();
    await page.getByText('The example is selected: press Ctrl+C').waitFor();
    const selected = await page.evaluate(() => String(getSelection()));
    expect(selected).toContain('EXP(-0.5*((x-m)/s)^2)');
    expect(selected).toContain('=UNDERCURVE.DRAW(A1:B8)');
  });

  test('shows the cells that are copied [law]', async () => {
    const page = await opened();
    const rows = await page
      .locator('#example tr')
      .evaluateAll((lines) =>
        lines.map((line) => [...line.children].map((cell) => cell.textContent).join('\t')),
      );
    expect(rows.join('\n')).toBe(exampleAsText());
  });
});

async function leastContrast(page: Page): Promise<number> {
  return Math.min(...(await textContrasts(page, 'body *')).map(({ ratio }) => ratio));
}

describe('the start page for every reader', () => {
  test.each([
    ['light', { colorScheme: 'light' }],
    ['dark', { colorScheme: 'dark' }],
    ['forced colours', { forcedColors: 'active' }],
  ] as const)('in %s keeps a contrast of 4.5 and shows the focus [law]', async (_, scheme) => {
    const page = await opened({ ...scheme, viewport: { width: 320, height: 700 } });
    await page.getByText(OUTSIDE).waitFor();
    expect(await leastContrast(page)).toBeGreaterThanOrEqual(4.5);
    await page.keyboard.press('Tab');
    const outline = await page.evaluate(() => {
      const style = getComputedStyle(document.activeElement ?? document.body);
      return [style.outlineStyle, parseFloat(style.outlineWidth) >= 2];
    });
    expect(outline).toEqual(['solid', true]);
  });

  test('the contrast check finds pale text [law]', async () => {
    const page = await opened({ colorScheme: 'light' });
    // Through the document object model, which the security policy lets pass.
    await page.evaluate(() => document.querySelector('h2')?.style.setProperty('color', '#999'));
    expect(await leastContrast(page)).toBeLessThan(4.5);
  });

  test('fits a pane 320 pixels wide, also with text twice as large [law]', async () => {
    const page = await opened({ viewport: { width: 320, height: 700 } });
    await page.getByText(OUTSIDE).waitFor();
    const widest = () => page.evaluate(() => document.documentElement.scrollWidth);
    expect(await widest()).toBeLessThanOrEqual(320);
    await page.evaluate(() => document.documentElement.style.setProperty('font-size', '200%'));
    expect(await widest()).toBeLessThanOrEqual(320);
  });

  test('every stop of the Tab key is a link or the button, in the order of the page [law]', async () => {
    const page = await opened();
    await page.getByText(OUTSIDE).waitFor();
    const stops: (string | null)[] = [];
    for (let i = 0; i < 2; i++) {
      await page.keyboard.press('Tab');
      stops.push(await page.evaluate(() => document.activeElement?.textContent ?? null));
    }
    expect(stops).toEqual(['Copy the example', 'Support and privacy']);
  });
});

describe('the security policy of the start page', () => {
  test('lets no text run as code and no other script in [law]', async () => {
    const page = await opened();
    const outcome = await page.evaluate(
      () =>
        new Promise<string[]>((resolve) => {
          // In a later turn: the test's own evaluation is exempt from the policy.
          setTimeout(() => {
            let evaluated: string;
            try {
              const evaluate = Reflect.get(globalThis, 'eval') as (text: string) => unknown;
              evaluated = String(evaluate('1 + 1'));
            } catch (error) {
              evaluated = (error as Error).name;
            }
            const script = document.createElement('script');
            script.src = 'https://other.example/x.js';
            script.onload = () => resolve([evaluated, 'loaded']);
            script.onerror = () => resolve([evaluated, 'refused']);
            document.head.append(script);
          }, 0);
        }),
    );
    expect(outcome).toEqual(['EvalError', 'refused']);
  });
});
