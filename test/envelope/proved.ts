/** From a formula's text to its proved envelope, as the worksheet functions make it. */
import type { Envelope } from '../../src/envelope/envelope';
import { polylineEnvelope } from '../../src/envelope/polyline';
import { proveEnvelope } from '../../src/envelope/prove';
import { compile } from '../../src/formula/compile';
import { parse } from '../../src/formula/parse';

/** The proof of a formula in x. @throws {InputError} as the worksheet functions do. */
export function proved(
  text: string,
  from: number,
  to: number,
  constants: ReadonlyMap<string, number> = new Map(),
): Envelope {
  const source = { text, where: 'Formula', tree: parse(text, 'Formula') };
  return proveEnvelope(compile([source], ['x'], constants), from, to);
}

/** The envelope of straight lines between points x, height. */
export function tableEnvelope(points: readonly (readonly [number, number])[]): Envelope {
  return polylineEnvelope({ x: points.map(([x]) => x), heights: points.map(([, h]) => h) });
}
