import { latticeOf, MOST_POINTS, within } from '../../src/density/lattice';
import { messageOf } from '../message';

const points = (from: number, to: number, step: number): number[] => {
  const { first, last, at } = latticeOf(from, to, step, 'limits');
  return Array.from({ length: last - first + 1 }, (_, i) => at(first + i));
};

describe('latticeOf', () => {
  test('latticeOf(from, to, step) has the decimals that a cell shows, not sums of their rounding [law]', () => {
    expect(points(0, 0.7, 0.1)).toEqual([0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7]);
    expect(points(-0.3, 0.9, 0.3)).toEqual([-0.3, 0, 0.3, 0.6, 0.9]);
    expect(points(1.05, 1.2, 0.05)).toEqual([1.05, 1.1, 1.15, 1.2]);
    // Sums and products of doubles miss some of them.
    expect(3 * 0.1).not.toBe(0.3);
  });

  test('latticeOf(from, to, step) ends at the last point that is not above to [law]', () => {
    expect(points(0, 10, 4)).toEqual([0, 4, 8]);
    expect(points(0, 8, 4)).toEqual([0, 4, 8]);
    expect(points(2, 2, 1)).toEqual([2]);
    expect(points(1, 1.5, 1)).toEqual([1]);
    expect(points(0, 2, 1 / 3)).toHaveLength(7);
  });

  test('latticeOf(…) counts from the end that is given, from 0 without one [law]', () => {
    const down = latticeOf(-Infinity, 5, 2, 'limits');
    expect([down.first, down.last, down.at(0), down.at(-1)]).toEqual([-Infinity, 0, 5, 3]);
    const both = latticeOf(-Infinity, Infinity, 0.5, 'limits');
    expect([both.first, both.last, both.at(3)]).toEqual([-Infinity, Infinity, 1.5]);
    expect([down.isWhole, both.isWhole]).toEqual([true, false]);
  });

  test('within(lattice, from, to) keeps the points between two numbers [law]', () => {
    const part = within(latticeOf(0, 100, 3, 'limits'), 4, 12);
    expect([part.first, part.last, part.at(part.first), part.at(part.last)]).toEqual([2, 4, 6, 12]);
  });

  test.each([
    [
      [0, 9, -1],
      'limits, step: -1 is negative; give the distance of neighbouring values, such as 1, or 0 for a continuous quantity.',
    ],
    [
      [0, 1e7, 1],
      'limits, step: from 0 to 10000000 there are 10000001 points; use at most 1048576: a larger step, or 0 for a continuous quantity.',
    ],
    [
      [1e17, 1e17 + 1600, 1],
      'limits, step: numbers near 100000000000000000 are further apart than 1; give a larger step, or measure the quantity from nearer by.',
    ],
  ] as const)('latticeOf(%j) is refused [law]', ([from, to, step], message) => {
    expect(messageOf(() => latticeOf(from, to, step, 'limits'))).toBe(message);
    expect(points(1, MOST_POINTS, 1)).toHaveLength(MOST_POINTS);
  });
});
