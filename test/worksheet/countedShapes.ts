/**
 * Counted shapes with shares that are known otherwise: as ratios of whole numbers, worked in
 * BigInt, or by a series that has nothing to do with the engine.
 */
import gammainc from '@stdlib/math-base-special-gammainc';
import type { Range } from '../../src/index';

export interface CountedShape {
  readonly name: string;
  readonly density: string;
  readonly limits: Range;
  /** The exact chance of a value. */
  readonly share: (k: number) => number;
  /** Exact mean. */
  readonly mean: number;
  /** The largest value worth looking at. */
  readonly most: number;
}

function choose(n: number, k: number): bigint {
  let product = 1n;
  for (let i = 1; i <= k; i++) product = (product * BigInt(n - k + i)) / BigInt(i);
  return product;
}

/** A ratio of whole numbers to 17 digits. */
function ratio(a: bigint, b: bigint): number {
  return Number((a * 10n ** 30n) / b) / 1e30;
}

const binomial = (n: number, tenths: number) => (k: number) =>
  ratio(
    choose(n, k) * BigInt(tenths) ** BigInt(k) * BigInt(10 - tenths) ** BigInt(n - k),
    10n ** BigInt(n),
  );

/** P(X ≤ k) = Q(k + 1, mean), DLMF 8.4.10; single values as differences lose digits, so by their quotients. */
const poisson = (mean: number) => (k: number) => {
  let share = Math.exp(-mean);
  for (let i = 1; i <= k; i++) share *= mean / i;
  return share;
};

export function poissonBelow(mean: number, k: number): number {
  return k === 0 ? 0 : gammainc(mean, k, true, true);
}

const row = (from: number, to: number | string, step = 1): Range => [['x', from, to, step]];

export const COUNTED: readonly CountedShape[] = [
  {
    name: 'Poisson by its logarithm',
    density: 'EXP(x*LN(6.5)-GAMMALN(x+1))',
    limits: row(0, 'unbounded'),
    share: poisson(6.5),
    mean: 6.5,
    most: 25,
  },
  {
    name: 'POISSON.DIST',
    density: 'POISSON.DIST(x,6.5,FALSE)',
    limits: row(0, 'unbounded'),
    share: poisson(6.5),
    mean: 6.5,
    most: 25,
  },
  {
    name: 'Poisson by FACT',
    density: '6.5^x/FACT(x)',
    limits: row(0, 'unbounded'),
    share: poisson(6.5),
    mean: 6.5,
    most: 25,
  },
  {
    name: 'binomial by COMBIN',
    density: 'COMBIN(20,x)*0.3^x*0.7^(20-x)',
    limits: row(0, 20),
    share: binomial(20, 3),
    mean: 6,
    most: 20,
  },
  {
    name: 'BINOM.DIST',
    density: 'BINOM.DIST(x,20,0.3,FALSE)',
    limits: row(0, 20),
    share: binomial(20, 3),
    mean: 6,
    most: 20,
  },
  {
    // 8 good crates among 20, 10 of them opened.
    name: 'hypergeometric',
    density: 'COMBIN(8,x)*COMBIN(12,10-x)',
    limits: row(0, 8),
    share: (k) => ratio(choose(8, k) * choose(12, 10 - k), choose(20, 10)),
    mean: 4,
    most: 8,
  },
  {
    name: 'geometric',
    density: '0.7^x',
    limits: row(0, 'unbounded'),
    share: (k) => 0.3 * 0.7 ** k,
    mean: 7 / 3,
    most: 60,
  },
  {
    name: 'negative binomial',
    density: 'COMBIN(x+4,4)*0.7^x',
    limits: row(0, 'unbounded'),
    share: (k) => Number(choose(k + 4, 4)) * 0.3 ** 5 * 0.7 ** k,
    mean: 35 / 3,
    most: 80,
  },
];
