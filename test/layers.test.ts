/**
 * Reads every source file with TypeScript's own parser and holds it to the rules that
 * no compiler knows: who may import whom, which packages the engine may use, and that
 * nothing a drawn value depends on can differ between machines.
 */
import { readFileSync, readdirSync } from 'node:fs';
import { dirname, join, relative, resolve, sep } from 'node:path';
import ts from 'typescript';

const root = resolve(__dirname, '..');

/** From the bottom up: a file imports from its own folder and from what stands before it. */
const LAYERS = [
  'src/errors.ts',
  'src/numeric',
  'src/formula/operation.ts',
  'src/formula/row.ts',
  'src/formula/operations',
  'src/formula',
  'src/density',
  'src/envelope',
  'src/random',
  'src/draw',
  'src/exact',
  'src/evidence',
  'src/worksheet',
  'src/index.ts',
];

const ENGINE_PACKAGES = [
  /^@stdlib\//,
  /^@borgar\/fx$/,
  /^@noble\/hashes\//,
  /^flatqueue$/,
  /^lru-cache$/,
  /^seedrandom$/,
];

/** What IEEE 754 and ECMAScript fix to the bit. */
const PORTABLE_MATH = new Set([
  ...['sqrt', 'fround', 'imul', 'clz32', 'abs', 'sign'],
  ...['floor', 'ceil', 'trunc', 'round', 'min', 'max'],
  'PI',
]);

function filesIn(folder: string): string[] {
  return readdirSync(join(root, folder), { recursive: true, encoding: 'utf8' })
    .filter((file) => file.endsWith('.ts'))
    .map((file) => join(folder, file).split(sep).join('/'));
}

function parsed(file: string, text = readFileSync(join(root, file), 'utf8')): ts.SourceFile {
  return ts.createSourceFile(file, text, ts.ScriptTarget.ES2022, true);
}

function layerOf(file: string): number {
  return LAYERS.findIndex((layer) => file === layer || file.startsWith(`${layer}/`));
}

/** Everything a file names in an import, a re-export or an import(). */
function importsOf(source: ts.SourceFile): string[] {
  const found: string[] = [];
  const visit = (node: ts.Node): void => {
    const names =
      ts.isImportDeclaration(node) || ts.isExportDeclaration(node)
        ? node.moduleSpecifier
        : ts.isCallExpression(node) && node.expression.kind === ts.SyntaxKind.ImportKeyword
          ? node.arguments[0]
          : undefined;
    if (names !== undefined) found.push(ts.isStringLiteralLike(names) ? names.text : '(computed)');
    ts.forEachChild(node, visit);
  };
  visit(source);
  return found;
}

/** Breaches of the import rules by one engine file. */
function importBreaches(source: ts.SourceFile): string[] {
  const file = source.fileName;
  return importsOf(source).filter((name) => {
    if (!name.startsWith('.')) return !ENGINE_PACKAGES.some((allowed) => allowed.test(name));
    const target = relative(root, resolve(root, dirname(file), name))
      .split(sep)
      .join('/');
    const to = layerOf(`${target}.ts`);
    const from = layerOf(file);
    return to < 0 || to > from || (to === from && dirname(target) !== dirname(file));
  });
}

/** Operations whose last bit may differ between engines, and clocks. */
function unportable(source: ts.SourceFile): string[] {
  const found: string[] = [];
  const visit = (node: ts.Node): void => {
    if (
      node.kind === ts.SyntaxKind.AsteriskAsteriskToken ||
      node.kind === ts.SyntaxKind.AsteriskAsteriskEqualsToken
    ) {
      found.push('**');
    }
    if (ts.isIdentifier(node) && ['Date', 'performance'].includes(node.text)) found.push(node.text);
    if (ts.isIdentifier(node) && node.text === 'Math') {
      const { parent } = node;
      // Math under another name would hide what is taken from it.
      const taken = ts.isPropertyAccessExpression(parent) ? parent.name.text : '(whole)';
      if (!PORTABLE_MATH.has(taken)) found.push(`Math.${taken}`);
    }
    ts.forEachChild(node, visit);
  };
  visit(source);
  return found;
}

/** eval and the Function constructor, called or passed on. */
function evaluations(source: ts.SourceFile): string[] {
  const found: string[] = [];
  const visit = (node: ts.Node): void => {
    const inType = ts.isTypeNode(node);
    if (!inType && ts.isIdentifier(node) && ['eval', 'Function'].includes(node.text)) {
      found.push(node.text);
    }
    if (!inType) ts.forEachChild(node, visit);
  };
  visit(source);
  return found;
}

const engine = filesIn('src');
const faces = filesIn('addin');

describe('the engine', () => {
  test('every file belongs to a layer [law]', () => {
    expect(engine.length).toBeGreaterThan(0);
    expect(engine.filter((file) => layerOf(file) < 0)).toEqual([]);
  });

  test.each(engine)(
    '%s imports only from its own folder, lower layers and allowed packages [law]',
    (file) => {
      expect(importBreaches(parsed(file))).toEqual([]);
    },
  );

  test.each(engine)('%s uses only operations that are the same everywhere [law]', (file) => {
    expect(unportable(parsed(file))).toEqual([]);
  });

  test('its packages are pinned, because another version may draw other values [law]', () => {
    const { dependencies } = JSON.parse(readFileSync(join(root, 'package.json'), 'utf8')) as {
      dependencies: Record<string, string>;
    };
    const loose = Object.entries(dependencies).filter(
      ([, version]) => !/^\d+\.\d+\.\d+$/.test(version),
    );
    expect(loose).toEqual([]);
  });
});

describe('engine and faces', () => {
  test.each([...engine, ...faces])('%s evaluates no text as code [law]', (file) => {
    expect(evaluations(parsed(file))).toEqual([]);
  });

  test.each(faces)('%s reaches the engine through src/index only [law]', (file) => {
    const reached = importsOf(parsed(file))
      .filter((name) => name.startsWith('.'))
      .map((name) =>
        relative(root, resolve(root, dirname(file), name))
          .split(sep)
          .join('/'),
      )
      .filter((target) => target.startsWith('src'));
    expect(reached.filter((target) => target !== 'src/index')).toEqual([]);
  });
});

describe('the checks above', () => {
  test.each([
    ['an upper layer', "import { a } from '../draw/column';"],
    ['a face', "import { a } from '../../addin/cli/run';"],
    ['another package', "import fs from 'node:fs';"],
    ['an upper layer by re-export', "export * from '../index';"],
    ['an upper layer at run time', "const a = import('../worksheet/draw');"],
    ['a computed name', 'const a = (name: string) => import(name);'],
  ])('find an import of %s [law]', (_, text) => {
    expect(importBreaches(parsed('src/formula/x.ts', text))).toHaveLength(1);
  });

  test('let a lower layer and an allowed package pass [law]', () => {
    const text =
      "import { a } from '../numeric/float'; import b from '@stdlib/b'; import './tape';";
    expect(importBreaches(parsed('src/formula/x.ts', text))).toEqual([]);
  });

  test.each([
    'Math.exp(1)',
    'Math.random()',
    "Math['exp'](1)",
    'const { exp } = Math',
    'a ** 2',
    'a **= 2',
    'Date.now()',
  ])('find %s [law]', (text) => {
    expect(unportable(parsed('src/x.ts', text))).toHaveLength(1);
  });

  test.each(["eval('1')", "new Function('return 1')", "Function('return 1')", '[1].map(eval)'])(
    'find %s [law]',
    (text) => {
      expect(evaluations(parsed('src/x.ts', text))).toHaveLength(1);
    },
  );
});
