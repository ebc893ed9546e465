/** The server of `npm start`: what it gives out, and that it gives out nothing else. */
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { request } from 'node:http';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Server } from '../browser/chromium';
import { serve } from '../browser/chromium';

let folder: string;
let server: Server;

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'serve-'));
  const files = {
    'page/index.html': 'the page',
    'page/a b.js': 'a script',
    'pane/pane.html': 'the pane',
    'secret.txt': 'a secret',
    'page-secret/index.html': 'a secret beside',
  };
  for (const [file, text] of Object.entries(files)) {
    mkdirSync(join(folder, file, '..'), { recursive: true });
    writeFileSync(join(folder, file), text);
  }
  server = await serve({ '/': join(folder, 'page'), '/pane/': join(folder, 'pane') });
});
afterAll(() => {
  server.close();
  rmSync(folder, { recursive: true });
});

/** Sends the path as it is; fetch would already take its dots away. */
function get(
  path: string,
  method = 'GET',
): Promise<{ status?: number; type?: string; text: string }> {
  return new Promise((resolve, reject) => {
    const { hostname, port } = new URL(server.url);
    request({ hostname, port, path, method }, (response) => {
      let text = '';
      response.on('data', (chunk) => (text += String(chunk)));
      response.on('end', () =>
        resolve({ status: response.statusCode, type: response.headers['content-type'], text }),
      );
    })
      .on('error', reject)
      .end();
  });
}

describe('serve(mounts)', () => {
  test('listens on this machine only [law]', () => {
    expect(server.url).toMatch(/^http:\/\/127\.0\.0\.1:\d+\/$/);
  });

  test.each([
    ['/', 'the page', 'text/html; charset=utf-8'],
    ['/index.html?x=1', 'the page', 'text/html; charset=utf-8'],
    ['/a%20b.js', 'a script', 'text/javascript; charset=utf-8'],
    ['/pane/', 'the pane', 'text/html; charset=utf-8'],
    ['/pane/pane.html', 'the pane', 'text/html; charset=utf-8'],
  ])('GET %s gives the file with its type [law]', async (path, text, type) => {
    expect(await get(path)).toEqual({ status: 200, type, text });
  });

  test.each([
    '/none.html',
    '/../secret.txt',
    '/%2e%2e/secret.txt',
    '/..%2fsecret.txt',
    '/..%5csecret.txt',
    '/../page-secret/index.html',
    '/pane/../../secret.txt',
    '//etc/passwd',
    '/%2fetc%2fpasswd',
    '/%',
    '/a%00b',
  ])('GET %s gives nothing [law]', async (path) => {
    const { status, text } = await get(path);
    expect([status, text]).toEqual([404, 'Not found\n']);
  });

  test('takes no other method than GET and HEAD [law]', async () => {
    expect((await get('/', 'POST')).status).toBe(404);
    expect(await get('/', 'HEAD')).toMatchObject({ status: 200, text: '' });
  });
});
