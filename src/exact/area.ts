/**
 * The area under a density to nearly all digits, always inside the proved bounds.
 *
 * Gauss–Legendre quadrature with ten points on every piece: the pieces are short
 * where the density bends, so it gains digits fast; where it does not (a root at an
 * end), the proved enclosure of the piece still holds the result.
 * Source of the nodes: Abramowitz and Stegun (1964), table 25.4, n = 10.
 */
import type { Envelope } from '../envelope/envelope';
import type { Hat } from '../envelope/hat';
import { placeOn } from '../envelope/hat';

/** Parts of (0, 1] over which a hat is averaged. */
const HAT_PARTS = 8;
const NODES = [
  0.1488743389816312, 0.4333953941292472, 0.6794095682990244, 0.8650633666889845,
  0.9739065285171717,
];
const WEIGHTS = [
  0.2955242247147529, 0.2692667193099963, 0.219086362515982, 0.1494513491505806, 0.0666713443086881,
];

/** The area under the scaled density. Guarantee: within [areaLo, areaHi] of the envelope. */
export function areaOf(envelope: Envelope): number {
  const { pieces, heightAt, densityAt } = envelope;
  if (densityAt === null) return envelope.areaLo / 2 + envelope.areaHi / 2;
  let area = 0;
  for (const { from, to, areaLo, areaHi } of pieces) {
    const half = (to - from) / 2;
    const centre = from + half;
    let sum = 0;
    NODES.forEach((node, i) => {
      sum += WEIGHTS[i]! * (heightAt(centre - half * node) + heightAt(centre + half * node));
    });
    const estimate = sum * half;
    area += Math.min(
      areaHi,
      Math.max(areaLo, estimate === estimate ? estimate : areaLo / 2 + areaHi / 2),
    );
  }
  for (const hat of envelope.hats) area += hatArea(hat, heightAt);
  return Math.min(envelope.areaHi, Math.max(envelope.areaLo, area));
}

/** The density's area under a hat: the hat's times the mean of density over hat, by the same nodes in s. */
function hatArea(hat: Hat, heightAt: (x: number) => number): number {
  const at = { x: 0, height: 0 };
  let mean = 0;
  for (let k = 0; k < HAT_PARTS; k++) {
    NODES.forEach((node, i) => {
      for (const sign of [-1, 1]) {
        placeOn(hat, (k + (1 + sign * node) / 2) / HAT_PARTS, at);
        const share = heightAt(at.x) / at.height;
        if (share > 0) mean += (WEIGHTS[i]! / 2 / HAT_PARTS) * Math.min(1, share);
      }
    });
  }
  return hat.area * mean;
}
