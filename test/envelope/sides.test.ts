/** Unbounded sides and poles: what is proved of them, what is refused, and the hats drawn from. */
import { Drawer } from '../../src/draw/column';
import type { Hat } from '../../src/envelope/hat';
import { heightOn, placeOn } from '../../src/envelope/hat';
import { areaOf, proved } from './proved';

const U = Infinity;

/** Density, from, to, area over the limits, source. Those without a closed form were recomputed from the integral. */
const AREAS: readonly (readonly [string, number, number, number, string])[] = [
  ['EXP(-(x^4))', -U, U, 1.812804954110954, '2Γ(5/4), DLMF 5.9.1'],
  ['EXP(-((x^2-1)^2))', -U, U, 1.973732150089824, 'recomputed from the integral'],
  ['EXP(-(x^2)/2)*(1+SIN(3*x)^2)', -U, U, 3.759942392858552, '√(2π)(3/2 − e^−18/2)'],
  ['1/(1+((x-5)/2)^2)', -U, U, 2 * Math.PI, 'Cauchy, closed form'],
  ['EXP(-0.5*((x-250)/4)^2)', -U, U, 4 * Math.sqrt(2 * Math.PI), 'A&S 26.2.1'],
  ['x^-0.5*EXP(-x)', 0, U, 1.772453850905516, 'Γ(1/2), A&S 6.1.8'],
  ['x^-3.5', 2, U, 2 ** -2.5 / 2.5, 'closed form'],
  ['EXP(x)/(1+EXP(x))^2', -U, U, 1, 'logistic, closed form'],
  ['x^2/(EXP(x)-1)', 0, U, 2 * 1.2020569031595942, '2ζ(3), DLMF 25.5.1'],
  ['-LN(x)', 0, 1, 1, 'closed form'],
  ['x^-0.5*(1-x)^-0.5', 0, 1, Math.PI, 'B(1/2, 1/2), DLMF 5.12.1'],
  ['(x-2)^-2.5*(x>3)', 2, U, 2 / 3, 'closed form'],
  ['EXP(-x)-EXP(-2*x)', 0, U, 0.5, 'closed form'],
  ['EXP(-x)*(x>=5)', 0, U, Math.exp(-5), 'closed form'],
  ['(1+x^2/3)^-2', -U, U, 2.7206990463513265, 'π√3/2, Student t with 3 degrees'],
];

