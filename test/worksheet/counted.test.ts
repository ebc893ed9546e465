import type { Range } from '../../src/index';
import {
  above,
  acceptance,
  below,
  blend,
  cases,
  draw,
  each,
  envelope,
  expect as meanOf,
  profile,
  proposals,
  quantile,
  stratified,
} from '../../src/index';
import { FALSE_ALARM, goodnessOfFit } from '../draw/statistics';
import { messageOf } from '../message';
import type { CountedShape } from './countedShapes';
import { COUNTED, poissonBelow } from './countedShapes';
import { itemsOf, numbersOf } from './shapes';

const SEED = [['plan-2027']];
const LABEL = [['crates']];
const numbers = (range: Range): number[] => range.flat() as number[];
const drawn = (density: string, limits: Range | null, rows: number, label = LABEL): number[] =>
  numbers(draw([[density]], limits, [[rows]], SEED, label, []));

/** Counts of values 0, 1 … with the far ones of less than 5 expected draws together. */
function binned({ share, most }: CountedShape, values: readonly number[]) {
  const shares: number[] = [];
  let last = 0;
  for (let k = 0; k <= most && share(k) * values.length >= 5; k++, last = k) shares.push(share(k));
  const counts = new Float64Array(last + 1);
  for (const value of values) counts[Math.min(last, value)]!++;
  const rest = 1 - shares.reduce((sum, s) => sum + s, 0);
  const isEnough = rest * values.length >= 5;
  return isEnough
    ? { counts, shares: [...shares, rest] }
    : {
        counts: counts.slice(0, last).map((n, k) => (k === last - 1 ? n + counts[last]! : n)),
        shares: shares.map((s, k) => (k === last - 1 ? s + rest : s)),
      };
}

