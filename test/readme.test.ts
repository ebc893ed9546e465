/** Runs every command-line example in README.md as it stands there, and checks its lists. */
import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { run } from '../addin/cli/run';
import { VOCABULARY } from '../src/formula/vocabulary';

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

  test('lists the functions of the formula language [law]', () => {
    const [, listed] = /<!-- vocabulary -->([^<]+)<!-- \/vocabulary -->/.exec(readme) ?? [];
    const named = listed?.match(/[A-Z][A-Z0-9.]*/g) ?? [];
    // Operators have rows of their own in the vocabulary.
    const functions = [...VOCABULARY.keys()].filter((name) => /^[A-Z]/.test(name));
    expect([...named].sort()).toEqual(functions.sort());
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
