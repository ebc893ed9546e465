/**
 * Shares that belong together: uniform each, with the dependence of normal scores.
 *
 * A row has one number of its own for each column; their normal places are weighted by the rows of
 * the factor of the correlations and taken back to shares, z = L·Φ⁻¹(u), share = Φ(z): the normal
 * copula, Nelsen (2006), "An introduction to copulas", 2.9 (from memory). Row i is the same whatever
 * the number of rows, and column j depends on the correlations with the columns before it alone.
 * Each share is uniform as far as METHOD.md says.
 */
import type { Matrix } from '../numeric/matrix';
import { normalPlace, normalShare } from '../numeric/normal';
import type { Key } from '../random/key';
import { PURPOSE, RowStream } from '../random/stream';

const CHUNK = 4096;

/** Shares of rows `first` … `first + n − 1`, one column for each row of the factor. */
export function linkedShares(
  factor: Matrix,
  key: Key,
  first: number,
  n: number,
  method = 0,
): readonly Float64Array[] {
  const streams = factor.map((_, j) => new RowStream(key, method, PURPOSE.link + j));
  const places = factor.map(() => new Float64Array(CHUNK));
  const columns = factor.map(() => new Float64Array(n));
  const sums = new Float64Array(CHUNK);
  for (let done = 0; done < n; done += CHUNK) {
    const size = Math.min(CHUNK, n - done);
    factor.forEach((weights, j) => {
      const own = places[j]!;
      streams[j]!.fillFirst(first + done, own, size);
      for (let k = 0; k < size; k++) own[k] = normalPlace(own[k]!);
      sums.fill(0);
      for (let l = 0; l <= j; l++) {
        const [weight, of] = [weights[l]!, places[l]!];
        if (weight !== 0) for (let k = 0; k < size; k++) sums[k]! += weight * of[k]!;
      }
      const column = columns[j]!;
      for (let k = 0; k < size; k++) column[done + k] = normalShare(sums[k]!);
    });
  }
  return columns;
}
