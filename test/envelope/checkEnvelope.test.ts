/** The checker itself: it has to catch envelopes that are damaged by very little. */
import { Precise } from './reference';
import seedrandom from 'seedrandom';
import type { Envelope } from '../../src/envelope/envelope';
import type { Piece } from '../../src/envelope/piece';
import { checkEnvelope } from './checkEnvelope';
import { proved } from './proved';
import { referenceOf } from './reference';

function faults(text: string, envelope: Envelope): readonly string[] {
  const options = { nPoints: 4000, nPrecise: 40, random: seedrandom('damage') };
  return checkEnvelope(envelope, referenceOf(text), options).violations;
}

/** The envelope with one piece changed. */
function damaged(
  envelope: Envelope,
  i: number,
  change: (piece: Piece) => Partial<Piece>,
): Envelope {
  const pieces = envelope.pieces.map((p, at) => (at === i ? { ...p, ...change(p) } : p));
  return { ...envelope, pieces };
}

/** Convex: the upper line is a chord and touches the density at both ends. */
const CONVEX = 'EXP(-x)';
/** Concave: the lower line does. */
const CONCAVE = 'SQRT(x)';
const SLIGHTLY = 1e-9;

describe('checkEnvelope', () => {
  test('finds nothing in a proved envelope [law]', () => {
    expect(faults(CONVEX, proved(CONVEX, 0, 5))).toEqual([]);
    expect(faults(CONCAVE, proved(CONCAVE, 1, 5))).toEqual([]);
  });

  test('catches any upper line lowered by a billionth [law]', () => {
    const envelope = proved(CONVEX, 0, 5);
    envelope.pieces.forEach((_, i) => {
      const lowered = damaged(envelope, i, (p) => ({
        upperLeft: p.upperLeft * (1 - SLIGHTLY),
        upperRight: p.upperRight * (1 - SLIGHTLY),
      }));
      expect(faults(CONVEX, lowered)).not.toEqual([]);
    });
  });

  test('catches any lower line raised by a billionth [law]', () => {
    const envelope = proved(CONCAVE, 1, 5);
    envelope.pieces.forEach((_, i) => {
      const raised = damaged(envelope, i, (p) => ({
        lowerLeft: p.lowerLeft * (1 + SLIGHTLY),
        lowerRight: p.lowerRight * (1 + SLIGHTLY),
      }));
      expect(faults(CONCAVE, raised)).not.toEqual([]);
    });
  });

  test('catches a missing piece, an overlap and an area that is too small [law]', () => {
    const envelope = proved(CONVEX, 0, 5);
    const pieces = envelope.pieces.filter((_, i) => i !== 3);
    expect(faults(CONVEX, { ...envelope, pieces })).not.toEqual([]);
    const overlapping = damaged(envelope, 3, ({ from }) => ({ from: from - SLIGHTLY }));
    expect(faults(CONVEX, overlapping)).not.toEqual([]);
    const small = damaged(envelope, 3, ({ upperArea }) => ({
      upperArea: upperArea * (1 - SLIGHTLY),
    }));
    expect(faults(CONVEX, small)).not.toEqual([]);
  });

  test('catches areas that are missed by a ten-thousandth of their enclosure [law]', () => {
    const envelope = proved(CONVEX, 0, 5);
    const pieces = envelope.pieces.map((piece) => {
      const area = Math.exp(-piece.from) - Math.exp(-piece.to);
      return { ...piece, areaLo: area + (piece.areaHi - area) * 1e-4 };
    });
    expect(faults(CONVEX, { ...envelope, pieces })).not.toEqual([]);
  });
});

describe('referenceOf', () => {
  // EXP(1), SIN(1), LN(2), ATAN(1) = π/4, TANH(1) to 40 digits: DLMF 4.2.11, 4.14, A&S table 1.1.
  test.each([
    ['EXP(x)', 1, '2.718281828459045235360287471352662497757'],
    ['LN(1+x)', 1, '0.6931471805599453094172321214581765680755'],
    ['ATAN(x)*4', 1, '3.141592653589793238462643383279502884197'],
    ['x^x', 0.5, '0.7071067811865475244008443621048490392848'],
    ['LET(u,x+1,LAMBDA(t,t^2)(u))', 2, '9'],
    ['SUM({1,2}*x)', 3, '9'],
    ['IF(AND(x>1,x<3),1,2)', 3, '2'],
    ['MAX(x,2,MIN(5,x))', 3, '3'],
    ['EXP(x)', -1e6, '3.2968314780885585789689079691077242085614e-434295'],
  ])('%s at %d is %s [published]', (text, x, value) => {
    const { precise, plain } = referenceOf(text);
    expect(precise(x).div(value).minus(1).abs().toNumber()).toBeLessThan(1e-36);
    const rounded = new Precise(value).toNumber();
    expect(Math.abs(plain(x) - rounded)).toBeLessThanOrEqual(1e-15 * rounded);
  });
});
