/**
 * Areas and cumulative shares of densities that tables and textbooks know, on finite limits.
 * Where the published value is over a whole line, the limits leave out less than the last
 * printed digit, as the entry says. All numbers were recomputed to the digits shown with
 * arbitrary-precision software from the cited formula.
 */
import { Drawer } from '../../src/draw/column';
import type { Envelope } from '../../src/envelope/envelope';
import { keyOf } from '../../src/random/key';
import { Z_FALSE_ALARM } from '../draw/statistics';
import { areaOf, proved } from '../envelope/proved';

interface Entry {
  readonly name: string;
  readonly density: string;
  readonly from: number;
  readonly to: number;
  readonly area: number;
  /** Pairs of x and the share of the area below it. */
  readonly below: readonly (readonly [x: number, share: number])[];
  readonly source: string;
}

const ROOT_2_PI = 2.5066282746310007;
const ROOT_PI = 1.772453850905516;

const entries: readonly Entry[] = [
  {
    name: 'standard normal from −6 to 6',
    density: 'EXP(-0.5*x^2)',
    from: -6,
    to: 6,
    area: ROOT_2_PI * (1 - 2 * 9.86587645037698e-10),
    // Shares of the truncated density: (Φ(x) − Φ(−6)) / (1 − 2Φ(−6)).
    below: [
      [0.5, 0.691462461274013],
      [1, 0.841344746068543],
      [1.96, 0.9750021048517796],
      [2, 0.9772498680518208],
      [3, 0.9986501019683699],
    ].map(
      ([x, phi]) => [x!, (phi! - 9.86587645037698e-10) / (1 - 2 * 9.86587645037698e-10)] as const,
    ),
    source: 'Φ: Abramowitz & Stegun 26.1/26.2',
  },
  {
    name: 'von Mises, k = 2',
    density: 'EXP(2*COS(x))',
    from: -Math.PI,
    to: Math.PI,
    area: 14.323056878100513,
    below: [[1, 0.8895777369550365]],
    source: '2πI0(2): A&S 9.6/9.8; DLMF 10.32',
  },
  {
    name: 'von Mises, k = 1',
    density: 'EXP(COS(x))',
    from: -Math.PI,
    to: Math.PI,
    area: 2 * Math.PI * 1.2660658777520084,
    below: [[0.5, 0.664076474604493]],
    source: 'I0(1) = 1.2660658777520083: A&S 9.6/9.8; DLMF 10.32',
  },
  {
    name: 'von Mises, k = 4',
    density: 'EXP(4*COS(x))',
    from: -Math.PI,
    to: Math.PI,
    area: 2 * Math.PI * 11.30192195213633,
    below: [],
    source: 'I0(4) = 11.30192195213633: A&S 9.6/9.8; DLMF 10.32',
  },
  {
    name: 'beta (2.5, 1.5)',
    density: 'x^1.5*(1-x)^0.5',
    from: 0,
    to: 1,
    area: Math.PI / 16,
    below: [[0.5, 0.2877934092108062]],
    source: 'B(2.5, 1.5) = π/16, I_.5(2.5, 1.5): DLMF 5.12, 8.17',
  },
  {
    name: 'beta (2, 5)',
    density: 'x*(1-x)^4',
    from: 0,
    to: 1,
    area: 1 / 30,
    below: [[0.3, 0.579825]],
    source: 'I_.3(2, 5) = .579825: DLMF 8.17',
  },
  {
    name: 'gamma (2.5), of which 4E-24 lies above 60',
    density: 'x^1.5*EXP(-x)',
    from: 0,
    to: 60,
    area: 0.75 * ROOT_PI,
    below: [[3, 0.6937810815867216]],
    source: 'Γ(1/2) = 1.772453850905516, Γ(2.5) = .75 Γ(1/2), P(2.5, 3): DLMF 5.4, 8.2',
  },
  {
    name: 'logistic, of which 4E-18 lies outside −40 to 40',
    density: 'EXP(x)/(1+EXP(x))^2',
    from: -40,
    to: 40,
    area: 1,
    below: [[1, 0.7310585786300049]],
    source: 'CDF(1) = 1/(1 + 1/e)',
  },
  {
    name: 'Wigner semicircle, R = 1',
    density: 'SQRT(1-x^2)',
    from: -1,
    to: 1,
    area: Math.PI / 2,
    below: [[0.5, 0.8044988905221147]],
    source: 'CDF(.5) = .80449889052211468, closed form',
  },
  {
    name: 'Cauchy from 0 to 2',
    density: '1/(1+x^2)',
    from: 0,
    to: 2,
    area: Math.PI * (0.8524163823495667 - 0.5),
    below: [],
    source: 'CDF(2) = .85241638234956673, closed form',
  },
  {
    name: 'Student t with 5 degrees from 0 to 1',
    density: '(1+x^2/5)^(-3)',
    from: 0,
    to: 1,
    // The whole line has area √5 B(1/2, 5/2) = 3π√5/8.
    area: ((3 * Math.PI * Math.sqrt(5)) / 8) * (0.8183912661754387 - 0.5),
    below: [],
    source: 'CDF(1) = .81839126617543869, closed form',
  },
  {
    name: 'Gumbel up to .5, of which EXP(−148) lies below −5',
    density: 'EXP(-x-EXP(-x))',
    from: -5,
    to: 0.5,
    area: 0.54523921189260505,
    below: [],
    source: 'CDF(.5) = .54523921189260506, closed form',
  },
  {
    name: 'Maxwell from 0 to 1',
    density: 'x^2*EXP(-(x^2)/2)',
    from: 0,
    to: 1,
    area: (ROOT_2_PI / 2) * 0.1987480430987992,
    below: [],
    source: 'CDF(1) = .1987480430987992, closed form',
  },
  {
    name: 'hyperbolic secant from 0 to 1',
    density: '1/(EXP(PI()*x/2)+EXP(-(PI()*x/2)))',
    from: 0,
    to: 1,
    area: 0.8695181135728437 - 0.5,
    below: [],
    source: 'CDF(1) = .86951811357284365, closed form',
  },
  {
    name: 'triangular (0, 2, 5)',
    density: 'IF(x<2,x/2,(5-x)/3)',
    from: 0,
    to: 5,
    area: 2.5,
    below: [
      [1, 0.1],
      [3, 11 / 15],
    ],
    source: 'closed form',
  },
  {
    name: 'two-sided power (0, 2, 5, n = 3.5)',
    density: 'IF(x<2,x/2,(5-x)/3)^2.5',
    from: 0,
    to: 5,
    area: 5 / 3.5,
    below: [
      [1, 0.035355339059327376],
      [3, 0.85484505227951535],
    ],
    source: 'van Dorp & Kotz 2002',
  },
  {
    name: 'curvilinear trapezoid CTrap(−1, 1, .5)',
    density: '0.5*LN(1.5/MAX(0.5,ABS(x)))',
    from: -1.5,
    to: 1.5,
    area: 1,
    below: [[0.75, 0.8849301927099795]],
    source: 'JCGM 101:2008 6.4.3.2',
  },
  {
    name: 'EXP(−x⁴), of which EXP(−256) lies outside −4 to 4',
    density: 'EXP(-(x^4))',
    from: -4,
    to: 4,
    area: 1.812804954110954,
    below: [[0, 0.5]],
    source: '2Γ(5/4): DLMF 5.9.1',
  },
  {
    name: 'EXP(−(x² − 1)²), of which EXP(−225) lies outside −4 to 4',
    density: 'EXP(-((x^2-1)^2))',
    from: -4,
    to: 4,
    area: 1.9737321500898237,
    below: [[0, 0.5]],
    source: 'recomputed from the integral',
  },
  {
    name: 'a rippled bell, of which EXP(−72) lies outside −12 to 12',
    density: 'EXP(-(x^2)/2)*(1+SIN(3*x)^2)',
    from: -12,
    to: 12,
    area: 3.7599423928585516,
    below: [[0, 0.5]],
    source: '√(2π)(3/2 − e^−18/2)',
  },
  {
    name: 'x to the power x',
    density: 'x^x',
    from: 0,
    to: 1,
    area: 0.7834305107121344,
    below: [],
    source: 'recomputed from the integral',
  },
];