describe('a counted quantity', () => {
  // The far sums are below 10^-9 of the whole; heights and sums err by some 10^-15 each, GAMMALN by 10^-14.
  test.each(COUNTED)('has the exact shares of $name [law]', ({ density, limits, share, most }) => {
    const x = Array.from({ length: most + 1 }, (_, k) => [k]);
    const [lower, upper] = [below, above].map((f) => numbers(f([[density]], limits, x, [])));
    const shown = numbersOf(profile([[density]], limits, [[1000]], []));
    let sum = 0;
    for (let k = 0; k <= most; k++) {
      const one = share(k);
      expect(Math.abs(lower![k]! - sum)).toBeLessThan(2e-13);
      sum += one;
      expect(Math.abs(upper![k]! - (1 - sum))).toBeLessThan(2e-13);
      const row = shown.find(([value]) => value === k);
      if (row) expect(Math.abs(row[1]! / one - 1)).toBeLessThan(2e-13);
    }
  });

  test.each(COUNTED)('has the exact mean of $name between its bounds [law]', (shape) => {
    const [value, least, most] = numbers(
      meanOf([[shape.density]], shape.limits, [['x']], []).slice(1),
    );
    expect(least!).toBeLessThanOrEqual(shape.mean * (1 + 1e-15));
    expect(most!).toBeGreaterThanOrEqual(shape.mean * (1 - 1e-15));
    expect(most! - least!).toBeLessThan(1e-7);
    expect(Math.abs(value! / shape.mean - 1)).toBeLessThan(1e-12);
  });

  // 100,000 draws; a tenth of one value moved to the next must be noticed.
  test.each(COUNTED)('has draws that follow $name [law]', (shape) => {
    const values = drawn(shape.density, shape.limits, 100_000);
    const { counts, shares } = binned(shape, values);
    expect(goodnessOfFit(counts, shares)).toBeGreaterThan(FALSE_ALARM);
    const middle = shares.indexOf(Math.max(...shares));
    const moved = Math.round(counts[middle]! / 10);
    counts[middle]! -= moved;
    counts[middle + 1]! += moved;
    expect(goodnessOfFit(counts, shares)).toBeLessThan(FALSE_ALARM);
  });

  test('is the taster of Fisher (1935), The Design of Experiments, chapter II: 1, 16, 36, 16, 1 of 70 [published]', () => {
    const limits = [['right', 0, 4, 1]];
    const density = [['COMBIN(4,right)*COMBIN(4,4-right)']];
    const shown = numbersOf(profile(density, limits, null, []));
    expect(shown.map(([, share]) => Math.round(share! * 70 * 1e9) / 1e9)).toEqual([
      1, 16, 36, 16, 1,
    ]);
    expect(envelope(density, limits, []).map((row) => row.slice(0, 4))).toEqual([
      ['from', 'to', 'upper left', 'upper right'],
      [0, 0, 1, 1],
      [1, 1, 16, 16],
      [2, 2, 36, 36],
      [3, 3, 16, 16],
      [4, 4, 1, 1],
    ]);
  });

  // Expected numbers of corps-years with k deaths among 200, mean 0.61: L. von Bortkiewicz, Das
  // Gesetz der kleinen Zahlen (1898), from memory.
  test('is the Poisson table of Bortkiewicz (1898) [published]', () => {
    const shown = numbersOf(
      profile([['POISSON.DIST(x,0.61,FALSE)']], [['x', 0, 'unbounded', 1]], null, []),
    );
    const expected = shown.slice(0, 5).map(([, share]) => (200 * share!).toFixed(1));
    expect(expected).toEqual(['108.7', '66.3', '20.2', '4.1', '0.6']);
  });

  // ζ(4) = π⁴/90, DLMF 25.6.1; ζ(3) = 1.2020569031595942854, OEIS A002117.
  test('has the exact shares and mean of heights x^-4, which fall slowly [published]', () => {
    const density = [['x^-4']];
    const limits = [['x', 1, 'unbounded', 1]];
    const zeta = Math.PI ** 4 / 90;
    const [least, share] = numbers(above(density, limits, [[0], [1]], []));
    expect(least).toBe(1);
    expect(Math.abs(share! - (1 - 1 / zeta))).toBeLessThan(1e-15);
    const [value, lo, hi] = numbers(meanOf(density, limits, [['x']], []).slice(1));
    const mean = 1.2020569031595942 / zeta;
    expect(Math.abs(value! / mean - 1)).toBeLessThan(1e-13);
    expect(lo!).toBeLessThan(mean);
    expect(hi!).toBeGreaterThan(mean);
    // Σ k^-4 beyond n: 1/(3n³) − 1/(2n⁴) + 1/(3n⁵) − 1/(6n⁷) + …, DLMF 25.11.43.
    for (const n of [1000, 1e6]) {
      const tail = (1 / (3 * n ** 3)) * (1 - 1.5 / n + 1 / n ** 2 - 0.5 / n ** 4);
      const far = numbers(above(density, limits, [[n]], []))[0]!;
      expect(Math.abs((far * zeta) / tail - 1)).toBeLessThan(1e-12);
      expect(numbers(quantile(density, limits, [[far * (1 - 1e-9)]], [['above']], []))).toEqual([
        n + 1,
      ]);
    }
  });

  test('keeps the digits of far shares, and QUANTILE finds them again [law]', () => {
    const geometric = [['0.7^x']];
    const limits = [['x', 0, 'unbounded', 1]];
    for (const k of [0, 50, 500, 1500]) {
      const share = numbers(above(geometric, limits, [[k]], []))[0]!;
      expect(Math.abs(share / 0.7 ** (k + 1) - 1)).toBeLessThan(1e-11);
      // The value k + 1 is the last that has this share together with all above it.
      expect(numbers(quantile(geometric, limits, [[share]], [['above']], []))).toEqual([k + 1]);
    }
    const slow = [['EXP(-0.001*x)']];
    const share = numbers(above(slow, limits, [[100_000]], []))[0]!;
    expect(Math.abs(share / Math.exp(-100.001) - 1)).toBeLessThan(1e-11);
    const down = numbers(below([['EXP(x)']], [['x', 'unbounded', 3, 1]], [[-600]], []))[0]!;
    expect(Math.abs(down / Math.exp(-604) - 1)).toBeLessThan(1e-11);
  });

  test('QUANTILE(…, share) is the least value with that share up to it [law]', () => {
    const { density, limits } = COUNTED[1]!;
    for (const share of [0.001, 0.2, 0.5, 0.75, 0.999999]) {
      const x = numbers(quantile([[density]], limits, [[share]], null, []))[0]!;
      expect(poissonBelow(6.5, x + 1)).toBeGreaterThanOrEqual(share);
      expect(poissonBelow(6.5, x)).toBeLessThan(share);
    }
    const ends = quantile([['1']], [['x', 2, 9, 3]], [[0, 1, 0.5]], null, []);
    expect(ends).toEqual([[2, 8, 5]]);
  });

  test('BELOW and ABOVE leave the value itself out [law]', () => {
    const x = [[0], [0.1], [0.3], [0.35], [9]];
    const limits = [['x', 0.1, 0.4, 0.1]];
    expect(numbers(below([['1']], limits, x, []))).toEqual([0, 0, 0.5, 0.75, 1]);
    expect(numbers(above([['1']], limits, x, []))).toEqual([1, 0.75, 0.25, 0.25, 0]);
  });

  test('is drawn from a table of points at the heights of its lines, from a block and from a list [law]', () => {
    const table = [
      [0, 0],
      [4, 4],
      [4, 1],
      [6, 3],
    ];
    const limits = [['x', 1, 'unbounded', 1]];
    expect(
      numbersOf(profile(table, limits, null, [])).map(([x, share]) => [x, share! * 12]),
    ).toEqual([
      [1, 1],
      [2, 2],
      [3, 3],
      [4, 1],
      [5, 2],
      [6, 3],
    ]);
    const block: Range = [
      ['density', '0.7^x'],
      ['from', 0],
      ['to', 'unbounded'],
      ['step', 1],
    ];
    const list: Range = [
      ['label', 'density', 'from', 'to', 'step'],
      ['crates', '0.7^x', 0, 'unbounded', 1],
      ['hours', 'EXP(-x)', 0, 4, 0],
    ];
    const own = drawn('0.7^x', [['x', 0, 'unbounded', 1]], 50);
    expect(numbers(draw(block, null, [[50]], SEED, LABEL, []))).toEqual(own);
    const columns = draw(list, null, [[50]], SEED, null, []);
    expect(columns.map(([crates]) => crates)).toEqual(own);
    expect(new Set(columns.map(([, hours]) => Number.isInteger(hours)))).toEqual(new Set([false]));
  });

  test('row i is the same whatever the rows, and CASES, EACH and PROPOSALS agree with DRAW [law]', () => {
    const density = [['POISSON.DIST(x,m,FALSE)']];
    const limits = [['x', 0, 'unbounded', 1]];
    const of = (m: number, rows: Range) => draw(density, limits, rows, SEED, LABEL, [[['m', m]]]);
    const all = of(6, [[300]]);
    expect(of(6, [[101, 300]])).toEqual(all.slice(100));
    const table = cases(
      density,
      limits,
      [[300]],
      SEED,
      LABEL,
      [
        ['', 'few', 'many'],
        ['m', 2, 6],
      ],
      [],
    );
    expect(table.slice(1).map((row) => [row[1]])).toEqual(all);
    const lines: Range = [['m'], ...all.map((_, i) => [i % 2 === 0 ? 2 : 6])];
    const two = of(2, [[300]]);
    expect(each(density, limits, SEED, LABEL, lines, [])).toEqual(
      all.map((row, i) => (i % 2 === 0 ? two[i] : row)),
    );
    const kept = proposals(density, limits, [[300]], SEED, LABEL, [[['m', 6]]]).filter(
      (row) => row[5] === true,
    );
    expect(kept.map((row) => [row[2]])).toEqual(all);
  });

  test('stays paired: a larger mean never makes a row smaller, as independent rows do [law]', () => {
    const of = (m: number, label: Range) =>
      numbers(
        draw([['POISSON.DIST(x,m,FALSE)']], [['x', 0, 'unbounded', 1]], [[10_000]], SEED, label, [
          [['m', m]],
        ]),
      );
    const [before, after] = [of(6.5, LABEL), of(6.8, LABEL)];
    expect(before.filter((x, i) => after[i]! < x)).toEqual([]);
    // The means differ by 0.3, and no row by more than 1 or so.
    expect(Math.max(...before.map((x, i) => after[i]! - x))).toBeLessThanOrEqual(2);
    const other = of(6.8, [['another']]);
    expect(before.filter((x, i) => other[i]! < x).length).toBeGreaterThan(3000);
  });

  test('STRATIFIED gives each value its share of the rows, but for one row at each of its ends [law]', () => {
    const { density, limits, share } = COUNTED[3]!;
    const n = 2000;
    const values = numbers(stratified([[density]], limits, [[n]], SEED, LABEL, []));
    for (let k = 0; k <= 20; k++) {
      const count = values.filter((x) => x === k).length;
      expect(Math.abs(count - n * share(k))).toBeLessThan(2);
    }
    const plain = drawn(density, limits, n);
    expect(Math.abs(plain.filter((x) => x === 6).length - n * share(6))).toBeGreaterThan(2);
  });

  test('is exact where points are so many that they are joined to runs [law]', () => {
    // Round 0.01 at a time: 200,001 points of a hump; its bins by the sum of their heights.
    const limits = [['x', 0, 2000, 0.01]];
    const density = '1+9*EXP(-0.5*((x-700)/150)^2)';
    const n = 200_000;
    const values = drawn(density, limits, n);
    const height = (x: number): number => 1 + 9 * Math.exp(-0.5 * ((x - 700) / 150) ** 2);
    const bins = new Float64Array(100);
    // Hundredths modulo 7 fall across runs, whatever their lengths.
    const remainders = new Float64Array(7);
    for (let k = 0; k <= 200_000; k++) {
      bins[Math.min(99, Math.floor(k / 2000))]! += height(k / 100);
      remainders[k % 7]! += height(k / 100);
    }
    const total = bins.reduce((a, b) => a + b, 0);
    const hundredths = values.map((x) => Math.round(100 * x));
    expect(values).toEqual(hundredths.map((k) => k / 100));
    const inBins = new Float64Array(100);
    const inRemainders = new Float64Array(7);
    for (const k of hundredths) {
      inBins[Math.min(99, Math.floor(k / 2000))]!++;
      inRemainders[k % 7]!++;
    }
    expect(
      goodnessOfFit(
        inBins,
        Array.from(bins, (sum) => sum / total),
      ),
    ).toBeGreaterThan(FALSE_ALARM);
    expect(
      goodnessOfFit(
        inRemainders,
        Array.from(remainders, (sum) => sum / total),
      ),
    ).toBeGreaterThan(FALSE_ALARM);
    // One draw in fifty set back to the hundredth before it.
    const back = new Float64Array(7);
    hundredths.forEach(
      (k, i) =>
        back[(k + (i % 50 === 0 && k % 7 === 3 ? 0 : k % 7 === 3 && i % 8 === 0 ? 6 : 0)) % 7]!++,
    );
    expect(
      goodnessOfFit(
        back,
        Array.from(remainders, (sum) => sum / total),
      ),
    ).toBeLessThan(FALSE_ALARM);
  });

  test('ACCEPTANCE tells its points, its sum and the share of each term [law]', () => {
    const density = [['0.25*POISSON.DIST(x,2,FALSE)+0.75*POISSON.DIST(x,9,FALSE)']];
    const items = itemsOf(
      acceptance(density, [['x', 0, 'unbounded', 1]], [[1000]], SEED, LABEL, []),
    );
    expect(items.get('x step')).toBe(1);
    expect(items.get('x last point')).toBe('unbounded');
    expect(items.get('proof')).toBe(
      'proved: the height at every point lies between the lower and the upper bound, and under a falling curve beyond them',
    );
    expect(Number(items.get('sum at least'))).toBeLessThan(1);
    expect(Number(items.get('sum at most'))).toBeGreaterThan(1);
    expect(Number(items.get('sum at most')) - Number(items.get('sum at least'))).toBeLessThan(
      1e-12,
    );
    const term = items.get('share of area, term 1: 0.25*POISSON.DIST(x,2,FALSE)');
    expect(Math.abs(Number(term) - 0.25)).toBeLessThan(1e-13);
    expect(items.get('acceptance')).toBe(1);
    const short = itemsOf(acceptance([['1']], [['x', 0, 10, 4]], [[10]], SEED, LABEL, []));
    expect([short.get('x to'), short.get('x last point'), short.get('points')]).toEqual([10, 8, 3]);
  });

  test('PROFILE shows at most count values, evenly chosen [law]', () => {
    const rows = profile([['1']], [['x', 0, 100, 1]], [[5]], []);
    expect(rows.slice(1).map(([x]) => x)).toEqual([0, 25, 50, 75, 100]);
    expect(profile([['1']], [['x', 0, 2, 1]], null, [])).toHaveLength(4);
  });

  test.each([
    [
      '1',
      [['x', 0, 9, -1]],
      'limits (argument 2), step: -1 is negative; give the distance of neighbouring values, such as 1, or 0 for a continuous quantity.',
    ],
    ['1', [['x', 0, 9, 'one']], 'limits (argument 2), step: "one" is not a number; give a number.'],
    [
      '1',
      [['x', 0, 2e6, 1]],
      'limits (argument 2), step: from 0 to 2000000 there are 2000001 points; use at most 1048576: a larger step, or 0 for a continuous quantity.',
    ],
    [
      '1',
      [['x', 9, 0, 1]],
      'limits (argument 2): from (9) is not below to (0); give from first and a larger to.',
    ],
    [
      'COMBIN(20,x)',
      [['x', 0, 21, 1]],
      'Density: it is undefined at x = 21, where COMBIN takes numbers out of order (0 <= chosen <= number is needed); keep the limits where it is defined, or give it a height there with IF.',
    ],
    [
      '1/x',
      [['x', 0, 5, 1]],
      'Density: it is undefined at x = 0, where it divides by zero; keep the limits where it is defined, or give it a height there with IF.',
    ],
    [
      '4-x',
      [['x', 0, 5, 1]],
      'Density: it is negative at x = 5 (-1); heights must be 0 or more; use MAX(0, …) if that is meant.',
    ],
    [
      'IF(x=2.5,1,0)',
      [['x', 0, 5, 1]],
      'Density: it is 0 everywhere from x = 0 to x = 5; some height within the limits must be above 0.',
    ],
    [
      '1/(1+x)',
      [['x', 0, 'unbounded', 1]],
      'Density: its area is infinite towards larger x: it does not fall fast enough; give a number as the upper limit instead of unbounded.',
    ],
    // Less than any number by any scale.
    [
      'EXP(-(x^2))',
      [['x', 687648952645, 687648957645, 1]],
      'Density: only 0 of proposals are sure to be accepted after 2501 pieces (worst near x = 687649000000); narrow the limits to where the density matters, or simplify the formula there.',
    ],
    [
      'POISSON.DIST(x,1E12,FALSE)',
      [['x', 0, 'unbounded', 1]],
      'Density: it is spread over about 1.0018e+12 points; use a larger step, or 0 for a continuous quantity: at most 1048576 points can matter.',
    ],
  ] as [string, Range, string][])('%s from %j is refused [law]', (density, limits, message) => {
    expect(messageOf(() => drawn(density, limits, 5))).toBe(message);
  });

  test('BLEND refuses it, and says what adds up counted values [law]', () => {
    const block: Range = [
      ['density', '0.7^x'],
      ['from', 0],
      ['to', 9],
      ['step', 1],
    ];
    expect(messageOf(() => blend([[1]], [block]))).toBe(
      'shape 1 (argument 2): a counted quantity; give continuous shapes; a formula of counted values can add up terms such as 0.3*POISSON.DIST(x,4,FALSE)+0.7*POISSON.DIST(x,9,FALSE).',
    );
  });

  test('EXPECT of what is undefined at a value, or infinite, is refused [law]', () => {
    const limits = [['x', 0, 'unbounded', 1]];
    expect(messageOf(() => meanOf([['0.7^x']], limits, [['1/(x-3)']], []))).toBe(
      'quantity (argument 3): it is undefined at x = 3, where it divides by zero; give it a value there with IF, or limits that leave the place out.',
    );
    expect(messageOf(() => meanOf([['(1+x)^-2']], limits, [['x']], []))).toBe(
      'quantity (argument 3): its mean is infinite, by what lies towards larger x; cap it with MIN or MAX, or give limits that leave the place out.',
    );
  });
});
