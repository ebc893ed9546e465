/**
 * Several variables at length: 10^7 draws of each shape against exact shares of cells, the
 * fuzz of the proof, and what takes too long for every run (npm run check:long).
 */
import { BoxDrawer } from '../../src/draw/several';
import { expect as mean } from '../../src/index';
import { keyOf } from '../../src/random/key';
import { cellTargets, type CellTarget } from '../draw/severalTargets';
import { FALSE_ALARM, goodnessOfFit, rankCorrelation, Z_FALSE_ALARM } from '../draw/statistics';
import { boxFuzz } from '../envelope/boxFuzz';
import { provedBoxes, type AxisText } from '../envelope/boxProof';
import { meanFuzz } from '../exact/boxMeans';
import { randomGuarded } from '../envelope/randomGuarded';

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

  test('lies above and below 400 densities that are defined only where their condition holds [law]', () => {
    const report = boxFuzz('long guarded boxes', 400, 3000, randomGuarded);
    console.log(
      `guarded: ${report.shapes} shapes, ${report.proved} proved, ${report.points} points, ${report.faults.length} faults`,
    );
    expect(report.faults).toEqual([]);
    expect(report.proved).toBeGreaterThan(350);
  });

  const cube = (names: string, from: number, to: number): AxisText[] =>
    [...names].map((name) => [name, from, to] as const);

  // π^(d/2) / Γ(d/2 + 1) (DLMF 5.19.4), and 1/d! for the simplex.
  test.each<[string, string, AxisText[], number]>([
    ['a ball', 'a^2+b^2+p^2+q^2<=1', cube('abpq', -1, 1), Math.PI ** 2 / 2],
    ['a ball', 'a^2+b^2+p^2+q^2+s^2<=1', cube('abpqs', -1, 1), (8 * Math.PI ** 2) / 15],
    ['a ball', 'a^2+b^2+p^2+q^2+s^2+t^2<=1', cube('abpqst', -1, 1), Math.PI ** 3 / 6],
    ['a simplex', 'a+b+p+q<=1', cube('abpq', 0, 1), 1 / 24],
    ['a slice of a cube', 'AND(a+b+p+q>=1,a+b+p+q<=2)', cube('abpq', 0, 1), 11 / 24],
  ])('holds the volume of %s, %s, and draws agree [published]', (_, text, axes, volume) => {
    const envelope = provedBoxes(text, axes);
    expect(envelope.lowerMass).toBeLessThan(volume);
    expect(envelope.upperMass).toBeGreaterThan(volume);
    const n = 300_000;
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

  test.each<[string, string, AxisText[], string, number, number]>([
    [
      'the mean distance in the unit square (Santaló 1976, from memory; recomputed)',
      '1',
      cube('abpq', 0, 1),
      'SQRT((a-p)^2+(b-q)^2)',
      0.5214054331647,
      2e-4,
    ],
    [
      'the mean of the larger of a normal pair, √((1 − ρ)/π) (Clark 1961, from memory)',
      'EXP(-0.5*(a^2-1.6*a*b+b^2)/0.36)',
      cube('ab', -6, 6),
      'MAX(a,b)',
      Math.sqrt(0.2 / Math.PI),
      1e-4,
    ],
  ])('EXPECT gives %s [published]', (_, text, axes, quantity, exact, near) => {
    const limits = axes.map(([name, from, to]) => [name, from, to]);
    const [, row] = mean([[text]], limits, [[quantity]], []);
    const [value, atLeast, atMost] = row as [number, number, number];
    // What the limits at six standard deviations cut off is below 10^-6.
    expect(atLeast).toBeLessThan(exact + 1e-6);
    expect(atMost).toBeGreaterThan(exact - 1e-6);
    expect(Math.abs(value - exact)).toBeLessThan(near);
    expect(atMost - atLeast).toBeLessThan(0.02);
  });

  test('EXPECT encloses the means of 25 random polynomials over mixed variables [law]', () => {
    const { faults, widest } = meanFuzz('long box means', 25);
    expect(faults).toEqual([]);
    expect(widest).toBeLessThan(0.01);
  });
});
