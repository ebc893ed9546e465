/**
 * A proved envelope: on every piece the upper line lies on or above the density and
 * the lower line on or below it. Heights are the density's × 2^-exponent.
 */
import { addDown, addUp } from '../numeric/float';
import type { Interval } from '../numeric/interval';
import type { Hat } from './hat';
import type { Piece } from './piece';

export interface Envelope {
  readonly from: number;
  readonly to: number;
  /** From where the pieces begin to where they end; hats cover the rest. */
  readonly pieces: readonly Piece[];
  /** Beyond the pieces, at most one on each side. */
  readonly hats: readonly Hat[];
  readonly exponent: number;
  /** Encloses the scaled density at a double; null where upper and lower line are the density itself. */
  readonly densityAt: ((x: number, out: Interval) => void) | null;
  /** The scaled density at a point in doubles, for charts and near-ties. */
  readonly heightAt: (x: number) => number;
  readonly upperArea: number;
  readonly lowerArea: number;
  /** An enclosure of the area under the scaled density. */
  readonly areaLo: number;
  readonly areaHi: number;
  /** What holds of the proof and a user should know. */
  readonly notes: readonly string[];
}

/** Lower area over upper area: acceptance is at least this. */
export function promisedAcceptance(envelope: Pick<Envelope, 'upperArea' | 'lowerArea'>): number {
  return envelope.lowerArea / envelope.upperArea;
}

/** Sums of the pieces' and hats' areas, rounded outward. Nothing is known of the area under a hat but that it is no more. */
export function totalAreas(
  pieces: readonly Piece[],
  hats: readonly Hat[] = [],
): Pick<Envelope, 'upperArea' | 'lowerArea' | 'areaLo' | 'areaHi'> {
  const sum = { upperArea: 0, lowerArea: 0, areaLo: 0, areaHi: 0 };
  for (const piece of pieces) {
    sum.upperArea = addUp(sum.upperArea, piece.upperArea);
    sum.lowerArea = addDown(sum.lowerArea, piece.lowerArea);
    sum.areaLo = addDown(sum.areaLo, piece.areaLo);
    sum.areaHi = addUp(sum.areaHi, piece.areaHi);
  }
  for (const { area } of hats) {
    sum.upperArea = addUp(sum.upperArea, area);
    sum.areaHi = addUp(sum.areaHi, area);
  }
  return sum;
}
