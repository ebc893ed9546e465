/**
 * A counted shape as what a column is compared with.
 *
 * Moments are sums over the points; under hats they are told where the hats fall fast enough.
 * Not handled: moments of slower tails, finite or not (they are not told).
 */
import { finiteMoments, wholePower } from './continuous';
import type { Distribution, ExactMoments } from './distribution';
import type { PointShares } from './points';

export function counted(shares: PointShares): Distribution {
  const { lattice } = shares.sums.envelope;
  let known: ExactMoments | undefined;
  return {
    from: Number.isFinite(lattice.first) ? lattice.at(lattice.first) : -Infinity,
    to: Number.isFinite(lattice.last) ? lattice.at(lattice.last) : Infinity,
    lattice,
    sharesOfRising: (values) => {
      const below = new Float64Array(values.length);
      const above = new Float64Array(values.length);
      for (let i = 0; i < values.length; i++) {
        const isSame = i > 0 && values[i] === values[i - 1];
        below[i] = isSame ? below[i - 1]! : shares.below(values[i]!);
        above[i] = isSame ? above[i - 1]! : shares.above(values[i]!);
      }
      return { below, above };
    },
    quantile: (share) => shares.quantile(share, 'below'),
    get moments() {
      return (known ??= momentsOf(shares));
    },
  };
}

function momentsOf(shares: PointShares): ExactMoments {
  const { sums } = shares;
  const most = finiteMoments(sums.envelope);
  const untold = (): null => null;
  if (!(most > 1)) return { mean: null, deviation: null, standardised: untold };
  const all = sums.sum(() => 1);
  const median = shares.quantile(0.5, 'below');
  const mean = median + sums.sum((x) => x - median) / all;
  const variance = most > 2 ? sums.sum((x) => (x - mean) * (x - mean)) / all : 0;
  if (!(variance > 0)) return { mean, deviation: null, standardised: untold };
  const deviation = Math.sqrt(variance);
  return {
    mean,
    deviation,
    standardised: (k) =>
      k < most ? sums.sum((x) => wholePower((x - mean) / deviation, k)) / all : null,
  };
}
