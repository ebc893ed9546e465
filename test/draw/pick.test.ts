import fc from 'fast-check';
import { Picker } from '../../src/draw/pick';
import { survivors } from '../../src/draw/thin';
import { keyOf } from '../../src/random/key';
import { FALSE_ALARM, goodnessOfFit, Z_FALSE_ALARM } from './statistics';

const KEY = keyOf('plan-2027', 'seasons');
const weight = fc.oneof(
  fc.constant(0),
  fc.double({ min: 0, max: 1e308, noNaN: true }),
  fc.integer({ min: 0, max: 40 }),
  fc.integer({ min: -300, max: 300 }).map((e) => Number(`1e${e}`)),
);
const weights = fc
  .array(weight, { minLength: 1, maxLength: 60 })
  .filter((all) => all.some((w) => w > 0));

/** Half a unit in the last place of the sum, the total, their quotient and the grid, at both ends. */
const ROUNDING = 2 ** -51;

describe('Picker', () => {
  test('shares() are the weights over their sum, and exactly 0 for weight 0 [law]', () => {
    fc.assert(
      fc.property(weights, (all) => {
        const shares = new Picker(all).shares();
        const largest = Math.max(...all);
        const scaled = all.map((w) => w / largest);
        const total = scaled.reduce((a, b) => a + b, 0);
        shares.forEach((share, i) => {
          if (all[i] === 0) expect(share).toBe(0);
          // The quotients and the plain sum here are off by 120 roundings.
          expect(Math.abs(share - scaled[i]! / total)).toBeLessThanOrEqual(
            ROUNDING + 120 * 2 ** -53,
          );
        });
        expect(shares.reduce((a, b) => a + b, 0)).toBe(1);
      }),
      { seed: 3, numRuns: 2000 },
    );
  });

  test('shares() of 100,000 weights are exact to the rounding of the grid [law]', () => {
    // Whole weights below 2^31 have exact sums.
    const all = Array.from({ length: 100_000 }, (_, i) => (i * 7919) % 10_007);
    const total = all.reduce((a, b) => a + b, 0);
    const shares = new Picker(all).shares();
    const worst = shares.reduce(
      (most, share, i) => Math.max(most, Math.abs(share - all[i]! / total)),
      0,
    );
    expect(worst).toBeLessThanOrEqual(ROUNDING);
    expect(worst).toBeGreaterThan(0);
  });

  test('picks(…) follow the weights and never have weight 0 [law]', () => {
    const all = [3, 0, 1, 0.5, 0, 5.5, 0];
    const n = 200_000;
    const counts = new Float64Array(all.length);
    for (const i of new Picker(all).picks(KEY, 1, n)) counts[i]!++;
    expect([counts[1], counts[4], counts[6]]).toEqual([0, 0, 0]);
    const used = [0, 2, 3, 5];
    const countsUsed = used.map((i) => counts[i]!);
    expect(goodnessOfFit(countsUsed, [0.3, 0.1, 0.05, 0.55])).toBeGreaterThan(FALSE_ALARM);
    // A share moved by 0.01 adds n·0.0001·(1/0.3 + 1/0.1) = 267 to χ² with 3 degrees of freedom.
    expect(goodnessOfFit(countsUsed, [0.29, 0.11, 0.05, 0.55])).toBeLessThan(FALSE_ALARM);
  });

  test('picks(…) of rows first to last are those of the whole [law]', () => {
    const picker = new Picker([1, 2, 3, 4, 5]);
    const whole = picker.picks(KEY, 1, 10_000);
    for (const [first, n] of [
      [1, 3],
      [2, 5000],
      [4090, 17],
      [10_000, 1],
    ] as const)
      expect([...picker.picks(KEY, first, n)]).toEqual([...whole.slice(first - 1, first - 1 + n)]);
  });

  test('picks(…) move for few rows when weights move a little [law]', () => {
    const n = 100_000;
    const before = new Picker([1, 1, 1, 1]).picks(KEY, 1, n);
    const after = new Picker([1.04, 1, 1, 1]).picks(KEY, 1, n);
    // Running shares 0.25, 0.5, 0.75 become 1.04/4.04, 2.04/4.04, 3.04/4.04: 0.0149 of the numbers lie between.
    const moved = 1.04 / 4.04 + 2.04 / 4.04 + 3.04 / 4.04 - 1.5;
    const changed = before.filter((row, i) => row !== after[i]).length;
    const room = Z_FALSE_ALARM * Math.sqrt(n * moved * (1 - moved));
    expect(Math.abs(changed - n * moved)).toBeLessThan(room);
  });
});

describe('survivors', () => {
  test('survivors(…) keep a row with the chance weight over bound [law]', () => {
    const n = 200_000;
    const kinds = [0, 0.2, 0.5, 1.9, 2];
    const all = Array.from({ length: n * kinds.length }, (_, i) => kinds[i % kinds.length]!);
    const kept = new Float64Array(kinds.length);
    for (const i of survivors(all, 2, KEY)) kept[i % kinds.length]!++;
    expect([kept[0], kept[4]]).toEqual([0, n]);
    [1, 2, 3].forEach((k) => {
      const p = kinds[k]! / 2;
      const z = (kept[k]! - n * p) / Math.sqrt(n * p * (1 - p));
      expect(Math.abs(z)).toBeLessThan(Z_FALSE_ALARM);
      // A chance that is 0.01 off is ten or more standard deviations away.
      const q = p + 0.01;
      const off = (kept[k]! - n * q) / Math.sqrt(n * q * (1 - q));
      expect(Math.abs(off)).toBeGreaterThan(Z_FALSE_ALARM);
    });
  });

  test('survivors(…) stay when rows are added [law]', () => {
    const all = Array.from({ length: 5001 }, (_, i) => 1 + (i % 7));
    const whole = survivors(all, 8, KEY);
    expect(survivors(all.slice(0, 4000), 8, KEY)).toEqual(whole.filter((i) => i < 4000));
  });
});
