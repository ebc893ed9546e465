/**
 * What share of a density's area each of its terms holds. A height in front of a term
 * is no share of the area: this is where that shows.
 */
import type { Envelope } from '../envelope/envelope';
import { Encloser } from '../formula/enclose';
import { evaluator } from '../formula/evaluate';
import { Defined } from '../formula/operation';
import type { Tape } from '../formula/tape';
import { heightOf } from './height';
import type { PointSums } from './points';
import { refinedIntegral } from './quadrature';
import { hatIntegral } from './side';

/**
 * The terms' shares; null where a term may be below 0 or undefined on some piece, or
 * heights are scaled.
 * Guarantee: 12 digits where the terms are smooth; they add up to 1 as nearly.
 */
export function sharesOfTerms(envelope: Envelope, terms: readonly Tape[]): number[] | null {
  const { pieces, hats, exponent } = envelope;
  if (exponent !== 0 || !terms.every((term) => isNeverNegative(envelope, term))) return null;
  const height = heightOf(envelope);
  const stretches = pieces.map(({ from, to }) => [from, to] as const);
  const areas = terms.map((term) => {
    const at = evaluator(term);
    const finite = (x: number): number => {
      const value = at(x);
      return value > 0 && value < Infinity ? value : 0;
    };
    const part = (x: number): number => {
      const whole = height(x);
      return whole > 0 ? Math.min(1, finite(x) / whole) : 0;
    };
    return (
      refinedIntegral(finite, stretches) +
      hats.reduce((sum, hat) => sum + hatIntegral(hat, envelope, height, part), 0)
    );
  });
  const total = areas.reduce((sum, area) => sum + area, 0);
  return total > 0 && total < Infinity ? areas.map((area) => area / total) : null;
}

/** As sharesOfTerms, of the sum of a counted quantity's heights. */
export function sharesOfPointTerms(sums: PointSums, terms: readonly Tape[]): number[] | null {
  const { heightAt, exponent } = sums.envelope;
  if (exponent !== 0) return null;
  let isSigned = false;
  const parts = terms.map((term) => {
    const at = evaluator(term);
    return sums.sum((x) => {
      const part = at(x) / heightAt(x);
      isSigned ||= !(part >= 0);
      return part > 0 ? Math.min(1, part) : 0;
    });
  });
  const total = parts.reduce((sum, part) => sum + part, 0);
  return total > 0 && !isSigned ? parts.map((part) => part / total) : null;
}

function isNeverNegative({ pieces }: Envelope, term: Tape): boolean {
  const encloser = new Encloser(term);
  const [atA, atB] = [encloser.pointValues(), encloser.pointValues()];
  return pieces.every(({ from, to }) => {
    encloser.at(from, atA);
    encloser.at(to, atB);
    const { density, defined } = encloser.over(from, to, atA, atB);
    return defined === Defined.Everywhere && density.v.lo >= 0;
  });
}
