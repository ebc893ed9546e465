/**
 * SUMMARY and EXCEEDANCE against published figures: the certified values of the NIST Statistical
 * Reference Datasets (StRD, univariate), Old Faithful as shipped with R, NIST/SEMATECH e-Handbook.
 */
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Range } from '../../src/index';
import { exceedance, summary } from '../../src/index';
import { columnOf } from '../worksheet/shapes';

/** The first column of a file beside this one, without its heading. */
function column(file: string): number[] {
  const text = readFileSync(join(__dirname, 'data', file), 'utf8');
  const lines = text.trim().split('\n').slice(1);
  return lines.map((line) => Number(line.split(',')[0]));
}

/** The figure of an item. */
function figure(spill: Range, item: string, at = 1): number {
  const row = spill.find(([name]) => name === item);
  return row![at] as number;
}

/** 1001 values of the NumAcc series: a first one, then two in turn around it. */
const alternating = (first: number, low: number, high: number): number[] => [
  first,
  ...Array.from({ length: 1000 }, (_, i) => (i % 2 === 0 ? low : high)),
];

describe('summary', () => {
  // NIST StRD, univariate summary statistics, certified values; NumAcc from memory, the values of
  // these follow from how they are made. The tolerance is 15 digits where the data hold so many;
  // a value near 10^7 is a double to within 1e-9, which leaves a deviation of 0.1 eight digits.
  it.each([
    ['Lew', column('lew.csv'), -177.435, 277.332168044316, 1e-14],
    [
      'Michelso',
      column('morley.csv').map((v) => 299 + v / 1000),
      299.8524,
      0.0790105478190518,
      1e-12,
    ],
    ['NumAcc1', [10000001, 10000003, 10000002], 10000002, 1, 1e-15],
    ['NumAcc2', alternating(1.2, 1.1, 1.3), 1.2, 0.1, 1e-14],
    ['NumAcc3', alternating(1000000.2, 1000000.1, 1000000.3), 1000000.2, 0.1, 1e-9],
    ['NumAcc4', alternating(10000000.2, 10000000.1, 10000000.3), 10000000.2, 0.1, 1e-8],
  ])(
    'summary(%s) has the certified mean and deviation [published]',
    (_, data, mean, sd, digits) => {
      const spill = summary(columnOf(data), null, null, null);
      expect(Math.abs(figure(spill, 'mean') / mean - 1)).toBeLessThanOrEqual(1e-14);
      expect(Math.abs(figure(spill, 'standard deviation') / sd - 1)).toBeLessThanOrEqual(digits);
    },
  );

  // Azzalini & Bowman (1990); quantiles of type 7 (the rule of PERCENTILE.INC) as R 4.2 gives them.
  it('summary(Old Faithful) has its mean, deviation and percentiles [published]', () => {
    const spill = summary(columnOf(column('faithful.csv')), [[0.1, 0.5, 0.9]], null, null);
    const figures = ['rows', 'mean', 'standard deviation', 'P10', 'P50', 'P90'];
    const published = [272, 3.48778308823529, 1.14137125110521, 1.8517, 4, 4.7];
    figures.forEach((item, i) => {
      expect(Math.abs(figure(spill, item) / published[i]! - 1)).toBeLessThan(2e-15);
    });
  });

  // NIST/SEMATECH e-Handbook 7.2.6.2: the 90th percentile by the rule (n + 1) p lies at place 11.7
  // of 12. PERCENTILE.INC has place 1 + 11 p, which is there for p = 10.7/11.
  it('summary(gauge studies) has the percentile of the handbook at its place [published]', () => {
    const data = [
      ...[95.1772, 95.1567, 95.1937, 95.1959, 95.1442, 95.061],
      ...[95.1591, 95.1195, 95.1065, 95.0925, 95.199, 95.1682],
    ];
    const spill = summary(columnOf(data), [[10.7 / 11]], null, null);
    expect(Math.abs((spill[6]![1] as number) - 95.1981)).toBeLessThanOrEqual(5e-5);
  });
});

describe('exceedance', () => {
  // Old Faithful: 97 of 272 eruptions are shorter than 3 minutes (R 4.2).
  it('exceedance(Old Faithful, 3) counts its short eruptions [published]', () => {
    const spill = exceedance(columnOf(column('faithful.csv')), [[3]], null, null);
    expect(figure(spill, 'chance below')).toBe(97 / 272);
  });

  // Newcombe (1998), table I: 81 of 263, Wilson; 1 of 29, exact.
  it.each([
    [81, 263, 0.2552885199, 0.366209577],
    [1, 29, 0.0008726469, 0.1776442955],
  ])('exceedance(%d TRUE of %d) has the published interval [published]', (k, n, lo, hi) => {
    const spill = exceedance(
      Array.from({ length: n }, (_, i) => [i < k]),
      null,
      null,
      null,
    );
    expect(figure(spill, 'chance of TRUE')).toBe(k / n);
    const from = figure(spill, 'chance of TRUE, 95 % interval from');
    const to = figure(spill, 'chance of TRUE, 95 % interval to');
    expect(Math.abs(from - lo)).toBeLessThanOrEqual(5e-11);
    expect(Math.abs(to - hi)).toBeLessThanOrEqual(5e-11);
  });
});
