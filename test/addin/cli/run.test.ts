import { version } from '../../../package.json';
import { run } from '../../../addin/cli/run';
import { catalogue } from '../../../addin/functions/catalogue';
import { call } from '../call';

const BLOCK = [
  ['density', 'EXP(-0.5*((x-m)/s)^2)'],
  ['from', 0],
  ['to', 12],
  ['rows', 5],
  ['seed', 'plan-2027'],
  ['label', 'downtime'],
  ['m', 4],
  ['s', 1.3],
];

function ran(argv: string[], files: Record<string, string> = {}) {
  let out = '';
  let err = '';
  const status = run(argv, {
    write: (text) => void (out += text),
    writeError: (text) => void (err += text),
    read: (file) => {
      const text = files[file];
      if (text === undefined) throw new Error(`no file ${file}`);
      return text;
    },
  });
  return { status, out, err };
}

describe('undercurve call', () => {
  const args = JSON.stringify([BLOCK]);
  const answer = ran(['call', 'UNDERCURVE.DRAW', args]);

  test('prints the cells of the function as JSON, one row a line [law]', () => {
    expect(answer).toEqual({ status: 0, err: '', out: expect.any(String) as string });
    expect(JSON.parse(answer.out)).toEqual(call('DRAW', BLOCK));
    expect(answer.out.trimEnd().split('\n')).toHaveLength(5 + 2);
  });

  test('takes the name without the namespace and in any case [law]', () => {
    expect(ran(['call', 'draw', args])).toEqual(answer);
    expect(ran(['call', 'Undercurve.Draw', args])).toEqual(answer);
  });

  test('reads the arguments from a file or standard input [law]', () => {
    expect(ran(['call', 'DRAW', '@block.json'], { 'block.json': args })).toEqual(answer);
    expect(ran(['call', 'DRAW', '-'], { '-': args })).toEqual(answer);
  });

  test('takes givens as flat trailing arguments [law]', () => {
    const spread = JSON.stringify([
      'EXP(-0.5*((x-m)/s)^2)',
      [[0, 12]],
      5,
      'plan-2027',
      'downtime',
      [['m', 4]],
      [['s', 1.3]],
    ]);
    expect(ran(['call', 'DRAW', spread])).toEqual(answer);
  });

  /** Arguments for the functions that a block alone does not satisfy. */
  const ARGUMENTS: Record<string, readonly unknown[]> = {
    PROFILE: [BLOCK, null, 20],
    BELOW: [BLOCK, null, [[3], [4]]],
    ABOVE: [BLOCK, null, [[3], [4]]],
    QUANTILE: [BLOCK, null, [[0.1], [0.9]]],
    EXPECT: [BLOCK, null, 'x'],
    FROMBINS: [[[0, 1, 3]], [[0.2, 0.8]]],
    FROMPERCENTILES: [[[0.1, 0.9]], [[2, 5]], 0, 9],
    FROMDATA: [[[1], [2], [4], [4.5], [7]]],
    BLEND: [[[0.9, 0.1]], BLOCK, BLOCK],
    CASES: [
      BLOCK,
      null,
      null,
      null,
      null,
      [
        ['presses', 'two', 'three'],
        ['m', 5, 4],
      ],
    ],
    EACH: [BLOCK, null, null, null, [['m'], [3], [4]]],
    TOTAL: [[[2], [0], [3]], BLOCK],
    PICK: [[['early'], ['late'], ['none']], [[2], [1], [0]], 5, 'plan-2027', 'harvest'],
    LINKEDSHARES: [
      [
        [1, 0.6],
        [0.6, 1],
      ],
      5,
      'plan-2027',
      'links',
    ],
    ALIGNRANKS: [
      Array.from({ length: 40 }, (_, i) => [i, i * i]),
      [
        [1, 0.6],
        [0.6, 1],
      ],
      'plan-2027',
      'links',
    ],
    RANKS: [Array.from({ length: 40 }, (_, i) => [i, (i * 7) % 40])],
    THIN: [[['early'], ['late'], ['none']], [[1], [1], [0]], 'plan-2027', 'harvest', 1],
    SUMMARY: [[['harvest'], [31], [28], [40]]],
    EXCEEDANCE: [[['harvest'], [31], [28], [40]], 30],
    ROWSNEEDED: [[[31], [28], [40]], null, 0.5],
    PAIREDCHANGE: [
      [[31], [28], [40]],
      [[33], [28], [41]],
    ],
    DRIVERS: [
      Array.from({ length: 20 }, (_, i) => [i, i % 3]),
      Array.from({ length: 20 }, (_, i) => [i * i]),
    ],
    CHECK: [[[3], [4.5], [4]], BLOCK],
    BESTOF: [
      [
        ['two', 'three'],
        [31, 33],
        [40, 36],
      ],
      true,
    ],
  };

  test.each(catalogue.map(({ name }) => name))('answers for UNDERCURVE.%s [law]', (name) => {
    const args = ARGUMENTS[name] ?? [BLOCK];
    const { status, out } = ran(['call', `UNDERCURVE.${name}`, JSON.stringify(args)]);
    expect(status).toBe(0);
    expect((JSON.parse(out) as unknown[]).length).toBeGreaterThan(1);
  });

  test('ends with 1 and the message of the function on standard error for wrong input [law]', () => {
    const { status, out, err } = ran(['call', 'DRAW', '["EXP(-x", [[0, 5]], 3, "plan", "a"]']);
    expect({ status, out }).toEqual({ status: 1, out: '' });
    expect(err).toMatch(/^.+: .+; .+\.\n$/);
  });

  test('ends with 1 and the code for an error cell among the arguments [law]', () => {
    expect(ran(['call', 'DRAW', '[{"error":"#N/A"}, [[0, 5]], 3, "plan", "a"]'])).toEqual({
      status: 1,
      out: '',
      err: '#N/A\n',
    });
  });
});

