import { draw } from '../../src/index';
import type { Range } from '../../src/index';
import { correlation, rankCorrelation, Z_FALSE_ALARM } from './statistics';

/** Two humps, so that many gaps and further attempts are met. */
const DENSITY = '0.6*EXP(-0.5*(x-2)^2)+0.4*EXP(-2*(x-m)^2)';
const LIMITS: Range = [[0, 10]];

interface Call {
  readonly rows: number | readonly [number, number];
  readonly seed?: string | number;
  readonly label?: string | number;
  readonly m?: number;
}

function column({ rows, seed = 'plan-2027', label = 'harvest', m = 7 }: Call): number[] {
  const range: Range = [typeof rows === 'number' ? [rows] : rows];
  const spilled = draw([[DENSITY]], LIMITS, range, [[seed]], [[label]], [[['m', m]]]);
  return spilled.map(([value]) => value as number);
}

/** Independent columns of n rows are correlated less than this but once in 10^6 (standard deviation 1/√n). */
const N = 100_000;
const LIMIT = Z_FALSE_ALARM / Math.sqrt(N);

describe('DRAW', () => {
  test('row i stays when 100 rows become 100,000 [law]', () => {
    expect(column({ rows: N }).slice(0, 100)).toEqual(column({ rows: 100 }));
  });

  test('rows first to last are those of the whole column [law]', () => {
    const whole = column({ rows: N });
    // Across the edge of a block of rows, of odd and even length, and one row alone.
    for (const [first, last] of [
      [1, 7],
      [4090, 4100],
      [4097, 8193],
      [99_999, 100_000],
      [50_001, 50_001],
    ] as const) {
      expect(column({ rows: [first, last] })).toEqual(whole.slice(first - 1, last));
    }
  });

  test('two labels, two seeds, and two neighbouring rows are uncorrelated [law]', () => {
    const harvest = column({ rows: N });
    const others = {
      label: column({ rows: N, label: 'pressing' }),
      seed: column({ rows: N, seed: 'plan-2028' }),
      number: column({ rows: N, seed: 1 }),
      'row below': [...harvest.slice(1), harvest[0]!],
      'row 4,096 below': [...harvest.slice(4096), ...harvest.slice(0, 4096)],
    };
    for (const other of Object.values(others)) {
      expect(Math.abs(correlation(harvest, other))).toBeLessThan(LIMIT);
      expect(Math.abs(rankCorrelation(harvest, other))).toBeLessThan(LIMIT);
    }
    // A twenty-fifth of one column in another is noticed.
    const mixed = others.label.map((x, i) => (i % 25 === 0 ? harvest[i]! : x));
    expect(Math.abs(correlation(harvest, mixed))).toBeGreaterThan(LIMIT);
  });

  test('a slightly moved shape keeps its rows paired [law]', () => {
    const [before, after] = [column({ rows: N }), column({ rows: N, m: 7.02 })];
    expect(rankCorrelation(before, after)).toBeGreaterThan(0.98);
    expect(after).not.toEqual(before);
    const elsewhere = column({ rows: N, m: 7.02, label: 'pressing' });
    expect(rankCorrelation(before, elsewhere)).toBeLessThan(0.98);
  });

  test.each([
    { what: '"Plan " and "plan"', a: { label: 'Plan ' }, b: { label: 'plan' } },
    { what: '1 and "1"', a: { label: 1 }, b: { label: '1' } },
    { what: 'A and a', a: { label: 'A' }, b: { label: 'a' } },
    { what: 'seed 7 and "7"', a: { seed: 7 }, b: { seed: '7' } },
  ])('labels and seeds $what draw the same [law]', ({ a, b }) => {
    expect(column({ rows: 50, ...a })).toEqual(column({ rows: 50, ...b }));
  });

  test.each([
    { what: 'ab, c and a, bc', a: { seed: 'ab', label: 'c' }, b: { seed: 'a', label: 'bc' } },
    { what: 'ab and a', a: { label: 'ab' }, b: { label: 'a' } },
    { what: 'A and Ł', a: { label: 'A' }, b: { label: 'Ł' } },
    { what: 'Ł and ł', a: { label: 'Ł' }, b: { label: 'ł' } },
    { what: '1 and 1.5', a: { label: 1 }, b: { label: 1.5 } },
    {
      what: 'a seed and label that are exchanged',
      a: { seed: 'plan', label: 'x' },
      b: { seed: 'x', label: 'plan' },
    },
  ])('labels and seeds $what draw other numbers [law]', ({ a, b }) => {
    const [first, second] = [column({ rows: 50, ...a }), column({ rows: 50, ...b })];
    expect(first.filter((x, i) => x === second[i])).toEqual([]);
  });

  test('DRAW with a row of labels is one column per label, each as alone [law]', () => {
    const labels = ['harvest', 'pressing', 'bottles'];
    const spilled = draw([[DENSITY]], LIMITS, [[500]], [['plan-2027']], [labels], [[['m', 7]]]);
    labels.forEach((label, j) => {
      expect(spilled.map((row) => row[j])).toEqual(column({ rows: 500, label }));
    });
  });
});
