import seedrandom from 'seedrandom';
import { BoxProver, proveBoxes } from '../../src/envelope/boxes';
import { messageOf } from '../message';
import { boxFuzz } from './boxFuzz';
import { axesOf, joint, provedBoxes, type AxisText } from './boxProof';
import { checkBoxes } from './checkBoxes';

const UNIT: readonly AxisText[] = [
  ['early', 0, 1],
  ['late', 0, 1],
];
const WHOLE: readonly AxisText[] = ['a', 'b', 'c'].map((name) => [name, 0, 40, 1] as const);

describe('proveBoxes', () => {
  test('lies above and below every density of many random ones [law]', () => {
    const report = boxFuzz('boxes', 6, 2000);
    expect(report.faults).toEqual([]);
    expect(report.proved).toBeGreaterThan(3);
    expect(report.points).toBeGreaterThan(6_000);
  });

  // Heights of 1.02 where at most 1 is proved, and a disc that is a little larger.
  test.each([
    [
      'a density',
      { margins: [], height: ([x, y]: readonly number[]) => 1.02 * Math.exp(-x! - y!) },
    ],
    [
      'a region',
      { margins: [([x, y]: readonly number[]) => 0.9 - x! * x! - y! * y!], height: () => 1 },
    ],
  ])('the checker finds %s that is not the proved one [law]', (name, other) => {
    const text = name === 'a density' ? 'EXP(-early-late)' : 'early^2+late^2<=0.8';
    const { faults } = checkBoxes(provedBoxes(text.replace('(-early', '(0-early'), UNIT), other, {
      inBoxes: 5000,
      anywhere: 5000,
      random: seedrandom('other'),
    });
    expect(faults.length).toBeGreaterThan(0);
  });

  test('is the same whether it runs in one go or in slices [law]', () => {
    const shape = joint('early*late>=0.2', axesOf(UNIT));
    const prover = new BoxProver(shape);
    let slices = 0;
    for (; !prover.isDone; slices++) prover.work(500);
    expect(slices).toBeGreaterThan(10);
    expect(prover.result().boxes).toEqual(proveBoxes(shape).boxes);
  });

  test('settles every box of counted variables that one value is left of [law]', () => {
    const { boxes, lowerMass, upperMass } = provedBoxes('a+b+c=40', WHOLE);
    // 42 · 41 / 2 ways to split 40 crates in three.
    expect(lowerMass).toBeLessThanOrEqual(861);
    expect(upperMass).toBeGreaterThanOrEqual(861);
    expect(boxes.length).toBeGreaterThan(400);
  });

  test.each<[string, readonly AxisText[], string]>([
    [
      'a+b+c=40',
      WHOLE.map(([name, from, to]) => [name, from, to]),
      'Density: "a+b+c=40" holds on no volume, since its variables are continuous; leave one variable out and work it out from the others, or give room, as in ABS((a+b+c)-(40))<=0.01.',
    ],
    [
      'early+late>=2.5',
      UNIT,
      'Density: it is proved to be 0 for all early, late within the limits; no plan satisfies the conditions: loosen one, or widen the limits.',
    ],
    [
      'AND(early>0.9,late<0.1,early<0.8)',
      UNIT,
      'Density: it is proved to be 0 for all early, late within the limits; no plan satisfies the conditions: loosen one, or widen the limits.',
    ],
    [
      'early-late-2',
      UNIT,
      'Density: it is never above 0 within the limits, and negative at early = 0.5, late = 0.5 (-2); heights must be 0 or more, and above 0 somewhere: turn the sign, or write MAX where MIN stands.',
    ],
    [
      'MIN(early-late,0)',
      UNIT,
      'Density: it is never above 0 within the limits, and negative at early = 0.25, late = 0.5 (-0.25); heights must be 0 or more, and above 0 somewhere: turn the sign, or write MAX where MIN stands.',
    ],
    [
      'early-late',
      UNIT,
      'Density: it is negative at early = 0.25, late = 0.75 (-0.5); heights must be 0 or more; use MAX(0, …) if that is meant.',
    ],
    [
      '(early>0.5)*SQRT(early-late)',
      UNIT,
      'Density: it is undefined for early from 0.625 to 0.75, late from 0.875 to 1, where the square root of a negative number is taken, though the conditions hold there; add a condition that leaves this out, keep the limits where it is defined, or give it a height there with IF.',
    ],
    [
      'SQRT(early-late)',
      UNIT,
      'Density: it is undefined for early from 0 to 0.25, late from 0.5 to 1, where the square root of a negative number is taken; keep the limits where it is defined, or give it a height there with IF.',
    ],
    [
      'early^2-2*early*late+late^2',
      UNIT,
      'Density: whether it is negative near early = 0.650391, late = 0.667969 cannot be settled; write it so that it cannot be negative, for example as a square instead of its expanded powers, or with MAX(0, …).',
    ],
    [
      'AND(ABS(early-late)<0.00001,early<0.25)',
      UNIT,
      'Density: only 0 of proposals are sure to be accepted after 16384 boxes, and less than 0.01 is not drawn; narrow the limits; nothing lies outside early from 0 to 0.25, late from 0 to 0.250061.',
    ],
  ])('of %s is refused in full words [law]', (text, axes, message) => {
    expect(messageOf(() => provedBoxes(text, axes))).toBe(message);
  });

  // 1 − e^-x at 90 is 1 in doubles: the mass is 10^-3. Over the whole limits ln f falls by 90,000.
  test('draws a density that is far too steep for doubles over the limits [law]', () => {
    const { lowerMass, upperMass } = provedBoxes('EXP(0-early/0.001-late)', [
      ['early', 0, 90],
      ['late', 0, 90],
    ]);
    expect(lowerMass).toBeLessThan(1e-3);
    expect(upperMass).toBeGreaterThan(1e-3);
    expect(lowerMass / upperMass).toBeGreaterThan(0.95);
  });

  test('refuses a density without a bound [law]', () => {
    expect(messageOf(() => provedBoxes('1/(early*late)', UNIT))).toMatch(
      /^Density: it cannot be bounded for early .+, late .+; leave it out by the limits or a condition, or cap the height, as in MIN\(…, 1000\), if that is meant: a pole is not drawn in several variables\.$/,
    );
  });

  // Area 2π · 0.6 · e^900 with correlation 0.8; far beyond the doubles.
  test('scales a density that overflows [law]', () => {
    const text = 'EXP(900-0.5*(early^2-1.6*early*late+late^2)/0.36)';
    const axes = UNIT.map(([name]): AxisText => [name, -9, 9]);
    const { lowerMass, upperMass, exponent } = provedBoxes(text, axes);
    const exact = 2 * Math.PI * 0.6 * Math.exp(900 - exponent * Math.LN2);
    expect(exponent).toBeGreaterThan(1000);
    expect(lowerMass).toBeLessThan(exact);
    expect(upperMass).toBeGreaterThan(exact);
    expect(lowerMass / upperMass).toBeGreaterThan(0.98);
  });
});
