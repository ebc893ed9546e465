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
const port = Number(process.env.PORT ?? 0);
let url;
try {
  url = await serve({ '/': '.build/page', '/pane/': '.build/pane' }, port);
} catch (error) {
  console.error(
    `PORT: ${process.env.PORT} cannot be used (${error.message}); give a free one, or none.`,
  );
  process.exit(1);
}
console.log(`Undercurve's local workbook: ${url}   (Ctrl+C ends it)`);
if (values.open) {
  const opener = OPENERS[process.platform] ?? 'xdg-open';
  const sayNotOpened = () => console.log(`No browser could be opened; go to ${url} yourself.`);
  spawn(opener, [url], { stdio: 'ignore', detached: true })
    .on('error', sayNotOpened)
    // explorer ends with 1 even when it has opened the address.
    .on('exit', (status) => status !== 0 && opener !== 'explorer' && sayNotOpened())
    .unref();
}
