/**
 * `npm start`: builds the local workbook and serves it, with the task pane under
 * pane/. `npm start -- --open` also opens it in the default browser; PORT asks for
 * a certain port.
 */
import { spawn } from 'node:child_process';
import { parseArgs } from 'node:util';
import { build } from './build.mjs';
import { serve } from './serve.mjs';

const OPENERS = { darwin: 'open', win32: 'explorer' };

const { values } = parseArgs({ options: { open: { type: 'boolean' } } });

console.log('Building the local workbook …');
await build(['page', 'pane']);
const url = await serve(
  { '/': '.build/page', '/pane/': '.build/pane' },
  Number(process.env.PORT ?? 0),
);
console.log(`Undercurve's local workbook: ${url}   (Ctrl+C ends it)`);
if (values.open) {
  const opener = OPENERS[process.platform] ?? 'xdg-open';
  spawn(opener, [url], { stdio: 'ignore', detached: true })
    .on('error', () => console.log(`No browser could be opened; go to ${url} yourself.`))
    .unref();
}
