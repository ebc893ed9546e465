/** Densities of several variables that are defined only where their condition holds. */
import { messageOf } from '../message';
import { boxFuzz } from './boxFuzz';
import { provedBoxes, type AxisText } from './boxProof';
import { randomGuarded } from './randomGuarded';

const UNIT: readonly AxisText[] = [
  ['early', 0, 1],
  ['late', 0, 1],
];

describe('proveBoxes beside a condition', () => {
  test('lies above and below densities that are defined only where their condition holds [law]', () => {
    const report = boxFuzz('guarded boxes', 6, 2000, randomGuarded);
    expect(report.faults).toEqual([]);
    expect(report.proved).toBeGreaterThan(4);
    expect(report.points).toBeGreaterThan(8_000);
  });

  // ∫∫ √(x − y) over 0 ≤ y ≤ x ≤ 1 is ⅔ ∫ x^1.5 = 4/15; a quarter of half a ball of radius 1 is π/6.
  test.each<[string, number]>([
    ['(early>=late)*SQRT(early-late)', 4 / 15],
    ['IF(late<=early,(early-late)^0.5,0)', 4 / 15],
    ['SQRT(1-early^2-late^2)*(early^2+late^2<=1)', Math.PI / 6],
    ['AND(early*early+late*late<1,late<2)*SQRT(1-late^2-early^2)', Math.PI / 6],
    // ∫∫ (x − y) over the same triangle; ∫ LN(2y) from ½ is LN 2 − ½.
    ['(early>late)*(early-late)', 1 / 6],
    ['(late>=0.5)*LN(2*late)', Math.LN2 - 0.5],
    ['(late>0.5)/late', Math.LN2],
  ])('holds the volume under %s, defined only where its condition holds [law]', (text, exact) => {
    const { lowerMass, upperMass } = provedBoxes(text, UNIT);
    expect(lowerMass).toBeLessThan(exact);
    expect(upperMass).toBeGreaterThan(exact);
    expect(lowerMass / upperMass).toBeGreaterThan(0.95);
  });

  test('refuses what the condition rules out in another way, and says what would do [law]', () => {
    expect(messageOf(() => provedBoxes('(early*late>=0.2)*SQRT(early-0.2/late)', UNIT))).toBe(
      'Density: whether the conditions keep it defined cannot be settled near early = 0.484009, late = 0.413086, where the square root of a negative number is taken; write the condition with the very expression that must not be negative, or keep that in its range yourself, as in SQRT(MAX(0, …)), which changes nothing where the conditions hold.',
    );
  });

  // ∫∫ √(x − b/y) over xy ≥ b is ∫ ⅔ (1 − b/y)^1.5 dy from b; by the midpoint rule on 10^5 places.
  test('draws it with that rewrite [law]', () => {
    const { lowerMass, upperMass } = provedBoxes(
      '(early*late>=0.2)*SQRT(MAX(0,early-0.2/late))',
      UNIT,
    );
    let exact = 0;
    for (let i = 0; i < 1e5; i++)
      exact += (2 / 3) * (1 - 0.2 / (0.2 + (0.8 * (i + 0.5)) / 1e5)) ** 1.5;
    exact *= 0.8 / 1e5;
    expect(lowerMass).toBeLessThan(exact);
    expect(upperMass).toBeGreaterThan(exact);
  });
});
