/**
 * Proofs and columns, kept so that DRAW, ACCEPTANCE, ENVELOPE and PROFILE of one
 * shape prove and draw once. Keyed by the canonical arguments; least recently used
 * results go first; at most 64 MB. It is the only state that outlives a call, and
 * results do not depend on it.
 */
import { LRUCache } from 'lru-cache';

const MAX_BYTES = 64 * 1024 * 1024;

interface Entry {
  readonly value: object;
  readonly bytes: number;
}

const cache = new LRUCache<string, Entry>({
  maxSize: MAX_BYTES,
  sizeCalculation: ({ bytes }) => bytes,
});

/** What was made for this key before, or now; a key always stands for one type. */
export function remember<T extends object>(
  key: string,
  make: () => { value: T; bytes: number },
): T {
  const known = cache.get(key);
  if (known) return known.value as T;
  const made = make();
  cache.set(key, { value: made.value, bytes: Math.max(1, Math.ceil(made.bytes + 2 * key.length)) });
  return made.value;
}
