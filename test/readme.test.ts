/** Runs every command-line example in README.md as it stands there, and checks its lists. */
import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { run } from '../addin/cli/run';
import { VOCABULARY } from '../src/formula/vocabulary';

const readme = readFileSync(resolve(__dirname, '../README.md'), 'utf8');
/** What is typed and what comes back, one exchange after the other. */
const [, shown = ''] = /<!-- exchange -->\n```\n([^]+?)\n```/.exec(readme) ?? [];
const exchanges = shown.split('\n\n').map((exchange) => {
  const [typed = '', ...answer] = exchange.split('\n');
  return [typed, answer.join('\n')] as const;
});
/** Examples that read a file of the reader's own cannot run. */
const examples = [...readme.replace(shown, '').matchAll(/^npx undercurve (?!.*@)(.+)$/gm)].map(
  ([, line]) => line ?? '',
);

/** The words of a line as a shell takes them apart; the examples quote with ' only. */
function words(line: string): string[] {
  return [...line.matchAll(/'([^']*)'|(\S+)/g)].map(([, quoted, bare]) => quoted ?? bare ?? '');
}

/** What the command line answers to the words after `npx undercurve`. */
function typedIn(line: string): { status: number; out: string; err: string } {
  let out = '';
  let err = '';
  const status = run(words(line), {
    write: (text) => void (out += text),
    writeError: (text) => void (err += text),
    read: () => '',
  });
  return { status, out, err };
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
    const { status, out, err } = typedIn(line);
    expect([status, err]).toEqual([0, '']);
    expect(out).not.toBe('');
  });

  test('has an exchange of answers and of a mistake [law]', () => {
    expect(exchanges).toHaveLength(3);
  });

  test.each(exchanges)('%s answers as it stands there [pinned]', (typed, answer) => {
    const { out, err } = typedIn(typed.replace('npx undercurve ', ''));
    expect(`${out}${err}`.trim()).toBe(answer);
  });
});
