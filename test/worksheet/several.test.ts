import type { Range } from '../../src/index';
import {
  acceptance,
  below,
  cases,
  draw,
  envelope,
  expect as mean,
  profile,
  proposals,
} from '../../src/index';
import { messageOf } from '../message';

const PLANS: Range = [
  ['name', 'from', 'to'],
  ['early', 0, 90],
  ['late', 0, 90],
];
const CONDITIONS: Range = [['early+late<=90'], ['early*late>=least'], ['late>=0.5*early']];
const GIVENS: Range[] = [[['least', 400]]];
const SQUARE: Range = [
  ['early', 0, 80],
  ['late', 0, 80],
];
const SEED = [['plan-2027']];
const LABEL = [['plans']];
const CRATES: Range = ['a', 'b', 'q'].map((name) => [name, 0, 40, 1]);

const valueOf = (lines: Range, item: string) => lines.find(([name]) => name === item)?.[1];

describe('draw in several variables', () => {
  const rows = draw(CONDITIONS, PLANS, [[400]], SEED, LABEL, GIVENS) as number[][];

  it('gives a row a plan, one column a variable, all of which satisfy the conditions [law]', () => {
    expect(rows).toHaveLength(400);
    for (const [early, late] of rows)
      expect(early! + late! <= 90 && early! * late! >= 400 && late! >= 0.5 * early!).toBe(true);
  });

  it('is the same for one text with AND as for a column of conditions [law]', () => {
    const one = [['AND(early+late<=90,early*late>=least,late>=0.5*early)']];
    expect(draw(one, PLANS, [[400]], SEED, LABEL, GIVENS)).toEqual(rows);
  });

  it('takes first row and last row [law]', () => {
    expect(draw(CONDITIONS, PLANS, [[101, 110]], SEED, LABEL, GIVENS)).toEqual(
      rows.slice(100, 110),
    );
  });

  it('serves an equation of counted variables [law]', () => {
    const crates = draw([['a+b+q=40']], CRATES, [[300]], SEED, LABEL, []) as number[][];
    for (const [a, b, q] of crates) {
      expect([a, b, q].every(Number.isInteger)).toBe(true);
      expect(a! + b! + q!).toBe(40);
    }
  });

  it('takes a counted variable of a single value [law]', () => {
    const limits: Range = [
      ['early', 5, 5, 1],
      ['late', 0, 90, 1],
    ];
    const rows = draw([['early+late<=7']], limits, [[100]], SEED, LABEL, []) as number[][];
    expect(new Set(rows.map(([early]) => early))).toEqual(new Set([5]));
    expect(new Set(rows.map(([, late]) => late))).toEqual(new Set([0, 1, 2]));
  });

  it('takes steps of parts and mixes counted and continuous variables [law]', () => {
    const limits: Range = [
      ['boxes', 0, 2, 0.25],
      ['price', 1, 3, 0],
    ];
    const mixed = draw([['boxes*price<=4']], limits, [[300]], SEED, LABEL, []) as number[][];
    expect(mixed.every(([boxes]) => Number.isInteger(4 * boxes!))).toBe(true);
    expect(new Set(mixed.map(([boxes]) => boxes)).size).toBe(9);
    expect(new Set(mixed.map(([, price]) => price)).size).toBe(300);
  });

  it('takes tables as functions of any variable [law]', () => {
    const demand: Range = [
      ['day', 'demand'],
      [0, 0],
      [45, 1],
      [90, 0],
    ];
    const drawn = draw(
      [['demand(early)*demand(late)'], ['early<late']],
      PLANS,
      [[500]],
      SEED,
      LABEL,
      [demand],
    ) as number[][];
    expect(drawn.every(([early, late]) => early! < late!)).toBe(true);
    const average = drawn.reduce((sum, [early]) => sum + early!, 0) / 500;
    // The lesser of two triangular days: about 45 − 10.5, far from 45.
    expect(average).toBeGreaterThan(30);
    expect(average).toBeLessThan(40);
  });

  it('takes LAMBDA of the variables in the order of the limits [law]', () => {
    const lambda = [['=LAMBDA(e,l,AND(e+l<=90,e*l>=least,l>=0.5*e))']];
    const drawn = draw(lambda, PLANS, [[50]], SEED, LABEL, GIVENS) as number[][];
    for (const [early, late] of drawn) expect(early! * late!).toBeGreaterThanOrEqual(400);
  });
});

