/** The built command line as a process: what `npx undercurve` starts. */
import { spawnSync } from 'node:child_process';
import { readFileSync, statSync } from 'node:fs';
import { resolve } from 'node:path';
import { bin } from '../../../package.json';

const root = resolve(__dirname, '../../..');
const program = resolve(root, bin.undercurve);
const ARGUMENTS = '["EXP(-x)", [[0, 5]], 3, "plan-2027", "downtime"]';

function started(argv: string[], input = '') {
  const { status, stdout, stderr } = spawnSync(process.execPath, [program, ...argv], {
    input,
    encoding: 'utf8',
  });
  return { status, stdout, stderr };
}

describe('the undercurve program', () => {
  test('begins with the line that makes it a command [law]', () => {
    expect(readFileSync(program, 'utf8')).toMatch(/^#!\/usr\/bin\/env node\n/);
    // A link of npx runs the file itself; where a system knows no such mark npx makes a script instead.
    if (process.platform !== 'win32') expect(statSync(program).mode & 0o111).toBe(0o111);
  });

  test('call prints rows and ends with 0; standard input gives the same [law]', () => {
    const direct = started(['call', 'UNDERCURVE.DRAW', ARGUMENTS]);
    expect(direct).toEqual({ status: 0, stderr: '', stdout: expect.any(String) as string });
    expect(JSON.parse(direct.stdout)).toHaveLength(3);
    expect(started(['call', 'UNDERCURVE.DRAW', '-'], ARGUMENTS)).toEqual(direct);
  });

  test('prints 100,000 rows whole through a pipe [law]', () => {
    const many = ARGUMENTS.replace(' 3,', ' 100000,');
    const { stdout } = spawnSync(process.execPath, [program, 'call', 'DRAW', many], {
      encoding: 'utf8',
      maxBuffer: 1e8,
    });
    expect(JSON.parse(stdout)).toHaveLength(100_000);
  });

  test('ends with 1 for wrong input and 2 for wrong usage, both on standard error only [law]', () => {
    const wrongInput = started(['call', 'DRAW', '["EXP(-x", [[0, 5]], 3, "plan", "a"]']);
    expect([wrongInput.status, wrongInput.stdout]).toEqual([1, '']);
    expect(wrongInput.stderr).not.toMatch(/^\s+at /m);
    const wrongUsage = started(['call']);
    expect([wrongUsage.status, wrongUsage.stdout]).toEqual([2, '']);
  });
});
