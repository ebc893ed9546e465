/**
 * The special functions against mpmath (vectors/make.py): each errs by less than half of
 * the bound that the enclosures rely on. The bounds were set on 60,000 points a function
 * made in the same way; the points kept here are the law's spot check.
 */
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Bounded } from '../../src/numeric/bounded';
import { lowerAt, upperAt } from '../../src/numeric/bounded';
import { betaShare, gammaShare } from '../../src/numeric/incomplete';
import * as special from '../../src/numeric/special';
import { boundedRatio } from '../../src/numeric/stirling';
import { Big, big } from './reference';

const blocks = readFileSync(join(__dirname, 'vectors/special.txt'), 'utf8')
  .split(/^= /m)
  .slice(1)
  .map((block) => block.trim().split('\n'));

const NAMED: ReadonlyMap<string, Bounded> = new Map<string, Bounded>([
  ...Object.entries(special).flatMap(([name, value]) =>
    typeof value === 'object' && 'at' in value ? [[name, value] as const] : [],
  ),
  ['stirling', boundedRatio],
]);

function functionOf(name: string): Bounded {
  const [family, ...rest] = name.split(' ');
  const isAbove = rest.at(-1) === 'above';
  if (family === 'gamma' && rest.length > 0) return gammaShare(Number(rest[0]), isAbove);
  if (family === 'beta') return betaShare(Number(rest[0]), Number(rest[1]), isAbove);
  return NAMED.get(name)!;
}

/** The error as a share of the bound. */
function shareOfBound(f: Bounded, x: number, value: Big): number {
  const y = f.at(x);
  const error = big(y).minus(value).abs().toNumber();
  return error / (Math.abs(y) * f.relative + f.absolute);
}

test('every special function has reference values [law]', () => {
  const named = blocks.map(([name]) => name!);
  expect([...NAMED.keys()].filter((name) => !named.includes(name))).toEqual([]);
});

describe.each(blocks.map(([name, ...lines]) => [name!, lines] as const))('%s', (name, lines) => {
  const f = functionOf(name);
  const points = lines.map((line) => {
    const [x, value] = line.split(' ');
    return [Number(x), new Big(value!)] as const;
  });

  test('errs by less than half of its bound at 50 or more points [law]', () => {
    expect(points.length).toBeGreaterThanOrEqual(50);
    const worst = points
      .map(([x, value]) => ({ x, share: shareOfBound(f, x, value) }))
      .reduce((p, q) => (q.share > p.share ? q : p));
    expect([worst, worst.share < 0.5]).toEqual([worst, true]);
  });

  test('lies between its bounds, which lie in its range [law]', () => {
    for (const [x, value] of points) {
      const room = value.abs().times('1e-24');
      const [lo, hi] = [lowerAt(f, x), upperAt(f, x)];
      expect([x, big(lo).lte(value.plus(room)), big(hi).gte(value.minus(room))]).toEqual([
        x,
        true,
        true,
      ]);
      expect(lo).toBeGreaterThanOrEqual(f.least);
      expect(hi).toBeLessThanOrEqual(f.most);
    }
  });
});

describe('exact places', () => {
  test.each([
    ['log10', 1000, 3],
    ['log10', 1e22, 22],
    ['gamma', 23, 1124000727777607680000],
    ['gammaln', 1, 0],
    ['gammaln', 2, 0],
    ['erfc', 0, 1],
    ['acosh', 1, 0],
    ['sinh', 0, 0],
  ])('%s at %d is %d, without room [law]', (name, x, value) => {
    const f = NAMED.get(name)!;
    expect([lowerAt(f, x), f.at(x), upperAt(f, x)]).toEqual([value, value, value]);
  });
});

test('a bound a tenth as large is broken [law]', () => {
  const { x, share } = blocks
    .find(([name]) => name === 'gammaln')!
    .slice(1)
    .map((line) => line.split(' '))
    .map(([at, value]) => ({
      x: Number(at),
      share: shareOfBound(special.gammaln, Number(at), new Big(value!)),
    }))
    .reduce((p, q) => (q.share > p.share ? q : p));
  expect([x, 10 * share > 1]).toEqual([x, true]);
});