const ROWS = 200_000;
/** A root or a logarithm at an end costs the quadrature digits; everywhere else ten remain. */
const ROUGH = new Map([
  ['SQRT(1-x^2)', 1e-8],
  ['x^1.5*(1-x)^0.5', 1e-8],
  ['x^x', 1e-8],
]);

function unscaled(envelope: Envelope): Envelope {
  expect(envelope.exponent).toBe(0);
  return envelope;
}

describe('areas', () => {
  test.each(entries)('the proved area of $name holds $area ($source) [published]', (entry) => {
    const envelope = unscaled(proved(entry.density, entry.from, entry.to));
    // Half a unit of the sixteenth digit, to which the published values are printed.
    expect(envelope.areaLo).toBeLessThanOrEqual(entry.area * (1 + 5e-16));
    expect(envelope.areaHi).toBeGreaterThanOrEqual(entry.area * (1 - 5e-16));
    expect(envelope.areaHi - envelope.areaLo).toBeLessThanOrEqual(0.01 * entry.area);
  });

  test.each(entries)('areaOf $name is $area ($source) [published]', (entry) => {
    const { density, from, to, area } = entry;
    const tolerance = ROUGH.get(density) ?? 1e-10;
    expect(Math.abs(areaOf(proved(density, from, to)) / area - 1)).toBeLessThan(tolerance);
  });
});

