/**
 * A small static server for built folders, on 127.0.0.1 only.
 *
 *   node .scripts/serve.mjs '{"/":".build/page"}'     prints its address
 */
import { createReadStream, statSync } from 'node:fs';
import { createServer } from 'node:http';
import { extname, resolve, sep } from 'node:path';
import { fileURLToPath } from 'node:url';

const TYPES = {
  '.css': 'text/css; charset=utf-8',
  '.html': 'text/html; charset=utf-8',
  '.js': 'text/javascript; charset=utf-8',
  '.json': 'application/json; charset=utf-8',
  '.map': 'application/json; charset=utf-8',
  '.png': 'image/png',
  '.svg': 'image/svg+xml',
  '.xml': 'application/xml; charset=utf-8',
};

/** What an address that ends in a slash shows: the first of these that its folder has. */
const STARTS = ['index.html', 'pane.html'];

/** The file a request means, or undefined where there is none inside the mounted folder. */
function fileFor(mounts, url) {
  const path = decodeURIComponent(new URL(url, 'http://127.0.0.1').pathname);
  // The longest mount wins: "/pane/" before "/".
  const mount = Object.keys(mounts)
    .filter((prefix) => path.startsWith(prefix))
    .sort((a, b) => b.length - a.length)[0];
  if (mount === undefined) return undefined;
  const folder = resolve(mounts[mount]);
  const rest = path.slice(mount.length);
  return (rest === '' ? STARTS : [rest])
    .map((name) => resolve(folder, name))
    .filter((file) => file.startsWith(folder + sep))
    .find((file) => statSync(file, { throwIfNoEntry: false })?.isFile());
}

/**
 * Starts the server; mounts go from a path prefix to a folder. Port 0 is any free one.
 * Resolves to the address, which ends in a slash.
 */
export function serve(mounts, port = 0) {
  const server = createServer((request, response) => {
    let file;
    try {
      file = fileFor(mounts, request.url);
    } catch {
      // A path that is not valid percent-encoding names no file.
    }
    if (file === undefined || !['GET', 'HEAD'].includes(request.method)) {
      response.writeHead(404, { 'Content-Type': 'text/plain' }).end('Not found\n');
      return;
    }
    response.writeHead(200, {
      'Content-Type': TYPES[extname(file)] ?? 'application/octet-stream',
      'Cache-Control': 'no-store',
      'X-Content-Type-Options': 'nosniff',
    });
    if (request.method === 'HEAD') response.end();
    else createReadStream(file).pipe(response);
  });
  return new Promise((done, fail) => {
    server.once('error', fail);
    server.listen(port, '127.0.0.1', () => done(`http://127.0.0.1:${server.address().port}/`));
  });
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  console.log(await serve(JSON.parse(process.argv[2])));
}
