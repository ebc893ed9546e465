/**
 * Regions and densities of several variables whose volumes, means and correlations are known.
 * Volumes: proved bounds must hold them, draws must agree within their sampling error.
 */
import { BoxDrawer } from '../../src/draw/several';
import { expect as mean } from '../../src/index';
import { keyOf } from '../../src/random/key';
import { rankCorrelation, Z_FALSE_ALARM } from '../draw/statistics';
import { provedBoxes, type AxisText } from '../envelope/boxProof';

const NAMES = ['a', 'b', 'p', 'q', 's', 't'];
const cube = (d: number, from: number, to: number): readonly AxisText[] =>
  NAMES.slice(0, d).map((name) => [name, from, to] as const);
const sum = (d: number, each: (name: string) => string): string =>
  NAMES.slice(0, d).map(each).join('+');

interface Region {
  readonly name: string;
  readonly text: string;
  readonly axes: readonly AxisText[];
  readonly volume: number;
}

/** V_d = π^(d/2) / Γ(d/2 + 1) (DLMF 5.19.4); acceptance in the cube of side 2, recomputed. */
const BALLS: readonly Region[] = [0.785398163397, 0.523598775598].map((share, i) => ({
  name: `a ball in ${i + 2} dimensions`,
  text: `${sum(i + 2, (name) => `${name}^2`)}<=1`,
  axes: cube(i + 2, -1, 1),
  volume: share * 2 ** (i + 2),
}));

/** 1/d!, elementary. */
const SIMPLICES: readonly Region[] = [2, 3].map((d) => ({
  name: `a simplex in ${d} dimensions`,
  text: `${sum(d, (name) => name)}<=1`,
  axes: cube(d, 0, 1),
  volume: 1 / [1, 1, 2, 6, 24][d]!,
}));

/** Slices k ≤ Σx ≤ k + 1 of the unit cube: Eulerian numbers over d! (DLMF 26.14). */
const SLICES: readonly Region[] = [
  [3, 1, 4 / 6],
  [3, 2, 1 / 6],
].map(([d, k, volume]) => ({
  name: `slice ${k} of a cube in ${d} dimensions`,
  text: `AND(${sum(d!, (name) => name)}>=${k},${sum(d!, (name) => name)}<=${k! + 1})`,
  axes: cube(d!, 0, 1),
  volume: volume!,
}));

const OTHERS: readonly Region[] = [
  {
    // Two unit discs with centres one apart (elementary).
    name: 'a lens of two discs',
    text: 'AND(a^2+b^2<=1,(a-1)^2+b^2<=1)',
    axes: [
      ['a', 0, 1],
      ['b', -1, 1],
    ],
    volume: (2 * Math.PI) / 3 - Math.sqrt(3) / 2,
  },
  {
    // Steinmetz's solid of three cylinders, 8(2 − √2) (from memory; recomputed).
    name: 'three crossed cylinders',
    text: 'AND(a^2+b^2<=1,b^2+p^2<=1,p^2+a^2<=1)',
    axes: cube(3, -1, 1),
    volume: 8 * (2 - Math.SQRT2),
  },
];

const ROWS = 30_000;

describe('regions of known volume', () => {
  test.each([...BALLS, ...SIMPLICES, ...SLICES, ...OTHERS])(
    '$name: proved bounds hold its volume, and so do draws [published]',
    ({ text, axes, volume }) => {
      const envelope = provedBoxes(text, axes);
      const { lowerMass, upperMass } = envelope;
      // The digits printed: 12.
      expect(lowerMass).toBeLessThan(volume * (1 + 1e-11));
      expect(upperMass).toBeGreaterThan(volume * (1 - 1e-11));
      const { proposals } = new BoxDrawer(envelope).rows(keyOf('plan-2027', text), 1, ROWS);
      // Of `proposals` tries a share `volume / upperMass` is kept: normal to four digits here.
      const share = volume / upperMass;
      const deviation = Math.sqrt(proposals * share * (1 - share));
      expect(Math.abs(ROWS - proposals * share)).toBeLessThan(Z_FALSE_ALARM * deviation + 1);
      expect(Math.abs(ROWS - proposals * share * 1.05)).toBeGreaterThan(Z_FALSE_ALARM * deviation);
    },
  );
});

/** EXP(-½ xᵀP x), P the inverse of the matrix of equal correlations ρ between d variables. */
function normal(d: number, rho: number): string {
  const whole = (1 - rho) * (1 + (d - 1) * rho);
  const own = (1 + (d - 2) * rho) / whole;
  const cross = rho / whole;
  const names = NAMES.slice(0, d);
  const pairs = names.flatMap((a, i) => names.slice(i + 1).map((b) => `${a}*${b}`));
  return `EXP(-0.5*(${own}*(${sum(d, (name) => `${name}^2`)})-${2 * cross}*(${pairs.join('+')})))`;
}

