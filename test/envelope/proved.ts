/** From a formula's text to its proof and its exact shares, as the worksheet functions make them. */
import type { PlainShape } from '../../src/density/kinds';
import type { Envelope } from '../../src/envelope/envelope';
import { polylineEnvelope } from '../../src/envelope/polyline';
import { proveEnvelope } from '../../src/envelope/prove';
import { Shares } from '../../src/exact/shares';
import { prove } from '../../src/worksheet/proved';
import type { Givens } from '../formula/formulas';
import { tapeOf } from '../formula/formulas';

/** The proof of a formula in x. @throws {InputError} as the worksheet functions do. */
export function proved(text: string, from: number, to: number, givens: Givens = {}): Envelope {
  return proveEnvelope(tapeOf(text, givens), from, to);
}

/** The proof of a shape that was read from cells and is not counted. */
export function provedCurve(shape: PlainShape): Envelope {
  const found = prove(shape);
  if (found.kind === 'curve') return found.envelope;
  throw new Error('a continuous shape was expected');
}

/** The envelope of straight lines between points x, height. */
export function tableEnvelope(points: readonly (readonly [number, number])[]): Envelope {
  return polylineEnvelope({ x: points.map(([x]) => x), heights: points.map(([, h]) => h) });
}

/** The area under the scaled density. */
export function areaOf(envelope: Envelope): number {
  return new Shares(envelope).area;
}

/** The exact shares of a formula in x. */
export function sharesOf(text: string, from: number, to: number): Shares {
  return new Shares(proved(text, from, to));
}
