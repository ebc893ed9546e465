/** A density from its formula text, proved, for tests of its exact answers. */
import type { Envelope } from '../../src/envelope/envelope';
import { proveEnvelope } from '../../src/envelope/prove';
import { Shares } from '../../src/exact/shares';
import { compile } from '../../src/formula/compile';
import { parse } from '../../src/formula/parse';
import type { Tape } from '../../src/formula/tape';

export function tapeOf(text: string): Tape {
  return compile([{ text, where: 'Formula', tree: parse(text, 'Formula') }], ['x'], new Map());
}

export function envelopeOf(text: string, from: number, to: number): Envelope {
  return proveEnvelope(tapeOf(text), from, to);
}

export function sharesOf(text: string, from: number, to: number): Shares {
  return new Shares(envelopeOf(text, from, to));
}
