/**
 * Several variables at length: 10^7 draws of each shape against exact shares of cells, the
 * fuzz of the proof, and what takes too long for every run (npm run check:long).
 */
import { BoxDrawer } from '../../src/draw/several';
import { keyOf } from '../../src/random/key';
import { cellTargets, type CellTarget } from '../draw/severalTargets';
import { FALSE_ALARM, goodnessOfFit, rankCorrelation, Z_FALSE_ALARM } from '../draw/statistics';
import { boxFuzz } from '../envelope/boxFuzz';
import { provedBoxes, type AxisText } from '../envelope/boxProof';

const ROWS = 1e7;
const AT_ONCE = 1e6;

function countsOf({ text, axes, cellOf, shares }: CellTarget): {
  counts: number[];
  nearTies: number;
} {
  const drawer = new BoxDrawer(provedBoxes(text, axes));
  const counts = shares.map(() => 0);
  let nearTies = 0;
  for (let part = 0; part * AT_ONCE < ROWS; part++) {
    const rows = drawer.rows(keyOf('plan-2027', `${text}, part ${part}`), 1, AT_ONCE);
    nearTies += rows.nearTies;
    for (let i = 0; i < AT_ONCE; i++) counts[cellOf(rows.columns.map((column) => column[i]!))]!++;
  }
  return { counts, nearTies };
}

describe('BoxDrawer.rows over 10^7 rows', () => {
  test.each(cellTargets)('draws of $name follow the exact shares of cells [law]', (target) => {
    const { counts, nearTies } = countsOf(target);
    const p = goodnessOfFit(counts, target.shares);
    console.log(`${target.name}: p = ${p.toPrecision(3)}, ${nearTies} near-ties`);
    expect(p).toBeGreaterThan(FALSE_ALARM);
  });

  // χ² grows by n · 0.005² = 250, sixteen of its standard deviations.
  test('a disc that is half a percent denser inside is told apart [law]', () => {
    const target = cellTargets[0]!;
    const shares = target.shares.map((share, i) => share * (i % 10 < 5 ? 1.005 : 0.995));
    expect(goodnessOfFit(countsOf(target).counts, shares)).toBeLessThan(FALSE_ALARM);
  });
});

describe('proveBoxes at length', () => {
  test('lies above and below 2,400 random regions and densities at 5 million points [law]', () => {
    const report = boxFuzz('long boxes', 2400, 3000);
    console.log(
      `several variables: ${report.shapes} shapes, ${report.proved} proved, ${report.points} points, ${report.faults.length} faults`,
    );
    expect(report.faults).toEqual([]);
    expect(report.points).toBeGreaterThan(5e6);
  });

  const cube = (names: string, from: number, to: number): AxisText[] =>
    [...names].map((name) => [name, from, to] as const);

  // π³/6 and its share of the cube of side 2 (DLMF 5.19.4).
  test('holds the volume of a ball in six dimensions, and draws agree [published]', () => {
    const text = 'a^2+b^2+p^2+q^2+s^2+t^2<=1';
    const envelope = provedBoxes(text, cube('abpqst', -1, 1));
    const volume = Math.PI ** 3 / 6;
    expect(envelope.lowerMass).toBeLessThan(volume);
    expect(envelope.upperMass).toBeGreaterThan(volume);
    const n = 1e6;
    const { proposals } = new BoxDrawer(envelope).rows(keyOf('plan-2027', text), 1, n);
    const share = volume / envelope.upperMass;
    const deviation = Math.sqrt(proposals * share * (1 - share));
    expect(Math.abs(n - proposals * share)).toBeLessThan(Z_FALSE_ALARM * deviation + 1);
  });

  test('four normal variables with correlation 0.5 have its ranks [published]', () => {
    const names = ['a', 'b', 'p', 'q'];
    const pairs = names.flatMap((a, i) => names.slice(i + 1).map((b) => `${a}*${b}`)).join('+');
    // The inverse of the matrix of equal correlations ½: 1.6 on the diagonal, −0.4 beside it.
    const squares = names.map((name) => `${name}^2`).join('+');
    const text = `EXP(-0.5*(1.6*(${squares})-0.8*(${pairs})))`;
    const n = 200_000;
    const { columns } = new BoxDrawer(provedBoxes(text, cube('abpq', -6, 6))).rows(
      keyOf('plan-2027', text),
      1,
      n,
    );
    const ranks = (6 / Math.PI) * Math.asin(0.25);
    expect(Math.abs(rankCorrelation(columns[0]!, columns[3]!) - ranks)).toBeLessThan(
      Z_FALSE_ALARM / Math.sqrt(n),
    );
  });
});