const withShares = entries.filter(({ below }) => below.length > 0);

describe('shares', () => {
  test.each(withShares)(
    'areas up to a place of $name are in proportion ($source) [published]',
    (entry) => {
      const { density, from, to, below } = entry;
      const whole = areaOf(proved(density, from, to));
      const tolerance = ROUGH.get(density) ?? 1e-10;
      for (const [x, share] of below)
        expect(Math.abs(areaOf(proved(density, from, x)) / whole - share)).toBeLessThan(tolerance);
    },
  );

  // Each share is missed by sampling error alone once in 10^6.
  test.each(withShares)('200,000 draws of $name have its shares ($source) [published]', (entry) => {
    const { name, density, from, to, below } = entry;
    const { values } = new Drawer(proved(density, from, to)).column(
      keyOf('plan-2027', name),
      1,
      ROWS,
    );
    for (const [x, share] of below) {
      const found = values.filter((value) => value < x).length / ROWS;
      const deviation = Math.sqrt((share * (1 - share)) / ROWS);
      expect(Math.abs(found - share)).toBeLessThan(Z_FALSE_ALARM * deviation);
    }
  });

  test('a share that is off by 0.01 is noticed [law]', () => {
    const { values } = new Drawer(proved('EXP(2*COS(x))', -Math.PI, Math.PI)).column(
      keyOf('plan-2027', 'control'),
      1,
      ROWS,
    );
    const found = values.filter((value) => value < 1).length / ROWS;
    const share = 0.8895777369550365 + 0.01;
    const deviation = Math.sqrt((share * (1 - share)) / ROWS);
    expect(Math.abs(found - share)).toBeGreaterThan(Z_FALSE_ALARM * deviation);
  });

  // Mean 20/9 (van Dorp & Kotz 2002); the standard deviation is taken from the draws.
  test('draws of the two-sided power have the mean 20/9 [published]', () => {
    const density = 'IF(x<2,x/2,(5-x)/3)^2.5';
    const { values } = new Drawer(proved(density, 0, 5)).column(
      keyOf('plan-2027', 'mean'),
      1,
      ROWS,
    );
    const mean = values.reduce((sum, x) => sum + x, 0) / ROWS;
    const variance = values.reduce((sum, x) => sum + (x - mean) ** 2, 0) / ROWS;
    expect(Math.abs(mean - 20 / 9)).toBeLessThan(Z_FALSE_ALARM * Math.sqrt(variance / ROWS));
  });
});
