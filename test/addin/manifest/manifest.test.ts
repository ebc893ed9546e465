/**
 * Holds the manifest to what Excel asks of an add-in-only XML manifest with a shared
 * runtime (common practice, from the platform's public documentation): the validator
 * of the platform calls an online service, so the rules are asserted here.
 */
import { execFileSync } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { XMLParser, XMLValidator } from 'fast-xml-parser';
import { version } from '../../../package.json';

const root = resolve(__dirname, '../../..');
const source = readFileSync(join(root, 'manifest/manifest.xml'), 'utf8');
const DEVELOPMENT_URL = 'https://localhost:3000';

interface Element {
  readonly name: string;
  readonly attributes: Readonly<Record<string, string>>;
  readonly children: readonly Element[];
  readonly text: string;
}

/** The parser's ordered form as plain elements; comments and declarations left out. */
function elements(nodes: readonly Record<string, unknown>[]): Element[] {
  return nodes.flatMap((node) => {
    const name = Object.keys(node).find((key) => key !== ':@');
    if (name === undefined || name.startsWith('#') || name.startsWith('?')) return [];
    const inner = node[name] as Record<string, unknown>[];
    return [
      {
        name,
        attributes: (node[':@'] ?? {}) as Record<string, string>,
        children: elements(inner),
        text: inner.map((child) => (child['#text'] as string | undefined) ?? '').join(''),
      },
    ];
  });
}

function parse(xml: string): Element {
  const parser = new XMLParser({
    preserveOrder: true,
    ignoreAttributes: false,
    attributeNamePrefix: '',
    parseTagValue: false,
  });
  const [top] = elements(parser.parse(xml) as Record<string, unknown>[]);
  if (top === undefined) throw new Error('The manifest has no root element.');
  return top;
}

function all(element: Element): Element[] {
  return [element, ...element.children.flatMap(all)];
}

function at(element: Element, ...path: string[]): Element {
  return path.reduce((inner, name) => {
    const found = inner.children.find((child) => child.name === name);
    if (found === undefined) throw new Error(`${inner.name} has no ${name}.`);
    return found;
  }, element);
}

const names = (element: Element) => element.children.map((child) => child.name);
const manifest = parse(source);
const overrides = at(manifest, 'VersionOverrides');
const host = at(overrides, 'Hosts', 'Host');
const resources = at(overrides, 'Resources');

