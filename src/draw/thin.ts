/**
 * Thinning: each row survives by itself, with the chance weight / bound.
 * Source: thinning of a process, Lewis and Shedler (1979); here rejection row by row,
 * von Neumann (1951). A row's number is a multiple of 2^-53 in [0, 1), so its chance is
 * met within 2^-53: 0 exactly at weight 0, 1 exactly at the bound.
 */
import type { Key } from '../random/key';
import { PURPOSE, RowStream } from '../random/stream';

/** The survivors among rows 1 … n, from 0 and in order; weights from 0 to the bound, which is above 0. */
export function survivors(
  weights: readonly number[],
  bound: number,
  key: Key,
  method = 0,
): readonly number[] {
  const numbers = new Float64Array(weights.length);
  new RowStream(key, method, PURPOSE.thin).fillFirst(1, numbers, weights.length);
  const kept: number[] = [];
  weights.forEach((weight, i) => {
    if (numbers[i]! < weight / bound) kept.push(i);
  });
  return kept;
}
