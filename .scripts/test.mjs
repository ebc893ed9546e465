/**
 * `npm test`: formatting, lint, types, bundles, then jest with the browser tests.
 * Arguments go to jest. The last line counts everything: each check is one, each
 * jest test is one, and a jest file that does not run is one failed.
 */
import { spawnSync } from 'node:child_process';
import { readFileSync, rmSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { findBrowser } from './browser.mjs';

const root = fileURLToPath(new URL('..', import.meta.url));
process.chdir(root);

const node = (...args) =>
  spawnSync(process.execPath, args, { stdio: 'inherit', env: process.env }).status === 0;

const checks = {
  formatting: () =>
    node('node_modules/prettier/bin/prettier.cjs', '--check', '--log-level=warn', '.'),
  lint: () => node('node_modules/eslint/bin/eslint.js', '.'),
  types: () => node('node_modules/typescript/bin/tsc', '-p', 'tsconfig.json'),
  'types of the engine': () =>
    node('node_modules/typescript/bin/tsc', '-p', 'tsconfig.engine.json'),
  bundles: () => node('.scripts/bundles.mjs'),
};

const count = { passed: 0, failed: 0 };

for (const [name, check] of Object.entries(checks)) {
  const start = performance.now();
  const ok = check();
  count[ok ? 'passed' : 'failed'] += 1;
  const seconds = ((performance.now() - start) / 1000).toFixed(1);
  console.log(`${ok ? 'passed' : 'FAILED'}: ${name} (${seconds} s)`);
}

if (!findBrowser()) {
  console.log('Browser tests left out: no Chromium or Chrome found; set CHROMIUM_PATH to one.');
  if (process.env.UNDERCURVE_BROWSER === 'required') count.failed += 1;
}

const report = '.build/jest.json';
rmSync(report, { force: true });
const jestOk = node(
  'node_modules/jest/bin/jest.js',
  '--json',
  `--outputFile=${report}`,
  ...process.argv.slice(2),
);
try {
  const jest = JSON.parse(readFileSync(report, 'utf8'));
  count.passed += jest.numPassedTests;
  count.failed += jest.numFailedTests + jest.numRuntimeErrorTestSuites;
} catch {
  // Jest wrote no report: it did not even start.
}
// A skipped test or a jest that stops early must not look like success.
if (!jestOk && count.failed === 0) count.failed = 1;

console.log(`\n${count.passed} passed, ${count.failed} failed`);
process.exitCode = count.failed === 0 ? 0 : 1;