describe('manifest.xml', () => {
  test('is well-formed [law]', () => {
    expect(XMLValidator.validate(source)).toBe(true);
  });

  test('OfficeApp has its elements in the order of the schema [law]', () => {
    expect(manifest.name).toBe('OfficeApp');
    expect(manifest.attributes['xsi:type']).toBe('TaskPaneApp');
    expect(names(manifest)).toEqual([
      ...['Id', 'Version', 'ProviderName', 'DefaultLocale', 'DisplayName', 'Description'],
      ...['IconUrl', 'HighResolutionIconUrl', 'SupportUrl', 'AppDomains', 'Hosts'],
      ...['Requirements', 'DefaultSettings', 'Permissions', 'VersionOverrides'],
    ]);
  });

  test('Id is a GUID and Version is the version of the package in four parts [law]', () => {
    expect(at(manifest, 'Id').text).toMatch(/^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/);
    expect(at(manifest, 'Version').text).toBe(`${version}.0`);
  });

  test('Requirements ask for the shared runtime and for errors with any code [law]', () => {
    const sets = at(manifest, 'Requirements', 'Sets').children.map(({ attributes }) => [
      attributes.Name,
      attributes.MinVersion,
    ]);
    expect(sets).toEqual([
      ['SharedRuntime', '1.1'],
      ['CustomFunctionsRuntime', '1.3'],
    ]);
  });

  test('Host begins with the runtime, then functions, then the pane [law]', () => {
    expect(host.attributes['xsi:type']).toBe('Workbook');
    expect(names(host)).toEqual(['Runtimes', 'AllFormFactors', 'DesktopFormFactor']);
    expect(at(host, 'Runtimes', 'Runtime').attributes).toEqual({
      resid: 'Pane.Url',
      lifetime: 'long',
    });
  });

  test('runtime, page, function file and pane are one resource, as a shared runtime needs [law]', () => {
    const point = at(host, 'AllFormFactors', 'ExtensionPoint');
    expect(point.attributes['xsi:type']).toBe('CustomFunctions');
    expect(names(point)).toEqual(['Script', 'Page', 'Metadata', 'Namespace']);
    const desktop = at(host, 'DesktopFormFactor');
    expect(names(desktop)).toEqual(['GetStarted', 'FunctionFile', 'ExtensionPoint']);
    const action = all(desktop).find(({ name }) => name === 'Action');
    expect(action?.attributes['xsi:type']).toBe('ShowTaskpane');
    expect(action?.children.map(({ name }) => name)).toEqual(['SourceLocation']);
    expect([
      at(point, 'Page', 'SourceLocation').attributes.resid,
      at(desktop, 'FunctionFile').attributes.resid,
      action?.children[0]?.attributes.resid,
    ]).toEqual(['Pane.Url', 'Pane.Url', 'Pane.Url']);
  });

  test('the ribbon button has its elements in order [law]', () => {
    const group = all(host).find(({ name }) => name === 'Group');
    expect(group && names(group)).toEqual(['Label', 'Icon', 'Control']);
    const button = all(host).find(({ name }) => name === 'Control');
    expect(button?.attributes['xsi:type']).toBe('Button');
    expect(button && names(button)).toEqual(['Label', 'Supertip', 'Icon', 'Action']);
    expect(button && names(at(button, 'Supertip'))).toEqual(['Title', 'Description']);
    for (const icon of all(host).filter(({ name }) => name === 'Icon')) {
      expect(icon.children.map(({ attributes }) => attributes.size)).toEqual(['16', '32', '80']);
    }
  });

  test('every resid names a resource of the right kind, and every resource is used [law]', () => {
    const kindOf = new Map(
      resources.children.flatMap((group) =>
        group.children.map(({ attributes }) => [attributes.id, group.name] as const),
      ),
    );
    const used = all(host).flatMap(({ name, attributes }) =>
      attributes.resid === undefined ? [] : [[name, attributes.resid] as const],
    );
    const KINDS: Record<string, string> = {
      'bt:Image': 'bt:Images',
      Runtime: 'bt:Urls',
      SourceLocation: 'bt:Urls',
      FunctionFile: 'bt:Urls',
      LearnMoreUrl: 'bt:Urls',
      Namespace: 'bt:ShortStrings',
      Label: 'bt:ShortStrings',
      Title: 'bt:ShortStrings',
      Description: 'bt:LongStrings',
    };
    for (const [name, resid] of used)
      expect([resid, kindOf.get(resid)]).toEqual([resid, KINDS[name]]);
    expect([...kindOf.keys()].sort()).toEqual([...new Set(used.map(([, resid]) => resid))].sort());
    // Longer ids are refused (common practice).
    for (const id of kindOf.keys()) expect(id?.length).toBeLessThanOrEqual(32);
  });

  test('texts keep to the lengths that the platform allows [law]', () => {
    const texts = (kind: string) =>
      at(resources, kind).children.map(({ attributes }) => attributes.DefaultValue ?? '');
    for (const text of texts('bt:ShortStrings')) expect(text.length).toBeLessThanOrEqual(125);
    for (const text of texts('bt:LongStrings')) expect(text.length).toBeLessThanOrEqual(250);
    expect(at(manifest, 'Description').attributes.DefaultValue?.length).toBeLessThanOrEqual(250);
  });

  test('every address is https and under the development address [law]', () => {
    const addresses = all(manifest)
      .flatMap(({ attributes, text }) => [...Object.values(attributes), text])
      .filter((value) => /^[a-z]+:\/\//.test(value) && !value.includes('schemas.microsoft.com'))
      .filter((value) => !value.includes('www.w3.org'));
    expect(addresses.length).toBeGreaterThan(8);
    expect(addresses.filter((address) => !address.startsWith(DEVELOPMENT_URL))).toEqual([]);
  });

  test.each([
    ['icon-16.png', 16],
    ['icon-32.png', 32],
    ['icon-64.png', 64],
    ['icon-80.png', 80],
  ])('%s is named and is a PNG of %i pixels on each side [law]', (file, size) => {
    expect(source).toContain(`${DEVELOPMENT_URL}/assets/${file}`);
    const png = readFileSync(join(root, 'addin/assets', file));
    // PNG specification (W3C, 2003), 5.2 and 11.2.2: signature, then IHDR with width and height.
    expect(png.subarray(0, 8).toString('hex')).toBe('89504e470d0a1a0a');
    expect([png.readUInt32BE(16), png.readUInt32BE(20)]).toEqual([size, size]);
  });

  test('every file it names is in the built add-in [law]', () => {
    const files = [...source.matchAll(/"https:\/\/localhost:3000\/([^"]+)"/g)].map(
      ([, file]) => file,
    );
    expect(files.length).toBeGreaterThan(8);
    expect(files.filter((file) => !existsSync(join(root, '.build/addin', file ?? '')))).toEqual([]);
  });
});

describe('builtManifest(baseUrl)', () => {
  const built = (baseUrl: string) =>
    execFileSync(
      process.execPath,
      [
        '--input-type=module',
        '--eval',
        "import { builtManifest } from './.scripts/built-manifest.mjs'; console.log(builtManifest(process.argv[1]));",
        baseUrl,
      ],
      { cwd: root, encoding: 'utf8', stdio: ['ignore', 'pipe', 'ignore'] },
    );

  test('puts the public address in place of the development one everywhere [law]', () => {
    const text = built('https://example.com/undercurve/');
    expect(text).not.toContain('localhost');
    const pane = all(parse(text)).find(({ attributes }) => attributes.id === 'Pane.Url');
    expect(pane?.attributes.DefaultValue).toBe('https://example.com/undercurve/pane.html');
  });

  test.each(['http://example.com', 'example.com', 'https://example.com/?a=1'])(
    'refuses %s, which Excel would not load [law]',
    (baseUrl) => {
      expect(() => built(baseUrl)).toThrow();
    },
  );
});
