/** What is worked out when it is first asked for, and kept. Not handled: work that throws, which is tried again. */
export function once<T extends object>(make: () => T): () => T {
  let made: T | undefined;
  return () => (made ??= make());
}
