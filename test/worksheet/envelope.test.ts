import type { Cell } from '../../src/index';
import { acceptance, draw, envelope, profile } from '../../src/index';
import { itemsOf, numbersOf, SHAPES } from './shapes';

const HEADINGS = [
  'from',
  'to',
  'upper left',
  'upper right',
  'lower left',
  'lower right',
  'share of proposals',
  'acceptance',
];
const SEED = [['plan-2027']];
const LABEL = [['press']];
/** Slivers at kinks and jumps are left out up to this share of the limits each. */
const SLIVER = 2 ** -42;

const shapes = SHAPES.map((shape) => [shape.name, shape] as const);

describe('envelope', () => {
  it.each(shapes)('of %s has its headings and pieces that tile the limits [law]', (_, shape) => {
    const { density, limits, givens } = shape;
    const answer = envelope(density, limits, givens);
    expect(answer[0]).toEqual(HEADINGS);
    const pieces = numbersOf(answer);
    const items = itemsOf(acceptance(density, limits, [[1]], SEED, LABEL, givens));
    const [from, to] = ['from', 'to'].map((end) =>
      Number(items.get(`x ${end}`) ?? items.get(`t ${end}`)),
    );
    expect([pieces[0]![0], pieces.at(-1)![1]]).toEqual([from, to]);
    expect(pieces).toHaveLength(Number(items.get('pieces')));
    pieces.forEach(([a, b], i) => {
      expect(a).toBeLessThan(b!);
      const next = pieces[i + 1]?.[0] ?? b!;
      expect(next).toBeGreaterThanOrEqual(b!);
      expect(next - b!).toBeLessThan(SLIVER * (to! - from!));
    });
  });

  it.each(shapes)('of %s has an upper line on or above a lower one ≥ 0 [law]', (_, shape) => {
    for (const piece of numbersOf(envelope(shape.density, shape.limits, shape.givens))) {
      const [, , upperLeft, upperRight, lowerLeft, lowerRight, share, accepted] = piece;
      expect(lowerLeft! >= 0 && lowerRight! >= 0).toBe(true);
      expect(lowerLeft! <= upperLeft! && lowerRight! <= upperRight!).toBe(true);
      expect(share! >= 0 && share! <= 1 && accepted! >= 0 && accepted! <= 1).toBe(true);
    }
  });

  it.each(shapes)(
    'of %s has the areas, shares and acceptance that ACCEPTANCE tells [law]',
    (_, { density, limits, givens }) => {
      const pieces = numbersOf(envelope(density, limits, givens));
      const items = itemsOf(acceptance(density, limits, [[1]], SEED, LABEL, givens));
      const told = (item: string): number => Number(items.get(item));
      const areas = pieces.map(([from, to, upperLeft, upperRight, lowerLeft, lowerRight]) => ({
        upper: ((upperLeft! + upperRight!) / 2) * (to! - from!),
        lower: ((lowerLeft! + lowerRight!) / 2) * (to! - from!),
      }));
      const upper = areas.reduce((sum, area) => sum + area.upper, 0);
      const lower = areas.reduce((sum, area) => sum + area.lower, 0);
      // Sums of up to 150 areas in doubles: off by less than 150 · 2^-52.
      const isNear = (a: number, b: number): boolean => Math.abs(a - b) <= 4e-14 * Math.abs(b);
      expect(told('area at least')).toBeGreaterThanOrEqual(lower * (1 - 4e-14));
      expect(told('area at most')).toBeLessThanOrEqual(upper * (1 + 4e-14));
      expect(told('area at least')).toBeLessThanOrEqual(told('area at most'));
      const isTable = (items.get('density') as string).startsWith('table');
      const promised = told('acceptance promised by the proof');
      expect(isNear(promised, isTable ? 1 : lower / upper)).toBe(true);
      const shareSum = pieces.reduce((sum, piece) => sum + piece[6]!, 0);
      expect(Math.abs(shareSum - 1)).toBeLessThan(4e-14);
      pieces.forEach((piece, i) => {
        const { upper: u, lower: l } = areas[i]!;
        expect(Math.abs(piece[6]! - u / upper)).toBeLessThan(4e-14);
        if (!isTable && u > 0) expect(Math.abs(piece[7]! - l / u)).toBeLessThan(1e-9);
      });
    },
  );

  it('is one piece exactly for a straight line, and has no proposals where nothing is [law]', () => {
    const line = numbersOf(envelope([['1+2*x']], [[0, 3]], []));
    expect(line).toHaveLength(1);
    const [from, to, , , , , share] = line[0]!;
    expect([from, to, share]).toEqual([0, 3, 1]);
    const gap = numbersOf(envelope([['IF(AND(x>1,x<3),0,1)']], [[0, 6]], []));
    const inGap = gap.filter(([a, b]) => a! >= 1 && b! <= 3);
    expect(inGap.length).toBeGreaterThan(0);
    expect(inGap.every((piece) => piece[6] === 0 && piece[7] === 1)).toBe(true);
  });

  it('of a table is the table itself, jump and all [law]', () => {
    const table = [
      [0, 0],
      [4, 3],
      [4, 1],
      [9, 0],
    ];
    // Areas 6 and 2.5 of 8.5.
    expect(envelope(table, null, []).slice(1)).toEqual([
      [0, 4, 0, 3, 0, 3, expect.closeTo(6 / 8.5, 14) as Cell, 1],
      [4, 9, 1, 0, 1, 0, expect.closeTo(2.5 / 8.5, 14) as Cell, 1],
    ]);
  });

  it('holds where the draws fall about as often as its shares say [law]', () => {
    const n = 5000;
    const { density, limits, givens } = SHAPES[3]!;
    const pieces = numbersOf(envelope(density, limits, givens));
    const values = draw(density, limits, [[n]], SEED, LABEL, givens).map(([x]) => Number(x));
    for (const [from, to, , , , , share, accepted] of pieces) {
      const observed = values.filter((x) => x >= from! && x <= to!).length / n;
      // A draw's share lies between share · accepted and share / 0.99; 5.5 standard errors over
      // up to 40 pieces: false alarm below 2e-6.
      const slack = 5.5 * Math.sqrt(share! / n) + 1 / n;
      expect(observed).toBeGreaterThan(share! * accepted! - slack);
      expect(observed).toBeLessThan(share! / 0.99 + slack);
    }
  });
});