describe('companions in several variables', () => {
  it('ACCEPTANCE brackets the volume and says what each condition alone cuts [law]', () => {
    const lines = acceptance(CONDITIONS, PLANS, [[400]], SEED, LABEL, GIVENS);
    const [least, most] = ['volume at least', 'volume at most'].map((item) =>
      Number(valueOf(lines, item)),
    );
    // ∫ of the plan's area: early from r to s, late from max(400/early, early/2) to 90 − early.
    const corner = Math.sqrt(800);
    const start = 45 - Math.sqrt(45 * 45 - 400);
    const area =
      90 * (60 - start) -
      (60 * 60 - start * start) / 2 -
      400 * Math.log(corner / start) -
      (60 * 60 - corner * corner) / 4;
    expect(least).toBeLessThan(area);
    expect(most).toBeGreaterThan(area);
    expect(most! / least!).toBeLessThan(1.06);
    // Half of the limits lies beyond early + late = 90, a quarter below late = early/2.
    const cut = (text: string, end: string) =>
      Number(valueOf(lines, `share of the limits that ${text} alone cuts, at ${end}`));
    expect(cut('early+late<=90', 'least')).toBeLessThan(0.5);
    expect(cut('early+late<=90', 'most')).toBeGreaterThan(0.5);
    expect(cut('late>=0.5*early', 'least')).toBeGreaterThan(0.24);
    expect(cut('late>=0.5*early', 'most')).toBeLessThan(0.26);
    expect(valueOf(lines, 'breaches')).toBe(0);
    expect(valueOf(lines, 'given least')).toBe(400);
  });

  it('ENVELOPE lists the boxes, and their shares add up [law]', () => {
    const [headings, ...boxes] = envelope(CONDITIONS, PLANS, GIVENS) as [string[], ...number[][]];
    expect(headings).toEqual([
      'early from',
      'early to',
      'late from',
      'late to',
      'upper',
      'lower, share of upper',
      'share of proposals',
      'acceptance',
    ]);
    expect(boxes.reduce((sum, box) => sum + box[6]!, 0)).toBeCloseTo(1, 10);
    expect(boxes.length).toBe(
      valueOf(acceptance(CONDITIONS, PLANS, [[5]], SEED, LABEL, GIVENS), 'boxes'),
    );
    expect(envelope([['EXP(-early/9-late/5)'.replace('(-', '(0-')]], PLANS, [])[0]).toContain(
      'slope of LN(upper) along late',
    );
  });

  it('PROPOSALS names the variables, and its kept lines are the draws [law]', () => {
    const [headings, ...lines] = proposals(CONDITIONS, PLANS, [[50]], SEED, LABEL, GIVENS);
    expect(headings).toEqual([
      'row',
      'attempt',
      'early',
      'late',
      'height drawn',
      'density there',
      'kept',
    ]);
    expect(lines.filter((line) => line[6] === true).map((line) => line.slice(2, 4))).toEqual(
      draw(CONDITIONS, PLANS, [[50]], SEED, LABEL, GIVENS),
    );
  });

  it('EXPECT agrees with the mean of many draws [law]', () => {
    const [, [value, atLeast, atMost]] = mean(CONDITIONS, PLANS, [['early+late']], GIVENS) as [
      unknown,
      [number, number, number],
    ];
    const n = 20_000;
    const drawn = draw(CONDITIONS, PLANS, [[n]], SEED, LABEL, GIVENS) as number[][];
    const sums = drawn.map(([early, late]) => early! + late!);
    const average = sums.reduce((a, b) => a + b, 0) / n;
    const spread = Math.sqrt(sums.reduce((a, b) => a + (b - average) ** 2, 0) / n);
    expect(Math.abs(average - value)).toBeLessThan(
      (4.9 * spread) / Math.sqrt(n) + atMost - atLeast,
    );
    expect(atLeast <= value && value <= atMost).toBe(true);
    expect(atMost - atLeast).toBeLessThan(0.4);
  });
});

