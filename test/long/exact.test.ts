/** The draws against exact bin shares, 10^8 of each density (npm run check:long). */
import { PointDrawer } from '../../src/draw/points';
import { keyOf } from '../../src/random/key';
import { RowStream } from '../../src/random/stream';
import { FALSE_ALARM, goodnessOfFit } from '../draw/statistics';
import type { Target } from '../draw/targets';
import { provedPoints } from '../envelope/pointsFuzz';
import { COUNTED } from '../worksheet/countedShapes';
import {
  binsOf,
  blendTarget,
  count,
  drawInParts,
  placeOf,
  sideTargets,
  targets,
  twoHumpsBelow,
} from '../draw/targets';

const ROWS = 1e8;
const BINS = 500;

/** Draws from an inverse table of equally likely points with straight lines between them. */
function tableDraws(target: Target, nPoints: number, n: number): Float64Array {
  const { from, to, areaBelow } = target;
  const [low, whole] = [areaBelow(from), areaBelow(to) - areaBelow(from)];
  const points = Array.from({ length: nPoints }, (_, i) =>
    placeOf(target, low + (whole * i) / (nPoints - 1), from, to),
  );
  const values = new Float64Array(n);
  new RowStream(keyOf('plan-2027', 'table')).fillFirst(1, values, n);
  return values.map((u) => {
    const at = u * (nPoints - 1);
    const i = Math.min(nPoints - 2, Math.floor(at));
    return points[i]! + (points[i + 1]! - points[i]!) * (at - i);
  });
}

describe('Drawer.column over 10^8 rows', () => {
  test.each([...targets, ...sideTargets, blendTarget])(
    'draws of $name follow the exact bin shares [law]',
    (target) => {
      const bins = binsOf(target, BINS);
      const counts = new Float64Array(bins.shares.length);
      let [proposals, nearTies] = [0, 0];
      for (const column of drawInParts(target, ROWS)) {
        count(column.values, bins.edges, counts);
        proposals += column.proposals;
        nearTies += column.nearTies;
      }
      const filled = bins.shares.flatMap((share, i) => (share > 0 ? [i] : []));
      const empty = bins.shares.flatMap((share, i) => (share > 0 ? [] : [counts[i]!]));
      const p = goodnessOfFit(
        filled.map((i) => counts[i]!),
        filled.map((i) => bins.shares[i]!),
      );
      console.log(
        `${target.name}: ${filled.length} bins, p = ${p.toPrecision(3)}, ${proposals} proposals, ${nearTies} near-ties`,
      );
      expect(p).toBeGreaterThan(FALSE_ALARM);
      expect(empty.filter((n) => n > 0)).toEqual([]);
    },
  );

  // χ² is then larger by about n · 0.23 · (0.003/0.5)² = 830, twenty-six of its standard deviations.
  test('a density whose second hump is shifted by 0.003 is told apart [law]', () => {
    const target = targets[0]!;
    const shifted = binsOf(target, BINS, (x) => twoHumpsBelow(x, 7.003));
    const counts = new Float64Array(shifted.shares.length);
    for (const { values } of drawInParts(target, ROWS)) count(values, shifted.edges, counts);
    expect(goodnessOfFit(counts, shifted.shares)).toBeLessThan(FALSE_ALARM);
  });

  test('10^7 draws from an inverse table of 100 points are told apart [law]', () => {
    const target = targets[0]!;
    const bins = binsOf(target, BINS);
    const counts = new Float64Array(bins.shares.length);
    count(tableDraws(target, 100, 1e7), bins.edges, counts);
    expect(goodnessOfFit(counts, bins.shares)).toBeLessThan(FALSE_ALARM);
  });
});

describe('PointDrawer.column over 10^7 rows', () => {
  test.each(COUNTED)(
    'draws of $name follow the exact shares [law]',
    ({ density, limits, share }) => {
      const [[, from, to, step]] = limits as [[string, number, number | string, number]];
      const end = typeof to === 'number' ? to : Infinity;
      const drawer = new PointDrawer(provedPoints(density, from, end, step));
      const counts = new Float64Array(201);
      let nearTies = 0;
      for (let part = 0; part < 10; part++) {
        const column = drawer.column(keyOf('plan-2027', density), 1 + part * 1e6, 1e6);
        for (const value of column.values) counts[Math.min(200, value)]!++;
        nearTies += column.nearTies;
      }
      const shares: number[] = [];
      for (let k = 0; k <= end && k < 200 && share(k) * 1e7 >= 5; k++) shares.push(share(k));
      const rest = 1 - shares.reduce((sum, s) => sum + s, 0);
      // What lies beyond is counted with the last value.
      shares[shares.length - 1]! += rest;
      const own = counts.slice(0, shares.length);
      own[shares.length - 1]! += counts.slice(shares.length).reduce((sum, n) => sum + n, 0);
      const p = goodnessOfFit(own, shares);
      console.log(
        `${density}: ${shares.length} values, p = ${p.toPrecision(3)}, ${nearTies} near-ties`,
      );
      expect(p).toBeGreaterThan(FALSE_ALARM);
      // One draw in fifty of the commonest value moved to the next.
      const middle = shares.indexOf(Math.max(...shares));
      const moved = Math.round(own[middle]! / 50);
      own[middle]! -= moved;
      own[middle + 1]! += moved;
      expect(goodnessOfFit(own, shares)).toBeLessThan(FALSE_ALARM);
    },
  );
});
