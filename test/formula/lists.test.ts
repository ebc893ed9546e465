/** Lists among the givens, long sums, and names that are cell addresses. */
import type { Cell, Range } from '../../src/index';
import { acceptance, draw, envelope } from '../../src/index';
import { MAX_OPERATIONS } from '../../src/formula/compile';
import { evaluator } from '../../src/formula/evaluate';
import type { Tape } from '../../src/formula/tape';
import { proveEnvelope } from '../../src/envelope/prove';
import { messageOf } from '../message';
import type { Givens } from './formulas';
import { tapeOf } from './formulas';

/** Invented weights of juice bottles, spread evenly around 4. */
function values(n: number): number[] {
  return Array.from({ length: n }, (_, i) => 4 + 3 * (((i * 0.6180339887498949) % 1) - 0.5));
}

function givensOf(n: number, more: Record<string, number> = {}): Givens {
  const list = { kind: 'list', values: values(n), fingerprint: '' } as const;
  return { obs: list, ...more };
}

function column(name: string, numbers: readonly number[]): Range {
  return [[name], ...numbers.map((value): Cell[] => [value])];
}

const nActive = ({ steps }: Tape): number => steps.filter((step) => step.nOperands > 0).length;

describe('a list in a formula', () => {
  test.each([
    ['SUM(obs)*x', (x: number, o: number[]) => o.reduce((a, b) => a + b) * x],
    [
      'SUM(((obs-x)/s)^2)',
      (x: number, o: number[]) => o.reduce((a, b) => a + ((b - x) / 1.3) ** 2, 0),
    ],
    ['AVERAGE(obs*x)', (x: number, o: number[]) => (o.reduce((a, b) => a + b) * x) / o.length],
    [
      'PRODUCT(1+(obs-x)^2)',
      (x: number, o: number[]) => o.reduce((a, b) => a * (1 + (b - x) ** 2), 1),
    ],
    ['MAX(obs)+x', (x: number, o: number[]) => Math.max(...o) + x],
    ['SUM(IF(obs<x,1,0))', (x: number, o: number[]) => o.filter((b) => b < x).length],
  ])('%s works it element by element [law]', (text, wanted) => {
    const at = evaluator(tapeOf(text, givensOf(40, { s: 1.3 })));
    for (const x of [0.5, 3.9, 4.7, 11]) {
      // 200 operations, each within 2^-53 and none cancelling by more than 100.
      const right = wanted(x, values(40));
      expect(Math.abs(at(x) - right)).toBeLessThanOrEqual(200 * 100 * 2 ** -53 * Math.abs(right));
    }
  });

  test('one value is a list too [law]', () => {
    expect(evaluator(tapeOf('SUM(obs)*x', givensOf(1)))(3)).toBe(values(1)[0]! * 3);
  });

  test('draws do not depend on how a likelihood is written out [law]', () => {
    const obs = values(6);
    const written = obs.map((o) => `((${o}-x)/1.3)^2`).join(',');
    const args = [[[0, 12]], [[500]], [['plan-2027']], [['weight']]] as const;
    const listed = draw([['EXP(-0.5*SUM(((obs-x)/s)^2))']], ...args, [
      column('obs', obs),
      [['s', 1.3]],
    ]);
    expect(listed).toEqual(draw([[`EXP(-0.5*SUM(${written}))`]], ...args, []));
  });

  test('ACCEPTANCE tells how many values it read, and which may be blanks [law]', () => {
    const items = acceptance(
      [['EXP(-SUM((obs-x)^2))']],
      [[0, 12]],
      [[100]],
      [['plan-2027']],
      [['weight']],
      [
        column('obs', [4, 0, 6]),
        [
          ['day', 'base'],
          [0, 1],
          [5, 2],
        ],
      ],
    );
    expect(items.filter(([item]) => `${item as string}`.startsWith('given'))).toEqual([
      ['given obs', 'list of 3 values from 0 to 6, 1 of them 0 or blank'],
      ['given base', 'function through 2 points'],
    ]);
  });

  test.each([
    [
      'obs*x',
      'Formula, character 1: an array where a single number belongs; put it inside SUM, PRODUCT or another function that takes many numbers.',
    ],
    [
      'obs(x)',
      'Formula, character 1: brackets after something that is not a function; put * before the bracket to multiply.',
    ],
    [
      'SUM(obs*{1;2})',
      'Formula, character 8: arrays of different sizes; use arrays with the same number of elements.',
    ],
  ])('refuses %s [law]', (text, message) => {
    expect(messageOf(() => tapeOf(text, givensOf(3)))).toBe(message);
  });
});