describe('profile', () => {
  const COUNTS = [2, 7, 201];

  it.each(shapes)(
    'of %s has the density between its lines at every point, whatever the count [law]',
    (_, { density, limits, givens }) => {
      for (const count of COUNTS) {
        const answer = profile(density, limits, [[count]], givens);
        expect(answer[0]).toEqual(['x', 'density', 'upper', 'lower', 'share below']);
        expect(answer).toHaveLength(count + 1);
        for (const [x, height, upper, lower] of numbersOf(answer)) {
          // Lines and heights are worked in doubles and divided by the area: a few 2^-53.
          const slack = 4e-15 * upper!;
          const isBetween = lower! - slack <= height! && height! <= upper! + slack;
          expect([x, isBetween]).toEqual([x, true]);
        }
      }
    },
  );

  it.each(shapes)('of %s has evenly spaced points and shares from 0 to 1 [law]', (_, shape) => {
    const points = numbersOf(profile(shape.density, shape.limits, [[101]], shape.givens));
    const [from, to] = [points[0]![0]!, points[100]![0]!];
    points.forEach(([x], i) => {
      expect(Math.abs(x! - (from + ((to - from) * i) / 100))).toBeLessThan(1e-14 * (to - from));
    });
    const shares = points.map((point) => point[4]!);
    expect([shares[0], shares[100]]).toEqual([0, 1]);
    shares.forEach((share, i) => expect(share).toBeGreaterThanOrEqual(shares[i - 1] ?? 0));
  });

  it.each([
    ['a hump', 1e-6],
    ['two humps', 1e-6],
    ['an overflow', 1e-5],
    ['an underflow', 1e-5],
    ['a cut table', 1e-12],
  ])('of %s has area 1 by the trapezoidal rule to %d [law]', (name, tolerance) => {
    // 2,001 points: h² (f′(b) − f′(a)) / 12 is below the tolerance for these shapes.
    const { density, limits, givens } = SHAPES.find((shape) => shape.name === name)!;
    const points = numbersOf(profile(density, limits, [[2001]], givens));
    let area = 0;
    for (let i = 1; i < points.length; i++) {
      const [a, b] = [points[i - 1]!, points[i]!];
      area += ((a[1]! + b[1]!) / 2) * (b[0]! - a[0]!);
    }
    expect(Math.abs(area - 1)).toBeLessThan(tolerance);
  });

  it('has 201 points unless a count is given, and the same for blank and 0 [law]', () => {
    const shown = (count: readonly (readonly Cell[])[] | null) =>
      profile([['x']], [[0, 1]], count, []);
    expect(shown(null)).toHaveLength(202);
    for (const blank of [null, '', 0]) expect(shown([[blank]])).toEqual(shown(null));
    expect(shown([[100_000]])).toHaveLength(100_001);
  });

  it('shows both sides of a jump at the jump itself [law]', () => {
    const points = numbersOf(profile([['IF(x<2,3,1)']], [[0, 4]], [[5]], []));
    const [, height, upper, lower] = points[2]!;
    // Heights 3 and 1 over an area of 8.
    expect(height).toBeCloseTo(1 / 8, 12);
    expect(upper).toBeCloseTo(3 / 8, 12);
    expect(lower).toBeCloseTo(1 / 8, 12);
  });
});
