/**
 * Philox 4x32-10: a keyed shuffle of 128-bit counters. Any block of random words is computed
 * from its counter alone, so a number can belong to a row instead of to a position in a queue.
 *
 * Source: Salmon, Moraes, Dror, Shaw, "Parallel random numbers: as easy as 1, 2, 3", SC11
 * (2011), section 4.3. Words are unsigned 32-bit; signed words with the same bits serve too.
 * Does not handle: other word sizes or round counts.
 */

/** Upper and lower halves of the two multipliers, D2511F53 and CD9E8D57. */
export const M0_HI = 0xd251;
export const M0_LO = 0x1f53;
export const M1_HI = 0xcd9e;
export const M1_LO = 0x8d57;

export const M0 = 0xd2511f53;
export const M1 = 0xcd9e8d57;

/** What the two key words grow by after each round (Weyl sequence). */
export const W0 = 0x9e3779b9;
export const W1 = 0xbb67ae85;

export const ROUNDS = 10;

/**
 * The upper 32 bits, signed, of the 64-bit product of `word` and the multiplier whose 16-bit
 * halves are `hi` and `lo`. Exact: long multiplication in which no sum passes 2^32 − 1, since
 * (2^16 − 1)² + 2·(2^16 − 1) = 2^32 − 1.
 */
export function highWord(word: number, hi: number, lo: number): number {
  const wordLo = word & 0xffff;
  const wordHi = word >>> 16;
  const middle = (Math.imul(wordHi, lo) + (Math.imul(wordLo, lo) >>> 16)) | 0;
  const carry = (Math.imul(wordLo, hi) + (middle & 0xffff)) | 0;
  return (Math.imul(wordHi, hi) + (middle >>> 16) + (carry >>> 16)) | 0;
}

/**
 * Writes the four random words of counter (c0, c1, c2, c3) under key (k0, k1) to `out`.
 * Guarantee: exact, the same bits on every engine.
 * Source: Salmon et al. (2011), section 4.3.
 */
export function philox4x32(
  c0: number,
  c1: number,
  c2: number,
  c3: number,
  k0: number,
  k1: number,
  out: Uint32Array,
): void {
  let x0 = c0;
  let x1 = c1;
  let x2 = c2;
  let x3 = c3;
  let a = k0;
  let b = k1;
  for (let round = 0; round < ROUNDS; round++) {
    const high0 = highWord(x0, M0_HI, M0_LO);
    const high1 = highWord(x2, M1_HI, M1_LO);
    const low0 = Math.imul(x0, M0);
    const low1 = Math.imul(x2, M1);
    x0 = high1 ^ x1 ^ a;
    x1 = low1;
    x2 = high0 ^ x3 ^ b;
    x3 = low0;
    a = (a + W0) | 0;
    b = (b + W1) | 0;
  }
  out[0] = x0;
  out[1] = x1;
  out[2] = x2;
  out[3] = x3;
}
