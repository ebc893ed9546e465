/**
 * What the browser tests share: a real Chromium and the server of `npm start`
 * over a built folder. jest.config.mjs finds the browser; without one it leaves
 * these tests out, so a missing browser here is a mistake of the setup.
 */
import { spawn } from 'node:child_process';
import type { Browser } from 'playwright-core';
import { chromium } from 'playwright-core';

const FLAGS = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

/** A fresh headless browser; close it in afterAll. */
export function launchBrowser(): Promise<Browser> {
  const executablePath = process.env.UNDERCURVE_CHROMIUM;
  if (!executablePath) throw new Error('No Chromium: set CHROMIUM_PATH and start jest again.');
  return chromium.launch({ executablePath, args: FLAGS });
}

export interface Server {
  /** Ends in a slash. */
  readonly url: string;
  close(): void;
}

/** Serves built folders as `npm start` does, e.g. { '/': '.build/page', '/pane/': '.build/pane' }. */
export function serve(mounts: Readonly<Record<string, string>>): Promise<Server> {
  const child = spawn(process.execPath, ['.scripts/serve.mjs', JSON.stringify(mounts)], {
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  return new Promise((resolve, reject) => {
    child.once('error', reject);
    child.once('exit', (code) => reject(new Error(`The server ended with status ${code}.`)));
    child.stdout.once('data', (text: Buffer) =>
      resolve({ url: String(text).trim(), close: () => void child.kill() }),
    );
  });
}