describe('undercurve functions', () => {
  test('names every function with its arguments and help [law]', () => {
    const { status, out } = ran(['functions']);
    expect(status).toBe(0);
    for (const { name, description, parameters } of catalogue) {
      expect(out).toContain(`UNDERCURVE.${name}(${parameters[0]!.name}, `);
      expect(out).toContain(description);
      for (const parameter of parameters) expect(out).toContain(parameter.description);
    }
  });

  test('--json lists the same as the catalogue [law]', () => {
    const { status, out } = ran(['functions', '--json']);
    expect(status).toBe(0);
    expect(JSON.parse(out)).toEqual(
      catalogue.map(({ name, description, parameters }) => ({
        name: `UNDERCURVE.${name}`,
        description,
        parameters,
      })),
    );
  });
});

describe('undercurve', () => {
  test('--version prints the version of the package [law]', () => {
    expect(ran(['--version'])).toEqual({ status: 0, out: `${version}\n`, err: '' });
  });

  test('--help tells the commands, the statuses and the caution [law]', () => {
    const { status, out } = ran(['--help']);
    expect(status).toBe(0);
    expect(out).toMatch(
      /undercurve call .*undercurve functions .*Status: .*do not make the shape right/s,
    );
  });

  test('--help shows an example that runs [law]', () => {
    const [, args] = /undercurve call UNDERCURVE\.DRAW '(.*)'/.exec(ran(['--help']).out) ?? [];
    const { status, out } = ran(['call', 'UNDERCURVE.DRAW', args ?? '']);
    expect([status, (JSON.parse(out) as unknown[]).length]).toEqual([0, 3]);
  });

  const more = '\nundercurve --help tells more.\n';
  test.each([
    [[], 'Command: none is given; give call or functions.'],
    [['drawn'], 'Command: "drawn" is unknown; give call or functions.'],
    [['call'], 'call: 0 words follow it; give a function and one JSON array of its arguments.'],
    [
      ['call', 'DRAW', '[1]', '[2]'],
      'call: 3 words follow it; give a function and one JSON array of its arguments.',
    ],
    [
      ['call', 'UNDERCURVE.DRAWN', '[1]'],
      `Function: "UNDERCURVE.DRAWN" is unknown; give one of ${catalogue.map(({ name }) => name).join(', ')}.`,
    ],
    [
      ['call', 'DRAW', '@none.json'],
      'Arguments: "@none.json" cannot be read (no file none.json); give a file that can.',
    ],
    [['functions', 'DRAW'], 'functions: "DRAW" is too much; give nothing after it.'],
    [['call', 'DRAW', '[1]', '--json'], '--json: belongs to the command functions; leave it out.'],
  ])('%j is wrong usage, status 2 [law]', (argv, message) => {
    expect(ran(argv)).toEqual({ status: 2, out: '', err: message + more });
  });

  test('an unknown option is wrong usage, status 2 [law]', () => {
    const { status, out, err } = ran(['--seed', '1']);
    expect({ status, out }).toEqual({ status: 2, out: '' });
    expect(err).toContain('--seed');
  });
});
