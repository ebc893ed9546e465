import { shortNumber } from '../../src/numeric/text';

describe('shortNumber', () => {
  it.each([
    [0, '0'],
    [-0, '0'],
    [1, '1'],
    [0.1 + 0.2, '0.3'],
    [1 / 3, '0.333333'],
    [123456789, '123457000'],
    [-2.5, '-2.5'],
    [1e-20 / 3, '3.33333e-21'],
    [999999e6, '999999000000'],
    [-4611686018427387904, '-4.61169e+18'],
    [1.5e300, '1.5e+300'],
    [Infinity, 'Infinity'],
  ])('shortNumber(%d) is %s [law]', (x, text) => {
    expect(shortNumber(x)).toBe(text);
  });
});