describe('correlated normal shapes', () => {
  // Rank correlation 6/π · asin(ρ/2) (Pearson 1907, from memory); moments are ρ and 1. The limits
  // cut off 10^-8.
  test.each([
    [2, 0.8],
    [2, -0.5],
    [3, 0.8],
  ])('%d variables with correlation %d have its moments and ranks [published]', (d, rho) => {
    const axes = cube(d, -6, 6);
    const envelope = provedBoxes(normal(d, rho), axes);
    const determinant = (1 - rho) ** (d - 1) * (1 + (d - 1) * rho);
    const volume = (2 * Math.PI) ** (d / 2) * Math.sqrt(determinant);
    expect(envelope.lowerMass).toBeLessThan(volume);
    expect(envelope.upperMass).toBeGreaterThan(volume * (1 - 1e-7));
    const { columns } = new BoxDrawer(envelope).rows(keyOf('plan-2027', `${d} ${rho}`), 1, ROWS);
    const [a, b] = columns;
    // Standard deviations of a mean product: √(1 + ρ²)/√n; of a variance: √2/√n; of ranks below 1/√n.
    const room = Z_FALSE_ALARM / Math.sqrt(ROWS);
    const average = (of: (i: number) => number): number =>
      a!.reduce((total, _, i) => total + of(i), 0) / ROWS;
    expect(Math.abs(average((i) => a![i]! * b![i]!) - rho)).toBeLessThan(
      room * Math.sqrt(1 + rho * rho),
    );
    expect(Math.abs(average((i) => a![i]! ** 2) - 1)).toBeLessThan(room * Math.SQRT2);
    const ranks = (6 / Math.PI) * Math.asin(rho / 2);
    expect(Math.abs(rankCorrelation(a!, b!) - ranks)).toBeLessThan(room);
    expect(Math.abs(rankCorrelation(a!, b!) + ranks)).toBeGreaterThan(room);
  });
});

// (2 + √2 + 5 ln(1 + √2))/15 (Santaló 1976, from memory; recomputed); the mean square is 1/3.
const MEAN_DISTANCE = 0.5214054331647;

describe('two places in the unit square', () => {
  test('draws have their mean distance [published]', () => {
    const drawer = new BoxDrawer(provedBoxes('1+0*a', cube(4, 0, 1)));
    const { columns } = drawer.rows(keyOf('plan-2027', 'distance'), 1, ROWS);
    const [a, b, p, q] = columns.map((column) => Array.from(column));
    const squares = a!.map((x, i) => (x - p![i]!) ** 2 + (b![i]! - q![i]!) ** 2);
    const drawn = squares.reduce((total, square) => total + Math.sqrt(square), 0) / ROWS;
    const room = Z_FALSE_ALARM * Math.sqrt((1 / 3 - MEAN_DISTANCE ** 2) / ROWS);
    expect(Math.abs(drawn - MEAN_DISTANCE)).toBeLessThan(room);
    expect(Math.abs(drawn - 1.05 * MEAN_DISTANCE)).toBeGreaterThan(room);
  });
});

const rowsOf = (axes: readonly AxisText[]) =>
  axes.map(([name, from, to, step = 0]) => [name, from, to, step]);
const meanOf = (text: string, axes: readonly AxisText[], quantity: string) =>
  mean([[text]], rowsOf(axes), [[quantity]], [])[1] as [number, number, number];

describe('EXPECT in several variables', () => {
  test.each<[string, string, readonly AxisText[], string, number, number]>([
    ['the mean square radius of a disc', 'a^2+b^2<=1', cube(2, -1, 1), 'a^2+b^2', 0.5, 2e-4],
    ['the mean of a simplex', 'a+b<=1', cube(2, 0, 1), 'a', 1 / 3, 1e-4],
    ['the covariance of a normal pair', normal(2, 0.8), cube(2, -6, 6), 'a*b', 0.8, 1e-3],
  ])('%s [published]', (_, text, axes, quantity, exact, near) => {
    const [value, atLeast, atMost] = meanOf(text, axes, quantity);
    // What the limits at six standard deviations cut off is below 10^-6.
    expect(atLeast).toBeLessThan(exact + 1e-6);
    expect(atMost).toBeGreaterThan(exact - 1e-6);
    expect(Math.abs(value - exact)).toBeLessThan(near);
  });

  test('exact sums over whole numbers [published]', () => {
    // Hypergeometric-like heights: a·b of two binomial counts of mean 5 (Vandermonde).
    const counts: readonly AxisText[] = [
      ['a', 0, 10, 1],
      ['b', 0, 10, 1],
    ];
    const [value, atLeast, atMost] = meanOf('COMBIN(10,a)*COMBIN(10,b)', counts, 'a*b');
    expect(value).toBeCloseTo(25, 10);
    expect(atLeast).toBeLessThanOrEqual(25);
    expect(atMost).toBeGreaterThanOrEqual(25);
    expect(atMost - atLeast).toBeLessThan(1e-9);
    // Crates in three stores: 40/3 in each.
    const crates = NAMES.slice(0, 3).map((name): AxisText => [name, 0, 40, 1]);
    expect(meanOf('a+b+p=40', crates, 'a')[0]).toBeCloseTo(40 / 3, 10);
  });
});
