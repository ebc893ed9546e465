/** Functions by their points: values, enclosures and slopes against a plain search, and their turns. */
import { Encloser } from '../../src/formula/enclose';
import type { PointFunction } from '../../src/formula/given';
import { pointFunction } from '../../src/formula/operations/points';
import { Extremes } from '../../src/numeric/extremes';
import { interval } from '../../src/numeric/interval';
import type { Points } from '../numeric/points';
import { points } from '../numeric/points';
import { big, isBetween, type Big } from '../numeric/reference';
import { tapeOf } from './formulas';

interface Table {
  readonly x: readonly number[];
  readonly heights: readonly number[];
}

function randomTable(p: Points): Table {
  const x: number[] = [p.between(-5, 5)];
  const n = p.whole(1, 12);
  for (let i = 0; i < n; i++) x.push(x.at(-1)! + (p.uniform() < 0.25 ? 0 : p.sized(1e-6, 3)));
  x.push(x.at(-1)! + 0.5);
  const heights = x.map(() => (p.uniform() < 0.2 ? 0 : p.between(-2, 3)));
  return { x, heights };
}

const given = ({ x, heights }: Table): PointFunction => ({
  kind: 'function',
  operation: pointFunction('f', x, heights),
  nPoints: x.length,
  fingerprint: '',
});

/** The lines between points in decimals: the right-hand value at a jump, the last height at the last point. */
function valueAt({ x, heights }: Table, t: number): Big {
  const last = x.length - 1;
  if (t < x[0]! || t > x[last]!) return big(0);
  for (let k = last - 1; k >= 0; k--) {
    const [a, b] = [x[k]!, x[k + 1]!];
    if (!(a <= t && a < b)) continue;
    const share = big(Math.min(t, b))
      .minus(big(a))
      .div(big(b).minus(big(a)));
    return big(heights[k]!).plus(
      big(heights[k + 1]!)
        .minus(big(heights[k]!))
        .times(share),
    );
  }
  throw new Error('no line');
}

describe('pointFunction', () => {
  it('has the values of its lines at points, jumps and ends [law]', () => {
    const p = points(61);
    for (let i = 0; i < 400; i++) {
      const table = randomTable(p);
      const { operation } = given(table);
      const first = table.x[0]!;
      const span = table.x.at(-1)! - first;
      for (const t of [...table.x, p.between(first, first + span), first - 1, first + span + 1]) {
        const value = operation.point(t, t, t);
        const error = Math.abs(value - valueAt(table, t).toNumber());
        // A few roundings of heights up to 3.
        expect([table, t, error < 1e-14]).toEqual([table, t, true]);
      }
    }
  });

  it('over an interval holds its value at every point, and the slope of every line it meets [law]', () => {
    const p = points(62);
    for (let i = 0; i < 400; i++) {
      const table = randomTable(p);
      const encloser = new Encloser(tapeOf('f(x)', { f: given(table) }));
      const [first, last] = [table.x[0]!, table.x.at(-1)!];
      for (let k = 0; k < 6; k++) {
        const at = k % 2 === 0 ? p.between(first - 0.5, last + 0.5) : p.pick(table.x);
        const width = k < 2 ? 0 : p.sized(1e-9, 2 * (last - first));
        const [a, b] = [at - width * p.uniform(), at + width];
        const { density } = encloser.over(a, b, null, null);
        const { v, d, h } = { v: { ...density.v }, d: { ...density.d }, h: { ...density.h } };
        const inside = table.x.filter((x) => x >= a && x <= b);
        for (const t of [a, b, ...inside, p.between(a, b)]) {
          if (!isBetween(v.lo, valueAt(table, t), v.hi))
            throw new Error(JSON.stringify([table, a, b, t, v, valueAt(table, t).toString()]));
        }
        if (d.lo === -Infinity) continue;
        expect(h.lo <= 0 && h.hi >= 0).toBe(true);
        table.x.slice(1).forEach((to, j) => {
          const from = table.x[j]!;
          if (!(from < to) || to <= a || from >= b) return;
          const slope = big(table.heights[j + 1]!)
            .minus(big(table.heights[j]!))
            .div(big(to).minus(big(from)));
          expect([table, a, b, isBetween(d.lo, slope, d.hi)]).toEqual([table, a, b, true]);
        });
      }
    }
  });

  it('knows no slope over a jump, and turns at jumps before bends [law]', () => {
    const table = { x: [0, 1, 2, 2, 3], heights: [0, 5, 5, 1, 1] };
    const { operation } = given(table);
    const encloser = new Encloser(tapeOf('f(x)', { f: given(table) }));
    expect(encloser.over(1.5, 2.5, null, null).density.d.lo).toBe(-Infinity);
    const { d } = encloser.over(0.2, 0.8, null, null).density;
    expect(d.lo <= 5 && d.hi >= 5 && d.hi - d.lo < 1e-14).toBe(true);
    const { h } = encloser.over(1.2, 1.8, null, null).density;
    expect(h.lo === 0 && h.hi === 0).toBe(true);
    expect(operation.level!(interval(0.5, 2.5))).toBe(2);
    expect(operation.level!(interval(0.5, 1.5))).toBe(1);
    expect(operation.level!(interval(1.2, 1.8))).toBeNaN();
    // At the first point it begins without a jump, at the last it drops from 1 to 0.
    expect(operation.level!(interval(-1, 0.5))).toBe(0);
    expect(operation.level!(interval(2.5, 4))).toBe(3);
  });

  it('of 20,000 points answers in logarithmic time [law]', () => {
    const x = Array.from({ length: 20_000 }, (_, i) => i);
    const heights = x.map((i) => (i * 7919) % 101);
    const encloser = new Encloser(tapeOf('f(x)', { f: given({ x, heights }) }));
    const start = performance.now();
    for (let i = 0; i < 20_000; i++) encloser.over(i / 3, 19_999 - i / 3, null, null);
    // 20,000 looks over up to 20,000 points; one by one they would take many seconds.
    expect(performance.now() - start).toBeLessThan(2000);
  });
});

describe('Extremes', () => {
  it('over(first, last) is the hull of that run [law]', () => {
    const p = points(63);
    for (let i = 0; i < 200; i++) {
      const n = p.whole(1, 40);
      const lo = Array.from({ length: n }, () => p.between(-1, 1));
      const hi = lo.map((value) => value + p.uniform());
      const extremes = new Extremes(lo, hi);
      const first = p.whole(0, n - 1);
      const last = p.whole(first, n - 1);
      const out = interval();
      extremes.over(out, first, last);
      expect(out).toEqual({
        lo: Math.min(...lo.slice(first, last + 1)),
        hi: Math.max(...hi.slice(first, last + 1)),
      });
    }
  });
});
