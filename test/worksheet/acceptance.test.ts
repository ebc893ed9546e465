import type { Range } from '../../src/index';
import { acceptance, below, draw, proposals } from '../../src/index';
import { itemsOf, SHAPES } from './shapes';

const SEED = [['plan-2027']];
const LABEL = [['press']];
const N = 1500;

const shapes = SHAPES.map((shape) => [shape.name, shape] as const);

/** The lines that every column has, in order; inputs and shares of terms stand between them. */
const ITEMS = [
  'density',
  'seed',
  'label',
  'first row',
  'rows',
  'proof',
  'pieces',
  'share of proposals beyond the pieces',
  'area at least',
  'area at most',
  'scale exponent',
  'proposals',
  'acceptance',
  'acceptance, 95 % interval from',
  'acceptance, 95 % interval to',
  'acceptance promised by the proof',
  'acceptance expected from the areas',
  'p-value of observed against expected',
  'share of rows settled by the lower bound',
  'longest wait, in proposals',
  'near-ties',
  'breaches',
  'method',
  'notes',
  'caution',
];

describe('acceptance', () => {
  it.each(shapes)('of %s has its items in order, each once [law]', (_, shape) => {
    const { density, limits, givens } = shape;
    const answer = acceptance(density, limits, [[N]], SEED, LABEL, givens);
    const items = answer.map(([item]) => item as string);
    expect(items.filter((item) => ITEMS.includes(item))).toEqual(ITEMS);
    const others = items.filter((item) => !ITEMS.includes(item));
    for (const item of others)
      expect(item).toMatch(/^(. (from|to)|given .+|density, times|share of area, term \d+: .+)$/);
    expect(answer.every((row) => row.length === 2)).toBe(true);
  });

  it.each(shapes)('of %s counts what PROPOSALS lists [law]', (_, shape) => {
    const { density, limits, givens } = shape;
    const items = itemsOf(acceptance(density, limits, [[N]], SEED, LABEL, givens));
    const listed = proposals(density, limits, [[N]], SEED, LABEL, givens).slice(1);
    expect(items.get('proposals')).toBe(listed.length);
    expect(items.get('acceptance')).toBe(N / listed.length);
    const waits = listed.filter((line) => line[5]).map((line) => Number(line[1]));
    expect(items.get('longest wait, in proposals')).toBe(Math.max(...waits));
    const settled = listed.filter((line) => line[1] === 1 && typeof line[3] === 'string').length;
    expect(items.get('share of rows settled by the lower bound')).toBe(settled / N);
  });

  it.each(shapes)('of %s keeps its promises [law]', (_, shape) => {
    const { density, limits, givens } = shape;
    const items = itemsOf(acceptance(density, limits, [[N]], SEED, LABEL, givens));
    const told = (item: string): number => Number(items.get(item));
    expect(told('acceptance promised by the proof')).toBeGreaterThanOrEqual(0.99);
    expect(told('acceptance expected from the areas')).toBeGreaterThanOrEqual(
      told('acceptance promised by the proof'),
    );
    expect(told('acceptance expected from the areas')).toBeLessThanOrEqual(1);
    // 13 shapes with fixed seeds: a p-value below 1e-6 has a chance of 1.3e-5 in all.
    expect(told('p-value of observed against expected')).toBeGreaterThan(1e-6);
    expect(told('acceptance, 95 % interval from')).toBeLessThanOrEqual(told('acceptance'));
    expect(told('acceptance, 95 % interval to')).toBeGreaterThanOrEqual(told('acceptance'));
    expect([told('breaches'), told('near-ties'), told('method')]).toEqual([0, 0, 0]);
  });

  it('begins with the inputs as read [law]', () => {
    const givens = [
      ['name', 'value'],
      ['m', 4],
      ['s', null],
    ];
    const answer = acceptance(
      [['= EXP(-t/m)+0*s'], ['t<2']],
      [['t', 0, 5]],
      [[3, 9]],
      [[' plan ']],
      [['Press']],
      [givens],
    );
    expect(answer.slice(0, 10)).toEqual([
      ['density', 'EXP(-t/m)+0*s'],
      ['density, times', 't<2'],
      ['t from', 0],
      ['t to', 5],
      ['given m', 4],
      ['given s', 0],
      ['seed', 'plan'],
      ['label', 'Press'],
      ['first row', 3],
      ['rows', 7],
    ]);
  });

  it('tells of lists, functions and unbounded limits what was read [law]', () => {
    const items = itemsOf(
      acceptance([['base(x)*EXP(-SUM((obs-x)^2))']], [['unbounded', 9]], [[5]], SEED, LABEL, [
        [['obs'], [1], [null], [2.5]],
        [
          ['x', 'base'],
          [0, 1],
          [5, 2],
          [9, 0],
        ],
      ]),
    );
    expect(items.get('given obs')).toBe('list of 3 values from 0 to 2.5, 1 of them 0 or blank');
    expect(items.get('given base')).toBe('function through 3 points');
    expect([items.get('x from'), items.get('x to')]).toEqual(['unbounded', 9]);
  });

  it('of a table says what it is and that nothing needs a proof [law]', () => {
    const table = [
      ['tonnes', 'harvest'],
      [0, 0],
      [4, 3],
      [9, 0],
    ];
    const items = itemsOf(acceptance([...table, [null, null]], [[1, 3]], [[5]], SEED, null, []));
    expect(items.get('density')).toBe('table of points "harvest", 1 straight line');
    expect(items.get('proof')).toBe('nothing to prove: the envelope is the table itself');
    expect([items.get('x from'), items.get('x to')]).toEqual([1, 3]);
    expect(items.get('label')).toBe('harvest');
    expect(items.get('notes')).toBe('1 blank or (0, 0) row at the end of the table left out');
    const whole = itemsOf(acceptance(table, null, [[5]], SEED, null, []));
    expect(whole.get('density')).toBe('table of points "harvest", 2 straight lines');
  });

  it('has a column of values per label, each as alone [law]', () => {
    const labels = [['press', 'bottles']];
    const both = acceptance([['EXP(-x)']], [[0, 5]], [[400]], SEED, labels, []);
    labels[0]!.forEach((label, j) => {
      const alone = acceptance([['EXP(-x)']], [[0, 5]], [[400]], SEED, [[label]], []);
      expect(both.map((row) => [row[0], row[j + 1]])).toEqual(alone);
    });
    expect(itemsOf(both, 1).get('proposals')).not.toBe(itemsOf(both, 2).get('proposals'));
  });

  it('joins columns that do not have the same items, blank where one has none [law]', () => {
    const list: Range = [
      ['label', 'density', 'from', 'to', 'm'],
      ['press', 'EXP(-x/m)', 0, 9, 4],
      ['harvest', 'm+x', 0, 1, 2],
    ];
    const answer = acceptance(list, null, [[5]], SEED, null, []);
    expect(answer.find(([item]) => item === 'label')).toEqual(['label', 'press', 'harvest']);
    const term = answer.find(([item]) => (item as string).startsWith('share of area, term 1'))!;
    expect(term[1]).toBeNull();
    // m + x over 0 … 1 with m = 2: 2 of 2.5.
    expect(term[2]).toBeCloseTo(0.8, 12);
  });

  it('says the area and its share below a point as BELOW does [law]', () => {
    const items = itemsOf(acceptance([['EXP(-x)']], [[0, 3]], [[5]], SEED, LABEL, []));
    const area = 1 - Math.exp(-3);
    expect(Number(items.get('area at least'))).toBeLessThanOrEqual(area);
    expect(Number(items.get('area at most'))).toBeGreaterThanOrEqual(area);
    const share = Number(below([['EXP(-x)']], [[0, 3]], [[1]], [])[0]![0]);
    expect(share).toBeCloseTo((1 - Math.exp(-1)) / area, 12);
  });

  it('of rows 50 to 80 counts those rows alone [law]', () => {
    const density = [['SIN(1/x)+1.5']];
    const part = itemsOf(acceptance(density, [[0, 1]], [[50, 80]], SEED, LABEL, []));
    const listed = proposals(density, [[0, 1]], [[50, 80]], SEED, LABEL, []).slice(1);
    expect([part.get('first row'), part.get('rows')]).toEqual([50, 31]);
    expect(part.get('proposals')).toBe(listed.length);
    expect(draw(density, [[0, 1]], [[50, 80]], SEED, LABEL, [])).toHaveLength(31);
  });
});
