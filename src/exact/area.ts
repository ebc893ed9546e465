/** The area under a density to nearly all digits, always inside the proved bounds. */
import type { Envelope } from '../envelope/envelope';
import { Shares } from './shares';

/** The area under the scaled density. Guarantee: within [areaLo, areaHi] of the envelope. */
export function areaOf(envelope: Envelope): number {
  return new Shares(envelope).area;
}
