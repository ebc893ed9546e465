import { findBrowser } from './.scripts/browser.mjs';

const browser = findBrowser();
if (browser) process.env.UNDERCURVE_CHROMIUM = browser;

export default {
  testEnvironment: 'node',
  // In jest's sandbox every mention of Math is looked up in the host otherwise, 20 times slower.
  sandboxInjectedGlobals: ['Math', 'Infinity', 'Number'],
  testMatch: ['<rootDir>/test/**/*.test.ts'],
  testPathIgnorePatterns: [
    '/node_modules/',
    // Hours of draws and timings are asked for by name: npm run check:long, npm run bench.
    '<rootDir>/test/long/',
    '<rootDir>/test/bench/',
    ...(browser ? [] : ['<rootDir>/test/browser/']),
  ],
  modulePathIgnorePatterns: ['<rootDir>/.build/'],
  transform: { '^.+\\.(ts|js)$': '@swc/jest' },
  // Packages that come as ES modules only.
  transformIgnorePatterns: ['/node_modules/(?!(flatqueue)/)'],
};
