/** From a formula's text to its proof in boxes, as the worksheet functions make it. */
import type { Axis } from '../../src/density/limits';
import type { BoxEnvelope, Joint } from '../../src/envelope/boxes';
import { proveBoxes } from '../../src/envelope/boxes';
import { jointOf } from '../../src/worksheet/several';
import { sourceOf } from '../formula/formulas';

/** name, from, to and, for a counted one, step. */
export type AxisText = readonly [name: string, from: number, to: number, step?: number];

export function axesOf(texts: readonly AxisText[]): readonly Axis[] {
  return texts.map(([name, from, to, step = 0]) => ({ name, from, to, step }));
}

export function joint(text: string, axes: readonly Axis[]): Joint {
  return jointOf({ kind: 'several', sources: [sourceOf(text)], axes, givens: new Map() });
}

/** @throws {InputError} as the worksheet functions do. */
export function provedBoxes(text: string, axes: readonly AxisText[]): BoxEnvelope {
  return proveBoxes(joint(text, axesOf(axes)));
}