describe('several variables, wrong input', () => {
  const drawn = (density: Range, limits: Range, label: Range = LABEL) =>
    messageOf(() => draw(density, limits, [[5]], SEED, label, []));

  it.each<[string, () => string, string]>([
    [
      'limits without names',
      () =>
        drawn(
          [['a+b<1']],
          [
            [0, 1],
            [0, 1],
          ],
        ),
      'limits (argument 2): 2 rows and 2 columns; give several variables a row name, from, to each.',
    ],
    [
      'a density that is negative in boxes that touch 0',
      () => drawn([['(early-40)*(late-40)']], SQUARE),
      'Density: it is negative at early = 20, late = 60 (-400); heights must be 0 or more; use MAX(0, …) if that is meant.',
    ],
    [
      'a pole in a corner',
      () => drawn([['1/(early+late)']], SQUARE),
      'Density: it cannot be bounded for early from 0 to 5e-324, late from 0 to 5e-324; leave it out by the limits or a condition, or cap the height, as in MIN(…, 1000), if that is meant: a pole is not drawn in several variables.',
    ],
    [
      'a name twice',
      () =>
        drawn(
          [['a<1']],
          [
            ['a', 0, 1],
            ['A', 0, 1],
          ],
        ),
      'limits (argument 2): "A" stands twice; give each variable its own name.',
    ],
    [
      'more variables than six',
      () =>
        drawn(
          [['a<1']],
          [...'abpqstu'].map((name) => [name, 0, 1]),
        ),
      'limits (argument 2): 7 variables; give at most 6, or draw some of them apart.',
    ],
    [
      'an unbounded limit',
      () =>
        drawn(
          [['EXP(0-a-b)']],
          [
            ['a', 0, 'unbounded'],
            ['b', 0, 1],
          ],
        ),
      'limits (argument 2), a: a limit is unbounded; give numbers as limits to each of several variables.',
    ],
    [
      'from above to',
      () =>
        drawn(
          [['a<b']],
          [
            ['a', 0, 1],
            ['b', 3, 1],
          ],
        ),
      'limits (argument 2), b: from (3) is not below to (1); give from first and a larger to.',
    ],
    [
      'a step below 0',
      () =>
        drawn(
          [['a<b']],
          [
            ['a', 0, 9, -1],
            ['b', 0, 9, 1],
          ],
        ),
      'limits (argument 2), a, step: -1 is below 0; give 0 for a continuous variable, or 1.',
    ],
    [
      'two labels',
      () => drawn(CONDITIONS.slice(2), PLANS, [['plans', 'other']]),
      'label (argument 5): 2 labels for a shape of 2 variables; give one label; the columns are the variables.',
    ],
    [
      'a table of points',
      () =>
        drawn(
          [
            [0, 1],
            [9, 3],
          ],
          PLANS,
        ),
      'limits (argument 2): 2 variables for a table of points; give the table among the givens, and a formula that uses it, such as base(early)*base(late).',
    ],
    [
      'an unknown name',
      () => drawn([['early+lat<=90']], PLANS),
      'Formula, character 7: "lat" is not a known name; add it to the givens, or use one of: early, late.',
    ],
    [
      'PROFILE',
      () => messageOf(() => profile(CONDITIONS, PLANS, null, GIVENS)),
      'limits (argument 2): 2 variables; give one: only DRAW, ENVELOPE, ACCEPTANCE, PROPOSALS and EXPECT take several.',
    ],
    [
      'BELOW',
      () => messageOf(() => below(CONDITIONS, PLANS, [[5]], GIVENS)),
      'limits (argument 2): 2 variables; give one: only DRAW, ENVELOPE, ACCEPTANCE, PROPOSALS and EXPECT take several.',
    ],
    [
      'CASES',
      () => messageOf(() => cases(CONDITIONS, PLANS, [[5]], SEED, LABEL, [['a']], GIVENS)),
      'limits (argument 2): 2 variables; give one: only DRAW, ENVELOPE, ACCEPTANCE, PROPOSALS and EXPECT take several.',
    ],
    [
      'a mean without a bound',
      () => messageOf(() => mean([['early<late']], PLANS, [['1/early']], [])),
      'quantity (argument 3): it cannot be bounded near early = 0.0878906, late = 0.0878906; cap it with MIN or MAX, or give limits that leave the place out.',
    ],
  ])('%s is refused in full words [law]', (_, run, message) => {
    expect(run()).toBe(message);
  });
});
