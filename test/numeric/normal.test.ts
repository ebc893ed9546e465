import { normalPlace, normalQuantile, normalShare } from '../../src/numeric/normal';

const GRID = 2 ** -53;

describe('normalQuantile', () => {
  // mpmath at 40 digits, rounded to doubles; the shares are the doubles that the texts parse to.
  it.each([
    [2 ** -54, -8.292361075813595],
    [2 ** -40, -7.047700256664409],
    [2 ** -20, -4.7630010342678135],
    [2 ** -13, -3.668329285121323],
    [0.025, -1.9599639845400543],
    [0.1, -1.2815515655446004],
    [0.25, -0.6744897501960817],
    [0.4375, -0.1573106846101707],
  ])('normalQuantile(%d) is %d [published]', (share, z) => {
    expect(Math.abs(normalQuantile(share) / z - 1)).toBeLessThanOrEqual(1e-15);
  });
});

describe('normalShare', () => {
  // mpmath at 40 digits, rounded to doubles.
  it.each([
    [-8.25, 7.919726314642477e-17, 2e-14],
    [-5, 2.866515718791939e-7, 2e-14],
    [-2.5, 0.006209665325776135, 2e-14],
    [-1, 0.15865525393145705, 2e-14],
    [-0.125, 0.4502617751698871, 2e-14],
    [0.5, 0.6914624612740131, 3e-16],
    [3, 0.9986501019683699, 3e-16],
  ])('normalShare(%d) is %d [published]', (z, share, tolerance) => {
    expect(Math.abs(normalShare(z) - share)).toBeLessThanOrEqual(tolerance * (z < 0 ? share : 1));
  });

  it('normalShare(z) lies within 0 and 1 however far z is [law]', () => {
    for (const z of [-1000, -60, -39, 9, 60, 1000]) {
      expect(normalShare(z)).toBeGreaterThan(0);
      expect(normalShare(z)).toBeLessThan(1);
    }
  });
});

describe('normalPlace', () => {
  it('normalPlace(u) is finite on all of the grid, odd about its middle, and rises [law]', () => {
    const wholes = [0, 1, 2, 3, 1000, 2 ** 30, 2 ** 51, 2 ** 52 - 1];
    const places = wholes.map((k) => normalPlace(k * GRID));
    expect(places.every((z, i) => z - z === 0 && (i === 0 || z > places[i - 1]!))).toBe(true);
    // 2^53 − 1 − k is the mirror of k.
    expect(wholes.map((k) => normalPlace(1 - GRID - k * GRID))).toEqual(places.map((z) => -z));
  });

  // The errors of the two together: 1e-15 of z moves the share by z² of that, at most 69 · 1e-15, and
  // 2e-14 come from the way back.
  it('normalShare(normalPlace(u)) is the middle of the step of u, in the tail too [law]', () => {
    for (let k = 0; k < 2 ** 52; k = 2 * k + 1 + (k % 7)) {
      const middle = (k + 0.5) * GRID;
      expect(Math.abs(normalShare(normalPlace(k * GRID)) / middle - 1)).toBeLessThan(9e-14);
    }
  });
});
