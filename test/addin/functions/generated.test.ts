import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import metadata from '../../../addin/functions/functions.json';

const root = resolve(__dirname, '../../..');

function node(...args: string[]) {
  const { status, stdout, stderr } = spawnSync(process.execPath, args, {
    cwd: root,
    encoding: 'utf8',
  });
  return { status, stdout, stderr };
}

/** Runs the generator of functions.json over a source of its own. */
function generated(source: string) {
  const folder = mkdtempSync(join(tmpdir(), 'functions-'));
  const file = join(folder, 'functions.ts');
  writeFileSync(file, source);
  const code =
    "import { functionsJson } from './.scripts/functions-json.mjs'; console.log(await functionsJson(process.argv[1]));";
  const run = node('--input-type=module', '--eval', code, file);
  rmSync(folder, { recursive: true });
  return run;
}

const documented = (comment: string, types = 'x: any[][]') =>
  `/**\n * Doubles it.\n * @customfunction TWICE\n * ${comment}\n */\nexport function twice(${types}): any[][] { return x; }\n`;

describe('npm run generate', () => {
  test('makes what is committed: functions.json and the README reference [law]', () => {
    expect(node('.scripts/generate.mjs', '--check')).toEqual({ status: 0, stdout: '', stderr: '' });
  });

  test('takes a documented function [law]', () => {
    const { status, stdout } = generated(documented('@param x Any cells.'));
    expect(status).toBe(0);
    expect(JSON.parse(stdout)).toMatchObject({
      allowErrorForDataTypeAny: true,
      functions: [{ id: 'TWICE', name: 'TWICE', parameters: [{ name: 'x' }] }],
    });
  });

  test.each([
    ['a type that the host does not know', documented('@param x Any cells.', 'x: Range')],
    ['a parameter without help', documented('Nothing about it.')],
    ['a name that is none', documented('@param x Any cells.').replace('TWICE', '2X')],
  ])('fails on %s, although the tool itself would succeed [law]', (_, source) => {
    const { status, stdout, stderr } = generated(source);
    expect([status, stdout]).toEqual([1, '']);
    expect(stderr).toContain('Function metadata: ');
  });
});

describe('functions.json', () => {
  test('lets error cells reach the functions [law]', () => {
    expect(metadata.allowErrorForDataTypeAny).toBe(true);
  });

  // The names' rules are common practice, from the platform's public documentation.
  test.each(metadata.functions)('$name is a name that the host takes [law]', ({ id, name }) => {
    expect(id).toBe(name);
    expect(name).toMatch(/^[A-Z][A-Z0-9.]{2,}$/);
    expect(name).not.toMatch(/^[A-Z]{1,3}[0-9]+$/);
  });

  test('no two names are equal once dots are underscores [law]', () => {
    const stored = metadata.functions.map(({ name }) => name.replaceAll('.', '_'));
    expect(new Set(stored).size).toBe(stored.length);
  });

  test.each(metadata.functions)(
    '$name takes and gives ranges, and none of it is volatile [law]',
    (entry) => {
      expect(entry.result).toEqual({ dimensionality: 'matrix' });
      const { options = {} }: { options?: object } = entry;
      expect(Object.keys(options).filter((option) => option !== 'cancelable')).toEqual([]);
      for (const parameter of entry.parameters) {
        expect(parameter).toMatchObject({ type: 'any', dimensionality: 'matrix' });
      }
    },
  );

  test.each(metadata.functions)(
    '$name has one repeating parameter at most, last and optional [law]',
    (entry) => {
      const repeating = entry.parameters.filter((parameter) => 'repeating' in parameter);
      expect(repeating.length).toBeLessThanOrEqual(1);
      for (const parameter of repeating) {
        expect(parameter).toBe(entry.parameters.at(-1));
        // A repeating parameter that is marked as required breaks the installation.
        expect(parameter).toMatchObject({ optional: true });
      }
    },
  );
});
