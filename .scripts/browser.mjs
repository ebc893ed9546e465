/**
 * Finds a Chromium or Chrome for the browser tests: CHROMIUM_PATH if set, else
 * the usual places on Linux, Mac and Windows. Never downloads one.
 */
import { existsSync } from 'node:fs';
import { delimiter, join } from 'node:path';

const NAMES = ['chromium', 'chromium-browser', 'google-chrome', 'google-chrome-stable'];

function candidates({ env, platform }) {
  if (env.CHROMIUM_PATH) return [env.CHROMIUM_PATH];
  if (platform === 'darwin') {
    return ['Google Chrome', 'Chromium'].map(
      (name) => `/Applications/${name}.app/Contents/MacOS/${name}`,
    );
  }
  if (platform === 'win32') {
    return [env.PROGRAMFILES, env['PROGRAMFILES(X86)'], env.LOCALAPPDATA]
      .filter(Boolean)
      .flatMap((folder) =>
        ['Google\\Chrome', 'Chromium'].map((name) =>
          join(folder, name, 'Application', 'chrome.exe'),
        ),
      );
  }
  return (env.PATH ?? '')
    .split(delimiter)
    .flatMap((folder) => NAMES.map((name) => join(folder, name)));
}

/** The path of the first browser found, or undefined. */
export function findBrowser(machine = { env: process.env, platform: process.platform }) {
  return candidates(machine).find((path) => existsSync(path));
}
