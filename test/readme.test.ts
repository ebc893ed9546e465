/** Every command-line example in README.md is run as it stands there. */
import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { run } from '../addin/cli/run';

const readme = readFileSync(resolve(__dirname, '../README.md'), 'utf8');
/** Examples that read a file of the reader's own cannot run. */
const examples = [...readme.matchAll(/^npx undercurve (?!.*@)(.+)$/gm)].map(
  ([, line]) => line ?? '',
);

/** The words of a line as a shell takes them apart; the examples quote with ' only. */
function words(line: string): string[] {
  return [...line.matchAll(/'([^']*)'|(\S+)/g)].map(([, quoted, bare]) => quoted ?? bare ?? '');
}

describe('README.md', () => {
  test('has examples for the command line [law]', () => {
    expect(examples.length).toBeGreaterThanOrEqual(2);
  });

  test.each(examples)('npx undercurve %s runs [law]', (line) => {
    let out = '';
    let err = '';
    const status = run(words(line), {
      write: (text) => void (out += text),
      writeError: (text) => void (err += text),
      read: () => '',
    });
    expect([status, err]).toEqual([0, '']);
    expect(out).not.toBe('');
  });
});
