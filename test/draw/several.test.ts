import { BoxDrawer } from '../../src/draw/several';
import { keyOf } from '../../src/random/key';
import { provedBoxes } from '../envelope/boxProof';
import { cellTargets, type CellTarget } from './severalTargets';
import { FALSE_ALARM, goodnessOfFit } from './statistics';

const ROWS = 60_000;

function countsOf({ text, axes, cellOf, shares }: CellTarget, n: number): number[] {
  const { columns } = new BoxDrawer(provedBoxes(text, axes)).rows(keyOf('plan-2027', text), 1, n);
  const counts = shares.map(() => 0);
  for (let i = 0; i < n; i++) counts[cellOf(columns.map((column) => column[i]!))]!++;
  return counts;
}

describe('BoxDrawer.rows', () => {
  test.each(cellTargets)('draws of $name follow the exact shares of cells [law]', (target) => {
    expect(target.shares.reduce((a, b) => a + b)).toBeCloseTo(1, 12);
    expect(goodnessOfFit(countsOf(target, ROWS), target.shares)).toBeGreaterThan(FALSE_ALARM);
  });

  // The inner half of the disc 3 % denser: χ² grows by n · 0.03² / 1, over 50 for 60,000 rows.
  test('a disc that is a little denser inside is told apart [law]', () => {
    const target = cellTargets[0]!;
    const shares = target.shares.map((share, i) => share * (i % 10 < 5 ? 1.05 : 0.95));
    expect(goodnessOfFit(countsOf(target, ROWS), shares)).toBeLessThan(FALSE_ALARM);
  });

  const drawer = new BoxDrawer(
    provedBoxes('AND(early+late<=90,early*late>=400)*EXP(-early/50)', [
      ['early', 0, 90],
      ['late', 0, 90],
    ]),
  );
  const key = keyOf('plan-2027', 'plans');

  test('row i is the same whatever the number of rows and where they begin [law]', () => {
    const few = drawer.rows(key, 1, 100).columns;
    const many = drawer.rows(key, 1, 5000).columns;
    const later = drawer.rows(key, 51, 50).columns;
    few.forEach((column, j) => {
      expect(column).toEqual(many[j]!.slice(0, 100));
      expect(later[j]).toEqual(column.slice(50));
    });
  });

  test('every row satisfies the conditions [law]', () => {
    const [early, late] = drawer.rows(key, 1, 20_000).columns;
    const fails = early!.filter((x, i) => x + late![i]! > 90 || x * late![i]! < 400);
    expect(fails).toHaveLength(0);
  });

  test('proposals end with the rows they are drawn for [law]', () => {
    const { columns, proposals } = drawer.rows(key, 1, 500);
    const made = drawer.proposals(key, 1, 500, 10_000)!;
    expect(made).toHaveLength(proposals);
    const kept = made.filter(({ isKept }) => isKept);
    expect(kept.map(({ place }) => place)).toEqual(
      Array.from({ length: 500 }, (_, i) => columns.map((column) => column[i]!)),
    );
    expect(drawer.proposals(key, 1, 500, 400)).toBeNull();
  });

  test('other labels and seeds give other rows [law]', () => {
    const rows = (seed: string, label: string) => drawer.rows(keyOf(seed, label), 1, 3).columns;
    expect(rows('plan-2027', 'plans')).not.toEqual(rows('plan-2027', 'plan'));
    expect(rows('plan-2027', 'plans')).not.toEqual(rows('plan-2028', 'plans'));
  });
});
