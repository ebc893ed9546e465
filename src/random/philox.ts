/**
 * Philox 4x32-10: a keyed shuffle of 128-bit counters. Any block of random words is computed
 * from its counter alone, so a number can belong to a row instead of to a position in a queue.
 *
 * Source: Salmon, Moraes, Dror, Shaw, "Parallel random numbers: as easy as 1, 2, 3", SC11
 * (2011), section 4.3. Words are unsigned 32-bit; signed words with the same bits serve too.
 * Does not handle: other word sizes or round counts.
 */

// Taken out once: where Math is not the engine's own (a sandbox), looking it up costs far more
// than the product.
const imul = Math.imul;

const M0 = 0xd2511f53;
const M1 = 0xcd9e8d57;
/** What the two key words grow by after each round (Weyl sequence). */
const W0 = 0x9e3779b9;
const W1 = 0xbb67ae85;
const ROUNDS = 10;

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
    const high0 = timesM0High(x0);
    const high1 = timesM1High(x2);
    const low0 = imul(x0, M0);
    const low1 = imul(x2, M1);
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

/**
 * Writes the blocks of counters (c0, c1, c2, c3), (c0 + 1, c1, c2, c3) … as fractions, two a
 * block: words 0, 1 to out[at], words 2, 3 to out[at + 1], and so on.
 * Guarantee: multiples of 2^-53 in [0, 1), those of `philox4x32` and `fraction` to the bit.
 * Derived: `philox4x32` with its first two rounds opened up. Only word 0 varies from block to
 * block, so half of each of those rounds is the same for all blocks and is done once. Two blocks
 * x and y run side by side, and one product of each goes through doubles, so that the processor's
 * units for whole numbers and for doubles are both busy: 58 instead of 47 million numbers a second.
 */
export function fillFractions(
  c0: number,
  c1: number,
  c2: number,
  c3: number,
  k0: number,
  k1: number,
  out: Float64Array,
  at: number,
  blocks: number,
): void {
  const a1 = (k0 + W0) | 0;
  const b1 = (k1 + W1) | 0;
  const a2 = (a1 + W0) | 0;
  const b2 = (b1 + W1) | 0;
  const first0 = timesM1High(c2) ^ c1 ^ k0;
  const first1 = imul(c2, M1);
  const second2 = timesM0High(first0) ^ b1;
  const second3 = imul(first0, M0);
  for (let i = 0; i < blocks; i += 2) {
    const xFirst2 = timesM0High(c0 + i) ^ c3 ^ k1;
    const yFirst2 = timesM0High(c0 + i + 1) ^ c3 ^ k1;
    let x0 = timesM1High(xFirst2) ^ first1 ^ a1;
    let y0 = timesM1High(yFirst2) ^ first1 ^ a1;
    let x1 = imul(xFirst2, M1);
    let y1 = imul(yFirst2, M1);
    let x2 = second2 ^ imul(c0 + i, M0);
    let y2 = second2 ^ imul(c0 + i + 1, M0);
    let x3 = second3;
    let y3 = second3;
    let a = a2;
    let b = b2;
    for (let round = 2; round < ROUNDS; round++) {
      const xLow1 = imul(x2, M1);
      const yLow1 = imul(y2, M1);
      const xHigh0 = timesM0High(x0);
      const yHigh0 = timesM0High(y0);
      const xHigh1 = timesM1HighByDoubles(x2, xLow1);
      const yHigh1 = timesM1HighByDoubles(y2, yLow1);
      const xLow0 = imul(x0, M0);
      const yLow0 = imul(y0, M0);
      x0 = xHigh1 ^ x1 ^ a;
      y0 = yHigh1 ^ y1 ^ a;
      x1 = xLow1;
      y1 = yLow1;
      x2 = xHigh0 ^ x3 ^ b;
      y2 = yHigh0 ^ y3 ^ b;
      x3 = xLow0;
      y3 = yLow0;
      a = (a + W0) | 0;
      b = (b + W1) | 0;
    }
    const place = at + 2 * i;
    out[place] = fraction(x0, x1);
    out[place + 1] = fraction(x2, x3);
    if (i + 1 === blocks) return;
    out[place + 2] = fraction(y0, y1);
    out[place + 3] = fraction(y2, y3);
  }
}

/** The upper 27 bits of one word followed by the upper 26 bits of the next, as a fraction of 1. */
export function fraction(word: number, next: number): number {
  return ((word >>> 5) * 67108864 + (next >>> 6)) * 1.1102230246251565e-16;
}

// The upper 32 bits, signed, of the 64-bit product with a multiplier, by long multiplication in
// 16-bit halves. Exact: no sum passes (2^16 − 1)² + 2·(2^16 − 1) = 2^32 − 1. The halves of M0 and
// M1 are written as literals so that they are folded: as constants imported from another file
// they cost nearly half the speed (27 against 49 million numbers a second).

function timesM0High(word: number): number {
  const lo = word & 0xffff;
  const hi = word >>> 16;
  const middle = (imul(hi, 0x1f53) + (imul(lo, 0x1f53) >>> 16)) | 0;
  const carry = (imul(lo, 0xd251) + (middle & 0xffff)) | 0;
  return (imul(hi, 0xd251) + (middle >>> 16) + (carry >>> 16)) | 0;
}

function timesM1High(word: number): number {
  const lo = word & 0xffff;
  const hi = word >>> 16;
  const middle = (imul(hi, 0x8d57) + (imul(lo, 0x8d57) >>> 16)) | 0;
  const carry = (imul(lo, 0xcd9e) + (middle & 0xffff)) | 0;
  return (imul(hi, 0xcd9e) + (middle >>> 16) + (carry >>> 16)) | 0;
}

/**
 * timesM1High, told from the product in doubles and its lower 32 bits. Exact: the product and the
 * difference are each rounded by at most 2^10, so the quotient is within 2^-21 of the whole number
 * sought, and adding 1/2 rounds by no more than that again.
 */
function timesM1HighByDoubles(word: number, low: number): number {
  return (((word >>> 0) * 0xcd9e8d57 - (low >>> 0)) * 2.3283064365386963e-10 + 0.5) | 0;
}
