/**
 * An envelope in a unit near its peak. Heights far below 1 leave tails no room above
 * the smallest double; by its logarithm the density still tells them.
 */
import type { Envelope } from '../envelope/envelope';
import type { Piece } from '../envelope/piece';
import { Encloser } from '../formula/enclose';
import type { Tape } from '../formula/tape';
import { powerOfTwo } from '../numeric/float';

/** Peaks above this leave shares of 1e-300 room enough. */
const ROOMY = powerOfTwo(-10);
/** Below this doubles may have lost digits on the way. */
const SAFE = 1e-290;

/** The envelope × 2^shift, the shift being 0 where no more room is needed. */
export function rescaled(
  envelope: Envelope,
  tape: Tape | null,
): { readonly envelope: Envelope; readonly shift: number } {
  const { pieces, hats, exponent, heightAt } = envelope;
  const peak = pieces.reduce((most, p) => Math.max(most, p.upperLeft, p.upperRight), 0);
  if (tape === null || peak >= ROOMY || peak === 0) return { envelope, shift: 0 };
  let shift = 0;
  while (peak * powerOfTwo(shift) < 1 && shift < 1000) shift++;
  const unit = powerOfTwo(shift);
  const encloser = new Encloser(tape, exponent - shift);
  return {
    shift,
    envelope: {
      ...envelope,
      pieces: pieces.map((piece) => scaledPiece(piece, unit)),
      hats: hats.map((hat) => ({ ...hat, height: hat.height * unit, area: hat.area * unit })),
      exponent: exponent - shift,
      densityAt: (x, out) => encloser.densityAt(x, out),
      // Not a number sends who asks to the enclosure.
      heightAt: (x) => {
        const height = heightAt(x);
        return height > SAFE ? height * unit : NaN;
      },
      upperArea: envelope.upperArea * unit,
      lowerArea: envelope.lowerArea * unit,
      areaLo: envelope.areaLo * unit,
      areaHi: envelope.areaHi * unit,
    },
  };
}

function scaledPiece(piece: Piece, unit: number): Piece {
  return {
    from: piece.from,
    to: piece.to,
    upperLeft: piece.upperLeft * unit,
    upperRight: piece.upperRight * unit,
    lowerLeft: piece.lowerLeft * unit,
    lowerRight: piece.lowerRight * unit,
    upperArea: piece.upperArea * unit,
    lowerArea: piece.lowerArea * unit,
    areaLo: piece.areaLo * unit,
    areaHi: piece.areaHi * unit,
    least: piece.least * unit,
    // Only draws look further than the lines.
    inside: null,
  };
}
