/** The draws against exact bin shares, 10^8 of each density (npm run check:long). */
import { keyOf } from '../../src/random/key';
import { RowStream } from '../../src/random/stream';
import { FALSE_ALARM, goodnessOfFit } from '../draw/statistics';
import type { Target } from '../draw/targets';
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
