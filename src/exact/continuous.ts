/**
 * A continuous shape as what a column is compared with.
 *
 * Moments come from quadrature where the tails fall fast enough by proof; where they may not,
 * the mean and the variance are what `expectation` proves, and moments beyond them are not told.
 */
import type { Envelope } from '../envelope/envelope';
import { InputError } from '../errors';
import { compile } from '../formula/compile';
import { parse } from '../formula/parse';
import type { Tape } from '../formula/tape';
import { powerOfTwo } from '../numeric/float';
import type { Distribution, ExactMoments } from './distribution';
import { expectation } from './expect';
import type { Shares } from './shares';

/** Higher moments of slowly falling tails are not asked for. */
const MOST_PROVED = 4;

/** `tape` is the density's formula, null for a table's straight lines. */
export function continuous(shares: Shares, envelope: Envelope, tape: Tape | null): Distribution {
  let known: ExactMoments | undefined;
  return {
    from: envelope.from,
    to: envelope.to,
    lattice: null,
    sharesOfRising: (values) => shares.ofRising(values),
    quantile: (share) => shares.quantile(share, 'below'),
    get moments() {
      return (known ??= momentsOf(shares, envelope, tape));
    },
  };
}

function momentsOf(shares: Shares, envelope: Envelope, tape: Tape | null): ExactMoments {
  const most = finiteMoments(envelope);
  // Offsets from the median keep the digits of shapes far from 0.
  const median = shares.quantile(0.5, 'below');
  const mean =
    most > 1
      ? median + shares.meanOf((x) => x - median)
      : proved(envelope, tape, `x-(${median})`, median);
  if (mean === null) return { mean, deviation: null, standardised: () => null };
  const variance =
    most > 2
      ? shares.meanOf((x) => (x - mean) * (x - mean))
      : proved(envelope, tape, `(x-(${mean}))^2`, 0);
  if (variance === null || !(variance > 0)) {
    return { mean, deviation: null, standardised: () => null };
  }
  const deviation = Math.sqrt(variance);
  const known = new Map<number, number | null>();
  const standardised = (k: number): number | null => {
    if (k < most) return shares.meanOf((x) => wholePower((x - mean) / deviation, k));
    if (k > MOST_PROVED) return null;
    return proved(envelope, tape, `((x-(${mean}))/${deviation})^${k}`, 0);
  };
  return {
    mean,
    deviation,
    standardised: (k) => {
      if (!known.has(k)) known.set(k, standardised(k));
      return known.get(k)!;
    },
  };
}

/** Moments below this are finite, by the power of the hats. */
export function finiteMoments({ hats }: Pick<Envelope, 'hats'>): number {
  return hats.reduce(
    (least, { kind, rate }) => (kind === 'power' ? Math.min(least, powerOfTwo(rate)) : least),
    Infinity,
  );
}

/** `offset` and the mean of a quantity in x; null where it is not proved to be finite. */
function proved(
  envelope: Envelope,
  tape: Tape | null,
  quantity: string,
  offset: number,
): number | null {
  const source = { text: quantity, where: 'quantity', tree: parse(quantity, 'quantity') };
  try {
    const measured = compile([source], ['x'], new Map());
    return offset + expectation(envelope, tape, measured, 'quantity').value;
  } catch (error) {
    if (error instanceof InputError) return null;
    throw error;
  }
}

/** x^k by products. Domain: whole k ≥ 0. */
export function wholePower(x: number, k: number): number {
  let power = 1;
  for (let i = 0; i < k; i++) power *= x;
  return power;
}