describe('proveEnvelope(tape, from, to) on unbounded sides and at poles', () => {
  test.each(AREAS)('%s from %d to %d encloses its area [published]', (text, from, to, area) => {
    const envelope = proved(text, from, to);
    // One ulp of room: some of the areas above are themselves rounded.
    expect(envelope.areaLo).toBeLessThanOrEqual(area * (1 + 1e-15));
    expect(envelope.areaHi).toBeGreaterThanOrEqual(area * (1 - 1e-15));
    expect(envelope.lowerArea / envelope.upperArea).toBeGreaterThanOrEqual(0.99);
    expect(Math.abs(areaOf(envelope) / area - 1)).toBeLessThan(1e-12);
  });

  test.each(AREAS)('%s from %d to %d lies under its hats [law]', (text, from, to) => {
    const { hats, heightAt } = proved(text, from, to);
    expect(hats.length).toBeGreaterThan(0);
    const place = { x: 0, t: 0, height: 0 };
    for (const hat of hats) {
      for (let k = 1; k <= 4000; k++) {
        // Half of the places spread evenly over the hat, half towards its far end.
        const s = k % 2 === 0 ? k / 4000 : 2 ** (-k / 100);
        placeOn(hat, s, place);
        const height = heightAt(place.x);
        if (Number.isFinite(height)) expect(height).toBeLessThanOrEqual(place.height);
      }
    }
  });

  test('a hat lowered by a hundredth is caught by the check above [law]', () => {
    const { hats, heightAt } = proved('EXP(-x)', 0, U);
    const hat = hats[0]!;
    const place = { x: 0, t: 0, height: 0 };
    placeOn({ ...hat, height: hat.height * 0.99 }, 1, place);
    expect(heightAt(place.x)).toBeGreaterThan(place.height);
  });

  test.each(AREAS)(
    '%s from %d to %d is drawn inside its limits, accepted as expected [law]',
    (text, from, to) => {
      const envelope = proved(text, from, to);
      const n = 20_000;
      const { values, proposals } = new Drawer(envelope).column([3, 4], 1, n);
      expect(values.every((x) => x > from && x < to)).toBe(true);
      const chance = areaOf(envelope) / envelope.upperArea;
      // Proposals until n acceptances: mean n/p, variance n(1 − p)/p²; 4.9 standard deviations: false alarm 1e-6.
      const sd = Math.sqrt(n * (1 - chance)) / chance;
      expect(Math.abs(proposals - n / chance)).toBeLessThan(4.9 * sd + 1);
    },
  );

  test('a heavy side keeps its share at every distance [law]', () => {
    // x^-1.5 on 1…∞: P(X > d) = d^-0.5; n draws, 4.9 standard deviations: false alarm 1e-6 a distance.
    const n = 200_000;
    const { values } = new Drawer(proved('x^-1.5', 1, U)).column([5, 6], 1, n);
    for (const d of [2, 10, 100, 1e4, 1e6]) {
      const share = d ** -0.5;
      const above = values.filter((x) => x > d).length;
      expect(Math.abs(above - n * share)).toBeLessThan(4.9 * Math.sqrt(n * share * (1 - share)));
    }
  });

  test.each<readonly [string, number, number, string]>([
    [
      '1/x',
      1,
      U,
      'Density: its area is infinite towards larger x: it does not fall fast enough; give a number as the upper limit instead of unbounded.',
    ],
    [
      '1/(1+ABS(x))',
      -U,
      U,
      'Density: its area is infinite towards smaller x: it does not fall fast enough; give a number as the lower limit instead of unbounded.',
    ],
    [
      '1',
      0,
      U,
      'Density: its area is infinite towards larger x: it does not fall fast enough; give a number as the upper limit instead of unbounded.',
    ],
    [
      'EXP(x)',
      0,
      U,
      'Density: its area is infinite towards larger x: it does not fall fast enough; give a number as the upper limit instead of unbounded.',
    ],
    ['x^-1', 0, 1, 'Density: its area is infinite at x = 0; start the limits above 0.'],
    [
      '1/(x*LN(x)^2)',
      2,
      U,
      'Density: that its area is finite towards larger x cannot be proved; give a number as the upper limit instead of unbounded.',
    ],
  ])('%s from %d to %d is refused with its own message [law]', (text, from, to, message) => {
    expect(() => proved(text, from, to)).toThrow(message);
  });
});

describe('placeOn(hat, s, out)', () => {
  const side = { origin: 0, direction: 1, isBeyond: true, near: null } as const;
  const HATS: readonly Hat[] = [
    { ...side, kind: 'power', c: 3, height: 2, rate: 1, area: 3 },
    { ...side, kind: 'power', c: 3, height: 2, rate: -2, area: 24 },
    { ...side, kind: 'exponential', c: 3, height: 2, rate: 0.5, area: 4.5 },
    { ...side, isBeyond: false, kind: 'pole', c: 3, height: 2, rate: -1, area: 12 },
    { ...side, direction: -1, kind: 'power', c: 3, height: 2, rate: 0, area: 6 },
  ];

  test.each(HATS)('$kind with rate $rate agrees with heightOn at its own places [law]', (hat) => {
    const place = { x: 0, t: 0, height: 0 };
    for (let s = 1 / 64; s <= 1; s += 1 / 64) {
      placeOn(hat, s, place);
      expect(heightOn(hat, place.x) / place.height).toBeCloseTo(1, 12);
    }
  });

  test.each(HATS)('$kind with rate $rate has the area it states beyond each place [law]', (hat) => {
    // The area from the place of s to the far end is s times the whole: its slope there is the height.
    const [a, b] = [
      { x: 0, t: 0, height: 0 },
      { x: 0, t: 0, height: 0 },
    ];
    for (let s = 0.05; s < 1; s += 0.1) {
      placeOn(hat, s - 1e-5, a);
      placeOn(hat, s + 1e-5, b);
      const mean = (hat.area * 2e-5) / Math.abs(b.x - a.x);
      placeOn(hat, s, a);
      expect(mean / a.height).toBeCloseTo(1, 5);
    }
  });
});
