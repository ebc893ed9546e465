/**
 * A shuffle that the key decides: Fisher and Yates, in the form of Durstenfeld (1964). One number
 * an item, so chances are off by the grid, 2^-53 times the number of items.
 */
import type { Key } from '../random/key';
import { RowStream } from '../random/stream';

/** Shuffles in place. */
export function shuffle(items: Int32Array, key: Key, purpose: number, method = 0): void {
  const n = items.length;
  const numbers = new Float64Array(n);
  new RowStream(key, method, purpose).fillFirst(1, numbers, n);
  for (let i = n - 1; i > 0; i--) {
    const j = (numbers[i]! * (i + 1)) | 0;
    const other = items[j]!;
    items[j] = items[i]!;
    items[i] = other;
  }
}