describe('collectSums', () => {
  test.each([
    ['EXP(-0.5*SUM(((obs-x)/s)^2))', 8],
    ['EXP(-SUM(((obs-m)/x)^2))', 8],
    ['EXP(SUM(obs*LN(x)-x))', 8],
    ['EXP(-SUM((LN(obs)-x)^2/(2*s^2)))', 8],
    ['EXP(-SUM((obs-x)*(obs-x))-SUM((obs+1-x)^2))', 10],
  ])('leaves at most a handful of operations of %s [law]', (text, most) => {
    expect(nActive(tapeOf(text, givensOf(1000, { m: 4, s: 1.3 })))).toBeLessThanOrEqual(most);
  });

  test.each([
    'SUM(((obs-x)/s)^2)',
    'SUM(((obs-m)/x)^2)',
    'SUM(obs*LN(x)-x)',
    'SUM((LN(obs)-x)^2/(2*s^2))',
    'SUM((obs-x)^2)-SUM((obs-x)^2/2)',
    'SUM(obs*x)-SUM(x*3)',
    '100-SUM((obs-LN(x))^2/40)',
  ])('%s keeps its value [law]', (text) => {
    const givens = givensOf(50, { m: 4, s: 1.3 });
    const at = evaluator(tapeOf(text, givens));
    // Adding 0*ABS(x) hides each term from the collection without changing its value.
    for (const x of [0.5, 2, 3.9, 7.5]) {
      const plain = evaluator(tapeOf(text.replace(/\bobs\b/g, '(obs+0*ABS(x))'), givens))(x);
      // 300 operations, each within 2^-53 of numbers up to 50 times the result.
      expect(Math.abs(at(x) - plain)).toBeLessThan(300 * 50 * 2 ** -53 * Math.abs(plain));
    }
  });

  test('encloses a sum far from 0 as tightly as one near it [law]', () => {
    // Expanded around 0 the squares would cancel: (10^6)² against a sum of about 750.
    const list = {
      kind: 'list',
      values: values(1000).map((v) => 1e6 + v),
      fingerprint: '',
    } as const;
    const { steps } = tapeOf('SUM((obs-x)^2)', { obs: list });
    const constants = steps.flatMap(({ enclosure }) => (enclosure ? [enclosure] : []));
    expect(constants.length).toBeGreaterThan(0);
    for (const { lo, hi } of constants) expect(hi - lo).toBeLessThanOrEqual(1e-9 * Math.abs(lo));
  });

  test('fewer than 8 terms stay as they are written [law]', () => {
    expect(nActive(tapeOf('SUM((obs-x)^2)', givensOf(7)))).toBe(7 + 7 + 6);
    expect(nActive(tapeOf('SUM((obs-x)^2)', givensOf(8)))).toBeLessThan(8);
  });

  test('terms of their own stay too [law]', () => {
    expect(nActive(tapeOf('SUM(LN(obs+x))', givensOf(20)))).toBe(20 + 20 + 19);
  });
});

