/**
 * Draws the icon sizes that the manifest names from addin/assets/icon.svg, with the
 * browser of the browser tests. Run it after a change to the drawing.
 */
import { readFileSync } from 'node:fs';
import { chromium } from 'playwright-core';
import { findBrowser } from './browser.mjs';

const svg = readFileSync('addin/assets/icon.svg', 'utf8');
const browser = await chromium.launch({
  executablePath: findBrowser(),
  args: ['--no-sandbox', '--disable-gpu'],
});
for (const size of [16, 32, 64, 80]) {
  const page = await browser.newPage({ viewport: { width: size, height: size } });
  await page.setContent(
    `<style>body{margin:0}svg{display:block;width:100vw;height:100vh}</style>${svg}`,
  );
  await page.screenshot({ path: `addin/assets/icon-${size}.png`, omitBackground: true });
  await page.close();
}
await browser.close();
