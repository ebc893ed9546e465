/**
 * Draws next to a pole at a limit other than 0, where doubles stand too wide apart to tell
 * how near to it they are.
 */
import { below, draw } from '../../src/index';
import { messageOf } from '../message';
import { Z_FALSE_ALARM } from './statistics';

const ROWS = 100_000;
const HALF_UNIT = 2 ** -53;

function values(density: string, from: number, to: number): readonly number[] {
  const spill = draw([[density]], [[from, to]], [[ROWS]], [['plan-2027']], [['press gap']], []);
  return spill.flat() as number[];
}

/** 4.9 standard deviations of a share of ROWS draws: false alarm 10^-6. */
function roomOf(share: number): number {
  return Z_FALSE_ALARM * Math.sqrt((share * (1 - share)) / ROWS);
}

/**
 * The share of (x − 1)^−0.9 on 1 … 3 nearer to 1 than t is (t/2)^0.1. The nearest double
 * above 1 stands for distances below 1.5 units of 2^-52; below 1, for 1.5 of 2^-53.
 */
const share = (t: number, whole: number): number => (t / whole) ** 0.1;

describe('draw next to a strong pole', () => {
  test.each([
    ['(x-1)^-0.9', 1, 3, 1 + 2 * HALF_UNIT, share(3 * HALF_UNIT, 2)],
    ['(1-x)^-0.9', 0, 1, 1 - HALF_UNIT, share(1.5 * HALF_UNIT, 1)],
    ['(-1+x)^-0.9*(x<2)', 1, 2, 1 + 2 * HALF_UNIT, share(3 * HALF_UNIT, 1)],
  ])('%s gives the nearest double its share [law]', (density, from, to, nearest, expected) => {
    const drawn = values(density, from, to);
    const found = drawn.filter((x) => x === nearest).length / ROWS;
    expect(Math.abs(found - expected)).toBeLessThan(roomOf(expected));
    // What the density at the rounded place would give it: that is told apart.
    expect(Math.abs(found - 1.5 * expected)).toBeGreaterThan(roomOf(expected));
    expect(drawn.every((x) => x >= from && x <= to && x !== 1)).toBe(true);
  });

  test('shares below are exact there [law]', () => {
    const [[middle]] = below([['(x-1)^-0.9']], [[1, 3]], [[2]], []) as [[number]];
    expect(Math.abs(middle / 2 ** -0.1 - 1)).toBeLessThan(1e-12);
  });

  test.each([
    [
      '(x^2-1)^-0.9',
      1,
      'Density: its digits cancel near x = 1, where it grows without limit; write the distance from there as (x-1), or measure x from there.',
    ],
    [
      '(4-x^2)^-0.5',
      -2,
      'Density: its digits cancel near x = -2, where it grows without limit; write the distance from there as (x+2), or measure x from there.',
    ],
    [
      '(EXP(x)-1)^-0.5',
      0,
      'Density: its digits cancel near x = 0, where it grows without limit; write it so that nothing cancels there, or move the limit away from there.',
    ],
  ])('%s from %d is refused with the rewrite [law]', (density, from, message) => {
    const call = (): unknown =>
      draw([[density]], [[from, from + 1]], [[5]], [['plan-2027']], [['press gap']], []);
    expect(messageOf(call)).toBe(message);
  });
});