describe('the likelihood of 1,000 values', () => {
  // The posterior of a mean is normal around the average with deviation s/√n.
  test('is proved to 0.99 around their average [law]', () => {
    const { pieces, upperArea, lowerArea } = proveEnvelope(
      tapeOf('EXP(-0.5*SUM(((obs-x)/s)^2))', givensOf(1000, { s: 1.3 })),
      0,
      12,
    );
    const tallest = pieces.reduce((a, b) =>
      b.upperArea / (b.to - b.from) > a.upperArea / (a.to - a.from) ? b : a,
    );
    const mean = values(1000).reduce((a, b) => a + b) / 1000;
    expect(lowerArea / upperArea).toBeGreaterThanOrEqual(0.99);
    expect(Math.abs(tallest.from - mean)).toBeLessThan((2 * 1.3) / Math.sqrt(1000));
    expect(pieces.length).toBeLessThan(60);
  });
});

describe('a likelihood with heavy tails, too small for doubles', () => {
  // e^-3000 leaves only the logarithm: its slope must not suffer from values near x, where ln|obs − x| is steep.
  test('is proved in as few pieces as its logarithm needs [law]', () => {
    const text = 'EXP(-3000)*PRODUCT((1+((obs-x)/s)^2)^-2)';
    const { pieces, upperArea, lowerArea, exponent } = proveEnvelope(
      tapeOf(text, givensOf(60, { s: 1.3 })),
      0,
      12,
    );
    expect(exponent).toBeLessThan(-4000);
    expect(lowerArea / upperArea).toBeGreaterThanOrEqual(0.99);
    expect(pieces.length).toBeLessThan(100);
  });
});

describe('what is too much', () => {
  test('says how many operations a list comes to [law]', () => {
    const text = 'PRODUCT(1+1/(1+(obs-x)^2))';
    // −, ^, +, /, + for each value and one product fewer than values.
    const n = 6 * 2000 - 1;
    expect(n).toBeGreaterThan(MAX_OPERATIONS);
    expect(messageOf(() => tapeOf(text, givensOf(2000)))).toBe(
      `Formula: ${n} operations on x, each element of a list counted; use at most 10000: shorten the formula or the lists, or work out beforehand what does not depend on x.`,
    );
  });

  test('stops writing out before it takes long [law]', () => {
    const text =
      'LET(f,LAMBDA(t,SUM((obs-t)^2)),g,LAMBDA(t,f(t)+f(t+1)+f(t+2)+f(t+3)),g(x)+g(2*x))';
    expect(messageOf(() => tapeOf(text, givensOf(20_000)))).toMatch(
      /^Formula, character \d+: more than 200000 operations once LET, LAMBDA and lists are written out; shorten the formula or the lists\.$/,
    );
  });

  test('what does not depend on x counts for nothing [law]', () => {
    expect(
      nActive(tapeOf('EXP(-x/SUM(((obs-m)/s)^2))', givensOf(20_000, { m: 4, s: 1.3 }))),
    ).toBeLessThan(5);
  });

  test.each([
    [
      'no heading',
      [[4], [5]],
      "givens (argument 6): a column that begins with 4; write the list's name above its values.",
    ],
    [
      'no values',
      [['obs']],
      'givens (argument 6), "obs": a list without values; give numbers below the heading.',
    ],
    [
      'a text',
      [['obs'], [4], ['five']],
      'givens (argument 6), "obs", row 3: "five" is not a number; give a number.',
    ],
    [
      "the variable's name",
      [['x'], [4]],
      'givens (argument 6), "x": it is the name of the variable; rename the given, or the variable in limits.',
    ],
    [
      'too many values',
      column('obs', values(20_001)),
      'givens (argument 6), "obs": a list of 20001 values; give at most 20000.',
    ],
  ] as [string, Range, string][])('a list with %s is refused [law]', (_, list, message) => {
    expect(messageOf(() => draw([['x']], [[0, 1]], [[5]], [['s']], [['l']], [list]))).toBe(message);
  });
});

describe('names that are cell addresses', () => {
  const area = (density: string, ...givens: readonly Range[]): number => {
    const [, ...pieces] = envelope([[density]], [[0, 10]], givens) as number[][];
    return pieces.reduce((sum, p) => sum + ((p[2]! + p[3]!) / 2) * (p[1]! - p[0]!), 0);
  };

  test.each([
    ['B2', '$B$2'],
    ['$B$2', 'B2'],
    ['b2', '=B$2'],
    ['Sheet1!B2', 'Sheet1!$B$2'],
    ['Sheet1!B2', "'Sheet1'!B2"],
    ["'Sheet1'!B2", 'SHEET1!B2'],
    ["'Juice plan'!$B$2", "'Juice plan'!B2"],
    ["'Anna''s plan'!B2", "'Anna''s plan'!B2"],
  ])('a given %s is %s in a formula [law]', (name, used) => {
    expect(area(`${used}*1`.replace(/^=?/, '='), [[name, 3]])).toBeCloseTo(30, 9);
  });

  test('a list may be named by its range [law]', () => {
    expect(area('SUM($B$2:$B$4)', column('B2:B4', [1, 2, 3]))).toBeCloseTo(60, 9);
  });

  test.each([
    [
      'C3',
      'Formula, character 1: "C3" is a cell address with no given; add a row C3 | value to the givens, or write the value itself.',
    ],
    [
      'SUM(C3:C9)',
      'Formula, character 5: "C3:C9" is a cell address with no given; add a column with the heading C3:C9 to the givens, or write its values as an array such as {1,2,3}.',
    ],
    [
      'Sheet2!B2',
      'Formula, character 1: "Sheet2!B2" is a cell address with no given; add a row Sheet2!B2 | value to the givens, or write the value itself.',
    ],
  ])('%s without a given is refused [law]', (density, message) => {
    expect(messageOf(() => area(density, [['Sheet1!B2', 3]]))).toBe(message);
  });

  test('two spellings of one address are one name [law]', () => {
    expect(
      messageOf(() =>
        area('B2', [
          ['B2', 3],
          ['$B$2', 4],
        ]),
      ),
    ).toBe('givens (argument 3), "$B$2": it is the same name as "B2"; keep one of the two.');
  });
});

describe('limits that name a given', () => {
  const drawn = (density: Range, limits: Range | null, ...givens: readonly Range[]): number[] =>
    draw(density, limits, [[200]], [['s']], [['l']], givens).map(([value]) => value as number);
  const most = [['most', 4]] as const;

  test.each([
    [[['1']], [[0, 'most']], [most]],
    [[['1']], [[0], [' MOST ']], [most]],
    [[['1']], [['x', 0, 'most']], [most]],
    [
      [
        ['density', '1'],
        ['from', 0],
        ['to', 'most'],
        ['most', 4],
      ],
      null,
      [],
    ],
    [
      [
        ['density', '1'],
        ['from', 0],
        ['to', 'most'],
      ],
      null,
      [most],
    ],
    [
      [
        [0, 1],
        [10, 1],
      ],
      [['most', 10]],
      [most],
    ],
  ] as [Range, Range | null, Range[]][])(
    '%j within %j take its value [law]',
    (density, limits, givens) => {
      const isUpper = limits?.[0]?.[1] !== 10;
      const values = drawn(density, limits, ...givens);
      expect(
        values.every((value) => (isUpper ? value >= 0 && value <= 4 : value >= 4 && value <= 10)),
      ).toBe(true);
    },
  );

  test.each([
    [
      'most',
      'limits (argument 2), to: "most" is the name of a list; give a number or the name of a constant.',
      column('most', [4]),
    ],
    [
      'most',
      'limits (argument 2), to: "most" is the name of a function; give a number or the name of a constant.',
      [
        ['x', 'most'],
        [0, 1],
        [1, 1],
      ],
    ],
    [
      'least',
      'limits (argument 2), to: "least" is neither a number nor the name of a given; give a number, or the word unbounded.',
      most,
    ],
    [
      'most',
      'limits (argument 2): from (5) is not below to (4); give from first and a larger to.',
      most,
    ],
  ] as [string, string, Range][])('refuse %s: %s [law]', (name, message, givens) => {
    const from = message.includes('from (5)') ? 5 : 0;
    expect(messageOf(() => drawn([['1']], [[from, name]], givens))).toBe(message);
  });
});
